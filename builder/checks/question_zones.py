"""A question about the ground names at least one zone, or moves the height.

Passes: questions.yaml questions/0/answers/1/zone_log_odds: {wet: -2}
Fails: questions.yaml questions/0/answers: [{value: near, label: near}, {value: far, label: far}]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded, Question

ID = "question-zones"
NEEDS = ("questions",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Azonal and shift questions that say nothing of zones; other kinds without any effect."""
    if loaded.partial is None:
        return
    for question in loaded.partial.questions:
        if question.kind in ("azonal", "shift"):
            if not _names_zone(question) and not _moves_height(question):
                yield problem_at(
                    question.place("id"),
                    ID,
                    f"question {question.id} names no zone",
                    "Add zone_log_odds to an answer.",
                )
        elif not _names_zone(question) and not any(a.effect for a in question.answers):
            yield problem_at(
                question.place("id"),
                ID,
                f"question {question.id} changes nothing",
                "Add an effect to an answer, or take the question out.",
            )


def _names_zone(question: Question) -> bool:
    return any(answer.zone_log_odds for answer in question.answers)


def _moves_height(question: Question) -> bool:
    return any(
        answer.effect and (answer.effect.height_off or answer.effect.elevation_shift_m)
        for answer in question.answers
    )
