"""The seed order sheet: lot tags in, kilograms out, and what must be refused or warned of.

An order that carries a refusal cannot be printed as an order.
"""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from builder.formulas.refusal import RefusedError, need_above_zero, need_count, need_share
from builder.formulas.seeding import (
    bulk_kg,
    method_factor,
    pls_kg_ha,
    pls_share,
    tag_age_months,
    viable_share,
)


@dataclass(frozen=True)
class Remark:
    """Something to say about a line: "refuse" or "warn", a word key, its figures."""

    level: str
    key: str
    values: dict[str, Any]


@dataclass(frozen=True)
class OrderLine:
    """One lot: pure live share, kilograms a hectare and in all; None where the tag fails."""

    pls_share: float | None
    pls_kg_ha: float | None
    bulk_kg_ha: float | None
    pls_kg: float | None
    bulk_kg: float | None
    remarks: list[Remark]


@dataclass(frozen=True)
class Order:
    """A whole sheet. Totals are None while a line has no figure."""

    lines: list[OrderLine]
    pls_kg: float | None
    bulk_kg: float | None
    remarks: list[Remark]
    may_print: bool


def seed_order(
    lots: Sequence[Mapping[str, Any]],
    area_ha: float,
    base_method: str,
    method: str,
    factors: Mapping[str, float | None],
    sow_month: int,
    window_months: Sequence[int],
    today: str,
    stale_months: int,
) -> Order:
    """Kilograms to order for every lot of a mix on a piece of ground.

    lots          rows: seeds_m2 (for base_method), seeds_per_g, and the tag: purity,
                  germination, dormant or tetrazolium, test_date, origin, generic (True
                  when only the species is named where the subspecies matters), noxious
                  (names), other_crop and weed_seed as shares
    base_method   method the mix's rates hold for;  method  how it will be sown
    factors       the region's rate of each method over a drilled one
    window_months months the zone may be sown in (1-12); empty: none is known
    stale_months  months after which a germination test counts no more

    Refuse: tag_missing, germination_missing, test_date_missing, tag_stale, generic_name,
    noxious_seed, tag_impossible, method_not_usable, mix_empty. Warn: out_of_season,
    no_window, origin_missing, weed_seed, other_crop.
    Source: hand_arithmetic, common_practice; golden: seed_order.json
    """
    area = need_above_zero("area_ha", area_ha)
    need_count("stale_months", stale_months)
    for month in (sow_month, *window_months):
        need_count("month", month)
    remarks = _season(sow_month, window_months)
    if not lots:
        remarks.append(Remark("refuse", "mix_empty", {}))
    try:
        factor: float | None = method_factor(base_method, method, factors)
    except RefusedError as no:
        factor = None
        remarks.append(Remark("refuse", no.key, dict(no.values)))
    lines = [_line(lot, area, factor, today, stale_months) for lot in lots]
    every = [remark for line in lines for remark in line.remarks] + remarks
    return Order(
        lines,
        _total([line.pls_kg for line in lines]),
        _total([line.bulk_kg for line in lines]),
        remarks,
        not any(remark.level == "refuse" for remark in every),
    )


def _total(amounts: Sequence[float | None]) -> float | None:
    known = [amount for amount in amounts if amount is not None]
    return sum(known) if known and len(known) == len(amounts) else None


def _season(sow_month: int, window_months: Sequence[int]) -> list[Remark]:
    if not window_months:
        return [Remark("warn", "no_window", {})]
    if sow_month in window_months:
        return []
    return [Remark("warn", "out_of_season", {"month": sow_month, "months": list(window_months)})]


def _line(
    lot: Mapping[str, Any], area: float, factor: float | None, today: str, stale_months: int
) -> OrderLine:
    remarks = _name_and_origin(lot) + _age(lot, today, stale_months)
    share, faults = _tag_share(lot)
    remarks += faults
    if factor is None:
        return OrderLine(share, None, None, None, None, remarks)
    rate = pls_kg_ha(lot["seeds_m2"], lot["seeds_per_g"]) * factor
    if share is None:
        return OrderLine(None, rate, None, rate * area, None, remarks)
    bulk = bulk_kg(rate, share)
    return OrderLine(share, rate, bulk, rate * area, bulk * area, remarks)


def _name_and_origin(lot: Mapping[str, Any]) -> list[Remark]:
    found = []
    if lot.get("generic"):
        found.append(Remark("refuse", "generic_name", {}))
    if lot.get("noxious"):
        found.append(Remark("refuse", "noxious_seed", {"names": list(lot["noxious"])}))
    if not lot.get("origin"):
        found.append(Remark("warn", "origin_missing", {}))
    for field in ("weed_seed", "other_crop"):
        if lot.get(field):
            found.append(Remark("warn", field, {"share": need_share(field, lot[field])}))
    return found


def _age(lot: Mapping[str, Any], today: str, stale_months: int) -> list[Remark]:
    if not lot.get("test_date"):
        return [Remark("refuse", "test_date_missing", {})]
    try:
        months = tag_age_months(lot["test_date"], today)
    except RefusedError as no:
        return [Remark("refuse", "tag_impossible", {"because": no.key})]
    if months > stale_months:
        return [Remark("refuse", "tag_stale", {"months": months, "limit": stale_months})]
    return []


def _tag_share(lot: Mapping[str, Any]) -> tuple[float | None, list[Remark]]:
    if lot.get("purity") is None:
        return None, [Remark("refuse", "tag_missing", {})]
    if lot.get("germination") is None and lot.get("tetrazolium") is None:
        return None, [Remark("refuse", "germination_missing", {})]
    try:
        alive = viable_share(
            lot.get("germination") or 0.0, lot.get("dormant") or 0.0, lot.get("tetrazolium")
        )
        rest = (lot.get("other_crop") or 0) + (lot.get("weed_seed") or 0)
        if lot["purity"] + rest > 1 + 1e-9:
            raise RefusedError("more_than_all", field="purity", value=lot["purity"] + rest, limit=1)
        return pls_share(lot["purity"], alive), []
    except RefusedError as no:
        return None, [Remark("refuse", "tag_impossible", {"because": no.key})]
