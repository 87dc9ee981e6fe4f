"""No two plants share a scientific name, a code, or another's synonym.

Passes: plants.yaml plants/1/scientific: Frutex inferior
Fails: plants.yaml plants/1/scientific: Graminea inferior
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, problem_at
from builder.tables import Loaded

ID = "plant-texts"
NEEDS = ("plants",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Names that search could not tell apart."""
    if loaded.partial is None:
        return
    names = {plant.scientific.lower(): plant.id for plant in reversed(loaded.partial.plants)}
    commons: dict[str, str] = {}
    codes: dict[str, str] = {}
    for plant in loaded.partial.plants:
        said = [("scientific", plant.scientific, plant.place("scientific"))]
        said += [
            ("synonym", text, plant.place("synonyms", n)) for n, text in enumerate(plant.synonyms)
        ]
        for what, text, place in said:
            other = names.setdefault(text.lower(), plant.id)
            if other != plant.id:
                yield problem_at(
                    place,
                    ID,
                    f'{what} "{text}" is also a name of {other}',
                    "A name belongs to one plant.",
                )
        for position, code in enumerate(plant.codes):
            other = codes.setdefault(code.upper(), plant.id)
            if other != plant.id:
                yield problem_at(
                    plant.place("codes", position),
                    ID,
                    f'code "{code}" is also the code of {other}',
                    "Give each plant its own code.",
                )
        other = commons.setdefault(plant.common.lower(), plant.id)
        if other != plant.id:
            yield problem_at(
                plant.place("common"),
                ID,
                f'common name "{plant.common}" is also that of {other}',
                "Add a word that parts them.",
                CAUTION,
            )
