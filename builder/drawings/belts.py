"""The belts' four names: letter, colour, pattern, place in the stack."""

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Protocol

from builder.drawings.ink import PRINT, Palette, num, path, rect, svg, text

MARK_LOW = "#2c200c"
MARK_HIGH = "#fdf6e6"
MARK_SHARE = 0.66
LIGHTEST_DARK = 0.21
"""Relative luminance under which a belt takes pale marks (H is .15, Y .20, G .22)."""

SLOPE_COLOURS = {
    "A": "#ece5d3", "B": "#f6d180", "C": "#c2c99b", "D": "#d6af48", "E": "#9fa77c",
    "F": "#bc8929", "G": "#bf6b4a", "H": "#537257", "J": "#006759", "K": "#265059",
    "L": "#283b57", "M": "#241f60",
}  # fmt: skip
WATER_COLOURS = {"W": "#e3c6e6", "X": "#c298c6", "Y": "#a16ca8", "Z": "#7c4387"}

_LINE = '<path d="{d}" fill="none" stroke="{{ink}}" stroke-width="1.3"/>'


def _dots(radius: float, *centres: tuple[float, float]) -> str:
    return "".join(
        f'<circle cx="{num(x)}" cy="{num(y)}" r="{num(radius)}" fill="{{ink}}"/>'
        for x, y in centres
    )


TILES: dict[str, tuple[float, str]] = {
    "A": (18, _LINE.format(d="M2 5h7M11 14h6")),
    "B": (10, _dots(1, (2.5, 2.5), (7.5, 7.5))),
    "C": (16, _LINE.format(d="M2 3l2.4 5 2.4-5M10 10l2.4 5 2.4-5")),
    "D": (16, _LINE.format(d="M0 .6h16M0 8.6h16M4 .6v8M12 8.6v8")),
    "E": (18, _LINE.format(
        d="M8 5a3.4 3.4 0 1 1-6.8 0a3.4 3.4 0 1 1 6.8 0z"
        "M17 14a3.4 3.4 0 1 1-6.8 0a3.4 3.4 0 1 1 6.8 0z"
    )),
    "F": (16, _dots(1.6, (3, 5), (6.6, 5), (4.8, 2), (11, 13), (14.6, 13), (12.8, 10))),
    "G": (12, _LINE.format(d="M3 0v8M9 6v8M9-6v8")),
    "H": (16, _LINE.format(d="M1 4.4q3.2-3.6 6.4 0M4.2 4v3.6M9 12.4q3.2-3.6 6.4 0M12.2 12v3.6")),
    "J": (16, _LINE.format(d="M1 7l3.2-5 3.2 5M9 15l3.2-5 3.2 5")),
    "K": (12, _LINE.format(d="M3 0v12M9 0v12M3 3h2.6M9 9h2.6")),
    "L": (10, _LINE.format(
        d="M1 4.4l2.4-4 2.4 4M1 9.4l2.4-4 2.4 4M6.2 6.9l2.4-4 2.4 4"
        "M6.2 1.9l2.4-4 2.4 4M6.2 11.9l2.4-4 2.4 4"
    )),
    "M": (18, _LINE.format(d="M1 6q4-3.4 8 0M10 15q4-3.4 8 0M11 4h5M2 13h5")),
    "W": (14, _LINE.format(d="M0 4q3.5-3 7 0t7 0") + _dots(1, (3.5, 10), (10.5, 10))),
    "X": (16, _LINE.format(d="M0 11h8v-6h8")),
    "Y": (14, _LINE.format(d="M0 3.5q3.5-3 7 0t7 0M0 10.5q3.5-3 7 0t7 0")),
    "Z": (16, _LINE.format(
        d="M1 7h8M3 7v-3M5 7v-4.4M7 7v-3M9 15h7M10.5 15v-3M12.5 15v-4.4M14.5 15v-3"
    )),
}  # fmt: skip
"""Side of a square tile, and its marks; {ink} stands for the mark's colour."""


