"""The text of a plots file as columns of words: separator, encoding and torn lines."""

from __future__ import annotations

import csv
import io
import warnings
from dataclasses import dataclass
from pathlib import Path

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from builder.problems import CAUTION, Place, Problem, problem_at

PLOT = "plot_id"
SEPARATORS = (",", ";", "\t")
MOST_BYTES = 2_000_000_000
CHECK = "plots-file"


@dataclass(frozen=True)
class Table:
    """Cells as written, all text.

    frame  one column a header word; header: line of the header; lines [row] lines in the file
    decimal_comma  numbers may be written 2,5
    """

    frame: pd.DataFrame
    header: int
    lines: NDArray[np.int64]
    decimal_comma: bool


def read_table(path: Path) -> tuple[Table | None, list[Problem]]:
    """Columns of a CSV file and what is wrong with its lines; None where nothing can be read."""
    text, problems = _text(path)
    if text is None:
        return None, problems
    shown = str(path)
    lines = text.split("\n", 200)
    first = next(
        (at for at, line in enumerate(lines) if line.strip() and not line.startswith("#")), None
    )
    if first is None or first == 200:
        return None, [
            *problems,
            _stop(shown, "the file is empty", "Write a header and one line a finding."),
        ]
    separator = max(SEPARATORS, key=lambda one: lines[first].count(one))
    body = text.split("\n", first)[first]
    head = next(csv.reader(io.StringIO(body), delimiter=separator))
    names = [word.strip() for word in head]
    doubled = sorted({name for name in names if names.count(name) > 1})
    if doubled:
        place = Place(shown, first + 1, 1)
        wrong = f'the header names "{doubled[0]}" twice'
        return None, [*problems, problem_at(place, CHECK, wrong, "Give each column its own name.")]
    frame, at, torn = _frame(body, separator, names, shown, first + 1)
    return Table(frame, first + 1, at, separator != ","), problems + torn


def _text(path: Path) -> tuple[str | None, list[Problem]]:
    shown = str(path)
    try:
        if not path.is_file():
            wrong = "this is not a file" if path.exists() else "the file is missing"
            return None, [_stop(shown, wrong, "Name a CSV file of plots.")]
        if path.stat().st_size > MOST_BYTES:
            return None, [_stop(shown, "the file is larger than 2 GB", "Split it by plots.")]
        raw = path.read_bytes()
    except OSError as error:
        reason = (error.strerror or "it cannot be opened").lower()
        return None, [_stop(shown, f"the file cannot be read: {reason}", "Check who may read it.")]
    problems: list[Problem] = []
    try:
        text = raw.decode("utf-16" if raw[:2] in (b"\xff\xfe", b"\xfe\xff") else "utf-8-sig")
    except UnicodeDecodeError:
        text = raw.decode("cp1252", errors="replace")
        wrong = "the file is not UTF-8; it is read as Windows-1252"
        fix = "Save it as UTF-8 if names with accents look wrong."
        problems.append(problem_at(Place(shown, 1, 1), CHECK, wrong, fix, CAUTION))
    if "\0" in text:
        return None, [_stop(shown, "the file is not text", "Export the table as CSV.")]
    return text.replace("\r\n", "\n").replace("\r", "\n"), problems


def _stop(shown: str, wrong: str, fix: str) -> Problem:
    return problem_at(Place(shown, 1, 1), CHECK, wrong, fix)


def _frame(
    body: str, separator: str, names: list[str], shown: str, header: int
) -> tuple[pd.DataFrame, NDArray[np.int64], list[Problem]]:
    """Quick where every line has as many cells as the header; else line by line."""
    try:
        with warnings.catch_warnings():
            warnings.simplefilter("error")
            frame = pd.read_csv(
                io.StringIO(body),
                sep=separator,
                dtype=str,
                na_filter=False,
                skip_blank_lines=False,
                header=0,
                names=names,
                index_col=False,
                on_bad_lines="error",
            )
        whole = body.count("\n") - (1 if body.endswith("\n") else 0)
        if len(frame) == whole and not _short(frame):
            return frame, np.arange(len(frame)) + header + 1, []
    except (pd.errors.ParserError, pd.errors.ParserWarning, pd.errors.EmptyDataError):
        pass  # torn lines: the slow reader names each of them
    return _line_by_line(body, separator, names, shown, header)


def _short(frame: pd.DataFrame) -> bool:
    last = frame.iloc[:, -1]
    return bool((last == "").any() or last.isna().any())


def _line_by_line(
    body: str, separator: str, names: list[str], shown: str, header: int
) -> tuple[pd.DataFrame, NDArray[np.int64], list[Problem]]:
    reader = csv.reader(io.StringIO(body), delimiter=separator)
    next(reader)
    rows, lines = [], []
    problems: list[Problem] = []
    start = reader.line_num
    for row in reader:
        line, start = header + start, reader.line_num
        if not any(cell.strip() for cell in row):
            continue
        if len(row) != len(names):
            wrong = f"the line has {len(row)} cells, the header has {len(names)}"
            fix = "Check for a separator inside a name; put such names in quotes."
            problems.append(problem_at(Place(shown, line, 1), CHECK, wrong, fix))
            continue
        rows.append(row)
        lines.append(line)
    frame = pd.DataFrame(rows, columns=names, dtype=str)
    return frame, np.array(lines, int), problems
