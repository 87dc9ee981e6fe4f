"""Cover hoops: a ring laid on the ground, dark where the plant covers it.

The dark area is the share asked for, to 0.05 % of that share, measured on the
coordinates as they are written out.
"""

import math
from functools import cache

from builder.drawings.ink import Palette, num, svg

RADIUS = 44.0
"""Radius of the visible ground in a box of 100; the hoop's line lies outside it."""

GROUND = math.pi * RADIUS**2
POINTS = 10
POINTS_SMALL = 6
SMALL_MM = 8.0
TRIES = 6000
GAP = 0.5
PLACES = 3
WOBBLE = 0.14


def hoop(share: float, title: str, palette: Palette, size: float = 4.6) -> str:
    """A hoop of the given size whose dark share is true."""
    points = POINTS_SMALL if palette.inline and size < SMALL_MM else POINTS
    body = (
        f'<circle cx="50" cy="50" r="{num(RADIUS)}" fill="{palette.sheet}"/>'
        f'<path fill="{palette.ink}" fill-rule="evenodd" d="{hoop_path(share, points)}"/>'
        f'<circle cx="50" cy="50" r="{num(RADIUS + 2)}" fill="none"'
        f' stroke="{palette.line}" stroke-width="4"/>'
    )
    drawn = svg(100, 100, title, body, palette, "hoop")
    if palette.inline:
        millimetres = f'width="{num(size)}mm" height="{num(size)}mm"'
        drawn = drawn.replace('width="100mm" height="100mm"', millimetres)
    return drawn


@cache
def hoop_path(share: float, points: int = POINTS) -> str:
    """Path data of the dark part, in a box of 100, for the even-odd rule.

    share   of the ground covered, 0..1 [-]
    points  control points of each patch; few are enough in small print

    Under a half, patches are drawn; over it, the whole ground less its gaps.
    """
    if not 0 <= share <= 1:
        raise ValueError(f"cover share {share} must lie in 0..1")
    if share > 0.5:
        r, across = num(RADIUS), num(2 * RADIUS)
        ground = f"M{num(50 - RADIUS)} 50a{r} {r} 0 1 0 {across} 0a{r} {r} 0 1 0 -{across} 0z"
        return ground + _patches(1 - share, points)
    return _patches(share, points)


def _patches(share: float, points: int) -> str:
    """Patches that cover a share of the ground, none touching another."""
    if share == 0:
        return ""
    places = _scattered(share)
    wanted = share * GROUND
    grown = math.sqrt(wanted / sum(_area(_outline(*place, points)) for place in places))
    best, error = "", math.inf
    for step in range(400):
        factor = grown * (1 + ((step + 1) // 2) * (-1) ** step * 2e-6)
        outlines = [_rounded(_outline(x, y, r * factor, turn, points)) for x, y, r, turn in places]
        off = abs(sum(_area(outline) for outline in outlines) / wanted - 1)
        if off < error:
            best, error = "".join(_written(outline) for outline in outlines), off
        if error < 1e-4:
            break
    return best


def _scattered(share: float) -> list[tuple[float, float, float, float]]:
    """Centre, radius and turn of each patch, largest first, by a fixed sequence."""
    count = round(3 + 23 * math.sqrt(share))
    weights = [1.0 / (1 + 1.7 * place / count) for place in range(count)]
    scale = math.sqrt(share * GROUND / math.pi / sum(w * w for w in weights))
    shrink = 1.0
    while True:
        placed = _place([w * scale for w in weights], shrink)
        if placed:
            return placed
        # Too tight a fit for the sequence: a few more and more even patches always go in.
        weights = [w + (weights[0] - w) * 0.2 for w in weights] + [weights[-1]]
        scale = math.sqrt(share * GROUND / math.pi / sum(w * w for w in weights))


def _place(radii: list[float], shrink: float) -> list[tuple[float, float, float, float]]:
    placed: list[tuple[float, float, float, float]] = []
    state = 0
    for radius in radii:
        reach = radius * (1 + WOBBLE * 0.55)
        for _ in range(TRIES):
            state += 1
            # Two irrational steps fill the square evenly and are the same on any machine.
            u, v = (state * 0.7548776662466927) % 1, (state * 0.5698402909980532) % 1
            x, y = 100 * u, 100 * v
            if math.hypot(x - 50, y - 50) + reach > RADIUS - GAP * shrink:
                continue
            if all(
                math.hypot(x - a, y - b) > reach + r * (1 + WOBBLE * 0.55) + GAP
                for a, b, r, _ in placed
            ):
                placed.append((x, y, radius, (state * 0.618034) % 1))
                break
        else:
            return []
    return placed


def _outline(
    x: float, y: float, radius: float, turn: float, count: int
) -> list[tuple[float, float]]:
    """Control points of a closed, smooth, lumpy patch."""
    points = []
    for step in range(count):
        angle = 2 * math.pi * (step + turn) / count
        lump = 1 + WOBBLE * math.sin(3 * angle + 9 * turn) * (0.6 + 0.4 * math.cos(step * 2.4))
        reach = radius * lump
        points.append((x + reach * math.cos(angle), y + reach * math.sin(angle)))
    return points


def _middles(points: list[tuple[float, float]]) -> list[tuple[float, float]]:
    following = points[1:] + points[:1]
    return [
        (round((a + c) / 2, PLACES), round((b + d) / 2, PLACES))
        for (a, b), (c, d) in zip(points, following, strict=True)
    ]


def _rounded(points: list[tuple[float, float]]) -> list[tuple[float, float]]:
    return [(round(x, PLACES), round(y, PLACES)) for x, y in points]


def _area(points: list[tuple[float, float]]) -> float:
    """Area inside the quadratic curves through the middles of the sides.

    A curve from P by C to Q adds (2 P x C + 2 C x Q + P x Q) / 6 (Green's theorem).
    """
    middles = _middles(points)
    total = 0.0
    for place, control in enumerate(points):
        start, end = middles[place - 1], middles[place]
        total += 2 * _cross(start, control) + 2 * _cross(control, end) + _cross(start, end)
    return abs(total) / 6


def _cross(a: tuple[float, float], b: tuple[float, float]) -> float:
    return a[0] * b[1] - a[1] * b[0]


def _written(points: list[tuple[float, float]]) -> str:
    middles = _middles(points)
    parts = [f"M{num(middles[-1][0], PLACES)} {num(middles[-1][1], PLACES)}"]
    for control, end in zip(points, middles, strict=True):
        figures = " ".join(num(value, PLACES) for value in (*control, *end))
        parts.append(f"Q{figures}")
    return "".join(parts) + "z"
