"""A record scored again under the pack of its edition: what differs from the call it kept."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from builder.key.call import call
from builder.key.prepare import Pack
from builder.records.clean import Record
from builder.records.merge import canonical
from builder.records.sentences import read_sentences

FIELDS = ("verdict", "zone_id", "next_zone_id", "answers", "fit", "finds_cb", "difference_cb")


@dataclass(frozen=True)
class Difference:
    """One part of a call that is not what was kept."""

    what: str
    kept: str
    now: str


@dataclass(frozen=True)
class Rescored:
    """A record scored again.

    state  same, differs, no_call (nothing was kept), no_pack (the pack that scored it is not at
           hand)
    """

    state: str
    differences: tuple[Difference, ...] = ()


def rescore(site: Record, packs: Mapping[str, Pack]) -> Rescored:
    """Scores a record again and tells every difference.

    packs  pack_hash → pack; only the very pack that scored the record is used
    """
    pack = packs.get(site["pack_hash"])
    if site["call"] is None:
        return Rescored("no_call")
    if pack is None or pack["region"]["id"] != site["region_id"]:
        return Rescored("no_pack")
    found = tuple(differences(site["call"], call(pack, site, prompts=0)))
    return Rescored("differs" if found else "same", found)


def differences(kept: Record, now: Record) -> list[Difference]:
    """Parts of two calls that differ: figures, beliefs by zone, reasons by what speaks."""
    found = [_difference(name, kept.get(name), now[name]) for name in FIELDS]
    old = kept.get("belief")
    beliefs = old if isinstance(old, dict) else {}
    for zone in sorted(now["belief"].keys() | beliefs.keys()):
        name = read_sentences()["rescored"]["belief"].format(zone=zone)
        found.append(_difference(name, beliefs.get(zone), now["belief"].get(zone)))
    before, after = _points(kept.get("reasons")), _points(now["reasons"])
    for name in sorted(before.keys() | after.keys()):
        found.append(_difference(name, before.get(name), after.get(name)))
    return [one for one in found if one is not None]


def _difference(what: str, kept: Any, now: Any) -> Difference | None:
    if canonical(kept) == canonical(now):
        return None
    said = read_sentences()["rescored"]
    names = [said["nothing"] if one is None else str(one) for one in (kept, now)]
    return Difference(said["what"].get(what, what), *names)


def _points(reasons: Any) -> dict[str, Any]:
    points: dict[str, Any] = {}
    for one in reasons if isinstance(reasons, list) else []:
        if isinstance(one, dict):
            parts = [str(one[name]) for name in ("kind", "id", "answer") if one.get(name)]
            points[" ".join(parts)] = one.get("points_cb")
    return points


def rescored_said(made: Rescored, site_id: str) -> list[str]:
    """The outcome as sentences; none where the call is the same."""
    say = read_sentences()["rescored"]
    if made.state == "same":
        return []
    if made.state != "differs":
        return [say[made.state].format(id=site_id)]
    parts = [say["part"].format(what=d.what, kept=d.kept, now=d.now) for d in made.differences]
    return [say["differs"].format(id=site_id, parts="; ".join(parts))]
