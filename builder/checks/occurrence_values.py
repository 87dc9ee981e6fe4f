"""Constancy and cover of an occurrence are above zero; an absent plant has no entry.

Passes: occurrence.yaml occurrence/wet_sedge/lower: [2, 1]
Fails: occurrence.yaml occurrence/wet_sedge/lower: [0, 1]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "occurrence-values"
NEEDS = ("occurrence", "region")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Entries of nothing; more than 100 is refused while reading."""
    if loaded.partial is None:
        return
    for (zone_id, plant_id), seen in loaded.partial.occurrence.items():
        if seen.constancy <= 0 or seen.cover_pct <= 0:
            what = "constancy" if seen.constancy <= 0 else "cover"
            yield problem_at(
                seen.at,
                ID,
                f"{what} of {plant_id} in {zone_id} is 0",
                "Take the entry out where the plant is absent; a trace is 0.1.",
            )
