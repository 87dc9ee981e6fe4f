"""Constancy classes run from 1 to 100% without gaps, in whole percents.

Passes: region.yaml constancy_classes/1: {code: II, low_pct: 21, high_pct: 40}
Fails: region.yaml constancy_classes/1: {code: II, low_pct: 25, high_pct: 40}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "constancy-classes"
NEEDS = ("region",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Classes that leave percents out or hold them twice."""
    if loaded.partial is None:
        return
    edge = 0.0
    for each in loaded.partial.head.constancy_classes:
        if not edge <= each.low_pct <= edge + 1 or each.high_pct <= each.low_pct:
            yield problem_at(
                each.place("low_pct"),
                ID,
                f"class {each.code} holds {each.low_pct:g} to {each.high_pct:g}%, "
                f"the one below ends at {edge:g}%",
                f"Let it begin at {edge + 1:g}.",
            )
        edge = max(edge, each.high_pct)
    if edge != 100:
        yield problem_at(
            loaded.partial.head.place("constancy_classes"),
            ID,
            f"the classes end at {edge:g}%",
            "The last class ends at 100.",
        )
