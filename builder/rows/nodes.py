"""What a table file becomes: values, lists and rows that know their file, line and column."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field
from typing import Any

from builder.problems import Place

Scalar = str | int | float | bool | None


@dataclass(slots=True, eq=False)
class Value:
    """One text, number, flag or nothing, and where it stands.

    refused  a problem with it has been told already
    """

    value: Scalar
    at: Place
    text: str
    span: tuple[int, int] = (0, 0)
    quoted: bool = False
    refused: bool = False
    parent: Row | Items | None = field(default=None, repr=False)


@dataclass(slots=True, eq=False)
class Items:
    """A list of nodes."""

    nodes: list[Node] = field(repr=False)
    at: Place
    span: tuple[int, int] = (0, 0)
    flow: bool = False
    parent: Row | Items | None = field(default=None, repr=False)

    def __iter__(self) -> Iterator[Node]:
        return iter(self.nodes)

    def __len__(self) -> int:
        return len(self.nodes)


@dataclass(slots=True, eq=False)
class Row:
    """Named nodes in the order of the file; `keys` holds the place of each name."""

    nodes: dict[str, Node] = field(repr=False)
    keys: dict[str, Value] = field(repr=False)
    at: Place
    span: tuple[int, int] = (0, 0)
    flow: bool = False
    parent: Row | Items | None = field(default=None, repr=False)

    def __contains__(self, name: str) -> bool:
        return name in self.nodes

    def get(self, name: str) -> Node | None:
        """The node under a name, or None."""
        return self.nodes.get(name)

    def items(self) -> Iterator[tuple[str, Node]]:
        """Names and nodes in the order of the file."""
        return iter(self.nodes.items())

    def place(self, name: str) -> Place:
        """Where the value under a name stands; the row's own place when it is not there."""
        node = self.nodes.get(name)
        return node.at if node is not None else self.at


Node = Value | Items | Row


def plain(node: Node | None) -> Any:
    """The bare Python data of a node: dict, list, text, number, flag or None."""
    if isinstance(node, Row):
        return {name: plain(value) for name, value in node.nodes.items()}
    if isinstance(node, Items):
        return [plain(value) for value in node.nodes]
    return node.value if node is not None else None


def descend(node: Node | None, path: tuple[str | int, ...]) -> Node | None:
    """The node at a path of names and list positions below another, or None."""
    for step in path:
        if isinstance(node, Row) and isinstance(step, str):
            node = node.nodes.get(step)
        elif isinstance(node, Items) and isinstance(step, int) and 0 <= step < len(node.nodes):
            node = node.nodes[step]
        else:
            return None
    return node
