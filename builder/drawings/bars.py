"""Bars: constancy, expected production with ghost and pin flag, and reasons for a call."""

import math
from collections.abc import Callable, Sequence

from builder.drawings.belts import Belt, defs, paint
from builder.drawings.ink import PRINT, Palette, num, path, rect, svg, text


def constancy_bar(
    share: float, belt: Belt, title: str, palette: Palette = PRINT,
    width: float = 22, height: float = 3.2,
) -> str:  # fmt: skip
    """How many of a hundred plots hold the plant, as a filled bar."""
    full = rect(0, 0.1, width, height - 0.2, f'fill="{palette.well}"')
    bar = rect(0.12, 0.12, max(0.1, (width - 0.24) * share), height - 0.24, "{more}")
    rim = f'stroke="{palette.ink}" stroke-width=".24"'
    body = defs([belt], palette, 0.16) + full + paint(bar, belt, palette, rim)
    return svg(width, height, title, body, palette, "constancy")


def range_bar(
    normal: tuple[float, float, float],
    top: float,
    labels: tuple[str, str, str],
    belt: Belt,
    title: str,
    this_year: tuple[float, float] | None = None,
    mine: tuple[float, float, str] | None = None,
    palette: Palette = PRINT,
    width: float = 80,
    height: float = 16,
) -> str:
    """Expected production on a scale from nought.

    normal     low, normal and high year [kg/ha]
    top        right end of the scale [kg/ha]
    labels     the three figures as finished text
    this_year  low and high of this year's range; the normal year then becomes a dashed ghost
    mine       measured mean, its doubt (half width), and the flag's text
    """
    low, middle, high = normal
    axis = height * 0.7
    size = min(height * 0.17, width * 0.032)
    left, right = width * 0.02, width * 0.98

    def x(value: float) -> float:
        return left + min(value / top, 1.0) * (right - left)

    parts = [defs([belt], palette, width / 400), _axis(top, axis, left, right, size, palette, x)]
    bar_top, bar_tall = axis - height * 0.36, height * 0.3
    if this_year is None:
        span = rect(x(low), bar_top, x(high) - x(low), bar_tall, "{more}")
        parts.append(paint(span, belt, palette))
        rim = f'fill="none" stroke="{palette.ink}" stroke-width="{num(width / 260)}"'
        parts.append(span.replace("{more}", rim))
        stroke = f"M{num(x(middle))} {num(bar_top - height * 0.04)}v{num(bar_tall + height * 0.08)}"
        parts.append(path(stroke, palette.paper, width / 70))
        parts.append(path(stroke, palette.ink, width / 180))
        parts.extend(_three_labels((x(low), x(middle), x(high)), labels, bar_top, size, palette))
    else:
        ghost = rect(x(low), bar_top - height * 0.16, x(high) - x(low), height * 0.1, "{more}")
        dash = (
            f'fill="none" stroke="{palette.contour}" stroke-width="{num(width / 300)}"'
            f' stroke-dasharray="{num(width / 100)}"'
        )
        parts.append(ghost.replace("{more}", dash))
        span = rect(x(this_year[0]), bar_top, x(this_year[1]) - x(this_year[0]), bar_tall, "{more}")
        parts.append(paint(span, belt, palette))
        rim = f'fill="none" stroke="{palette.ink}" stroke-width="{num(width / 260)}"'
        parts.append(span.replace("{more}", rim))
    if mine is not None:
        parts.append(
            _flag(
                x(mine[0]),
                x(mine[0] - mine[1]),
                x(mine[0] + mine[1]),
                mine[2],
                axis,
                height,
                size,
                palette,
            )
        )
    return svg(width, height, title, "".join(parts), palette, "range")


