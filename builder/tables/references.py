"""Every id that a table says of another table, with its place."""

from __future__ import annotations

from collections.abc import Iterator
from typing import NamedTuple

from builder.problems import Place
from builder.rows import Items, Node, Row, Value
from builder.tables.shape import Keyed, Kind, Many, Part, Record, Ref, columns


class Reference(NamedTuple):
    """An id, the table it should stand in, where it is written, and the field that says it."""

    table: str
    id: str
    place: Place
    field: str


def references(record: type[Record], row: Row) -> Iterator[Reference]:
    """All references of a row that is read as a record, as they are written."""
    for name, kind, _ in columns(record):
        node = row.get(name)
        if node is not None and _may_refer(kind):
            yield from _of_node(kind, node, name)


def _of_node(kind: Kind, node: Node, name: str) -> Iterator[Reference]:
    match kind:
        case Ref(table):
            if isinstance(node, Value) and isinstance(node.value, str):
                yield Reference(table, node.value, node.at, name)
        case Part(record):
            if isinstance(node, Row):
                yield from references(record, node)
        case Many(of):
            if isinstance(node, Items) and _may_refer(of):
                for below in node:
                    yield from _of_node(of, below, name)
        case Keyed(of, table):
            if isinstance(node, Row):
                deeper = _may_refer(of)
                for key, below in node.items():
                    if key == "source":
                        continue
                    if table:
                        yield Reference(table, key, node.keys[key].at, name)
                    if deeper:
                        yield from _of_node(of, below, name)


def _may_refer(kind: Kind) -> bool:
    """Whether a kind can hold references at all, so that plain values are passed by."""
    return isinstance(kind, Ref | Part | Many | Keyed)
