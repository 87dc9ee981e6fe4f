"""Figures of the session for a region without fitted ones; all travel in pack.settings.

They were measured on simulated sites only (docs/method.md says how and with what result).
"""

from __future__ import annotations

from typing import Any

SESSION: dict[str, Any] = {
    "drag": 0.04,
    "drag_cap_answers": 20,
    "uniform_share": 0.02,
    "named_first": 3,
    "implied_weight": 0.8,
    "sure": 0.9,
    "least_gain": 0.001,
    "seen_dry_outside": 0.5,
    "hand_tool_cm": 30,
    "height": {"cap_nats": 2.0, "most_cb": 150},
    "thin": {"finds_cb": 185, "belief": 0.85},
    "edge": {"times": 0.87, "plus": -0.08},
    "mosaic": {"times": 0.81, "plus": -0.75},
    "misfit": {"times": 1.90, "plus": -1.94},
    "mosaic_share": 0.85,
    "mosaic_lower": 0.3,
    "no_pair_gain": -10.0,
    "look_again_below": 0.7,
    "look_again": {"spots": 2, "named": 3, "prompts": 2},
    "three": {
        "edge": {"times": 0.67, "plus": 0.51},
        "mosaic": {"times": 1.35, "plus": -0.37},
        "misfit": {"times": 3.47, "plus": -3.42},
        "thin_mean_finds_cb": 170,
    },
    "stand": {
        "zone": {"one_kind": 0.80, "changes_near": 0.15, "patches": 0.05},
        "edge": {"one_kind": 0.15, "changes_near": 0.75, "patches": 0.10},
        "mosaic": {"one_kind": 0.10, "changes_near": 0.15, "patches": 0.75},
        "misfit": {"one_kind": 0.70, "changes_near": 0.20, "patches": 0.10},
    },
    "sides_wanted": 2,
    "side_apart_m": 20,
    "group_most": 0.78,
}
"""Belief, prompts, verdicts, look again and units. Gains in nats, *_cb in centibans."""

NEWCOMERS: dict[str, float] = {"weed_inside": 0.30, "weed_outside": 0.03, "wind_seed": 0.10}
"""Chance that a plant has come since the ground was disturbed, where a region states none."""

PRICES: dict[str, float] = {
    "digging": 0.05,
    "lookalike": 0.0015,
    "grass": 0.004,
    "weed": 0.02,
    "fair": 0.002,
    "hard": 0.012,
    "expert": 0.03,
}
"""What asking costs: hard names, weeds (they tell of people) and digging. [nats]"""

HEAT_LOAD: dict[str, float] = {
    "constant": 0.339,
    "cos_l_cos_s": 0.808,
    "sin_l_sin_s": -0.196,
    "cos_a_sin_s": -0.482,
    "steepest_deg": 60.0,
}
"""Equation 3 of McCune and Keon (2002), J. Veg. Sci. 13: 603-606; slopes to 60 degrees."""

REFERENCE_SLOPE_PCT = 40.0
"""Slope on which a zone's full north or south shift is taken to hold. [percent] common practice"""
