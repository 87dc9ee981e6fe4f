"""How faithful a plant is to a group of plots: IndVal, phi, constancy and niche breadth."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from numpy.typing import ArrayLike, NDArray
from scipy import sparse

Floats = NDArray[np.float64]
MANTISSA_BITS = 52
"""Whole numbers up to 2**52 add exactly in a double, in any order."""
CELLS_AT_ONCE = 2**16
"""Cells summed at once, so that they stay near the processor (100,000 plots: 15 to 7 ms a turn)."""
SAME = 1 - 1e-12
"""Products of the same sums may differ in the last bit when groups stand in another order."""


def group_sums(values: ArrayLike, group: ArrayLike) -> Floats:
    """Sum of each plant's values over the plots of each group. [unit of values]

    values  plots x plants
    group   group number of each plot, 0..K-1; groups are rows 0..max in the result

    Returns plants x groups.

    Source: definition; golden: group_sums.json
    """
    table = np.asarray(values, dtype=float)
    label = np.asarray(group, dtype=int)
    if table.ndim != 2 or label.shape != table.shape[:1]:
        raise ValueError(f"values {table.shape} need one group number a row, got {label.shape}")
    one_hot = np.zeros((table.shape[0], int(label.max()) + 1))
    one_hot[np.arange(label.size), label] = 1.0
    return np.asarray(table.T @ one_hot)


def constancy(cover: ArrayLike, group: ArrayLike) -> Floats:
    """Share of a group's plots that hold the plant, plants x groups. [0..1]

    cover  plots x plants, anything above zero counts as present
    group  group number of each plot, 0..K-1, every number used

    Source: definition; golden: constancy.json (R package vegan's dune data)
    """
    present = np.asarray(cover, dtype=float) > 0
    return group_sums(present, group) / np.bincount(np.asarray(group, dtype=int))


def indval_parts(cover: ArrayLike, group: ArrayLike) -> tuple[Floats, Floats]:
    """Specificity A and fidelity B of Dufrene and Legendre, each plants x groups. [0..1]

    A = mean cover in the group / sum of the group means (means, not sums: groups differ in size)
    B = share of the group's plots that hold the plant
    A plant found nowhere has A = 0.

    Source: Dufrene & Legendre 1997, Ecol. Monogr. 67: 345-366; golden: indval_parts.json
    """
    means = group_sums(cover, group) / np.bincount(np.asarray(group, dtype=int))
    total = means.sum(axis=1, keepdims=True)
    specificity = np.divide(means, total, out=np.zeros_like(means), where=total > 0)
    return specificity, constancy(cover, group)


def indval(cover: ArrayLike, group: ArrayLike) -> Floats:
    """Indicator value A x B, plants x groups. [0..1]

    cover  plots x plants, cover or any abundance, not negative
    group  group number of each plot, 0..K-1, every number used

    Some programs print 100 x this, some its square root.
    Source: Dufrene & Legendre 1997; golden: indval.json (R package labdsv 2.0-1)
    """
    specificity, fidelity = indval_parts(cover, group)
    return specificity * fidelity


def indval_p(
    cover: ArrayLike,
    group: ArrayLike,
    permutations: int = 999,
    seed: int = 0,
    progress: Callable[[float], None] | None = None,
) -> Floats:
    """Chance of a largest IndVal as high as the plant's own when groups are dealt anew. [0..1]

    cover         plots x plants
    group         group number of each plot, 0..K-1
    permutations  dealings of the group numbers over the plots
    progress      told the share done, may raise to stop

    p = (1 + dealings at least as high) / (1 + dealings); one value a plant, 1 if never found.
    Presence and cover of a plant travel in one whole number, count + 2**bits x cover, so one
    pass over the filled cells gives both sums, exactly, and no tie is lost to rounding. Covers
    of up to three decimals go in as they are; others in steps of 2**-18 of the plant's largest
    or finer (100,000 plots).

    Source: Dufrene & Legendre 1997 (the test); golden: indval_p.json
    """
    label = np.asarray(group, dtype=np.intp)
    cells = sparse.csr_matrix(np.asarray(cover, dtype=float))
    plots, plants = cells.shape
    sizes = np.bincount(label).astype(float)
    keys = _Keys(cells, plots, sizes.size)
    observed = keys.largest_indval(label, sizes)
    reached = np.zeros(plants)
    rng = np.random.default_rng(seed)
    for turn in range(permutations):
        reached += keys.largest_indval(rng.permutation(label), sizes) >= observed * SAME
        if progress is not None and turn % 50 == 0:
            progress(turn / permutations)
    return np.where(observed > 0, (1 + reached) / (1 + permutations), 1.0)


class _Keys:
    """The filled cells of a table, packed so that one weighted count gives both sums."""

    def __init__(self, cells: sparse.csr_matrix, plots: int, groups: int) -> None:
        count_bits = int(plots).bit_length()
        if MANTISSA_BITS - 2 * count_bits < 8:
            raise ValueError(f"{plots} plots are more than this test is built for")
        self.plants, self.groups = cells.shape[1], groups
        self.unit = float(2**count_bits)
        self.weight = _whole_covers(cells, count_bits) * self.unit + 1.0
        self.row = np.repeat(np.arange(plots), np.diff(cells.indptr))
        self.slot = cells.indices.astype(np.intp) * groups

    def largest_indval(self, label: NDArray[np.intp], sizes: Floats) -> Floats:
        sums = np.zeros(self.plants * self.groups)
        for start in range(0, self.row.size, CELLS_AT_ONCE):
            part = slice(start, start + CELLS_AT_ONCE)
            # Every row is a plot's; "clip" spares numpy a slower look at each.
            key = np.take(label, self.row[part], mode="clip")
            key += self.slot[part]
            sums += np.bincount(key, self.weight[part], sums.size)
        packed = sums.reshape(self.plants, self.groups)
        cover = np.floor(packed / self.unit)
        held = packed - cover * self.unit
        means = cover / sizes
        best = (means * (held / sizes)).max(axis=1)
        total = means.sum(axis=1)
        return np.asarray(np.divide(best, total, out=np.zeros_like(best), where=total > 0))


def _whole_covers(cells: sparse.csr_matrix, count_bits: int) -> Floats:
    for factor in (1.0, 10.0, 100.0, 1000.0):
        whole = np.round(cells.data * factor)
        fits = whole.sum() < 2.0 ** (MANTISSA_BITS - count_bits)
        if fits and np.allclose(whole, cells.data * factor, rtol=0, atol=1e-9 * factor):
            return np.asarray(whole)
    largest = np.maximum(cells.max(axis=0).toarray().ravel(), 1e-300)
    steps = 2.0 ** (MANTISSA_BITS - 2 * count_bits) - 1
    return np.asarray(np.ceil(cells.data / largest[cells.indices] * steps))


def phi(cover: ArrayLike, group: ArrayLike, equalised: bool = False) -> Floats:
    """Phi coefficient of fidelity from presence, plants x groups. [-1..1]

    equalised  False: the plots as they are. True: as if all groups were equally large.

    phi = (N np - n Np) / sqrt(n Np (N - n) (N - Np)), N plots, Np in the group, n with the
    plant, np both. A plant found everywhere or nowhere has phi 0.

    Source: Chytry et al. 2002, J. Veg. Sci. 13: 79-90; equalised: Tichy & Chytry 2006,
    J. Veg. Sci. 17: 809-818; golden: phi.json
    """
    share = constancy(cover, group)
    sizes = np.bincount(np.asarray(group, dtype=int)).astype(float)
    if equalised:
        sizes = np.full(sizes.size, 1.0 / sizes.size)
    plots = sizes.sum()
    joint = share * sizes
    with_plant = joint.sum(axis=1, keepdims=True)
    spread = with_plant * sizes * (plots - with_plant) * (plots - sizes)
    above = plots * joint - with_plant * sizes
    safe = np.where(spread > 1e-12, spread, 1.0)
    return np.where(spread > 1e-12, above / np.sqrt(safe), 0.0)


def levins_breadth(amounts: ArrayLike) -> float:
    """Levins' niche breadth B = 1 / sum of squared shares; 1 for one group, K for all alike. [-]

    amounts  the plant's mean amount in each group, not negative, not all zero

    Source: Levins 1968; golden: levins_breadth.json
    """
    values = np.asarray(amounts, dtype=float)
    if values.ndim != 1 or values.sum() <= 0 or values.min() < 0:
        raise ValueError("amounts must be one list, none negative, not all zero")
    shares = values / values.sum()
    return float(1.0 / np.square(shares).sum())


def levins_standardised(amounts: ArrayLike) -> float:
    """Niche breadth on 0..1: (B - 1) / (groups - 1); a single group gives 0. [0..1]

    Source: Hurlbert 1978; golden: levins_standardised.json
    """
    groups = np.asarray(amounts).size
    return (levins_breadth(amounts) - 1.0) / (groups - 1) if groups > 1 else 0.0
