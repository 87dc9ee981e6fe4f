"""A site check's answers, each with its points per zone."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Any

import numpy as np

from builder.key.context import GONE, Context, context_of
from builder.key.findings import Finding, Findings, read_findings, step_of
from builder.key.prepare import Ints, Key, Site
from builder.key.rounding import NATS_PER_CENTIBAN, round_half_up
from builder.key.rules import fired_rules

NOT_FOUND = -1
NO_COVER = 4


@dataclass(frozen=True)
class Answer:
    """One answer and what it says.

    kind    plant, group, question or rule; at: index in the pack
    step    cover step 0..3, 4 not given, -1 not found; of a question the answer's index
    v       quarters of the plant that could still be missed, for "not found"
    plain   its chance follows the tables, with no newcomer in it
    points  whole centibans per zone
    """

    kind: str
    id: str
    answer: str
    found: bool
    at: int
    step: int
    v: int
    plain: bool
    points: Ints

    @property
    def counts(self) -> bool:
        """Does it tell at least two zones apart? Only such answers are in n."""
        return bool(self.points.max() - self.points.min() >= 1)


@dataclass(frozen=True)
class Reading:
    """A site's answers with what they were read under."""

    answers: list[Answer]
    context: Context
    findings: Findings
    rules: list[dict[str, Any]]


def read_answers(key: Key, site: Site) -> Reading:
    """Plants and groups in the order given, then ground questions, then rules that hold."""
    findings = read_findings(key, site)
    rules = fired_rules(key, site, findings)
    context = context_of(key, site, tuple(rule["effect"] for rule in rules if rule.get("effect")))
    answers = [_finding_answer(key, context, p, one) for p, one in findings.plants.items()]
    others = [
        _group_answer(key, context, findings, g, one)
        for g, one in findings.groups.items()
        if key.pack["groups"][g]["use"] == "answer"
    ]
    others += _question_answers(key, site, context)
    others += [
        Answer("rule", rule["id"], "true", False, -1, -1, 4, False, np.array(rule["evidence"]))
        for rule in rules
        if rule.get("evidence")
    ]
    answers += [replace(one, points=azonal_share(key, context, one.points)) for one in others]
    return Reading(answers, context, findings, rules)


def plant_answer(key: Key, context: Context, p: int, step: int, word: str) -> Answer:
    """The answer for one plant under a context; step -1 not found, 0..3 cover, 4 not given."""
    found = step != NOT_FOUND
    row = newcomer_row(key, context, p, found)
    points = found_points(key, context, p, step) if found else absent_points(key, context, p)
    return Answer(
        "plant",
        key.pack["plants"][p]["id"],
        word,
        found,
        p,
        step,
        int(context.v[p]),
        row is None and not context.sown[p],
        azonal_share(key, context, points),
    )


def _finding_answer(key: Key, context: Context, p: int, finding: Finding) -> Answer:
    if finding["state"] != "found":
        return plant_answer(key, context, p, NOT_FOUND, "not_found")
    cover = finding.get("cover")
    return plant_answer(key, context, p, step_of(key, cover), cover or "found")


def newcomer_row(key: Key, context: Context, p: int, found: bool) -> int | None:
    """Row of the newcomer tables that stands for this answer."""
    if context.newcomer < 0:
        return None
    half = int(not found and context.seen[p] == 1)
    return key.newcomer_at.get((p, context.newcomer, half))


def found_points(key: Key, context: Context, p: int, step: int) -> Ints:
    """Points of "found" with a cover step (4: not given); a newcomer's cover is left out."""
    if context.sown[p]:
        return np.zeros(key.zones, np.int32)
    row = newcomer_row(key, context, p, True)
    if row is not None:
        points = key.newcomer_found[row, context.kept[p]]
    else:
        base = key.found[p, NO_COVER]
        points = base + quarters(key.found[p, step] - base, int(context.cover_weight[p]))
    return quarters(points, int(context.found_weight[p]))


def absent_points(key: Key, context: Context, p: int) -> Ints:
    """Points of "searched, not found"; nothing where it could not have been seen."""
    v = int(context.v[p])
    row = newcomer_row(key, context, p, False)
    if context.sown[p] or context.seen[p] == GONE:
        return np.zeros(key.zones, np.int32)
    if row is not None:
        return np.asarray(key.newcomer_absent[row, v], np.int32)
    return key.absent[p, v - 1] if v else np.zeros(key.zones, np.int32)


def quarters(points: Ints, weight: int) -> Ints:
    """A share of points in quarters, whole centibans."""
    return points if weight == 4 else round_half_up(points * weight / 4.0)


def _group_answer(
    key: Key, context: Context, findings: Findings, g: int, finding: Finding
) -> Answer:
    """ "Some of these": at least one member is there; not found: every member is missing.

    Members with answers of their own are not counted twice: a member found says more, then the
    group adds nothing; of members not found at least one of the others must be there.
    """
    group = key.pack["groups"][g]
    found = finding["state"] == "found"
    free = [p for p in group["members"] if p not in findings.plants]
    points = np.zeros(key.zones, np.int32)
    if found:
        states = [findings.plants.get(p, {}).get("state") for p in group["members"]]
        silent = "found" in states or context.sown[group["members"]].any() or not free
        if not silent and context.newcomer < 0:
            points = _some_of(key, g, free)
    else:
        for p in free:
            points = points + absent_points(key, context, p)
    whole = len(free) == len(group["members"])
    plain = found and whole and context.newcomer < 0
    return Answer("group", group["id"], finding["state"], found, g, -1, 4, plain, points)


def _some_of(key: Key, g: int, free: list[int]) -> Ints:
    """Centibans of "at least one of these members"; of all of them as the pack has it."""
    if len(free) == len(key.pack["groups"][g]["members"]):
        return np.array(key.pack["evidence"]["groups"][g]["found"], np.int32)
    chance = 1.0 - np.prod(1.0 - key.presence[free], axis=0)
    prior = np.exp(key.area * NATS_PER_CENTIBAN) / key.zones
    nats = np.log(chance) - np.log((prior * chance).sum() / prior.sum())
    return round_half_up(nats * key.settings["temper"] / NATS_PER_CENTIBAN)


def _question_answers(key: Key, site: Site, context: Context) -> list[Answer]:
    given = site.get("questions") or {}
    answers = []
    for at, question in enumerate(key.pack["questions"]):
        for step, one in enumerate(question["answers"]):
            if one["value"] == given.get(question["id"]) and one.get("evidence"):
                weight = context.question_weight.get(question["id"], 4)
                points = quarters(np.array(one["evidence"], np.int32), weight)
                found = ("question", question["id"], one["value"], False)
                answers.append(Answer(*found, at, step, 4, weight == 4, points))
    return answers


def azonal_share(key: Key, context: Context, points: Ints) -> Ints:
    """Water led in by people feeds azonal plants: what speaks for azonal ground counts in part."""
    if context.azonal_weight == 4:
        return points
    azonal = np.array([zone["kind"] == "azonal" for zone in key.pack["zones"]])
    return np.where(azonal & (points > 0), quarters(points, context.azonal_weight), points)
