"""Has the stand met its standard? Two nulls, one or two samples, and proportions.

The direct (classical) null holds the ground good until the plots show it is not; the
reverse null holds it wanting until they show it is good. On the same plots the two
can answer differently, so the region names which decides. The share of the
standard (0.9) applies once.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import pairwise

from builder.formulas.cover import wilson_bound
from builder.formulas.quantiles import t_above, t_quantile
from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_count,
    need_not_negative,
    need_open_share,
    need_same_length,
    need_share,
    need_some_share,
)
from builder.formulas.sample import summary


@dataclass(frozen=True)
class Judgement:
    """One test. t and p are None when all plots are alike and only the mean can speak."""

    mean: float
    line: float
    df: float
    t: float | None
    t_critical: float
    p: float | None
    bound: float
    passes: bool


def _null(null_kind: str) -> bool:
    if null_kind not in ("direct", "reverse"):
        raise RefusedError("unknown_choice", field="null_kind", value=null_kind)
    return null_kind == "reverse"


def _decide(
    mean: float, line: float, se: float, df: float, alpha: float, reverse: bool
) -> Judgement:
    critical = t_quantile(1 - alpha, df)
    bound = mean - critical * se if reverse else mean + critical * se
    if se == 0:
        return Judgement(mean, line, df, None, critical, None, bound, mean >= line)
    t = (mean - line) / se if reverse else (line - mean) / se
    passes = t > critical if reverse else t <= critical
    return Judgement(mean, line, df, t, critical, t_above(t, df), bound, passes)


def standard_line(standard: float, share: float, share_already_taken: bool = False) -> float:
    """The value a stand is held against. [unit of the standard]

    standard             full standard, as measured or written
    share                part of it that is enough, 0..1
    share_already_taken  True when the written standard is already that part

    Refused: a share below 1 on a standard it was already taken off.
    Source: cfr_816_116; golden: success.json
    """
    part = need_some_share("share", share)
    if share_already_taken and part < 1:
        raise RefusedError("double_allowance", value=share)
    return need_not_negative("standard", standard) * part


def line_at(points: Sequence[Sequence[float]], year: float) -> float | None:
    """A trajectory's line in a year: straight between its points, flat after the last.

    points  [year, value] pairs, years rising;  year  years since the work

    None before the first point: nothing is asked yet.
    Source: beltbook_rule; golden: success.json
    """
    at = need_not_negative("year", year)
    if not points or at < points[0][0]:
        return None
    for (start, low), (end, high) in pairwise(points):
        if at <= end:
            return low + (high - low) * (at - start) / (end - start)
    return points[-1][1]


def one_sample(
    values: Sequence[float], line: float, alpha: float, null_kind: str, at_most: bool = False
) -> Judgement:
    """One-sided t test of plots against a fixed line. [unit of values]

    values  one number a plot;  line  from `standard_line`
    alpha   error risked, one-sided (0.10)
    null_kind  "direct": passes while (line - mean)/se <= t(1 - alpha), bound is the
            highest mean the plots allow; "reverse": passes once (mean - line)/se is
            over t(1 - alpha), bound is the lowest
    at_most  True where less is better (bare ground, weeds): both sides change places

    Refused: fewer than two plots, alpha outside (0, 1), another null.
    Source: colorado_4_15_11, student_1908; golden: success.json
    """
    plots = summary(values)
    risk = need_open_share("alpha", alpha)
    level = need_not_negative("line", line)
    if not at_most:
        return _decide(plots.mean, level, plots.se, plots.n - 1, risk, _null(null_kind))
    turned = _decide(-plots.mean, -level, plots.se, plots.n - 1, risk, _null(null_kind))
    return replace(turned, mean=plots.mean, line=level, bound=-turned.bound)


def two_sample(
    values: Sequence[float], reference: Sequence[float], share: float, alpha: float, null_kind: str
) -> Judgement:
    """One-sided Welch test of plots against a share of a reference area. [unit of values]

    Every reference plot is multiplied by the share, so its variance by the share
    squared; the two spreads may differ.
    Source: welch_1947; golden: success.json
    """
    part = need_some_share("share", share)
    ours, theirs = summary(values), summary([value * part for value in reference])
    one, other = ours.se**2, theirs.se**2
    spread = one + other
    if spread == 0:
        df = float(ours.n + theirs.n - 2)
    else:
        df = spread**2 / (one**2 / (ours.n - 1) + other**2 / (theirs.n - 1))
    risk = need_open_share("alpha", alpha)
    gap = _decide(ours.mean - theirs.mean, 0.0, math.sqrt(spread), df, risk, _null(null_kind))
    return Judgement(
        ours.mean, theirs.mean, df, gap.t, gap.t_critical, gap.p,
        gap.bound + theirs.mean, gap.passes,
    )  # fmt: skip


def proportion(
    successes: int, n: int, line: float, alpha: float, null_kind: str
) -> tuple[float, float, bool]:
    """Judgement of a counted share (stocked plots, hits) against a line by Wilson's bound.

    line  share wanted, 0..1, after its allowance

    Returns (share, bound, passes): with the reverse null the lower bound must lie over
    the line, with the direct one the upper bound must not lie under it.
    Source: wilson_1927; golden: success.json
    """
    reverse = _null(null_kind)
    wanted = need_share("line", line)
    bound = wilson_bound(successes, n, 1 - need_open_share("alpha", alpha), upper=not reverse)
    return successes / n, bound, bound > wanted if reverse else bound >= wanted


def verdict(passes: bool, n: int, needed: float, least: int, null_kind: str) -> str:
    """Whether a standard is "met", "not_shown", or there are "too_few" plots. [word]

    n       plots taken
    needed  sample adequacy, from `sample.plots_for_precision`
    least   smallest count the rule allows

    Below `least` nothing is judged. Under the direct null too small a sample passes
    too easily, so adequacy is asked for either way; under the reverse null a small
    sample that still shows success has shown it.
    Source: colorado_4_15_11; golden: success.json
    """
    reverse = _null(null_kind)
    short = need_count("n", n) < need_not_negative("needed", needed)
    if n < need_count("least", least) or (short and not (reverse and passes)):
        return "too_few"
    return "met" if passes else "not_shown"


def responsibility_years(
    rain_mm: float, rain_break_mm: float, years_wet: int, years_dry: int
) -> int:
    """Full years after the last seeding before success may be tested. [yr]

    rain_mm  yearly rain; more than the break counts as wet, the break itself as dry
    Source: cfr_816_116; golden: success.json
    """
    wet = need_not_negative("rain_mm", rain_mm) > need_above_zero("rain_break_mm", rain_break_mm)
    wet_wait, dry_wait = need_count("years_wet", years_wet), need_count("years_dry", years_dry)
    return wet_wait if wet else dry_wait


def weighted_standard(values: Sequence[float], weights: Sequence[float]) -> float:
    """Standard of several reference areas, weighted by their ground. [unit of values]

    weights  shares of the disturbed ground, adding up to 1
    Refused: lists of two lengths, weights that do not add up to 1.
    Source: bond_release_2012; golden: success.json
    """
    need_same_length("values", values, "weights", weights)
    shares = [need_share("weight", weight) for weight in weights]
    if abs(math.fsum(shares) - 1) > 1e-3:
        raise RefusedError("shares_sum", field="weights", value=math.fsum(shares))
    products = (need_not_negative("value", v) * w for v, w in zip(values, shares, strict=True))
    return math.fsum(products)
