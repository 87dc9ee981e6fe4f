"""Known plots: what stood on each, and which zone a person who knows the ground gave it."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.formulas.diversity import correspondence_order
from builder.formulas.fidelity import group_sums
from builder.key.plots import Plots


@dataclass(frozen=True)
class Known:
    """Known plots with the names their columns stand for.

    plants  [plant] ids; zone_ids [zone]; zone [plot] index into zone_ids
    names   what the files were called, for provenance
    """

    plots: Plots
    plants: tuple[str, ...]
    zone_ids: tuple[str, ...]
    zone: NDArray[np.int64]
    names: tuple[str, str] = ("plots.csv", "zones.csv")

    def __len__(self) -> int:
        return len(self.zone)

    @property
    def counts(self) -> NDArray[np.int64]:
        """Plots of each zone."""
        return np.bincount(self.zone, minlength=len(self.zone_ids))


def in_slope_order(known: Known) -> Known:
    """The same plots with zones from low to high: by mean height, else along the main gradient.

    The main gradient is the first axis of correspondence analysis of the zones' mean covers. It
    has no direction of its own: the end whose zone was named first comes first.
    """
    order = _order(known)
    place = np.empty(len(order), int)
    place[order] = np.arange(len(order))
    ids = tuple(known.zone_ids[z] for z in order)
    return Known(known.plots, known.plants, ids, place[known.zone], known.names)


def _order(known: Known) -> list[int]:
    heights = zone_heights(known)
    if heights is not None:
        return [int(z) for z in np.argsort(heights[:, 1], kind="stable")]
    means = zone_means(known)
    if len(means) < 3:
        return list(range(len(means)))
    return correspondence_order(np.sqrt(means))


def zone_means(known: Known) -> NDArray[np.float64]:
    """Mean cover of every plant over all plots of a zone, [zone, plant] percent."""
    return np.asarray((group_sums(known.plots.cover, known.zone) / known.counts).T)


def zone_heights(known: Known) -> NDArray[np.float64] | None:
    """Lowest twentieth, middle and highest twentieth of heights by zone [m]; None if unknown."""
    heights = known.plots.place.get("height_m")
    if heights is None:
        return None
    made = []
    for z in range(len(known.zone_ids)):
        own = heights[known.zone == z]
        own = own[~np.isnan(own)]
        if len(own) < 2:
            return None
        made.append(np.quantile(own, [0.05, 0.5, 0.95]))
    return np.array(made)


def take(known: Known, rows: NDArray[Any]) -> Known:
    """Some of the plots, zones and plants as they were."""
    picked = np.flatnonzero(rows) if rows.dtype == bool else rows
    return Known(
        known.plots.take(picked), known.plants, known.zone_ids, known.zone[picked], known.names
    )
