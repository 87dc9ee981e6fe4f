"""Seed: pure live seed, bulk, mixes by three different percents, and how it is sown.

A rate belongs to a method. The mix says for which method its rates hold; another
method takes the ratio of the two factors, so a broadcast rate is never doubled again.
"""

import datetime
import math
from collections.abc import Mapping, Sequence

from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_not_negative,
    need_same_length,
    need_share,
    need_some_share,
)


def viable_share(
    germination: float, dormant: float = 0.0, tetrazolium: float | None = None
) -> float:
    """Share of pure seed that is alive. [0..1]

    germination  share that sprouted in the test;  dormant  hard or dormant share beside it
    tetrazolium  share found alive by staining, in place of both

    Refused: germination 85 for 0.85; germination and dormant above 1 together; a
    tetrazolium result added on top of dormant seed.
    Source: native_seed_page; golden: seeding.json
    """
    sprouted = need_share("germination", germination)
    resting = need_share("dormant", dormant)
    if tetrazolium is not None:
        if resting:
            raise RefusedError("two_viabilities")
        return need_share("tetrazolium", tetrazolium)
    if sprouted + resting > 1 + 1e-9:
        raise RefusedError("germination_over_all", value=round(sprouted + resting, 4))
    return min(1.0, sprouted + resting)


def pls_share(purity: float, viable: float) -> float:
    """Pure live share of a lot: purity times what is alive. [0..1]

    Source: txdot_pls; golden: seeding.json
    """
    return need_some_share("purity", purity) * need_some_share("viable", viable)


def bulk_kg(pls_kg: float, pls_share: float) -> float:
    """Bulk seed to weigh out so that enough is alive. [unit of pls_kg]

    pls_kg     pure live seed wanted [kg, kg ha-1, lb]
    pls_share  pure live share of the lot, above 0 to 1, unrounded

    Source: txdot_pls; golden: seeding.json
    """
    return need_not_negative("pls_kg", pls_kg) / need_some_share("pls_share", pls_share)


def pls_kg_ha(seeds_m2: float, seeds_per_g: float) -> float:
    """Pure live seed for a number of live seeds on the ground. [kg ha-1]

    seeds_m2 * 10 / seeds_per_g
    Source: hand_arithmetic; golden: seeding.json
    """
    return (
        need_not_negative("seeds_m2", seeds_m2) * 10 / need_above_zero("seeds_per_g", seeds_per_g)
    )


def seeds_m2(pls_kg_ha: float, seeds_per_g: float) -> float:
    """Live seeds on a square metre from a rate of pure live seed. [m-2]

    Source: hand_arithmetic; golden: seeding.json
    """
    rate = need_not_negative("pls_kg_ha", pls_kg_ha)
    return rate * need_above_zero("seeds_per_g", seeds_per_g) / 10


def order_bulk_kg(
    seeds_m2: float,
    seeds_per_g: float,
    pls_share: float,
    area_ha: float,
    method_factor: float = 1.0,
) -> float:
    """Bulk seed to buy for an area. [kg]

    seeds_m2       live seeds wanted, for the method of the mix [m-2]
    pls_share      pure live share of the lot, above 0 to 1
    area_ha        area to sow, above 0 [ha]
    method_factor  from `method_factor`

    Source: hand_arithmetic; golden: seeding.json
    """
    rate = bulk_kg(pls_kg_ha(seeds_m2, seeds_per_g), pls_share)
    return (
        rate * need_above_zero("area_ha", area_ha) * need_above_zero("method_factor", method_factor)
    )


def method_factor(base: str, wanted: str, factors: Mapping[str, float | None]) -> float:
    """What to multiply a mix's rates by when it is sown another way. [-]

    base     method the mix's rates already hold for;  wanted  method used
    factors  rate of each method over a drilled one, None where it cannot be used

    A broadcast mix sown broadcast takes 1, never 2.
    Refused: a method the region gives no factor for.
    Source: nrcs_plant_materials; golden: seeding.json
    """
    if wanted == base:
        return 1.0
    parts = []
    for method in (wanted, base):
        factor = factors.get(method)
        if factor is None:
            raise RefusedError("method_not_usable", value=method)
        parts.append(need_above_zero("method_factor", factor))
    return parts[0] / parts[1]


