"""A rule's condition asks one thing at a time, of answers that a question has.

Passes: questions.yaml rules: [{id: r, when: {group: bunch_grass, count_at_least: 2},
    zone_log_odds: {lower: 1}, why: so, act: go}]
Fails: questions.yaml rules: [{id: r, when: {group: bunch_grass}, zone_log_odds: {lower: 1},
    why: so, act: go}]
Fails: questions.yaml rules: [{id: r, when: {question: soil_moved, answer: perhaps}, effect:
    {sown: true}, why: so, act: go}]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, nearest, problem_at
from builder.tables import Condition, Loaded

ID = "conditions"
NEEDS = ("questions",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Conditions that ask nothing or two things, unknown answers, rules without a consequence."""
    if loaded.partial is None:
        return
    answers = {
        question.id: [answer.value for answer in question.answers]
        for question in loaded.partial.questions
    }
    for rule in loaded.partial.rules:
        yield from _sound(rule.when, answers)
        if not rule.zone_log_odds and rule.effect is None:
            yield problem_at(
                rule.place("id"),
                ID,
                f"rule {rule.id} changes nothing",
                "Add zone_log_odds or an effect.",
            )


def _sound(condition: Condition, answers: dict[str, list[str]]) -> Iterator[Problem]:
    asks = [
        bool(condition.any),
        bool(condition.all),
        condition.no is not None,
        (condition.plant is not None or condition.group is not None)
        and condition.cover_at_least_pct is not None,
        condition.group is not None and condition.count_at_least is not None,
        condition.question is not None and condition.answer is not None,
        condition.site is not None
        and (condition.at_least is not None or condition.at_most is not None),
    ]
    if sum(asks) != 1:
        yield problem_at(
            condition.at,
            ID,
            "the condition asks not exactly one thing",
            "Write any, all, not, a cover, a count, a question with its answer, "
            "or a site fact with its limit.",
        )
    if condition.question in answers and condition.answer not in answers[condition.question]:
        yield problem_at(
            condition.place("answer"),
            ID,
            f'{condition.question} has no answer "{condition.answer}"',
            nearest(str(condition.answer), answers[condition.question], "answer"),
        )
    for below in (*condition.any, *condition.all, *([condition.no] if condition.no else [])):
        yield from _sound(below, answers)
