"""Where an answer speaks for zones, every answer says how often it is given; they add to 1.

Passes: questions.yaml questions/0/answers/0/share: 0.1
Fails: questions.yaml questions/0/answers/0/share: 0.3
Fails: questions.yaml questions/0/answers/0/share: (left out)
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "answer-shares"
NEEDS = ("questions",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Shares that are missing or do not add up; without them odds are no probabilities."""
    if loaded.partial is None:
        return
    for question in loaded.partial.questions:
        if not any(answer.zone_log_odds for answer in question.answers):
            continue
        shares = [answer.share for answer in question.answers]
        for answer in question.answers:
            if answer.share is None:
                yield problem_at(
                    answer.at,
                    ID,
                    f"answer {answer.value} of {question.id} has no share",
                    "Add share: how often it is given over the region, 0 to 1.",
                )
            elif answer.share == 0:
                yield problem_at(
                    answer.place("share"),
                    ID,
                    f"answer {answer.value} of {question.id} is never given",
                    "A rare answer has a small share, not 0.",
                )
        total = sum(share for share in shares if share is not None)
        if None not in shares and abs(total - 1) > 0.001:
            yield problem_at(
                question.answers[0].place("share"),
                ID,
                f"the shares of {question.id} add to {total:g}",
                "They add to 1.",
            )
