"""No id stands twice in a table, and no answer twice in a question.

Passes: plants.yaml plants/1/id: lower_shrub
Fails: plants.yaml plants/1/id: lower_grass
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from builder.problems import Problem, problem_at
from builder.tables import Loaded, Record

ID = "double-id"
NEEDS = ()


def check(loaded: Loaded) -> Iterator[Problem]:
    """The second row of every pair that shares an id."""
    region = loaded.partial
    if region is None:
        return
    tables: list[Sequence[Record]] = [
        region.zones,
        region.plants,
        region.groups,
        region.questions,
        region.rules,
        region.disturbances if region.head is not None else (),
        region.reclaim.general if region.reclaim is not None else (),
        [caution for caution in (region.cautions if region.head is not None else ()) if caution.id],
    ]
    for rows in tables:
        yield from _doubles(rows, "id")
    for question in region.questions:
        yield from _doubles(question.answers, "value")


def _doubles(rows: Sequence[Record], name: str) -> Iterator[Problem]:
    first: dict[str, int] = {}
    for row in rows:
        written = getattr(row, name)
        place = row.place(name)
        if written in first:
            yield problem_at(
                place,
                ID,
                f'"{written}" stands twice',
                f"The first is on line {first[written]}; give one of them another {name}.",
            )
        first.setdefault(written, place.line)
