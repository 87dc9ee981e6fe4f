"""A disturbance answers questions with answers they have; undisturbed ground is listed too.

Passes: region.yaml disturbances/1/states: {soil_moved: 'yes'}
Fails: region.yaml disturbances/1/states: {soil_moved: sideways}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, nearest, problem_at
from builder.tables import Loaded

ID = "disturbance-states"
NEEDS = ("region", "questions")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Answers that a question does not have; a missing "none"."""
    region = loaded.partial
    if region is None:
        return
    questions = {question.id: question for question in region.questions}
    for disturbance in region.disturbances:
        for question_id, value in disturbance.states.items():
            question = questions.get(question_id)
            if question is None:
                continue
            answers = [answer.value for answer in question.answers]
            if value not in answers:
                yield problem_at(
                    disturbance.place("states", question_id),
                    ID,
                    f'{question_id} has no answer "{value}"',
                    nearest(value, answers, "answer"),
                )
    if all(disturbance.id != "none" for disturbance in region.disturbances):
        yield problem_at(
            region.head.place("disturbances"),
            ID,
            'no disturbance is called "none"',
            "Add {id: none, name: Undisturbed ground, notes: false}.",
        )
