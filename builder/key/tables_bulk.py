"""One row of numbers per possible answer, so that many plots are weighed by one product.

Row p * 6 + 0 is plant p not found, rows 1..5 found at cover step 0..3 and with no cover given.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.sparse import csr_array

from builder.key.answers import NO_COVER, azonal_share
from builder.key.context import GONE, Context, Quarters
from builder.key.prepare import Floats, Ints, Key
from builder.key.rounding import round_half_up

CHOICES = 6


@dataclass(frozen=True)
class AnswerTables:
    """What each answer of each plant says under one context.

    points [row, zone] centibans; counts [row] does it tell zones apart; best [row] its best
    zone's points where it is a find, else 0
    heard [row] does it enter the verdict; alone [row, zone], mixed [row, pair] logs of its
    chances, 0 where not heard
    plain [row] does it enter fit
    """

    points: Floats
    counts: NDArray[np.bool_]
    best: Floats
    heard: NDArray[np.bool_]
    alone: Floats
    mixed: Floats
    plain: NDArray[np.bool_]

    def summed(self, steps: NDArray[np.int8]) -> Summed:
        """Sums over each plot's answers; steps [plot, plant] as in plots.Plots."""
        zones, pairs = self.points.shape[1], self.mixed.shape[1]
        parts = (self.points, self.alone, self.mixed, self.counts, self.best, self.heard)
        table = np.column_stack([part.astype(float) for part in parts])
        sums = chosen_sums(steps, table)
        points, alone, mixed, rest = np.split(sums, [zones, 2 * zones, 2 * zones + pairs], axis=1)
        n, best, heard = rest.T
        return Summed(points, alone, mixed, n.astype(int), best.astype(int), heard.astype(int))


@dataclass(frozen=True)
class Summed:
    """By plot: points and alone [plot, zone], mixed [plot, pair], n, best and heard [plot]."""

    points: Floats
    alone: Floats
    mixed: Floats
    n: NDArray[np.int64]
    best: NDArray[np.int64]
    heard: NDArray[np.int64]


def chosen_sums(steps: NDArray[np.int8], table: Floats) -> Floats:
    """Sum of the table's rows that each plot chose, [plot, column].

    Where most plants are "not found" the sum starts from all of those and only the others are
    put right: 100 000 plots of 151 plants take 2 s instead of 7.
    """
    plants = np.arange(steps.shape[1])
    absent = steps == -1
    from_absent = 2 * int(absent.sum()) > steps.size
    plots, p = np.nonzero(~absent if from_absent else steps > -2)
    step = steps[plots, p]
    column, value = p * CHOICES + step + 1, np.where(step > -2, 1.0, 0.0)
    column = np.maximum(column, p * CHOICES)
    if from_absent:
        plots = np.concatenate([plots, plots])
        column = np.concatenate([column, p * CHOICES])
        value = np.concatenate([value, np.full(len(p), -1.0)])
    shape = (len(steps), len(table))
    chosen = csr_array((value, (plots, column)), shape=shape)
    base = table[plants * CHOICES].sum(axis=0) if from_absent else 0.0
    return np.asarray(chosen @ table + base)


def answer_tables(key: Key, context: Context) -> AnswerTables:
    """Tables of all plants' answers under a context."""
    found, absent, newcomer = _found(key, context), _absent(key, context), _newcomers(key, context)
    points = np.concatenate([absent[:, None, :], found], axis=1)
    points = azonal_share(key, context, points)
    counts = points.max(axis=2) - points.min(axis=2) >= 1
    weed = np.array([plant["weed"] != "none" for plant in key.pack["plants"]])
    best = np.where((np.arange(CHOICES) > 0) & ~weed[:, None], points.max(axis=2), 0)
    tabled = ~context.sown[:, None] & (newcomer < 0)
    heard = tabled & counts
    alone, mixed = _logs(key, context.v)
    rows = key.plants * CHOICES
    return AnswerTables(
        points.reshape(rows, -1).astype(float),
        counts.reshape(rows),
        best.reshape(rows).astype(float),
        heard.reshape(rows),
        np.where(heard[:, :, None], alone, 0.0).reshape(rows, -1),
        np.where(heard[:, :, None], mixed, 0.0).reshape(rows, -1),
        (tabled & (context.v > 0)[:, None]).reshape(rows),
    )


def _newcomers(key: Key, context: Context) -> Ints:
    """Row of the newcomer tables by plant and choice, -1 for none."""
    rows = np.full((key.plants, CHOICES), -1)
    for (p, level, half), row in key.newcomer_at.items():
        if level == context.newcomer:
            if not half:
                rows[p, 1:] = row
            if half == int(context.seen[p] == 1):
                rows[p, 0] = row
    return rows


def _found(key: Key, context: Context) -> Ints:
    base = key.found[:, NO_COVER, None]
    cover, weight = (one[:, None, None] for one in (context.cover_weight, context.found_weight))
    points = np.asarray(base + _quarters(key.found - base, cover), np.int32)
    rows = _newcomers(key, context)[:, 1]
    here = rows >= 0
    points[here] = key.newcomer_found[rows[here], context.kept[here]][:, None, :]
    points = _quarters(points, weight)
    points[context.sown] = 0
    return points


def _absent(key: Key, context: Context) -> Ints:
    plants = np.arange(key.plants)
    points = np.where((context.v > 0)[:, None], key.absent[plants, np.maximum(context.v - 1, 0)], 0)
    rows = _newcomers(key, context)[:, 0]
    here = rows >= 0
    points[here] = key.newcomer_absent[rows[here], context.v[here]]
    points[context.sown | (context.seen == GONE)] = 0
    return points


def _quarters(points: Ints, weight: Quarters) -> Ints:
    return np.where(weight == 4, points, round_half_up(points * weight / 4.0))


def _logs(key: Key, v: Quarters) -> tuple[Floats, Floats]:
    """Logs of chances [plant, 6, zone] and of shared plots [plant, 6, pair]."""
    made = key.kept.get("logs")
    if made is None:
        made = key.kept["logs"] = _found_logs(key), [_absent_logs(key, q) for q in range(5)]
    (alone, mixed), absent = made
    alone, mixed = alone.copy(), mixed.copy()
    for quarter in range(5):
        rows = v == quarter
        alone[rows, 0] = absent[quarter][0][rows]
        mixed[rows, 0] = absent[quarter][1][rows]
    return alone, mixed


def _found_logs(key: Key) -> tuple[Floats, Floats]:
    first, second, edge = key.pairs
    half = key.settings["mosaic_share"]
    presence = key.presence[:, None, :]
    whole = np.ones((key.plants, 1, key.zones))
    cover = np.concatenate([whole, key.cover, whole], axis=1)
    lowered = np.concatenate([whole, key.lowered, whole], axis=1)
    chance = presence * cover
    both = 1.0 - (1.0 - half * presence[..., first]) * (1.0 - half * presence[..., second])
    low = presence * lowered
    low = (low[..., first] + low[..., second]) / (presence[..., first] + presence[..., second])
    shared = np.where(edge, 0.5 * (chance[..., first] + chance[..., second]), both * low)
    return np.log(chance), np.log(shared)


def _absent_logs(key: Key, quarters: int) -> tuple[Floats, Floats]:
    first, second, edge = key.pairs
    seen = quarters / 4.0
    gone = key.settings["mosaic_share"] * seen
    presence = key.presence
    chance = 1.0 - seen * presence
    shared = (1.0 - gone * presence[:, first]) * (1.0 - gone * presence[:, second])
    pair = np.where(edge, 0.5 * (chance[:, first] + chance[:, second]), shared)
    return np.log(chance), np.log(pair)
