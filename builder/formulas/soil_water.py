"""Water that soil holds: mineral layers by equation, peat by squeeze class, stones off.

Mineral layers after Saxton & Rawls (2006). Sand and clay enter as fractions,
organic matter in PERCENT. Salt is not allowed for; where the ground is salty plants
get less than this.
"""

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from builder.formulas.refusal import (
    RefusedError,
    need_not_negative,
    need_number,
    need_percent,
    need_share,
)
from builder.formulas.texture import checked_soil

MOST_ORGANIC_PCT = 8.0
MOST_CLAY_PCT = 60.0
PARTICLE_DENSITY = 2.65
LEAST_DRAINED = 0.005


@dataclass(frozen=True)
class Water:
    """Water contents by volume [m3 m-3], density [g cm-3], flow when full [mm h-1]."""

    wilting_point: float
    field_capacity: float
    saturation: float
    bulk_density: float
    flow_mm_h: float

    @property
    def available(self) -> float:
        """Water between field capacity and wilting point. [m3 m-3]"""
        return self.field_capacity - self.wilting_point


@dataclass(frozen=True)
class LayerWater:
    """Millimetres one layer holds for plants, and whether its organic matter lay over what
    the equation knows and was counted as 8 %."""

    mm: float
    at_limit: bool


def _bent(first: float, square: float, line: float, constant: float) -> float:
    return first + square * first * first + line * first + constant


def mineral_water(
    sand_pct: float,
    clay_pct: float,
    organic_matter_pct: float,
    density_factor: float = 1.0,
) -> Water:
    """Water held by a mineral soil without stones. [m3 m-3]

    sand_pct, clay_pct  weight shares of the fine earth [%]
    organic_matter_pct  organic matter by weight [%], at most 8
    density_factor      0.9 loose to 1.3 packed; 1 is the equation's own density

    Refused: more than 8 % organic matter (peat has its own table), clay over 60 %, a
    soil packed until its field capacity would fill more than its pores.
    Source: saxton_rawls_2006; golden: soil_water.json
    """
    s = need_percent("sand_pct", sand_pct) / 100
    c = need_percent("clay_pct", clay_pct) / 100
    om = need_percent("organic_matter_pct", organic_matter_pct)
    factor = need_number("density_factor", density_factor)
    if s + c > 1 + 1e-9:
        raise RefusedError(
            "more_than_all", field="sand_pct + clay_pct", value=(s + c) * 100, limit=100
        )
    if om > MOST_ORGANIC_PCT:
        raise RefusedError("organic_matter_too_high", limit=MOST_ORGANIC_PCT, value=om)
    if clay_pct > MOST_CLAY_PCT:
        raise RefusedError("clay_too_high", limit=MOST_CLAY_PCT, value=clay_pct)
    if not 0.9 <= factor <= 1.3:
        raise RefusedError("density_factor", value=density_factor)
    t = -0.024 * s + 0.487 * c + 0.006 * om + 0.005 * s * om - 0.013 * c * om + 0.068 * s * c
    wilting = _bent(t + 0.031, 0, 0.14, -0.02)
    t = -0.251 * s + 0.195 * c + 0.011 * om + 0.006 * s * om - 0.027 * c * om + 0.452 * s * c
    capacity = _bent(t + 0.299, 1.283, -0.374, -0.015)
    t = 0.278 * s + 0.034 * c + 0.022 * om - 0.018 * s * om - 0.027 * c * om - 0.584 * s * c
    drained = _bent(t + 0.078, 0, 0.636, -0.107)
    full = capacity + drained - 0.097 * s + 0.043
    density = (1 - full) * PARTICLE_DENSITY * factor
    packed = 1 - density / PARTICLE_DENSITY
    capacity -= 0.2 * (full - packed)
    if capacity >= packed:
        raise RefusedError("packed_too_far", value=density_factor)
    return Water(wilting, capacity, packed, density, _flow(wilting, capacity, packed))


def _flow(wilting: float, capacity: float, full: float) -> float:
    """Flow through the saturated soil, Eqs. 15, 16 and 18. [mm h-1]

    The paper holds saturation less field capacity at 0.005 or more; packed soil reaches it.
    """
    slope = (math.log(capacity) - math.log(wilting)) / (math.log(1500) - math.log(33))
    return float(1930 * max(LEAST_DRAINED, full - capacity) ** (3 - slope))


def gravel_volume_share(matric_density: float, gravel_weight_share: float) -> float:
    """Share of the volume taken by gravel that makes up a share of the weight. [0..1]

    matric_density       density of the fine earth [g cm-3]
    gravel_weight_share  gravel by weight of the whole soil, 0..1

    Source: saxton_rawls_2006 (gravel equations); golden: soil_water.json
    """
    light = need_not_negative("matric_density", matric_density) / PARTICLE_DENSITY
    weight = need_share("gravel_weight_share", gravel_weight_share)
    return light * weight / (1 - weight * (1 - light))


