"""Double sampling: many plots estimated by eye, some of them clipped to correct the eye.

Two estimators after Cochran (1977): the ratio of sums, for an eye that is off by a
share, and regression, for an eye that is off by a share and an amount. The number
of plots on the ground is taken as unlimited.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from builder.formulas.quantiles import t_quantile
from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_not_negative,
    need_open_share,
    need_same_length,
)


@dataclass(frozen=True)
class Estimate:
    """Corrected mean, its standard error and interval; slope is the ratio or the line's."""

    mean: float
    se: float
    low: float
    high: float
    slope: float


def correction_ratio(estimated: Sequence[float], clipped: Sequence[float]) -> float:
    """Clipped over estimated, sum over sum, unrounded. [-]

    Not the mean of the plots' ratios: small plots would count as much as big ones.
    Refused: no plots, lists of two lengths, nothing estimated at all.
    Source: cochran_1977; golden: double_sampling.json
    """
    need_same_length("estimated", estimated, "clipped", clipped)
    if not estimated:
        raise RefusedError("no_plots")
    by_eye = math.fsum(need_not_negative("estimated", value) for value in estimated)
    cut = math.fsum(need_not_negative("clipped", value) for value in clipped)
    return cut / need_above_zero("sum of estimated", by_eye)


def _pairs(
    estimated: Sequence[float], clipped: Sequence[float], others: Sequence[float], least: int
) -> tuple[list[float], list[float], float]:
    need_same_length("estimated", estimated, "clipped", clipped)
    x = [need_not_negative("estimated", value) for value in estimated]
    y = [need_not_negative("clipped", value) for value in clipped]
    if len(x) < least:
        raise RefusedError("one_plot", least=least) if x else RefusedError("no_plots")
    rest = [need_not_negative("estimated", value) for value in others]
    return x, y, math.fsum(x + rest) / (len(x) + len(rest))


def _square_sum(values: Sequence[float]) -> float:
    mean = math.fsum(values) / len(values)
    return math.fsum((value - mean) ** 2 for value in values)


def ratio_estimate(
    estimated: Sequence[float],
    clipped: Sequence[float],
    others: Sequence[float],
    confidence: float,
) -> Estimate:
    """Mean of all plots by the ratio of sums, with its interval. [unit of the plots]

    estimated, clipped  the clipped plots, by eye and by scale, at least 2
    others              plots only estimated, not clipped; may be empty
    confidence          of the two-sided interval, t with n - 1 degrees of freedom

    R x', v = s_d^2/n + (s_y^2 - s_d^2)/n' with d = y - R x, n clipped, n' in all;
    the second part is left out where it would be negative.
    Source: cochran_1977; golden: double_sampling.json
    """
    x, y, mean_all = _pairs(estimated, clipped, others, 2)
    ratio = correction_ratio(x, y)
    n, in_all = len(x), len(x) + len(others)
    s_d = math.fsum((b - ratio * a) ** 2 for a, b in zip(x, y, strict=True)) / (n - 1)
    s_y = _square_sum(y) / (n - 1)
    se = math.sqrt(s_d / n + max(0.0, s_y - s_d) / in_all)
    return _with_interval(ratio * mean_all, se, n - 1, confidence, ratio)


def regression_estimate(
    estimated: Sequence[float],
    clipped: Sequence[float],
    others: Sequence[float],
    confidence: float,
) -> Estimate:
    """Mean of all plots by the line through the clipped ones, with interval. [unit of plots]

    As `ratio_estimate`; at least 3 clipped plots, t with n - 2 degrees of freedom.

    y + b (x' - x), v = s^2 (1/n + (x' - x)^2/S_xx) + (s_y^2 - s^2)/n'; the last part is
    left out where it would be negative.
    Refused: all estimates alike.
    Source: cochran_1977; golden: double_sampling.json
    """
    x, y, mean_all = _pairs(estimated, clipped, others, 3)
    n, in_all = len(x), len(x) + len(others)
    mean_x, mean_y = math.fsum(x) / n, math.fsum(y) / n
    s_xx = _square_sum(x)
    if s_xx == 0:
        raise RefusedError("no_spread")
    products = ((a - mean_x) * (b - mean_y) for a, b in zip(x, y, strict=True))
    slope = math.fsum(products) / s_xx
    misses = ((b - mean_y - slope * (a - mean_x)) ** 2 for a, b in zip(x, y, strict=True))
    s = math.fsum(misses) / (n - 2)
    s_y = _square_sum(y) / (n - 1)
    shift = mean_all - mean_x
    variance = s * (1 / n + shift * shift / s_xx) + max(0.0, s_y - s) / in_all
    return _with_interval(mean_y + slope * shift, math.sqrt(variance), n - 2, confidence, slope)


def _with_interval(mean: float, se: float, df: int, confidence: float, slope: float) -> Estimate:
    tail = (1 - need_open_share("confidence", confidence)) / 2
    reach = t_quantile(1 - tail, df) * se
    return Estimate(mean, se, mean - reach, mean + reach, slope)
