"""Habitat rules over plants, groups, ground answers and site facts, in three-valued logic.

Unknown stays unknown: a plant nobody searched for never fires or blocks a rule.
"""

from __future__ import annotations

import math
from typing import Any

from builder.key.context import told_answers
from builder.key.findings import Findings
from builder.key.prepare import Key, Site

TRUE, FALSE, UNKNOWN = 1.0, 0.0, 0.5


def fired_rules(key: Key, site: Site, findings: Findings) -> list[dict[str, Any]]:
    """Rules of the pack that hold, without those the person struck out."""
    struck = set(site.get("struck") or [])
    return [
        rule
        for rule in key.pack["rules"]
        if rule["id"] not in struck and holds(key, site, findings, rule["when"]) == TRUE
    ]


def holds(key: Key, site: Site, findings: Findings, when: dict[str, Any]) -> float:
    """1 true, 0 false, 0.5 unknown (Kleene's strong logic: least of all, most of any)."""
    if "all" in when:
        return min(holds(key, site, findings, one) for one in when["all"])
    if "any" in when:
        return max(holds(key, site, findings, one) for one in when["any"])
    if "not" in when:
        return 1.0 - holds(key, site, findings, when["not"])
    if "plant" in when:
        return _cover_holds(key, findings, [key.plant_at[when["plant"]]], when)
    if "group" in when:
        return _group_holds(key, findings, when)
    if "question" in when:
        return is_value(told_answers(key, site).get(when["question"]), when)
    return holds_fact(site, when)


def _group_holds(key: Key, findings: Findings, when: dict[str, Any]) -> float:
    members = key.pack["groups"][key.group_at[when["group"]]]["members"]
    wanted = when.get("count_at_least")
    if wanted is None:
        return _cover_holds(key, findings, members, when)
    states = [findings.plants.get(p, {}).get("state") for p in members]
    found = states.count("found")
    if found >= wanted:
        return TRUE
    still_open = len(states) - found - states.count("not_found")
    return FALSE if found + still_open < wanted else UNKNOWN


def _cover_holds(key: Key, findings: Findings, members: list[int], when: dict[str, Any]) -> float:
    """Summed cover of the members, between the lower and upper limits of their classes."""
    least, most, found = 0.0, 0.0, False
    for p in members:
        finding = findings.plants.get(p, {})
        if finding.get("state") == "not_found":
            continue
        if finding.get("state") != "found":
            most = math.inf
            continue
        found = True
        at = key.class_at.get(finding.get("cover") or "")
        chosen = key.pack["cover"]["classes"][at] if at is not None else None
        least += chosen["low_pct"] if chosen else 0.0
        most += chosen["high_pct"] if chosen else 100.0
    wanted = when.get("cover_at_least_pct", 0)
    if wanted == 0:
        return TRUE if found else FALSE if most == 0 else UNKNOWN
    if least >= wanted:
        return TRUE
    return UNKNOWN if most > wanted else FALSE


def is_value(value: Any, when: dict[str, Any]) -> float:
    """Is a known value the one, or one of those, the condition names."""
    if value is None:
        return UNKNOWN
    wanted = when["is"]
    return float(value in wanted if isinstance(wanted, list) else value == wanted)


def holds_fact(site: Site, when: dict[str, Any]) -> float:
    """Does a fact of the site lie between the condition's limits."""
    value = (site.get("place") or {}).get(when["fact"])
    if value is None:
        value = site.get(when["fact"])
    if value is None or "is" in when:
        return is_value(value, when)
    if "at_least" in when and value < when["at_least"]:
        return FALSE
    return float("at_most" not in when or value <= when["at_most"])
