"""Simulated plots of a region: plants that vary together, tables that err, people who miss.

Used to learn what is usual in a zone and to set verdict thresholds. Every figure made with it is
called simulated; the proof tests with another generator.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.special import ndtri

from builder.key.cover import cover_step
from builder.key.plots import ABSENT, Plots

Floats = NDArray[np.float64]


@dataclass(frozen=True)
class Truth:
    """What really stands in the zones, [plant, zone]: chance of presence and mean cover [percent].

    layer [plant] names the layer, whose plants vary together
    """

    chance: Floats
    cover_pct: Floats
    layer: list[str]


@dataclass(frozen=True)
class Field:
    """How plots and people vary.

    shared_layer  loading of the plot's layer factor, shared_plot of its richness (standard normal)
    table_plots   plots' worth of knowledge behind the tables; cover_sd_log error of mean cover
    overlooked, wrongly_named  chances of the person, 0..1
    """

    shared_layer: float = 0.45
    shared_plot: float = 0.25
    table_plots: float = 20.0
    cover_sd_log: float = 0.4
    overlooked: float = 0.10
    wrongly_named: float = 0.005


def erring_truth(
    constancy: Floats, cover_pct: Floats, layer: list[str], field: Field, rng: np.random.Generator
) -> Truth:
    """A truth that tables of table_plots plots could have come from.

    chance ~ Beta(n c + mean, n (1 - c) + 1 - mean), mean the plant's over the zones.
    """
    n = field.table_plots
    mean = constancy.mean(axis=1, keepdims=True)
    chance = rng.beta(n * constancy + mean + 1e-6, n * (1 - constancy) + 1 - mean + 1e-6)
    known = ~np.isnan(cover_pct)
    held = known.sum(axis=1, keepdims=True)
    own = np.where(known, cover_pct, 0.0).sum(axis=1, keepdims=True) / np.maximum(held, 1)
    base = np.where(known, cover_pct, np.where(held > 0, own, 2.0))
    error = np.exp(field.cover_sd_log * rng.standard_normal(base.shape))
    return Truth(chance, np.clip(base * error, 0.1, 95.0), layer)


def draw(
    truth: Truth, zones: NDArray[np.int64], field: Field, rng: np.random.Generator
) -> tuple[NDArray[np.bool_], Floats]:
    """Presence [plot, plant] and cover where present [percent] on plots of these zones."""
    plots, plants = len(zones), len(truth.chance)
    names = sorted(set(truth.layer))
    at = np.array([names.index(one) for one in truth.layer])
    layer = rng.standard_normal((plots, len(names)))[:, at]
    rich = rng.standard_normal((plots, 1))
    own = rng.standard_normal((plots, plants))
    rest = np.sqrt(1 - field.shared_layer**2 - field.shared_plot**2)
    latent = field.shared_layer * layer + field.shared_plot * rich + rest * own
    present = latent < ndtri(np.clip(truth.chance[:, zones].T, 1e-6, 1 - 1e-6))
    mean = truth.cover_pct[:, zones].T / 100.0
    phi = 1.5 + 0.6 / mean
    cover = 100.0 * rng.beta(mean * phi, (1 - mean) * phi)
    return present, np.maximum(cover, 0.05)


def observe(
    present: NDArray[np.bool_], cover_pct: Floats, field: Field, rng: np.random.Generator
) -> Plots:
    """What a person who searches the whole plot writes down."""
    missed = rng.random(present.shape) < field.overlooked
    wrong = rng.random(present.shape) < field.wrongly_named
    found = np.where(present, ~missed, wrong)
    cover = np.where(found, np.where(present, cover_pct, 0.5), 0.0)
    steps = np.where(found, cover_step(cover), ABSENT).astype(np.int8)
    ids = [f"s{at:06d}" for at in range(len(present))]
    return Plots(ids, steps, cover.astype(np.float32))