class ZoneLike(Protocol):
    """What a drawing must know of a zone."""

    @property
    def id(self) -> str: ...
    @property
    def letter(self) -> str: ...
    @property
    def kind(self) -> str: ...
    @property
    def band_m(self) -> tuple[float, float]: ...
    @property
    def centre_m(self) -> float: ...


@dataclass(frozen=True)
class Belt:
    """How one zone is drawn."""

    letter: str
    colour: str
    tile: str
    lens: bool

    @property
    def mark(self) -> str:
        """Colour of the pattern's marks on paper."""
        return MARK_HIGH if _luminance(self.colour) < LIGHTEST_DARK else MARK_LOW

    @property
    def pattern_id(self) -> str:
        """Name of the belt's pattern within a page."""
        return f"p-{self.letter}"

    def on_screen_colour(self) -> str:
        """The page's own colour for the belt where it has one."""
        standard = {**SLOPE_COLOURS, **WATER_COLOURS}
        if standard.get(self.letter) == self.colour:
            return f"var(--belt-{self.letter.lower()})"
        return self.colour

    def pattern(self, palette: Palette, scale: float = 1.0) -> str:
        """The pattern's definition; one tile unit becomes scale units."""
        side, marks = TILES[self.tile]
        size = num(side * scale, 3)
        if palette.inline:
            ground, ink, share = "", self.mark, f'opacity="{MARK_SHARE}"'
        else:
            fill = self.on_screen_colour()
            ground = f'<rect width="{num(side)}" height="{num(side)}" fill="{fill}"/>'
            ink = "var(--mark-high)" if self.mark == MARK_HIGH else "var(--mark-low)"
            share = 'opacity="var(--mark-share)"'
        return (
            f'<pattern id="{self.pattern_id}" width="{size}" height="{size}"'
            f' patternUnits="userSpaceOnUse" viewBox="0 0 {num(side)} {num(side)}">'
            f"{ground}<g {share}>{marks.replace('{ink}', ink)}</g></pattern>"
        )


def paint(shape: str, belt: Belt, palette: Palette, rim: str = "") -> str:
    """A shape filled with a belt; {more} in the shape takes the fill.

    rim  stroke of the outline, where the shape has one

    On paper plain colour lies under the marks, or seams would show between tiles.
    """
    pattern = f'fill="url(#{belt.pattern_id})" {rim}'.rstrip()
    if not palette.inline:
        return shape.replace("{more}", pattern)
    return shape.replace("{more}", f'fill="{belt.colour}"') + shape.replace("{more}", pattern)


def defs(belts: Iterable[Belt], palette: Palette, scale: float) -> str:
    """The patterns a drawing on paper needs; nothing on a screen."""
    if not palette.inline:
        return ""
    return "<defs>" + "".join(belt.pattern(palette, scale) for belt in belts) + "</defs>"


def belts_of(zones: Iterable[ZoneLike]) -> dict[str, Belt]:
    """Each zone's belt. More than twelve on the slope step evenly along the same path."""
    slope = [zone for zone in zones if zone.kind != "azonal"]
    water = [zone for zone in zones if zone.kind == "azonal"]
    found = {}
    for group, colours, lens in (
        (slope, SLOPE_COLOURS, False),
        (water, WATER_COLOURS, True),
    ):
        tiles = list(colours)
        named = all(zone.letter in colours for zone in group)
        for place, zone in enumerate(group):
            if named:
                found[zone.id] = Belt(zone.letter, colours[zone.letter], zone.letter, lens)
                continue
            share = place / max(1, len(group) - 1)
            colour = _along(list(colours.values()), share)
            found[zone.id] = Belt(zone.letter, colour, tiles[place % len(tiles)], lens)
    return found


def in_stack_order(zones: Iterable[ZoneLike]) -> list[ZoneLike]:
    """All zones from the foot up: the slope's own order, each lens above the belt at its height.

    This is the order of the thumb tabs and of the app's open edge.
    """
    slope = [zone for zone in zones if zone.kind != "azonal"]
    stack: list[ZoneLike] = list(slope)
    for lens in sorted(
        (zone for zone in zones if zone.kind == "azonal"), key=lambda zone: zone.centre_m
    ):
        below = [place for place, zone in enumerate(stack) if zone.centre_m <= lens.centre_m]
        stack.insert(below[-1] + 1 if below else 0, lens)
    return stack


