"""What to look for or ask next: the answer expected to lower doubt most, less its price.

Source: expected fall in entropy, Lindley (1956).
"""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.belief import Weighed, implied_open, weigh_site
from builder.key.chance import plant_chances, question_chances
from builder.key.context import NOW
from builder.key.prepare import Floats, Key, Pack, Site, prepare
from builder.key.rounding import round6

MICRO = 1e6


def prompts(pack: Pack, site: Site, limit: int = 8) -> list[dict[str, Any]]:
    """Best prompts of a site check, best first; ties keep the order of the pack. gain [nats]"""
    key = prepare(pack)
    return prompts_of(key, site, weigh_site(key, site), limit)


def prompts_of(key: Key, site: Site, weighed: Weighed, limit: int) -> list[dict[str, Any]]:
    """The same from what was already weighed."""
    plants = key.pack["plants"]
    gain = plant_gains(key, weighed)
    listed = [
        {"kind": "plant", "id": plants[p]["id"], "gain": float(gain[p])}
        for p in np.flatnonzero(plants_to_ask(key, weighed))
    ]
    listed += _question_prompts(key, site, weighed)
    worth = [one for one in listed if one["gain"] > key.settings["least_gain"]]
    return sorted(worth, key=lambda one: -one["gain"])[:limit]


def plants_to_ask(key: Key, weighed: Weighed) -> NDArray[np.bool_]:
    """Plants that can be seen this month, tell of the ground, and were not answered."""
    context, findings = weighed.context, weighed.findings
    free = (context.seen == NOW) & (context.v > 0) & ~context.sown
    free[[*findings.plants, *findings.open]] = False
    if context.newcomer >= 0:
        free[[p for p, level, _ in key.newcomer_at if level == context.newcomer]] = False
    return np.asarray(free, bool)


def plant_gains(key: Key, weighed: Weighed) -> Floats:
    """Expected fall in entropy less the price, of every plant, rounded to 1e-6. [nats]"""
    implied = implied_open(key, weighed.reading) if weighed.bound >= 0 else np.zeros(0, bool)
    gain = np.zeros(key.plants)
    for v in range(1, 5):
        for bound in {3, weighed.bound}:
            if bound < 0 or (bound < 3 and v < 4):
                continue
            mask = weighed.context.v == v
            if implied.size:
                mask = mask & (implied if bound < 3 else ~implied | (v < 4))
            if mask.any():
                gain[mask] = mutual_information(key, weighed.belief[None, :], v, bound)[0, mask]
    rounded: Floats = round6(gain - plant_prices(key))
    return rounded


def mutual_information(key: Key, belief: Floats, v: int, bound: int) -> Floats:
    """Of zone and answer, [site, plant]. belief [site, zone]. [nats]"""
    chance, certain = plant_chances(key, v, bound)
    flat = key.kept.get(("flat", v, bound))
    if flat is None:
        flat = (
            np.ascontiguousarray(chance.reshape(-1, key.zones).T),
            np.ascontiguousarray(certain.T),
        )
        key.kept["flat", v, bound] = flat
    shares = (belief @ flat[0]).reshape(len(belief), key.plants, 5)
    logs = np.log(np.where(shares > 0, shares, 1.0))
    return np.asarray(belief @ flat[1] - np.einsum("ijk,ijk->ij", shares, logs))


def plant_prices(key: Key) -> Floats:
    """What asking for each plant costs. [nats]"""
    return np.array([plant["price_micronats"] for plant in key.pack["plants"]]) / MICRO


def _question_prompts(key: Key, site: Site, weighed: Weighed) -> list[dict[str, Any]]:
    given = site.get("questions") or {}
    listed = []
    for at, question in enumerate(key.pack["questions"]):
        asked = given.get(question["id"])
        tells = any(one.get("evidence") for one in question["answers"])
        if tells and not asked and may_dig(key, site, question):
            gain = question_gain(key, at, weighed.belief[None, :])[0]
            price = question["price_micronats"] / MICRO
            row = {"kind": "question", "id": question["id"], "gain": round6(gain - price)}
            listed.append(row)
    return listed


def question_gain(key: Key, at: int, belief: Floats) -> Floats:
    """Expected fall in entropy from a ground question, [site]. belief [site, zone]. [nats]"""
    chance = question_chances(key, at)
    certain = (chance * np.log(chance)).sum(axis=0)
    shares = belief @ chance.T
    return np.asarray(belief @ certain - (shares * np.log(shares)).sum(axis=1))


def may_dig(key: Key, site: Site, question: dict[str, Any]) -> bool:
    """Digging only after buried lines were cleared, or by hand as deep as a hand tool may go."""
    depth = question.get("digs_cm") or 0
    cleared = (site.get("digging") or {}).get("cleared")
    return bool(
        depth == 0
        or cleared == "lines"
        or (cleared == "hand" and depth <= key.settings["hand_tool_cm"])
    )
