"""reclaim.yaml: what to do by zone and disturbance, and when it counts as done."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    COUNT,
    MONTHS,
    SHARE,
    YEAR,
    Figures,
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

WILDLIFE = ("birds", "small_mammals", "large_mammals", "pollinators")
SOIL_LIFE = ("mycorrhiza", "biocrust", "n_fixers")
EXPECT = ("usual", "unlikely")
MEASURES = (
    "bare_ground_pct",
    "bare_peat_pct",
    "native_tree_stems_per_ha",
    "conifer_seedlings_per_ha",
    "dwarf_shrub_cover_pct",
    "peat_forming_cover_pct",
    "water_table_mean_cm",
    "ragwort_cover_pct",
    "bracken_cover_pct",
    "lime_herb_kinds_per_4m2",
    "bogmoss_cover_pct",
    "moss_lichen_cover_pct",
    "soft_rush_cover_pct",
    "flow_share_of_year_pct",
    "brown_moss_cover_pct",
    "silt_cover_pct",
    "giant_hogweed_plants",
    "perennial_cover_pct",
    "production_kg_ha",
    "native_kinds",
)


@dataclass(frozen=True, kw_only=True)
class GeneralNote(Record):
    """A note that holds in the whole region; its figures are in the sentence too."""

    id: str = column(Id())
    text: str = column(Text())
    figures: dict[str, float] = column(Figures(), default={})
    plants: tuple[str, ...] = column(Many(Ref("plants")), default=())


@dataclass(frozen=True, kw_only=True)
class Windows(Record):
    """Months for the work."""

    sow_months: tuple[int, ...] = column(MONTHS)
    plant_months: tuple[int, ...] = column(MONTHS, default=())
    keep_off_months: tuple[int, ...] = column(MONTHS, default=())
    when_they_clash: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class Cell(Record):
    """What to do and what to avoid for one zone and one disturbance."""

    do: str = column(Text())
    avoid: str = column(Text())
    expect: str = column(Text(choices=EXPECT), default="usual")


@dataclass(frozen=True, kw_only=True)
class TrajectoryLine(Record):
    """A line by years since the work: [year, value] points, straight between, flat after."""

    measure: str = column(Text(choices=MEASURES))
    at_most: tuple[tuple[float, float], ...] = column(
        Many(Series(("year", "value"), Number())), default=()
    )
    at_least: tuple[tuple[float, float], ...] = column(
        Many(Series(("year", "value"), Number())), default=()
    )


@dataclass(frozen=True, kw_only=True)
class Success(Record):
    """The zone's own standards. `share` replaces the region's share here when it is given."""

    perennial_cover_share_of_reference: float | None = column(SHARE, default=None)
    share: float | None = column(SHARE, default=None)
    min_native_perennials: int = column(COUNT)
    max_weed_share_of_cover: float = column(SHARE)
    shrub_density_per_m2: float | None = column(Number(0, 1000), default=None)
    tree_stems_per_ha: float | None = column(Number(0, 100_000), default=None)
    woody_stems_per_ha: float | None = column(Number(0, 100_000), default=None)
    earliest_year: int = column(YEAR)
    trajectory: tuple[TrajectoryLine, ...] = column(Many(Part(TrajectoryLine)), default=())


@dataclass(frozen=True, kw_only=True)
class ZoneNotes(Record):
    """Notes of one zone."""

    wildlife: dict[str, str] = column(Keyed(Text(), names=WILDLIFE))
    soil_life: dict[str, str] = column(Keyed(Text(), names=SOIL_LIFE))
    topsoil: str = column(Text())
    seedbed: str = column(Text())
    season: str = column(Text())
    windows: Windows = column(Part(Windows))
    method: str = column(Text())
    protection: str = column(Text())
    cautions: str = column(Text())
    fails: str = column(Text())
    fertiliser: str = column(Text(), default="")
    by_disturbance: dict[str, Cell] = column(Keyed(Part(Cell), table="disturbances"))
    success: Success = column(Part(Success))


@dataclass(frozen=True, kw_only=True)
class ReclaimFile(Record):
    """reclaim.yaml as written."""

    general: tuple[GeneralNote, ...] = column(Many(Part(GeneralNote)), default=())
    zones: dict[str, ZoneNotes] = column(Keyed(Part(ZoneNotes), table="zones"))
