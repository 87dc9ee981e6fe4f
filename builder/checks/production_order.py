"""A low year is not above a normal one, nor a normal one above a high one.

Passes: production.yaml production/lower/low_kg_ha: 400
Fails: production.yaml production/lower/low_kg_ha: 4000
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Place, Problem, problem_at
from builder.tables import Loaded

ID = "production-order"
NEEDS = ("production",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Growth, moss and standing crop out of order."""
    if loaded.partial is None:
        return
    for zone_id, row in loaded.partial.production.items():
        yield from _ordered(
            (row.low_kg_ha, row.normal_kg_ha, row.high_kg_ha),
            row.place("low_kg_ha"),
            f"growth of {zone_id}",
        )
        if row.moss_kg_ha is not None:
            yield from _ordered(row.moss_kg_ha, row.place("moss_kg_ha"), f"moss of {zone_id}")
        crop = row.standing_crop_t_ha
        if crop is not None and None not in (crop.low, crop.normal, crop.high):
            yield from _ordered(
                (crop.low, crop.normal, crop.high), crop.place("low"), f"standing crop of {zone_id}"
            )


def _ordered(three: tuple[float | None, ...], place: Place, what: str) -> Iterator[Problem]:
    low, normal, high = (value or 0.0 for value in three)
    if not low <= normal <= high:
        yield problem_at(
            place,
            ID,
            f"{what} is out of order: {low:g}, {normal:g}, {high:g}",
            "Low, normal and high rise in this order.",
        )
