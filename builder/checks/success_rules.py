"""The success rule has what its kind needs, and trajectories run forward in time.

Passes: region.yaml success_rule/share: 0.9
Fails: region.yaml success_rule/share: (left out)
Fails: region.yaml success_rule/kind: trajectory
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "success-rules"
NEEDS = ("reclaim", "region")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Rules without their figures, lines without points or with years out of order."""
    region = loaded.partial
    if region is None:
        return
    rule = region.success_rule
    if rule.kind == "standard" and rule.share is None:
        yield problem_at(
            rule.at,
            ID,
            "the success rule has no share",
            "Add share: what part of the standard is enough, 1 for all of it.",
        )
    if rule.null_kind == "reverse" and rule.reverse_null is None:
        yield problem_at(
            rule.place("null_kind"),
            ID,
            "the reverse null decides and is not given",
            "Add reverse_null with its text, alpha and min_samples.",
        )
    for zone_id, notes in region.reclaim.zones.items():
        success = notes.success
        if rule.kind == "trajectory" and not success.trajectory:
            yield problem_at(
                success.at,
                ID,
                f"{zone_id} has no trajectory",
                "Add lines by year; the region's rule judges by them.",
            )
        for line in success.trajectory:
            points = line.at_most or line.at_least
            years = [year for year, _ in points]
            if bool(line.at_most) == bool(line.at_least):
                yield problem_at(
                    line.at,
                    ID,
                    f"{line.measure} of {zone_id} needs at_most or at_least",
                    "Give one of the two, as [year, value] points.",
                )
            elif years != sorted(set(years)):
                yield problem_at(
                    line.at,
                    ID,
                    f"years of {line.measure} of {zone_id} do not rise",
                    "Write the points in the order of years, each once.",
                )
