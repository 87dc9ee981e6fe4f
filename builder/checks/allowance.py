"""A success allowance is taken off once: a line that is a share of the reference is not cut again.

Passes: reclaim.yaml zones/lower/success: {perennial_cover_share_of_reference: 0.7, share: 1,
    min_native_perennials: 4, max_weed_share_of_cover: 0.1, earliest_year: 4, source: demo}
Fails: reclaim.yaml zones/lower/success: {perennial_cover_share_of_reference: 0.7,
    min_native_perennials: 4, max_weed_share_of_cover: 0.1, earliest_year: 4, source: demo}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "double-allowance"
NEEDS = ("reclaim", "region")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Cover lines below the whole reference that the region's share would lower again."""
    region = loaded.partial
    if region is None:
        return
    for zone_id, notes in region.reclaim.zones.items():
        success = notes.success
        line = success.perennial_cover_share_of_reference
        share = success.share if success.share is not None else region.success_rule.share
        if line is not None and line < 1 and share is not None and share < 1:
            yield problem_at(
                success.place("perennial_cover_share_of_reference"),
                ID,
                f"{zone_id} asks for {line:g} of the reference, and {share:g} of that again",
                "Add share: 1 to the row, or state the full standard.",
            )
