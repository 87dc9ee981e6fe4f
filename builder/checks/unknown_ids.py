"""Shared by the checks of names: ids that are said of a table and do not stand in it."""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, nearest, problem_at
from builder.tables import Loaded

HOME = {
    "zones": "zones.yaml",
    "plants": "plants.yaml",
    "groups": "the groups of plants.yaml",
    "questions": "questions.yaml",
    "disturbances": "the disturbances of region.yaml",
}


def unknown(loaded: Loaded, table: str, what: str, check: str) -> Iterator[Problem]:
    """A problem for each id of a table that is used and not declared; look-alikes aside."""
    known = loaded.declared(table)
    for said in loaded.references:
        if said.table == table and said.id not in known and said.field != "lookalikes":
            yield problem_at(
                said.place,
                check,
                f'{what} "{said.id}" is not in {HOME[table]}',
                nearest(said.id, known, what),
            )
