"""production.yaml: yearly growth by zone, air-dry, and what the year does to it."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    MONTHS,
    PERCENT,
    Figures,
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

KG_HA = Number(0, 60_000)
T_HA = Number(0, 2_000)
GROUND = ("bare_soil", "rock_gravel", "litter", "crust_or_moss", "plant_base", "open_water")
FOLIAR = ("tree", "shrub", "grass_like", "forb", "moss_lichen")


@dataclass(frozen=True, kw_only=True)
class Clip(Record):
    """Clip plots: their area, and how many estimates go with one that is clipped."""

    area_m2: float = column(Number(0.01, 100))
    every: int = column(Number(1, 100, whole=True))


@dataclass(frozen=True, kw_only=True)
class StandingCrop(Record):
    """Standing crop of woody plants; by years since fire where age decides it."""

    counted: str = column(Text())
    low: float | None = column(T_HA, default=None)
    normal: float | None = column(T_HA, default=None)
    high: float | None = column(T_HA, default=None)
    by_age: tuple[tuple[float, float], ...] = column(
        Many(Series(("years", "t_ha"), T_HA)), default=()
    )


@dataclass(frozen=True, kw_only=True)
class ConiferEffect(Record):
    """How conifer cover lowers the growth below: share = exp(-coefficient x cover)."""

    coefficient: float = column(Number(0, 1))
    text: str = column(Text())


@dataclass(frozen=True, kw_only=True)
class Production(Record):
    """Growth of one zone."""

    counted: str = column(Text())
    low_kg_ha: float = column(KG_HA)
    normal_kg_ha: float = column(KG_HA)
    high_kg_ha: float = column(KG_HA)
    rain_response: float = column(Number(-3, 5))
    rain_months: tuple[int, ...] = column(MONTHS)
    warmth_response_per_c: float = column(Number(-1, 1), default=0.0)
    warmth_months: tuple[int, ...] = column(MONTHS, default=())
    site_spread_cv: float = column(Number(0.01, 2))
    clip: Clip = column(Part(Clip))
    ground_cover_pct: dict[str, float] = column(Keyed(PERCENT, names=GROUND))
    foliar_cover_pct: dict[str, float] = column(Keyed(PERCENT, names=FOLIAR))
    standing_crop_t_ha: StandingCrop | None = column(Part(StandingCrop), default=None)
    moss_kg_ha: tuple[float, float, float] | None = column(
        Series(("low", "normal", "high"), KG_HA), default=None
    )
    conifer_effect: ConiferEffect | None = column(Part(ConiferEffect), default=None)
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class ReferenceLine(Record):
    """A published line to hold the region's own figures against."""

    text: str = column(Text())
    figures: dict[str, float] = column(Figures())
    zones: tuple[str, ...] = column(Many(Ref("zones")), default=())


@dataclass(frozen=True, kw_only=True)
class ProductionFile(Record):
    """production.yaml as written."""

    crop_year: str = column(Text())
    air_dry: str = column(Text())
    years_meaning: str = column(Text())
    reference_lines: tuple[ReferenceLine, ...] = column(Many(Part(ReferenceLine)), default=())
    production: dict[str, Production] = column(Keyed(Part(Production), table="zones"))
