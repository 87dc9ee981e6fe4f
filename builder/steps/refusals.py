"""Why a step does not go on, as told to the person."""

from __future__ import annotations

from builder.problems import Problem, errors


class ToldByStep(Exception):  # noqa: N818 - told to the person
    """A step cannot be done as asked; the text says why."""


class Stopped(Exception):  # noqa: N818 - told to the person with the problems
    """Tables or plots that stop the work, with every problem."""

    def __init__(self, problems: list[Problem]) -> None:
        super().__init__(f"{len(errors(problems))} problems stop the work")
        self.problems = problems
