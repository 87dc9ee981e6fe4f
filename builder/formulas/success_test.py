"""A success test as it is signed: the null that decides, the other beside it, and why not yet.

The region's text says which local rule holds; a verdict here is arithmetic and no release.
"""

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from builder.formulas.refusal import RefusedError, need_not_negative, need_number
from builder.formulas.sample import plots_for_precision, summary
from builder.formulas.success import (
    Judgement,
    line_at,
    one_sample,
    responsibility_years,
    standard_line,
    two_sample,
    verdict,
)

NULLS = ("direct", "reverse")


@dataclass(frozen=True)
class SuccessTest:
    """Verdict met, not_shown, too_few or too_soon; both nulls; plots needed and still to take."""

    verdict: str
    null_kind: str
    deciding: Judgement | None
    other: Judgement | None
    plots_needed: int | None
    more: int
    sentence: str


def rule_of(
    region: Mapping[str, Any],
    zone: Mapping[str, Any],
    rain_mm: float | None,
    measure: str = "cover",
    against: str = "reference",
) -> dict[str, Any]:
    """The rule a unit is tested by, from the region's rule and the zone's own figures.

    region   success_rule of region.yaml as a mapping
    zone     success of the zone's notes as a mapping
    rain_mm  yearly rain of the zone, which decides the years where the region has a break
    measure  "cover", "production" or "density";  against  "reference" or "standard"

    Cover against a reference takes the zone's perennial_cover_share_of_reference where it
    is given, times the zone's own share, or the region's where the zone names none. All
    else takes the region's share.

    The later of the region's years and the zone's earliest year holds. A region without
    sample adequacy takes a tenth of the mean.
    Source: cfr_816_116, beltbook_rule; golden: success_test.json
    """
    reverse, adequacy = region.get("reverse_null"), region.get("sample_adequacy")
    years = zone.get("earliest_year")
    if region.get("rain_break_mm") is not None:
        wait = responsibility_years(
            need_not_negative("rain_mm", rain_mm),
            region["rain_break_mm"],
            region["years_wet"],
            region["years_dry"],
        )
        years = max(wait, years or 0)
    return {
        "null_kind": region["null_kind"],
        "share": _share(region, zone, measure, against),
        "alpha_direct": region["alpha"],
        "alpha_reverse": reverse["alpha"] if reverse else region["alpha"],
        "precision": adequacy["d"] if adequacy else 0.1,
        "least": max(2, reverse["min_samples"])
        if reverse and region["null_kind"] == "reverse"
        else 2,
        "years": years,
    }


def _share(region: Mapping[str, Any], zone: Mapping[str, Any], measure: str, against: str) -> float:
    usual = 1.0 if region.get("share") is None else float(region["share"])
    line = zone.get("perennial_cover_share_of_reference")
    if measure != "cover" or against != "reference" or line is None:
        return usual
    own = zone.get("share")
    return float(line) * (usual if own is None else float(own))


def success_test(
    values: Sequence[float],
    rule: Mapping[str, Any],
    standard: float | None = None,
    reference: Sequence[float] | None = None,
    share_already_taken: bool = False,
    years_since: float | None = None,
) -> SuccessTest:
    """Test plots of a unit against a standard or the plots of a reference area.

    values       one number a plot: cover [%], growth [kg ha-1] or density
    rule         null_kind ("direct" or "reverse", the one that decides), share, alpha by null
                 (alpha_direct, alpha_reverse), precision, least (smallest count),
                 years (full years after the last seeding before a test counts; None: none)
    standard     fixed value, or None; reference  plots of the reference area, or None
    years_since  years since the last seeding, None when unknown

    The sentence key is success.<null_kind>.<verdict>, or success.too_soon.
    Refused: neither or both of standard and reference; a share counted twice; a rule with
    years where years_since is not known.
    Source: colorado_4_15_11, cfr_816_116; golden: success_test.json
    """
    if (standard is None) == (reference is None):
        raise RefusedError("one_standard")
    if standard is not None:
        need_not_negative("standard", standard)
    for value in (*values, *(reference or ())):
        need_number("plot", value)
    null_kind = rule["null_kind"]
    if null_kind not in NULLS:
        raise RefusedError("unknown_choice", field="null_kind", value=null_kind)
    wait = rule.get("years")
    if wait is not None and need_not_negative("years_since", years_since) < wait:
        return SuccessTest("too_soon", null_kind, None, None, None, 0, "success.too_soon")
    if len(values) < 2:
        return SuccessTest(
            "too_few", null_kind, None, None, None, max(2, rule["least"]) - len(values),
            f"success.{null_kind}.too_few",
        )  # fmt: skip
    tests = {
        each: _test(values, each, rule, standard, reference, share_already_taken) for each in NULLS
    }
    deciding = tests[null_kind]
    needed = _needed(values, rule, null_kind)
    answer = verdict(deciding.passes, len(values), needed, rule["least"], null_kind)
    more = max(0, max(needed, rule["least"]) - len(values)) if answer == "too_few" else 0
    other = tests["reverse" if null_kind == "direct" else "direct"]
    return SuccessTest(
        answer, null_kind, deciding, other, needed, more, f"success.{null_kind}.{answer}"
    )


def _test(
    values: Sequence[float],
    null_kind: str,
    rule: Mapping[str, Any],
    standard: float | None,
    reference: Sequence[float] | None,
    share_already_taken: bool,
) -> Judgement:
    alpha = rule[f"alpha_{null_kind}"]
    if standard is not None:
        line = standard_line(standard, rule["share"], share_already_taken)
        return one_sample(values, line, alpha, null_kind)
    standard_line(1.0, rule["share"], share_already_taken)
    return two_sample(values, reference or [], rule["share"], alpha, null_kind)


def _needed(values: Sequence[float], rule: Mapping[str, Any], null_kind: str) -> int:
    plots, least = summary(values), int(rule["least"])
    if plots.mean == 0:
        return max(2, least)
    alpha = rule[f"alpha_{null_kind}"]
    raw = plots_for_precision(plots.n, plots.mean, plots.sd, rule["precision"], alpha)
    return max(2, math.ceil(raw))


@dataclass(frozen=True)
class Course:
    """One line of a trajectory: on_course, off_course, not_asked (no line yet), too_few plots."""

    measure: str
    verdict: str
    line: float | None
    at_most: bool
    test: Judgement | None


def trajectory_check(
    lines: Sequence[Mapping[str, Any]],
    plots: Mapping[str, Sequence[float]],
    year: float,
    rule: Mapping[str, Any],
) -> list[Course]:
    """Every line of a zone's trajectory in one year after the work.

    lines  rows with measure and either at_most or at_least: [year, value] points
    plots  plot values by measure;  year  full years since the work
    rule   null_kind, alpha_direct, alpha_reverse, least

    With the direct null a line is on course unless the plots show it is not, with the
    reverse null once they show it is. One visit is not a pass: the region says how many.
    Source: beltbook_rule, student_1908; golden: success_test.json
    """
    found = []
    for row in lines:
        at_most = bool(row.get("at_most"))
        line = line_at(row["at_most"] if at_most else row["at_least"], year)
        values = plots.get(row["measure"], ())
        test, answer = None, "not_asked"
        if line is not None:
            answer = "too_few"
            if len(values) >= max(2, rule["least"]):
                kind = rule["null_kind"]
                test = one_sample(values, line, rule[f"alpha_{kind}"], kind, at_most)
                answer = "on_course" if test.passes else "off_course"
        found.append(Course(row["measure"], answer, line, at_most, test))
    return found
