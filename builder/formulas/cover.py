"""Cover: classes, midpoints, points, Wilson intervals, likeness and what was missed."""

import math
from collections.abc import Mapping, Sequence
from typing import Any

from builder.formulas.quantiles import normal_quantile
from builder.formulas.refusal import (
    RefusedError,
    need_count,
    need_not_negative,
    need_open_share,
    need_percent,
    need_share,
)

SIX_CLASSES = (
    {"code": "1", "low_pct": 0.0, "high_pct": 5.0, "mid_pct": 2.5},
    {"code": "2", "low_pct": 5.0, "high_pct": 25.0, "mid_pct": 15.0},
    {"code": "3", "low_pct": 25.0, "high_pct": 50.0, "mid_pct": 37.5},
    {"code": "4", "low_pct": 50.0, "high_pct": 75.0, "mid_pct": 62.5},
    {"code": "5", "low_pct": 75.0, "high_pct": 95.0, "mid_pct": 85.0},
    {"code": "6", "low_pct": 95.0, "high_pct": 100.0, "mid_pct": 97.5},
)
"""Canopy-coverage classes of Daubenmire (1959). The source lets the bounds touch; here
a bound belongs to the class above it."""

Scale = Sequence[Mapping[str, Any]]


def class_of(cover_pct: float, classes: Scale) -> str | None:
    """Code of the class that holds a cover; None for no cover at all. [code]

    cover_pct  0 to 100 [%]
    classes    rows low to high with code and low_pct; the lower limit belongs to the
               class, the last one holds 100

    Where several classes share one range (abundance classes), the first is given.
    Source: daubenmire_1959, beltbook_rule (side of the limits); golden: cover.json
    """
    cover = need_percent("cover_pct", cover_pct)
    if cover == 0:
        return None
    best: Mapping[str, Any] | None = None
    for row in classes:
        if row["low_pct"] <= cover and (best is None or row["low_pct"] > best["low_pct"]):
            best = row
    if best is None:
        raise RefusedError("class_missing", value=cover_pct)
    return str(best["code"])


def mid_pct(code: str, classes: Scale) -> float:
    """Midpoint of a class. [%]  Refused: a code the scale does not have.

    Source: daubenmire_1959; golden: cover.json
    """
    for row in classes:
        if row["code"] == code:
            return float(row["mid_pct"])
    raise RefusedError("class_missing", value=code)


def mean_cover_pct(codes: Sequence[str | None], classes: Scale) -> float:
    """Mean cover over all plots from class codes; None is a plot without it. [%]

    Midpoints are averaged, never codes, and absences count.
    Source: daubenmire_1959; golden: cover.json
    """
    if not codes:
        raise RefusedError("no_plots")
    return math.fsum(mid_pct(code, classes) for code in codes if code is not None) / len(codes)


def frequency(codes: Sequence[str | None]) -> float:
    """Share of plots that hold the plant. [0..1]

    Source: daubenmire_1959; golden: cover.json
    """
    if not codes:
        raise RefusedError("no_plots")
    return sum(code is not None for code in codes) / len(codes)


def domin_pct(code: int) -> float:
    """Percent for a Domin code 1 to 10: code^2.6 / 4. [%]

    Average these, not the codes.
    Source: currall_1987; golden: cover.json
    """
    value = need_count("code", code)
    if not 1 <= value <= 10:
        raise RefusedError("class_missing", value=code)
    return float(value**2.6 / 4)


def constancy_class(constancy_pct: float, classes: Scale) -> str | None:
    """Class of a constancy by upper limits; None for a plant never met. [code]

    classes  rows low to high with code and high_pct; 20.5 lies over the class to 20
    Source: westhoff_maarel_1978; golden: cover.json
    """
    constancy = need_percent("constancy_pct", constancy_pct)
    if constancy == 0:
        return None
    for row in classes:
        if constancy <= row["high_pct"]:
            return str(row["code"])
    raise RefusedError("class_missing", value=constancy_pct)


def wilson_interval(successes: int, n: int, confidence: float) -> tuple[float, float]:
    """Two-sided Wilson interval of a counted share, no continuity correction. [0..1]

    Its 90 % ends are the one-sided 95 % bounds.
    Refused: no plots, more successes than plots.
    Source: wilson_1927; golden: cover.json
    """
    beside = 1 - (1 - need_open_share("confidence", confidence)) / 2
    return (
        wilson_bound(successes, n, beside, upper=False),
        wilson_bound(successes, n, beside, upper=True),
    )


def wilson_bound(successes: int, n: int, confidence: float, upper: bool) -> float:
    """One-sided Wilson bound of a counted share. [0..1]

    confidence  0.9 for one-sided alpha 0.10;  upper  True: the highest share allowed
    Source: wilson_1927; golden: cover.json
    """
    hits, plots = need_count("successes", successes), need_count("n", n)
    if plots == 0:
        raise RefusedError("no_plots")
    if hits > plots:
        raise RefusedError("more_than_all", field="successes", value=hits, limit=plots)
    z = normal_quantile(need_open_share("confidence", confidence))
    if (upper and hits == plots) or (not upper and hits == 0):
        return 1.0 if upper else 0.0
    share = hits / plots
    middle = share + z * z / (2 * plots)
    reach = z * math.sqrt(share * (1 - share) / plots + z * z / (4 * plots * plots))
    return (middle + (reach if upper else -reach)) / (1 + z * z / plots)


def point_shares(
    counts: Mapping[str, int], confidence: float
) -> dict[str, tuple[float, float, float]]:
    """Cover from points: share and Wilson interval by what was hit. [0..1]

    counts      points by what lay under them (bare soil, litter, plant base ...)
    confidence  of each two-sided interval

    Returns {name: (share, low, high)}. Each share is taken by itself against all points.
    Refused: no points.
    Source: wilson_1927; golden: cover.json
    """
    total = sum(need_count(name, count) for name, count in counts.items())
    if total == 0:
        raise RefusedError("no_points")
    return {
        name: (count / total, *wilson_interval(count, total, confidence))
        for name, count in counts.items()
    }


def likeness(present: Mapping[str, float], reference: Mapping[str, float]) -> float:
    """How much of a reference make-up stands here: sum of minima over its total. [0..1]

    present, reference  amount by plant, one unit for both (cover or weight)

    No more than the reference amount counts; plants it lacks count nothing.
    Refused: a reference without any amount.
    Source: nrph_ch4; golden: cover.json
    """
    wanted = {plant: need_not_negative(plant, amount) for plant, amount in reference.items()}
    here = {plant: need_not_negative(plant, amount) for plant, amount in present.items()}
    total = math.fsum(wanted.values())
    if total == 0:
        raise RefusedError("not_above_zero", field="reference", value=total)
    return math.fsum(min(here.get(plant, 0.0), amount) for plant, amount in wanted.items()) / total


def chance_of_miss(constancy: float, overlooked: float) -> float:
    """Chance not to record a plant of the zone in one plot that was searched. [0..1]

    constancy   share of the zone's plots that hold it
    overlooked  share of its presences that a searcher misses

    1 - constancy (1 - overlooked)
    Source: hand_arithmetic; golden: cover.json
    """
    return 1 - need_share("constancy", constancy) * (1 - need_share("overlooked", overlooked))
