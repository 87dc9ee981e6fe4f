"""A question that sends a spade, auger or rod into the ground says how deep it digs.

Passes: questions.yaml questions/0/ask: Dig a hole. How deep is water?
Fails: questions.yaml questions/1/ask: Dig a hole. Has the soil been moved?
"""

from __future__ import annotations

import re
from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "digging"
NEEDS = ("questions",)
WORDS = re.compile(r"\b(dig|digs|dug|auger|spade|dipwell|rod|probe|core|peat from|soil at)\b", re.I)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Questions without digs_cm, so that buried lines would not be asked about first."""
    if loaded.partial is None:
        return
    for question in loaded.partial.questions:
        if question.digs_cm is None and WORDS.search(question.ask):
            yield problem_at(
                question.place("ask"),
                ID,
                f"question {question.id} digs and does not say how deep",
                "Add digs_cm: the deepest hole it may ask for.",
            )
