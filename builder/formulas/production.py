"""What the ground should yield this year, how sure that is, and where a measure falls.

Total growth, air-dry; no figure here is forage and none is a stocking rate.
"""

import math
from collections.abc import Sequence

from builder.formulas.quantiles import normal_below, normal_quantile
from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_not_negative,
    need_number,
    need_open_share,
    need_same_length,
)

LEAST_SHARE = 0.1
"""However bad the year, a tenth of the normal growth is still expected."""

RAIN_SOURCES = ("gauge", "office", "guess")


def year_share(
    rain_share: float,
    rain_response: float,
    warmer_c: float = 0.0,
    warmth_response_per_c: float = 0.0,
) -> float:
    """This year's growth over a normal year's. [-]

    rain_share             rain of the zone's months over its normal, 0 and up
    rain_response          share of growth for a whole share of rain, by zone
    warmer_c               mean of the warmth months over normal [C]
    warmth_response_per_c  share of growth for one degree, by zone

    max(0.1, 1 + r (rain - 1) + w warmer)
    Source: beltbook_rule (response after hsu_2012); golden: production.json
    """
    rain = need_not_negative("rain_share", rain_share) - 1
    gain = need_number("rain_response", rain_response) * rain
    warm = need_number("warmer_c", warmer_c)
    gain += need_number("warmth_response_per_c", warmth_response_per_c) * warm
    return max(LEAST_SHARE, 1 + gain)


def _log_spread(cv: float) -> float:
    return math.sqrt(math.log1p(need_not_negative("spread_cv", cv) ** 2))


def year_range(
    centre_kg_ha: float, spread_cv: float, low: float = 0.2, high: float = 0.8
) -> tuple[float, float]:
    """Range of a zone's sites in one year, lognormal about its median. [kg ha-1]

    centre_kg_ha  normal growth times `year_share`
    spread_cv     spread between sites, standard deviation over mean
    low, high     quantiles shown

    Source: lognormal_identity; golden: production.json
    """
    centre, spread = need_above_zero("centre_kg_ha", centre_kg_ha), _log_spread(spread_cv)
    return (
        centre * math.exp(normal_quantile(low) * spread),
        centre * math.exp(normal_quantile(high) * spread),
    )


def mixture_quantile(
    share: float,
    weights: Sequence[float],
    centres_kg_ha: Sequence[float],
    spread_cvs: Sequence[float],
) -> float:
    """Quantile of growth when the zone itself is in doubt. [kg ha-1]

    share          share of the mixture below the answer, in (0, 1)
    weights        belief by zone, 0 and up; they are divided by their sum
    centres_kg_ha  this year's centre by zone;  spread_cvs  spread by zone, above 0

    The quantile of the weighted mixture of the zones' lognormal curves, by halving.
    Refused: lists of different length, no weight at all.
    Source: mixture_definition; golden: production.json
    """
    wanted = need_open_share("share", share)
    need_same_length("weights", weights, "centres_kg_ha", centres_kg_ha)
    need_same_length("weights", weights, "spread_cvs", spread_cvs)
    parts = [
        (need_not_negative("weight", weight), math.log(need_above_zero("centre_kg_ha", centre)),
         _log_spread(need_above_zero("spread_cv", cv)))
        for weight, centre, cv in zip(weights, centres_kg_ha, spread_cvs, strict=True)
    ]  # fmt: skip
    total = math.fsum(weight for weight, _, _ in parts)
    if total == 0:
        raise RefusedError("probabilities_empty")
    z = normal_quantile(wanted)
    ends = [middle + z * spread for weight, middle, spread in parts if weight > 0]
    low, high = min(ends), max(ends)
    for _ in range(200):
        middle = (low + high) / 2
        below = math.fsum(w * normal_below((middle - m) / s) for w, m, s in parts) / total
        low, high = (middle, high) if below < wanted else (low, middle)
        if high - low < 1e-14 * max(1.0, abs(high)):
            break
    return math.exp((low + high) / 2)


def place_of(measured_kg_ha: float, low_kg_ha: float, high_kg_ha: float) -> str:
    """Where a measure falls: "under", "inside" or "over" the range; its ends are inside. [word]

    Source: beltbook_rule; golden: production.json
    """
    measured = need_not_negative("measured_kg_ha", measured_kg_ha)
    low = need_not_negative("low_kg_ha", low_kg_ha)
    if need_not_negative("high_kg_ha", high_kg_ha) < low:
        raise RefusedError("more_than_all", field="low_kg_ha", value=low_kg_ha, limit=high_kg_ha)
    return "under" if measured < low else "over" if measured > high_kg_ha else "inside"


def is_provisional(rain_source: str | None) -> bool:
    """Whether a place in the range is no test: the year's rain is a guess or unknown.

    rain_source  "gauge", "office", "guess" or None
    Source: beltbook_rule; golden: production.json
    """
    if rain_source is not None and rain_source not in RAIN_SOURCES:
        raise RefusedError("unknown_choice", field="rain_source", value=rain_source)
    return rain_source in (None, "guess")


def rain_line_kg_ha(rain_mm: float) -> float:
    """Growth the central grassland line gives for a yearly rain. [kg ha-1]

    A spatial line of many sites; a plausibility check on a region's tables, never a
    forecast for one site. Below 57 mm it gives nothing: 0.
    Source: sala_1988; golden: production.json
    """
    return max(0.0, 10 * (0.6 * need_not_negative("rain_mm", rain_mm) - 34))


def rain_and_soil_line_kg_ha(rain_mm: float, water_share: float) -> float:
    """Growth by yearly rain and the share of water the soil can hold. [kg ha-1]

    Sandy ground yields more below about 370 mm, heavier ground above.
    Source: sala_1988; golden: production.json
    """
    rain = need_not_negative("rain_mm", rain_mm)
    held = need_not_negative("water_share", water_share)
    return max(0.0, 10 * (32 + 0.45 * rain - 352 * held + 0.95 * held * rain))


def rain_use_kg_ha_mm(production_kg_ha: float, rain_mm: float) -> float:
    """Growth for each millimetre of yearly rain: about 4 in dry lands, 1 to 10. [kg ha-1 mm-1]

    Source: le_houerou_1984; golden: production.json
    """
    growth = need_not_negative("production_kg_ha", production_kg_ha)
    return growth / need_above_zero("rain_mm", rain_mm)
