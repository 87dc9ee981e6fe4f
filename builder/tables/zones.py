"""zones.yaml: the belts of the slope, low to high, then the ground off the slope."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    HEIGHT,
    Flag,
    Id,
    Keyed,
    Many,
    Number,
    Part,
    Record,
    Ref,
    Series,
    Text,
    column,
)

SHIFT = Number(-1000, 1000)
SITE_RANGES = ("peat_depth_cm", "water_table_cm", "ph", "exposure_rank", "slope_deg")


@dataclass(frozen=True, kw_only=True)
class Zone(Record):
    """One belt, or one kind of azonal ground."""

    id: str = column(Id())
    letter: str = column(Text(longest=1))
    short: str = column(Text(longest=20))
    name: str = column(Text())
    kind: str = column(Text(choices=("zonal", "azonal")))
    one_line: str = column(Text())
    why_here: str = column(Text())
    band_m: tuple[float, float] = column(Series(("low", "high"), HEIGHT))
    centre_m: float = column(HEIGHT)
    soft_edge_m: float = column(Number(0, 1000))
    north_shift_m: float = column(SHIFT)
    south_shift_m: float = column(SHIFT)
    exposed_shift_m: float = column(SHIFT, default=0)
    site_ranges: dict[str, tuple[float, float, float]] = column(
        Keyed(Series(("low", "usual", "high"), Number()), names=SITE_RANGES), default={}
    )
    frost_free_days: int = column(Number(0, 366, whole=True))
    ground_water_in_reach: bool = column(Flag(), default=False)
    limits: tuple[str, ...] = column(Many(Text()))
    neighbours: tuple[str, ...] = column(Many(Ref("zones")))
    told_from: dict[str, str] = column(Keyed(Text(), table="zones"))
    remnant_clues: str = column(Text())
    what_absence_means: str = column(Text())
    plot_area_m2: float | None = column(Number(0.01, 100_000), default=None)
    plots_id: str = column(Text(), default="")
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class ZonesFile(Record):
    """zones.yaml as written."""

    zones: tuple[Zone, ...] = column(Many(Part(Zone)))
