"""The edition has a date of the calendar, and its first language is one that has words.

Passes: region.yaml date: '2026-05-01'
Fails: region.yaml date: May 2026
Fails: region.yaml languages: [es, en]
"""

from __future__ import annotations

import datetime
from collections.abc import Iterator

from builder.problems import CAUTION, Problem, problem_at
from builder.tables import Loaded

ID = "editions"
NEEDS = ("region",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Dates nobody can read, languages without words, elevations upside down."""
    region = loaded.partial
    if region is None:
        return
    head = region.head
    try:
        datetime.date.fromisoformat(head.date)
    except ValueError:
        yield problem_at(
            head.place("date"),
            ID,
            f'"{head.date}" is no date',
            "Write year-month-day in quotes, such as '2026-05-01'.",
        )
    if head.elevation_m[0] >= head.elevation_m[1]:
        yield problem_at(
            head.place("elevation_m"),
            ID,
            "the region's heights are upside down",
            "Write [low, high].",
        )
    if not head.languages or head.languages[0] != "en":
        yield problem_at(
            head.place("languages"),
            ID,
            "the first language is not en",
            "The tables themselves are in English; others stand in words/.",
        )
    for position, language in enumerate(head.languages[1:], start=1):
        if language not in region.words:
            yield problem_at(
                head.place("languages", position),
                ID,
                f"there is no words/{language}.yaml",
                "Write it, or take the language out.",
                CAUTION,
            )
    for language, words in region.words.items():
        if words.language != language:
            yield problem_at(
                words.place("language"),
                ID,
                f'words/{language}.yaml says its language is "{words.language}"',
                "File name and language are the same.",
            )
