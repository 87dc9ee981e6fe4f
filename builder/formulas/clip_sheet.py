"""The clip sheet as it is filled: running mean, interval, and how many more plots.

One sheet clips every plot, the other clips some and estimates all.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace

from builder.formulas.clipping import clip_kg_ha
from builder.formulas.double_sampling import Estimate, ratio_estimate, regression_estimate
from builder.formulas.refusal import RefusedError, need_not_negative, need_open_share
from builder.formulas.sample import mean_interval, plots_in_all, summary


@dataclass(frozen=True)
class Sheet:
    """Growth by plot and the mean after each; None where too few plots speak. [kg ha-1]"""

    kg_ha: list[float]
    running_kg_ha: list[float]
    mean_kg_ha: float | None
    low_kg_ha: float | None
    high_kg_ha: float | None
    plots_needed: int | None
    more: int


def clip_sheet(
    green_g: Sequence[float],
    plot_m2: float,
    air_dry_share: float,
    precision: float,
    confidence: float,
) -> Sheet:
    """A sheet of clipped plots so far. [kg ha-1]

    green_g        green weight of each plot, in the order clipped [g]
    plot_m2        area of one plot [m2];  air_dry_share  of green weight, above 0 to 1
    precision      wanted half-width of the interval as a share of the mean
    confidence     of that interval

    `more` is what is still to clip: up to two plots before a spread can be seen, then as
    many as the spread so far asks for. Where all plots are empty no count can be given
    and `plots_needed` is None.
    Source: student_1908, hand_arithmetic; golden: clip_sheet.json
    """
    need_open_share("precision", precision)
    need_open_share("confidence", confidence)
    clip_kg_ha(0, plot_m2, air_dry_share)
    grown = [clip_kg_ha(weight, plot_m2, air_dry_share) for weight in green_g]
    running = [sum(grown[: i + 1]) / (i + 1) for i in range(len(grown))]
    if len(grown) < 2:
        mean = running[0] if running else None
        return Sheet(grown, running, mean, None, None, None, 2 - len(grown))
    plots = summary(grown)
    low, high = mean_interval(grown, confidence)
    needed = plots_in_all(plots.mean, plots.sd, precision, confidence) if plots.mean else None
    more = max(0, needed - plots.n) if needed else 0
    return Sheet(grown, running, plots.mean, low, high, needed, more)


@dataclass(frozen=True)
class DoubleSheet:
    """Both estimators of a double-sampling sheet; None until enough plots are clipped."""

    n_estimated: int
    n_clipped: int
    ratio: Estimate | None
    regression: Estimate | None


def double_sheet(
    rows: Sequence[Mapping[str, float | None]],
    plot_m2: float,
    air_dry_share: float,
    confidence: float,
) -> DoubleSheet:
    """A sheet of plots estimated by eye, some of them clipped. [kg ha-1]

    rows  estimated_g of every plot and clipped_g where it was clipped (else None) [g]

    Ratio from 2 clipped plots on, regression from 3 whose estimates differ; in between
    the missing one is None.
    Refused: a clipped plot without its estimate.
    Source: cochran_1977; golden: clip_sheet.json
    """
    need_open_share("confidence", confidence)
    estimated: list[float] = []
    clipped: list[float] = []
    others: list[float] = []
    for row in rows:
        by_eye = need_not_negative("estimated_g", row.get("estimated_g"))
        cut = row.get("clipped_g")
        if cut is None:
            others.append(by_eye)
        else:
            estimated.append(by_eye)
            clipped.append(cut)
    factor = clip_kg_ha(1, plot_m2, air_dry_share)
    ratio = regression = None
    if len(clipped) >= 2 and sum(estimated) > 0:
        ratio = _in_kg_ha(ratio_estimate(estimated, clipped, others, confidence), factor)
    if len(clipped) >= 3:
        try:
            line = regression_estimate(estimated, clipped, others, confidence)
            regression = _in_kg_ha(line, factor)
        except RefusedError as no:
            if no.key != "no_spread":
                raise
    return DoubleSheet(len(rows), len(clipped), ratio, regression)


def _in_kg_ha(grams: Estimate, factor: float) -> Estimate:
    return replace(
        grams,
        mean=grams.mean * factor,
        se=grams.se * factor,
        low=grams.low * factor,
        high=grams.high * factor,
    )
