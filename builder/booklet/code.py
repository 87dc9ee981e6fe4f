"""The code that opens the app, printed only where a region has an address."""

import segno

from builder.drawings.ink import PRINT, svg

QUIET = 4
"""Blank modules about the code, as its standard asks."""


def address_code(address: str, title: str, side: float = 24.0) -> str:
    """The address as a square code, so many millimetres wide with its quiet border."""
    code = segno.make(address, micro=False, error="m", boost_error=False)
    rows = [list(row) for row in code.matrix]
    full = len(rows) + 2 * QUIET
    dark = "".join(
        f"M{x + QUIET} {y + QUIET}h1v1h-1z"
        for y, row in enumerate(rows)
        for x, module in enumerate(row)
        if module
    )
    body = (
        f'<rect width="{full}" height="{full}" fill="#ffffff"/>'
        f'<path d="{dark}" fill="#000000" shape-rendering="crispEdges"/>'
    )
    drawn = svg(full, full, title, body, PRINT, "code")
    return drawn.replace(
        f'width="{full}mm" height="{full}mm"', f'width="{side:g}mm" height="{side:g}mm"'
    )
