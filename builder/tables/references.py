"""Every id that a table says of another table, with its place."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any, NamedTuple

from builder.problems import Place
from builder.tables.regions import Region
from builder.tables.shape import Keyed, Kind, Many, Part, Record, Ref, columns


class Reference(NamedTuple):
    """An id, the table it should stand in, where it is written, and the field that says it."""

    table: str
    id: str
    place: Place
    field: str


def references(region: Region) -> Iterator[Reference]:
    """All references of a region, table by table."""
    records: list[Record | None] = list(region.files.values())
    records += list(region.words.values())
    for months in region.climate.values():
        records += months
    for record in records:
        if record is not None:
            yield from _of_record(record)


def _of_record(record: Record) -> Iterator[Reference]:
    for name, kind, item in columns(type(record)):
        if name in record.row:
            yield from _of_value(kind, getattr(record, item.name), record, (name,), name)


def _of_value(
    kind: Kind, value: Any, record: Record, path: tuple[str | int, ...], name: str
) -> Iterator[Reference]:
    if value is None:
        return
    match kind:
        case Ref(table):
            yield Reference(table, value, record.place(*path), name)
        case Part():
            yield from _of_record(value)
        case Many(of):
            if isinstance(of, Part):
                for each in value:
                    yield from _of_record(each)
            else:
                for position, each in enumerate(value):
                    yield from _of_value(of, each, record, (*path, position), name)
        case Keyed(of, table):
            for key, each in value.items():
                if table:
                    yield Reference(table, key, record.key_place(*path, key), name)
                yield from _of_value(of, each, record, (*path, key), name)
        case _:
            return
