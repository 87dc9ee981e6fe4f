"""Drawings only the desk needs: the slope with flags, what was said against what was so."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping, Sequence

from markupsafe import Markup

from builder.drawings.belts import Belt, ZoneLike, belts_of, paint, tab
from builder.drawings.ink import SCREEN, num, path, polyline, rect, svg, text

WIDTH, HEIGHT = 800.0, 306.0
LEFT, FOOT, HEAD = 52.0, 252.0, 12.0
BELT, REACH, LABEL = 42.0, 30.0, 20.0
TICKS_M = (50, 100, 200, 250, 500, 1000)


def patterns(zones: Sequence[ZoneLike]) -> Markup:
    """The one hidden sheet of patterns a page of belts needs."""
    tiles = "".join(belt.pattern(SCREEN) for belt in belts_of(zones).values())
    return Markup(f'<svg class="defs" aria-hidden="true"><defs>{tiles}</defs></svg>')


def tabs(zones: Sequence[ZoneLike]) -> dict[str, Markup]:
    """zone id → its square mark."""
    return {name: Markup(tab(belt, SCREEN, 24)) for name, belt in belts_of(zones).items()}


def mark(zones: Sequence[ZoneLike]) -> Markup:
    """The region's belts as a small stack, high at the top: the desk's own mark."""
    slope = [zone for zone in zones if zone.kind != "azonal"] or list(zones)
    belts = belts_of(zones)
    each = 36 / len(slope)
    strata = "".join(
        paint(rect(0, 36 - each * (place + 1), 26, each, "{more}"), belts[zone.id], SCREEN)
        for place, zone in enumerate(slope)
    )
    frame = rect(0.75, 0.75, 24.5, 34.5, 'fill="none" stroke="var(--tide)" stroke-width="1.5"')
    return Markup(f'<svg viewBox="0 0 26 36" aria-hidden="true">{strata}{frame}</svg>')


def _heights(zones: Sequence[ZoneLike]) -> tuple[float, float]:
    """From a little under the lowest ground to a little over the highest. [m]"""
    low, high = min(z.band_m[0] for z in zones), max(z.band_m[1] for z in zones)
    margin = max(0.04 * (high - low), 10.0)
    return low - margin, high + margin


def slope(
    zones: Sequence[ZoneLike], soft_m: Mapping[str, float], flags: Mapping[str, int], title: str
) -> Markup:
    """Every belt at its true heights, its soft edge dashed, a red flag where a table is wrong.

    soft_m  zone id → soft edge beyond the band [m]
    flags   zone id → problems that name it
    """
    low, high = _heights(zones)
    tick = next(step for step in TICKS_M if (high - low) / step <= 6 or step == TICKS_M[-1])
    belts = belts_of(zones)

    def y(metres: float) -> float:
        return FOOT - (metres - low) / (high - low) * (FOOT - HEAD)

    parts = []
    for metres in range(math.ceil(low / tick) * tick, math.floor(high) + 1, tick):
        index = metres % (2 * tick) == 0
        colour, width = ("var(--line)", 1.4) if index else ("var(--hair)", 1.0)
        parts.append(path(f"M{num(LEFT)} {num(y(metres))}H{num(WIDTH)}", colour, width))
        parts.append(text(LEFT - 8, y(metres) + 4, f"{metres:,.0f}", 13, "var(--contour)", "end"))
    step = (WIDTH - LEFT - 20) / (len(zones) + 1)
    belt = min(BELT, step - 3)
    ordered = sorted(zones, key=lambda zone: zone.kind == "azonal")
    for place, zone in enumerate(ordered):
        lens = zone.kind == "azonal"
        x = LEFT + 6 + step * (place + (1 if lens else 0))
        parts += _belt(zone, x, belt, y, belts[zone.id], soft_m.get(zone.id, 0.0))
        if zone.id in flags:
            parts.append(_flag(x + belt * 0.75, y(zone.band_m[1]) - 4, flags[zone.id]))
    slope_count = sum(zone.kind != "azonal" for zone in zones)
    base = HEIGHT - 18
    parts.append(text(LEFT - 8, base, "m", 13, "var(--contour)", "end"))
    parts.append(text(LEFT + 6, base, "low", 13, "var(--contour)"))
    high_end = LEFT + 6 + step * slope_count
    if slope_count >= 3:
        parts.append(text(high_end, base, "high", 13, "var(--contour)", "end"))
    if slope_count < len(zones):
        parts.append(text(high_end + step, base, "off the slope", 13, "var(--contour)"))
    return Markup(svg(WIDTH, HEIGHT, title, "".join(parts), SCREEN, "slope"))


def _belt(
    zone: ZoneLike, x: float, wide: float, y: Callable[[float], float], belt: Belt, soft: float
) -> list[str]:
    top, foot = y(zone.band_m[1]), y(zone.band_m[0])
    tall = max(foot - top, 4.0)
    parts = []
    if soft and not belt.lens:
        reach_top = max(y(zone.band_m[1] + soft), 2.0)
        reach_foot = min(y(zone.band_m[0] - soft), FOOT + 18)
        dashed = 'fill="none" stroke="var(--line)" stroke-dasharray="2 3"'
        parts.append(rect(x + 6, reach_top, wide - 12, reach_foot - reach_top, dashed))
    corner = f'rx="{num(wide / 2)}" ' if belt.lens else ""
    box = rect(x, top, wide, tall, corner + "{more}")
    parts.append(paint(box, belt, SCREEN))
    rim = 'fill="none" stroke="var(--tide)" stroke-width="1.5"'
    parts.append(box.replace("{more}", rim))
    middle, label = x + wide / 2, min(LABEL, wide - 4)
    parts.append(rect(middle - label / 2, top + tall / 2 - 10.5, label, 21, 'fill="var(--sheet)"'))
    size = 15 if len(belt.letter) == 1 else 12
    parts.append(text(middle, top + tall / 2 + 5.3, belt.letter, size, "var(--ink)", "middle", 700))
    return parts


def _flag(x: float, foot: float, count: int) -> str:
    cloth = f"M{num(x)} {num(foot)}v-24h-20v14h20"
    red = 'fill="var(--warn)" stroke="var(--warn)" stroke-width="2"'
    number = text(x - 10, foot - 13, str(count), 12, "var(--on-warn)", "middle", 700)
    return f'<path d="{cloth}" {red}/>{number}'


def calibration(points: Sequence[tuple[float, float, float, float]], title: str) -> Markup:
    """What the key said against how often it was right.

    points  (said, right, low, high), all shares 0..1
    """

    def x(share: float) -> float:
        return 36 + (share - 0.3) / 0.7 * 250

    def y(share: float) -> float:
        return 150 - (share - 0.3) / 0.7 * 138

    parts = [path(f"M{num(x(0.3))} {num(y(0.3))}L{num(x(1))} {num(y(1))}", "var(--line)", 1.4)]
    for share in (0.3, 0.5, 0.75, 1.0):
        label = str(round(share * 100))
        parts.append(path(f"M36 {num(y(share))}H286", "var(--hair)", 1))
        parts.append(text(29, y(share) + 4, label, 13, "var(--contour)", "end"))
        parts.append(text(x(share), 168, label, 13, "var(--contour)", "middle"))
    for said, right, low, high in points:
        if said < 0.3:
            continue
        low, high, right = max(low, 0.3), max(high, 0.3), max(right, 0.3)
        parts.append(path(f"M{num(x(said))} {num(y(high))}V{num(y(low))}", "var(--ink)", 2))
        parts.append(
            f'<circle cx="{num(x(said))}" cy="{num(y(right))}" r="6" fill="var(--sheet)"'
            ' stroke="var(--ink)" stroke-width="2.5"/>'
        )
    parts.append(text(286, 183, "it said, in 100", 13, "var(--contour)", "end"))
    return Markup(svg(300, 188, title, "".join(parts), SCREEN, "plot"))


def length(share: float) -> Markup:
    """A solid bar of a share of its room."""
    wide = num(max(0.0, min(1.0, share)) * 70)
    return Markup(
        f'<svg viewBox="0 0 70 10" preserveAspectRatio="none" aria-hidden="true">'
        f'<rect width="{wide}" height="10"/></svg>'
    )


def kite(shares: Sequence[float], room: float = 1.0) -> Markup:
    """A pale kite for behind a row of cells, one column a share; a slip shows as a bump.

    room  share of the row's cells that the kite lies behind
    """
    columns = len(shares)
    top = [((place + 0.5) * 10, 19 - 17 * share) for place, share in enumerate(shares)]
    foot = [(x, 38 - y) for x, y in reversed(top)]
    outline = polyline([(0.0, 19.0), *top, (columns * 10.0, 19.0), *foot], close=True)
    return Markup(
        f'<svg class="kite" viewBox="0 0 {num(columns * 10 / room)} 38" preserveAspectRatio="none"'
        f' aria-hidden="true"><path d="{outline}"/></svg>'
    )