def _checked_shares(field: str, shares: Sequence[float]) -> list[float]:
    if not shares:
        raise RefusedError("mix_empty")
    checked = [need_share(field, share) for share in shares]
    if abs(math.fsum(checked) - 1) > 1e-6:
        raise RefusedError("shares_sum", field=field, value=round(math.fsum(checked), 6))
    return checked


def mix_by_seed_count(
    total_seeds_m2: float, seed_shares: Sequence[float], seeds_per_g: Sequence[float]
) -> list[float]:
    """Rates of a mix given as shares of SEEDS. [kg ha-1 PLS]

    total_seeds_m2  live seeds of the whole mix [m-2]
    seed_shares     share of seeds by plant, adding up to 1
    Source: hand_arithmetic; golden: seeding.json
    """
    need_same_length("seed_shares", seed_shares, "seeds_per_g", seeds_per_g)
    total = need_above_zero("total_seeds_m2", total_seeds_m2)
    shares = _checked_shares("seed_shares", seed_shares)
    return [pls_kg_ha(total * s, per_g) for s, per_g in zip(shares, seeds_per_g, strict=True)]


def mix_by_weight(total_pls_kg_ha: float, weight_shares: Sequence[float]) -> list[float]:
    """Rates of a mix given as shares of WEIGHT. [kg ha-1 PLS]

    Source: hand_arithmetic; golden: seeding.json
    """
    total = need_above_zero("total_pls_kg_ha", total_pls_kg_ha)
    return [total * share for share in _checked_shares("weight_shares", weight_shares)]


def mix_by_full_stand(
    stand_shares: Sequence[float], full_rates_kg_ha: Sequence[float]
) -> list[float]:
    """Rates of a mix given as shares of each plant's FULL-STAND rate. [kg ha-1 PLS]

    full_rates_kg_ha  rate at which the plant is sown alone
    The total weight follows from the plants; it is no figure of its own.
    Source: nrcs_full_stand; golden: seeding.json
    """
    need_same_length("stand_shares", stand_shares, "full_rates_kg_ha", full_rates_kg_ha)
    shares = _checked_shares("stand_shares", stand_shares)
    rates = [need_above_zero("full_rate_kg_ha", rate) for rate in full_rates_kg_ha]
    return [share * rate for share, rate in zip(shares, rates, strict=True)]


def amount_shares(amounts: Sequence[float]) -> list[float]:
    """Each plant's share of a total: of seeds when given seeds, of weight when given weight.

    Source: hand_arithmetic; golden: seeding.json
    """
    checked = [need_not_negative("amount", amount) for amount in amounts]
    total = math.fsum(checked)
    if total == 0:
        raise RefusedError("mix_empty")
    return [amount / total for amount in checked]


def _date(field: str, text: str) -> datetime.date:
    try:
        return datetime.date.fromisoformat(text)
    except (TypeError, ValueError):
        raise RefusedError("date", field=field, value=text) from None


def tag_age_months(test_date: str, today: str) -> int:
    """Whole months since a seed test. [months]

    test_date, today  written like 2026-07-04
    A test of the 31st is a month old on the last day of a shorter month.
    Refused: no date, a date in the future.
    Source: beltbook_rule; golden: seeding.json
    """
    tested, now = _date("test_date", test_date), _date("today", today)
    if tested > now:
        raise RefusedError("future_date", field="test_date", value=test_date)
    months = (now.year - tested.year) * 12 + now.month - tested.month
    last_day = (now + datetime.timedelta(days=1)).month != now.month
    return months - (now.day < tested.day and not last_day)
