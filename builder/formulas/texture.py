"""Texture class of mineral soil after the Soil Survey Manual (USDA Handbook 18, chapter 3)."""

from builder.formulas.refusal import RefusedError, need_percent

SUM_SLACK_PCT = 0.11
"""Three shares printed to one decimal may miss 100 by this much."""

CLASSES = (
    "sand",
    "loamy sand",
    "sandy loam",
    "loam",
    "silt loam",
    "silt",
    "sandy clay loam",
    "clay loam",
    "silty clay loam",
    "sandy clay",
    "silty clay",
    "clay",
)

_CENTRE = {
    "sand": (88, 5),
    "loamy sand": (80, 5),
    "sandy loam": (65, 10),
    "loam": (40, 20),
    "silt loam": (20, 15),
    "silt": (10, 5),
    "sandy clay loam": (60, 25),
    "clay loam": (30, 35),
    "silty clay loam": (10, 35),
    "silty clay": (10, 45),
    "sandy clay": (50, 40),
    "clay": (25, 50),
}


def checked_soil(sand_pct: float, silt_pct: float, clay_pct: float) -> tuple[float, float, float]:
    """Sand, silt and clay that add up to 100. [%, %, %]

    Refused: a share outside 0..100, a sum that misses 100 by more than rounding can.
    Source: beltbook_rule; golden: texture.json
    """
    sand = need_percent("sand_pct", sand_pct)
    silt = need_percent("silt_pct", silt_pct)
    clay = need_percent("clay_pct", clay_pct)
    total = sand + silt + clay
    if abs(total - 100) > SUM_SLACK_PCT:
        raise RefusedError("soil_sum", value=round(total, 3))
    return sand, silt, clay


def texture_class(sand_pct: float, silt_pct: float, clay_pct: float) -> str:
    """Name of the texture class. [class]

    sand_pct, silt_pct, clay_pct  weight shares of the fine earth, adding up to 100 [%]

    The side of every line is the Manual's: a point on a line has one class.
    Source: soil_survey_manual_2017; golden: texture.json
    """
    sand, silt, clay = checked_soil(sand_pct, silt_pct, clay_pct)
    if silt + 1.5 * clay < 15:
        return "sand"
    if silt + 2 * clay < 30:
        return "loamy sand"
    if clay < 27:
        return _class_of_low_clay(sand, silt, clay)
    if sand > 45:
        return "sandy clay" if clay >= 35 else "sandy clay loam"
    if clay < 40:
        return "silty clay loam" if sand <= 20 else "clay loam"
    return "silty clay" if silt >= 40 else "clay"


def _class_of_low_clay(sand: float, silt: float, clay: float) -> str:
    if silt >= 50:
        return "silt" if silt >= 80 and clay < 12 else "silt loam"
    if clay >= 20 and silt < 28:
        return "sandy clay loam"
    if sand > 52 or clay < 7:
        return "sandy loam"
    return "loam"


def class_centre(texture: str) -> tuple[float, float]:
    """Sand and clay in the middle of a texture class, as the water table uses them. [%, %]

    Source: saxton_rawls_2006 (Table 3); golden: texture.json
    """
    if texture not in _CENTRE:
        raise RefusedError("unknown_choice", field="texture", value=texture)
    sand, clay = _CENTRE[texture]
    return float(sand), float(clay)
