"""Ground questions, habitat rules and disturbances as a pack holds them."""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key import weigh
from builder.key.compile_plants import MICRO
from builder.key.context import trait_value
from builder.key.defaults import PRICES
from builder.key.rounding import round_half_up
from builder.key.weigh import Evidence, Floats, Weights
from builder.tables import Condition, Disturbance, Effect, Question, Region


def newcomer_levels(region: Region) -> list[float]:
    """Distinct shares of newcomers that any disturbance, answer or rule names, rising."""
    effects = [one.effect for question in region.questions for one in question.answers]
    effects += [rule.effect for rule in region.rules]
    shares = {one.newcomer for one in effects if one is not None}
    shares |= {one.newcomer for one in region.disturbances}
    return sorted(share for share in shares if share > 0)


def most_kept(region: Region, plants: list[dict[str, Any]], levels: list[float]) -> dict[int, Any]:
    """Most quarters of each plant left by anything that brings newcomers, by level."""
    groups = [{"id": group.id} for group in region.groups]
    sources = [one.effect for question in region.questions for one in question.answers]
    sources += [rule.effect for rule in region.rules]
    most = {level: [0] * len(plants) for level in range(len(levels))}
    for one in [*sources, *region.disturbances]:
        if one is None or one.newcomer <= 0:
            continue
        row = most[levels.index(one.newcomer)]
        for p, plant in enumerate(plants):
            gone = plant["layer"] in one.layers_gone
            kept = 0.0 if gone else trait_value(groups, plant, one.kept, 1.0)
            row[p] = max(row[p], _quarters(kept))
    return most


def question_chance(log_odds: Floats, share: Floats, answer_error: float) -> Floats:
    """Chance of each answer in each zone, [answer, zone]; they add to 1 in a zone.

    log_odds [answer, zone] nats; share [answer] how often each is given over the region;
    answer_error: chance that the answer is given at random, 0..1

    P = share * exp(log odds), made to add to 1
    """
    odds = share[:, None] * np.exp(log_odds)
    chance = odds / odds.sum(axis=0)
    return np.asarray((1.0 - answer_error) * chance + answer_error / len(share))


def compile_questions(
    region: Region, evidence: Evidence, weights: Weights, levels: list[float]
) -> list[dict[str, Any]]:
    """Questions with evidence of their answers in centibans, shares per 10000 and effects."""
    return [
        {
            "id": question.id,
            "kind": question.kind,
            "asked": question.asked,
            "digs_cm": question.digs_cm or 0,
            "price_micronats": round(MICRO * PRICES["digging"]) if question.digs_cm else 0,
            "answers": _answers(region, question, evidence, weights, levels),
        }
        for question in region.questions
    ]


def _answers(
    region: Region, question: Question, evidence: Evidence, weights: Weights, levels: list[float]
) -> list[dict[str, Any]]:
    odds = np.array([_by_zone(region, one.zone_log_odds) for one in question.answers])
    share = np.array([one.share or 0.0 for one in question.answers])
    tells = bool(np.any(odds != 0)) and bool((share > 0).all())
    made = []
    if tells:
        chance = question_chance(odds, share / share.sum(), weights.answer_error)
        nats = weigh.centred_nats(chance, evidence.prior)
        points = round_half_up(weights.temper * nats * weigh.CENTIBANS_PER_NAT)
        mean = round_half_up(chance @ evidence.prior * 10000)
    for at, one in enumerate(question.answers):
        row: dict[str, Any] = {"value": one.value}
        if tells:
            row |= {"share": int(mean[at]), "evidence": points[at].tolist()}
        if one.effect is not None:
            row["effect"] = compile_effect(one.effect, levels)
        made.append(row)
    return made


def _by_zone(region: Region, odds: dict[str, float]) -> list[float]:
    return [float(odds.get(zone.id, 0.0)) for zone in region.zones]


def compile_rules(
    region: Region, evidence: Evidence, weights: Weights, levels: list[float]
) -> list[dict[str, Any]]:
    """Rules: condition, evidence in centibans where it speaks for zones, effect."""
    made = []
    for rule in region.rules:
        row: dict[str, Any] = {"id": rule.id, "when": compile_condition(rule.when)}
        if rule.zone_log_odds:
            odds = np.exp(np.array(_by_zone(region, rule.zone_log_odds)))
            nats = weigh.centred_nats(odds, evidence.prior)
            points = round_half_up(weights.temper * nats * weigh.CENTIBANS_PER_NAT)
            row["evidence"] = points.tolist()
        if rule.effect is not None:
            row["effect"] = compile_effect(rule.effect, levels)
        made.append(row)
    return made


def compile_condition(when: Condition) -> dict[str, Any]:
    """A condition with only the keys that are set; site facts and answers by plain names."""
    if when.all:
        return {"all": [compile_condition(one) for one in when.all]}
    if when.any:
        return {"any": [compile_condition(one) for one in when.any]}
    if when.no is not None:
        return {"not": compile_condition(when.no)}
    if when.question is not None:
        return {"question": when.question, "is": when.answer}
    if when.site is not None:
        limits = {"at_least": when.at_least, "at_most": when.at_most}
        return {"fact": when.site, **{k: v for k, v in limits.items() if v is not None}}
    who = {"plant": when.plant} if when.plant is not None else {"group": when.group}
    limits = {
        "cover_at_least_pct": when.cover_at_least_pct,
        "count_at_least": when.count_at_least,
    }
    return {**who, **{k: v for k, v in limits.items() if v is not None}}


def compile_effect(effect: Effect, levels: list[float]) -> dict[str, Any]:
    """What an answer does to other evidence; weights in whole quarters, only what is set."""
    made: dict[str, Any] = {}
    for name in ("height_off", "sown", "dead_counts", "second_call", "move_plot"):
        if getattr(effect, name):
            made[name] = True
    if effect.elevation_shift_m:
        made["elevation_shift_m"] = effect.elevation_shift_m
    if effect.kept:
        made["kept"] = dict(effect.kept)
    if effect.newcomer > 0:
        made["newcomer"] = levels.index(effect.newcomer)
    if effect.layers_gone:
        made["layers_gone"] = list(effect.layers_gone)
    for name in ("found", "cover", "question_weight"):
        shares = getattr(effect, name)
        if shares:
            made[name] = {trait: _quarters(share) for trait, share in shares.items()}
    if effect.azonal_weight < 1:
        made["azonal_weight"] = _quarters(effect.azonal_weight)
    return made


def _quarters(share: float) -> int:
    return int(round_half_up(4.0 * share))


def compile_disturbances(region: Region, levels: list[float]) -> list[dict[str, Any]]:
    """Disturbances: what they answer beforehand and what they do."""
    return [
        {
            "id": one.id,
            "notes": one.notes,
            "dug": one.dug,
            "states": dict(one.states),
            "effect": _own_effect(one, levels),
            "disturbs": one.notes or bool(_own_effect(one, levels)),
        }
        for one in region.disturbances
    ]


def _own_effect(one: Disturbance, levels: list[float]) -> dict[str, Any]:
    made: dict[str, Any] = {}
    if one.kept:
        made["kept"] = dict(one.kept)
    if one.newcomer > 0:
        made["newcomer"] = levels.index(one.newcomer)
    if one.layers_gone:
        made["layers_gone"] = list(one.layers_gone)
    return made
