"""Which page lies where on which sheet: folded sections, cut stacks, single-sided, cards.

Places on a sheet are top left, top right, bottom left, bottom right, as printed. Backs are
turned on the long edge, so what lies left in front lies right behind.
"""

from collections.abc import Sequence
from dataclasses import dataclass

SECTION_PAGES = 64
"""Pages of one folded section at most: sixteen leaves, what a stapler still goes through
(common practice)."""

Four = tuple[int | None, int | None, int | None, int | None]


@dataclass(frozen=True)
class Sheet:
    """One sheet: page numbers in front and behind, None where nothing is printed."""

    front: Four
    back: Four | None


def sections(count: int) -> list[tuple[int, int]]:
    """First and last page of each folded section, as even as can be, in eights."""
    eights = -(-count // 8)
    parts = -(-eights * 8 // SECTION_PAGES)
    each, more = divmod(eights, parts)
    found, first = [], 1
    for part in range(parts):
        last = first + 8 * (each + (part < more)) - 1
        found.append((first, last))
        first = last + 1
    return found


def folded(count: int) -> list[Sheet]:
    """Sheets to cut across, lay top pile on bottom pile, and fold, section by section."""
    sheets = []
    for first, last in sections(count):
        pages = last - first + 1
        leaves = pages // 4
        half = leaves // 2
        for place in range(half):
            top, bottom = _leaf(first, pages, place), _leaf(first, pages, half + place)
            sheets.append(
                Sheet(
                    _within(count, (top[0], top[1], bottom[0], bottom[1])),
                    _within(count, (top[2], top[3], bottom[2], bottom[3])),
                )
            )
    return sheets


def _leaf(first: int, pages: int, place: int) -> tuple[int, int, int, int]:
    """Front left, front right, back left, back right of the leaf so far from the outside."""
    low, high = first + 2 * place, first + pages - 1 - 2 * place
    return high, low, low + 1, high - 1


def stacks(count: int) -> list[Sheet]:
    """Sheets to cut into four piles and lay the piles on one another, first on top."""
    leaves = -(-count // 2)
    deep = -(-leaves // 4)
    sheets = []
    for place in range(deep):
        leaf = [2 * (pile * deep + place) + 1 for pile in range(4)]
        front = (leaf[0], leaf[1], leaf[2], leaf[3])
        back = (leaf[1] + 1, leaf[0] + 1, leaf[3] + 1, leaf[2] + 1)
        sheets.append(Sheet(_within(count, front), _within(count, back)))
    return sheets


def single(count: int) -> list[Sheet]:
    """The same piles, printed on one side only."""
    deep = -(-count // 4)
    return [
        Sheet(_within(count, tuple(pile * deep + place + 1 for pile in range(4))), None)  # type: ignore[arg-type]
        for place in range(deep)
    ]


def cards(runs: Sequence[tuple[int, int]]) -> list[Sheet]:
    """One sheet for each run of pages (first, last), read left to right, top to bottom."""
    sheets = []
    for first, last in runs:
        for start in range(first, last + 1, 4):
            four = tuple(page if page <= last else None for page in range(start, start + 4))
            sheets.append(Sheet(four, None))  # type: ignore[arg-type]
    return sheets


def _within(count: int, four: Four) -> Four:
    a, b, c, d = (page if page is not None and page <= count else None for page in four)
    return a, b, c, d
