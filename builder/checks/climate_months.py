"""Each zone has twelve months of climate at one height, days warmer than nights.

Passes: climate.csv 0/tmax_c: 8.5
Fails: climate.csv 0/month: 2
Fails: climate.csv 0/tmax_c: -20
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "climate-months"
NEEDS = ("climate",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Months that are missing or double, nights above days, two heights in one zone."""
    if loaded.partial is None:
        return
    for zone_id, months in loaded.partial.climate.items():
        seen: set[int] = set()
        for row in months:
            if row.month in seen:
                yield problem_at(
                    row.place("month"),
                    ID,
                    f"month {row.month} of {zone_id} stands twice",
                    "Each zone has the months 1 to 12 once.",
                )
            seen.add(row.month)
            if row.tmax_c <= row.tmin_c:
                yield problem_at(
                    row.place("tmax_c"),
                    ID,
                    f"tmax {row.tmax_c:g} is not above tmin {row.tmin_c:g}",
                    "Check the two columns.",
                )
            if row.elevation_m != months[0].elevation_m:
                yield problem_at(
                    row.place("elevation_m"),
                    ID,
                    f"the normals of {zone_id} stand at two heights",
                    "Carry them to one height, the zone's centre.",
                )
        missing = sorted(set(range(1, 13)) - seen)
        if missing:
            yield problem_at(
                months[0].at,
                ID,
                f"{zone_id} lacks month {', '.join(map(str, missing))}",
                "Add the missing months.",
            )
