"""Belief of many plots at once from what was heard on them."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from builder.key.belief import belief_of, drag_of
from builder.key.bulk_ground import Ground
from builder.key.context import Context
from builder.key.prepare import Floats, Ints, Key
from builder.key.rounding import round_half_up
from builder.key.tables_bulk import AnswerTables, Summed


@dataclass
class Heard:
    """What was answered on a batch of plots.

    steps    [plot, plant] int8, as in Plots, -2 where not asked
    named    [plot, 3] plants named as most plentiful, -1 for none
    bound    [plot] lowest cover step named, -1 where it implies nothing
    ground   ground answers counted in; asked [plot] answers given
    """

    steps: NDArray[np.int8]
    named: NDArray[np.int64]
    bound: NDArray[np.int64]
    ground: Ground
    asked: NDArray[np.int64]


@dataclass
class Weighing:
    """Belief of a batch of plots: [plot, zone] and what it was made of."""

    summed: Summed
    n: NDArray[np.int64]
    drag: Floats
    belief: Floats


def weigh_many(key: Key, context: Context, tables: AnswerTables, heard: Heard) -> Weighing:
    """Belief of every plot of a batch from what was heard."""
    summed = tables.summed(heard.steps)
    points = summed.points + heard.ground.points
    n = summed.n + heard.ground.n
    drag = np.asarray(drag_of(key, n))
    implied = implied_many(key, context, heard)
    total = key.area + heard.ground.height + (points + implied) / drag[:, None]
    return Weighing(summed, n, drag, belief_of(key, total))


def implied_many(key: Key, context: Context, heard: Heard) -> Ints:
    """What the names given say of plants not asked, [plot, zone] centibans."""
    free = (context.v == 4) & ~context.sown
    points = np.zeros((len(heard.steps), key.zones))
    for bound in range(3):
        rows = heard.bound == bound
        if rows.any() and free.any() and (heard.steps[rows] == -2).any():
            is_open = (heard.steps[rows] == -2) & free
            points[rows] = is_open.astype(float) @ key.implied[:, bound]
    return round_half_up(points * key.settings["implied_weight"])
