"""One way to write a value down, so that the same tables give the same bytes."""

from __future__ import annotations

import dataclasses
import json
from typing import Any

HIDDEN = ("row", "at")


def canonical(value: Any) -> bytes:
    """JSON with sorted keys and no spaces; whole floats as whole numbers. ValueError on NaN."""
    text = json.dumps(
        plain(value), sort_keys=True, separators=(",", ":"), ensure_ascii=False, allow_nan=False
    )
    return text.encode("utf-8")


def plain(value: Any) -> Any:
    """Records, tuples and numbers as JSON knows them."""
    if isinstance(value, bool) or value is None or isinstance(value, (str, int)):
        return value
    if isinstance(value, float):
        return int(value) if value.is_integer() else value
    if isinstance(value, dict):
        return {str(name): plain(one) for name, one in value.items()}
    if isinstance(value, (list, tuple)):
        return [plain(one) for one in value]
    if dataclasses.is_dataclass(value):
        return {name: plain(one) for name, one in fields_of(value).items()}
    return plain(value.item())


def fields_of(record: Any) -> dict[str, Any]:
    """A record's columns without where it was written."""
    names = [field.name for field in dataclasses.fields(record) if field.name not in HIDDEN]
    return {name: getattr(record, name) for name in names}


def figures(value: Any) -> Any:
    """A record without its sentences: text columns that are words for people are dropped."""
    if isinstance(value, dict):
        return {name: figures(one) for name, one in value.items() if _is_figure(one)}
    if isinstance(value, (list, tuple)):
        return [figures(one) for one in value if _is_figure(one)]
    if dataclasses.is_dataclass(value):
        return figures(fields_of(value))
    return value


def _is_figure(value: Any) -> bool:
    """Numbers, flags, ids and what holds them; ids have no spaces."""
    return not (isinstance(value, str) and (" " in value or not value))
