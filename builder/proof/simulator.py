"""Simulated sites of a region, for tests of the key: another generator than the one that sets its
thresholds (builder.key.simulate).

Plants vary together through five factors of the plot: where it lies within its zone's gradient,
how closed the canopy is, how disturbed it was, how rich it is, and which plants the neighbourhood
holds. Loadings follow the tables (a plant of higher zones loads up the gradient) and layers; their
sizes were matched to open plots: richness varies about twice as much as independence gives.
"""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray
from scipy.special import expit, logit, ndtri

from builder.key.compile import Arrays
from builder.key.cover import cover_step
from builder.key.plots import ABSENT, Plots
from builder.key.usual import mean_cover_pct

Floats = NDArray[np.float64]
Whole = NDArray[np.int64]
FACTORS = {"gradient": 0.80, "canopy": 0.70, "disturbance": 0.70, "richness": 0.20}
LOCAL_POOL = 0.50
RESIDUAL = 1.9
LAYER_CANOPY = {"tree": 1.0, "shrub": 0.3, "dwarf_shrub": -0.2, "grass": -0.6, "forb": -0.3}
RESPONSE_DISTURBED = {"decreaser": -1.0, "increaser": 0.6, "invader": 1.2, "pioneer": 1.0}
FEWEST, MOST = 1e-4, 1 - 1e-4


@dataclass(frozen=True)
class Person:
    """Who looks: chances to overlook a plant that is there and to name one that is not, 0..1."""

    overlooked: float = 0.10
    wrongly_named: float = 0.005


CAREFUL = Person(0.03, 0.001)
FORGETFUL = Person(0.10, 0.002)
MISTAKEN = Person(0.10, 0.01)


@dataclass(frozen=True)
class World:
    """A truth that the region's tables could have come from.

    chance    [plant, zone] chance of presence; cover_pct [plant, zone] mean cover where present
    loading   [plant, factor] of gradient, canopy, disturbance, richness
    """

    chance: Floats
    cover_pct: Floats
    loading: Floats


def world_of(
    arrays: Arrays,
    layer: list[str],
    response: list[str],
    rng: np.random.Generator,
    table_plots: float = 20.0,
    cover_error_sd_log: float = 0.4,
) -> World:
    """A truth around the tables: chance ~ Beta(n c + mean, n (1 - c) + 1 - mean).

    table_plots  plots' worth of knowledge behind the tables, n
    """
    constancy = arrays.present / arrays.plots
    mean = constancy.mean(axis=1, keepdims=True)
    first = table_plots * constancy + mean + 1e-3
    second = table_plots * (1.0 - constancy) + 1.0 - mean + 1e-3
    chance = np.clip(rng.beta(first, second), FEWEST, MOST)
    cover = mean_cover_pct(arrays)
    own = np.array([row[~np.isnan(row)].mean() if (~np.isnan(row)).any() else 2.0 for row in cover])
    cover = np.where(np.isnan(cover), own[:, None], cover)
    cover = cover * np.exp(cover_error_sd_log * rng.standard_normal(cover.shape))
    return World(chance, np.clip(cover, 0.2, 90.0), _loadings(constancy, layer, response))


def _loadings(constancy: Floats, layer: list[str], response: list[str]) -> Floats:
    at = np.arange(constancy.shape[1]) / max(constancy.shape[1] - 1, 1)
    middle = (constancy * at).sum(axis=1) / np.maximum(constancy.sum(axis=1), 1e-9)
    gradient = np.tanh(6.0 * (middle - at.mean()))
    canopy = np.array([LAYER_CANOPY.get(one, 0.0) for one in layer])
    disturbed = np.array([RESPONSE_DISTURBED.get(one, 0.0) for one in response])
    return np.column_stack([gradient, canopy, disturbed, np.ones(len(layer))])


