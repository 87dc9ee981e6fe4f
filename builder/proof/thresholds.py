"""Verdict thresholds: lines that turn edge, mosaic and fit measures into scores.

Fitted on labelled cases by multinomial regression of the verdict on the three measures, each score
one line of its own measure, zone at 0. The cases come from another generator than those that test.
"""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import minimize

from builder.key.prepare import Floats, Key
from builder.proof.calls import Calls

NAMES = ("edge", "mosaic", "misfit")
TRUTHS = ("zone", *NAMES)
SHARES = {"zone": 0.37, "edge": 0.29, "mosaic": 0.16, "misfit": 0.18}
"""How much each kind of case weighs; a plot inside a zone is what a crew meets most."""
PULL = 0.02
DIGITS = 3
THIN_SHARE = 0.02
"""Share of sound plots that may be called thin."""


def measures(key: Key, calls: Calls) -> Floats:
    """Edge gain, mosaic gain and fit behind the scores of calls, [site, 3]."""
    lines = [key.settings[name] for name in NAMES]
    plus = np.array([line["plus"] for line in lines])
    times = np.array([line["times"] for line in lines])
    return np.asarray((calls.scores[:, 1:] - plus) / times)


def fit_lines(cases: Mapping[str, Floats]) -> dict[str, dict[str, float]]:
    """Times and plus of each score, from measures [case, 3] by true verdict.

    Every kind of case counts with its share, however many there are.
    """
    kinds = [name for name in TRUTHS if len(cases.get(name, ()))]
    told = np.concatenate([cases[name] for name in kinds])
    truth = np.concatenate([np.full(len(cases[name]), TRUTHS.index(name)) for name in kinds])
    weight = np.concatenate(
        [np.full(len(cases[name]), SHARES[name] / len(cases[name])) for name in kinds]
    )
    usable = np.array([name in kinds for name in NAMES])

    def loss(free: Floats) -> float:
        scores = told * np.exp(free[:3]) + free[3:]
        scores = np.where(usable, scores, -50.0)
        scores = np.column_stack([np.zeros(len(scores)), scores])
        top = scores.max(axis=1)
        total = top + np.log(np.exp(scores - top[:, None]).sum(axis=1))
        likely = scores[np.arange(len(scores)), truth] - total
        return float(-(weight * likely).sum() / weight.sum() + PULL * (free[:3] ** 2).sum())

    end = minimize(loss, np.zeros(6), method="L-BFGS-B").x
    return {
        name: {
            "times": round(float(np.exp(end[k])), DIGITS),
            "plus": round(float(end[3 + k]), DIGITS) if usable[k] else -50.0,
        }
        for k, name in enumerate(NAMES)
    }


def thin_line(finds_cb: NDArray[Any], stated: Floats, thin: dict[str, float]) -> int:
    """Finds below which a call is thin: what few sound plots fall short of, at most the default.

    finds_cb, stated  [site] finds and belief in the leader; a confident call is never thin
    thin              the default line: finds_cb, and the belief that makes a call confident
    """
    doubtful = np.where(stated >= thin["belief"], np.inf, finds_cb)
    return int(min(np.quantile(doubtful, THIN_SHARE, method="lower"), thin["finds_cb"]))
