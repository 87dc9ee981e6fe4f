"""The zone of a unit, carried in from its undisturbed edges."""

from __future__ import annotations

import math
from typing import Any

from builder.key.prepare import Pack, Site

METRES_PER_DEGREE = 111_320


def unit_zone(pack: Pack, checks: list[Site]) -> dict[str, Any]:
    """Zone of a unit from its edge checks on two sides or more.

    checks  site checks of one unit with their kept calls; only role "edge" counts, each on a side
            of its own: two within settings.side_apart_m of each other are one side

    Returns state (carried, differ, too_few), zone_id (None unless carried), zone_ids, sides,
    check_ids.
    """
    settings = pack["settings"]
    sides: list[dict[str, Any]] = []
    for check in checks:
        zones = _zones_of(check) if check["role"] == "edge" and check.get("call") else []
        if not zones:
            continue
        for side in sides:
            if _same_side(side["check"], check, settings["side_apart_m"]):
                side["ids"].append(check["id"])
                side["zones"] += zones
                break
        else:
            sides.append({"check": check, "ids": [check["id"]], "zones": list(zones)})
    said = {zone for side in sides for zone in side["zones"]}
    order = [zone["id"] for zone in pack["zones"] if zone["id"] in said]
    state = "too_few"
    if len(sides) >= settings["sides_wanted"]:
        state = "differ" if len(order) > 1 else "carried"
    return {
        "state": state,
        "zone_id": order[0] if state == "carried" else None,
        "zone_ids": order,
        "sides": len(sides),
        "check_ids": [one for side in sides for one in side["ids"]],
    }


def _zones_of(check: Site) -> list[str]:
    """What an edge check says: one zone, the two of an edge or mosaic, or nothing."""
    overruled = (check.get("overruled") or {}).get("zone_id")
    if overruled:
        return [overruled]
    if check["call"]["verdict"] == "zone":
        return [check["call"]["zone_id"]]
    return check["call"].get("pair") or []


def _same_side(a: Site, b: Site, apart_m: float) -> bool:
    places = [one.get("place") or {} for one in (a, b)]
    points: list[Any] = [(one.get("latitude_deg"), one.get("longitude_deg")) for one in places]
    if any(value is None for point in points for value in point):
        return False
    (lat_a, lon_a), (lat_b, lon_b) = points
    north = (lat_b - lat_a) * METRES_PER_DEGREE
    east = (lon_b - lon_a) * METRES_PER_DEGREE * math.cos(math.radians(lat_a))
    return math.hypot(north, east) < apart_m
