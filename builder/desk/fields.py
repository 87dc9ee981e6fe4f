"""A table's rows as form entries, walked by the tables' own declarations.

Nothing here knows a single table: the kinds of builder.tables.shape say what a value may be, and
builder.words what it is called. A path such as ("zones", 3, "band_m", 0) names one value.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field
from typing import Any

from builder.desk.wording import help_for, label_for
from builder.rows import Items, Node, Row, Value, descend
from builder.tables.shape import (
    Figures,
    Flag,
    Id,
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

Path = tuple[str | int, ...]
LONG_TEXT = 60
SIMPLE = (Text, Number, Flag, Ref)


@dataclass(frozen=True)
class Entry:
    """One value: what it is called, what it is now, what it may be."""

    path: Path
    name: str
    label: str
    help: str
    text: str
    choices: tuple[str, ...] = ()
    known: str = ""
    missing: bool = False
    required: bool = False
    long: bool = False
    number: bool = False
    fixed: bool = False
    line: int = 0

    @property
    def key(self) -> str:
        """The path as one word, for addresses and names of inputs."""
        return "/".join(map(str, self.path))

    @property
    def options(self) -> list[Option]:
        """What may be chosen, an empty choice first where the value may be left out."""
        values = [*([] if self.required else [""]), *self.choices]
        if self.text not in values:
            values.append(self.text)
        return [Option(value, value.replace("_", " "), value == self.text) for value in values]


@dataclass(frozen=True)
class Option:
    """One choice of a list."""

    value: str
    text: str
    chosen: bool


@dataclass(frozen=True)
class Group:
    """Entries and parts under one heading. more: a row like the others can be added here."""

    path: Path
    title: str
    entries: list[Entry] = field(default_factory=list)
    parts: list[Group] = field(default_factory=list)
    more: bool = False
    removable: bool = False

    @property
    def key(self) -> str:
        """The path as one word."""
        return "/".join(map(str, self.path))


def path_of(key: str) -> Path:
    """The path behind its one word; whole numbers are places in a list."""
    return tuple(int(part) if part.isdigit() else part for part in key.split("/") if part)


def shown(node: Node | None) -> str:
    """A value as it stands in an input."""
    if isinstance(node, Value):
        return "" if node.value is None else node.text
    if isinstance(node, Items):
        return ", ".join(shown(below) for below in node)
    return ""


def kind_at(record: type[Record], path: Path) -> Kind:
    """The declared kind of the value at a path. KeyError where a table has no such value."""
    kind: Kind = Part(record)
    for step in path:
        kind = _below(kind, step)
    return kind


def _below(kind: Kind, step: str | int) -> Kind:
    match kind:
        case Part():
            if step == "source":
                return Provenance()
            return next(below for name, below, _ in columns(kind.record) if name == step)
        case Many() if isinstance(step, int):
            return kind.of
        case Keyed():
            return Provenance() if step == "source" else kind.of
        case Series() if isinstance(step, int) and step < len(kind.names):
            return kind.of
        case Presence() if step in (0, 1):
            return Number(0, 100)
        case Figures() | Provenance():
            return Number() if isinstance(kind, Figures) else Text()
        case Number():
            return kind
    raise KeyError(step)


def form(title: str, kind: Kind, node: Node | None, path: Path) -> Group:
    """The form of one row: its simple values, then its parts."""
    entries: list[Entry] = []
    parts: list[Group] = []
    for below in _children(kind, node, path):
        (entries if isinstance(below, Entry) else parts).append(below)  # type: ignore[arg-type]
    return Group(path, title, entries, parts, more=isinstance(kind, Many) and len(path) > 1)


def _children(kind: Kind, node: Node | None, path: Path) -> Iterator[Entry | Group]:
    match kind:
        case Part():
            row = node if isinstance(node, Row) else None
            for name, below, item in columns(kind.record):
                value = row.get(name) if row is not None else None
                of = kind.record.__name__
                yield from _child(name, below, value, (*path, name), is_required(item), of)
            if row is not None and "source" in row:
                yield from _child("source", Provenance(), row.get("source"), (*path, "source"))
        case Many() | Keyed():
            for step, value in _steps(node):
                below = Provenance() if step == "source" else kind.of
                for child in _child(str(step), below, value, (*path, step)):
                    yield _removable(child)
        case _:
            yield from _child(str(path[-1]), kind, node, path)


def _removable(child: Entry | Group) -> Entry | Group:
    if isinstance(child, Group):
        return Group(child.path, child.title, child.entries, child.parts, child.more, True)
    return child


def _steps(node: Node | None) -> Iterator[tuple[str | int, Node]]:
    if isinstance(node, Row):
        yield from node.items()
    elif isinstance(node, Items):
        yield from enumerate(node)


def _child(
    name: str,
    kind: Kind,
    node: Node | None,
    path: Path,
    required: bool = False,
    record: str = "",
) -> Iterator[Entry | Group]:
    if isinstance(kind, Part) or (isinstance(kind, Many | Keyed) and not _flat(kind, node)):
        if node is not None or isinstance(kind, Many | Keyed):
            yield form(_title(name, node), kind, node, path)
        return
    if isinstance(kind, Series | Presence) and isinstance(node, Items):
        names = kind.names if isinstance(kind, Series) else ("constancy", "cover")
        entries = [
            _entry(
                part,
                _below(kind, place),
                below,
                (*path, place),
                True,
                label=f"{label_for(name, record)}, {part}",
                help=help_for(name, _below(kind, place), record),
            )
            for place, (part, below) in enumerate(zip(names, node, strict=False))
        ]
        yield from entries
        return
    if isinstance(kind, Figures | Provenance) and isinstance(node, Row):
        entries = [
            _entry(
                key, Number() if isinstance(kind, Figures) else Text(), below, (*path, key), True
            )
            for key, below in node.items()
        ]
        yield Group(path, label_for(name, record), entries)
        return
    label, help = label_for(name, record), help_for(name, kind, record)
    yield _entry(name, kind, node, path, required, label, help)


def _flat(kind: Many | Keyed, node: Node | None) -> bool:
    """Whether a list is short and simple enough for one input: words or numbers and commas."""
    if not isinstance(kind, Many) or not isinstance(kind.of, SIMPLE):
        return False
    if node is None:
        return True
    return isinstance(node, Items) and not any("," in shown(below) for below in node)


def _title(name: str, node: Node | None) -> str:
    if isinstance(node, Row):
        for key in ("name", "label", "common", "id"):
            found = node.get(key)
            if isinstance(found, Value) and isinstance(found.value, str):
                return found.value
    return label_for(name)


def _entry(
    name: str,
    kind: Kind,
    node: Node | None,
    path: Path,
    required: bool,
    label: str = "",
    help: str = "",
) -> Entry:
    choices: tuple[str, ...] = ()
    match kind:
        case Text() if kind.choices:
            choices = kind.choices
        case Flag():
            choices = ("true", "false")
    text = shown(node)
    return Entry(
        path=path,
        name=name,
        label=label or label_for(name),
        help=help or help_for(name, kind),
        text=text,
        choices=choices,
        known=kind.table if isinstance(kind, Ref) else "",
        missing=node is None,
        required=required,
        long=isinstance(kind, Text) and not choices and len(text) > LONG_TEXT,
        number=isinstance(kind, Number),
        fixed=isinstance(kind, Id) and node is not None,
        line=node.at.line if node is not None else 0,
    )


def rows_of(root: Row, collection: str) -> list[tuple[str, Node]]:
    """(key, node) of every row of a list or of named rows; the key is what its address holds."""
    node = descend(root, (collection,))
    return [(str(step), below) for step, below in _steps(node) if step != "source"]


def blank_of(kind: Kind) -> Any:
    """A first value of a kind, for the person to change; required fields only."""
    match kind:
        case Part():
            return {
                name: blank_of(below)
                for name, below, item in columns(kind.record)
                if is_required(item)
            }
        case Text():
            return kind.choices[0] if kind.choices else "?"
        case Number():
            low = kind.low if kind.low != float("-inf") else min(0.0, kind.high)
            return int(low) if float(low).is_integer() else low
        case Flag():
            return False
        case Series():
            return [blank_of(kind.of) for _ in kind.names]
        case Presence():
            return [0, 0]
        case Many():
            return []
        case Id() | Ref():
            return "new"
    return {}
