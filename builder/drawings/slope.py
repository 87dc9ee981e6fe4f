"""The region's slope: as strata on the cover, and as belts at their true heights."""

import math
from collections.abc import Sequence

from builder.drawings.belts import Belt, ZoneLike, belts_of, defs, in_stack_order, paint
from builder.drawings.ink import PRINT, Palette, num, path, polyline, rect, svg, text

KNOTS = 5
RISE_LOW, RISE_HIGH = 9.0, 27.0
INDEX_EVERY = 5


def strata(
    zones: Sequence[ZoneLike],
    elevation_m: tuple[float, float],
    width: float,
    top: float,
    bottom: float,
    palette: Palette = PRINT,
    scale: float = 0.3,
) -> str:
    """The belts as ground seen from the side, low at the foot; lenses lie in their belt.

    top, bottom  where the highest belt begins and the lowest ends, mid-page
    """
    belts = belts_of(zones)
    slope = [zone for zone in zones if zone.kind != "azonal"]
    edges = _edges(slope, elevation_m, top, bottom)
    parts = [defs(belts.values(), palette, scale)]
    for place in range(len(slope) - 1, -1, -1):
        line = _terrace(edges, place + 1, width)
        ground = (
            f'<path d="{line}L{num(width)} {num(bottom + 40)}L0 {num(bottom + 40)}z" {{more}}/>'
        )
        parts.append(paint(ground, belts[slope[place].id], palette))
        parts.append(path(line, palette.ink, 0.55))
    parts.extend(_lenses(zones, belts, edges, width, palette))
    return "".join(parts)


def _edges(
    slope: Sequence[ZoneLike], elevation_m: tuple[float, float], top: float, bottom: float
) -> list[float]:
    """Height on the page of the foot of each belt and the top of the last, foot first.

    Belts meet half-way between their centres; none gets thinner than .55 of an even share,
    since bands may overlap so far that two share one height.
    """
    low, high = elevation_m
    centres = [zone.centre_m for zone in slope]
    bounds = [low, *((a + b) / 2 for a, b in zip(centres, centres[1:], strict=False)), high]
    even = (high - low) / len(slope)
    thick = [max(b - a, 0.55 * even) for a, b in zip(bounds, bounds[1:], strict=False)]
    share = (bottom - top) / sum(thick)
    edges = [bottom]
    for part in thick:
        edges.append(edges[-1] - part * share)
    return edges


def _height_at(edges: list[float], place: int, x: float, width: float) -> float:
    """Where the line above belt number place - 1 runs at x; it climbs to the right."""
    share = place / (len(edges) - 1)
    rise = RISE_LOW + (RISE_HIGH - RISE_LOW) * share
    thin = min(abs(a - b) for a, b in zip(edges, edges[1:], strict=False))
    sway = min(1.7, 0.2 * thin) * math.sin(place * 1.9 + x / width * 11)
    return edges[place] + rise * (0.5 - x / width) + sway


def _terrace(edges: list[float], place: int, width: float) -> str:
    """A line that climbs in steps: level at each knot."""
    xs = [width * knot / (KNOTS - 1) for knot in range(KNOTS)]
    ys = [_height_at(edges, place, x, width) for x in xs]
    parts = [f"M0 {num(ys[0])}"]
    for x0, y0, x1, y1 in zip(xs, ys, xs[1:], ys[1:], strict=False):
        mid = num((x0 + x1) / 2)
        parts.append(f"C{mid} {num(y0)} {mid} {num(y1)} {num(x1)} {num(y1)}")
    return "".join(parts)


def _lenses(
    zones: Sequence[ZoneLike],
    belts: dict[str, Belt],
    edges: list[float],
    width: float,
    palette: Palette,
) -> list[str]:
    slope = [zone.id for zone in zones if zone.kind != "azonal"]
    parts, last, number = [], 0, 0
    for zone in in_stack_order(zones):
        if zone.kind != "azonal":
            last = slope.index(zone.id)
            continue
        x = width * (0.3, 0.62, 0.42, 0.74)[number % 4]
        number += 1
        lower = _height_at(edges, last, x, width)
        upper = _height_at(edges, last + 1, x, width)
        y, rx = (lower + upper) / 2, width * 0.085
        ry = max(1.2, min(3.1, abs(lower - upper) * 0.42))
        tilt = f'transform="rotate(-8 {num(x)} {num(y)})"'
        shape = (
            f'<ellipse cx="{num(x)}" cy="{num(y)}" rx="{num(rx)}" ry="{num(ry)}" {tilt} {{more}}/>'
        )
        parts.append(paint(shape, belts[zone.id], palette))
        rim = f'fill="none" stroke="{palette.ink}" stroke-width=".5"'
        parts.append(shape.replace("{more}", rim))
    return parts


