"""What changed between two states of a region's tables, in plain words."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any

from builder.desk.phrases import read_phrases
from builder.desk.wording import label_for, unit_of
from builder.rows import Row, parse_csv, parse_yaml, plain

Names = Mapping[str, str]


@dataclass(frozen=True)
class Difference:
    """One value that is not what it was; was or now is empty where it is new or gone."""

    table: str
    where: str
    was: str
    now: str


def differences(before: Mapping[str, str], after: Mapping[str, str]) -> list[Difference]:
    """Every difference between two sets of table texts, by file name, in the order of the files."""
    names = _names(before) | _names(after)
    found: list[Difference] = []
    for file in sorted(before.keys() | after.keys()):
        old, new = _data(file, before.get(file, "")), _data(file, after.get(file, ""))
        table = file.rsplit(".", 1)[0]
        for path, was, now in _walk(old, new, ()):
            where = _where(path, names)
            unit = unit_of(str(path[-1])) if path else ""
            found.append(Difference(table, where, _said(was, unit, names), _said(now, unit, names)))
    return found


def _data(file: str, text: str) -> Any:
    """A table as plain values; lists of rows with ids become named rows."""
    if file.endswith(".csv"):
        sheet, _ = parse_csv(text, file)
        rows = sheet.rows if sheet is not None else []
        return {_row_key(plain(row), place): plain(row) for place, row in enumerate(rows)}
    root, _ = parse_yaml(text, file)
    return _by_id(plain(root)) if isinstance(root, Row) else {}


def _row_key(row: dict[str, Any], place: int) -> str:
    key = [str(row[name]) for name in ("zone_id", "month") if name in row]
    return " ".join(key) or str(place + 1)


def _by_id(value: Any) -> Any:
    if isinstance(value, dict):
        return {name: _by_id(below) for name, below in value.items()}
    if isinstance(value, list):
        named = [item for item in value if isinstance(item, dict)]
        for key in ("id", "code", "value"):
            ids = [item.get(key) for item in named]
            if named and len(named) == len(value) and None not in ids and len(set(ids)) == len(ids):
                return {str(item[key]): _by_id(item) for item in named}
        return [_by_id(item) for item in value]
    return value


def _walk(old: Any, new: Any, path: tuple[str, ...]) -> Iterator[tuple[tuple[str, ...], Any, Any]]:
    if old == new:
        return
    if isinstance(old, dict) and isinstance(new, dict):
        for name in [*old, *(name for name in new if name not in old)]:
            yield from _walk(old.get(name), new.get(name), (*path, name))
        return
    yield path, old, new


def _names(files: Mapping[str, str]) -> dict[str, str]:
    """id → name for people, of zones and plants."""
    found: dict[str, str] = {}
    for file, field in (("zones.yaml", "short"), ("plants.yaml", "common")):
        rows = _data(file, files.get(file, "")).get(file.removesuffix(".yaml"), {})
        for name, row in rows.items() if isinstance(rows, dict) else ():
            if isinstance(row, dict) and row.get(field):
                found[name] = str(row[field])
    return found


def _where(path: tuple[str, ...], names: Names) -> str:
    parts = [names.get(step) or label_for(step) for step in path]
    if len(parts) > 1 and path[0] in {
        "zones",
        "plants",
        "occurrence",
        "production",
        "soils",
        "mixes",
    }:
        parts = parts[1:]
    return ", ".join(parts)


def _said(value: Any, unit: str, names: Names) -> str:
    say: dict[str, str] = read_phrases()["editions"]
    match value:
        case None:
            return ""
        case bool():
            return say["yes"] if value else say["no"]
        case int() | float():
            return f"{value:g} {unit}".strip()
        case list():
            return ", ".join(_said(item, "", names) for item in value) or say["empty"]
        case dict():
            parts = [
                f"{label_for(str(name))} {_said(item, '', names)}" for name, item in value.items()
            ]
            text = "; ".join(parts)
            return text if len(text) < 200 else text[:198] + " …"
    return names.get(str(value), str(value))
