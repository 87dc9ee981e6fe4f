"""Plants, look-alike groups and newcomers as a pack holds them."""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key import weigh
from builder.key.defaults import PRICES, SESSION
from builder.key.rounding import round_half_up
from builder.key.sparse import shorten
from builder.key.weigh import Evidence, Floats, Weights
from builder.tables import Plant, Region

MICRO = 1_000_000
BLOCKING = ("deadly", "harm")


def compile_plants(region: Region) -> list[dict[str, Any]]:
    """Plants without words: what season, disturbance, prompts and screens need."""
    at = {plant.id: p for p, plant in enumerate(region.plants)}
    mixed = {plant_id for mix in region.mixes.values() for plant_id in mix.plants}
    member = {
        plant.id: [g for g, group in enumerate(region.groups) if plant.id in group.members]
        for plant in region.plants
    }
    return [
        {
            "id": plant.id,
            "form": plant.form,
            "layer": plant.layer,
            "months": list(plant.months),
            "known_when_dry": plant.known_when_dry,
            "weed": plant.weed,
            "mix": plant.id in mixed,
            "fate": plant.fate,
            "response": plant.response,
            "groups": member[plant.id],
            "lookalikes": [at[one] for one in plant.lookalikes],
            "price_micronats": round(MICRO * price_nats(plant)),
            **_marks(plant),
        }
        for plant in region.plants
    ]


def _marks(plant: Plant) -> dict[str, bool]:
    """What only few plants carry: a caution that interrupts the hand, a place to keep vague."""
    interrupts = any(c.who == "people" and c.level in BLOCKING for c in plant.cautions)
    marks = {"caution": interrupts, "sensitive": plant.sensitive}
    return {name: True for name, holds in marks.items() if holds}


def price_nats(plant: Plant) -> float:
    """What asking for a plant costs: look-alikes, grasses, weeds and hard names. [nats]"""
    price = PRICES["lookalike"] * len(plant.lookalikes)
    price += PRICES["grass"] if plant.layer == "grass" else 0.0
    price += PRICES["weed"] if plant.weed != "none" else 0.0
    return price + PRICES.get(plant.difficulty or "easy", 0.0)


def compile_groups(region: Region, evidence: Evidence, weights: Weights) -> list[dict[str, Any]]:
    """Evidence of "some of these" by group; empty where the group is no answer."""
    at = {plant.id: p for p, plant in enumerate(region.plants)}
    made: list[dict[str, Any]] = []
    for group in region.groups:
        if group.use != "answer":
            made.append({"found": [], "expected": []})
            continue
        chance = group_chance(evidence.presence[[at[one] for one in group.members]])
        points = group_points(chance, evidence.prior, weights.temper)
        expected = round_half_up(chance * 10000)
        made.append({"found": points.tolist(), "expected": expected.tolist()})
    return made


def group_chance(presence: Floats) -> Floats:
    """Chance that at least one member is reported, [zone]. presence [member, zone], 0..1"""
    return np.asarray(1.0 - np.prod(1.0 - presence, axis=0))


def group_points(chance: Floats, prior: Floats, temper: float) -> weigh.Ints:
    """Centibans of "some of these" found, so tempered that it never settles a zone by itself.

    Where the answer alone would lift a zone above settings.group_most, all its points shrink
    together until it does not.
    """
    nats = temper * weigh.centred_nats(chance, prior)

    def most(share: float) -> float:
        weights = prior * np.exp(share * nats)
        return float((weights / weights.sum()).max())

    low, high = 0.0, 1.0
    if most(1.0) > SESSION["group_most"]:
        for _ in range(40):
            middle = (low + high) / 2.0
            low, high = (middle, high) if most(middle) <= SESSION["group_most"] else (low, middle)
    else:
        low = 1.0
    return round_half_up(low * nats * weigh.CENTIBANS_PER_NAT)


def newcomer_tables(
    region: Region,
    evidence: Evidence,
    inside: Any,
    levels: list[float],
    weights: Weights,
    most_kept: dict[int, list[int]],
) -> dict[str, Any]:
    """Evidence of plants that may have come since, by level of newcomers.

    rows    [plant, level, half]; half 1 is for plants known when dry, out of season
    tables  by row, in short (builder.key.sparse): found at v = 0..most, then not found at
            v = 0..most, each less the one before (a kilobyte less after gzip), most the largest
            share any disturbance of that level leaves
    most_kept  {level: most quarters left of each plant by what brings that level}
    """
    rows, tables = [], []
    arrival = arrivals(region, inside)
    comes = np.flatnonzero(arrival.max(axis=1) > 0)
    for level, times in enumerate(levels):
        for half, seen in ((0, 1.0), (1, SESSION["seen_dry_outside"])):
            share = arrival[comes] * times * seen
            f, a = weigh.newcomer_evidence(evidence.presence[comes], share, weights, evidence.prior)
            for k, p in enumerate(comes):
                plant = region.plants[p]
                if half and not (plant.known_when_dry and tuple(plant.months) != (1, 12)):
                    continue
                rows.append([int(p), level, half])
                most = int(round_half_up(most_kept[level][p] * seen)) + 1
                tables.append(shorten(np.concatenate([_risen(f[k, :most]), _risen(a[k, :most])])))
    return {"levels": levels, "rows": rows, "tables": tables}


def _risen(points: weigh.Ints) -> weigh.Ints:
    return np.diff(points, axis=0, prepend=np.zeros_like(points[:1]))


def arrivals(region: Region, inside: Any) -> Floats:
    """Chance that a plant has come to disturbed ground of a zone, [plant, zone], 0..1.

    inside [plant, zone]: does the plant's range in the tables hold the zone
    """
    share = region.head.newcomers
    arrival = np.zeros(inside.shape)
    for p, plant in enumerate(region.plants):
        if plant.weed not in ("none", "seeded"):
            arrival[p] = np.where(inside[p], share.weed_inside, share.weed_outside)
        elif plant.fate == "wind_seed":
            arrival[p] = share.wind_seed
    return arrival
