"""What plots held out of the counts teach about fit and verdicts: usual fit, lines and thin."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk_fit import fit_measures
from builder.key.compile import Arrays
from builder.key.context import context_of
from builder.key.defaults import SESSION
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key
from builder.key.tables_bulk import answer_tables
from builder.key.usual import BANDS, DIGITS, LEAST_SPREAD
from builder.key.weigh import Weights
from builder.proof.calls import ASK_ON, call_sites
from builder.proof.cases import plot_pairs, zone_pairs
from builder.proof.estimate import key_for
from builder.proof.thresholds import fit_lines, measures, thin_line

Whole = NDArray[np.int64]
ANSWERS = 8
PULL_PLOTS = 5.0
"""Plots' worth of pull of a zone's usual fit towards that of all zones."""
FEWEST_CASES = 40


@dataclass(frozen=True)
class Part:
    """A key and plots that its counts have never seen."""

    arrays: Arrays
    weights: Weights
    plots: Plots
    zone: Whole

    def key(self, session: dict[str, Any], near: Sequence[set[int]]) -> Key:
        """The key with session figures."""
        return key_for(self.arrays, self.weights, {**session, **ASK_ON}, near)


def session_figures(
    parts: list[Part], session: dict[str, Any], near: Sequence[set[int]], rng: np.random.Generator
) -> dict[str, Any]:
    """Usual fit, verdict lines and the thin line for a region with known plots.

    session  drag and weight of implication; near: neighbours of each zone
    """
    thin = SESSION["thin"]
    usual = _usual_rows(parts, session, near)
    made: dict[str, Any] = {**session, "fit": usual}
    cases = _measured(parts, made, near, rng)
    made |= fit_lines({name: told for name, (told, _, _) in cases.items()})
    _, finds, stated = cases["zone"]
    made["thin"] = {**thin, "finds_cb": thin_line(finds, stated, thin)}
    return made


def _usual_rows(
    parts: list[Part], session: dict[str, Any], near: Sequence[set[int]]
) -> list[dict[str, Any]]:
    rows = []
    for answers, asked_to in BANDS:
        surprise, miss, zone = [], [], []
        for part in parts:
            key = part.key(session, near)
            context = context_of(key, {})
            heard = call_sites(_with_some_usual(key), part.plots, answers).heard
            told, named, missed, _ = fit_measures(
                key, context, answer_tables(key, context), heard, part.zone[:, None]
            )
            surprise.append(np.where(named, told, np.nan))
            miss.append(missed)
            zone.append(part.zone)
        truth = np.concatenate(zone)
        row: dict[str, Any] = {"asked_to": asked_to}
        for name, values in (("surprise", surprise), ("miss", miss)):
            means, spreads = _pulled(np.concatenate(values), truth, len(near))
            row[name] = [round(float(one), DIGITS) for one in means]
            row[f"{name}_sd"] = [round(float(one), DIGITS) for one in spreads]
        rows.append(row)
    return rows


def _with_some_usual(key: Key) -> Key:
    """A key that may be asked for calls while what is usual is still being learned."""
    names = ("surprise", "surprise_sd", "miss", "miss_sd")
    flat = [{"asked_to": 9999, **{name: [1.0] * key.zones for name in names}}]
    return replace(key, pack={**key.pack, "settings": {**key.settings, "fit": flat}})


def _pulled(values: Floats, zone: Whole, zones: int) -> tuple[Floats, Floats]:
    """Means and spreads by zone, drawn towards those of all plots."""
    there = ~np.isnan(values)
    if not there.any():
        return np.zeros(zones), np.ones(zones)
    middle, spread = float(values[there].mean()), float(values[there].std())
    means, spreads = np.zeros(zones), np.zeros(zones)
    for z in range(zones):
        own = values[there & (zone == z)]
        weight = len(own) + PULL_PLOTS
        means[z] = (own.sum() + PULL_PLOTS * middle) / weight
        squares = ((own - means[z]) ** 2).sum() + PULL_PLOTS * spread**2
        spreads[z] = max(np.sqrt(squares / weight), LEAST_SPREAD)
    return means, spreads


def _measured(
    parts: list[Part], session: dict[str, Any], near: Sequence[set[int]], rng: np.random.Generator
) -> dict[str, tuple[Floats, Floats, Floats]]:
    """Measures [case, 3], finds and stated belief [case] of held-out cases by true verdict."""
    made: dict[str, list[tuple[Floats, Floats, Floats]]] = {}
    for part in parts:
        key = part.key(session, near)
        made.setdefault("zone", []).append(_told(key, part.plots))
        count = max(len(part.zone), FEWEST_CASES)
        present = set(part.zone.tolist())
        for name, pairs in zip(("edge", "mosaic"), zone_pairs(key), strict=True):
            usable = np.array([pair for pair in pairs.tolist() if set(pair) <= present], int)
            if len(usable):
                way = "either" if name == "edge" else "patches"
                case = plot_pairs(part.plots, part.zone, usable, count, way, rng)
                made.setdefault(name, []).append(_told(key, case.plots))
        for z in sorted(present):
            if len(near) > 2:
                rows = np.flatnonzero(part.zone == z)
                blind = withheld_key(part, session, near, z)
                made.setdefault("misfit", []).append(_told(blind, part.plots.take(rows)))
    return {
        name: (
            np.concatenate([one[0] for one in rows]),
            np.concatenate([one[1] for one in rows]),
            np.concatenate([one[2] for one in rows]),
        )
        for name, rows in made.items()
    }


def _told(key: Key, plots: Plots) -> tuple[Floats, Floats, Floats]:
    calls = call_sites(key, plots, ANSWERS)
    return measures(key, calls), calls.finds_cb.astype(float), calls.stated


def withheld_key(part: Part, session: dict[str, Any], near: Sequence[set[int]], z: int) -> Key:
    """The same key without one of its zones."""
    kept = [one for one in range(len(near)) if one != z]
    place = {zone: at for at, zone in enumerate(kept)}
    arrays = part.arrays
    smaller = replace(
        arrays,
        present=arrays.present[:, kept],
        plots=arrays.plots[kept],
        cover_counts=None if arrays.cover_counts is None else arrays.cover_counts[:, :, kept],
        found_correction=_cut(arrays.found_correction, kept),
        absent_correction=_cut(arrays.absent_correction, kept),
        prior=None if arrays.prior is None else arrays.prior[kept],
    )
    fewer = [{place[one] for one in near[zone] if one != z} for zone in kept]
    fit = [
        {
            name: value if name == "asked_to" else [value[k] for k in kept]
            for name, value in row.items()
        }
        for row in session.get("fit", [])
    ]
    return key_for(smaller, part.weights, {**session, **ASK_ON, "fit": fit}, fewer)


def _cut(values: Floats | None, kept: list[int]) -> Floats | None:
    return None if values is None else values[..., kept]
