"""Published cover scales by name, for plots whose cover was written as classes.

A region's own scale goes before these. Percent is the middle of the class unless said otherwise.
"""

from __future__ import annotations

from collections.abc import Mapping

from builder.formulas.cover import SIX_CLASSES

SCALES: dict[str, dict[str, float]] = {
    "six_class": {str(row["code"]): float(str(row["mid_pct"])) for row in SIX_CLASSES},
    "braun_blanquet": {
        "r": 0.05,
        "+": 0.55,
        "1": 3.0,
        "2m": 3.0,
        "2": 15.0,
        "2a": 8.75,
        "2b": 18.75,
        "3": 37.5,
        "4": 62.5,
        "5": 87.5,
    },
    "domin": {"+": 0.1, **{str(code): round(code**2.6 / 4.0, 2) for code in range(1, 11)}},
}
"""Percent by class code.

six_class       Daubenmire (1959), Northwest Science 33: 43-64
braun_blanquet  Braun-Blanquet (1964), limits 0, 0.1, 1, 5, 25, 50, 75 as vegan codes them; 2m, 2a
                and 2b after Barkman et al. (1964), from memory (5 to 12.5 and 12.5 to 25 percent)
domin           Currall (1987), Vegetatio 72: 81-87: cover = D^2.6 / 4; + taken as 0.1 percent,
                common practice
"""


def scale_named(name: str, own_id: str, own: Mapping[str, float]) -> Mapping[str, float] | None:
    """Percent by class code of the region's own scale or a published one; None if unknown."""
    return own if name == own_id else SCALES.get(name)
