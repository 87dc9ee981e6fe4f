"""Cover in four coarse steps: percent to step, and how often each step occurs.

Coarse steps carry nearly all that cover says beyond presence, and no observer's eye decides a call.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray
from scipy.special import betainc

Floats = NDArray[np.float64]

STEP_BOUNDS_PCT = (1.0, 5.0, 25.0)
"""Lower limits of steps 1, 2 and 3; a limit belongs to the step above it. [percent]"""


def cover_step(cover_pct: ArrayLike) -> NDArray[np.int64]:
    """Step 0..3 of a cover. cover_pct 0..100 [percent]"""
    return np.searchsorted(STEP_BOUNDS_PCT, np.asarray(cover_pct, float), side="right")


def cover_shares_from_counts(counts: Floats, shrink_plots: float) -> Floats:
    """Shares of the steps from plots, drawn to the plant's own, those to all plants'. [0..1]

    counts        [plant, 4, zone] plots by step
    shrink_plots  plots' worth of pull [plots]

    q_zsa = (n_zsa + 4 q_sa) / (n_zs + 4), q_sa = (n_sa + 4 q_a) / (n_s + 4)
    """
    by_plant = counts.sum(axis=2)
    pooled = by_plant.sum(axis=0) + 0.5
    pooled /= pooled.sum()
    own = (by_plant + shrink_plots * pooled) / (by_plant.sum(axis=1, keepdims=True) + shrink_plots)
    return np.asarray(
        (counts + shrink_plots * own[:, :, None])
        / (counts.sum(axis=1, keepdims=True) + shrink_plots)
    )


def cover_shares_from_means(
    mean_pct: Floats, present: Floats, precision: tuple[float, float], shrink_plots: float
) -> Floats:
    """Shares of the steps from mean cover where present. [0..1]

    mean_pct   [plant, zone] percent, not-a-number where the table has no line
    present    [plant, zone] plots' worth behind each mean [plots]
    precision  (base, per_mean): phi = base + per_mean / mean share; Beta(mean phi, (1 - mean) phi)
    shrink_plots  plots' worth of pull towards the plant's own shares [plots]
    """
    known = ~np.isnan(mean_pct)
    weight = np.where(known, present, 0.0)
    total = weight.sum(axis=1)
    overall = float((np.where(known, mean_pct, 0.0) * weight).sum() / max(weight.sum(), 1e-12))
    own_mean = np.where(
        total > 0,
        (np.where(known, mean_pct, 0.0) * weight).sum(axis=1) / np.maximum(total, 1e-12),
        overall if overall > 0 else 1.0,
    )
    own = _beta_steps(own_mean, precision)
    zone = _beta_steps(np.where(known, mean_pct, own_mean[:, None]), precision)
    zone = np.moveaxis(zone, -1, 1)
    shares = (weight[:, None, :] * zone + shrink_plots * own[:, :, None]) / (
        weight[:, None, :] + shrink_plots
    )
    return np.asarray(shares)


def _beta_steps(mean_pct: Floats, precision: tuple[float, float]) -> Floats:
    """Shares of the four steps, last axis, of a beta distribution with this mean."""
    mean = np.clip(mean_pct / 100.0, 1e-4, 0.99)
    phi = precision[0] + precision[1] / mean
    below = [betainc(mean * phi, (1.0 - mean) * phi, bound / 100.0) for bound in STEP_BOUNDS_PCT]
    edges = np.stack([np.zeros_like(mean), *below, np.ones_like(mean)], axis=-1)
    shares = np.maximum(np.diff(edges, axis=-1), 1e-4)
    return np.asarray(shares / shares.sum(axis=-1, keepdims=True))