def _three_labels(
    xs: tuple[float, float, float], labels: Sequence[str], y: float, size: float, palette: Palette
) -> list[str]:
    """The three figures above the bar, pushed apart where they would touch."""
    gap = size * 0.56 * max(len(label) for label in labels) + size * 0.5
    places = list(xs)
    places[0] = min(places[0], places[1] - gap)
    places[2] = max(places[2], places[1] + gap)
    shift = max(0.0, gap / 2 - places[0])
    return [
        text(place + shift, y - size * 0.45, label, size * 1.1, palette.ink, "middle", 600)
        for place, label in zip(places, labels, strict=True)
    ]


def _axis(
    top: float,
    axis: float,
    left: float,
    right: float,
    size: float,
    palette: Palette,
    x: Callable[[float], float],
) -> str:
    """The scale's line, its marks and their figures."""
    step = scale_step(top)
    parts = [path(f"M{num(left)} {num(axis)}H{num(right)}", palette.contour, size / 9)]
    value = 0.0
    while value <= top * 1.0001:
        parts.append(
            path(f"M{num(x(value))} {num(axis)}v{num(size * 0.45)}", palette.contour, size / 9)
        )
        anchor = "start" if value == 0 else "end" if value > top * 0.95 else "middle"
        at = x(value) + size * {"start": -0.25, "end": 0.4, "middle": 0}[anchor]
        parts.append(text(at, axis + size * 1.5, f"{value:,.0f}", size, palette.contour, anchor))
        value += step
    return "".join(parts)


def scale_step(top: float) -> float:
    """A round step that puts four to eight marks on a scale."""
    power: float = 10 ** math.floor(math.log10(top))
    for factor in (0.1, 0.2, 0.25, 0.5, 1):
        if top / (power * factor) <= 7:
            return power * factor
    return power


def _flag(
    at: float,
    low: float,
    high: float,
    words: str,
    axis: float,
    height: float,
    size: float,
    palette: Palette,
) -> str:
    """A pin flag stands on the measured mean, its doubt a box about the foot."""
    wide = size * 0.56 * len(words) + size
    top = height * 0.02
    box = rect(low, axis - height * 0.26, high - low, height * 0.1)
    box = box.replace(
        "/>", f' fill="{palette.sheet}" stroke="{palette.pen}" stroke-width="{num(size / 6)}"/>'
    )
    pole = path(f"M{num(at)} {num(axis)}V{num(top)}", palette.pen, size / 6)
    cloth = rect(at - wide, top, wide, size * 1.5, f'fill="{palette.pen}"')
    label = text(at - wide / 2, top + size * 1.12, words, size, palette.sheet, "middle", 600)
    return box + pole + cloth + label


def reasons(
    rows: Sequence[tuple[str, float]], leader: str, rival: str, title: str,
    palette: Palette = PRINT, width: float = 80, row_height: float = 5,
) -> str:  # fmt: skip
    """Bars about a plumb line: solid ones speak for the leader, hollow ones for the rival.

    rows  finished text and points; positive points speak for the leader
    """
    most = max((abs(points) for _, points in rows), default=1) or 1
    plumb, reach, size = width * 0.72, width * 0.2, row_height * 0.52
    height = row_height * (len(rows) + 1)
    parts = [
        text(plumb - 1, row_height * 0.7, rival, size, palette.contour, "end", 600),
        text(plumb + 1, row_height * 0.7, leader, size, palette.contour, "start", 600),
    ]
    for place, (words, points) in enumerate(rows):
        y = row_height * (place + 1)
        wide = max(0.2, reach * abs(points) / most)
        x = plumb if points >= 0 else plumb - wide
        fill = palette.ink if points >= 0 else palette.sheet
        rim = f'fill="{fill}" stroke="{palette.ink}" stroke-width=".3"'
        parts.append(rect(x, y + row_height * 0.25, wide, row_height * 0.5, rim))
        parts.append(text(0, y + row_height * 0.68, words, size, palette.ink))
    parts.append(path(f"M{num(plumb)} {num(row_height)}V{num(height)}", palette.contour, 0.4))
    return svg(width, height, title, "".join(parts), palette, "reasons")
