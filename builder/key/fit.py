"""How badly a zone, or two sharing the plot, explains the finds: in standard deviations."""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key.answers import NO_COVER, Answer
from builder.key.belief import Weighed
from builder.key.prepare import Key


def fit_of(key: Key, weighed: Weighed, zones: list[int]) -> float:
    """Mean of two scores against the usual of the zone (of one or two zones). [sd]

    surprise  mean -ln P(answer) of the plants named as most plentiful
    miss      one minus overlap of found with expected over the plants asked

    0 where nothing was asked; larger is worse.
    """
    plants = [one for one in weighed.answers if one.kind == "plant" and one.plain and one.v > 0]
    usual = usual_of(key, zones, len(plants))
    scores = []
    named = [one for one in plants if one.found and one.at in weighed.findings.named]
    if named:
        surprise = float(np.mean([-np.log(_found_chance(key, one, zones)) for one in named]))
        scores.append((surprise - usual["surprise"]) / usual["surprise_sd"])
    if plants:
        scores.append((1.0 - _overlap(key, plants, zones) - usual["miss"]) / usual["miss_sd"])
    return sum(scores) / len(scores) if scores else 0.0


def usual_of(key: Key, zones: list[int], asked: int) -> dict[str, float]:
    """Usual surprise and miss, with spreads, at about this many plants asked."""
    bands: list[dict[str, Any]] = key.settings["fit"]
    band = next((one for one in bands if asked <= one["asked_to"]), bands[-1])
    names = ("surprise", "surprise_sd", "miss", "miss_sd")
    return {name: sum(band[name][z] for z in zones) / len(zones) for name in names}


def _found_chance(key: Key, answer: Answer, zones: list[int]) -> float:
    chance = key.presence[answer.at, zones]
    if answer.step != NO_COVER:
        chance = chance * key.cover[answer.at, answer.step, zones]
    return float(chance.mean())


def _overlap(key: Key, plants: list[Answer], zones: list[int]) -> float:
    """2 sum(found * expected) / (sum(found) + sum(expected))."""
    at = [one.at for one in plants]
    found = np.array([one.found for one in plants], float)
    seen = np.array([1.0 if one.found else one.v / 4.0 for one in plants])
    expected = seen * key.presence[at][:, zones].mean(axis=1)
    return float(2.0 * (found * expected).sum() / (found.sum() + expected.sum()))
