"""Turns what a person typed into changes of a table's text; nothing here touches the disk."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from builder.desk.fields import Path, kind_at, shown
from builder.desk.phrases import read_phrases
from builder.problems import Problem
from builder.rows import Row, Sheet, descend, flow_text, parse_csv, parse_yaml
from builder.tables.edit import EditRefused, remove_value, replace_value
from builder.tables.reading import Reader
from builder.tables.shape import Flag, Kind, Many, Number, Presence, Record, Series

EMPTY = ""


@dataclass(frozen=True)
class Change:
    """One value somebody wants changed: where, what they saw there, what they typed."""

    path: Path
    was: str
    text: str


@dataclass(frozen=True)
class Refusal:
    """Why one change was not made. other: somebody else changed the value meanwhile."""

    path: Path
    reason: str
    fix: str = ""
    other: bool = False


class NotAValue(ValueError):  # noqa: N818 - told to the person
    """The typed text is no value of this kind."""


def value_of(kind: Kind, typed: str) -> Any:
    """The value behind typed text. Raises NotAValue with a sentence."""
    say = read_phrases()["edit"]
    typed = typed.strip()
    match kind:
        case Number():
            return _number(typed)
        case Flag():
            if typed not in ("true", "false"):
                raise NotAValue(say["flag"])
            return typed == "true"
        case Many():
            return [value_of(kind.of, part) for part in typed.split(",") if part.strip()]
        case Presence() | Series():
            parts = typed.replace(",", " ").split()
            wanted = 2 if isinstance(kind, Presence) else len(kind.names)
            if len(parts) != wanted:
                raise NotAValue(say["pair"] if wanted == 2 else say["numbers"].format(n=wanted))
            return [_number_or_code(part, isinstance(kind, Presence)) for part in parts]
    return typed


def _number(typed: str) -> int | float:
    try:
        number = float(typed)
    except ValueError:
        raise NotAValue(read_phrases()["edit"]["number"].format(text=typed)) from None
    if number != number or abs(number) > 1e15:
        raise NotAValue(read_phrases()["edit"]["number"].format(text=typed))
    return int(number) if number.is_integer() else number


def _number_or_code(typed: str, codes: bool) -> int | float | str:
    try:
        return _number(typed)
    except NotAValue:
        if codes and typed.isalnum():
            return typed
        raise


def problems_with(kind: Kind, value: Any) -> list[Problem]:
    """What the tables' own reader says against a value of a kind."""
    root, problems = parse_yaml(f"value: {flow_text(value)}\n", "typed")
    reader = Reader()
    node = root.get("value") if root is not None else None
    if node is not None:
        reader.value(kind, node, "this")
    return problems + reader.problems


def edited(record: type[Record], text: str, changes: list[Change]) -> tuple[str, list[Refusal]]:
    """The text with every change that can be made, and why the others cannot."""
    refused: list[Refusal] = []
    for change in changes:
        try:
            text = _one(record, text, change)
        except _Refused as refusal:
            refused.append(refusal.refusal)
    return text, refused


class _Refused(Exception):  # noqa: N818 - carries a refusal to the caller
    def __init__(self, refusal: Refusal) -> None:
        super().__init__(refusal.reason)
        self.refusal = refusal


def _one(record: type[Record], text: str, change: Change) -> str:
    say = read_phrases()["edit"]
    root, _ = parse_yaml(text, "table")
    now = cell_text(root, change.path)
    if now != change.was:
        reason = say["other"].format(now=now or say["nothing"], was=change.was or say["nothing"])
        raise _Refused(Refusal(change.path, reason, say["look_again"], other=True))
    try:
        kind = kind_at(record, change.path)
    except (KeyError, StopIteration):
        raise _Refused(Refusal(change.path, say["no_such_value"])) from None
    try:
        if change.text.strip() == EMPTY:
            return remove_value(text, change.path) if now != EMPTY else text
        value = value_of(kind, change.text)
        wrong = problems_with(kind, value)
        if wrong:
            first = wrong[0].wrong
            raise _Refused(Refusal(change.path, first[:1].upper() + first[1:], wrong[0].fix))
        return replace_value(text, change.path, value)
    except (NotAValue, EditRefused) as error:
        raise _Refused(Refusal(change.path, str(error))) from None


def cell_text(root: Row | None, path: Path) -> str:
    """What an input shows for the value at a path: pairs with a space, lists with commas."""
    node = descend(root, path) if root is not None else None
    text = shown(node)
    if len(path) == 3 and path[0] == "occurrence":
        return text.replace(", ", " ")
    return text


def edited_csv(text: str, changes: list[Change]) -> tuple[str, list[Refusal]]:
    """The same for a CSV table; a path is (row, column name)."""
    say = read_phrases()["edit"]
    refused: list[Refusal] = []
    for change in changes:
        sheet, _ = parse_csv(text, "table")
        cell = _cell(sheet, change.path)
        if cell is None:
            refused.append(Refusal(change.path, say["no_such_value"]))
        elif cell.text != change.was:
            reason = say["other"].format(now=cell.text, was=change.was)
            refused.append(Refusal(change.path, reason, say["look_again"], other=True))
        else:
            try:
                new = (
                    str(_number(change.text))
                    if isinstance(cell.value, int | float)
                    else change.text
                )
            except NotAValue as error:
                refused.append(Refusal(change.path, str(error)))
                continue
            start = _index(text, cell.at.line, cell.at.column)
            text = text[:start] + _quoted(new) + text[start + cell.span[1] - cell.span[0] :]
    return text, refused


def _cell(sheet: Sheet | None, path: Path) -> Any:
    if sheet is None or len(path) != 2 or not isinstance(path[0], int):
        return None
    if not 0 <= path[0] < len(sheet.rows):
        return None
    return sheet.rows[path[0]].get(str(path[1]))


def _index(text: str, line: int, column: int) -> int:
    start = 0
    for _ in range(line - 1):
        start = text.index("\n", start) + 1
    return start + column - 1


def _quoted(cell: str) -> str:
    if any(letter in cell for letter in ',;"\t\n'):
        return '"' + cell.replace('"', '""') + '"'
    return cell
