"""Problems as the desk shows them: beside the cell, in lists, as flags on the slope."""

from __future__ import annotations

import re
from collections import Counter
from dataclasses import dataclass
from pathlib import Path

from flask import url_for

from builder.desk.phrases import read_phrases
from builder.desk.shelf import Look
from builder.problems import ERROR, Problem, line_of_file


@dataclass(frozen=True)
class ProblemView:
    """One problem, ready for a page."""

    wrong: str
    fix: str
    place: str
    line: str
    check: str
    stops: bool
    href: str
    act: str

    @property
    def state(self) -> str:
        """Class of its row."""
        return "stop" if self.stops else "care"


def problem_views(look: Look) -> list[ProblemView]:
    """Every problem of a region: those that stop a build first, each group in file order."""
    ordered = sorted(look.problems, key=lambda problem: problem.severity != ERROR)
    return [problem_view(look, problem) for problem in ordered]


def problem_view(look: Look, problem: Problem) -> ProblemView:
    """One problem with its place as file:line:column and the way to mend it."""
    say = read_phrases()["trouble"]
    name = Path(problem.file).name
    stops = problem.severity == ERROR
    return ProblemView(
        wrong=problem.wrong[:1].upper() + problem.wrong[1:],
        fix=problem.fix,
        place=f"{name}:{problem.line}:{problem.column}",
        line=(line_of_file(problem.file, problem.line) or "").strip(),
        check=problem.check,
        stops=stops,
        href=url_for("tables.at", region_id=look.id, file=name, line=problem.line),
        act=say["mend"] if stops else say["read"],
    )


def flags(look: Look) -> dict[str, int]:
    """zone id → how many stopping problems stand on a line that names it, or say its name."""
    if look.region is None:
        return {}
    found: Counter[str] = Counter()
    for problem in look.errors:
        text = f"{problem.wrong} {line_of_file(problem.file, problem.line) or ''}"
        before = text[: problem.column + len(problem.wrong) + 1]
        named = [
            (before.rfind(zone.id), zone.id)
            for zone in look.region.zones
            if re.search(rf"\b{re.escape(zone.id)}\b", before)
        ]
        if named:
            found[max(named)[1]] += 1
    return dict(found)
