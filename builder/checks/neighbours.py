"""Neighbours name each other, and no zone is its own neighbour.

Passes: zones.yaml zones/0/neighbours: [upper, wet]
Fails: zones.yaml zones/0/neighbours: [upper]
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "neighbours"
NEEDS = ("zones",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """One-sided neighbours, reported where the other side stands."""
    if loaded.partial is None:
        return
    by_id = {zone.id: zone for zone in loaded.partial.zones}
    for zone in loaded.partial.zones:
        for position, other in enumerate(zone.neighbours):
            place = zone.place("neighbours", position)
            if other == zone.id:
                yield problem_at(place, ID, f"{zone.id} is its own neighbour", "Take it out.")
            elif other in by_id and zone.id not in by_id[other].neighbours:
                yield problem_at(
                    place,
                    ID,
                    f"{zone.id} names {other} as neighbour, {other} does not name it",
                    f"Add {zone.id} to the neighbours of {other}, or take {other} out here.",
                )
        for other in zone.told_from:
            if other == zone.id:
                yield problem_at(
                    zone.key_place("told_from", other),
                    ID,
                    f"{zone.id} is told from itself",
                    "Name another zone.",
                )
