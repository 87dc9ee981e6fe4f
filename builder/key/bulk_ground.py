"""Ground answers, height and state of many plots."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.answers import azonal_share, quarters
from builder.key.chance import question_chances
from builder.key.context import Context
from builder.key.height import heat_share, height_points_at
from builder.key.plots import Plots
from builder.key.prepare import Floats, Ints, Key


@dataclass
class Ground:
    """What ground answers and height say of a batch of plots.

    points [plot, zone], n [plot]; alone [plot, zone] and mixed [plot, pair] logs of chances;
    heard [plot] answers in those; height [plot, zone] centibans
    """

    points: Ints
    n: NDArray[np.int64]
    alone: Floats
    mixed: Floats
    heard: NDArray[np.int64]
    height: Ints


def ground_of(key: Key, context: Context, plots: Plots) -> Ground:
    """Answers to ground questions and the points of height, for plots of one context."""
    zones, pairs = key.zones, len(key.pairs[0])
    count = len(plots)
    made = Ground(
        np.zeros((count, zones), np.int32),
        np.zeros(count, int),
        np.zeros((count, zones)),
        np.zeros((count, pairs)),
        np.zeros(count, int),
        _heights(key, context, plots),
    )
    for at, question in enumerate(key.pack["questions"]):
        given = plots.answers.get(question["id"])
        if given is None:
            continue
        for step, answer in enumerate(question["answers"]):
            rows = np.array([value == answer["value"] for value in given], bool)
            if rows.any() and answer.get("evidence"):
                add_question(key, context, made, rows, (at, step))
    return made


def add_question(
    key: Key, context: Context, ground: Ground, rows: NDArray[np.bool_], answer: tuple[int, int]
) -> None:
    """Count a ground answer (question and answer index) in, for these plots."""
    at, step = answer
    question = key.pack["questions"][at]
    weight = context.question_weight.get(question["id"], 4)
    evidence = np.array(question["answers"][step]["evidence"], np.int32)
    points = azonal_share(key, context, quarters(evidence, weight))
    ground.points[rows] += points
    counts = bool(points.max() - points.min() >= 1)
    ground.n[rows] += counts
    if counts and weight == 4:
        alone = question_chances(key, at)[step]
        first, second, _ = key.pairs
        ground.alone[rows] += np.log(alone)
        ground.mixed[rows] += np.log(0.5 * (alone[first] + alone[second]))
        ground.heard[rows] += 1


def add_rule(key: Key, context: Context, ground: Ground, rule: dict[str, Any]) -> None:
    """Count a habitat rule in that holds on all these plots."""
    if rule.get("evidence"):
        points = azonal_share(key, context, np.array(rule["evidence"], np.int32))
        ground.points += points
        ground.n += bool(points.max() - points.min() >= 1)


def _heights(key: Key, context: Context, plots: Plots) -> Ints:
    points = np.zeros((len(plots), key.zones), np.int32)
    height = plots.place.get("height_m")
    if height is None or context.height_off:
        return points
    known = ~np.isnan(height)
    heat = np.array([heat_share(key, plots.site(int(at), None, None)) for at in known.nonzero()[0]])
    if known.any():
        points[known] = height_points_at(key, height[known] + context.elevation_shift_m, heat)
    return points
