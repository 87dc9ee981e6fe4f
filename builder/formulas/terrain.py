"""Slope and aspect: conversions, folding, heat load and direct radiation.

Heat load after McCune & Keon (2002). Equations 1 and 2 give the natural
logarithm, equation 3 does not; aspect is folded about the line from north-east
to south-west for heat load and from north to south for radiation.
"""

import math

from builder.formulas.refusal import RefusedError, need_not_negative, need_number

_EQUATION_1 = (-1.467, 1.582, -1.5, -0.262, 0.607)
_EQUATION_2 = (-1.236, 1.35, -1.376, -0.331, 0.375)


def slope_deg(slope_pct: float) -> float:
    """Slope in degrees from rise over run in percent; 100 % is 45 degrees. [deg]

    Source: tangent; golden: terrain.json
    """
    return math.degrees(math.atan(need_not_negative("slope_pct", slope_pct) / 100))


def slope_pct(slope_deg: float) -> float:
    """Slope in percent of the run, from degrees. [%]  Refused: 90 degrees and more.

    Source: tangent; golden: terrain.json
    """
    slope = need_not_negative("slope_deg", slope_deg)
    if slope >= 90:
        raise RefusedError("slope", value=slope_deg)
    return math.tan(math.radians(slope)) * 100


def slope_pct_of_ratio(run: float, rise: float = 1.0) -> float:
    """Slope in percent from run and rise; a drawing's 3:1 is run 3, rise 1: 33 %. [%]

    Source: tangent; golden: terrain.json
    """
    length = need_number("run", run)
    if length <= 0:
        raise RefusedError("not_above_zero", field="run", value=run)
    return need_not_negative("rise", rise) / length * 100


def surface_ha(plan_ha: float, slope_pct: float) -> float:
    """Area along the slope of ground measured on the map. [ha]

    Source: tangent; golden: terrain.json
    """
    steep = need_not_negative("slope_pct", slope_pct) / 100
    return need_not_negative("plan_ha", plan_ha) * math.hypot(1, steep)


def _aspect(aspect_deg: float | None) -> float:
    aspect = need_number("aspect_deg", aspect_deg)
    if not 0 <= aspect <= 360:
        raise RefusedError("aspect", value=aspect_deg)
    return aspect


def heat_fold_deg(aspect_deg: float) -> float:
    """Aspect folded about north-east and south-west: NE 0, SW 180 (hottest). [deg]

    Source: mccune_keon_2002; golden: terrain.json
    """
    return abs(180 - abs(_aspect(aspect_deg) - 225))


def radiation_fold_deg(aspect_deg: float) -> float:
    """Aspect folded about north and south: N 0, S 180 (most sun). [deg]

    Source: mccune_keon_2002; golden: terrain.json
    """
    return 180 - abs(_aspect(aspect_deg) - 180)


def aspect_coolness(aspect_deg: float) -> float:
    """Aspect as 2 in the cool north-east to 0 in the hot south-west. [0..2]

    The sense is the reverse of heat load.
    Source: beers_1966; golden: terrain.json
    """
    return math.cos(math.radians(45 - _aspect(aspect_deg))) + 1


def aspect_sunniness(aspect_deg: float) -> float:
    """Aspect as 0 toward north-north-east to 1 toward south-south-west. [0..1]

    Source: roberts_cooper_1989; golden: terrain.json
    """
    return (1 - math.cos(math.radians(_aspect(aspect_deg) - 30))) / 2


def _ground(
    latitude_deg: float, slope_deg: float, aspect_deg: float | None, lowest_latitude: int = 0
) -> tuple[float, float, float | None]:
    """Latitude and slope in radians, aspect in degrees or None on flat ground."""
    latitude = need_number("latitude_deg", latitude_deg)
    if not -90 <= latitude <= 90:
        raise RefusedError("latitude", value=latitude_deg)
    if not lowest_latitude <= latitude <= 60:
        raise RefusedError("latitude_of_equation", low=lowest_latitude, high=60, value=latitude_deg)
    slope = need_number("slope_deg", slope_deg)
    if not 0 <= slope <= 90:
        raise RefusedError("slope", value=slope_deg)
    if slope == 0 and aspect_deg is not None:
        _aspect(aspect_deg)
        raise RefusedError("aspect_on_flat")
    if slope > 0 and aspect_deg is None:
        raise RefusedError("aspect_missing", value=slope_deg)
    aspect = None if aspect_deg is None else _aspect(aspect_deg)
    return math.radians(latitude), math.radians(slope), aspect


