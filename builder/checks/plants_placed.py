"""Every plant stands in some zone, or it can say nothing.

Passes: occurrence.yaml occurrence/upper_tree: {upper: [75, 25]}
Fails: occurrence.yaml occurrence/upper_tree: (left out)
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, problem_at
from builder.tables import Loaded

ID = "plants-placed"
NEEDS = ("plants", "occurrence", "region")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Plants without an occurrence."""
    if loaded.partial is None:
        return
    placed = {plant_id for _, plant_id in loaded.partial.occurrence}
    for plant in loaded.partial.plants:
        if plant.id not in placed:
            yield problem_at(
                plant.place("id"),
                ID,
                f"{plant.id} stands in no zone",
                "Add its constancy and cover to occurrence.yaml, or take the plant out.",
                CAUTION,
            )
