"""How many plants, how evenly, how alike two plots are, and along which line plots fall."""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import ArrayLike, NDArray

Floats = NDArray[np.float64]


def _shares(amounts: ArrayLike) -> Floats:
    values = np.asarray(amounts, dtype=float)
    if values.ndim != 1 or values.min(initial=0.0) < 0 or values.sum() <= 0:
        raise ValueError("amounts must be one list, none negative, not all zero")
    return np.asarray(values[values > 0] / values.sum())


def _pair(first: ArrayLike, second: ArrayLike) -> tuple[Floats, Floats]:
    one, two = np.asarray(first, dtype=float), np.asarray(second, dtype=float)
    if one.shape != two.shape or one.ndim != 1:
        raise ValueError(f"both plots need the same plants, got {one.shape} and {two.shape}")
    if min(one.min(initial=0.0), two.min(initial=0.0)) < 0 or one.sum() + two.sum() <= 0:
        raise ValueError("amounts must not be negative, nor both plots empty")
    return one, two


def richness(amounts: ArrayLike) -> int:
    """Number of plants with any amount. [-]  Source: definition; golden: richness.json"""
    return int((np.asarray(amounts, dtype=float) > 0).sum())


def shannon(amounts: ArrayLike, base: float = math.e) -> float:
    """Shannon diversity, -sum p log p. [nats; base 2: bits]

    Source: Shannon 1948; golden: shannon.json
    """
    shares = _shares(amounts)
    return float(-(shares * np.log(shares)).sum() / math.log(base))


def gini_simpson(amounts: ArrayLike) -> float:
    """Chance that two finds are of different plants, 1 - sum p^2. [0..1]

    Source: Simpson 1949; golden: gini_simpson.json
    """
    return float(1.0 - np.square(_shares(amounts)).sum())


def inverse_simpson(amounts: ArrayLike) -> float:
    """Plants of equal amount that would be as diverse, 1 / sum p^2. [-]

    Source: Simpson 1949; golden: inverse_simpson.json
    """
    return float(1.0 / np.square(_shares(amounts)).sum())


def bray_curtis(first: ArrayLike, second: ArrayLike) -> float:
    """Bray-Curtis dissimilarity of two plots on raw amounts, sum|a - b| / sum(a + b). [0..1]

    Source: Bray & Curtis 1957; golden: bray_curtis.json
    """
    one, two = _pair(first, second)
    return float(np.abs(one - two).sum() / (one + two).sum())


def sorensen(first: ArrayLike, second: ArrayLike) -> float:
    """Sorensen dissimilarity on presence, 1 - 2 both / (n1 + n2). [0..1]

    Source: Sorensen 1948; golden: sorensen.json
    """
    one, two = _pair(first, second)
    both = float(((one > 0) & (two > 0)).sum())
    return 1.0 - 2.0 * both / float((one > 0).sum() + (two > 0).sum())


def jaccard(first: ArrayLike, second: ArrayLike) -> float:
    """Jaccard dissimilarity on presence, 1 - both / either. [0..1]

    Source: Jaccard 1912 (from memory); golden: jaccard.json
    """
    one, two = _pair(first, second)
    both = float(((one > 0) & (two > 0)).sum())
    return 1.0 - both / float(((one > 0) | (two > 0)).sum())


def percent_similarity(first: ArrayLike, second: ArrayLike) -> float:
    """Likeness of two plots: sum of the smaller relative amounts. [0..1]

    On raw amounts the same sum would be 1 - Bray-Curtis, which is another number.
    Source: Renkonen 1938; Gauch 1982; golden: percent_similarity.json
    """
    one, two = _pair(first, second)
    if one.sum() <= 0 or two.sum() <= 0:
        raise ValueError("a plot without any plant is like nothing")
    return float(np.minimum(one / one.sum(), two / two.sum()).sum())


def correspondence_eigenvalues(amounts: ArrayLike) -> Floats:
    """Eigenvalues of correspondence analysis, largest first; they add up to the inertia. [-]

    amounts  plots x plants, no empty row

    Source: Hill 1973, J. Ecol. 61: 237-249 (from memory); golden: correspondence_eigenvalues.json
    """
    return _correspondence(amounts)[0]


def correspondence_order(amounts: ArrayLike) -> list[int]:
    """Rows along the first axis of correspondence analysis, as row numbers. [-]

    The axis has no direction of its own: the end whose row stands first in the table comes
    first. Rows with the same score keep the order of the table.

    Source: Hill 1973; golden: correspondence_order.json
    """
    score = np.round(_correspondence(amounts)[1], 9)
    order = np.argsort(score, kind="stable")
    back = np.argsort(-score, kind="stable")
    return [int(row) for row in (order if order[0] <= back[0] else back)]


def _correspondence(amounts: ArrayLike) -> tuple[Floats, Floats]:
    table = np.asarray(amounts, dtype=float)
    table = table[:, table.sum(axis=0) > 0]
    if table.ndim != 2 or min(table.shape, default=0) < 2 or (table.sum(axis=1) <= 0).any():
        raise ValueError("need two plots and two plants at least, and no empty plot")
    share = table / table.sum()
    rows, columns = share.sum(axis=1), share.sum(axis=0)
    expected = np.outer(rows, columns)
    left, singular, _ = np.linalg.svd((share - expected) / np.sqrt(expected), full_matrices=False)
    values = np.square(singular)
    return values[: min(table.shape) - 1], left[:, 0] / np.sqrt(rows)
