"""Ground cover adds to 100, since each point of ground is one thing only.

Passes: production.yaml production/lower/ground_cover_pct/bare_soil: 40
Fails: production.yaml production/lower/ground_cover_pct/bare_soil: 70
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "ground-cover"
NEEDS = ("production",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Sums that are more than a percent off."""
    if loaded.partial is None:
        return
    for zone_id, row in loaded.partial.production.items():
        total = sum(row.ground_cover_pct.values())
        if abs(total - 100) > 1:
            yield problem_at(
                row.place("ground_cover_pct"),
                ID,
                f"ground cover of {zone_id} adds to {total:g}%",
                "It adds to 100.",
            )