def tab(belt: Belt, palette: Palette, side: float = 5.6) -> str:
    """The belt's square mark: letter on its own label, on pattern, on colour."""
    scale = side / 54 if side > 8 else side / 40
    width = side * (0.58 if len(belt.letter) == 1 else 0.78)
    label = rect((side - width) / 2, side * 0.19, width, side * 0.62, f'fill="{palette.sheet}"')
    size = side * (0.54 if len(belt.letter) == 1 else 0.42)
    frame = 0.15 if palette.inline else side * 0.025
    box = rect(frame, frame, side - 2 * frame, side - 2 * frame, "{more}")
    if belt.lens:
        round_ = f'rx="{num(side * 0.28)}" {{more}}'
        box = rect(frame, frame, side - 2 * frame, side - 2 * frame, round_)
    edge = box.replace(
        "{more}", f'fill="none" stroke="{palette.ink}" stroke-width="{num(2 * frame)}"'
    )
    letter = text(
        side / 2, side * 0.5 + size * 0.345, belt.letter, size, palette.ink, "middle", 700
    )
    body = defs([belt], palette, scale) + paint(box, belt, palette) + edge + label + letter
    return svg(side, side, f"Belt {belt.letter}", body, palette, "tab")


def thumb(belt: Belt, height: float, width: float, palette: Palette = PRINT) -> str:
    """A thumb tab that bleeds off both page edges: drawn wider than it is seen. [mm]"""
    shape = rect(0, 0, width, height, "{more}")
    label_h = min(4.6, height * 0.62)
    size = label_h * (0.86 if len(belt.letter) == 1 else 0.66)
    label = rect(
        width / 2 - label_h * 0.41, (height - label_h) / 2, label_h * 0.82, label_h,
        f'fill="{palette.sheet}"' + (f' rx="{num(label_h * 0.4)}"' if belt.lens else ""),
    )  # fmt: skip
    rim = path(f"M0 .15h{num(width)}M0 {num(height - 0.15)}h{num(width)}", palette.ink, 0.3)
    letter = text(
        width / 2, height / 2 + size * 0.345, belt.letter, size, palette.ink, "middle", 700
    )
    body = defs([belt], palette, 0.2) + paint(shape, belt, palette) + rim + label + letter
    return svg(width, height, f"Belt {belt.letter}", body, palette, "thumb")


def edge(stack: list[Belt], height: float, width: float, palette: Palette = PRINT) -> str:
    """The whole fore-edge, foot at the bottom, for pages that speak of all belts. [mm]"""
    step = height / len(stack)
    parts = [defs(stack, palette, 0.2)]
    for place, belt in enumerate(stack):
        top = height - (place + 1) * step
        parts.append(paint(rect(0, top, width, step, "{more}"), belt, palette))
        parts.append(
            f'<path d="M0 {num(top)}h{num(width)}" stroke="{palette.ink}" stroke-width=".3"/>'
        )
    return svg(width, height, "The belts, low to high", "".join(parts), palette, "edge")


def _channels(colour: str) -> list[int]:
    return [int(colour[place : place + 2], 16) for place in (1, 3, 5)]


def _luminance(colour: str) -> float:
    """Relative luminance, 0..1. Source: WCAG 2.2, "relative luminance"."""
    linear = []
    for channel in _channels(colour):
        share = channel / 255
        linear.append(share / 12.92 if share <= 0.04045 else ((share + 0.055) / 1.055) ** 2.4)
    return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]


def _along(colours: list[str], share: float) -> str:
    """The colour at a share of the way along a path of colours."""
    place = share * (len(colours) - 1)
    low = min(int(place), len(colours) - 2)
    part = place - low
    mixed = [
        round(a + (b - a) * part)
        for a, b in zip(_channels(colours[low]), _channels(colours[low + 1]), strict=True)
    ]
    return "#" + "".join(f"{channel:02x}" for channel in mixed)
