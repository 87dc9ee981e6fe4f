"""The app's own mark: five strata climbing, one lens."""

from builder.drawings.belts import SLOPE_COLOURS, WATER_COLOURS
from builder.drawings.ink import PRINT

_LINES = (
    ("M", "M0 190C130 190 130 150 256 150S382 96 512 96V512H0z"),
    ("J", "M0 262C130 262 130 226 256 226S382 170 512 170V512H0z"),
    ("G", "M0 330C130 330 130 298 256 298S382 250 512 250V512H0z"),
    ("D", "M0 398C130 398 130 372 256 372S382 332 512 332V512H0z"),
    ("B", "M0 462C130 462 130 444 256 444S382 414 512 414V512H0z"),
)


def icon(size: int = 512, rounded: bool = True) -> str:
    """The icon as one square drawing; all of it lies inside the safe middle of a mask.

    rounded  False gives full-bleed corners, for systems that cut their own shape
    """
    corner = ' rx="96"' if rounded else ""
    strata = "".join(
        f'<path d="{d}" fill="{SLOPE_COLOURS[letter]}" stroke="{PRINT.ink}" stroke-width="10"/>'
        for letter, d in _LINES
    )
    lens = (
        f'<ellipse cx="322" cy="318" rx="74" ry="23" transform="rotate(-9 322 318)"'
        f' fill="{WATER_COLOURS["X"]}" stroke="{PRINT.ink}" stroke-width="9"/>'
    )
    return (
        f'<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 512 512" width="{size}"'
        f' height="{size}" role="img"><title>Beltbook</title>'
        f'<defs><clipPath id="cut"><rect width="512" height="512"{corner}/></clipPath></defs>'
        '<g clip-path="url(#cut)"><rect width="512" height="512" fill="#f6f1e4"/>'
        f"{strata}{lens}</g>"
        "</svg>"
    )
