"""How good beliefs are: hits, kappa, log loss, Brier, calibration and a perfect key's band."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]
Whole = NDArray[np.int64]
BINS = 10
DRAWS = 1000
BAND = (2.5, 97.5)


def kappa(said: Whole, true: Whole, zones: int) -> float:
    """Cohen's kappa: agreement beyond what the two frequencies would give by chance. [-1..1]

    Source: Cohen 1960 (from memory); 1 where there is nothing to be agreed on
    """
    table = np.zeros((zones, zones))
    np.add.at(table, (true, said), 1.0)
    share = table / table.sum()
    chance = float(share.sum(axis=0) @ share.sum(axis=1))
    return (float(np.trace(share)) - chance) / (1.0 - chance) if chance < 1.0 else 1.0


def log_loss(belief: Floats, true: Whole) -> float:
    """Mean of -ln belief in the true zone. [nats]"""
    return float(-np.log(np.maximum(belief[np.arange(len(true)), true], 1e-9)).mean())


def brier(belief: Floats, true: Whole) -> float:
    """Mean squared distance of belief from the truth, over all zones. [0..2]"""
    target = np.eye(belief.shape[1])[true]
    return float(((belief - target) ** 2).sum(axis=1).mean())


def calibration_error(stated: Floats, right: NDArray[np.bool_]) -> float:
    """Mean distance of stated belief from the share that was right, over ten bins. [0..1]"""
    error = 0.0
    for rows in _bins(stated):
        error += len(rows) / len(stated) * abs(float(stated[rows].mean() - right[rows].mean()))
    return error


def perfect_band(stated: Floats, rng: np.random.Generator) -> tuple[float, float]:
    """Calibration errors that a perfectly calibrated key of these beliefs would show, 95 in 100."""
    bins = _bins(stated)
    errors = np.zeros(DRAWS)
    for rows in bins:
        right = rng.random((DRAWS, len(rows))) < stated[rows]
        errors += len(rows) / len(stated) * np.abs(stated[rows].mean() - right.mean(axis=1))
    low, high = np.percentile(errors, BAND)
    return float(low), float(high)


def calibration_rows(
    stated: Floats, right: NDArray[np.bool_], rng: np.random.Generator
) -> list[dict[str, Any]]:
    """By bin: mean stated belief, share right, sites, and the 95 % band of a perfect key."""
    rows = []
    for at in _bins(stated):
        drawn = (rng.random((DRAWS, len(at))) < stated[at]).mean(axis=1)
        low, high = np.percentile(drawn, BAND)
        rows.append(
            {
                "stated": round(float(stated[at].mean()), 4),
                "right": round(float(right[at].mean()), 4),
                "n": len(at),
                "band": [round(float(low), 4), round(float(high), 4)],
            }
        )
    return rows


def area_under_curve(low: Floats, high: Floats) -> float:
    """Chance that a value of high lies above one of low, ties half. [0..1]

    Source: Mann & Whitney 1947, as the area under the curve
    """
    order = np.sort(low)
    below = np.searchsorted(order, high, side="left")
    upto = np.searchsorted(order, high, side="right")
    return float((0.5 * (below + upto)).mean() / len(low))


def figures(
    belief: Floats, true: Whole, rng: np.random.Generator, asked: Whole | None = None
) -> dict[str, Any]:
    """All of the above for one set of calls, rounded to four digits."""
    said, stated = belief.argmax(axis=1), belief.max(axis=1)
    right = said == true
    sure = stated >= 0.9
    band = perfect_band(stated, rng)
    made: dict[str, Any] = {
        "n": len(true),
        "hit_rate": float(right.mean()),
        "kappa": kappa(said, true, belief.shape[1]),
        "log_loss_nats": log_loss(belief, true),
        "brier": brier(belief, true),
        "calibration_error": calibration_error(stated, right),
        "perfect_band": [round(one, 4) for one in band],
        "stated_minus_right": float(stated.mean() - right.mean()),
        "sure_share": float(sure.mean()),
        "sure_stated_minus_right": float((stated[sure] - right[sure]).mean())
        if sure.any()
        else 0.0,
    }
    if asked is not None:
        made["answers_median"] = float(np.median(asked))
        made["answers_mean"] = float(asked.mean())
    return {name: round(one, 4) if isinstance(one, float) else one for name, one in made.items()}


def _bins(stated: Floats) -> list[Whole]:
    at = np.minimum((stated * BINS).astype(int), BINS - 1)
    return [np.flatnonzero(at == one) for one in range(BINS) if (at == one).any()]
