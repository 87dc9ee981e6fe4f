"""Goals that this command cannot measure, each with the reason, so that none goes unseen."""

from __future__ import annotations

from collections.abc import Callable
from typing import NoReturn

from builder.bench.measure import Goal, Measure, NotHere, Setting, Taken

FRESH = "it needs a fresh machine and a network; time it there"


def _because(reason: str) -> Callable[[Setting], Taken]:
    def told(setting: Setting) -> NoReturn:
        raise NotHere(reason)

    return told


MEASURES = tuple(
    Measure(name, what, unit, _because(reason), goal)
    for name, what, unit, goal, reason in (
        ("other-demo", "Demo from nothing", "s", Goal(60), f"{FRESH} with: make demo"),
        ("other-tests", "Tests from nothing, browser included", "min", Goal(4),
         f"{FRESH} with: make test"),
        ("other-quality", "Page quality score, four parts", "of 100", Goal(100, least=True),
         "the tool that scores pages is no part of this project"),
    )
)  # fmt: skip
