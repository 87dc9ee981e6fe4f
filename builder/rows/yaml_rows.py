"""YAML as rows, strictly: what a person reads is what the program gets."""

from __future__ import annotations

import re
import unicodedata
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

import yaml  # type: ignore[import-untyped]

from builder.problems import CAUTION, Place, Problem, problem_at
from builder.rows.files import CHECK, read_text
from builder.rows.nodes import Items, Node, Row, Scalar, Value

MAX_DEPTH = 16
MAX_NODES = 400_000

_INT = re.compile(r"-?(0|[1-9][0-9]*)$")
_FLOAT = re.compile(r"-?(0|[1-9][0-9]*)\.[0-9]+([eE][-+]?[0-9]+)?$")
_TURNED = re.compile(
    r"""(?x)^(?:
      y|n|yes|no|on|off|true|false|null|~|=|<<       # flags and nothing (any case)
    | [-+]?0[0-9_]+ | [-+]?0[xXoObB][0-9a-fA-F_]+     # 012, 0x1F, 0o17
    | [-+]?[0-9][0-9_]*_[0-9_]*(?:\.[0-9_]*)?         # 1_000
    | [-+]?[0-9][0-9_]*(?::[0-5]?[0-9])+(?:\.[0-9_]*)? # 1:30
    | [0-9]{4}-[0-9]{1,2}-[0-9]{1,2}(?:[Tt\ ].*)?     # 2026-05-01
    | \+[0-9].* | [-+]?\.[0-9]+.* | [-+]?[0-9]+\.     # +5  .5  5.
    | [-+]?\.(?:inf|nan)                              # .inf
    | [-+]?[0-9]+(?:\.[0-9]*)?[eE][-+]?[0-9]+         # 1e5
    )$""",
    re.IGNORECASE,
)
_PLAIN_WORDS: dict[str, Scalar] = {"true": True, "false": False, "null": None}


def read_yaml(
    path: Path, shown: str | None = None, inside: Path | None = None
) -> tuple[Row | None, list[Problem]]:
    """A YAML table as a row of named nodes."""
    shown = shown if shown is not None else str(path)
    text, problems = read_text(path, shown, inside)
    if text is None:
        return None, problems
    return parse_yaml(text, shown)


def parse_yaml(text: str, shown: str) -> tuple[Row | None, list[Problem]]:
    """YAML text as a row of named nodes; see the module for what is refused."""
    if not text.strip():
        return None, [
            problem_at(
                Place(shown, 1, 1),
                CHECK,
                "the file is empty",
                "Write the table, or copy one from another region.",
            )
        ]
    tree = _Tree(shown)
    root: Node | None = None
    try:
        root = tree.build(text)
    except _Stop:
        return None, tree.problems
    except yaml.MarkedYAMLError as error:
        mark = error.problem_mark or error.context_mark
        place = Place(shown, mark.line + 1, mark.column + 1) if mark else Place(shown, 1, 1)
        what = " ".join(part for part in (error.context, error.problem) if part)
        tree.problems.append(
            problem_at(
                place,
                CHECK,
                f"the YAML breaks off here: {what}",
                "Check the indentation, colons, quotes and brackets here and on the line above.",
            )
        )
        return None, tree.problems
    except yaml.YAMLError:
        tree.problems.append(_bad_character(text, shown))
        return None, tree.problems
    if not isinstance(root, Row):
        tree.problems.append(
            problem_at(
                root.at if root else Place(shown, 1, 1),
                CHECK,
                "a table starts with names and colons, this file does not",
                'Begin with a line such as "zones:".',
            )
        )
        return None, tree.problems
    if not unicodedata.is_normalized("NFC", text):
        tree.problems.append(_not_composed(text, shown))
    return root, tree.problems


def _bad_character(text: str, shown: str) -> Problem:
    for line, content in enumerate(text.split("\n"), start=1):
        for column, letter in enumerate(content, start=1):
            if letter != "\t" and unicodedata.category(letter) in ("Cc", "Cs", "Cn"):
                return problem_at(
                    Place(shown, line, column),
                    CHECK,
                    f"a character that is not text (U+{ord(letter):04X})",
                    "Take it out; it may have come from another program.",
                )
    return problem_at(Place(shown, 1, 1), CHECK, "the file is not YAML", "Save it as UTF-8 text.")


def _not_composed(text: str, shown: str) -> Problem:
    for line, content in enumerate(text.split("\n"), start=1):
        if not unicodedata.is_normalized("NFC", content):
            for column in range(1, len(content) + 1):
                if not unicodedata.is_normalized("NFC", content[:column]):
                    break
            return problem_at(
                Place(shown, line, column),
                "encoding",
                "a letter and its accent stand as two characters",
                "Type the accented letter again, or search will miss it.",
                CAUTION,
            )
    return problem_at(Place(shown, 1, 1), "encoding", "text is not composed", "", CAUTION)


_FRAME = (yaml.StreamStartEvent, yaml.StreamEndEvent, yaml.DocumentEndEvent)
_END = (yaml.SequenceEndEvent, yaml.MappingEndEvent)


def is_turned(text: str) -> bool:
    """Whether YAML programs would read this text, unquoted, as something else than text."""
    return bool(_INT.match(text) or _FLOAT.match(text) or _TURNED.match(text)) or text == ""


