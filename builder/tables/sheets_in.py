"""Flat sheets as a table's data; the way back of builder.tables.sheets_out."""

from __future__ import annotations

from typing import Any

from builder.rows import parse_yaml, plain
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


def from_sheets(table: str, record: type[Record], sheets: dict[str, Flat]) -> dict[str, Any]:
    """The table's data from its sheets. Raises SheetFault."""
    if table == "occurrence":
        return _from_matrix(sheets)
    head = sheets.get(head_name(table), Flat())
    cells = {str(row["field"]): row.get("value") for row in head.rows if row.get("field")}
    return _row_data(record, cells, "", table, None, sheets)


def _row_data(
    record: type[Record],
    cells: dict[str, Cell],
    prefix: str,
    table: str,
    of: str | None,
    sheets: dict[str, Flat],
) -> dict[str, Any]:
    own = {name: sheet for name, sheet, _ in children(record, prefix, table)}
    data: dict[str, Any] = {}
    for name, kind, _ in columns(record):
        if name in own:
            value = _child_data(kind, sheets.get(own[name]), own[name], of, sheets)
        else:
            value = _value(kind, cells, prefix + name, table, of, sheets)
        if value is not _LEFT_OUT:
            data[name] = value
    source = _source_data(cells, f"{prefix}source")
    if source is not None:
        data["source"] = source
    return data


_LEFT_OUT: Any = object()


def _child_data(
    kind: Kind, flat: Flat | None, sheet: str, of: str | None, sheets: dict[str, Flat]
) -> Any:
    if flat is None:
        return _LEFT_OUT
    rows: list[tuple[Any, dict[str, Any]]] = []
    for cells in flat.rows:
        if all(cell is None for cell in cells.values()):
            continue
        if of is not None and _as_text(cells.get("of")) != of:
            continue
        key = _as_text(cells.get("key"))
        identity = None
        if of is None:
            identity = key or _as_text(cells.get("id")) or _as_text(cells.get("value"))
        rows.append((key, _row_data(record_of(kind), cells, "", sheet, identity, sheets)))
    if isinstance(kind, Many):
        return [row for _, row in rows] if rows else _LEFT_OUT
    doubles = {key for key, _ in rows if [k for k, _ in rows].count(key) > 1}
    if doubles or any(not key for key, _ in rows):
        raise SheetFault(f"{sheet}: the column key must name each row once ({sorted(doubles)}).")
    return dict(rows) if rows else _LEFT_OUT


def _value(
    kind: Kind,
    cells: dict[str, Cell],
    column: str,
    table: str,
    of: str | None,
    sheets: dict[str, Flat],
) -> Any:
    cell = cells.get(column)
    if cell == NONE:
        return None
    below: dict[str, Cell] = {}
    for name, each in cells.items():
        if name.startswith(column + ".") and each is not None:
            below[name] = each
    match kind:
        case Part(record) if not is_deep(record):
            child = any(
                name == f"{table}.{column}" or name.startswith(f"{table}.{column}.")
                for name in sheets
            )
            if not below and not child:
                return _LEFT_OUT
            made = _row_data(record, cells, f"{column}.", table, of, sheets)
            return made or _LEFT_OUT
        case Series(names, inner):
            parts = [below.get(f"{column}.{name}") for name in names]
            if all(part is None for part in parts):
                return _LEFT_OUT
            return [_typed(inner, part, column) for part in parts]
        case Keyed(inner):
            if not below:
                return {} if cell == "{}" else _LEFT_OUT
            return _keyed_data(inner, cells, below, column, table, of, sheets)
        case Figures():
            found = {
                name[len(column) + 1 :]: _typed(Number(), each, column)
                for name, each in below.items()
            }
            return found or _LEFT_OUT
        case Many(inner):
            return _LEFT_OUT if cell is None else _split(inner, cell, column)
        case Provenance():
            source = _source_data(cells, column)
            return _LEFT_OUT if source is None else source
        case Text() | Id() | Ref() | Number() | Flag():
            return _LEFT_OUT if cell is None else _typed(kind, cell, column)
        case _:
            return _LEFT_OUT if cell is None else _yaml_cell(str(cell), column)


def _keyed_data(
    inner: Kind,
    cells: dict[str, Cell],
    below: dict[str, Cell],
    column: str,
    table: str,
    of: str | None,
    sheets: dict[str, Flat],
) -> dict[str, Any]:
    made: dict[str, Any] = {}
    for name in below:
        key = name[len(column) + 1 :]
        if isinstance(inner, Series):
            key = key.rsplit(".", 1)[0]
        if key == "source" or key.startswith("source.") or key in made:
            continue
        made[key] = _value(inner, cells, f"{column}.{key}", table, of, sheets)
    source = _source_data(cells, f"{column}.source")
    return made if source is None else {**made, "source": source}


def _source_data(cells: dict[str, Cell], column: str) -> Any:
    if cells.get(column) is not None:
        return str(cells[column])
    named = {
        name[len(column) + 1 :]: str(cell)
        for name, cell in cells.items()
        if name.startswith(column + ".") and cell is not None
    }
    return named or None


def _split(inner: Kind, cell: Cell, column: str) -> list[Any]:
    text = _as_text(cell)
    if text.startswith("["):
        value = _yaml_cell(text, column)
        return value if isinstance(value, list) else [value]
    return [_typed(inner, part.strip(), column) for part in text.split(";") if part.strip()]


def _typed(kind: Kind, cell: Cell, column: str) -> Any:
    """A cell as its kind: spreadsheets turn codes into numbers and numbers into text."""
    if isinstance(cell, str) and cell == NONE:
        return None
    if isinstance(kind, Text | Id | Ref):
        return _as_text(cell)
    if isinstance(kind, Flag):
        if isinstance(cell, bool):
            return cell
        return {"true": True, "false": False}.get(_as_text(cell).lower(), cell)
    if isinstance(cell, str):
        value = _yaml_cell(cell.strip(), column)
        return value
    return cell


def _as_text(cell: Cell) -> str:
    if cell is None:
        return ""
    if isinstance(cell, bool):
        return "true" if cell else "false"
    if isinstance(cell, float) and cell.is_integer():
        return str(int(cell))
    return str(cell)


def _yaml_cell(text: str, column: str) -> Any:
    root, problems = parse_yaml(f"value: {text}", column)
    if root is None or problems:
        return text
    return plain(root.get("value"))


def _from_matrix(sheets: dict[str, Flat]) -> dict[str, Any]:
    head = {str(row["field"]): row.get("value") for row in sheets.get("occurrence", Flat()).rows}
    data: dict[str, Any] = {}
    source = _source_data(head, "source")
    if source is not None:
        data["source"] = source
    cover = {_as_text(row.get("plant")): row for row in sheets.get("cover", Flat()).rows}
    rows: dict[str, Any] = {}
    for row in sheets.get("constancy", Flat()).rows:
        plant = _as_text(row.get("plant"))
        if not plant:
            continue
        rows[plant] = {}
        for zone in row:
            constancy, other = row[zone], cover.get(plant, {}).get(zone)
            if zone == "plant" or (constancy is None and other is None):
                continue
            if constancy is None or other is None:
                raise SheetFault(f"{plant} in {zone} has only one of constancy and cover.")
            rows[plant][zone] = [_percent_or_class(constancy), _percent_or_class(other)]
    return {**data, "occurrence": rows}


def _percent_or_class(cell: Cell) -> Cell:
    if isinstance(cell, str) and cell.startswith(f"{CLASS} "):
        return cell.removeprefix(f"{CLASS} ")
    value: Cell = _typed(Number(), cell, CLASS)
    return value
