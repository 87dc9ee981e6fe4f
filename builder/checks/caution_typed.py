"""A plant whose own text speaks of poison carries a caution that says who and how badly.

Passes: plants.yaml plants/5/note: Poisonous to stock.
Fails: plants.yaml plants/4/note: Poisonous to stock.
"""

from __future__ import annotations

import re
from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "caution-typed"
NEEDS = ("plants",)
POISON = re.compile(r"\b(poisonous|poisons|toxic|deadly|kills?|blisters?|abortion)\b", re.I)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Plants whose marks or note warn, and whose cautions do not."""
    if loaded.partial is None:
        return
    for plant in loaded.partial.plants:
        if plant.cautions:
            continue
        for name in ("marks", "note"):
            if POISON.search(getattr(plant, name)):
                yield problem_at(
                    plant.place(name),
                    ID,
                    f"{plant.id} is said to do harm and carries no caution",
                    "Add cautions: with who, level and text.",
                )