class _Stop(Exception):  # noqa: N818 - not an error: it ends the walk through a refused file
    """The file is refused as a whole; the problem is already noted."""


@dataclass(slots=True)
class _Tree:
    """Builds nodes from parser events, refusing what the house refuses."""

    shown: str
    problems: list[Problem] = field(default_factory=list)

    def build(self, text: str) -> Node | None:
        """The top node of the one document in the text."""
        root: Node | None = None
        stack: list[Row | Items] = []
        pending: Value | None = None  # a name that waits for its value
        count = 0
        for event in yaml.parse(text, Loader=yaml.CSafeLoader):
            if isinstance(event, _FRAME):
                continue
            mark = event.start_mark
            at = Place(self.shown, mark.line + 1, mark.column + 1)
            if isinstance(event, yaml.DocumentStartEvent):
                if root is not None:
                    self._refuse(
                        at,
                        "a second document starts here",
                        "Keep one table in one file and take the --- line out.",
                    )
                continue
            if isinstance(event, _END):
                done = stack.pop()
                done.span = (done.span[0], event.end_mark.index)
                continue
            count += 1
            if count > MAX_NODES:
                self._refuse(at, f"the file holds more than {MAX_NODES:,} values", "Split it.")
            self._no_tricks(event, at)
            container = stack[-1] if stack else None
            is_name = isinstance(container, Row) and pending is None
            if isinstance(event, yaml.ScalarEvent):
                leaf = self._value(event, at, is_name)
                leaf.parent = container
                if is_name:
                    pending = leaf
                    continue
                root = self._hang(container, pending, leaf, root)
            else:
                if is_name:
                    self._refuse(
                        at,
                        "a name must be one word, not a list or table",
                        "Write the name as text in front of the colon.",
                    )
                if len(stack) >= MAX_DEPTH:
                    self._refuse(
                        at,
                        f"tables stand more than {MAX_DEPTH} deep in one another",
                        "Bring the rows nearer to the margin.",
                    )
                branch = self._branch(event, at, container)
                root = self._hang(container, pending, branch, root)
                stack.append(branch)
            pending = None
        return root

    def _branch(self, event: Any, at: Place, container: Row | Items | None) -> Row | Items:
        span = (event.start_mark.index, event.start_mark.index)
        if isinstance(event, yaml.MappingStartEvent):
            return Row({}, {}, at, span, bool(event.flow_style), container)
        return Items([], at, span, bool(event.flow_style), container)

    def _hang(
        self, container: Row | Items | None, key: Value | None, node: Node, root: Node | None
    ) -> Node | None:
        if container is None:
            return node
        if isinstance(container, Items):
            container.nodes.append(node)
        elif key is not None:
            if key.text in container.nodes:
                first = container.keys[key.text].at
                self.problems.append(
                    problem_at(
                        key.at,
                        "double-key",
                        f'"{key.text}" stands twice in the same row',
                        f"The first is on line {first.line}; keep one of them.",
                    )
                )
            else:
                container.nodes[key.text] = node
                container.keys[key.text] = key
        return root

    def _value(self, event: Any, at: Place, key: bool) -> Value:
        text: str = event.value
        span = (event.start_mark.index, event.end_mark.index)
        if not event.implicit[0]:
            return Value(text, at, text, span, quoted=True)
        if key:
            if _TURNED.match(text) and not _INT.match(text):
                self._turned(at, text)
            return Value(text, at, text, span)
        if text in _PLAIN_WORDS:
            return Value(_PLAIN_WORDS[text], at, text, span)
        if _INT.match(text):
            return Value(int(text) if len(text) < 16 else float(text), at, text, span)
        if _FLOAT.match(text):
            return Value(float(text), at, text, span)
        if text == "":
            self.problems.append(
                problem_at(
                    at,
                    "empty-value",
                    "there is nothing after the colon or dash",
                    'Write the value, "null" for none, or take the line out.',
                )
            )
            return Value(None, at, text, span, refused=True)
        if _TURNED.match(text):
            self._turned(at, text)
            return Value(text, at, text, span, refused=True)
        return Value(text, at, text, span)

    def _turned(self, at: Place, text: str) -> None:
        self.problems.append(
            problem_at(
                at,
                "turned-value",
                f"YAML programs turn {text} into something else",
                f"Write '{text}' in quotes if it is text; flags are true and false, "
                "numbers plain digits with a point.",
            )
        )

    def _no_tricks(self, event: Any, at: Place) -> None:
        if isinstance(event, yaml.AliasEvent):
            self._refuse(
                at,
                f"*{event.anchor} repeats another part of the file",
                "Write the values out; each row must say what it holds.",
            )
        if event.anchor:
            self._refuse(
                at,
                f"&{event.anchor} names a part of the file for repeating",
                "Take the & word out and write the values where they belong.",
            )
        tag = getattr(event, "tag", None)
        if tag and tag != "!":
            self._refuse(at, f"{tag} forces a type", "Take the ! word out.")

    def _refuse(self, at: Place, wrong: str, fix: str) -> None:
        self.problems.append(problem_at(at, CHECK, wrong, fix))
        raise _Stop
