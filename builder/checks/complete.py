"""Each zone has plants, growth, soil, climate, notes and a mix; each cell of the notes is filled.

Passes: seed.yaml mixes/wet/method: none
Fails: seed.yaml mixes/wet: (left out)
Fails: reclaim.yaml zones/wet/by_disturbance: {}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, problem_at
from builder.tables import Loaded
from builder.tables.regions import YAML_TABLES

ID = "complete"
NEEDS = (*YAML_TABLES, "climate")
NEEDED = ("plants in occurrence.yaml",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """What a zone lacks, reported at the zone."""
    region = loaded.partial
    if region is None:
        return
    placed = {zone_id for zone_id, _ in region.occurrence}
    written = {
        "production": loaded.declared("production"),
        "soils": loaded.declared("soils"),
        "mixes": set(region.mixes),
        "notes": set(region.reclaim.zones),
    }
    has = {
        "plants in occurrence.yaml": placed,
        "growth in production.yaml": written["production"],
        "soil in soils.yaml": written["soils"],
        "climate in climate.csv": set(region.climate),
        "notes in reclaim.yaml": written["notes"],
        "mix in seed.yaml": written["mixes"],
    }
    unwritten = [what for what, zones in has.items() if not zones and what not in NEEDED]
    if unwritten:
        yield problem_at(
            region.zones[0].place("id"),
            ID,
            f"no zone has {', '.join(unwritten)} yet",
            "A region fitted to plots begins so; write them before a crew relies on it.",
            CAUTION,
        )
    for zone in region.zones:
        for what, zones in has.items():
            if zone.id not in zones and what not in unwritten:
                yield problem_at(
                    zone.place("id"),
                    ID,
                    f"{zone.id} has no {what}",
                    "Add it; an empty part of the booklet helps nobody.",
                )
    noted = [each.id for each in region.disturbances if each.notes]
    for zone_id, notes in region.reclaim.zones.items():
        for disturbance in noted:
            if disturbance not in notes.by_disturbance:
                yield problem_at(
                    notes.key_place("by_disturbance"),
                    ID,
                    f"{zone_id} has no note for {disturbance}",
                    "Add do: and avoid:, or set notes: false on the disturbance.",
                )