def layer_water_mm(thickness_cm: float, available: float, stones_share: float = 0.0) -> float:
    """Water that plants can take from a layer. [mm]

    thickness_cm  [cm];  available  by volume of fine earth [m3 m-3]
    stones_share  stones by volume, 0..1

    10 * thickness * available * (1 - stones)
    Source: hand_arithmetic; golden: soil_water.json
    """
    depth = need_not_negative("thickness_cm", thickness_cm)
    kept = 1 - need_share("stones_share", stones_share)
    return 10 * depth * need_share("available", available) * kept


def peat_water(von_post_h: float, classes: Sequence[Mapping[str, Any]]) -> tuple[float, float]:
    """Field capacity and wilting point of moist peat by its squeeze class. [m3 m-3]

    von_post_h  1 to 10
    classes     rows with von_post (first and last class), field_capacity, wilting_point

    Refused: a class no row holds.
    Source: region_table; golden: soil_water.json
    """
    squeeze = need_number("von_post_h", von_post_h)
    for row in classes:
        first, last = row["von_post"]
        if first <= squeeze <= last:
            return float(row["field_capacity"]), float(row["wilting_point"])
    raise RefusedError("peat_class_missing", value=von_post_h)


def layer_available(
    layer: Mapping[str, Any], peat_classes: Sequence[Mapping[str, Any]] = ()
) -> float:
    """Available water of one layer by its kind. [m3 m-3]

    layer  kind mineral (sand_pct, clay_pct, organic_matter_pct), peat (von_post_h) or
           organic_mineral (field_capacity, wilting_point); stated field_capacity and
           wilting_point win over computing

    A mineral layer with more than 8 % organic matter is worked out at 8 %;
    `profile_water` says so beside the layer.
    Source: saxton_rawls_2006, region_table; golden: soil_water.json
    """
    capacity, wilting = layer.get("field_capacity"), layer.get("wilting_point")
    kind = layer.get("kind", "mineral")
    if kind not in ("mineral", "peat", "organic_mineral"):
        raise RefusedError("unknown_choice", field="kind", value=kind)
    if capacity is None or wilting is None:
        if kind == "organic_mineral":
            raise RefusedError("layer_water_missing")
        if kind == "mineral":
            checked_soil(layer["sand_pct"], layer["silt_pct"], layer["clay_pct"])
            organic = min(MOST_ORGANIC_PCT, need_percent("organic_matter_pct", _organic(layer)))
            return mineral_water(layer["sand_pct"], layer["clay_pct"], organic).available
        capacity, wilting = peat_water(layer["von_post_h"], peat_classes)
    capacity = need_share("field_capacity", capacity)
    if need_share("wilting_point", wilting) > capacity:
        raise RefusedError("wilting_over_capacity", wilting_point=wilting, field_capacity=capacity)
    return float(capacity - wilting)


def _organic(layer: Mapping[str, Any]) -> float | None:
    organic: float | None = layer.get("organic_matter_pct")
    return organic


def _at_limit(layer: Mapping[str, Any]) -> bool:
    stated = layer.get("field_capacity") is not None and layer.get("wilting_point") is not None
    mineral = layer.get("kind", "mineral") == "mineral"
    return mineral and not stated and (_organic(layer) or 0) > MOST_ORGANIC_PCT


def profile_water(
    layers: Sequence[Mapping[str, Any]],
    depth_cm: float,
    peat_classes: Sequence[Mapping[str, Any]] = (),
) -> list[LayerWater]:
    """Water plants can take from each layer down to a depth. [mm]

    layers    rows from the surface down: top_cm, bottom_cm, kind, stones_vol_pct and what
              `layer_available` needs; a layer that begins below depth_cm gives 0
    depth_cm  rooting depth [cm]

    Stones do not count in peat: roots and wood are not stones.
    Refused: no layer, a gap or overlap, a layer upside down.
    Source: saxton_rawls_2006, hand_arithmetic; golden: soil_water.json
    """
    if not layers:
        raise RefusedError("layers_missing")
    depth = need_not_negative("depth_cm", depth_cm)
    held, reached = [], 0.0
    for layer in layers:
        top = need_not_negative("top_cm", layer["top_cm"])
        bottom = need_not_negative("bottom_cm", layer["bottom_cm"])
        if not bottom > top:
            raise RefusedError("layer_order", top_cm=top, bottom_cm=bottom)
        if top != reached:
            raise RefusedError("layer_gap", value=top)
        reached = bottom
        stones = need_percent("stones_vol_pct", layer.get("stones_vol_pct", 0)) / 100
        thickness = max(0.0, min(bottom, depth) - top)
        available = layer_available(layer, peat_classes)
        share = 0.0 if layer.get("kind") == "peat" else stones
        held.append(LayerWater(layer_water_mm(thickness, available, share), _at_limit(layer)))
    return held
