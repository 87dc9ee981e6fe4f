"""The year of one site: warmth, rain, evaporation, soil water, growing months, what limits."""

import math
from collections.abc import Sequence
from dataclasses import dataclass, field

from builder.formulas.climate import (
    hargreaves_months_mm,
    rain_at_height_mm,
    temperature_at_height_c,
)
from builder.formulas.refusal import need_months, need_not_negative, need_number
from builder.formulas.water_balance import (
    Snow,
    balance,
    dry_months,
    growing_months,
    snow_months,
)


@dataclass(frozen=True)
class SeasonRule:
    """When a month counts as warm, moist and free of snow, and when a limit is named.

    Thresholds are demo. `cool_share` cuts potential use in months below `warm_c`.
    """

    warm_c: float = 5.0
    moist_share: float = 0.2
    snow_free_mm: float = 60.0
    cool_share: float = 0.35
    near_water_cm: float = 30.0
    little_water_mm: float = 50.0
    unmet_share: float = 0.5
    short_season_months: int = 5
    wet_surplus_share: float = 0.5
    snow: Snow = field(default_factory=Snow)


@dataclass(frozen=True)
class SiteYear:
    """Twelve months, January first, and the months (1-12) that stand out."""

    mean_c: list[float]
    rain_mm: list[float]
    potential_mm: list[float]
    actual_mm: list[float]
    storage_mm: list[float]
    deficit_mm: list[float]
    surplus_mm: list[float]
    pack_mm: list[float]
    warm: list[int]
    growing: list[int]
    dry: list[int]


def carried(
    tmax_c: Sequence[float],
    tmin_c: Sequence[float],
    precip_mm: Sequence[float],
    from_m: float,
    to_m: float,
    tmax_c_per_km: Sequence[float],
    tmin_c_per_km: Sequence[float],
    rain_pct_per_km: Sequence[float],
) -> tuple[list[float], list[float], list[float]]:
    """A zone's monthly normals carried to a site's height: (tmax, tmin, precip). [C, C, mm]

    from_m, to_m     heights of normals and site [m]
    tmax_c_per_km .. change for each kilometre up, one a month

    A carried high never falls below its low: where lapse rates would cross them, both
    stand at their mean.
    Source: lapse_arithmetic; golden: year.json
    """
    highs, lows, rain = [], [], []
    rows = zip(
        need_months("tmax_c", tmax_c), need_months("tmin_c", tmin_c),
        need_months("precip_mm", precip_mm), need_months("tmax_c_per_km", tmax_c_per_km),
        need_months("tmin_c_per_km", tmin_c_per_km),
        need_months("rain_pct_per_km", rain_pct_per_km), strict=True,
    )  # fmt: skip
    for high, low, wet, high_change, low_change, rain_change in rows:
        top = temperature_at_height_c(high, from_m, to_m, high_change)
        foot = temperature_at_height_c(low, from_m, to_m, low_change)
        if top < foot:
            top = foot = (top + foot) / 2
        highs.append(top)
        lows.append(foot)
        rain.append(rain_at_height_mm(wet, from_m, to_m, rain_change / 100))
    return highs, lows, rain


