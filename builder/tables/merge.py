"""Brings changed data into a table's text: only what differs is touched, comments stay."""

from __future__ import annotations

from typing import Any

from builder.rows import block_text, parse_yaml, plain
from builder.tables.edit import (
    EditRefused,
    Path,
    add_row,
    add_value,
    remove_value,
    replace_value,
)


def merged_text(text: str, new: dict[str, Any]) -> str:
    """The table's text with its data changed to `new`.

    Values are replaced one by one, rows with an id are matched by it, rows that came are added at
    the end and rows that went are taken out. Where rows changed places the list is written anew.
    """
    root, _ = parse_yaml(text, "table")
    if root is None:
        return fresh_text(new)
    old = plain(root)
    if old == new:
        return text
    try:
        text = _merge_table(text, (), old, new)
    except EditRefused:
        return fresh_text(new)
    again, problems = parse_yaml(text, "table")
    if again is None or plain(again) != new:
        return fresh_text(new)
    return text


def fresh_text(data: dict[str, Any]) -> str:
    """A table written from nothing."""
    ordered = {name: data[name] for name in ("source", *data) if name in data}
    return "\n".join(block_text(ordered)) + "\n"


def _merge(text: str, path: Path, old: Any, new: Any) -> str:
    if old == new:
        return text
    if isinstance(old, dict) and isinstance(new, dict) and new:
        return _merge_table(text, path, old, new)
    if isinstance(old, list) and isinstance(new, list) and _are_rows(old) and _are_rows(new):
        return _merge_rows(text, path, old, new)
    return replace_value(text, path, new)


def _merge_table(text: str, path: Path, old: dict[str, Any], new: dict[str, Any]) -> str:
    for name in old:
        if name not in new:
            text = remove_value(text, (*path, name))
    for name, value in new.items():
        if name in old:
            text = _merge(text, (*path, name), old[name], value)
        else:
            text = add_value(text, (*path, name), value)
    return text


def _merge_rows(text: str, path: Path, old: list[Any], new: list[Any]) -> str:
    """Rows by id where they have one, otherwise by place."""
    named = all("id" in row or "value" in row for row in (*old, *new))
    if not named:
        for place in range(min(len(old), len(new))):
            text = _merge(text, (*path, place), old[place], new[place])
        for _ in range(len(old) - len(new)):
            text = remove_value(text, (*path, len(new)))
        for row in new[len(old) :]:
            text = add_row(text, path, row)
        return text
    before, after = [_name(row) for row in old], [_name(row) for row in new]
    stay = [name for name in before if name in after]
    for place in reversed(range(len(before))):
        if before[place] not in after:
            text = remove_value(text, (*path, place))
    if [name for name in after if name in stay] != stay or after[: len(stay)] != stay:
        raise EditRefused("The rows changed places.")
    for place, name in enumerate(stay):
        text = _merge(text, (*path, place), old[before.index(name)], new[place])
    for row in new[len(stay) :]:
        text = add_row(text, path, row)
    return text


def _name(row: dict[str, Any]) -> Any:
    return row.get("id", row.get("value"))


def _are_rows(items: list[Any]) -> bool:
    return bool(items) and all(isinstance(row, dict) for row in items)
