"""Bare values that came in a file: which may be trusted, and what becomes of the others.

The phone's builder/app/js/store/clean.js holds the same rules; tests/goldens/cleaning.json is read
by both.
"""

from __future__ import annotations

import math
import re
from typing import Any

LONGEST_TEXT = 20_000
MOST_ROWS = 2_000
DEEPEST = 8
MOST_PARTS = 20_000
MOST_REVISIONS = 1_000_000_000

ID = re.compile(r"[A-Za-z0-9_-]{1,64}")
WORD = re.compile(r"[a-z][a-z0-9_]{0,63}")
KEY = re.compile(r"[A-Za-z0-9_ .-]{1,64}")
COVER = re.compile(r"[A-Za-z0-9_.+-]{1,12}")
DAY = re.compile(r"[0-9]{4}-[0-9]{2}-[0-9]{2}")
MOMENT = re.compile(
    r"[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9]{2}:[0-9]{2}:[0-9]{2}(\.[0-9]+)?(Z|[+-][0-9]{2}:[0-9]{2})"
)
# Control characters and marks that turn the direction of text can hide what a line says.
UNSEEN = re.compile("[\x00-\x08\x0b\x0c\x0e-\x1f\x7f\u202a-\u202e\u2066-\u2069]")
LONE = re.compile("[\ud800-\udfff]")


class TooMuch(Exception):  # noqa: N818 - ends one copy, told by nobody
    """A value is nested too deep or has too many parts."""


def is_text(value: Any) -> bool:
    """Whether a value is text."""
    return isinstance(value, str)


def is_number(value: Any) -> bool:
    """Whether a value is a finite number; yes and no are not."""
    return isinstance(value, int | float) and not isinstance(value, bool) and math.isfinite(value)


def is_whole(value: Any) -> bool:
    """Whether a value is a whole number, be it written 3 or 3.0."""
    return is_number(value) and float(value).is_integer()


def is_object(value: Any) -> bool:
    """Whether a value is an object of a JSON file."""
    return isinstance(value, dict)


def fits(value: Any, form: re.Pattern[str]) -> bool:
    """Whether a value is text of a form, from its first letter to its last."""
    return isinstance(value, str) and form.fullmatch(value) is not None


def text(value: str, longest: int) -> str:
    """Text without hidden characters, cut to a length.

    longest  in UTF-16 units, as the phone counts; a character is never cut in two
    """
    seen = UNSEEN.sub("", value)
    units = seen.encode("utf-16-le", "surrogatepass")
    cut = units[: 2 * longest].decode("utf-16-le", "surrogatepass")
    return LONE.sub("", cut)


def plain(value: Any) -> Any:
    """Bare data without hidden characters; None where it is too deep or too much."""
    try:
        return _copy(value, 0, [0])
    except TooMuch:
        return None


def _copy(part: Any, depth: int, parts: list[int]) -> Any:
    parts[0] += 1
    if depth > DEEPEST or parts[0] > MOST_PARTS:
        raise TooMuch
    if isinstance(part, str):
        return text(part, LONGEST_TEXT)
    if part is None or isinstance(part, bool) or is_number(part):
        return part
    if isinstance(part, list):
        return [_copy(one, depth + 1, parts) for one in part]
    if not isinstance(part, dict):
        return None
    kept = {key: one for key, one in part.items() if fits(key, KEY) and key != "__proto__"}
    return {key: _copy(one, depth + 1, parts) for key, one in kept.items()}
