"""A zone's band is the right way up, holds its centre and lies in the region.

Passes: zones.yaml zones/0/band_m: [200, 700]
Fails: zones.yaml zones/0/band_m: [700, 200]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "bands"
NEEDS = ("zones",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Bands upside down, centres outside their band, bands outside the region, odd ranges."""
    region = loaded.partial
    if region is None:
        return
    for zone in region.zones:
        low, high = zone.band_m
        if low >= high:
            yield problem_at(
                zone.place("band_m"),
                ID,
                f"the band of {zone.id} is upside down: {low:g} to {high:g} m",
                "Write [low, high].",
            )
            continue
        if not low <= zone.centre_m <= high:
            yield problem_at(
                zone.place("centre_m"),
                ID,
                f"the centre {zone.centre_m:g} m of {zone.id} lies outside its band",
                f"It lies between {low:g} and {high:g}.",
            )
        if region.head is not None:
            lowest, highest = region.elevation_m
            if low < lowest or high > highest:
                yield problem_at(
                    zone.place("band_m"),
                    ID,
                    f"the band of {zone.id} reaches out of the region's "
                    f"{lowest:g} to {highest:g} m",
                    "Mend the band, or elevation_m in region.yaml.",
                )
        for name, (least, usual, most) in zone.site_ranges.items():
            if not least <= usual <= most:
                yield problem_at(
                    zone.place("site_ranges", name),
                    ID,
                    f"{name} of {zone.id} is out of order",
                    "Write [low, usual, high].",
                )
