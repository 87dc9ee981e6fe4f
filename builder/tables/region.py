"""region.yaml: what holds for the whole region."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.plants import Caution
from builder.tables.questions import LAYERS
from builder.tables.shape import (
    COUNT,
    HEIGHT,
    MONTHS,
    PERCENT,
    SHARE,
    YEAR,
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

UNITS = ("metric", "us")


@dataclass(frozen=True, kw_only=True)
class CoverClass(Record):
    """One class of a cover scale; the lower limit belongs to the class."""

    code: str = column(Text(longest=4))
    label: str = column(Text())
    low_pct: float = column(PERCENT)
    high_pct: float = column(PERCENT)
    mid_pct: float = column(PERCENT)
    by_count: bool = column(Flag(), default=False)


@dataclass(frozen=True, kw_only=True)
class Conversion(Record):
    """Another published way from class to percent, never mixed with the first in one data set."""

    name: str = column(Text())
    mid_pct: dict[str, float] = column(Keyed(PERCENT))


@dataclass(frozen=True, kw_only=True)
class CoverScale(Record):
    """The region's cover scale, classes from low to high."""

    id: str = column(Id())
    name: str = column(Text())
    classes: tuple[CoverClass, ...] = column(Many(Part(CoverClass)))
    second_conversion: Conversion | None = column(Part(Conversion), default=None)
    note: str = column(Text(), default="")

    def class_of(self, cover_pct: float) -> CoverClass:
        """The class a cover falls into. [%]"""
        for each in reversed(self.classes):
            if cover_pct >= each.low_pct:
                return each
        return self.classes[0]

    def by_code(self, code: str) -> CoverClass | None:
        """The class of a code, or None."""
        return next((each for each in self.classes if each.code == code), None)


@dataclass(frozen=True, kw_only=True)
class ConstancyClass(Record):
    """One constancy class; whole percents, the upper limit belongs to the class."""

    code: str = column(Text(longest=4))
    low_pct: float = column(PERCENT)
    high_pct: float = column(PERCENT)


@dataclass(frozen=True, kw_only=True)
class PlotsBehind(Record):
    """What stands behind the constancies: plots of this size, searched so long, then."""

    area_m2: float = column(Number(0.01, 100_000))
    shape: str = column(Text(choices=("circle", "square", "strip")))
    search_minutes: float = column(Number(1, 600))
    months: tuple[int, ...] = column(MONTHS)
    assumed_n: int = column(Number(1, 100_000, whole=True))
    observers: int = column(Number(1, 20, whole=True), default=1)
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class Lapse(Record):
    """How the monthly normals change with height: January to December."""

    tmax_c_per_km: tuple[float, ...] = column(Many(Number(-15, 15)))
    tmin_c_per_km: tuple[float, ...] = column(Many(Number(-15, 15)))
    rain_pct_per_km: tuple[float, ...] = column(Many(Number(-100, 500)))
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class Newcomers(Record):
    """Chance that a plant has come since the ground was disturbed."""

    weed_inside: float = column(SHARE)
    weed_outside: float = column(SHARE)
    wind_seed: float = column(SHARE)
    sown: float = column(SHARE)


@dataclass(frozen=True, kw_only=True)
class Disturbance(Record):
    """A kind of disturbance: what it answers beforehand, what it leaves, which notes it opens."""

    id: str = column(Id())
    name: str = column(Text())
    notes: bool = column(Flag())
    dug: bool = column(Flag(), default=False)
    states: dict[str, str] = column(Keyed(Text(), table="questions"), default={})
    kept: dict[str, float] = column(Keyed(SHARE), default={})
    newcomer: float = column(SHARE, default=0.0)
    layers_gone: tuple[str, ...] = column(Many(Text(choices=LAYERS)), default=())


@dataclass(frozen=True, kw_only=True)
class ReverseNull(Record):
    """The other way round: the ground is unfit until shown to be good."""

    text: str = column(Text())
    alpha: float = column(Number(0.001, 0.5))
    min_samples: int = column(COUNT, default=0)


@dataclass(frozen=True, kw_only=True)
class SampleAdequacy(Record):
    """How many plots are enough."""

    text: str = column(Text())
    d: float = column(Number(0.001, 1))
    d_bare_peat_pct: float | None = column(PERCENT, default=None)


@dataclass(frozen=True, kw_only=True)
class SuccessRule(Record):
    """When reclaimed ground counts as done."""

    kind: str = column(Text(choices=("standard", "trajectory")))
    text: str = column(Text())
    null_kind: str = column(Text(choices=("direct", "reverse")))
    alpha: float = column(Number(0.001, 0.5))
    share: float | None = column(SHARE, default=None)
    rain_break_mm: float | None = column(Number(0), default=None)
    years_wet: int | None = column(YEAR, default=None)
    years_dry: int | None = column(YEAR, default=None)
    visits: int = column(Number(1, 50, whole=True), default=1)
    years_between_visits: int = column(YEAR, default=0)
    usual_years: tuple[int, ...] = column(Many(YEAR), default=())
    back_share: float | None = column(SHARE, default=None)
    peat_forming_group: str | None = column(Ref("groups"), default=None)
    water_table_within_cm: float | None = column(Number(0), default=None)
    water_table_statistic: str = column(Text(), default="")
    reading: str = column(Text(), default="")
    reverse_null: ReverseNull | None = column(Part(ReverseNull), default=None)
    sample_adequacy: SampleAdequacy | None = column(Part(SampleAdequacy), default=None)


@dataclass(frozen=True, kw_only=True)
class RegionHead(Record):
    """region.yaml as written."""

    id: str = column(Id())
    name: str = column(Text())
    edition: str = column(Text(longest=20))
    date: str = column(Text())
    answers_for: str = column(Text())
    invented: bool = column(Flag())
    note: str = column(Text())
    gradient_note: str = column(Text(), default="")
    texts_source: str = column(Text())
    latitude_deg: float = column(Number(-66, 66))
    elevation_m: tuple[float, float] = column(Series(("low", "high"), HEIGHT))
    units: str = column(Text(choices=UNITS))
    languages: tuple[str, ...] = column(Many(Text()))
    address: str | None = column(Text(), default=None)
    sensitive_rounding_deg: float = column(Number(0, 1))
    cover_scale: CoverScale = column(Part(CoverScale))
    constancy_classes: tuple[ConstancyClass, ...] = column(Many(Part(ConstancyClass)))
    plots_behind: PlotsBehind = column(Part(PlotsBehind))
    lapse: Lapse = column(Part(Lapse))
    newcomers: Newcomers = column(Part(Newcomers))
    disturbances: tuple[Disturbance, ...] = column(Many(Part(Disturbance)))
    success_rule: SuccessRule = column(Part(SuccessRule))
    seeding_methods: dict[str, float | None] = column(Keyed(Number(0, 20, nullable=True)))
    cautions: tuple[Caution, ...] = column(Many(Part(Caution)), default=())
