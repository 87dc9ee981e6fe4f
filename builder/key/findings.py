"""A site check's findings by plant and group: the last answer of each counts."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from builder.key.prepare import Key, Site

Finding = dict[str, Any]


@dataclass(frozen=True)
class Findings:
    """What was found and not found.

    plants  {plant index: finding}, found or not found; groups {group index: finding}
    open    plants that must stay unknown: "can't tell", or of a group found or unsure
    named   plants found and named as most plentiful, in the order given
    """

    plants: dict[int, Finding]
    groups: dict[int, Finding]
    open: set[int]
    named: list[int]


def read_findings(key: Key, site: Site) -> Findings:
    """Findings of a site; after a search of the whole plot the rest is not found."""
    plants: dict[int, Finding] = {}
    groups: dict[int, Finding] = {}
    still_open: set[int] = set()
    unsure: set[int] = set()
    for finding in site.get("findings") or []:
        if finding.get("plant_id"):
            at = key.plant_at.get(finding["plant_id"])
            _enter(plants, still_open, at, finding)
        else:
            _enter(groups, unsure, key.group_at.get(finding.get("group_id", "")), finding)
    for g in unsure.union(g for g, one in groups.items() if one["state"] != "not_found"):
        still_open.update(key.pack["groups"][g]["members"])
    named = [p for p, one in plants.items() if one["state"] == "found" and one.get("named")]
    if site.get("whole_plot_searched"):
        for p in range(key.plants):
            if p not in plants and p not in still_open:
                plants[p] = {"state": "not_found"}
    return Findings(plants, groups, still_open, named)


def _enter(
    into: dict[int, Finding], still_open: set[int], at: int | None, finding: Finding
) -> None:
    if at is None:
        return
    into.pop(at, None)
    still_open.discard(at)
    if finding["state"] == "cant_tell":
        still_open.add(at)
    else:
        into[at] = finding


def step_of(key: Key, code: str | None) -> int:
    """Cover step 0..3 of a class code; 4 where none is given."""
    at = key.class_at.get(code or "")
    step: int = 4 if at is None else key.pack["cover"]["classes"][at]["step"]
    return step
