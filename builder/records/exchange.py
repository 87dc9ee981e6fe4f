"""Records out to one JSON file and in from one. Out loses nothing; in takes nothing on trust.

  {"format": 1, "kind": "beltbook records", "made_at": …, "units": […], "sites": […], "photos": […]}

It is the file that phones write and read (builder/app/js/store/exchange.js).
"""

from __future__ import annotations

import base64
import binascii
import json
import re
from collections.abc import Callable, Iterable
from dataclasses import dataclass, field
from typing import Any

from builder.records.clean import Cleaned, Record, clean_photo, clean_site, clean_unit
from builder.records.merge import standing
from builder.records.pictures import is_picture, without_metadata
from builder.records.sentences import FileRefused
from builder.records.values import is_whole

KIND = "beltbook records"
FORMAT = 1
LARGEST_BYTES = 50_000_000
EXACT_DIGITS = 15
# White space as the phone's language counts it.
SPACE = re.compile("[\t-\r \xa0\u1680\u2000-\u200a\u2028\u2029\u202f\u205f\u3000\ufeff]+")
BASE64 = re.compile(r"[A-Za-z0-9+/]*")


@dataclass(frozen=True)
class Refusal:
    """One entry of a file that was not taken.

    what  site, unit or photo
    at    its place in the list, from 0
    why   not_a_record, newer, incomplete or not_a_picture
    """

    what: str
    at: int
    why: str


@dataclass
class Records:
    """What one or more files held, or what is to be written.

    photos   each with its bytes under "bytes"
    changed  (site id, fields that had the wrong type)
    sides    (site id, the other version) of conflicts; the first to come stands among the sites
    """

    sites: list[Record] = field(default_factory=list)
    units: list[Record] = field(default_factory=list)
    photos: list[Record] = field(default_factory=list)
    changed: list[tuple[str, tuple[str, ...]]] = field(default_factory=list)
    refused: list[Refusal] = field(default_factory=list)
    sides: list[tuple[str, Record]] = field(default_factory=list)


def read_records(content: bytes | str) -> Records:
    """Reads a file that somebody handed over.

    Raises FileRefused when the file is too large, nested too deep, not one of ours, or newer.
    """
    if len(content) > LARGEST_BYTES:
        raise FileRefused("too_large")
    file = _parsed(content)
    if not isinstance(file, dict) or file.get("kind") != KIND:
        raise FileRefused("not_ours")
    if is_whole(file.get("format")) and file["format"] > FORMAT:
        raise FileRefused("newer")
    found = Records()
    for cleaned, _ in _each(file.get("sites"), "site", clean_site, found):
        site = cleaned.record
        assert site is not None
        found.sites.append(site)
        if cleaned.changed:
            found.changed.append((site["id"], cleaned.changed))
    for cleaned, _ in _each(file.get("units"), "unit", clean_unit, found):
        assert cleaned.record is not None
        found.units.append(cleaned.record)
    for cleaned, at in _each(file.get("photos"), "photo", clean_photo, found):
        assert cleaned.record is not None
        content_of = _bytes(file["photos"][at]["bytes_base64"])
        if content_of is None or not is_picture(content_of, cleaned.record["type"]):
            found.refused.append(Refusal("photo", at, "not_a_picture"))
        else:
            found.photos.append({**cleaned.record, "bytes": content_of})
    return found


def _each(
    raw: Any, what: str, clean: Callable[[Any], Cleaned], found: Records
) -> Iterable[tuple[Cleaned, int]]:
    for at, one in enumerate(raw if isinstance(raw, list) else []):
        cleaned = clean(one)
        if cleaned.refused:
            found.refused.append(Refusal(what, at, cleaned.refused))
        else:
            yield cleaned, at


def write_records(records: Records, made_at: str, names: bool = False) -> str:
    """The records as the text of one file, sites and units as they are.

    made_at  ISO time with offset
    names    observers in full, else as initials
    """
    return json.dumps(
        {
            "format": FORMAT,
            "kind": KIND,
            "made_at": made_at,
            "units": records.units,
            "sites": [shown_site(site, names) for site in records.sites],
            "photos": [_said_photo(photo) for photo in records.photos],
        },
        allow_nan=False,
    )


def shown_site(site: Record, names: bool) -> Record:
    """A site check whose observer stands in full or as initials."""
    return site if names else {**site, "observer": initials_of(site["observer"])}


def initials_of(name: str) -> str:
    """ "Ana María Ruiz" → "A. M. R."; initials stay as they are."""
    parts = [part for part in SPACE.split(name) if part]
    return " ".join(part if part.endswith(".") else f"{part[0].upper()}." for part in parts)


def merged(files: Iterable[Records]) -> Records:
    """Several files as one: sites by id and revision, units and photos by id, repeats once.

    Of two versions that each hold a change the other lacks the first stands, the other is kept
    among the sides.
    """
    whole = Records()
    sites: dict[str, Record] = {}
    units: dict[str, Record] = {}
    photos: dict[str, Record] = {}
    for one in files:
        for site in one.sites:
            verdict = standing(sites[site["id"]], site) if site["id"] in sites else "theirs"
            if verdict == "theirs":
                sites[site["id"]] = site
            elif verdict == "conflict" and (site["id"], site) not in whole.sides:
                whole.sides.append((site["id"], site))
        for unit in one.units:
            units.setdefault(unit["id"], unit)
        for photo in one.photos:
            photos.setdefault(photo["id"], photo)
        whole.changed += one.changed
        whole.refused += one.refused
    whole.sites, whole.units = list(sites.values()), list(units.values())
    whole.photos = list(photos.values())
    return whole


def _said_photo(photo: Record) -> Record:
    said = {name: value for name, value in photo.items() if name != "bytes"}
    content = without_metadata(photo["bytes"], photo["type"])
    return {**said, "bytes_base64": base64.b64encode(content).decode("ascii")}


def _parsed(content: bytes | str) -> Any:
    try:
        return json.loads(content, parse_int=_whole, parse_float=float, parse_constant=_no_constant)
    except RecursionError:
        raise FileRefused("too_deep") from None
    except ValueError:
        raise FileRefused("not_ours") from None


def _whole(digits: str) -> int | float:
    """A whole number as the phone would read it: exact up to 15 digits, then the nearest."""
    return int(digits) if len(digits) <= EXACT_DIGITS else float(digits)


def _no_constant(name: str) -> Any:
    raise ValueError(name)


def _bytes(base64_text: str) -> bytes | None:
    bare = re.sub("[\t\n\f\r ]", "", base64_text)
    if len(bare) % 4 == 0:
        bare = re.sub("={1,2}$", "", bare)
    if len(bare) % 4 == 1 or not BASE64.fullmatch(bare):
        return None
    try:
        return base64.b64decode(bare + "=" * (-len(bare) % 4))
    except binascii.Error:
        return None
