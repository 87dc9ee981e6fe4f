"""Topsoil by lift: volumes in the bank, loose and compacted, and what a ledger must warn of."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from builder.formulas.refusal import (
    RefusedError,
    need_above_zero,
    need_not_negative,
    need_number,
    need_share,
)


def bank_m3(area_ha: float, depth_cm: float) -> float:
    """Volume of a lift as it lies. [m3]

    Source: hand_arithmetic; golden: topsoil.json
    """
    area = need_above_zero("area_ha", area_ha) * 10_000
    return area * need_above_zero("depth_cm", depth_cm) / 100


def loose_m3(bank_m3: float, swell_share: float) -> float:
    """Volume once dug: bank x (1 + swell). [m3]

    Source: earthwork_convention; golden: topsoil.json
    """
    return need_not_negative("bank_m3", bank_m3) * (1 + need_share("swell_share", swell_share))


def bank_of_loose_m3(loose_m3: float, swell_share: float) -> float:
    """Volume as it lay, from the pile: loose / (1 + swell), a division. [m3]

    Source: earthwork_convention; golden: topsoil.json
    """
    return need_not_negative("loose_m3", loose_m3) / (1 + need_share("swell_share", swell_share))


def compacted_m3(bank_m3: float, shrink_share: float) -> float:
    """Volume once placed and settled: bank x (1 - shrinkage). [m3]

    Source: earthwork_convention; golden: topsoil.json
    """
    return need_not_negative("bank_m3", bank_m3) * (1 - need_share("shrink_share", shrink_share))


def bank_for_compacted_m3(compacted_m3: float, shrink_share: float) -> float:
    """Volume to strip for a settled volume: compacted / (1 - shrinkage). [m3]

    Source: earthwork_convention; golden: topsoil.json
    """
    kept = 1 - need_share("shrink_share", shrink_share)
    return need_not_negative("compacted_m3", compacted_m3) / need_above_zero("1 - shrink", kept)


@dataclass(frozen=True)
class Notice:
    """What a ledger line must be told: a word key and the figures of its sentence."""

    lift: int
    key: str
    values: dict[str, float]


@dataclass(frozen=True)
class Ledger:
    """Volumes by lift in order, their sums, and warnings."""

    bank_m3: list[float]
    loose_m3: list[float]
    total_bank_m3: float
    total_loose_m3: float
    spread_depth_cm: float | None
    warnings: list[Notice]


def ledger(
    lifts: Sequence[Mapping[str, Any]],
    swell_share: float,
    spread_ha: float | None,
    limits: Mapping[str, float],
) -> Ledger:
    """Volumes of all lifts of a unit, the depth they give back, and warnings.

    lifts      rows from the top down: area_ha, depth_cm, and where known ec_ds_m,
               stones_vol_pct, stored_months, pile_height_m
    swell_share  swell when dug, 0..1
    spread_ha  area the soil goes back on, or None
    limits     ec_ds_m and stones_vol_pct by which a lift differs from the one above it and
               must be kept apart; stored_months and pile_height_m over which life in the
               pile is in doubt

    Notice keys: keep_apart_salt, keep_apart_stones, pile_old, pile_high.
    Source: hand_arithmetic, abdul_kareem_1984; golden: topsoil.json
    """
    if not lifts:
        raise RefusedError("layers_missing")
    bank = [bank_m3(lift["area_ha"], lift["depth_cm"]) for lift in lifts]
    loose = [loose_m3(volume, swell_share) for volume in bank]
    warnings: list[Notice] = []
    for number, lift in enumerate(lifts):
        above = lifts[number - 1] if number else {}
        warnings += _apart(number, lift, above, limits)
        warnings += _stored(number, lift, limits)
    back = None
    if spread_ha is not None:
        back = sum(bank) / (need_above_zero("spread_ha", spread_ha) * 10_000) * 100
    return Ledger(bank, loose, sum(bank), sum(loose), back, warnings)


def _apart(
    number: int, lift: Mapping[str, Any], above: Mapping[str, Any], limits: Mapping[str, float]
) -> list[Notice]:
    found = []
    for field, key in (("ec_ds_m", "keep_apart_salt"), ("stones_vol_pct", "keep_apart_stones")):
        here, there = lift.get(field), above.get(field)
        if here is None or there is None:
            continue
        if need_number(field, here) - need_number(field, there) >= limits[field]:
            found.append(Notice(number, key, {"here": here, "above": there}))
    return found


def _stored(number: int, lift: Mapping[str, Any], limits: Mapping[str, float]) -> list[Notice]:
    found = []
    for field, key in (("stored_months", "pile_old"), ("pile_height_m", "pile_high")):
        value = lift.get(field)
        if value is not None and need_not_negative(field, value) > limits[field]:
            found.append(Notice(number, key, {"here": value, "limit": limits[field]}))
    return found
