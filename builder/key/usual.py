"""What fit is usual in each zone, learned on simulated plots of that zone.

Surprise and miss differ between zones that are rich and poor in plants; a site is compared with
the usual of its leading zone at about as many plants asked.
"""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key import simulate
from builder.key.bulk_fit import fit_measures
from builder.key.bulk_ground import ground_of
from builder.key.bulk_session import go_on, hear_all, hear_session
from builder.key.compile import Arrays
from builder.key.context import context_of
from builder.key.plots import Plots
from builder.key.prepare import Pack, prepare
from builder.key.tables_bulk import answer_tables

BANDS: tuple[tuple[int | None, int], ...] = ((4, 5), (8, 10), (14, 20), (None, 9999))
"""Answers given in the session that stands for a band, and the most plants asked in the band."""
FEWEST = 4
SITES_PER_ZONE = 60
SEED = 20260101
LEAST_SPREAD = 0.02
DIGITS = 4


def usual_fit(pack: Pack, arrays: Arrays, sites_per_zone: int = SITES_PER_ZONE) -> list[Any]:
    """Means and spreads of surprise and miss by zone, for settings.fit.

    pack    a pack whose settings.fit is not needed yet
    arrays  the counts behind it
    """
    trial = {**pack, "settings": {**pack["settings"], "sure": 2.0, "least_gain": -9.0}}
    key = prepare(trial)
    zones, plots = simulated_plots(pack, arrays, sites_per_zone)
    context = context_of(key, {})
    tables = answer_tables(key, context)
    made = []
    ground = ground_of(key, context, plots)
    heard = hear_session(key, context, tables, plots, ground, FEWEST)
    for answers, asked_to in BANDS:
        if answers is None:
            heard = hear_all(key, context, plots, ground)
        else:
            go_on(key, context, tables, plots, heard, answers)
        surprise, _, miss, _ = fit_measures(key, context, tables, heard, zones[:, None])
        made.append({"asked_to": asked_to, **_by_zone(zones, surprise, miss)})
    return made


def simulated_plots(
    pack: Pack, arrays: Arrays, sites_per_zone: int, seed: int = SEED
) -> tuple[Any, Plots]:
    """True zones [plot] and plots as a careful person writes them down, on undisturbed ground."""
    rng = np.random.default_rng(seed)
    field = simulate.Field(table_plots=float(np.median(arrays.plots)))
    layer = [plant["layer"] for plant in pack["plants"]]
    mean = mean_cover_pct(arrays)
    zones = np.repeat(np.arange(len(pack["zones"])), sites_per_zone)
    parts = []
    for turn in range(4):
        truth = simulate.erring_truth(arrays.present / arrays.plots, mean, layer, field, rng)
        part = np.flatnonzero(np.arange(len(zones)) % 4 == turn)
        present, cover = simulate.draw(truth, zones[part], field, rng)
        parts.append((part, simulate.observe(present, cover, field, rng)))
    order = np.argsort(np.concatenate([part for part, _ in parts]))
    steps = np.concatenate([plots.steps for _, plots in parts])[order]
    covers = np.concatenate([plots.cover for _, plots in parts])[order]
    return zones, Plots([str(at) for at in range(len(zones))], steps, covers)


def mean_cover_pct(arrays: Arrays) -> Any:
    """Mean cover where present, [plant, zone] percent, from means or from counts by step."""
    if arrays.cover_mean_pct is not None:
        return arrays.cover_mean_pct
    middles = np.array([0.5, 3.0, 15.0, 45.0])
    if arrays.cover_counts is None:
        return np.full(arrays.present.shape, 5.0)
    total = arrays.cover_counts.sum(axis=1)
    summed = (arrays.cover_counts * middles[None, :, None]).sum(axis=1)
    return np.where(total > 0, summed / np.maximum(total, 1), np.nan)


def _by_zone(zones: Any, surprise: Any, miss: Any) -> dict[str, list[float]]:
    made: dict[str, list[float]] = {}
    for name, values in (("surprise", surprise), ("miss", miss)):
        groups = [values[zones == z] for z in range(int(zones.max()) + 1)]
        made[name] = [round(float(one.mean()), DIGITS) for one in groups]
        made[f"{name}_sd"] = [round(max(float(one.std()), LEAST_SPREAD), DIGITS) for one in groups]
    return made
