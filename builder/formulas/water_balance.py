"""Water in and out of the rooted ground, month by month: bucket, snow, dry and growing months.

Two draw-downs stand side by side because they give different answers: the plain
bucket, where every stored millimetre is equally easy to take, and Thornthwaite &
Mather's (1955), where the soil holds on harder the drier it gets.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_months,
    need_not_negative,
    need_number,
    need_share,
)

SETTLED_MM = 1e-9
MOST_YEARS = 500


@dataclass(frozen=True)
class Balance:
    """Twelve months of a water balance, all in millimetres."""

    storage_mm: list[float]
    actual_mm: list[float]
    deficit_mm: list[float]
    surplus_mm: list[float]


@dataclass(frozen=True)
class Snow:
    """How snow lies and leaves: all snow at `snow_c` and below, all rain from `rain_c`,
    between them in proportion; in months warmer than `melt_c` the share `melt_share` of
    the pack melts."""

    snow_c: float = -1.0
    rain_c: float = 3.0
    melt_c: float = 1.0
    melt_share: float = 0.8


def retained_mm(capacity_mm: float, loss_mm: float) -> float:
    """Water still held after an accumulated potential loss. [mm]

    capacity_mm  water the rooted ground holds [mm]
    loss_mm      potential loss since it was full [mm]

    S = C exp(-loss / C), the one curve behind the tables of 1957.
    Source: thornthwaite_mather_1957; golden: water_balance.json
    """
    capacity = need_above_zero("capacity_mm", capacity_mm)
    return capacity * math.exp(-need_not_negative("loss_mm", loss_mm) / capacity)


def _drawn(stored: float, wanted: float, capacity: float, linear: bool) -> float:
    return min(stored, wanted) if linear else stored * (1 - math.exp(-wanted / capacity))


def balance(
    water_mm: Sequence[float],
    demand_mm: Sequence[float],
    capacity_mm: float,
    linear: bool = False,
    start: str = "equilibrium",
) -> Balance:
    """Monthly water balance of a rooted layer, January first. [mm]

    water_mm     rain and melt of each month [mm]
    demand_mm    potential evaporation of each month [mm]
    capacity_mm  water the rooted ground holds between field capacity and wilting [mm]
    linear       True: plain bucket; False: Thornthwaite & Mather, dS = S (1 - exp(-lack/C))
    start        "equilibrium": the year repeats until it starts as it ends;
                 "full": January starts with a full store

    Refused: other than twelve months, negative amounts, no capacity, another start.
    Source: thornthwaite_mather_1957; golden: water_balance.json
    """
    water = [need_not_negative("water_mm", month) for month in need_months("water_mm", water_mm)]
    demand = [
        need_not_negative("demand_mm", month) for month in need_months("demand_mm", demand_mm)
    ]
    capacity = need_above_zero("capacity_mm", capacity_mm)
    if start not in ("equilibrium", "full"):
        raise RefusedError("unknown_choice", field="start", value=start)
    stored = capacity
    for _ in range(MOST_YEARS):
        year = _one_year(water, demand, capacity, linear, stored)
        if start == "full" or abs(year.storage_mm[11] - stored) < SETTLED_MM:
            break
        stored = year.storage_mm[11]
    return year


def _one_year(
    water: list[float], demand: list[float], capacity: float, linear: bool, stored: float
) -> Balance:
    year = Balance([], [], [], [])
    for supply, wanted in zip(water, demand, strict=True):
        if supply >= wanted:
            actual, level = wanted, stored + supply - wanted
        else:
            drawn = _drawn(stored, wanted - supply, capacity, linear)
            actual, level = supply + drawn, stored - drawn
        stored = min(level, capacity)
        year.storage_mm.append(stored)
        year.actual_mm.append(actual)
        year.deficit_mm.append(wanted - actual)
        year.surplus_mm.append(max(0.0, level - capacity))
    return year


def snow_months(
    rain_mm: Sequence[float], mean_c: Sequence[float], snow: Snow | None = None
) -> tuple[list[float], list[float]]:
    """Water that reaches the ground and snow lying at each month's end. [mm, mm]

    rain_mm  rain and snowfall of each month [mm]
    mean_c   mean temperature [C]

    Returns (rain plus melt, pack), the pack run until the year repeats itself. Where
    no month is warm enough to melt, the pack of the first year is given.
    Source: beltbook_rule (thresholds demo); golden: water_balance.json
    """
    rain = [need_not_negative("rain_mm", month) for month in need_months("rain_mm", rain_mm)]
    means, rule = need_months("mean_c", mean_c), snow or Snow()
    lying, water, packs = 0.0, [0.0] * 12, [0.0] * 12
    for _ in range(MOST_YEARS if any(mean > rule.melt_c for mean in means) else 1):
        before = lying
        for month, (amount, mean) in enumerate(zip(rain, means, strict=True)):
            frozen = (rule.rain_c - mean) / (rule.rain_c - rule.snow_c)
            snowfall = amount * max(0.0, min(1.0, frozen))
            melt = (lying + snowfall) * (rule.melt_share if mean > rule.melt_c else 0.0)
            lying += snowfall - melt
            water[month], packs[month] = amount - snowfall + melt, lying
        if abs(lying - before) < SETTLED_MM:
            break
    return water, packs


def dry_months(rain_mm: Sequence[float], mean_c: Sequence[float], strict: bool = True) -> list[int]:
    """Months (1-12) with less rain in millimetres than twice the degrees. [months]

    strict  True: P < 2 T, as the climate diagram is read; False: P <= 2 T, the wording
            of 1953

    A month below 0 C is never dry under this rule.
    Source: walter_lieth_1960, bagnouls_gaussen_1953; golden: water_balance.json
    """
    rain, means = need_months("rain_mm", rain_mm), need_months("mean_c", mean_c)
    rows = enumerate(zip(rain, means, strict=True), start=1)
    return [
        month
        for month, (amount, mean) in rows
        if amount < 2 * mean or (not strict and amount == 2 * mean)
    ]


def growing_months(
    mean_c: Sequence[float],
    actual_mm: Sequence[float],
    potential_mm: Sequence[float],
    pack_mm: Sequence[float],
    warm_c: float = 5.0,
    moist_share: float = 0.2,
    snow_free_mm: float = 60.0,
) -> list[int]:
    """Months (1-12) both warm and moist: what a stand can grow in. [months]

    mean_c        mean temperature [C]
    actual_mm     water used [mm];  potential_mm  potential evaporation [mm]
    pack_mm       snow lying at the month's end, as water [mm]
    warm_c        warm from this mean on [C]
    moist_share   moist from this share of potential use on, 0..1
    snow_free_mm  more snow than this and the month does not count [mm]

    Source: beltbook_rule (thresholds demo); golden: water_balance.json
    """
    share = need_share("moist_share", moist_share)
    warm, free = need_number("warm_c", warm_c), need_not_negative("snow_free_mm", snow_free_mm)
    means, packs = need_months("mean_c", mean_c), need_months("pack_mm", pack_mm)
    used = need_months("actual_mm", actual_mm)
    wanted = need_months("potential_mm", potential_mm)
    return [
        month + 1
        for month in range(12)
        if means[month] >= warm
        and wanted[month] > 0
        and used[month] >= share * wanted[month]
        and packs[month] < free
    ]
