"""Every zone that a table speaks of stands in zones.yaml.

Passes: zones.yaml zones/1/told_from: {lower: What tells them apart.}
Fails: zones.yaml zones/1/told_from: {lowre: What tells them apart.}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.checks.unknown_ids import unknown
from builder.problems import Problem
from builder.tables import Loaded

ID = "zone-names"
NEEDS = ("zones",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Zone ids that no row of zones.yaml declares."""
    yield from unknown(loaded, "zones", "zone", ID)
