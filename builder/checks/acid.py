"""A question that lets acid near a hand shows goggles and gloves, and vinegar first.

Passes: questions.yaml questions/1/ask: Fizzes with vinegar? (Acid only in goggles, gloves.)
Fails: questions.yaml questions/1/ask: Does a drop of dilute acid fizz?
"""

from __future__ import annotations

import re
from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "acid"
NEEDS = ("questions",)
ACID = re.compile(r"\b(acid|hcl)\b(?! soil| ground| peat| spoil| water)", re.I)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Acid tests that do not name vinegar, goggles and gloves."""
    if loaded.partial is None:
        return
    for question in loaded.partial.questions:
        text = question.ask
        if ACID.search(text) and not all(
            w in text.lower() for w in ("vinegar", "goggles", "gloves")
        ):
            yield problem_at(
                question.place("ask"),
                ID,
                f"question {question.id} uses acid without saying how to be safe",
                "Name vinegar first, and acid only with goggles and gloves.",
            )
