"""The whole fit of known plots: evidence, temper and drag, then usual fit and verdict lines."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

import numpy as np

from builder.proof.estimate import Learned, Progress, fit_key
from builder.proof.held_out import Part, session_figures
from builder.proof.known import Known


def fit_known(
    known: Known, near: Sequence[set[int]], seed: int = 0, progress: Progress | None = None
) -> Learned:
    """Everything a fit from known plots brings.

    near  neighbours of each zone, in the order of known.zone_ids
    seed  the same seed gives the same figures
    """
    learned = fit_key(known.plots, known.zone, len(known.zone_ids), seed, progress)
    if progress:
        progress("verdicts", 0.0)
    parts = [
        Part(one.arrays, one.weights, known.plots.take(one.rows), known.zone[one.rows])
        for one in learned.inner
        if len(one.rows)
    ]
    rng = np.random.default_rng(seed + 1)
    session = session_figures(parts, learned.fitted.session, near, rng)
    return replace(learned, fitted=replace(learned.fitted, session=session))
