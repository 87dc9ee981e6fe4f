"""A region's tables as flat sheets and back: one row a record, one column a value.

A list of records inside a record becomes a sheet of its own ("plants.cautions") whose column `of`
names the record it belongs to; named records carry their name in `key`. Inside a row a column's
name is the path of its value ("told_from.upper", "band_m.low"). Lists of words stand in one cell
with semicolons; what is deeper stands as YAML on one line. An empty cell is a value left out,
(none) one that is null.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field

from builder.tables.shape import (
    Itself,
    Keyed,
    Kind,
    Many,
    Part,
    Record,
    columns,
)

NONE = "(none)"
CLASS = "class"
MAIN = {
    "zones": "zones",
    "plants": "plants",
    "questions": "questions",
    "production": "production",
    "soils": "soils",
    "reclaim": "zones",
    "seed": "mixes",
    "sources": "sources",
}
Cell = str | int | float | bool | None


class SheetFault(ValueError):  # noqa: N818 - told to the person
    """A sheet that cannot be read back; the text says which cell."""


@dataclass
class Flat:
    """One sheet: column names in order, rows of cells by column name."""

    columns: list[str] = field(default_factory=list)
    rows: list[dict[str, Cell]] = field(default_factory=list)

    def add(self, row: dict[str, Cell]) -> None:
        """Adds a row, and the columns it brings."""
        for name in row:
            if name not in self.columns:
                self.columns.append(name)
        self.rows.append(row)


def sheet_names(table: str, names: list[str]) -> list[str]:
    """Those of a workbook's sheets that belong to a table."""
    if table == "occurrence":
        return [name for name in names if name in ("constancy", "cover", "occurrence")]
    return [name for name in names if name == table or name.startswith(table + ".")]


def head_name(table: str) -> str:
    return f"{table}.head" if table in MAIN else table


def children(record: type[Record], prefix: str, table: str) -> Iterator[tuple[str, str, Kind]]:
    """(field, sheet name, kind) of the fields that have a sheet of their own."""
    for name, kind, _ in columns(record):
        if isinstance(kind, Many | Keyed) and isinstance(kind.of, Part):
            if is_deep(kind.of.record):
                continue
            at_top = not prefix and MAIN.get(table) == name
            yield name, table if at_top else f"{table}.{prefix}{name}", kind


def record_of(kind: Kind) -> type[Record]:
    if isinstance(kind, Many | Keyed) and isinstance(kind.of, Part):
        return kind.of.record
    raise TypeError(f"{kind} holds no records")


def is_deep(record: type[Record]) -> bool:
    """Records that hold themselves are written as YAML in one cell."""
    return any(
        isinstance(item.metadata["kind"], Itself)
        or isinstance(getattr(item.metadata["kind"], "of", None), Itself)
        for _, _, item in columns(record)
    )
