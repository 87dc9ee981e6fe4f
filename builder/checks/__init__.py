"""The checks of a region, one rule a file, listed once.

A check yields problems and never raises on what a person wrote; it runs when the tables it needs
could be read.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass, replace
from pathlib import Path

from builder.checks import (
    acid,
    allowance,
    answer_shares,
    bands,
    caution_typed,
    climate_months,
    complete,
    conditions,
    constancy_classes,
    cover_classes,
    digging,
    disturbance_names,
    disturbance_states,
    double_ids,
    editions,
    ground_cover,
    group_members,
    group_names,
    known_sources,
    lapse_months,
    letters,
    lookalikes,
    month_lists,
    neighbours,
    occurrence_values,
    plant_names,
    plant_texts,
    plants_placed,
    production_order,
    provenance,
    question_names,
    question_zones,
    safe_words,
    seed_counts,
    soil_layers,
    success_rules,
    traits,
    translations,
    zone_names,
)
from builder.problems import Problem, in_order
from builder.tables import Loaded, load_region


@dataclass(frozen=True, slots=True)
class Check:
    """A rule: its name, the tables it needs, its manual, and the generator of problems."""

    id: str
    needs: tuple[str, ...]
    manual: str
    run: Callable[[Loaded], Iterator[Problem]]


CHECKS = tuple(
    Check(module.ID, tuple(module.NEEDS), module.__doc__ or "", module.check)
    for module in (
        zone_names,
        plant_names,
        group_names,
        question_names,
        disturbance_names,
        double_ids,
        complete,
        occurrence_values,
        plants_placed,
        cover_classes,
        constancy_classes,
        bands,
        neighbours,
        letters,
        production_order,
        ground_cover,
        month_lists,
        climate_months,
        lapse_months,
        provenance,
        known_sources,
        lookalikes,
        plant_texts,
        group_members,
        question_zones,
        answer_shares,
        digging,
        acid,
        soil_layers,
        seed_counts,
        allowance,
        success_rules,
        disturbance_states,
        traits,
        conditions,
        caution_typed,
        safe_words,
        editions,
        translations,
    )
)


def checked_region(folder: Path | str) -> Loaded:
    """A region with every problem, of reading and of the checks, in order of place."""
    loaded = load_region(folder)
    return replace(loaded, problems=problems_of(loaded))


def problems_of(loaded: Loaded) -> list[Problem]:
    """All problems of a region that was read."""
    found = list(loaded.problems)
    for check in CHECKS:
        if loaded.read.issuperset(check.needs):
            found += check.run(loaded)
    return in_order(found)
