"""Every disturbance that the notes speak of stands in region.yaml.

Passes: reclaim.yaml zones/lower/by_disturbance: {stripped: {do: Rip it., avoid: Haste.}}
Fails: reclaim.yaml zones/lower/by_disturbance: {striped: {do: Rip it., avoid: Haste.}}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.checks.unknown_ids import unknown
from builder.problems import Problem
from builder.tables import Loaded

ID = "disturbance-names"
NEEDS = ("region",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Ids of disturbances that are used and not declared."""
    yield from unknown(loaded, "disturbances", "disturbance", ID)
