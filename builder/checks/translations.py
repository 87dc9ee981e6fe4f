"""A translated question has the answers of the question, and no name is left half.

Passes: words/es.yaml questions: {water_table: {ask: x, answers: {near: a, far: b}}}
Fails: words/es.yaml questions: {water_table: {ask: x, answers: {near: a, fra: b}}}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, nearest, problem_at
from builder.tables import Loaded

ID = "translations"
NEEDS = ("questions",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Answers that the question does not have, and answers that were left out."""
    if loaded.partial is None:
        return
    questions = {question.id: question for question in loaded.partial.questions}
    for words in loaded.partial.words.values():
        for question_id, said in words.questions.items():
            question = questions.get(question_id)
            if question is None:
                continue
            values = [answer.value for answer in question.answers]
            for value in said.answers:
                if value not in values:
                    yield problem_at(
                        said.key_place("answers", value),
                        ID,
                        f'{question_id} has no answer "{value}"',
                        nearest(value, values, "answer"),
                    )
            missing = [value for value in values if value not in said.answers]
            if missing:
                yield problem_at(
                    said.at,
                    ID,
                    f"answer {missing[0]} of {question_id} has no translation",
                    "Add it, or it will show in English.",
                    CAUTION,
                )
