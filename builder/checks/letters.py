"""Zones have their own letter and short name: A, B, C up the slope, W to Z off the slope.

Passes: zones.yaml zones/1/letter: B
Fails: zones.yaml zones/1/letter: A
Fails: zones.yaml zones/2/letter: C
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "letters"
NEEDS = ("zones",)
ZONAL = "ABCDEFGHJKLMNOPQRSTUV"
AZONAL = "WXYZ"


def check(loaded: Loaded) -> Iterator[Problem]:
    """Letters of the wrong kind or out of order, doubles, and azonal zones before zonal ones."""
    if loaded.partial is None:
        return
    letters: set[str] = set()
    shorts: set[str] = set()
    last, azonal_seen = "", False
    for zone in loaded.partial.zones:
        legal = ZONAL if zone.kind == "zonal" else AZONAL
        if zone.letter not in legal:
            yield problem_at(
                zone.place("letter"),
                ID,
                f'letter "{zone.letter}" is not for {zone.kind} ground',
                f"Use one of {legal}.",
            )
        elif zone.letter in letters:
            yield problem_at(
                zone.place("letter"),
                ID,
                f'letter "{zone.letter}" stands twice',
                "Give each zone its own letter.",
            )
        elif zone.letter < last:
            yield problem_at(
                zone.place("letter"),
                ID,
                f'letter "{zone.letter}" comes after "{last}"',
                "Letters follow the order of the table.",
            )
        if zone.kind == "zonal" and azonal_seen:
            yield problem_at(
                zone.place("kind"),
                ID,
                f"{zone.id} stands below azonal ground",
                "Zones of the slope come first, low to high.",
            )
        if zone.short in shorts:
            yield problem_at(
                zone.place("short"),
                ID,
                f'short name "{zone.short}" stands twice',
                "Give each zone its own short name.",
            )
        azonal_seen = azonal_seen or zone.kind == "azonal"
        letters.add(zone.letter)
        shorts.add(zone.short)
        last = max(last, zone.letter)
