"""Every plant that a table speaks of stands in plants.yaml.

Passes: occurrence.yaml occurrence/wet_sedge: {wet: [95, 40]}
Fails: occurrence.yaml occurrence/wet_segde: {wet: [95, 40]}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.checks.unknown_ids import unknown
from builder.problems import Problem
from builder.tables import Loaded

ID = "plant-names"
NEEDS = ("plants",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Ids of plants that are used and not declared."""
    yield from unknown(loaded, "plants", "plant", ID)
