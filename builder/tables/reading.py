"""Rows to typed records by their declaration; every deviation becomes a problem at its place."""

from __future__ import annotations

import re
from typing import Any, TypeVar

from builder.problems import Place, Problem, nearest, problem_at
from builder.rows import Items, Node, Row, Value
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
    found_in_words,
    is_required,
)

ID_FORM = re.compile(r"[a-z][a-z0-9_]*$")
BAD: Any = object()
R = TypeVar("R", bound=Record)


class Reader:
    """Reads nodes as kinds and collects what is wrong."""

    def __init__(self) -> None:
        self.problems: list[Problem] = []

    def record(self, made: type[R], node: Node, name: str) -> R | None:
        """A record from a row, or None when a field it must have is missing or wrong."""
        if not isinstance(node, Row):
            self._expected(node, name, "a group of named values")
            return None
        values: dict[str, Any] = {}
        known = {"source"}
        whole = True
        for key, kind, item in columns(made):
            known.add(key)
            below = node.get(key)
            if below is None:
                if is_required(item):
                    self._note(
                        node.at,
                        "missing-field",
                        f'{name} has no "{key}"',
                        f"Add {key}: and its value.",
                    )
                    whole = False
                continue
            if isinstance(below, Value) and below.value is None and not is_required(item):
                continue  # null, or nothing at all, which has been told
            value = self.value(kind, below, key)
            if value is BAD:
                whole = whole and not is_required(item)
            else:
                values[item.name] = value
        for key in node.nodes:
            if key not in known:
                self._note(
                    node.keys[key].at,
                    "unknown-field",
                    f'"{key}" is not a field of {name}',
                    nearest(key, known),
                )
        return made(row=node, **values) if whole else None

    def value(self, kind: Kind, node: Node, name: str) -> Any:
        """The value of a node as its kind, or BAD."""
        if isinstance(node, Value) and node.refused:
            return BAD
        match kind:
            case Text():
                return self._text(kind, node, name)
            case Id() | Ref():
                return self._id(node, name)
            case Number():
                return self._number(kind, node, name)
            case Flag():
                if isinstance(node, Value) and isinstance(node.value, bool):
                    return node.value
                return self._expected(node, name, "true or false")
            case Series():
                return self._series(kind, node, name)
            case Many():
                return self._many(kind, node, name)
            case Keyed():
                return self._keyed(kind, node, name)
            case Part():
                made = self.record(kind.record, node, name)
                return BAD if made is None else made
            case Figures():
                return self._figures(node, name)
            case Provenance():
                return self._provenance(node, name)
            case Presence():
                return self._presence(node, name)

    def _text(self, kind: Text, node: Node, name: str) -> Any:
        if not isinstance(node, Value) or not isinstance(node.value, str):
            hint = "put it in quotes" if isinstance(node, Value) else ""
            return self._expected(node, name, "text", hint)
        if kind.choices and node.value not in kind.choices:
            return self._note(
                node.at,
                "known-word",
                f'"{node.value}" is no value of {name}',
                nearest(node.value, kind.choices),
            )
        if kind.longest and len(node.value) > kind.longest:
            return self._note(
                node.at,
                "text-length",
                f"{name} has {len(node.value)} letters, {kind.longest} fit",
                "Find a shorter word.",
            )
        if not node.value.strip():
            return self._expected(node, name, "text")
        return node.value

    def _id(self, node: Node, name: str) -> Any:
        if not isinstance(node, Value) or not isinstance(node.value, str):
            return self._expected(node, name, "an id")
        if not ID_FORM.match(node.value):
            return self._note(
                node.at,
                "id-form",
                f'"{node.value}" is not an id',
                "Ids are lower case letters, digits and _, a letter first.",
            )
        return node.value

    def _number(self, kind: Number, node: Node, name: str) -> Any:
        if isinstance(node, Value) and node.value is None and kind.nullable:
            return None
        if (
            not isinstance(node, Value)
            or isinstance(node.value, bool)
            or not isinstance(node.value, int | float)
        ):
            return self._expected(node, name, "a number")
        if kind.whole and node.value != int(node.value):
            return self._note(
                node.at,
                "range",
                f"{name} {node.text} is not a whole number",
                "Write a whole number.",
            )
        if not kind.low <= node.value <= kind.high:
            return self._note(
                node.at,
                "range",
                f"{name} {node.text} is {_outside(kind)}",
                "Check the figure and its unit.",
            )
        return int(node.value) if kind.whole else node.value

    def _series(self, kind: Series, node: Node, name: str) -> Any:
        wanted = "[" + ", ".join(kind.names) + "]"
        if not isinstance(node, Items) or len(node) != len(kind.names):
            return self._expected(node, name, wanted)
        values = [
            self._number(kind.of, below, f"{name} {part}")
            for below, part in zip(node, kind.names, strict=True)
        ]
        return BAD if BAD in values else tuple(values)

    def _many(self, kind: Many, node: Node, name: str) -> Any:
        if not isinstance(node, Items):
            return self._expected(node, name, "a list", "Put it in [ ] or behind dashes.")
        values = [self.value(kind.of, below, name) for below in node]
        return tuple(value for value in values if value is not BAD)

    def _keyed(self, kind: Keyed, node: Node, name: str) -> Any:
        if not isinstance(node, Row):
            return self._expected(node, name, "names with values")
        values = {}
        for key, below in node.items():
            if key == "source":
                continue
            if kind.names and key not in kind.names:
                self._note(
                    node.keys[key].at,
                    "unknown-field",
                    f'"{key}" is no part of {name}',
                    nearest(key, kind.names),
                )
                continue
            value = self.value(kind.of, below, f"{name} {key}")
            if value is not BAD:
                values[key] = value
        return values

    def _figures(self, node: Node, name: str) -> Any:
        if not isinstance(node, Row):
            return self._expected(node, name, "names with numbers")
        number = Number()
        values: dict[str, Any] = {}
        for key, below in node.items():
            if key == "source":
                continue
            if isinstance(below, Items):
                many = [self._number(number, each, key) for each in below]
                value = BAD if BAD in many else tuple(many)
            else:
                value = self._number(number, below, key)
            if value is not BAD:
                values[key] = value
        return values

    def _provenance(self, node: Node, name: str) -> Any:
        if isinstance(node, Row):
            return {
                key: below.value
                for key, below in node.items()
                if isinstance(below, Value) and isinstance(below.value, str)
            }
        return self._text(Text(), node, name)

    def _presence(self, node: Node, name: str) -> Any:
        if not isinstance(node, Items) or len(node) != 2:
            return self._expected(node, name, "[constancy, cover]")
        pair = []
        for part, below in zip(("constancy", "cover"), node, strict=True):
            if isinstance(below, Value) and isinstance(below.value, str):
                pair.append(below.value)
            else:
                pair.append(self._number(Number(0, 100), below, part))
        return BAD if BAD in pair else tuple(pair)

    def _expected(self, node: Node, name: str, wanted: str, hint: str = "") -> Any:
        fix = f"Write {wanted}" + (f"; {hint}." if hint else ".")
        return self._note(
            node.at, "value-kind", f"{name} must be {wanted}, not {found_in_words(node)}", fix
        )

    def _note(self, place: Place, check: str, wrong: str, fix: str) -> Any:
        self.problems.append(problem_at(place, check, wrong, fix))
        return BAD


def _outside(kind: Number) -> str:
    if kind.low == float("-inf"):
        return f"above {kind.high:g}"
    if kind.high == float("inf"):
        return f"below {kind.low:g}"
    return f"outside {kind.low:g} to {kind.high:g}"
