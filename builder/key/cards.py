"""The points card: whole decibans of the commonest plants, added up by hand.

A plant that is found gives each zone its points; the zone with the most is the call. What is not
found gives nothing, so a forgetful hand loses little.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from builder.key.compile import Arrays
from builder.key.plots import Plots
from builder.key.prepare import Pack, prepare
from builder.key.rounding import round_half_up

CENTIBANS_PER_DECIBAN = 10
MOST_PLANTS = 100
COMMON_SHARE = 0.25
"""A plant of a quarter of some zone's plots is common."""


@dataclass(frozen=True)
class PointsCard:
    """plants [row] indexes of the pack, in its order; points_db [row, zone] whole decibans."""

    plants: tuple[int, ...]
    points_db: NDArray[np.int32]


def make_card(pack: Pack, arrays: Arrays, most: int = MOST_PLANTS) -> PointsCard:
    """The card: common plants that tell zones apart, weeds left out, the most telling first."""
    key = prepare(pack)
    decibans = round_half_up(key.found[:, 4] / CENTIBANS_PER_DECIBAN)
    share = (arrays.present / arrays.plots).max(axis=1)
    weed = np.array([plant["weed"] != "none" for plant in pack["plants"]])
    telling = share * (decibans.max(axis=1) - decibans.min(axis=1))
    telling = np.where(weed | (share < COMMON_SHARE), -1.0, telling)
    chosen = [int(p) for p in np.argsort(-telling, kind="stable")[:most] if telling[p] > 0]
    rows = sorted(chosen)
    return PointsCard(tuple(rows), decibans[rows])


def card_calls(card: PointsCard, plots: Plots, most: int) -> NDArray[np.int64]:
    """Zone by the card from the plants of most cover that stand on it, [plot]; -1 without any.

    most  plants looked up
    """
    rows = list(card.plants)
    cover = np.where(plots.steps[:, rows] >= 0, np.maximum(plots.cover[:, rows], 1e-6), 0.0)
    order = np.argsort(-cover, axis=1, kind="stable")[:, :most]
    used = np.take_along_axis(cover, order, axis=1) > 0
    points = np.where(used[:, :, None], card.points_db[order], 0).sum(axis=1)
    return np.where(used.any(axis=1), points.argmax(axis=1), -1)
