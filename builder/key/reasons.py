"""Why this zone and not that one: whole centibans that add up exactly."""

from __future__ import annotations

from typing import Any

from builder.key.belief import Weighed, weigh_site
from builder.key.prepare import Key, Pack, Site, prepare
from builder.key.rounding import round_half_up


def reasons_between(pack: Pack, site: Site, zone_a: str, zone_b: str) -> dict[str, Any]:
    """Points of every answer and line for zone A minus zone B; they add up to difference_cb."""
    key = prepare(pack)
    return reasons_of(key, weigh_site(key, site), key.zone_at[zone_a], key.zone_at[zone_b])


def reasons_of(key: Key, weighed: Weighed, a: int, b: int) -> dict[str, Any]:
    """The same from what was already weighed; a and b are zone indexes.

    Lines after the answers: implied (named as most plentiful), height, area, and drag (answers
    that repeat each other), which also takes up the rounding of the difference.
    """
    rows: list[tuple[str, str | None, str | None, int]] = [
        (one.kind, one.id, one.answer, int(one.points[a] - one.points[b]))
        for one in weighed.answers
    ]
    rows.append(("implied", None, None, int(weighed.implied[a] - weighed.implied[b])))
    rows.append(("height", None, None, int(weighed.height[a] - weighed.height[b])))
    rows.append(("area", None, None, int(key.area[a] - key.area[b])))
    difference = int(round_half_up(weighed.total[a] - weighed.total[b]))
    rows.append(("drag", None, None, difference - sum(row[3] for row in rows)))
    names = ("kind", "id", "answer", "points_cb")
    return {
        "difference_cb": difference,
        "reasons": [dict(zip(names, row, strict=True)) for row in rows if row[3] != 0],
    }
