"""A key from known plots: counts, corrections, temper, drag and the weight of implication.

All that is tuned is tuned on sessions with plots held out of the counts (inner folds).
docs/method_key.md says what each part was worth on open plot sets.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import minimize

from builder.key.compile import Arrays, Fitted, weigh_region
from builder.key.defaults import SESSION
from builder.key.fitted import correction_nats, usual_shares
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key
from builder.key.rounding import NATS_PER_CENTIBAN, round_half_up
from builder.key.weigh import CENTIBANS_PER_NAT, STEPS, Weights
from builder.proof.corrections import Corrections, Lessons, learn, reached
from builder.proof.folds import stratified_folds
from builder.proof.sessions import Sessions, Sums, bare_key

Whole = NDArray[np.int64]
Progress = Callable[[str, float], None]

INNER_FOLDS = 5
LEARNED_AT = (4, 8, 14, None)
"""Answers in the sessions that corrections are learned from; None: all plants."""
TUNED_AT = (5, 6, 7, 8, 10, 12)
"""Answers in the sessions that temper and drag are fitted to."""
PENALTY = 2.0
IMPLIED_WEIGHTS = (0.0, 0.4, 0.8)
TRIAL_DRAG = 0.06
TRIAL_IMPLIED = 0.4
CORRECTED = ("found_correction", "absent_correction")
DIGITS = 4
MOST_PLOTS = 2000
"""Plots that tuning looks at; counts are taken from all."""
PULL = 0.01
"""Pull of ln temper to 0 and of ln drag to ln 0.05, against the mean log loss of an answer."""


@dataclass(frozen=True)
class Tuned:
    """Temper, drag and the weight of implication, with the inner log loss they reached. [nats]"""

    temper: float
    drag: float
    implied_weight: float
    loss: float


@dataclass(frozen=True)
class Inner:
    """A key that one inner fold's plots were kept out of, and those plots."""

    arrays: Arrays
    weights: Weights
    rows: Whole


@dataclass(frozen=True)
class Learned:
    """A fit and the nats behind its corrections, [plant, threshold, zone].

    loss   inner log loss [nats]; inner: the keys of the inner folds at the fitted temper
    """

    fitted: Fitted
    learned: Floats
    loss: float
    inner: list[Inner]


def counts_of(plots: Plots, zone: Whole, zones: int) -> Arrays:
    """Counts by plant and zone, and the zones' shares of the plots (one plot added to each)."""
    member = np.eye(zones)[zone]
    found = (plots.steps >= 0).astype(float).T @ member
    by_step = [(plots.steps == step).astype(float).T @ member for step in range(STEPS)]
    held = member.sum(axis=0)
    return Arrays(found, held, cover_counts=np.stack(by_step, axis=1), prior=held + 1.0)


def fit_key(
    plots: Plots, zone: Whole, zones: int, seed: int = 0, progress: Progress | None = None
) -> Learned:
    """Everything a pack needs that known plots can teach.

    plots  known plots; zone [plot] index of each one's zone; every zone needs two plots
    seed   deals the inner folds; the same seed gives the same key
    """
    tell = progress or (lambda stage, share: None)
    whole = counts_of(plots, zone, zones)
    rng = np.random.default_rng(seed)
    rows = _some(zone, rng)
    part, part_zone = plots.take(rows), zone[rows]
    fold = stratified_folds(part_zone, INNER_FOLDS, rng)
    held_out = [_without(part, part_zone, zones, fold == k) for k in range(INNER_FOLDS)]
    usual = _usual(whole)
    lessons = _lessons(part, part_zone, fold, held_out, usual, tell)
    crossed = []
    for k in range(INNER_FOLDS):
        tell("corrections", k / (INNER_FOLDS + 1))
        crossed.append(learn(lessons.take(lessons.fold != k), usual, PENALTY))
    final = learn(lessons, usual, PENALTY)
    tell("temper", 0.0)
    tuned = _tune(part, part_zone, fold, held_out, crossed, tell)
    learned = np.round(final.learned, DIGITS)
    found, absent = correction_nats(learned, _usual(whole))
    tell("done", 1.0)
    return Learned(
        Fitted(
            replace(whole, found_correction=found, absent_correction=absent),
            Weights(temper=round(tuned.temper, DIGITS), tau=round(final.tau, DIGITS)),
            {"drag": round(tuned.drag, DIGITS), "implied_weight": tuned.implied_weight},
        ),
        learned,
        tuned.loss,
        [
            Inner(
                replace(arrays, **dict(zip(CORRECTED, one.nats(), strict=True))),
                Weights(temper=tuned.temper, tau=one.tau),
                rows[fold == k],
            )
            for k, (arrays, one) in enumerate(zip(held_out, crossed, strict=True))
        ],
    )


def _usual(arrays: Arrays) -> Floats:
    assert arrays.cover_counts is not None
    return usual_shares(arrays.present, arrays.cover_counts, arrays.plots)


def key_for(
    arrays: Arrays,
    weights: Weights,
    session: dict[str, Any],
    near: Sequence[set[int]] | None = None,
) -> Key:
    """A bare key of counts and figures, for sessions without a region around them.

    near  neighbours of each zone
    """
    evidence = weigh_region(arrays, weights)
    share = evidence.prior * len(evidence.prior)
    area = round_half_up(np.log(share) * CENTIBANS_PER_NAT).tolist()
    settings = {**SESSION, **session, "temper": weights.temper, "area_cb": area}
    return bare_key(evidence, settings, near)


