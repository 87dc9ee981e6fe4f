"""The kinds of values a table may hold, and how a record names its fields with them.

A record is a frozen dataclass whose fields are made by `column(kind)`. The same declaration reads
the YAML, names what is missing, and writes the editors' schema, the field list and the forms.
"""

from __future__ import annotations

from dataclasses import MISSING, Field, dataclass, field, fields
from typing import Any

from builder.problems import Place
from builder.rows import Items, Node, Row, Value, descend


@dataclass(frozen=True, slots=True)
class Text:
    """Text for people, or one of a few words."""

    choices: tuple[str, ...] = ()
    longest: int = 0


@dataclass(frozen=True, slots=True)
class Id:
    """A stable name: lower case letters, digits and underscores."""


@dataclass(frozen=True, slots=True)
class Ref:
    """The id of a row in another table."""

    table: str


@dataclass(frozen=True, slots=True)
class Number:
    """A number inside limits; whole when said so."""

    low: float = float("-inf")
    high: float = float("inf")
    whole: bool = False
    nullable: bool = False


@dataclass(frozen=True, slots=True)
class Flag:
    """true or false."""


@dataclass(frozen=True, slots=True)
class Series:
    """A fixed number of numbers in a set order, such as [low, high]."""

    names: tuple[str, ...]
    of: Number


@dataclass(frozen=True, slots=True)
class Many:
    """A list."""

    of: Kind


@dataclass(frozen=True, slots=True)
class Keyed:
    """Names with values; the names are ids of a table, or free."""

    of: Kind
    table: str = ""
    names: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Part:
    """A record inside a record."""

    record: type[Record]


@dataclass(frozen=True, slots=True)
class Itself:
    """The record that holds the field, for conditions inside conditions."""


@dataclass(frozen=True, slots=True)
class Figures:
    """Free named numbers that a sentence speaks of: a number, or a list of numbers."""


@dataclass(frozen=True, slots=True)
class Provenance:
    """Where figures come from: one text, or one text by field name with `rest`."""


@dataclass(frozen=True, slots=True)
class Presence:
    """[constancy, cover]: percents, or class codes of the region's two scales."""


Kind = (
    Text
    | Id
    | Ref
    | Number
    | Flag
    | Series
    | Many
    | Keyed
    | Part
    | Itself
    | Figures
    | Provenance
    | Presence
)

SHARE = Number(0, 1)
PERCENT = Number(0, 100)
MONTH = Number(1, 12, whole=True)
MONTHS = Many(MONTH)
COUNT = Number(0, whole=True)
YEAR = Number(0, 1000, whole=True)
HEIGHT = Number(-500, 9000)


def column(kind: Kind, *, default: Any = MISSING, name: str = "") -> Any:
    """A field of a record: its kind, its value when left out, its name in YAML if it differs."""
    meta = {"kind": kind, "name": name}
    if default is MISSING:
        return field(metadata=meta)
    if isinstance(default, dict):
        return field(default_factory=dict, metadata=meta)
    return field(default=default, metadata=meta)


@dataclass(frozen=True, kw_only=True)
class Record:
    """One row of a table, which still knows where it was written."""

    row: Row = field(repr=False, compare=False)

    @property
    def at(self) -> Place:
        """File, line and column of the row."""
        return self.row.at

    def place(self, *path: str | int) -> Place:
        """Where the value at a path below the row stands; the nearest row above it if absent."""
        for length in range(len(path), -1, -1):
            node = descend(self.row, path[:length])
            if node is not None:
                return node.at
        return self.row.at

    def key_place(self, *path: str | int) -> Place:
        """Where the last name of a path is written, for problems with the name itself."""
        above = descend(self.row, path[:-1])
        if isinstance(above, Row) and path and path[-1] in above.keys:
            return above.keys[str(path[-1])].at
        return self.place(*path)


def columns(record: type[Record]) -> list[tuple[str, Kind, Field[Any]]]:
    """(name in YAML, kind, dataclass field) of every field of a record, in order."""
    return [
        (item.metadata["name"] or item.name, _resolved(item.metadata["kind"], record), item)
        for item in fields(record)
        if "kind" in item.metadata
    ]


def _resolved(kind: Kind, record: type[Record]) -> Kind:
    if isinstance(kind, Itself):
        return Part(record)
    if isinstance(kind, Many) and isinstance(kind.of, Itself):
        return Many(Part(record))
    return kind


def is_required(item: Field[Any]) -> bool:
    """Whether a row without this field is a problem."""
    return item.default is MISSING and item.default_factory is MISSING


def found_in_words(node: Node) -> str:
    """What a node is, in words for people."""
    if isinstance(node, Row):
        return "a group of named values"
    if isinstance(node, Items):
        return "a list"
    if isinstance(node, Value):
        if node.value is None:
            return "nothing"
        if isinstance(node.value, bool):
            return f"the flag {node.text}"
        if isinstance(node.value, str):
            return f'the text "{node.text[:40]}"'
    return f"the number {node.text}"
