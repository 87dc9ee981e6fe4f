"""The key on known plots it has not seen: five folds, eight answers, its rivals beside it."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk import VERDICTS
from builder.key.plots import ABSENT, Plots
from builder.key.prepare import Floats
from builder.proof import baselines
from builder.proof.calls import ASK_ON, call_sites
from builder.proof.cases import plot_pairs, zone_pairs
from builder.proof.estimate import key_for
from builder.proof.folds import stratified_folds
from builder.proof.held_out import Part, withheld_key
from builder.proof.known import Known, take
from builder.proof.known_fit import fit_known
from builder.proof.measures import area_under_curve, calibration_rows, figures, kappa

Whole = NDArray[np.int64]
Tell = Callable[[str, float], None]
FOLDS = 5
ANSWERS = 8
LENGTHS = (3, 5, 8, 14)
HALF = 0.5


@dataclass
class _Kept:
    """What the folds fill in, out of fold: beliefs by name [plot, zone], and the rest."""

    beliefs: dict[str, Floats]
    asked: Whole
    fit: Floats
    verdict: dict[str, list[Whole]]
    withheld: list[Floats]


def prove_known(
    known: Known, near: Sequence[set[int]], seed: int, name: str, tell: Tell
) -> dict[str, Any]:
    """Figures of the key on known plots, every plot called by a key that never saw it.

    near  neighbours of each zone; name: what the set is called in the figures
    """
    zones = len(known.zone_ids)
    rng = np.random.default_rng(seed)
    fold = stratified_folds(known.zone, FOLDS, rng)
    kept = _Kept({}, np.zeros(len(known), int), np.zeros(len(known)), {}, [])
    for k in range(FOLDS):
        tell("folds", k / FOLDS)
        _one_fold(known, near, fold == k, seed, kept, rng)
    tell("folds", 1.0)
    key = kept.beliefs["key"]
    right = key.argmax(axis=1) == known.zone
    made = figures(key, known.zone, rng, kept.asked)
    return {
        "tested_on": "plots",
        "set": name,
        "n": len(known),
        "zones": zones,
        "plants": len(known.plants),
        "folds": FOLDS,
        "answers": ANSWERS,
        **{one: made[one] for one in made if one != "n"},
        "by_answers": {
            str(length): _rate(kept.beliefs[f"key_{length}"], known.zone) for length in LENGTHS
        },
        "all_plants": _rate(kept.beliefs["key_all"], known.zone),
        "calibration": calibration_rows(key.max(axis=1), right, rng),
        "confusion": confusion(key.argmax(axis=1), known.zone, zones),
        "answers_needed": np.bincount(kept.asked, minlength=ANSWERS + 1).tolist(),
        "half_lost": _rate(kept.beliefs["half_lost"], known.zone),
        "withheld_auc": round(area_under_curve(kept.fit, np.concatenate(kept.withheld)), 4)
        if kept.withheld
        else None,
        "verdicts": _verdicts(kept.verdict),
        "baselines": {
            one: {
                "hit_rate": _rate(kept.beliefs[one], known.zone),
                "kappa": round(kappa(kept.beliefs[one].argmax(axis=1), known.zone, zones), 4),
                "half_lost": _rate(kept.beliefs[f"{one}_half"], known.zone),
            }
            for one in baselines.NAMES
            if one in kept.beliefs
        },
        "note": "" if baselines.available() else baselines.MISSING,
    }


def confusion(said: Whole, true: Whole, zones: int) -> list[list[int]]:
    """How often each zone [row] was called each zone [column]."""
    table = np.zeros((zones, zones), int)
    np.add.at(table, (true, said), 1)
    rows: list[list[int]] = table.tolist()
    return rows


def half_lost(plots: Plots, rng: np.random.Generator) -> Plots:
    """The same plots with every find lost with a chance of one half."""
    gone = (plots.steps >= 0) & (rng.random(plots.steps.shape) < HALF)
    steps = np.where(gone, ABSENT, plots.steps).astype(np.int8)
    return replace(plots, steps=steps, cover=np.where(gone, 0.0, plots.cover).astype(np.float32))


def _rate(belief: Floats, true: Whole) -> float:
    return round(float((belief.argmax(axis=1) == true).mean()), 4)


def _one_fold(
    known: Known,
    near: Sequence[set[int]],
    out: NDArray[np.bool_],
    seed: int,
    kept: _Kept,
    rng: np.random.Generator,
) -> None:
    train, test = take(known, ~out), take(known, out)
    rows, zones = np.flatnonzero(out), len(known.zone_ids)
    fitted = fit_known(train, near, seed).fitted
    key = key_for(fitted.arrays, fitted.weights, fitted.session, near)
    asking_on = key_for(fitted.arrays, fitted.weights, {**fitted.session, **ASK_ON}, near)
    lost = half_lost(test.plots, rng)
    called = call_sites(key, test.plots, ANSWERS)
    beliefs = {
        "key": called.belief,
        "key_all": call_sites(key, test.plots, None).belief,
        "half_lost": call_sites(key, lost, ANSWERS, {"disturbance": "half_gone"}).belief,
        **{f"key_{one}": call_sites(asking_on, test.plots, one).belief for one in LENGTHS},
    }
    if baselines.available():
        both = np.concatenate([test.plots.steps, lost.steps])
        told = baselines.beliefs_of(train.plots.steps, train.zone, both, zones, seed)
        for name, belief in told.items():
            beliefs |= {name: belief[: len(rows)], f"{name}_half": belief[len(rows) :]}
    for name, belief in beliefs.items():
        kept.beliefs.setdefault(name, np.zeros((len(known), zones)))[rows] = belief
    kept.asked[rows] = called.asked
    sound = call_sites(asking_on, test.plots, ANSWERS)
    kept.fit[rows] = sound.fit
    kept.verdict.setdefault("zone", []).append(sound.verdict)
    present = set(test.zone.tolist())
    for name, pairs in zip(("edge", "mosaic"), zone_pairs(key), strict=True):
        usable = np.array([pair for pair in pairs.tolist() if set(pair) <= present], int)
        if len(usable):
            way = "patches" if name == "mosaic" else "either"
            case = plot_pairs(test.plots, test.zone, usable, len(rows), way, rng)
            told_of = call_sites(asking_on, case.plots, ANSWERS).verdict
            kept.verdict.setdefault(name, []).append(told_of)
    if zones > 2:
        part = Part(fitted.arrays, fitted.weights, train.plots, train.zone)
        for z in sorted(present):
            blind = withheld_key(part, fitted.session, near, z)
            calls = call_sites(blind, test.plots.take(np.flatnonzero(test.zone == z)), ANSWERS)
            kept.withheld.append(calls.fit)
            kept.verdict.setdefault("misfit", []).append(calls.verdict)


def _verdicts(told: dict[str, list[Whole]]) -> dict[str, dict[str, float]]:
    """Share of each verdict by what the case was."""
    made = {}
    for name, parts in told.items():
        said = np.concatenate(parts)
        made[name] = {
            verdict: round(float((said == v).mean()), 4) for v, verdict in enumerate(VERDICTS)
        } | {"n": len(said)}
    return made
