"""Which calls a person should look at: doubtful, overruled, or at odds with a habitat rule.

doubtful    the call is no plain zone, wants a second look, or its belief is below "sure"
overruled   a person set another zone, or struck out a line of evidence that is no rule
conflicted  a habitat rule spoke against the zone called, or a person struck a rule out

Everything is taken from the record itself, so a record means the same at every desk. A record
without a kept call asks nothing, unless a person overruled something in it.
"""

from __future__ import annotations

from dataclasses import dataclass

from builder.key.defaults import SESSION
from builder.records.clean import Record
from builder.records.known import belief_of

SURE: float = SESSION["sure"]
IMPLIED = "implied"  # named as most plentiful: the one line beside rules that can be struck out


@dataclass(frozen=True)
class Review:
    """Why a record stands in the queue; all False means it does not."""

    doubtful: bool
    overruled: bool
    conflicted: bool

    @property
    def wanted(self) -> bool:
        """Whether a person should look."""
        return self.doubtful or self.overruled or self.conflicted


def review(site: Record) -> Review:
    """Why a cleaned record should be looked at."""
    struck = site["struck"]
    return Review(
        doubtful=is_doubtful(site),
        overruled=bool(site["overruled"]) or IMPLIED in struck,
        conflicted=any(name != IMPLIED for name in struck) or rule_against(site),
    )


def is_doubtful(site: Record) -> bool:
    """Whether the kept call itself says that it is not sure."""
    kept = site["call"]
    if not kept:
        return False
    if kept.get("verdict") != "zone" or kept.get("look_again") is not False:
        return True
    belief = belief_of(site)
    return belief is None or belief < SURE


def rule_against(site: Record) -> bool:
    """Whether a rule's points in the kept reasons speak for the runner-up."""
    reasons = (site["call"] or {}).get("reasons")
    for one in reasons if isinstance(reasons, list) else []:
        if isinstance(one, dict) and one.get("kind") == "rule":
            points = one.get("points_cb")
            if isinstance(points, int | float) and points < 0:
                return True
    return False
