"""How commands speak: lines at once, progress that the desk reads too, problems in order."""

from __future__ import annotations

from collections.abc import Iterable

from builder.problems import Problem, in_order, render_all


class Told(Exception):  # noqa: N818 - a person's mistake, told and not traced
    """What was given cannot be worked with; the text says why."""


def say(words: str) -> None:
    """One line for the person, at once."""
    print(words, flush=True)


def say_step(done: int, of: int, words: str) -> None:
    """One line of progress."""
    say(f"[{done}/{of}] {words}")


def say_share(stage: str, share: float) -> None:
    """Progress of one stage, as hundredths."""
    say_step(round(100 * share), 100, stage)


def say_problems(problems: Iterable[Problem]) -> None:
    """Every problem with its line, and how many there are."""
    say(render_all(in_order(problems)))
