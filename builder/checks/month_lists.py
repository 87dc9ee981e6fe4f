"""A list of months names each month once, and names at least one where work hangs on it.

Passes: seed.yaml mixes/wet/method: none
Passes: reclaim.yaml zones/lower/windows: {sow_months: [10, 11]}
Fails: reclaim.yaml zones/lower/windows: {sow_months: [10, 10]}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Place, Problem, problem_at
from builder.tables import Loaded

ID = "month-lists"
NEEDS = ()


def check(loaded: Loaded) -> Iterator[Problem]:
    """Months that stand twice, empty windows; months beyond 12 are refused while reading."""
    region = loaded.partial
    if region is None:
        return
    for zone_id, row in region.production.items():
        yield from _once(row.rain_months, row.place("rain_months"), f"rain months of {zone_id}")
        yield from _once(
            row.warmth_months,
            row.place("warmth_months"),
            f"warmth months of {zone_id}",
            may_be_empty=True,
        )
        if row.warmth_response_per_c and not row.warmth_months:
            yield problem_at(
                row.place("warmth_response_per_c"),
                ID,
                f"{zone_id} answers to warmth, but of no months",
                "Add warmth_months.",
            )
    notes = region.reclaim.zones if region.reclaim is not None else {}
    for zone_id, note in notes.items():
        windows = note.windows
        sown = zone_id not in region.mixes or region.mixes[zone_id].method != "none"
        yield from _once(
            windows.sow_months,
            windows.place("sow_months"),
            f"sowing months of {zone_id}",
            may_be_empty=not sown,
        )
        for name in ("plant_months", "keep_off_months"):
            yield from _once(
                getattr(windows, name),
                windows.place(name),
                f"{name} of {zone_id}",
                may_be_empty=True,
            )
    for zone_id, mix in region.mixes.items():
        for propagule in mix.propagules:
            yield from _once(
                propagule.months,
                propagule.place("months"),
                f"months of {propagule.kind} in {zone_id}",
            )


def _once(
    months: tuple[int, ...], place: Place, what: str, may_be_empty: bool = False
) -> Iterator[Problem]:
    if len(set(months)) != len(months):
        yield problem_at(place, ID, f"a month stands twice in the {what}", "Name each once.")
    if not months and not may_be_empty:
        yield problem_at(place, ID, f"the {what} are empty", "Name at least one month, 1 to 12.")
