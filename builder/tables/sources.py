"""sources.yaml, and the rule that a figure takes the nearest `source:`."""

from __future__ import annotations

from dataclasses import dataclass

from builder.rows import Items, Node, Row, Value, descend
from builder.tables.shape import Keyed, Part, Record, Text, column

DEMO = "demo"
COMMON = "common practice"
PUBLISHED = "published"
READ = ("full text", "abstract read", "page read", "summary read", "from memory")


@dataclass(frozen=True, kw_only=True)
class Source(Record):
    """A publication, rule or page, and how much of it was read."""

    text: str = column(Text())
    read: str = column(Text(choices=READ))
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class SourcesFile(Record):
    """sources.yaml as written."""

    sources: dict[str, Source] = column(Keyed(Part(Source)), default={})


@dataclass(frozen=True, slots=True)
class Provenance:
    """Where a figure comes from: demo, common practice or published with a key."""

    text: str
    written: Value

    @property
    def kind(self) -> str:
        """demo, common practice or published."""
        return self.text.split(" ", 1)[0] if self.text.startswith(PUBLISHED) else self.text

    @property
    def key(self) -> str | None:
        """The key in sources.yaml, when published."""
        word, _, rest = self.text.partition(" ")
        return rest.strip() if word == PUBLISHED and rest.strip() else None


def provenance_of(node: Node | None, *path: str | int) -> Provenance | None:
    """The nearest source of the value at a path below a node.

    A row's `source:` is one text, or texts by field name with `rest` for all others:
    source: {rest: demo, seeds_per_g: common practice}
    """
    passed: list[str] = []
    start = node
    for length in range(len(path), -1, -1):
        below = descend(node, path[:length])
        if below is not None:
            start = below
            break
        passed.append(str(path[length - 1]))
    here: Node | None = start
    while here is not None:
        if isinstance(here, Row):
            stated = here.get("source")
            found = _stated(stated, passed) if stated is not None else None
            if found is not None:
                return found
        above = here.parent
        if isinstance(above, Row):
            passed.append(_name_in(above, here))
        here = above
    return None


def _stated(stated: Node, passed: list[str]) -> Provenance | None:
    if isinstance(stated, Value) and isinstance(stated.value, str):
        return Provenance(stated.value, stated)
    if isinstance(stated, Row):
        for name in [*passed, "rest"]:
            value = stated.get(name)
            if isinstance(value, Value) and isinstance(value.value, str):
                return Provenance(value.value, value)
    return None


def _name_in(row: Row, node: Node) -> str:
    return next((name for name, below in row.items() if below is node), "")


def stated_sources(node: Node) -> list[Value]:
    """Every text under a `source:` at or below a node."""
    found: list[Value] = []
    if isinstance(node, Row):
        for name, below in node.items():
            if name == "source":
                if isinstance(below, Value):
                    found.append(below)
                elif isinstance(below, Row):
                    found += [v for v in below.nodes.values() if isinstance(v, Value)]
            else:
                found += stated_sources(below)
    elif isinstance(node, Items):
        for below in node:
            found += stated_sources(below)
    return found
