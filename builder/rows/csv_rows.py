"""CSV as rows of cells that know their line and column."""

from __future__ import annotations

import csv
import io
import re
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

from builder.problems import Place, Problem, problem_at
from builder.rows.files import CHECK, read_text
from builder.rows.nodes import Row, Scalar, Value

_INT = re.compile(r"-?(0|[1-9][0-9]*)$")
_FLOAT = re.compile(r"-?(0|[1-9][0-9]*)\.[0-9]+([eE][-+]?[0-9]+)?$")


@dataclass(slots=True, eq=False)
class Sheet:
    """A CSV table: `#` notes before the header, column names, rows of cells."""

    notes: dict[str, Value]
    columns: list[str]
    rows: list[Row]
    at: Place
    separator: str = ","


def read_csv(
    path: Path, shown: str | None = None, inside: Path | None = None
) -> tuple[Sheet | None, list[Problem]]:
    """A CSV table; comma, semicolon or tab, with or without byte order mark."""
    shown = shown if shown is not None else str(path)
    text, problems = read_text(path, shown, inside, legacy=True)
    if text is None:
        return None, problems
    sheet, more = parse_csv(text, shown)
    return sheet, problems + more


def parse_csv(text: str, shown: str) -> tuple[Sheet | None, list[Problem]]:
    """CSV text as rows of cells that know their line and column.

    Lines that begin with # before the header are notes ("# source: demo"). Numbers become
    numbers (with a decimal comma where the separator is a semicolon), empty cells nothing.
    """
    lines = text.split("\n")
    notes: dict[str, Value] = {}
    first = 0
    while first < len(lines) and (lines[first].startswith("#") or not lines[first].strip()):
        _note(lines[first], Place(shown, first + 1, 1), notes)
        first += 1
    start = Place(shown, min(first + 1, len(lines)), 1)
    if first == len(lines):
        return None, [
            problem_at(
                Place(shown, 1, 1), CHECK, "the table is empty", "The first line names the columns."
            )
        ]
    separator = max(",;\t", key=lines[first].count)
    problems: list[Problem] = []
    skipped = sum(len(line) + 1 for line in lines[:first])
    records = _records(text, skipped, separator, first + 1, shown, problems)
    header = next(records, [])
    columns = [cell.text.strip() for cell in header]
    for position, cell in enumerate(header):
        if not columns[position] or columns[position] in columns[:position]:
            problems.append(
                problem_at(
                    cell.at,
                    "double-key",
                    f'column "{columns[position]}" is empty or stands twice',
                    "Give each column its own name.",
                )
            )
    rows = []
    for record in records:
        if len(record) == 1 and not record[0].text.strip():
            continue
        if len(record) != len(columns):
            problems.append(
                problem_at(
                    record[0].at,
                    "csv-width",
                    f"{len(record)} cells, but the header names {len(columns)} columns",
                    "Put text that holds the separator into double quotes.",
                )
            )
            continue
        row = Row(
            dict(zip(columns, record, strict=True)),
            dict(zip(columns, header, strict=True)),
            record[0].at,
        )
        for cell in record:
            cell.parent = row
        rows.append(row)
    return Sheet(notes, columns, rows, start, separator), problems


def _note(line: str, at: Place, notes: dict[str, Value]) -> None:
    name, colon, rest = line.lstrip("#").partition(":")
    if colon and name.strip().isidentifier():
        notes[name.strip()] = Value(rest.strip(), at, rest.strip(), quoted=True)


def _records(
    text: str, position: int, separator: str, line: int, shown: str, problems: list[Problem]
) -> Iterator[list[Value]]:
    """Cells line by line; quoted cells may hold separators, quotes and line ends."""
    decimal_comma = separator == ";"
    line_start, size = position, len(text)
    record: list[Value] = []
    while position <= size:
        at = Place(shown, line, position - line_start + 1)
        begin = position
        quoted = position < size and text[position] == '"'
        if quoted:
            end = position + 1
            while True:
                end = text.find('"', end)
                if end < 0:
                    problems.append(
                        problem_at(
                            at,
                            CHECK,
                            "a quote opens here and never closes",
                            "Close it with a double quote.",
                        )
                    )
                    return
                if text[end : end + 2] != '""':
                    break
                end += 2
            content = text[position + 1 : end].replace('""', '"')
            inner = text.count("\n", position, end)
            if inner:
                line += inner
                line_start = text.rfind("\n", 0, end) + 1
            position = end + 1
            if position < size and text[position] not in (separator, "\n"):
                problems.append(
                    problem_at(
                        at,
                        CHECK,
                        "text stands behind the closing quote",
                        "Double the quotes that belong to the text.",
                    )
                )
                return
        else:
            stops = [text.find(separator, position), text.find("\n", position)]
            position = min((stop for stop in stops if stop >= 0), default=size)
            content = text[begin:position]
        record.append(_cell(content, at, (begin, position), quoted, decimal_comma))
        if position >= size or text[position] == "\n":
            yield record
            record = []
            line += 1
            line_start = position + 1
        position += 1


def _cell(content: str, at: Place, span: tuple[int, int], quoted: bool, comma: bool) -> Value:
    bare = content.strip()
    if quoted:
        return Value(content, at, content, span, quoted=True)
    if bare == "":
        return Value(None, at, bare, span)
    number = bare.replace(",", ".") if comma and bare.count(",") == 1 else bare
    if _INT.match(number) and len(number) < 16:
        return Value(int(number), at, bare, span)
    if _FLOAT.match(number):
        return Value(float(number), at, bare, span)
    return Value(bare, at, bare, span)


def csv_text(columns: list[str], rows: list[list[Scalar]], notes: dict[str, str]) -> str:
    """A CSV table as text, notes first; the inverse of parse_csv."""
    out = io.StringIO()
    for name, note in notes.items():
        out.write(f"# {name}: {note}\n")
    writer = csv.writer(out, lineterminator="\n")
    writer.writerow(columns)
    writer.writerows(["" if cell is None else cell for cell in row] for row in rows)
    return out.getvalue()
