"""Habitat rules and states of the ground on many plots: which plots share one context."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.context import Context, context_of, told_answers
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key, Site
from builder.key.rules import FALSE, TRUE, UNKNOWN, holds_fact, is_value


@dataclass(frozen=True)
class Shared:
    """Plots that share month, disturbance, state answers and rules.

    site   what they share, without findings; rows: their places in the file
    rules  rules of the pack that hold on all of them once all that was searched is known
    stepwise  an answer on the way may change other evidence: sessions go one by one
    """

    context: Context
    site: Site
    rows: NDArray[np.int64]
    rules: list[dict[str, Any]]
    stepwise: bool


def contexts_of(
    key: Key, plots: Plots, month: int | None, disturbance: str | None
) -> Iterator[Shared]:
    """Plots in groups of one context; month and disturbance of plots that state none."""
    told = [question["id"] for question in key.pack["questions"] if _matters(key, question)]
    told = [name for name in told if name in plots.answers]
    groups: dict[tuple[object, ...], list[int]] = {}
    for at in range(len(plots)):
        own_month = int(plots.month[at]) if plots.month is not None else 0
        own = plots.disturbance[at] if plots.disturbance is not None else None
        answers = tuple(plots.answers[name][at] for name in told)
        groups.setdefault((own_month or month, own or disturbance, *answers), []).append(at)
    for rows in groups.values():
        yield from _by_rules(key, plots, plots.site(rows[0], month, disturbance), np.array(rows))


def _matters(key: Key, question: dict[str, Any]) -> bool:
    """Does an answer change other evidence, or stand in a rule's condition."""
    asked = {name for rule in key.pack["rules"] for name in _questions_in(rule["when"])}
    return question["id"] in asked or any(one.get("effect") for one in question["answers"])


def _questions_in(when: dict[str, Any]) -> set[str]:
    inner = [*when.get("all", []), *when.get("any", [])] + ([when["not"]] if "not" in when else [])
    own = {when["question"]} if "question" in when else set()
    return own.union(*(_questions_in(one) for one in inner))


def _by_rules(key: Key, plots: Plots, site: Site, rows: NDArray[np.int64]) -> Iterator[Shared]:
    part = plots.take(rows)
    fired = np.zeros((len(rows), len(key.pack["rules"])), bool)
    for r, rule in enumerate(key.pack["rules"]):
        fired[:, r] = _holds(key, part, site, rule["when"]) == TRUE
    for pattern in np.unique(fired, axis=0):
        here = (fired == pattern).all(axis=1)
        rules = [key.pack["rules"][r] for r in np.flatnonzero(pattern)]
        effects = tuple(rule["effect"] for rule in rules if rule.get("effect"))
        stepwise = bool(rules) or _effect_by_evidence(key, site)
        yield Shared(context_of(key, site, effects), site, rows[here], rules, stepwise)


def _effect_by_evidence(key: Key, site: Site) -> bool:
    """Would an answer that a prompt may bring change other evidence half way."""
    given = site["questions"]
    return any(
        one.get("effect") and "evidence" in one and one["value"] == given.get(question["id"])
        for question in key.pack["questions"]
        for one in question["answers"]
    )


def _holds(key: Key, plots: Plots, site: Site, when: dict[str, Any]) -> Floats:
    if "all" in when:
        return np.asarray(np.min([_holds(key, plots, site, one) for one in when["all"]], axis=0))
    if "any" in when:
        return np.asarray(np.max([_holds(key, plots, site, one) for one in when["any"]], axis=0))
    if "not" in when:
        return np.asarray(1.0 - _holds(key, plots, site, when["not"]))
    if "plant" in when:
        return _cover(key, plots, [key.plant_at[when["plant"]]], when)
    if "group" in when:
        members = key.pack["groups"][key.group_at[when["group"]]]["members"]
        if "count_at_least" in when:
            return _count(plots, members, when["count_at_least"])
        return _cover(key, plots, members, when)
    if "question" in when:
        return np.full(len(plots), is_value(told_answers(key, site).get(when["question"]), when))
    if when["fact"] in plots.place:
        values = plots.place[when["fact"]]
        places = [None if np.isnan(one) else float(one) for one in values]
        return np.array([holds_fact({when["fact"]: one}, when) for one in places])
    return np.full(len(plots), holds_fact(site, when))


def _count(plots: Plots, members: list[int], wanted: int) -> Floats:
    steps = plots.steps[:, members]
    found = (steps >= 0).sum(axis=1)
    still_open = (steps == -2).sum(axis=1)
    no = np.where(found + still_open < wanted, FALSE, UNKNOWN)
    return np.where(found >= wanted, TRUE, no)


def _cover(key: Key, plots: Plots, members: list[int], when: dict[str, Any]) -> Floats:
    classes = key.pack["cover"]["classes"]
    lows = np.array([one["low_pct"] for one in classes])
    steps, cover = plots.steps[:, members], plots.cover[:, members]
    at = np.maximum(np.searchsorted(lows, cover, side="right") - 1, 0)
    found = steps >= 0
    given = found & (steps < 4)
    low = np.where(given, lows[at], 0.0)
    high = np.where(given, np.array([one["high_pct"] for one in classes])[at], 100.0)
    least = np.where(found, low, 0.0).sum(axis=1)
    most = np.where(found, high, np.where(steps == -2, np.inf, 0.0)).sum(axis=1)
    wanted = when.get("cover_at_least_pct", 0)
    if wanted == 0:
        return np.where(found.any(axis=1), TRUE, np.where(most == 0, FALSE, UNKNOWN))
    return np.where(least >= wanted, TRUE, np.where(most > wanted, UNKNOWN, FALSE))
