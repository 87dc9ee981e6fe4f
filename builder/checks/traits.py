"""Effects speak of traits that plants have, and of layers and groups that there are.

Passes: questions.yaml questions/1/answers/1/effect: {kept: {grass: 0.5}}
Fails: questions.yaml questions/1/answers/1/effect: {kept: {gras: 0.5}}
Fails: questions.yaml questions/1/answers/1/effect: {found: {mix: 0.3}}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, nearest, problem_at
from builder.tables import Effect, Loaded, Record
from builder.tables.questions import TRAITS, WEIGHTS

ID = "traits"
NEEDS = ("questions", "plants")


def check(loaded: Loaded) -> Iterator[Problem]:
    """Trait words nobody knows, and weights that are not quarters."""
    region = loaded.partial
    if region is None:
        return
    known = TRAITS | {f"group:{group_id}" for group_id in loaded.declared("groups")}
    effects: list[Effect] = [
        answer.effect
        for question in region.questions
        for answer in question.answers
        if answer.effect is not None
    ]
    effects += [rule.effect for rule in region.rules if rule.effect is not None]
    for effect in effects:
        for name in ("kept", "found", "cover"):
            yield from _named(effect, name, known, quarters=name != "kept")
    for disturbance in region.disturbances if region.head is not None else ():
        yield from _named(disturbance, "kept", known, quarters=False)


def _named(
    record: Record, name: str, known: set[str] | frozenset[str], quarters: bool
) -> Iterator[Problem]:
    for trait, weight in getattr(record, name).items():
        if trait not in known and not _is_form_word(trait):
            yield problem_at(
                record.key_place(name, trait),
                ID,
                f'"{trait}" is no trait of plants',
                nearest(trait, known, "trait"),
            )
        elif quarters and weight not in WEIGHTS:
            yield problem_at(
                record.place(name, trait),
                ID,
                f"weight {weight:g} of {trait} is not a quarter",
                "Use 0, 0.25, 0.5, 0.75 or 1.",
            )


def _is_form_word(trait: str) -> bool:
    return any(known.startswith(trait + "_") for known in TRAITS)
