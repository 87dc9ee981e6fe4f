"""Which zones the tables can hardly part, what would part them, and plants that never help."""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key.chance import plant_chances, question_chances
from builder.key.prepare import Floats, Key

SOUND = 4
ALL_STEPS = 3
NEVER_HELPS_NATS = 0.005
"""Less expected fall in entropy than this, and a plant is of no use for any pair of zones."""


def answer_overlap(key: Key) -> Floats:
    """Bhattacharyya coefficient of each plant's answers between zones, [plant, zone, zone]. [0..1]

    1: the plant is answered alike in both; all four cover steps and "not found" count.
    Source: Bhattacharyya 1943; Kailath 1967 for the bound below (from memory)
    """
    chance, _ = plant_chances(key, SOUND, ALL_STEPS)
    root = np.sqrt(chance)
    return np.asarray(np.einsum("paz,paw->pzw", root, root))


def hardest_pairs(key: Key, most: int = 12) -> list[dict[str, Any]]:
    """Pairs of zones by an upper bound of the error if all plants were searched, worst first.

    error_bound = half the product of the plants' overlaps (as if plants were independent).
    With each pair: the plants and the ground question that part it best, by expected fall in
    entropy when both zones are equally likely. [nats]
    """
    overlap = answer_overlap(key)
    bound = 0.5 * np.exp(np.log(np.maximum(overlap, 1e-12)).sum(axis=0))
    first, second, _ = key.pairs
    order = np.argsort(-bound[first, second], kind="stable")[:most]
    return [
        _pair(key, int(first[at]), int(second[at]), float(bound[first[at], second[at]]))
        for at in order
    ]


def _pair(key: Key, i: int, j: int, bound: float) -> dict[str, Any]:
    chance, _ = plant_chances(key, SOUND, ALL_STEPS)
    gains = _gain_between(chance[:, :, i], chance[:, :, j])
    best = np.argsort(-gains, kind="stable")[:3]
    zones, plants = key.pack["zones"], key.pack["plants"]
    row: dict[str, Any] = {
        "zones": [zones[i]["id"], zones[j]["id"]],
        "error_bound": round(bound, 4),
        "plants": [[plants[p]["id"], round(float(gains[p]), 4)] for p in best],
        "question": None,
    }
    for at, question in enumerate(key.pack["questions"]):
        if not any(one.get("evidence") for one in question["answers"]):
            continue
        asked = question_chances(key, at)
        gain = float(_gain_between(asked[None, :, i], asked[None, :, j])[0])
        if row["question"] is None or gain > row["question"][1]:
            row["question"] = [question["id"], round(gain, 4)]
    return row


def _gain_between(one: Floats, two: Floats) -> Floats:
    """Expected fall in entropy about two equally likely zones, [plant]. one, two [plant, answer]"""
    mean = 0.5 * (one + two)

    def entropy(chance: Floats) -> Floats:
        return np.asarray(-(chance * np.log(np.maximum(chance, 1e-300))).sum(axis=1))

    return np.asarray(entropy(mean) - 0.5 * (entropy(one) + entropy(two)))


def never_help(key: Key) -> list[str]:
    """Plants that tell no two zones apart by more than a trifle, whatever is answered."""
    chance, _ = plant_chances(key, SOUND, ALL_STEPS)
    first, second, _ = key.pairs
    best = np.zeros(key.plants)
    for i, j in zip(first, second, strict=True):
        best = np.maximum(best, _gain_between(chance[:, :, i], chance[:, :, j]))
    plants = key.pack["plants"]
    return [plants[p]["id"] for p in np.flatnonzero(best < NEVER_HELPS_NATS)]
