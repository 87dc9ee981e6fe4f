"""Exact conversions between metric and United States customary units.

Every factor follows from the international definitions of 1959 (1 lb =
0.45359237 kg, 1 ft = 0.3048 m); nothing is rounded. What a person typed is kept
as typed by the record; these functions only show it in the other unit.
"""

from builder.formulas.refusal import RefusedError, need_number

KG_PER_LB = 0.45359237
G_PER_OZ = 28.349523125
M_PER_FT = 0.3048
CM_PER_IN = 2.54
M2_PER_FT2 = 0.09290304
HA_PER_ACRE = 0.40468564224
M2_PER_HA = 10_000.0
M3_PER_YD3 = 0.764554857984

_FACTOR = {
    ("lb_acre", "kg_ha"): KG_PER_LB / HA_PER_ACRE,
    ("lb", "kg"): KG_PER_LB,
    ("oz", "g"): G_PER_OZ,
    ("ft", "m"): M_PER_FT,
    ("in", "cm"): CM_PER_IN,
    ("in", "mm"): CM_PER_IN * 10,
    ("acre", "ha"): HA_PER_ACRE,
    ("ft2", "m2"): M2_PER_FT2,
    ("yd3", "m3"): M3_PER_YD3,
    ("per_ft2", "per_m2"): 1 / M2_PER_FT2,
    ("per_lb", "per_g"): 1 / (KG_PER_LB * 1000),
}
PAIRS = tuple(_FACTOR) + (("f", "c"),)


def converted(value: float, unit: str, to: str) -> float:
    """`value` given in `unit`, in the unit `to`.

    Units: kg_ha lb_acre, kg lb, g oz, m ft, cm in, mm in, ha acre, m2 ft2,
    m3 yd3, per_m2 per_ft2, per_g per_lb, c f. Refused: any other pair.
    Source: international_yard_pound; golden: units.json
    """
    number = need_number("value", value)
    if unit == to:
        return number
    if (unit, to) == ("c", "f"):
        return number * 9 / 5 + 32
    if (unit, to) == ("f", "c"):
        return (number - 32) * 5 / 9
    if (unit, to) in _FACTOR:
        return number * _FACTOR[unit, to]
    if (to, unit) in _FACTOR:
        return number / _FACTOR[to, unit]
    raise RefusedError("unknown_choice", field="unit", value=f"{unit} to {to}")


def acres_volume_yd3(acres: float, depth_in: float) -> float:
    """Volume of a layer over an area. [yd3]

    acres     area [acre];  depth_in  depth [in]
    Source: international_yard_pound; golden: units.json
    """
    area_ft2 = need_number("acres", acres) * 43_560
    return area_ft2 * need_number("depth_in", depth_in) / 12 / 27
