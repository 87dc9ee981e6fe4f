"""Where records lie: their own outline and a graticule, no tiles from elsewhere."""

from __future__ import annotations

import math
from collections.abc import Iterable
from html import escape

from flask import Blueprint, render_template, url_for
from markupsafe import Markup

from builder.desk.keeping import database
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.records import asked, wanted_of
from builder.desk.shelf import shelf
from builder.drawings.ink import SCREEN, num, path, polyline, svg, text
from builder.records.finding import Cells, Wanted, cells, degrees

WIDTH, MARGIN, TALLEST = 900.0, 60.0, 640.0
HEAD, FOOT = 12.0, 28.0
CELL_GIVEN = "here"
CELL = f"cell={CELL_GIVEN}"  # in the address all dots share; a search cannot hold it unquoted
LEAST_SPAN_DEG = 0.002
STEPS_DEG = (0.0005, 0.001, 0.002, 0.005, 0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 30, 60)
MOST_LINES = 7
DOT = (4.0, 16.0)
"""Radius of a cell's dot that holds one record, and of the fullest cell's."""

Point = tuple[float, float]

pages = Blueprint("map", __name__, url_prefix="/r/<region_id>/records/map")


@pages.get("")
def show(region_id: str) -> str:
    """The map of what is wanted."""
    look, wanted = shelf().look(region_id), wanted_of(region_id)
    found, say = cells(database(), wanted), read_phrases()["records"]
    number = sum(found.counts.values())
    return render_template(
        "records_map.html",
        page=page("records", "wide", look),
        drawing=drawn(found, wanted, say["map"]) if number else Markup(),
        said=counted(number, say["on_map"]),
        list_href=url_for("records.show", **asked(wanted)),
    )


class Frame:
    """Degrees to the drawing's units; a degree east is shortened by the middle latitude."""

    def __init__(self, corners: list[Point]) -> None:
        self.west, self.east = _span([x for x, _ in corners])
        self.south, self.north = _span([y for _, y in corners])
        narrow = max(0.1, math.cos(math.radians((self.south + self.north) / 2)))
        room = WIDTH - 2 * MARGIN
        self.down = min(
            room / ((self.east - self.west) * narrow),
            (TALLEST - HEAD - FOOT) / (self.north - self.south),
        )
        self.across = self.down * narrow
        self.height = (self.north - self.south) * self.down + HEAD + FOOT

    def at(self, point: Point) -> Point:
        """A place in degrees east and north, on the drawing."""
        x, y = point
        return MARGIN + (x - self.west) * self.across, HEAD + (self.north - y) * self.down


def _span(values: list[float]) -> Point:
    low, high = min(values), max(values)
    more = max(0.04 * (high - low), (LEAST_SPAN_DEG - (high - low)) / 2, 0)
    return low - more, high + more


def drawn(found: Cells, wanted: Wanted, title: str) -> Markup:
    """Graticule, outline around all cells, one dot a cell that leads to its records."""
    corners = [
        degrees((column + right, row + up), found.step)
        for column, row in found.counts
        for right in (0, 1)
        for up in (0, 1)
    ]
    frame = Frame(corners)
    parts = [*_graticule(frame)]
    outline = polyline([frame.at(point) for point in hull(corners)], close=True)
    parts.append(path(outline, "var(--contour)", 2))
    most = max(found.counts.values())
    base = escape(url_for("records.show", **asked(wanted, cell=CELL_GIVEN)))
    for (column, row), count in sorted(found.counts.items(), key=lambda one: -one[1]):
        middle = frame.at(degrees((column + 0.5, row + 0.5), found.step))
        href = base.replace(CELL, f"cell={column}-{row}-{found.step}")
        parts.append(_dot(middle, count, most, href))
    made = svg(WIDTH, frame.height, title, "".join(parts), SCREEN, "map")
    return Markup(made.replace('role="img"', 'role="group"', 1))  # its dots are links


def _dot(middle: Point, count: int, most: int, href: str) -> str:
    share = math.sqrt((count - 1) / (most - 1)) if most > 1 else 0.0
    radius = DOT[0] + share * (DOT[1] - DOT[0])
    label = counted(count, read_phrases()["records"]["here"])
    return (
        f'<a href="{href}" aria-label="{escape(label)}"><title>{escape(label)}</title>'
        f'<circle cx="{num(middle[0])}" cy="{num(middle[1])}" r="{num(radius)}"'
        ' fill="var(--pen)" fill-opacity=".55" stroke="var(--sheet)"/></a>'
    )


def _graticule(frame: Frame) -> Iterable[str]:
    say = read_phrases()["records"]["sides_of"]
    widest = max(frame.east - frame.west, frame.north - frame.south)
    step = next((one for one in STEPS_DEG if widest / one <= MOST_LINES), STEPS_DEG[-1])
    left, foot = MARGIN, frame.height - FOOT
    right = frame.at((frame.east, 0))[0]
    for east in _lines(frame.west, frame.east, step):
        x = frame.at((east, 0))[0]
        yield path(f"M{num(x)} {num(HEAD)}V{num(foot)}", "var(--hair)", 1)
        name = say["east" if east >= 0 else "west"].format(deg=f"{abs(east):g}")
        yield text(x, foot + 18, name, 13, "var(--contour)", "middle")
    for north in _lines(frame.south, frame.north, step):
        y = frame.at((0, north))[1]
        yield path(f"M{num(left)} {num(y)}H{num(right)}", "var(--hair)", 1)
        name = say["north" if north >= 0 else "south"].format(deg=f"{abs(north):g}")
        yield text(left - 4, y + 4, name, 13, "var(--contour)", "end")


def _lines(low: float, high: float, step: float) -> list[float]:
    first, last = math.ceil(low / step), math.floor(high / step)
    return [round(number * step, 6) for number in range(first, last + 1)]


def hull(points: Iterable[Point]) -> list[Point]:
    """The convex outline of points, counter-clockwise (Andrew 1979, monotone chain)."""
    ordered = sorted(set(points))
    if len(ordered) < 3:
        return ordered
    return _half(ordered)[:-1] + _half(ordered[::-1])[:-1]


def _half(ordered: list[Point]) -> list[Point]:
    chain: list[Point] = []
    for point in ordered:
        while len(chain) > 1 and _turn(chain[-2], chain[-1], point) <= 0:
            chain.pop()
        chain.append(point)
    return chain


def _turn(a: Point, b: Point, c: Point) -> float:
    return (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])
