"""Lapse rates are given for all twelve months.

Passes: region.yaml lapse/rain_pct_per_km: [5, 5, 5, 5, 5, 5, 5, 5, 5, 5, 5, 5]
Fails: region.yaml lapse/rain_pct_per_km: [5, 5, 5]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "lapse-months"
NEEDS = ("region",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Lists that are not twelve long."""
    if loaded.partial is None:
        return
    lapse = loaded.partial.head.lapse
    for name in ("tmax_c_per_km", "tmin_c_per_km", "rain_pct_per_km"):
        given = len(getattr(lapse, name))
        if given != 12:
            yield problem_at(
                lapse.place(name),
                ID,
                f"{name} has {given} months",
                "Write twelve, January to December.",
            )
