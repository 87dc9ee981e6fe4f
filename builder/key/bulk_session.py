"""How a person would answer, on many plots at once: names first, then the key's own prompts."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk_ground import Ground, add_question
from builder.key.bulk_weigh import Heard, weigh_many
from builder.key.context import NOW, Context
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key
from builder.key.prompt import MICRO, mutual_information, plant_prices, question_gain
from builder.key.rounding import round6
from builder.key.tables_bulk import AnswerTables

NAMES = 3


def hear_all(key: Key, context: Context, plots: Plots, ground: Ground) -> Heard:
    """Every searched plant is an answer; the most plentiful count as named."""
    named, bound = names_of(key, context, plots, NAMES)
    asked = (plots.steps > -2).sum(axis=1) + ground.n
    return Heard(plots.steps, named, bound, ground, asked)


def names_of(
    key: Key, context: Context, plots: Plots, most: int
) -> tuple[NDArray[np.int64], NDArray[np.int64]]:
    """Up to three plants of most cover, [plot, 3], -1 for none, and the lowest step named.

    On disturbed ground neither weeds nor what may have been sown. Ties keep the pack's order.
    """
    cover = np.where(plots.steps >= 0, np.maximum(plots.cover, 1e-6), 0.0)
    if context.disturbed:
        weeds = np.array([plant["weed"] != "none" for plant in key.pack["plants"]])
        cover = cover * ~(weeds | context.sown)
    order = np.argsort(-cover, axis=1, kind="stable")[:, :NAMES]
    rows = np.arange(len(cover))[:, None]
    named = np.where(cover[rows, order] > 0, order, -1)
    named[:, min(most, NAMES) :] = -1
    step = np.where(named >= 0, plots.steps[rows, order], 4)
    lowest = step.min(axis=1, initial=4)
    bound = np.where(lowest < 3, lowest, -1)
    return named, np.full(len(bound), -1) if context.disturbed else bound


def hear_session(
    key: Key,
    context: Context,
    tables: AnswerTables,
    plots: Plots,
    ground: Ground,
    answers: int,
) -> Heard:
    """Names, then the best prompt again and again, until sure, out of answers or of help.

    A prompt for a plant that was not searched for, or a question the site table does not answer,
    is "can't tell": it is passed over and is no answer.
    """
    named, bound = names_of(key, context, plots, answers)
    steps = np.full_like(plots.steps, -2)
    rows = np.arange(len(plots))[:, None]
    there = named >= 0
    at = np.broadcast_to(rows, named.shape)[there], named[there]
    steps[at] = plots.steps[at]
    heard = Heard(steps, named, bound, _no_answers(ground), there.sum(axis=1))
    go_on(key, context, tables, plots, heard, answers)
    return heard


def go_on(
    key: Key,
    context: Context,
    tables: AnswerTables,
    plots: Plots,
    heard: Heard,
    answers: int,
) -> None:
    """Go on with a session, changing heard, until so many answers were given in all."""
    telling = _told(key, plots)
    tried = np.zeros((len(plots), len(telling)), bool)
    running = np.ones(len(plots), bool)
    while True:
        running &= heard.asked < answers
        live = np.flatnonzero(running)
        if not len(live):
            return
        part = _part(heard, live)
        belief = weigh_many(key, context, tables, part).belief
        gain = _gains(key, context, part, plots.steps[live], belief, tried[live], telling)
        best = gain.argmax(axis=1)
        worth = gain[np.arange(len(live)), best] > key.settings["least_gain"]
        going = worth & (belief.max(axis=1) < key.settings["sure"])
        running[live[~going]] = False
        _answer(key, context, heard, plots, live[going], best[going], tried, telling)


def _told(key: Key, plots: Plots) -> list[tuple[int, NDArray[np.int64]]]:
    """Questions with evidence that the site table answers: index, answer index by plot or -1."""
    told = []
    for at, question in enumerate(key.pack["questions"]):
        given = plots.answers.get(question["id"])
        if given is None or not any(one.get("evidence") for one in question["answers"]):
            continue
        values = {one["value"]: step for step, one in enumerate(question["answers"])}
        told.append((at, np.array([values.get(value or "", -1) for value in given])))
    return told


def _no_answers(ground: Ground) -> Ground:
    return Ground(
        np.zeros_like(ground.points),
        np.zeros_like(ground.n),
        np.zeros_like(ground.alone),
        np.zeros_like(ground.mixed),
        np.zeros_like(ground.heard),
        ground.height,
    )


def _part(heard: Heard, rows: NDArray[np.int64]) -> Heard:
    ground = heard.ground
    return Heard(
        heard.steps[rows],
        heard.named[rows],
        heard.bound[rows],
        Ground(
            ground.points[rows],
            ground.n[rows],
            ground.alone[rows],
            ground.mixed[rows],
            ground.heard[rows],
            ground.height[rows],
        ),
        heard.asked[rows],
    )


def _gains(
    key: Key,
    context: Context,
    heard: Heard,
    truth: NDArray[np.int8],
    belief: Floats,
    tried: NDArray[np.bool_],
    telling: list[tuple[int, NDArray[np.int64]]],
) -> Floats:
    """Gain of every plant, then of every question of the site table; -inf where not to be asked."""
    gain = _plant_gains(key, context, heard, belief)
    free = (context.seen == NOW) & (context.v > 0) & ~context.sown
    if context.newcomer >= 0:
        free[[p for p, level, _ in key.newcomer_at if level == context.newcomer]] = False
    closed = (heard.steps > -2) | (truth == -2) | ~free
    gain = np.where(closed, -np.inf, gain)
    asked = []
    for column, (at, _) in enumerate(telling):
        price = key.pack["questions"][at]["price_micronats"] / MICRO
        worth = round6(question_gain(key, at, belief) - price)
        asked.append(np.where(tried[:, column], -np.inf, worth))
    return np.column_stack([gain, *asked]) if asked else gain


def _plant_gains(key: Key, context: Context, heard: Heard, belief: Floats) -> Floats:
    gain = np.zeros((len(belief), key.plants))
    for v in range(1, 5):
        mask = context.v == v
        if not mask.any():
            continue
        for bound in (-1, 0, 1, 2):
            rows = np.flatnonzero(heard.bound == bound)
            if len(rows):
                top = bound if v == 4 and bound >= 0 else 3
                values = mutual_information(key, belief[rows], v, top)
                gain[np.ix_(rows, np.flatnonzero(mask))] = values[:, mask]
    rounded: Floats = round6(gain - plant_prices(key))
    return rounded


def _answer(
    key: Key,
    context: Context,
    heard: Heard,
    plots: Plots,
    rows: NDArray[np.int64],
    best: NDArray[np.int64],
    tried: NDArray[np.bool_],
    telling: list[tuple[int, NDArray[np.int64]]],
) -> None:
    plants = best < key.plants
    heard.steps[rows[plants], best[plants]] = plots.steps[rows[plants], best[plants]]
    heard.asked[rows[plants]] += 1
    for column, (at, given) in enumerate(telling):
        here = rows[best == key.plants + column]
        tried[here, column] = True
        for step in np.unique(given[here]):
            if step < 0:
                continue
            mask = np.zeros(len(plots), bool)
            mask[here[given[here] == step]] = True
            add_question(key, context, heard.ground, mask, (at, int(step)))
            heard.asked[mask] += 1
