"""docs/tables.md from the declarations of the records and the glossary."""

from __future__ import annotations

from builder.tables.climate import Month
from builder.tables.languages import Words
from builder.tables.regions import YAML_TABLES
from builder.tables.shape import (
    Figures,
    Flag,
    Id,
    Itself,
    Keyed,
    Kind,
    Many,
    Number,
    Part,
    Presence,
    Provenance,
    Record,
    Ref,
    Series,
    Text,
    columns,
    is_required,
)
from builder.words import word

_HEAD = """\
# Tables

Written by `beltbook docs` from the tables' declarations; do not edit by hand.

A region is a folder under `keydata/`. Every figure takes the nearest `source:` above it: `demo`,
`common practice`, or `published KEY` with KEY in `sources.yaml`. A row may give sources by field:
`source: {rest: demo, seeds_per_g: common practice}`.

YAML is read strictly: no anchors, no tags, no name twice in a row, and text that YAML programs
would turn into something else (`no`, `on`, `012`, `1:30`, a date) stands in quotes.
"""


def table_records() -> dict[str, type[Record]]:
    """File name to the record it is read as."""
    files: dict[str, type[Record]] = {f"{name}.yaml": made for name, made in YAML_TABLES.items()}
    return files | {"climate.csv": Month, "words/<language>.yaml": Words}


def tables_page() -> str:
    """The whole of docs/tables.md."""
    parts = [_HEAD]
    for file, record in table_records().items():
        parts.append(f"## {file}\n\n{_first_line(record)}\n")
        for inner in _with_inner(record, []):
            title = "" if inner is record else f"### {inner.__name__}\n\n{_doc(inner)}\n\n"
            parts.append(title + _field_table(inner))
    return "\n".join(parts).rstrip() + "\n"


def _field_table(record: type[Record]) -> str:
    lines = ["| field | what may stand there | unit | meaning |", "|---|---|---|---|"]
    for name, kind, item in columns(record):
        said = word(name, record.__name__)
        field = f"`{name}`" + ("" if is_required(item) else " (may be left out)")
        lines.append(f"| {field} | {kind_in_words(kind)} | {said.unit} | {said.sentence} |")
    return "\n".join(lines) + "\n"


def kind_in_words(kind: Kind) -> str:
    """What may stand in a field, for people."""
    match kind:
        case Text(choices, longest):
            if choices:
                return "one of " + ", ".join(choices)
            return f"text, {longest} letters at most" if longest else "text"
        case Id():
            return "an id"
        case Ref(table):
            return f"an id of {table}"
        case Number(low, high, whole):
            limits = [
                f"from {low:g}" if low > float("-inf") else "",
                f"to {high:g}" if high < float("inf") else "",
            ]
            what = "a whole number" if whole else "a number"
            return " ".join(part for part in (what, *limits) if part)
        case Flag():
            return "true or false"
        case Series(names, of):
            return "[" + ", ".join(names) + "], each " + kind_in_words(of)
        case Many(of):
            return "a list, each " + kind_in_words(of)
        case Keyed(of, table, names):
            keys = f"ids of {table}" if table else ", ".join(names) if names else "names"
            return f"{keys} with {kind_in_words(of)}"
        case Part(record):
            return f"a row of {record.__name__}"
        case Itself():
            return "a row of the same kind"
        case Figures():
            return "names with numbers, or lists of numbers"
        case Provenance():
            return "a source"
        case Presence():
            return "[constancy, cover] in percent, or class codes"


def _with_inner(record: type[Record], seen: list[type[Record]]) -> list[type[Record]]:
    if record not in seen:
        seen.append(record)
        for _, kind, _ in columns(record):
            inner = _record_in(kind)
            if inner is not None:
                _with_inner(inner, seen)
    return seen


def _record_in(kind: Kind) -> type[Record] | None:
    match kind:
        case Part(record):
            return record
        case Many(of) | Keyed(of):
            return _record_in(of)
    return None


def _first_line(record: type[Record]) -> str:
    module = __import__(record.__module__, fromlist=["__doc__"]).__doc__ or ""
    line = str(module).strip().split("\n\n")[0].replace("\n", " ")
    said = line.split(": ", 1)[-1]
    return said[:1].upper() + said[1:]


def _doc(record: type[Record]) -> str:
    return " ".join((record.__doc__ or "").split())
