"""A source is demo, common practice, or published with a key of sources.yaml.

Passes: zones.yaml source: published example_2000
Fails: zones.yaml source: published exmaple_2000
Fails: zones.yaml source: a colleague said so
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import CAUTION, Problem, nearest, problem_at
from builder.rows import Value
from builder.tables import Loaded
from builder.tables.sources import COMMON, DEMO, PUBLISHED, stated_sources

ID = "known-sources"
NEEDS = ("sources",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Words that are no source, keys that are not listed, keys that nothing points at."""
    known = loaded.declared("sources")
    used: set[str] = set()
    for value in _all_stated(loaded):
        text = str(value.value)
        word, _, key = text.partition(" ")
        if text in (DEMO, COMMON):
            continue
        if word == PUBLISHED and key in known:
            used.add(key)
        elif word == PUBLISHED:
            yield problem_at(
                value.at,
                ID,
                f'source "{key}" is not in sources.yaml',
                nearest(key, known, "source"),
            )
        else:
            yield problem_at(
                value.at,
                ID,
                f'"{text}" is no source',
                "Write demo, common practice, or published and a key.",
            )
    if loaded.partial is not None:
        for key, source in loaded.partial.sources.items():
            if key not in used and not key.startswith("example_"):
                yield problem_at(
                    source.at,
                    ID,
                    f'nothing points at source "{key}"',
                    "Point a figure at it, or take it out.",
                    CAUTION,
                )


def _all_stated(loaded: Loaded) -> Iterator[Value]:
    for name, root in loaded.roots.items():
        if root is None:
            continue
        yield from stated_sources(root)
        texts = root.get("texts_source") if name == "region" else None
        if isinstance(texts, Value):
            yield texts
    if loaded.climate_sheet is not None and "source" in loaded.climate_sheet.notes:
        yield loaded.climate_sheet.notes["source"]
