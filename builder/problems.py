"""What is wrong in a table, as a value, and the one printer that shows it."""

from __future__ import annotations

import difflib
from collections.abc import Callable, Iterable
from dataclasses import dataclass, field
from pathlib import Path
from typing import NamedTuple

ERROR = "error"
CAUTION = "caution"
_LINE_SHOWN = 160


class Place(NamedTuple):
    """Where a value stands: file as the person named it, line and column from 1."""

    file: str
    line: int
    column: int


@dataclass(frozen=True, order=True)
class Problem:
    """One thing that is wrong, where it is, and what to do about it.

    Two problems are equal when place, check and severity are; wording may improve freely.
    """

    file: str
    line: int
    column: int
    check: str
    wrong: str = field(compare=False)
    fix: str = field(compare=False, default="")
    severity: str = ERROR

    @property
    def place(self) -> Place:
        """File, line and column together."""
        return Place(self.file, self.line, self.column)


def problem_at(
    place: Place, check: str, wrong: str, fix: str = "", severity: str = ERROR
) -> Problem:
    """A problem at a place that a row or value carries."""
    return Problem(place.file, place.line, place.column, check, wrong, fix, severity)


def in_order(problems: Iterable[Problem]) -> list[Problem]:
    """All problems sorted by place, each once."""
    return sorted(set(problems))


def errors(problems: Iterable[Problem]) -> list[Problem]:
    """Those that stop a build."""
    return [problem for problem in problems if problem.severity == ERROR]


def cautions(problems: Iterable[Problem]) -> list[Problem]:
    """Those that are listed and do not stop a build."""
    return [problem for problem in problems if problem.severity == CAUTION]


def nearest(word: str, known: Iterable[str], word_for: str = "") -> str:
    """What to do about an unknown word: the nearest known one, or the list of them."""
    names = sorted(known)
    close = difflib.get_close_matches(word, names, n=1, cutoff=0.6)
    if close:
        return f'Did you mean "{close[0]}"?'
    if not names:
        return f"No {word_for or 'such name'} is defined yet."
    shown = ", ".join(names[:12]) + (f" and {len(names) - 12} more" if len(names) > 12 else "")
    return f"Known: {shown}."


def line_of_file(file: str, line: int) -> str | None:
    """The text of one line of a file on disk, or None when it cannot be shown."""
    try:
        with Path(file).open("rb") as stream:
            for number, raw in enumerate(stream, start=1):
                if number == line:
                    return raw[:4000].decode("utf-8-sig", errors="replace").rstrip("\r\n")
    except OSError:
        return None
    return None


def render(problem: Problem, line_of: Callable[[str, int], str | None] = line_of_file) -> str:
    """The problem as text: place and what is wrong, the line, a caret, what to do."""
    kind = "" if problem.severity == ERROR else "caution: "
    head = (
        f"{problem.file}:{problem.line}:{problem.column}: {kind}{problem.wrong}  [{problem.check}]"
    )
    text = line_of(problem.file, problem.line)
    shown = [head]
    if text is not None and text.strip() and text.isprintable():
        start = 0
        if problem.column > _LINE_SHOWN - 20:
            start = problem.column - 60
        label = f"{problem.line:>5} | "
        shown.append(label + text[start : start + _LINE_SHOWN])
        shown.append(" " * (len(label) + problem.column - 1 - start) + "^")
    if problem.fix:
        shown.append(f"      {problem.fix}")
    return "\n".join(shown)


def render_all(
    problems: Iterable[Problem],
    line_of: Callable[[str, int], str | None] = line_of_file,
) -> str:
    """Every problem in order, then one line that counts them."""
    ordered = in_order(problems)
    parts = [render(problem, line_of) for problem in ordered]
    parts.append(summary(ordered))
    return "\n".join(parts)


def summary(problems: Iterable[Problem]) -> str:
    """One line: how many errors and cautions there are."""
    listed = list(problems)
    return f"{_count(len(errors(listed)), 'error')}, {_count(len(cautions(listed)), 'caution')}"


def _count(number: int, word: str) -> str:
    return f"{number} {word}{'' if number == 1 else 's'}"