def _log_radiation(
    coefficients: tuple[float, ...], latitude: float, slope: float, folded: float
) -> float:
    constant, flat, north, tilt, side = coefficients
    turned = math.radians(folded)
    return (
        constant
        + flat * math.cos(latitude) * math.cos(slope)
        + north * math.cos(turned) * math.sin(slope) * math.sin(latitude)
        + tilt * math.sin(latitude) * math.sin(slope)
        + side * math.sin(turned) * math.sin(slope)
    )


def heat_load(latitude_deg: float, slope_deg: float, aspect_deg: float | None) -> float:
    """Potential yearly heat load, McCune & Keon equation 3. [MJ cm-2 yr-1]

    latitude_deg  30 to 60 north [deg]
    slope_deg     0 to 60 [deg]
    aspect_deg    0 to 360 from north [deg]; None on flat ground, and only there

    Not a logarithm. Open ground without shading hills is assumed.
    Refused: outside those limits, flat ground with an aspect, a slope without.
    Source: mccune_keon_2002; golden: terrain.json
    """
    latitude, slope, aspect = _ground(latitude_deg, slope_deg, aspect_deg, 30)
    if slope_deg > 60:
        raise RefusedError("slope_of_equation", value=slope_deg)
    folded = 0.0 if aspect is None else math.radians(heat_fold_deg(aspect))
    return (
        0.339
        + 0.808 * math.cos(latitude) * math.cos(slope)
        - 0.196 * math.sin(latitude) * math.sin(slope)
        - 0.482 * math.cos(folded) * math.sin(slope)
    )


def log_heat_load(latitude_deg: float, slope_deg: float, aspect_deg: float | None) -> float:
    """Natural logarithm of heat load, McCune & Keon equation 1. [ln(MJ cm-2 yr-1)]

    For 0 to 60 north and slopes to 90 degrees.
    Refused: as `heat_load`, with these wider limits.
    Source: mccune_keon_2002; golden: terrain.json
    """
    latitude, slope, aspect = _ground(latitude_deg, slope_deg, aspect_deg)
    folded = 0.0 if aspect is None else heat_fold_deg(aspect)
    return _log_radiation(_EQUATION_1, latitude, slope, folded)


def direct_radiation(latitude_deg: float, slope_deg: float, aspect_deg: float | None) -> float:
    """Potential yearly direct radiation, McCune & Keon equation 1. [MJ cm-2 yr-1]

    As `log_heat_load`, but folded about north and south, and no logarithm.
    Source: mccune_keon_2002; golden: terrain.json
    """
    latitude, slope, aspect = _ground(latitude_deg, slope_deg, aspect_deg)
    folded = 0.0 if aspect is None else radiation_fold_deg(aspect)
    return math.exp(_log_radiation(_EQUATION_1, latitude, slope, folded))


def direct_radiation_to_60(
    latitude_deg: float, slope_deg: float, aspect_deg: float | None
) -> float:
    """Potential yearly direct radiation, McCune & Keon equation 2. [MJ cm-2 yr-1]

    The closer fit for slopes up to 60 degrees.
    Source: mccune_keon_2002; golden: terrain.json
    """
    latitude, slope, aspect = _ground(latitude_deg, slope_deg, aspect_deg)
    if slope_deg > 60:
        raise RefusedError("slope_of_equation", value=slope_deg)
    folded = 0.0 if aspect is None else radiation_fold_deg(aspect)
    return math.exp(_log_radiation(_EQUATION_2, latitude, slope, folded))
