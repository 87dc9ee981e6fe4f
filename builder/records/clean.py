"""Makes of anything that came in a file a record that may be trusted, or refuses it.

Every field is taken by name and type; what is not known is left out, what has another type becomes
the empty value and is counted. Format 1 is the only one there has been; records from before a
field existed get its empty value.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

from builder.records.values import (
    COVER,
    DAY,
    ID,
    LONGEST_TEXT,
    MOMENT,
    MOST_REVISIONS,
    MOST_ROWS,
    WORD,
    fits,
    is_number,
    is_object,
    is_text,
    is_whole,
    plain,
    text,
)

FORMAT = 1
ROLES = ("edge", "inside", "reference", "duplicate")
STATES = ("found", "not_found", "cant_tell")
CLEARED = ("lines", "hand")
PICTURES = ("image/jpeg", "image/png", "image/webp")
PLACE = {
    "latitude_deg": (-90, 90),
    "longitude_deg": (-180, 180),
    "accuracy_m": (0, 1e6),
    "height_m": (-500, 9000),
    "slope_pct": (0, 1000),
    "aspect_deg": (0, 360),
}
MORE = ("stand", "patches", "spots")
MOST_DEVICES = 200

Record = dict[str, Any]


@dataclass(frozen=True)
class Cleaned:
    """A record that may be trusted, or why there is none.

    record   the site check, unit or photo; None when it was refused
    changed  names of fields whose content had the wrong type
    refused  not_a_record, newer or incomplete; empty when it was not
    """

    record: Record | None = None
    changed: tuple[str, ...] = ()
    refused: str = ""


class _Taker:
    """Takes fields of the right type and notes the others."""

    def __init__(self, raw: Record) -> None:
        self.raw, self.changed = raw, list[str]()

    def __call__(self, name: str, right: Callable[[Any], bool], empty: Any) -> Any:
        if name not in self.raw:
            return empty
        if right(self.raw[name]):
            return self.raw[name]
        self.changed.append(name)
        return empty


def clean_site(raw: Any) -> Cleaned:
    """A site check that screens, key and store may trust."""
    if not is_object(raw):
        return Cleaned(refused="not_a_record")
    if _is_newer(raw):
        return Cleaned(refused="newer")
    if not _is_whole_site(raw):
        return Cleaned(refused="incomplete")
    take = _Taker(raw)
    month, midnight = int(raw["date"][5:7]), f"{raw['date']}T00:00:00Z"
    site = {
        "format": FORMAT,
        "id": raw["id"],
        "revision": int(raw["revision"]),
        "region_id": raw["region_id"],
        "edition": text(raw["edition"], 40),
        "pack_hash": raw["pack_hash"],
        "unit_id": take("unit_id", lambda v: v is None or fits(v, ID), None),
        "unit_name": text(take("unit_name", is_text, ""), 200),
        "role": take("role", lambda v: is_text(v) and v in ROLES, "inside"),
        "name": text(take("name", is_text, ""), 200),
        "observer": text(take("observer", is_text, ""), 200),
        "created_at": take("created_at", lambda v: fits(v, MOMENT), midnight),
        "changed_at": take("changed_at", lambda v: fits(v, MOMENT), midnight),
        "date": raw["date"],
        "month": int(take("month", lambda v: is_whole(v) and 1 <= v <= 12, month)),
        "place": _place(take("place", is_object, {})),
        "disturbance": take("disturbance", lambda v: v is None or fits(v, WORD), None),
        "questions": _answers(take("questions", is_object, {})),
        "findings": _findings(take("findings", _is_list, [])),
        "whole_plot_searched": take("whole_plot_searched", _is_flag, False),
        "digging": _digging(take("digging", is_object, {})),
        "struck": _listed(take("struck", _is_list, []), WORD),
        "call": plain(take("call", _is_object_or_null, None)),
        "overruled": plain(take("overruled", _is_object_or_null, None)),
        "notes": text(take("notes", is_text, ""), LONGEST_TEXT),
        "photos": _listed(take("photos", _is_list, []), ID),
        "production": plain(take("production", is_object, {})) or {},
        "reclaim": plain(take("reclaim", is_object, {})) or {},
    }
    site |= {name: plain(raw[name]) for name in MORE if name in raw}
    edits = _edits(raw.get("edits"), site["revision"])
    return Cleaned(site | ({"edits": edits} if edits else {}), tuple(take.changed))


def clean_unit(raw: Any) -> Cleaned:
    """A unit: its id and name by type, the rest as bare data."""
    if not is_object(raw):
        return Cleaned(refused="not_a_record")
    if _is_newer(raw):
        return Cleaned(refused="newer")
    if not fits(raw.get("id"), ID) or not is_text(raw.get("name")):
        return Cleaned(refused="incomplete")
    rest = plain(raw) or {}
    return Cleaned({**rest, "format": FORMAT, "id": raw["id"], "name": text(raw["name"], 200)})


def clean_photo(raw: Any) -> Cleaned:
    """What is said about a photo that came in a file; its bytes are read apart."""
    whole = (
        is_object(raw)
        and fits(raw.get("id"), ID)
        and fits(raw.get("site_id"), ID)
        and is_text(raw.get("type"))
        and raw["type"] in PICTURES
        and is_text(raw.get("bytes_base64"))
    )
    if not whole:
        return Cleaned(refused="incomplete")
    taken_at = raw.get("taken_at")
    return Cleaned(
        {
            "id": raw["id"],
            "site_id": raw["site_id"],
            "type": raw["type"],
            "caption": text(raw["caption"], 1_000) if is_text(raw.get("caption")) else "",
            "taken_at": taken_at if fits(taken_at, MOMENT) else "1970-01-01T00:00:00Z",
        }
    )


def _is_newer(raw: Record) -> bool:
    return is_whole(raw.get("format")) and raw["format"] > FORMAT


def _is_whole_site(raw: Record) -> bool:
    return (
        fits(raw.get("id"), ID)
        and is_whole(raw.get("revision"))
        and 1 <= raw["revision"] < MOST_REVISIONS
        and fits(raw.get("region_id"), WORD)
        and is_text(raw.get("edition"))
        and fits(raw.get("pack_hash"), ID)
        and fits(raw.get("date"), DAY)
        and 1 <= int(raw["date"][5:7]) <= 12
    )


def _is_list(value: Any) -> bool:
    return isinstance(value, list)


def _is_flag(value: Any) -> bool:
    return isinstance(value, bool)


def _is_object_or_null(value: Any) -> bool:
    return value is None or is_object(value)


def _place(raw: Record) -> Record:
    found: Record = {}
    for name, (low, high) in PLACE.items():
        value: Any = raw.get(name)
        found[name] = value if is_number(value) and low <= value <= high else None
    return found


def _answers(raw: Record) -> Record:
    pairs = [(name, value) for name, value in raw.items() if fits(name, WORD) and fits(value, WORD)]
    return dict(pairs[:MOST_ROWS])


def _findings(raw: list[Any]) -> list[Record]:
    return [one for one in map(_finding, raw[:MOST_ROWS]) if one is not None]


def _finding(raw: Any) -> Record | None:
    if not is_object(raw) or not is_text(raw.get("state")) or raw["state"] not in STATES:
        return None
    subject = next((key for key in ("plant_id", "group_id") if fits(raw.get(key), WORD)), None)
    if subject is None:
        return None
    cover: Any = raw.get("cover")
    named: Any = raw.get("named")
    return {
        subject: raw[subject],
        "state": raw["state"],
        "cover": cover if fits(cover, COVER) else None,
        "named": int(named) if is_whole(named) and 1 <= named <= 3 else None,
    }


def _digging(raw: Record) -> Record:
    cleared, date = raw.get("cleared"), raw.get("date")
    return {
        "cleared": cleared if is_text(cleared) and cleared in CLEARED else None,
        "by": text(raw["by"], 200) if is_text(raw.get("by")) else "",
        "number": text(raw["number"], 200) if is_text(raw.get("number")) else "",
        "date": date if fits(date, DAY) else None,
    }


def _listed(raw: list[Any], form: Any) -> list[str]:
    return [one for one in raw if fits(one, form)][:MOST_ROWS]


def _edits(raw: Any, revision: int) -> dict[str, int] | None:
    """Counts of changes by device; None where they cannot be true."""
    if not is_object(raw):
        return None
    found = {
        device: int(count)
        for device, count in raw.items()
        if fits(device, ID) and is_whole(count) and 0 < count <= revision
    }
    return found if 0 < len(found) <= MOST_DEVICES else None
