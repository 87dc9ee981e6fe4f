"""Kites: a plant's share of plots along the slope, mirrored about its row."""

from collections.abc import Sequence

from builder.drawings.belts import Belt, defs, paint
from builder.drawings.ink import PRINT, Palette, num, path, polyline, rect, svg, text


class Columns:
    """Where each zone's column lies: the slope first, a gap, then the lenses."""

    def __init__(self, belts: Sequence[Belt], width: float) -> None:
        """Lay out the columns.

        belts  slope first, lenses after
        """
        lenses = sum(belt.lens for belt in belts)
        self.belts = belts
        self.gap = 0.6 if lenses and lenses < len(belts) else 0.0
        self.step = width / (len(belts) + self.gap)
        self.width = width

    def left(self, place: int) -> float:
        """Left edge of a column."""
        return (place + (self.gap if self.belts[place].lens else 0.0)) * self.step

    def middle(self, place: int) -> float:
        """Middle of a column."""
        return self.left(place) + self.step / 2


def kite_head(belts: Sequence[Belt], palette: Palette = PRINT, width: float = 56) -> str:
    """Letters over swatches: the head of a chart of kites."""
    columns = Columns(belts, width)
    size = min(2.9, columns.step * 0.9)
    parts = [defs(belts, palette, 0.16)]
    for place, belt in enumerate(belts):
        x = columns.left(place)
        parts.append(
            text(columns.middle(place), size, belt.letter, size, palette.ink, "middle", 700)
        )
        corner = f'rx="{num(min(1.2, columns.step / 2))}" ' if belt.lens else ""
        box = rect(x + 0.1, size + 0.7, columns.step - 0.2, 2.6, corner + "{more}")
        parts.append(paint(box, belt, palette))
        rim = f'fill="none" stroke="{palette.ink}" stroke-width=".2"'
        parts.append(box.replace("{more}", rim))
    return svg(
        width,
        size + 3.5,
        "The belts, low to high, then the ground beside them",
        "".join(parts),
        palette,
        "kitehead",
    )


def kite_row(
    shares: Sequence[float],
    belts: Sequence[Belt],
    title: str,
    palette: Palette = PRINT,
    width: float = 56,
    height: float = 3.5,
    grid: bool = True,
) -> str:
    """One plant's row.

    shares  constancy in each zone, in the order of belts, 0..1
    """
    columns = Columns(belts, width)
    middle = height / 2
    parts = []
    if grid:
        lines = (
            "".join(f"M{num(columns.left(place))} 0V{num(height)}" for place in range(len(belts)))
            + f"M{num(width - 0.05)} 0V{num(height)}"
        )
        parts.append(path(lines, palette.hair, 0.12))
    slope = [place for place, belt in enumerate(belts) if not belt.lens]
    if slope:
        end = columns.left(slope[-1]) + columns.step
        parts.append(path(f"M0 {num(middle)}H{num(end)}", palette.hair, 0.16))
    for run in _runs(shares, belts):
        up = [(columns.middle(place), middle - shares[place] * middle * 0.98) for place in run]
        down = [(x, 2 * middle - y) for x, y in reversed(up)]
        first = (columns.middle(run[0]) - columns.step / 2, middle)
        last = (columns.middle(run[-1]) + columns.step / 2, middle)
        shape = polyline([first, *up, last, *down], close=True)
        lens = belts[run[0]].lens
        fill = belts[run[0]].colour if lens and palette.inline else palette.ink
        rim = f' stroke="{palette.ink}" stroke-width=".15"' if lens else ""
        parts.append(f'<path d="{shape}" fill="{fill}"{rim}/>')
    return svg(width, height, title, "".join(parts), palette, "kite")


def _runs(shares: Sequence[float], belts: Sequence[Belt]) -> list[list[int]]:
    """Neighbouring zones that hold the plant; each lens stands alone."""
    runs: list[list[int]] = []
    for place, share in enumerate(shares):
        if share <= 0:
            continue
        joins = runs and runs[-1][-1] == place - 1 and not belts[place].lens
        if joins and not belts[place - 1].lens:
            runs[-1].append(place)
        else:
            runs.append([place])
    return runs


def amplitude(
    shares: Sequence[float],
    belts: Sequence[Belt],
    title: str,
    palette: Palette = PRINT,
    width: float = 40,
    height: float = 5,
) -> str:
    """A strip of the belts: the colour of each that holds the plant, a bar as tall as constancy."""
    columns = Columns(belts, width)
    foot = height - 0.9
    slope = sum(not belt.lens for belt in belts)
    line = f"M0 {num(height - 0.1)}H{num(slope * columns.step)}"
    if slope < len(belts):
        line += f"M{num(columns.left(slope))} {num(height - 0.1)}H{num(width)}"
    bars, parts = "", [path(line, palette.line, 0.2)]
    for place, belt in enumerate(belts):
        if shares[place] <= 0:
            continue
        x, tall = columns.left(place), max(0.3, (foot - 0.2) * shares[place])
        fill = belt.colour if palette.inline else belt.on_screen_colour()
        parts.append(rect(x, foot, columns.step, 0.9, f'fill="{fill}"'))
        bars += (
            f"M{num(x + columns.step * 0.2)} {num(foot - 0.15)}v{num(-tall)}"
            f"h{num(columns.step * 0.6)}v{num(tall)}z"
        )
    if bars:
        parts.append(f'<path d="{bars}" fill="{palette.ink}"/>')
    return svg(width, height, title, "".join(parts), palette, "amplitude")
