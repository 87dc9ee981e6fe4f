"""Which of two versions of one record stands. No storage, no clock.

Every device counts its own changes in `edits: {device_id: n}`; `revision` is their sum. A version
stands over another when it holds all of the other's changes. Two that each hold a change the other
lacks are a conflict, and both are kept. Clocks are not asked: phones' clocks are wrong. The phone's
builder/app/js/store/merge.js does the same; tests/goldens/merge.json is read by both.
"""

from __future__ import annotations

import json
from typing import Any

from builder.records.clean import Record


def standing(mine: Record, theirs: Record) -> str:
    """same, mine, theirs or conflict, for two versions of one id."""
    if canonical(mine) == canonical(theirs):
        return "same"
    a, b = mine.get("edits") or {}, theirs.get("edits") or {}
    devices = [*a, *b]
    ahead = any(a.get(device, 0) > b.get(device, 0) for device in devices)
    behind = any(b.get(device, 0) > a.get(device, 0) for device in devices)
    if ahead != behind:
        return "mine" if ahead else "theirs"
    if not devices and mine["revision"] != theirs["revision"]:
        return "mine" if mine["revision"] > theirs["revision"] else "theirs"
    return "conflict"


def settled(chosen: Record, other: Record, device: str) -> Record:
    """The version that settles a conflict: the chosen content, holding both sides' changes."""
    edits = dict(chosen.get("edits") or {})
    for name, count in (other.get("edits") or {}).items():
        edits[name] = max(edits.get(name, 0), count)
    edits[device] = edits.get(device, 0) + 1
    revision = max(sum(edits.values()), chosen["revision"] + 1, other["revision"] + 1)
    return {**chosen, "edits": edits, "revision": revision}


def canonical(value: Any) -> str:
    """One text per content: keys sorted, nothing left out, 3.0 written as 3."""
    return json.dumps(_even(value), sort_keys=True, ensure_ascii=True, separators=(",", ":"))


def _even(value: Any) -> Any:
    if isinstance(value, float) and value.is_integer():
        return int(value)
    if isinstance(value, list):
        return [_even(one) for one in value]
    if isinstance(value, dict):
        return {key: _even(one) for key, one in value.items()}
    return value
