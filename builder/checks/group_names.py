"""Every group that a table speaks of stands among the groups of plants.yaml.

Passes: region.yaml success_rule/peat_forming_group: bunch_grass
Fails: region.yaml success_rule/peat_forming_group: bunchgrass
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.checks.unknown_ids import unknown
from builder.problems import Problem
from builder.tables import Loaded

ID = "group-names"
NEEDS = ("plants",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Ids of groups that are used and not declared."""
    yield from unknown(loaded, "groups", "group", ID)
