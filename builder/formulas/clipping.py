"""From clipped grams to air-dry kilograms on a hectare, and back to a whole season."""

import math

from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_count,
    need_not_negative,
    need_some_share,
)

AIR_DRY_BY_STAGE = {
    "alkali sacaton": {"to flowering": 0.35, "full bloom": 0.6, "seed shed": 0.8},
    "bluebunch wheatgrass": {"to flowering": 0.3, "full bloom": 0.6, "seed shed": 0.85},
    "crested wheatgrass": {"to flowering": 0.3, "full bloom": 0.6, "seed shed": 0.85},
    "cheatgrass": {"to flowering": 0.2, "full bloom": 0.5, "seed shed": 1.0},
    "cool-season grass": {
        "before heading": 0.35,
        "headed out": 0.45,
        "seed ripe": 0.6,
        "leaf tips dry": 0.85,
        "leaves dry": 0.95,
        "dormant": 0.95,
    },
}
"""Air-dry share of green weight. First four: a Utah table of 1953-1963; the last: the
National Range and Pasture Handbook, from memory, weak. Weighing a dried sample is better."""

_FT2_PER_ACRE = 43_560
_G_PER_LB = 453.59237


def plot_factor_kg_ha(plot_m2: float, summed: int = 1) -> float:
    """Kilograms on a hectare for one gram in the plot. [kg ha-1 g-1]

    plot_m2  area of one plot [m2]
    summed   plots whose grams were added together before

    10 / (area * summed)
    Refused: no area, no plots.
    Source: hand_arithmetic; golden: clipping.json
    """
    if need_count("summed", summed) < 1:
        raise RefusedError("no_plots")
    return 10 / (need_above_zero("plot_m2", plot_m2) * summed)


def plot_factor_lb_acre(plot_ft2: float, summed: int = 1) -> float:
    """Pounds on an acre for one gram in the plot, unrounded. [lb acre-1 g-1]

    The usual round factor (10 for 9.6 square feet) is 0.03 % low.
    Source: nrph_ch4; golden: clipping.json
    """
    if need_count("summed", summed) < 1:
        raise RefusedError("no_plots")
    return _FT2_PER_ACRE / _G_PER_LB / (need_above_zero("plot_ft2", plot_ft2) * summed)


def clip_kg_ha(
    green_g: float, plot_m2: float, air_dry_share: float = 1.0, summed: int = 1
) -> float:
    """Air-dry growth from a clipped plot. [kg ha-1]

    green_g        green weight [g];  plot_m2  area of one plot [m2]
    air_dry_share  air-dry over green weight, 0..1; 1 when weighed dry
    summed         plots whose grams were added together

    Source: hand_arithmetic; golden: clipping.json
    """
    green = need_not_negative("green_g", green_g)
    dry = need_some_share("air_dry_share", air_dry_share)
    return green * dry * plot_factor_kg_ha(plot_m2, summed)


def hoop_diameter(area: float) -> float:
    """Inner diameter of a round plot, in the unit whose square the area is in. [m, in]

    Source: circle; golden: clipping.json
    """
    return 2 * math.sqrt(need_above_zero("area", area) / math.pi)


def hoop_length(area: float) -> float:
    """Length of wire around a round plot. [m, in]

    Source: circle; golden: clipping.json
    """
    return math.pi * hoop_diameter(area)


def air_dry_share(bag_g: float, bag_and_green_g: float, bag_and_dry_g: float) -> float:
    """Air-dry share of a subsample weighed green and dry in its bag. [0..1]

    Refused: no green weight, dry above green.
    Source: maine_appendix_e; golden: clipping.json
    """
    bag = need_not_negative("bag_g", bag_g)
    green = need_above_zero("green_g", need_not_negative("bag_and_green_g", bag_and_green_g) - bag)
    dry = need_not_negative("dry_g", need_not_negative("bag_and_dry_g", bag_and_dry_g) - bag)
    if dry > green:
        raise RefusedError("dry_over_green", dry=dry, green=green)
    return dry / green


def stage_air_dry_share(kind: str, stage: str) -> float:
    """Air-dry share of green weight by growth stage, from the table. [0..1]

    Refused: a kind or stage the table lacks.
    Source: utah_1953_1963, nrph_ch4; golden: clipping.json
    """
    if kind not in AIR_DRY_BY_STAGE:
        raise RefusedError("unknown_choice", field="kind", value=kind)
    if stage not in AIR_DRY_BY_STAGE[kind]:
        raise RefusedError("unknown_choice", field="stage", value=stage)
    return AIR_DRY_BY_STAGE[kind][stage]


def reconstructed_kg_ha(
    now_kg_ha: float,
    ungrazed_share: float,
    growth_done_share: float,
    year_share: float = 1.0,
) -> float:
    """Whole season's ungrazed growth from what stands now. [unit of now_kg_ha]

    now_kg_ha          air-dry growth standing now
    ungrazed_share     share not eaten, above 0 to 1
    growth_done_share  share of the season's growth made by now, above 0 to 1
    year_share         this year's growth over a normal year's; leave 1 to compare with
                       this year's range, which already holds the year

    All three divide.
    Source: nrph_ch4; golden: clipping.json
    """
    left = need_some_share("ungrazed_share", ungrazed_share)
    done = need_some_share("growth_done_share", growth_done_share)
    year = need_above_zero("year_share", year_share)
    return need_not_negative("now_kg_ha", now_kg_ha) / (left * done * year)
