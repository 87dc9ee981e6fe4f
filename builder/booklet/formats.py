"""The forms a booklet comes in."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass

from builder.booklet import orders, style
from builder.booklet.impose import A4, CUT, FOLD, KEEP, LETTER, Marks, Paper
from builder.booklet.orders import Sheet

Anchors = Mapping[str, int]
Ordering = Callable[[int, Anchors], list[Sheet]]


@dataclass(frozen=True)
class Format:
    """A form of the booklet: its page, and the sheet its pages lie on, if any.

    note  name of the printing note in the words file
    """

    trim: style.Trim
    paper: Paper | None = None
    ordering: Ordering | None = None
    marks: Marks = KEEP
    note: str = ""


def zone_runs(count: int, anchors: Anchors) -> list[tuple[int, int]]:
    """First and last page of each zone."""
    starts = sorted(anchors.values())
    runs = []
    for name, first in anchors.items():
        if name.startswith("zone-"):
            later = [page for page in starts if page > first]
            runs.append((first, later[0] - 1 if later else count))
    return sorted(runs)


def _folded(count: int, anchors: Anchors) -> list[Sheet]:
    return orders.folded(count)


def _stacks(count: int, anchors: Anchors) -> list[Sheet]:
    return orders.stacks(count)


def _single(count: int, anchors: Anchors) -> list[Sheet]:
    return orders.single(count)


def _cards(count: int, anchors: Anchors) -> list[Sheet]:
    return orders.cards(zone_runs(count, anchors))


FORMATS: dict[str, Format] = {
    "a6": Format(style.A6),
    "pocket-us": Format(style.POCKET_US),
    "a4-sheets": Format(style.A6, A4, _folded, FOLD, "fold"),
    "letter-sheets": Format(style.POCKET_US, LETTER, _folded, FOLD, "fold"),
    "a4-stacks": Format(style.A6, A4, _stacks, CUT, "stack"),
    "letter-stacks": Format(style.POCKET_US, LETTER, _stacks, CUT, "stack"),
    "a4-single": Format(style.A6, A4, _single, CUT, "single"),
    "letter-single": Format(style.POCKET_US, LETTER, _single, CUT, "single"),
    "a4-cards": Format(style.A6, A4, _cards, KEEP, "card"),
    "letter-cards": Format(style.POCKET_US, LETTER, _cards, KEEP, "card"),
}
