"""What month, disturbance and state answers do to the evidence of each plant."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.prepare import Key, Site
from builder.key.rounding import round_half_up

Quarters = NDArray[np.integer[Any]]
NOW, DRY, GONE = 2, 1, 0


@dataclass(frozen=True)
class Context:
    """State of the ground, by plant where an array.

    v       quarters that could still be missed; 0 = absence says nothing
    kept    quarters of the old plants left, season apart
    seen    2 recognisable now, 1 known when dry, 0 gone this month
    sown    true where the plant may come from a seed bag: it says nothing
    found_weight, cover_weight   quarters of "found" and of cover that count
    newcomer  level of the newcomer tables, -1 for none
    azonal_weight  quarters of what speaks for azonal ground that count
    question_weight  {question id: quarters of its answer that count}
    """

    v: Quarters
    kept: Quarters
    seen: Quarters
    sown: NDArray[np.bool_]
    found_weight: Quarters
    cover_weight: Quarters
    newcomer: int
    azonal_weight: int
    question_weight: dict[str, int]
    disturbed: bool
    height_off: bool
    elevation_shift_m: float
    dead_counts: bool
    second_call: bool
    move_plot: bool


def context_of(key: Key, site: Site, more: tuple[dict[str, Any], ...] = ()) -> Context:
    """Context of a site; more: effects of rules that hold, on top of the site's own."""
    effects = [*_active_effects(key, site), *more]
    arrays = [_effect_arrays(key, effect) for effect in effects]
    seen = seen_now(key, site.get("month"))
    kept = np.min([np.ones(key.plants), *(one[0] for one in arrays)], axis=0)
    whole = np.full(key.plants, 4)
    visible = np.choose(seen, [0.0, key.settings["seen_dry_outside"], 1.0])
    seeded = any(effect.get("sown") for effect in effects)
    sown = np.array(
        [seeded and (plant["mix"] or plant["weed"] == "seeded") for plant in key.pack["plants"]],
        bool,
    )
    return Context(
        v=round_half_up(4 * kept * visible),
        kept=round_half_up(4 * kept),
        seen=seen,
        sown=sown,
        found_weight=np.min([whole, *(one[1] for one in arrays)], axis=0),
        cover_weight=np.min([whole, *(one[2] for one in arrays)], axis=0),
        newcomer=max((effect.get("newcomer", -1) for effect in effects), default=-1),
        azonal_weight=min([4, *(effect.get("azonal_weight", 4) for effect in effects)]),
        question_weight=_question_weights(effects),
        disturbed=bool((disturbance_of(key, site) or {}).get("disturbs"))
        or any("newcomer" in one or one.get("sown") or one.get("layers_gone") for one in effects),
        height_off=any(effect.get("height_off") for effect in effects),
        elevation_shift_m=sum(effect.get("elevation_shift_m", 0) for effect in effects),
        dead_counts=any(effect.get("dead_counts") for effect in effects),
        second_call=any(effect.get("second_call") for effect in effects),
        move_plot=any(effect.get("move_plot") for effect in effects),
    )


def _question_weights(effects: list[dict[str, Any]]) -> dict[str, int]:
    weights: dict[str, int] = {}
    for effect in effects:
        for question, weight in effect.get("question_weight", {}).items():
            weights[question] = min(weight, weights.get(question, 4))
    return weights


def seen_now(key: Key, month: int | None) -> NDArray[np.int64]:
    """By plant: 2 recognisable in the month (or no month given), 1 known when dry, 0 gone."""
    made = key.kept.get(("seen", month))
    if made is None:
        made = np.array([_seen(plant, month) for plant in key.pack["plants"]], int)
        key.kept["seen", month] = made
    seen: NDArray[np.int64] = made
    return seen


def _seen(plant: dict[str, Any], month: int | None) -> int:
    if not month or not plant["months"]:
        return NOW
    first, last = plant["months"]
    inside = first <= month <= last if first <= last else month >= first or month <= last
    if inside:
        return NOW
    return DRY if plant["known_when_dry"] else GONE


def disturbance_of(key: Key, site: Site) -> dict[str, Any] | None:
    """The site's disturbance as the pack knows it, or None."""
    for one in key.pack["disturbances"]:
        if one["id"] == site.get("disturbance"):
            found: dict[str, Any] = one
            return found
    return None


def told_answers(key: Key, site: Site) -> dict[str, str]:
    """Ground answers by question: the site's own, else what its disturbance answers beforehand."""
    states = (disturbance_of(key, site) or {}).get("states") or {}
    given = site.get("questions") or {}
    told: dict[str, str] = {}
    for question in key.pack["questions"]:
        values = [answer["value"] for answer in question["answers"]]
        both = (given.get(question["id"]), states.get(question["id"]))
        known = [value for value in both if value is not None and value in values]
        if known:
            told[question["id"]] = known[0]
    return told


def _active_effects(key: Key, site: Site) -> list[dict[str, Any]]:
    """Of the disturbance, then of every answer told."""
    own = (disturbance_of(key, site) or {}).get("effect")
    effects = [own] if own else []
    told = told_answers(key, site)
    for question in key.pack["questions"]:
        for answer in question["answers"]:
            if answer.get("effect") and answer["value"] == told.get(question["id"]):
                effects.append(answer["effect"])
    return effects


def _effect_arrays(key: Key, effect: dict[str, Any]) -> tuple[Any, Any, Any]:
    """Shares kept, quarters of found and of cover, by plant."""
    made = key.kept.get(("effect", id(effect)))
    if made is None:
        plants, groups = key.pack["plants"], key.pack["groups"]
        made = tuple(
            np.array([trait_value(groups, plant, effect.get(name), whole) for plant in plants])
            for name, whole in (("kept", 1.0), ("found", 4), ("cover", 4))
        )
        for layer in effect.get("layers_gone", []):
            made[0][[plant["layer"] == layer for plant in plants]] = 0.0
        key.kept["effect", id(effect)] = made
    arrays: tuple[Any, Any, Any] = made
    return arrays


def trait_value(
    groups: list[dict[str, Any]],
    plant: dict[str, Any],
    shares: Mapping[str, float] | None,
    whole: float,
) -> float:
    """Share of the plant's own groups, else the lowest of its other traits, else whole."""
    if not shares:
        return whole
    named = [f"group:{groups[g]['id']}" for g in plant["groups"]]
    grouped = [shares[name] for name in named if name in shares]
    own = [share for trait, share in shares.items() if has_trait(plant, trait)]
    return min(grouped or own, default=whole)


def has_trait(plant: dict[str, Any], trait: str) -> bool:
    """Does a trait word speak of a plant: fate, response, layer, form ("forb": all), mix, any."""
    return (
        trait in ("any", plant["fate"], plant["response"], plant["layer"], plant["form"])
        or plant["form"].startswith(f"{trait}_")
        or (trait == "mix" and bool(plant["mix"]))
    )