def contours(width: float, height: float, palette: Palette = PRINT) -> str:
    """Height lines about a summit, every fifth an index line."""
    cx, cy = width * 0.79, height * 0.2
    parts = []
    for ring in range(17):
        reach = 9 + ring * 7.2
        points = []
        for step in range(97):
            turn = 2 * math.pi * step / 96
            lump = (
                1
                + 0.11 * math.sin(2 * turn + 0.7 + ring * 0.05)
                + 0.1 * math.sin(3 * turn - ring * 0.21)
                + 0.05 * math.sin(5 * turn + ring * 0.35)
            )
            points.append(
                (cx + reach * lump * math.cos(turn), cy + 0.66 * reach * lump * math.sin(turn))
            )
        index = ring % INDEX_EVERY == INDEX_EVERY - 1
        colour = palette.line if index else palette.hair
        parts.append(path(polyline(points, close=True), colour, 0.4 if index else 0.25))
    return "".join(parts)


def heights(
    zones: Sequence[ZoneLike],
    elevation_m: tuple[float, float],
    title: str,
    marked: str | None = None,
    palette: Palette = PRINT,
    width: float = 80,
    height: float = 18.5,
) -> str:
    """Every belt as a block at its true heights, stepping up; lenses beside, rounded.

    marked  zone drawn in its own colours; without one, all are
    """
    belts = belts_of(zones)
    scale = width / 400
    low, high = _round_range(elevation_m)
    foot, head = height * 0.82, height * 0.06

    def y(metres: float) -> float:
        return foot - (metres - low) / (high - low) * (foot - head)

    parts = [defs([b for i, b in belts.items() if marked in (None, i)], palette, scale)]
    step = _tick_step(high - low)
    left = width * 0.125
    size = max(width * 0.024, min(height * 0.096, width * 0.03))
    metres = math.ceil(low / step) * step
    while metres <= high:
        parts.append(path(f"M{num(left)} {num(y(metres))}H{num(width)}", palette.hair, width / 400))
        label = f"{metres:,.0f}"
        parts.append(
            text(left - size * 0.4, y(metres) + size * 0.35, label, size, palette.contour, "end")
        )
        metres += step
    azonal = sum(zone.kind == "azonal" for zone in zones)
    gap = 1.2 if azonal else 0
    column = (width - left) / (len(zones) + gap)
    slope_first = sorted(zones, key=lambda zone: zone.kind == "azonal")
    for place, zone in enumerate(slope_first):
        lens = zone.kind == "azonal"
        x = left + column * (place + (gap * 0.8 if lens else 0.2))
        wide = column * 0.86
        top, tall = y(zone.band_m[1]), y(zone.band_m[0]) - y(zone.band_m[1])
        corner = f'rx="{num(wide / 2)}" ' if lens else ""
        box = rect(x, top, wide, max(tall, 0.5), corner + "{more}")
        if marked in (None, zone.id):
            parts.append(paint(box, belts[zone.id], palette))
            rim = f'fill="none" stroke="{palette.ink}" stroke-width="{num(width / 260)}"'
        else:
            rim = f'fill="{palette.well}" stroke="{palette.line}" stroke-width="{num(width / 440)}"'
        parts.append(box.replace("{more}", rim))
        bold = zone.id == marked
        if bold or column > size * 0.9:
            ink, weight = (palette.ink, 700) if bold else (palette.ink_2, 400)
            foot_y = height * 0.985
            parts.append(text(x + wide / 2, foot_y, zone.letter, size, ink, "middle", weight))
    return svg(width, height, title, "".join(parts), palette, "heights")


def _tick_step(span: float) -> float:
    """A round step that gives two to five lines."""
    power: float = 10 ** math.floor(math.log10(span))
    for factor in (0.1, 0.2, 0.25, 0.5, 1):
        if span / (power * factor) <= 5:
            return power * factor
    return power


def _round_range(elevation_m: tuple[float, float]) -> tuple[float, float]:
    low, high = elevation_m
    step = _tick_step(high - low) / 2
    return math.floor(low / step) * step, math.ceil(high / step) * step