def _some(zone: Whole, rng: np.random.Generator) -> Whole:
    if len(zone) <= MOST_PLOTS:
        return np.arange(len(zone))
    return np.flatnonzero(stratified_folds(zone, -(-len(zone) // MOST_PLOTS), rng) == 0)


def _without(plots: Plots, zone: Whole, zones: int, out: NDArray[np.bool_]) -> Arrays:
    """Counts without a fold; a zone that lives in that fold alone keeps an empty plot's weight."""
    kept = counts_of(plots.take(np.flatnonzero(~out)), zone[~out], zones)
    return replace(kept, plots=np.maximum(kept.plots, 1.0))


TRIAL: dict[str, Any] = {
    "drag": TRIAL_DRAG,
    "implied_weight": TRIAL_IMPLIED,
    "sure": 2.0,
    "least_gain": -9.0,
}
"""Trial sessions go on to the last answer, so that every length is learned from every plot."""


def _lessons(
    plots: Plots,
    zone: Whole,
    fold: Whole,
    held_out: list[Arrays],
    usual: Floats,
    tell: Progress,
) -> Lessons:
    parts = []
    for k, arrays in enumerate(held_out):
        tell("sessions", k / len(held_out))
        rows = np.flatnonzero(fold == k)
        if not len(rows):
            continue
        key = key_for(arrays, Weights(temper=1.0), TRIAL)
        sessions = Sessions(key)
        for answers in LEARNED_AT:
            sums = sessions.after(plots.take(rows), answers)
            parts.append(_lesson(key, sums, answers, plots.steps[rows], zone[rows], usual, k))
    return Lessons(*(np.concatenate(column) for column in zip(*parts, strict=True)))


def _lesson(
    key: Key,
    sums: Sums,
    answers: int | None,
    steps: NDArray[np.int8],
    zone: Whole,
    usual: Floats,
    fold: int,
) -> tuple[Any, ...]:
    count = len(zone)
    implied = TRIAL_IMPLIED * sums.implied if answers is not None else 0.0
    told = (reached(steps) - usual) * sums.asked[:, :, None]
    extra = np.clip(sums.n - 1, 0, SESSION["drag_cap_answers"])
    return (
        np.tile(key.area * NATS_PER_CENTIBAN, (count, 1)),
        (sums.points + implied) * NATS_PER_CENTIBAN,
        told.reshape(count, -1),
        1.0 + TRIAL_DRAG * extra,
        np.full(count, 1.0 / len(LEARNED_AT)),
        zone,
        np.full(count, fold),
    )


def _tune(
    plots: Plots,
    zone: Whole,
    fold: Whole,
    held_out: list[Arrays],
    crossed: list[Corrections],
    tell: Progress,
) -> Tuned:
    """Temper, drag and weight of implication with the least log loss on held-out sessions."""
    points, implied, n, known, area = [], [], [], [], []
    for k, (arrays, corrections) in enumerate(zip(held_out, crossed, strict=True)):
        tell("temper", k / len(held_out))
        rows = np.flatnonzero(fold == k)
        if not len(rows):
            continue
        key = key_for(
            replace(arrays, **dict(zip(CORRECTED, corrections.nats(), strict=True))),
            Weights(temper=1.0, tau=corrections.tau),
            TRIAL,
        )
        sessions = Sessions(key)
        for answers in TUNED_AT:
            sums = sessions.after(plots.take(rows), answers)
            points.append(sums.points)
            implied.append(sums.implied)
            n.append(sums.n)
            known.append(zone[rows])
            area.append(np.tile(key.area, (len(rows), 1)))
    return best_temper(
        np.concatenate(points),
        np.concatenate(implied),
        np.concatenate(n),
        np.concatenate(known),
        np.concatenate(area),
    )


def best_temper(points: Floats, implied: Floats, n: Whole, zone: Whole, area: Floats) -> Tuned:
    """The figures with the least mean log loss of held-out sessions.

    points, implied, area [row, zone] centibans at temper 1; n [row] answers; zone [row] known
    """
    zones = points.shape[1]
    doubt = SESSION["uniform_share"]
    extra = np.clip(n - 1, 0, SESSION["drag_cap_answers"])
    rows = np.arange(len(zone))

    def loss(free: Floats, weight: float) -> float:
        temper, drag = np.exp(free)
        said = temper * (points + weight * implied) / (1.0 + drag * extra)[:, None]
        score = (area + said) * NATS_PER_CENTIBAN
        likely = np.exp(score - score.max(axis=1, keepdims=True))
        belief = likely / likely.sum(axis=1, keepdims=True) * (1.0 - doubt) + doubt / zones
        pull = free[0] ** 2 + 0.25 * (free[1] - np.log(0.05)) ** 2
        return float(-np.log(belief[rows, zone]).mean() + PULL * pull)

    found = []
    for weight in IMPLIED_WEIGHTS:
        start = np.array([0.0, np.log(0.05)])
        end = minimize(loss, start, (weight,), "Nelder-Mead", options={"maxiter": 80})
        found.append(Tuned(float(np.exp(end.x[0])), float(np.exp(end.x[1])), weight, end.fun))
    return min(found, key=lambda one: one.loss)
