"""Every ground question that a table speaks of stands in questions.yaml.

Passes: region.yaml disturbances/1/states: {soil_moved: 'yes'}
Fails: region.yaml disturbances/1/states: {soil_move: 'yes'}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.checks.unknown_ids import unknown
from builder.problems import Problem
from builder.tables import Loaded

ID = "question-names"
NEEDS = ("questions",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Ids of questions that are used and not declared."""
    yield from unknown(loaded, "questions", "question", ID)
