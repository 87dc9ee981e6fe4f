"""Zone, edge, mosaic, misfit or thin: the scores of one look."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

import numpy as np

from builder.key.answers import NO_COVER, Answer
from builder.key.belief import Weighed
from builder.key.chance import question_chances
from builder.key.fit import fit_of
from builder.key.prepare import Floats, Key
from builder.key.rounding import round6


@dataclass(frozen=True)
class Pair:
    """The best two zones of one kind: gain in tempered log likelihood over the best zone [nats]."""

    gain: float
    zones: list[int] | None


def judge(key: Key, weighed: Weighed) -> dict[str, Any]:
    """Scores and verdict from what was weighed. Thin comes first, then the largest score."""
    settings = key.settings
    leader = weighed.order[0]
    finds = int(sum(one.points.max() for one in weighed.answers if is_find(key, one)))
    pairs = explanations(key, weighed)
    scores: dict[str, float] = {"zone": 0.0}
    for name in ("edge", "mosaic"):
        scores[name] = round6(settings[name]["times"] * pairs[name].gain + settings[name]["plus"])
    fit = round6(fit_of(key, weighed, [leader]))
    best = pairs[largest(scores)].zones if largest(scores) != "zone" else None
    other = fit_of(key, weighed, best) if best else fit
    misfit = settings["misfit"]
    scores["misfit"] = round6(misfit["times"] * ((fit + other) / 2.0) + misfit["plus"])
    share = zone_share(scores)
    thin = finds < settings["thin"]["finds_cb"] and (
        weighed.belief[leader] < settings["thin"]["belief"]
    )
    verdict = "thin" if thin else largest(scores)
    pair = pairs[verdict].zones if verdict in pairs else None
    return {
        "verdict": verdict,
        "pair": [key.pack["zones"][z]["id"] for z in pair] if pair else None,
        "scores": scores,
        "zone_share": share,
        "look_again": bool(not thin and share < settings["look_again_below"]),
        "fit": fit,
        "finds_cb": finds,
    }


def is_find(key: Key, answer: Answer) -> bool:
    """Does an answer count as a find: a plant or group found, weeds apart, which come anywhere."""
    weed = answer.kind == "plant" and key.pack["plants"][answer.at]["weed"] != "none"
    return answer.found and not weed


def largest(scores: dict[str, float]) -> str:
    """Name of the largest score; the first of equals."""
    return max(scores, key=lambda name: scores[name])


def zone_share(scores: dict[str, float]) -> float:
    """Share of "zone" among the scores, 0..1, rounded to 1e-6."""
    share: float = round6(
        math.exp(scores["zone"]) / sum(math.exp(score) for score in scores.values())
    )
    return share


def explanations(key: Key, weighed: Weighed) -> dict[str, Pair]:
    """Best edge (neighbours) and best mosaic (other pairs) against the best single zone."""
    heard = [one for one in weighed.answers if one.plain and one.counts]
    if not heard:
        return {"edge": Pair(0.0, None), "mosaic": Pair(0.0, None)}
    first, second, edge = key.pairs
    single = np.zeros(key.zones)
    mixed = np.zeros(len(first))
    for one in heard:
        alone, shared = answer_chances(key, one)
        single += np.log(alone)
        mixed += np.log(np.where(edge, 0.5 * (alone[first] + alone[second]), shared))
    gain = round6(key.settings["temper"] / weighed.drag * (mixed - single.max()))
    return {"edge": _best(key, weighed, gain, edge), "mosaic": _best(key, weighed, gain, ~edge)}


def _best(key: Key, weighed: Weighed, gain: Floats, mask: Any) -> Pair:
    if not mask.any():
        return Pair(key.settings["no_pair_gain"], None)
    at = int(np.argmax(np.where(mask, gain, -np.inf)))
    i, j = (int(side[at]) for side in key.pairs[:2])
    return Pair(float(gain[at]), [j, i] if weighed.belief[j] > weighed.belief[i] else [i, j])


def answer_chances(key: Key, answer: Answer) -> tuple[Floats, Floats]:
    """Chance of one answer [zone], and where patches of two zones share the plot [pair]."""
    first, second, _ = key.pairs
    if answer.kind == "question":
        alone = question_chances(key, answer.at)[answer.step]
        return alone, 0.5 * (alone[first] + alone[second])
    half = key.settings["mosaic_share"]
    if answer.kind == "group":
        expected = key.pack["evidence"]["groups"][answer.at]["expected"]
        alone = np.array(expected, float) / 10000.0
        return alone, 1.0 - (1.0 - half * alone[first]) * (1.0 - half * alone[second])
    presence = key.presence[answer.at]
    if not answer.found:
        seen = answer.v / 4.0
        gone = half * seen
        return 1.0 - seen * presence, (1.0 - gone * presence[first]) * (
            1.0 - gone * presence[second]
        )
    both = 1.0 - (1.0 - half * presence[first]) * (1.0 - half * presence[second])
    if answer.step == NO_COVER:
        return presence, both
    share, low = key.cover[answer.at, answer.step], key.lowered[answer.at, answer.step]
    mean_low = (presence * low)[first] + (presence * low)[second]
    return presence * share, both * mean_low / (presence[first] + presence[second])
