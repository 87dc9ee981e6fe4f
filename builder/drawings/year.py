"""The year: rain as twelve columns, warmth as a line, and strips of months."""

import math
from collections.abc import Collection, Sequence

from builder.drawings.belts import Belt, defs, paint
from builder.drawings.ink import PRINT, Palette, num, path, polyline, rect, svg, text


def year(
    precip_mm: Sequence[float],
    mean_c: Sequence[float],
    growing: Collection[int],
    belt: Belt,
    initials: Sequence[str],
    title: str,
    palette: Palette = PRINT,
    width: float = 80,
    height: float = 29,
) -> str:
    """Twelve columns of rain with the line of mean warmth over them.

    precip_mm  rain and snow of each month [mm]
    mean_c     mean temperature of each month [deg C]
    growing    months (1-12) that are warm and moist; their columns are filled
    initials   twelve letters for the months
    """
    left, right = width * 0.085, width * 0.075
    foot, head = height * 0.86, height * 0.05
    column = (width - left - right) / 12
    most = _nice_top(max(precip_mm))
    size = min(height * 0.085, width * 0.03)
    parts = [defs([belt], palette, width / 400)]
    for share in (0.5, 1.0):
        y = foot - share * (foot - head)
        parts.append(path(f"M{num(left)} {num(y)}H{num(width - right)}", palette.hair, width / 400))
    for month in range(1, 13):
        x = left + (month - 1) * column + column * 0.1
        tall = (foot - head) * precip_mm[month - 1] / most
        box = rect(x, foot - tall, column * 0.8, max(tall, 0.05), "{more}")
        if month in growing:
            parts.append(paint(box, belt, palette))
            fill = "none"
        else:
            fill = palette.well
        rim = f'fill="{fill}" stroke="{palette.ink}" stroke-width="{num(width / 360)}"'
        parts.append(box.replace("{more}", rim))
        bold = 700 if month in growing else 400
        at, letter = (x + column * 0.4, height * 0.975), initials[month - 1]
        parts.append(text(*at, letter, size, palette.contour, "middle", bold))
    parts.append(_warmth(mean_c, left, column, foot, head, width, size, palette))
    parts.append(
        path(f"M{num(left)} {num(foot)}H{num(width - right)}", palette.contour, width / 300)
    )
    for share in (0.0, 0.5, 1.0):
        y = foot - share * (foot - head)
        at = (left - size * 0.35, y + size * 0.35)
        parts.append(text(*at, num(most * share, 1), size, palette.contour, "end"))
    return svg(width, height, title, "".join(parts), palette, "year")


def _warmth(
    mean_c: Sequence[float],
    left: float,
    column: float,
    foot: float,
    head: float,
    width: float,
    size: float,
    palette: Palette,
) -> str:
    """The temperature line with its own scale at the right."""
    low = 5 * math.floor((min(mean_c) - 1) / 5)
    high = 5 * math.ceil((max(mean_c) + 1) / 5)

    def y(degrees: float) -> float:
        return foot - (degrees - low) / (high - low) * (foot - head)

    line = polyline(
        [(left + (month + 0.5) * column, y(degrees)) for month, degrees in enumerate(mean_c)]
    )
    join = 'stroke-linejoin="round" stroke-linecap="round"'
    parts = [
        path(line, palette.paper, width / 62, join),
        path(line, palette.contour, width / 135, join),
    ]
    right = left + 12 * column
    for degrees in sorted({low, 0, high}):
        if low <= degrees <= high:
            words = f"{degrees}°".replace("-", "−")
            parts.append(
                text(right + size * 0.35, y(degrees) + size * 0.35, words, size, palette.contour)
            )
    return "".join(parts)


def months(
    chosen: Collection[int],
    belt: Belt,
    initials: Sequence[str],
    title: str,
    palette: Palette = PRINT,
    width: float = 80,
    height: float = 5.4,
) -> str:
    """A strip of the year with the chosen months filled and lettered inside."""
    step = width / 12
    size = min(height * 0.56, step * 0.7)
    parts = [defs([belt], palette, height / 24)]
    for month in range(1, 13):
        x = (month - 1) * step
        box = rect(x + 0.1, 0.1, step - 0.2, height - 0.2, "{more}")
        inside = month in chosen
        if inside:
            parts.append(paint(box, belt, palette))
            parts.append(
                box.replace("{more}", f'fill="none" stroke="{palette.ink}" stroke-width=".25"')
            )
            wide = size * 0.95
            label = (x + step / 2 - wide / 2, height / 2 - size * 0.5, wide, size)
            parts.append(rect(*label, f'fill="{palette.sheet}"'))
        else:
            parts.append(box.replace("{more}", f'fill="{palette.well}"'))
        ink, weight = (palette.ink, 700) if inside else (palette.ink_2, 400)
        at = (x + step / 2, height / 2 + size * 0.345)
        parts.append(text(*at, initials[month - 1], size, ink, "middle", weight))
    return svg(width, height, title, "".join(parts), palette, "months")


def _nice_top(value: float) -> float:
    """The next round figure at or above a value."""
    if value <= 0:
        return 10.0
    power: float = 10 ** math.floor(math.log10(value))
    for factor in (1, 1.2, 1.6, 2, 3, 4, 5, 6, 8, 10):
        if value <= power * factor:
            return power * factor
    return 10 * power
