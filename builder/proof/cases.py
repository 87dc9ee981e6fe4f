"""Labelled cases for verdicts: inside a zone, on an edge, in a mosaic, and of no zone known.

Two makers of each kind, so that thresholds never meet in a test what they were set on. For known
plots, edges and mosaics come from pairs of real plots.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from builder.key import simulate
from builder.key.compile import Arrays
from builder.key.cover import cover_step
from builder.key.plots import ABSENT, Plots
from builder.key.prepare import Floats, Key
from builder.key.usual import mean_cover_pct
from builder.proof import simulator

Whole = NDArray[np.int64]
WORLDS = 3
"""Truths drawn for one set of cases: tables err in another way in each."""


@dataclass(frozen=True)
class Traits:
    """What the generators need of plants: layer and response, [plant]."""

    layer: list[str]
    response: list[str]


@dataclass(frozen=True)
class Case:
    """Sites of one kind. zones [site, 2]: the true zone or both; -1 where none is known."""

    plots: Plots
    zones: Whole


Maker = Callable[[np.random.Generator, int], dict[str, Case]]


def zone_pairs(key: Key) -> tuple[Whole, Whole]:
    """Pairs of neighbours and pairs of others, [pair, 2]."""
    first, second, edge = key.pairs
    pairs = np.column_stack([first, second])
    return pairs[edge], pairs[~edge]


def join(parts: list[Plots]) -> Plots:
    """Plots one after the other."""
    return Plots(
        [one for part in parts for one in part.ids],
        np.concatenate([part.steps for part in parts]),
        np.concatenate([part.cover for part in parts]),
    )


def proof_cases(
    key: Key,
    arrays: Arrays,
    traits: Traits,
    rng: np.random.Generator,
    count: int,
    person: simulator.Person = simulator.FORGETFUL,
) -> dict[str, Case]:
    """Cases by the proof's own generator. count sites of each kind."""
    near, far = zone_pairs(key)
    made: dict[str, list[tuple[Plots, Whole]]] = {"zone": [], "edge": [], "mosaic": []}
    for _ in range(WORLDS):
        world = simulator.world_of(arrays, traits.layer, traits.response, rng)
        some = -(-count // WORLDS)
        zones = rng.integers(key.zones, size=some)
        made["zone"].append(
            (simulator.observe(*simulator.pure(world, zones, rng), person, rng), _twice(zones))
        )
        for name, pairs, mix in (
            ("edge", near, simulator.edges),
            ("mosaic", far, simulator.mosaics),
        ):
            if len(pairs):
                both = pairs[rng.integers(len(pairs), size=some)]
                made[name].append((simulator.observe(*mix(world, both, rng), person, rng), both))
    return _joined(made)


def setting_cases(
    key: Key, arrays: Arrays, traits: Traits, rng: np.random.Generator, count: int
) -> dict[str, Case]:
    """Cases by the generator that sets thresholds (builder.key.simulate): each plant of an edge
    plot comes from either side, a mosaic plot holds the most of both sides."""
    near, far = zone_pairs(key)
    field = simulate.Field(table_plots=float(np.median(arrays.plots)))
    made: dict[str, list[tuple[Plots, Whole]]] = {"zone": [], "edge": [], "mosaic": []}
    for _ in range(WORLDS):
        truth = simulate.erring_truth(
            arrays.present / arrays.plots, filled_cover(arrays), traits.layer, field, rng
        )
        some = -(-count // WORLDS)
        zones = rng.integers(key.zones, size=some)
        plain = simulate.draw(truth, zones, field, rng)
        made["zone"].append((simulate.observe(*plain, field, rng), _twice(zones)))
        for name, pairs in (("edge", near), ("mosaic", far)):
            if not len(pairs):
                continue
            both = pairs[rng.integers(len(pairs), size=some)]
            sides = [simulate.draw(truth, both[:, side], field, rng) for side in (0, 1)]
            mixed = _either(sides, rng) if name == "edge" else _most_of(sides, rng)
            made[name].append((simulate.observe(*mixed, field, rng), both))
    return _joined(made)


def filled_cover(arrays: Arrays) -> Floats:
    """Mean cover with a plant's own mean, or 2 percent, where a zone never held it."""
    cover = np.asarray(mean_cover_pct(arrays), float)
    known = ~np.isnan(cover)
    own = np.where(known, cover, 0.0).sum(axis=1) / np.maximum(known.sum(axis=1), 1)
    own = np.where(known.any(axis=1), own, 2.0)
    return np.where(known, cover, own[:, None])


def _either(
    sides: list[tuple[NDArray[np.bool_], Floats]], rng: np.random.Generator
) -> tuple[NDArray[np.bool_], Floats]:
    (here, much), (there, more) = sides
    first = rng.random(here.shape) < 0.5
    return np.where(first, here, there), np.where(first, much, more)


def _most_of(
    sides: list[tuple[NDArray[np.bool_], Floats]], rng: np.random.Generator
) -> tuple[NDArray[np.bool_], Floats]:
    (here, much), (there, more) = sides
    here = here & (rng.random(here.shape) < 0.85)
    there = there & (rng.random(there.shape) < 0.85)
    cover = 0.5 * np.where(here, much, 0.0) + 0.5 * np.where(there, more, 0.0)
    return here | there, np.clip(cover, 0.05, 99.0)


def plot_pairs(
    plots: Plots, zone: Whole, pairs: Whole, count: int, way: str, rng: np.random.Generator
) -> Case:
    """Edges or mosaics from pairs of real plots of the two zones.

    way  "either": each plant as on one of the two plots; "patches": found where either holds it,
         at the mean cover of the two
    """
    both = pairs[rng.integers(len(pairs), size=count)]
    rows = np.array([[rng.choice(np.flatnonzero(zone == z)) for z in pair] for pair in both])
    one, two = plots.take(rows[:, 0]), plots.take(rows[:, 1])
    if way == "either":
        first = rng.random(one.steps.shape) < 0.5
        cover = np.where(first, one.cover, two.cover)
        found = np.where(first, one.steps >= 0, two.steps >= 0)
    else:
        share = rng.uniform(0.35, 0.65, (count, 1))
        cover = share * one.cover + (1.0 - share) * two.cover
        found = (one.steps >= 0) | (two.steps >= 0)
    steps = np.where(found, cover_step(cover), ABSENT).astype(np.int8)
    return Case(Plots([f"p{at}" for at in range(count)], steps, cover.astype(np.float32)), both)


def _twice(zones: Whole) -> Whole:
    return np.column_stack([zones, zones])


def _joined(made: dict[str, list[tuple[Plots, Whole]]]) -> dict[str, Case]:
    return {
        name: Case(join([plots for plots, _ in parts]), np.concatenate([z for _, z in parts]))
        for name, parts in made.items()
        if parts
    }
