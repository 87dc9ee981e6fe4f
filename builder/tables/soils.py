"""soils.yaml: the soil of each zone, layer by layer."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    PERCENT,
    SHARE,
    Keyed,
    Many,
    Number,
    Part,
    Record,
    Series,
    Text,
    column,
)

DEPTH = Number(0, 1000)
LAYER_KINDS = ("mineral", "organic_mineral", "peat")


@dataclass(frozen=True, kw_only=True)
class Layer(Record):
    """One layer. Peat has no sand, silt and clay; stated water only where no equation serves."""

    top_cm: float = column(DEPTH)
    bottom_cm: float = column(DEPTH)
    kind: str = column(Text(choices=LAYER_KINDS), default="mineral")
    sand_pct: float | None = column(PERCENT, default=None)
    silt_pct: float | None = column(PERCENT, default=None)
    clay_pct: float | None = column(PERCENT, default=None)
    organic_matter_pct: float = column(PERCENT)
    stones_vol_pct: float = column(Number(0, 99))
    ph: float = column(Number(2, 12))
    ec_ds_m: float = column(Number(0, 200))
    von_post_h: int | None = column(Number(1, 10, whole=True), default=None)
    saturation: float | None = column(SHARE, default=None)
    field_capacity: float | None = column(SHARE, default=None)
    wilting_point: float | None = column(SHARE, default=None)


@dataclass(frozen=True, kw_only=True)
class Soil(Record):
    """The soil of a zone."""

    summary: str = column(Text())
    rooting_depth_cm: float = column(Number(1, 1000))
    restriction: str = column(Text())
    water_table_cm: tuple[float, float, float] | None = column(
        Series(("wettest", "usual", "driest"), Number(-200, 2000)), default=None
    )
    layers: tuple[Layer, ...] = column(Many(Part(Layer)))


@dataclass(frozen=True, kw_only=True)
class PeatClass(Record):
    """Water held by peat of a range of von Post classes, by volume."""

    name: str = column(Text())
    von_post: tuple[int, int] = column(Series(("low", "high"), Number(1, 10, whole=True)))
    bulk_density_g_cm3: tuple[float, float] = column(Series(("low", "high"), Number(0.001, 2)))
    saturation: float = column(SHARE)
    field_capacity: float = column(SHARE)
    wilting_point: float = column(SHARE)


@dataclass(frozen=True, kw_only=True)
class WaterRules(Record):
    """Which way water held is worked out, and when it limits nothing."""

    text: str = column(Text())
    mineral_om_max_pct: float = column(PERCENT)
    peat_om_min_pct: float = column(PERCENT)
    near_water_cm: float = column(Number(0, 500))
    why: str = column(Text(), default="")
    also: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class SoilsFile(Record):
    """soils.yaml as written."""

    water_rules: WaterRules | None = column(Part(WaterRules), default=None)
    peat_classes: tuple[PeatClass, ...] = column(Many(Part(PeatClass)), default=())
    soils: dict[str, Soil] = column(Keyed(Part(Soil), table="zones"))