def site_year(
    latitude_deg: float,
    tmax_c: Sequence[float],
    tmin_c: Sequence[float],
    precip_mm: Sequence[float],
    capacity_mm: float,
    water_table_cm: float | None = None,
    rule: SeasonRule | None = None,
) -> SiteYear:
    """Water and warmth of a site month by month. [C, mm, months]

    tmax_c, tmin_c  monthly means [C];  precip_mm  rain and snow [mm]
    capacity_mm     water the rooted ground holds [mm]
    water_table_cm  usual depth to ground water, None where out of reach
    rule            thresholds of the season

    Hargreaves & Samani evaporation, cut by rule.cool_share in cool months; snow by
    rule.snow; Thornthwaite & Mather balance run to equilibrium. Where ground water lies
    within rule.near_water_cm, the store never limits and every warm month free of snow
    grows.
    Source: hargreaves_1985, thornthwaite_mather_1957, beltbook_rule; golden: year.json
    """
    season = rule or SeasonRule()
    highs, lows = need_months("tmax_c", tmax_c), need_months("tmin_c", tmin_c)
    means = [(high + low) / 2 for high, low in zip(highs, lows, strict=True)]
    potential = hargreaves_months_mm(latitude_deg, highs, lows)
    wanted = [
        amount * (season.cool_share if mean < season.warm_c else 1.0)
        for amount, mean in zip(potential, means, strict=True)
    ]
    water, packs = snow_months(precip_mm, means, season.snow)
    months = balance(water, wanted, capacity_mm)
    fed = is_fed(water_table_cm, season.near_water_cm)
    used = wanted if fed else months.actual_mm
    growing = growing_months(
        means, used, potential, packs, season.warm_c, season.moist_share, season.snow_free_mm
    )
    return SiteYear(
        mean_c=means,
        rain_mm=need_months("precip_mm", precip_mm),
        potential_mm=potential,
        actual_mm=used,
        storage_mm=months.storage_mm,
        deficit_mm=[full - part for full, part in zip(potential, used, strict=True)],
        surplus_mm=months.surplus_mm,
        pack_mm=packs,
        warm=[month + 1 for month in range(12) if means[month] >= season.warm_c],
        growing=growing,
        dry=dry_months(precip_mm, means),
    )


def is_fed(water_table_cm: float | None, near_water_cm: float) -> bool:
    """Whether ground water lies near enough to feed the roots all season.

    Source: beltbook_rule; golden: year.json
    """
    near = need_not_negative("near_water_cm", near_water_cm)
    if water_table_cm is None:
        return False
    return need_number("water_table_cm", water_table_cm) <= near


@dataclass(frozen=True)
class Limit:
    """One thing that holds growth back: a word key and the figures of its sentence."""

    key: str
    values: dict[str, float]


def limits(
    year: SiteYear,
    capacity_mm: float,
    water_table_cm: float | None = None,
    rule: SeasonRule | None = None,
) -> list[Limit]:
    """What holds plants back on a site, the strongest first. [word keys and figures]

    wetness  ground water within rule.near_water_cm: {depth_cm}
    water    rule.unmet_share of what the warm months could use is missing, or two or more
             warm months are too dry to grow: {missing_mm, dry_months, warm_months}
    warmth   rule.short_season_months warm months or fewer: {warm_months, warmest_c}
    soil     the rooted ground holds under rule.little_water_mm: {held_mm}
    surplus  more than rule.wet_surplus_share of the rain runs through: {surplus_mm, rain_mm}

    Nothing listed means that none of these was found.
    Source: beltbook_rule; golden: year.json
    """
    found, season = [], rule or SeasonRule()
    fed = is_fed(water_table_cm, season.near_water_cm)
    if fed and water_table_cm is not None:
        found.append(Limit("wetness", {"depth_cm": water_table_cm}))
    wanted = math.fsum(year.potential_mm[month - 1] for month in year.warm)
    missing = math.fsum(year.deficit_mm[month - 1] for month in year.warm)
    idle = sum(
        year.actual_mm[month - 1] < season.moist_share * year.potential_mm[month - 1]
        for month in year.warm
    )
    short = len(year.warm) <= season.short_season_months
    dry = wanted > 0 and (missing / wanted >= season.unmet_share or idle >= 2)
    water = Limit(
        "water",
        {"missing_mm": missing, "dry_months": idle, "warm_months": len(year.warm)},
    )
    warmth = Limit("warmth", {"warm_months": len(year.warm), "warmest_c": max(year.mean_c)})
    if dry and not fed:
        found.append(water)
    if short:
        found.append(warmth)
    if need_not_negative("capacity_mm", capacity_mm) < season.little_water_mm and not fed:
        found.append(Limit("soil", {"held_mm": capacity_mm}))
    surplus, rain = math.fsum(year.surplus_mm), math.fsum(year.rain_mm)
    if rain > 0 and surplus / rain > season.wet_surplus_share:
        found.append(Limit("surplus", {"surplus_mm": surplus, "rain_mm": rain}))
    return found
