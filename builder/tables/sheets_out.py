"""A table's data as flat sheets; see builder.tables.sheets for their shape."""

from __future__ import annotations

from typing import Any

from builder.rows import flow_text, is_turned
from builder.tables.shape import (
    Figures,
    Flag,
    Id,
    Keyed,
    Kind,
    Many,
    Number,
    Part,
    Provenance,
    Record,
    Ref,
    Series,
    Text,
    columns,
)
from builder.tables.sheets import (
    CLASS,
    NONE,
    Cell,
    Flat,
    SheetFault,
    children,
    head_name,
    is_deep,
    record_of,
)


def to_sheets(table: str, record: type[Record], data: dict[str, Any]) -> dict[str, Flat]:
    """The sheets of one table. A table's own values stand as field and value."""
    sheets: dict[str, Flat] = {}
    if table == "occurrence":
        return _matrix(data)
    head = Flat(["field", "value"])
    for name, cell in _flat_row(record, data, "", table, None, sheets).items():
        if cell is not None:
            head.rows.append({"field": name, "value": cell})
    if head.rows:
        sheets = {head_name(table): head} | sheets
    return sheets


def _flat_row(
    record: type[Record],
    data: dict[str, Any],
    prefix: str,
    table: str,
    of: str | None,
    sheets: dict[str, Flat],
) -> dict[str, Cell]:
    own = {name: sheet for name, sheet, _ in children(record, prefix, table)}
    cells: dict[str, Cell] = {}
    for name, kind, _ in columns(record):
        if name in own:
            if name in data:
                _child_rows(kind, data[name], own[name], table, of, sheets)
        else:
            cells |= _cells(kind, name, data.get(name), prefix, table, of, sheets, name in data)
    cells |= _source_cells(data.get("source"), f"{prefix}source")
    return cells


def _child_rows(
    kind: Kind, data: Any, sheet: str, table: str, of: str | None, sheets: dict[str, Flat]
) -> None:
    flat = sheets.setdefault(sheet, Flat())
    keyed, record = isinstance(kind, Keyed), record_of(kind)
    for entry in data.items() if keyed else ((None, each) for each in data):
        key, row = entry
        if key == "source":
            raise SheetFault(f"{sheet}: move source: from the block into its rows or the file.")
        identity = key if keyed else row.get("id", row.get("value"))
        start: dict[str, Cell] = {} if of is None else {"of": of}
        if keyed:
            start["key"] = key
        name = identity if of is None else None
        cells = _flat_row(record, row, "", sheet, name, sheets)
        flat.add(start | cells)


def _cells(
    kind: Kind,
    name: str,
    value: Any,
    prefix: str,
    table: str,
    of: str | None,
    sheets: dict[str, Flat],
    given: bool,
) -> dict[str, Cell]:
    column = prefix + name
    if not given:
        return {column: None} if isinstance(kind, Text | Id | Ref | Number | Flag) else {}
    if value is None:
        return {column: NONE}
    match kind:
        case Part(record) if not is_deep(record):
            return _flat_row(record, value, f"{column}.", table, of, sheets)
        case Series(names):
            return {f"{column}.{part}": each for part, each in zip(names, value, strict=True)}
        case Keyed(inner):
            cells: dict[str, Cell] = {column: "{}"} if not value else {}
            for key, below in value.items():
                if key == "source":
                    cells |= _source_cells(below, f"{column}.source")
                else:
                    cells |= _cells(inner, key, below, f"{column}.", table, of, sheets, True)
            return cells
        case Figures():
            cells = {}
            for key, below in value.items():
                cells[f"{column}.{key}"] = flow_text(below) if isinstance(below, list) else below
            return cells
        case Many(inner):
            return {column: _joined(inner, value)}
        case Provenance():
            return _source_cells(value, column)
        case Text() | Id() | Ref() | Number() | Flag():
            return {column: value}
        case _:
            return {column: flow_text(value)}


def _source_cells(value: Any, column: str) -> dict[str, Cell]:
    if isinstance(value, dict):
        return {f"{column}.{name}": below for name, below in value.items()}
    return {} if value is None else {column: value}


def _joined(inner: Kind, value: list[Any]) -> str:
    plain_words = isinstance(inner, Text | Id | Ref) and all(
        ";" not in str(each) and str(each) == str(each).strip() and str(each)[:1] not in "[{"
        for each in value
    )
    if value and (plain_words or isinstance(inner, Number)):
        return "; ".join(flow_text(each) if not isinstance(each, str) else each for each in value)
    return flow_text(value)


def _matrix(data: dict[str, Any]) -> dict[str, Flat]:
    """Constancy and cover, plants down and zones across."""
    zones: list[str] = []
    for row in data.get("occurrence", {}).values():
        zones += [zone for zone in row if zone not in zones and zone != "source"]
    sheets = {"constancy": Flat(["plant", *zones]), "cover": Flat(["plant", *zones])}
    for plant, row in data.get("occurrence", {}).items():
        for place, name in enumerate(("constancy", "cover")):
            cells: dict[str, Cell] = {"plant": plant}
            for zone, pair in row.items():
                if zone != "source":
                    cells[zone] = _class_word(pair[place])
            sheets[name].rows.append(cells)
    head = _source_cells(data.get("source"), "source")
    if head:
        sheets["occurrence"] = Flat(
            ["field", "value"], [{"field": name, "value": cell} for name, cell in head.items()]
        )
    return sheets


def _class_word(value: Any) -> Cell:
    """A class code that looks like a percent says that it is a class."""
    return f"{CLASS} {value}" if isinstance(value, str) and is_turned(value) else value
