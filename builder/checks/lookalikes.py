"""A look-alike is another plant of the table, and the row says how to tell them apart.

Passes: plants.yaml plants/0/lookalikes: [upper_grass]
Fails: plants.yaml plants/0/lookalikes: [uper_grass]
Fails: plants.yaml plants/0/lookalikes: [lower_grass]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, nearest, problem_at
from builder.tables import Loaded

ID = "lookalikes"
NEEDS = ("plants",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Look-alikes that point nowhere or at the plant itself, or that have no tell."""
    if loaded.partial is None:
        return
    known = loaded.declared("plants")
    for plant in loaded.partial.plants:
        for position, other in enumerate(plant.lookalikes):
            place = plant.place("lookalikes", position)
            if other == plant.id:
                yield problem_at(place, ID, f"{plant.id} is its own look-alike", "Take it out.")
            elif other not in known:
                yield problem_at(
                    place,
                    ID,
                    f'look-alike "{other}" is not in plants.yaml',
                    nearest(other, known, "plant"),
                )
        if plant.lookalikes and not plant.lookalike_tell:
            yield problem_at(
                plant.place("lookalikes"),
                ID,
                f"{plant.id} has look-alikes but no tell",
                "Add lookalike_tell: the one mark that parts them.",
                CAUTION,
            )
