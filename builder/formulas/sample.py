"""A handful of plots: mean, spread, interval, and how many plots would be enough."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from builder.formulas.quantiles import t_quantile
from builder.formulas.refusal import (
    RefusedError,
    need_count,
    need_not_negative,
    need_number,
    need_open_share,
)

MOST_PLOTS = 100_000


@dataclass(frozen=True)
class Summary:
    """Count, mean, standard deviation (n - 1) and standard error of the mean."""

    n: int
    mean: float
    sd: float
    se: float


def summary(values: Sequence[float]) -> Summary:
    """Mean and spread of plots. [unit of values]

    The standard error is s / sqrt(n).
    Refused: no plots, a single plot (it shows no spread), a value that is no number.
    Source: student_1908; golden: sample.json
    """
    if not values:
        raise RefusedError("no_plots")
    numbers = [need_number("plot", value) for value in values]
    n = len(numbers)
    if n < 2:
        raise RefusedError("one_plot", least=2)
    mean = math.fsum(numbers) / n
    sd = math.sqrt(math.fsum((value - mean) ** 2 for value in numbers) / (n - 1))
    return Summary(n, mean, sd, sd / math.sqrt(n))


def mean_interval(values: Sequence[float], confidence: float) -> tuple[float, float]:
    """Two-sided interval of the mean by Student's t. [unit of values]

    confidence  0.9 leaves 5 % on either side
    Source: student_1908; golden: sample.json
    """
    plots = summary(values)
    tail = (1 - need_open_share("confidence", confidence)) / 2
    reach = t_quantile(1 - tail, plots.n - 1) * plots.se
    return plots.mean - reach, plots.mean + reach


def _t_of(alpha: float, two_sided: bool, df: int) -> float:
    tail = need_open_share("alpha", alpha) / (2 if two_sided else 1)
    return t_quantile(1 - tail, df)


def plots_for_precision(
    n: int, mean: float, sd: float, precision: float, alpha: float, two_sided: bool = False
) -> float:
    """Sample adequacy: plots so that the mean is known within a share of itself. [plots]

    n          plots already taken; t has n - 1 degrees of freedom
    precision  wanted half-width as a share of the mean (0.1 is 10 %)
    alpha      0.10, one-sided unless two_sided

    (t s / (precision mean))^2, not rounded; a legal minimum count still applies.
    Source: adequacy_permits; golden: sample.json
    """
    if need_count("n", n) < 2:
        raise RefusedError("one_plot", least=2)
    reach = need_open_share("precision", precision) * need_number("mean", mean)
    if reach == 0:
        raise RefusedError("zero_mean")
    t = _t_of(alpha, two_sided, n - 1)
    return (t * need_not_negative("sd", sd) / reach) ** 2


def plots_for_power(
    n: int, sd: float, precision: float, line: float, alpha: float, beta: float
) -> float:
    """Plots to see a shortfall of a share below a line with power 1 - beta. [plots]

    n      plots already taken;  sd  their standard deviation
    line   value tested against, in the unit of sd

    ((t_alpha + t_beta) s / (precision line))^2, one-sided.
    Source: adequacy_permits; golden: sample.json
    """
    if need_count("n", n) < 2:
        raise RefusedError("one_plot", least=2)
    reach = need_open_share("precision", precision) * need_number("line", line)
    if reach == 0:
        raise RefusedError("zero_mean")
    both = _t_of(alpha, False, n - 1) + _t_of(beta, False, n - 1)
    return (both * need_not_negative("sd", sd) / reach) ** 2


def plots_in_all(mean: float, sd: float, precision: float, confidence: float) -> int:
    """Fewest plots whose own two-sided interval is narrow enough. [plots]

    precision   half-width as a share of the mean;  confidence  of the interval

    Unlike `plots_for_precision`, t belongs to the number that is answered, so the
    answer to "how many more?" does not change with the plots taken. At least 2.
    Refused: a mean of zero; a spread so wide that 100,000 plots would not do.
    Source: student_1908; golden: sample.json
    """
    reach = need_open_share("precision", precision) * abs(need_number("mean", mean))
    if reach == 0:
        raise RefusedError("zero_mean")
    spread, tail = need_not_negative("sd", sd), (1 - need_open_share("confidence", confidence)) / 2
    too_few, enough = 1, 2
    while t_quantile(1 - tail, enough - 1) * spread > reach * math.sqrt(enough):
        too_few, enough = enough, enough * 2
        if enough > MOST_PLOTS:
            raise RefusedError("more_than_all", field="plots", value=enough, limit=MOST_PLOTS)
    while enough - too_few > 1:
        middle = (too_few + enough) // 2
        wide = t_quantile(1 - tail, middle - 1) * spread > reach * math.sqrt(middle)
        too_few, enough = (middle, enough) if wide else (too_few, middle)
    return enough
