"""Charts of a proof as SVG text, drawn from figures alone; every one has a title for readers."""

from __future__ import annotations

from collections.abc import Sequence
from html import escape
from typing import Any

SIZE = 320
LEFT, TOP = 40, 20
INK, PALE, BAND, MARK, PAPER = "#1f2a24", "#c9d1cb", "#dfe8df", "#7a3b12", "#ffffff"


def _frame(title: str, width: float, height: float, body: Sequence[str]) -> str:
    return (
        f'<svg role="img" viewBox="0 0 {width:.0f} {height:.0f}" '
        f'xmlns="http://www.w3.org/2000/svg"><title>{escape(title)}</title>'
        + "".join(body)
        + "</svg>"
    )


def _text(
    x: float, y: float, words: str, anchor: str = "middle", size: int = 11, fill: str = INK
) -> str:
    return (
        f'<text x="{x:.1f}" y="{y:.1f}" font-size="{size}" text-anchor="{anchor}" '
        f'fill="{fill}">{escape(words)}</text>'
    )


def calibration_chart(rows: Sequence[dict[str, Any]], title: str, x: str, y: str) -> str:
    """Stated belief against the share that was right, with the band of a perfect key.

    rows  as measures.calibration_rows makes them; x, y: words of the axes
    """
    side = SIZE - LEFT - 24
    right, foot = LEFT + side, TOP + side

    def at(across: float, up: float) -> tuple[float, float]:
        return LEFT + across * side, foot - up * side

    body = [
        f'<path d="M{LEFT} {TOP}V{foot}H{right}" fill="none" stroke="{INK}"/>',
        f'<path d="M{LEFT} {foot}L{right} {TOP}" stroke="{PALE}" stroke-dasharray="4 4"/>',
    ]
    for share in (0.0, 0.5, 1.0):
        across, up = at(share, share)
        body.append(_text(across, foot + 14, f"{100 * share:.0f} %"))
        body.append(_text(LEFT - 4, up + 4, f"{100 * share:.0f}", "end"))
    for row in rows:
        across, up = at(row["stated"], row["right"])
        low, high = (at(0, value)[1] for value in row["band"])
        body.append(
            f'<rect x="{across - 7:.1f}" y="{high:.1f}" width="14" '
            f'height="{max(low - high, 1):.1f}" fill="{BAND}"/>'
        )
        body.append(f'<circle cx="{across:.1f}" cy="{up:.1f}" r="4" fill="{MARK}"/>')
        body.append(_text(across, up - 8, str(row["n"]), size=9))
    body.append(_text(LEFT + side / 2, foot + 30, x))
    body.append(
        f'<g transform="rotate(-90 12 {TOP + side / 2:.0f})">{_text(12, TOP + side / 2, y)}</g>'
    )
    return _frame(title, SIZE, SIZE + 10, body)


def confusion_chart(table: Sequence[Sequence[int]], zones: Sequence[str], title: str) -> str:
    """How often each zone (row) was called each zone (column); darker is a larger share."""
    cell, edge = 24, 110
    body = []
    for i, row in enumerate(table):
        total = max(sum(row), 1)
        body.append(_text(edge - 6, edge + i * cell + 16, zones[i], "end"))
        body.append(
            f'<g transform="rotate(-60 {edge + i * cell + 14} {edge - 6})">'
            f"{_text(edge + i * cell + 14, edge - 6, zones[i], 'start')}</g>"
        )
        for j, count in enumerate(row):
            share = count / total
            x, y = edge + j * cell, edge + i * cell
            body.append(
                f'<rect x="{x}" y="{y}" width="{cell - 1}" height="{cell - 1}" '
                f'fill="{MARK if i != j else INK}" fill-opacity="{0.06 + 0.74 * share:.2f}"/>'
            )
            if count:
                fill = PAPER if i == j and share > 0.5 else INK
                body.append(_text(x + cell / 2, y + 16, str(count), size=9, fill=fill))
    size = edge + cell * len(table) + 10
    return _frame(title, size + 50, size, body)


def bars_chart(counts: Sequence[int], title: str, x: str) -> str:
    """One bar a number of answers, from 0 up."""
    most, step = max(max(counts), 1), 30
    body = []
    for at, count in enumerate(counts):
        height = 140 * count / most
        left = LEFT + at * step
        body.append(
            f'<rect x="{left}" y="{160 - height:.1f}" width="{step - 6}" '
            f'height="{height:.1f}" fill="{INK}"/>'
        )
        body.append(_text(left + 12, 174, str(at)))
        if count:
            body.append(_text(left + 12, 154 - height, str(count), size=9))
    width = LEFT + step * len(counts) + 10
    body.append(_text(width / 2, 192, x))
    return _frame(title, width, 200, body)


def pair_bar(share: float, most: float, title: str) -> str:
    """One horizontal bar, as long as its share of the longest."""
    length = 160 * share / max(most, 1e-9)
    bar = f'<rect x="0" y="2" width="{length:.1f}" height="10" fill="{MARK}"/>'
    return _frame(title, 164, 14, [bar])
