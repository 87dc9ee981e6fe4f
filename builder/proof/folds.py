"""Plots dealt into folds so that every fold holds its share of every zone."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray


def stratified_folds(
    zone: NDArray[np.int64], folds: int, rng: np.random.Generator
) -> NDArray[np.int64]:
    """Fold number of each plot, 0..folds-1.

    zone  [plot] index of the known zone. Within a zone the plots are dealt in turn from a random
    start, so that small zones do not all fall into the first fold.
    """
    fold = np.zeros(len(zone), int)
    for one in np.unique(zone):
        rows = np.flatnonzero(zone == one)
        start = rng.integers(folds)
        fold[rng.permutation(rows)] = (np.arange(len(rows)) + start) % folds
    return fold
