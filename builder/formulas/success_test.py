"""A success test as it is signed: the null that decides, the other beside it, and why not yet.

The region's text says which local rule holds; a verdict here is arithmetic and no release.
"""

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from builder.formulas.refusal import RefusedError, need_not_negative
from builder.formulas.sample import plots_for_precision, summary
from builder.formulas.success import (
    Judgement,
    one_sample,
    standard_line,
    two_sample,
    verdict,
)

NULLS = ("direct", "reverse")


@dataclass(frozen=True)
class SuccessTest:
    """Verdict met, not_shown, too_few or too_soon; both nulls; plots needed and still to take."""

    verdict: str
    null: str
    deciding: Judgement | None
    other: Judgement | None
    plots_needed: int | None
    more: int
    sentence: str


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
    rule         null ("direct" or "reverse", the one that decides), share, alpha by null
                 (alpha_direct, alpha_reverse), precision, least (smallest count),
                 years (full years after the last seeding before a test counts; None: none)
    standard     fixed value, or None; reference  plots of the reference area, or None
    years_since  years since the last seeding, None when unknown

    The sentence key is success.<null>.<verdict>, or success.too_soon.
    Refused: neither or both of standard and reference; a share counted twice; a rule with
    years where years_since is not known.
    Source: colorado_4_15_11, cfr_816_116; golden: success_test.json
    """
    if (standard is None) == (reference is None):
        raise RefusedError("one_standard")
    null = rule["null"]
    if null not in NULLS:
        raise RefusedError("unknown_choice", field="null", value=null)
    wait = rule.get("years")
    if wait is not None and need_not_negative("years_since", years_since) < wait:
        return SuccessTest("too_soon", null, None, None, None, 0, "success.too_soon")
    if len(values) < 2:
        return SuccessTest(
            "too_few", null, None, None, None, max(2, rule["least"]) - len(values),
            f"success.{null}.too_few",
        )  # fmt: skip
    tests = {
        each: _test(values, each, rule, standard, reference, share_already_taken) for each in NULLS
    }
    deciding = tests[null]
    needed = _needed(values, rule, null)
    answer = verdict(deciding.passes, len(values), needed, rule["least"], null)
    more = max(0, max(needed, rule["least"]) - len(values)) if answer == "too_few" else 0
    other = tests["reverse" if null == "direct" else "direct"]
    return SuccessTest(answer, null, deciding, other, needed, more, f"success.{null}.{answer}")


def _test(
    values: Sequence[float],
    null: str,
    rule: Mapping[str, Any],
    standard: float | None,
    reference: Sequence[float] | None,
    share_already_taken: bool,
) -> Judgement:
    alpha = rule[f"alpha_{null}"]
    if standard is not None:
        line = standard_line(standard, rule["share"], share_already_taken)
        return one_sample(values, line, alpha, null)
    standard_line(1.0, rule["share"], share_already_taken)
    return two_sample(values, reference or [], rule["share"], alpha, null)


def _needed(values: Sequence[float], rule: Mapping[str, Any], null: str) -> int:
    plots, least = summary(values), int(rule["least"])
    if plots.mean == 0:
        return max(2, least)
    alpha = rule[f"alpha_{null}"]
    raw = plots_for_precision(plots.n, plots.mean, plots.sd, rule["precision"], alpha)
    return max(2, math.ceil(raw))
