"""How likely each answer is in each zone, for prompts and verdicts."""

from __future__ import annotations

import numpy as np

from builder.key.prepare import Floats, Key
from builder.key.rounding import NATS_PER_CENTIBAN


def plant_chances(key: Key, v: int, bound: int) -> tuple[Floats, Floats]:
    """Chances of a plant's five answers, and their mean log.

    v      quarters of the plant that can be seen
    bound  highest cover step still possible (3: all)

    Returns chance [plant, 5, zone] (cover steps 0..3, then not found; they add to 1) and
    certain [plant, zone], sum of p ln p. [nats]
    """
    made = key.kept.get(("chance", v, bound))
    if made is None:
        found = (key.presence * v / 4.0)[:, None, :] * key.cover
        absent = 1.0 - key.presence * v / 4.0
        possible = 1.0 - found[:, bound + 1 :].sum(axis=1)
        found[:, bound + 1 :] = 0.0
        chance = np.concatenate([found, absent[:, None, :]], axis=1) / possible[:, None, :]
        logs = np.log(np.where(chance > 0, chance, 1.0))
        made = chance, (chance * logs).sum(axis=1)
        key.kept["chance", v, bound] = made
    tables: tuple[Floats, Floats] = made
    return tables


def question_chances(key: Key, at: int) -> Floats:
    """Chances of a ground question's answers, [answer, zone], adding to 1 in each zone."""
    made = key.kept.get(("question", at))
    if made is None:
        answers = key.pack["questions"][at]["answers"]
        nats = NATS_PER_CENTIBAN / key.settings["temper"]
        none = [0] * key.zones
        points = np.array([one.get("evidence") or none for one in answers], float)
        chance = np.array([one["share"] for one in answers])[:, None] * np.exp(points * nats)
        made = chance / chance.sum(axis=0)
        key.kept["question", at] = made
    chances: Floats = made
    return chances