def draw(
    world: World, chance: Floats, cover_pct: Floats, rng: np.random.Generator
) -> tuple[NDArray[np.bool_], Floats]:
    """Presence [plot, plant] and cover where present [percent].

    chance, cover_pct  [plot, plant] of each plot's own ground
    """
    plots, plants = chance.shape
    sizes = np.array(list(FACTORS.values()))
    state = rng.standard_normal((plots, len(sizes))) * sizes
    pool = LOCAL_POOL * rng.standard_normal((plots // 4 + 1, plants)).repeat(4, axis=0)[:plots]
    moved = state @ world.loading.T
    latent = moved + pool + RESIDUAL * rng.standard_normal((plots, plants))
    spread = np.sqrt(RESIDUAL**2 + LOCAL_POOL**2 + ((sizes * world.loading) ** 2).sum(axis=1))
    present = latent > -ndtri(chance) * spread
    mean = cover_pct / 100.0
    precision = 1.5 + 0.6 / mean
    cover = 100.0 * rng.beta(mean * precision, (1.0 - mean) * precision)
    return present, np.clip(cover, 0.1, 99.0)


def observe(
    present: NDArray[np.bool_], cover_pct: Floats, person: Person, rng: np.random.Generator
) -> Plots:
    """What a person who searches the plot writes down."""
    seen = present & (rng.random(present.shape) >= person.overlooked)
    wrong = ~present & (rng.random(present.shape) < person.wrongly_named)
    cover = np.where(seen, cover_pct, np.where(wrong, 0.5, 0.0))
    steps = np.where(seen | wrong, cover_step(cover), ABSENT).astype(np.int8)
    return Plots([f"s{at}" for at in range(len(steps))], steps, cover.astype(np.float32))


def pure(world: World, zones: Whole, rng: np.random.Generator) -> tuple[NDArray[np.bool_], Floats]:
    """Sites well inside a zone. zones [plot]"""
    return draw(world, world.chance.T[zones], world.cover_pct.T[zones], rng)


def edges(world: World, pairs: Whole, rng: np.random.Generator) -> tuple[NDArray[np.bool_], Floats]:
    """Sites between two zones that shade into each other: log odds part of the way.

    pairs [plot, 2] zones; the way from the first is 0.35 to 0.65
    """
    way = rng.uniform(0.35, 0.65, (len(pairs), 1))
    first, second = world.chance.T[pairs[:, 0]], world.chance.T[pairs[:, 1]]
    odds = (1.0 - way) * logit(first) + way * logit(second)
    covers = world.cover_pct.T
    cover = (1.0 - way) * covers[pairs[:, 0]] + way * covers[pairs[:, 1]]
    mixed = 0.5 * expit(odds) + 0.5 * ((1.0 - way) * first + way * second)
    return draw(world, mixed, cover, rng)


def mosaics(
    world: World, pairs: Whole, rng: np.random.Generator
) -> tuple[NDArray[np.bool_], Floats]:
    """Sites with patches of two zones, each 0.35 to 0.65 of the plot; half a plot holds less."""
    share = rng.uniform(0.35, 0.65, (len(pairs), 1))
    present = np.zeros((len(pairs), len(world.chance)), bool)
    cover = np.zeros(present.shape)
    for side, part in ((0, share), (1, 1.0 - share)):
        chance = 1.0 - (1.0 - world.chance.T[pairs[:, side]]) ** (part**0.25)
        here, much = draw(world, chance, world.cover_pct.T[pairs[:, side]], rng)
        present |= here
        cover += np.where(here, much * part, 0.0)
    return present, np.clip(cover, 0.1, 99.0)


def remnants(
    present: NDArray[np.bool_], kept: Floats, comes: Floats, rng: np.random.Generator
) -> NDArray[np.bool_]:
    """What is left after a disturbance and what has come since. kept, comes [plant], 0..1"""
    left = present & (rng.random(present.shape) < kept)
    return np.asarray(left | (rng.random(present.shape) < comes))


def out_of_season(plots: Plots, hidden: NDArray[np.bool_]) -> Plots:
    """The same plots when some plants cannot be seen. hidden [plant]"""
    steps, cover = plots.steps.copy(), plots.cover.copy()
    steps[:, hidden], cover[:, hidden] = ABSENT, 0.0
    return replace(plots, steps=steps, cover=cover)
