"""The key's part of a pack: a region's tables weighed, rounded once, as plain lists."""

from __future__ import annotations

from dataclasses import dataclass, field, replace
from typing import Any

import numpy as np

from builder.key import weigh
from builder.key.compile_ground import (
    compile_disturbances,
    compile_questions,
    compile_rules,
    most_kept,
    newcomer_levels,
)
from builder.key.compile_plants import compile_groups, compile_plants, newcomer_tables
from builder.key.cover import cover_step
from builder.key.defaults import HEAT_LOAD, REFERENCE_SLOPE_PCT, SESSION
from builder.key.height import heat_load
from builder.key.rounding import round_half_up
from builder.key.sparse import shorten
from builder.key.weigh import Evidence, Floats, Weights
from builder.tables import Region

PER_10000 = 10000
HAND_WRITTEN = Weights()


@dataclass(frozen=True)
class Arrays:
    """Counts behind the evidence, in the region's order of plants and zones.

    present  [plant, zone] plots that hold the plant; plots [zone]
    cover_mean_pct [plant, zone] or cover_counts [plant, 4, zone]; found_correction,
    absent_correction, prior: as weigh.evidence takes them
    overlooked, wrongly_named  [plant], not-a-number for the weights' own
    """

    present: Floats
    plots: Floats
    cover_mean_pct: Floats | None = None
    cover_counts: Floats | None = None
    found_correction: Floats | None = None
    absent_correction: Floats | None = None
    prior: Floats | None = None
    overlooked: Floats | None = None
    wrongly_named: Floats | None = None


@dataclass(frozen=True)
class Fitted:
    """What a fit from known plots puts in place of the tables' own counts and the defaults.

    weights   T, m and the other figures of weigh; session: keys of defaults.SESSION to replace
    """

    arrays: Arrays
    weights: Weights = Weights()
    session: dict[str, Any] = field(default_factory=dict)


def arrays_of(region: Region, weights: Weights = HAND_WRITTEN) -> Arrays:
    """Counts of a region typed by hand: constancy times an assumed number of plots."""
    zones = {zone.id: z for z, zone in enumerate(region.zones)}
    plants = {plant.id: p for p, plant in enumerate(region.plants)}
    shape = (len(plants), len(zones))
    present, cover = np.zeros(shape), np.full(shape, np.nan)
    behind = float(region.head.plots_behind.assumed_n)
    for (zone_id, plant_id), one in region.occurrence.items():
        at = plants[plant_id], zones[zone_id]
        present[at] = one.constancy * behind
        cover[at] = one.cover_pct
    missing = float("nan")
    return Arrays(
        present,
        np.full(len(zones), behind),
        cover_mean_pct=cover,
        overlooked=np.array(
            [missing if p.overlooked is None else p.overlooked for p in region.plants]
        ),
        wrongly_named=np.array(
            [_named_for_others(p.misnamed, weights) for p in region.plants], float
        ),
    )


def _named_for_others(misnamed: float | None, weights: Weights) -> float:
    """A plant often misnamed is also named where it is not; no more than doubled, since a share
    of 0.02 and more costs calls."""
    if misnamed is None:
        return float("nan")
    return min(max(misnamed / 10.0, weights.wrongly_named / 2.0), 2.0 * weights.wrongly_named)


def weigh_region(arrays: Arrays, weights: Weights) -> Evidence:
    """Evidence of a region's counts."""
    return weigh.evidence(
        arrays.present,
        arrays.plots,
        weights,
        cover_counts=arrays.cover_counts,
        cover_mean_pct=arrays.cover_mean_pct,
        prior=arrays.prior,
        overlooked=arrays.overlooked,
        wrongly_named=arrays.wrongly_named,
        found_correction=arrays.found_correction,
        absent_correction=arrays.absent_correction,
    )


def compile_key(region: Region, fitted: Fitted | None = None) -> dict[str, Any]:
    """settings, cover, zones, plants, groups, evidence, questions, rules and disturbances.

    settings.fit stays empty where no fit from plots brings it; builder.key.usual fills it then.
    """
    weights = fitted.weights if fitted else Weights()
    if fitted is None:
        weights = replace(weights, plots_assumed=float(region.head.plots_behind.assumed_n))
    arrays = fitted.arrays if fitted else arrays_of(region, weights)
    evidence = weigh_region(arrays, weights)
    inside = arrays.present > 0
    levels = newcomer_levels(region)
    plants = compile_plants(region)
    return {
        "settings": _settings(region, evidence, weights, fitted),
        "cover": _cover(region),
        "zones": _zones(region),
        "plants": plants,
        "groups": [
            {"id": g.id, "use": g.use, "members": _indexes(region, g.members)}
            for g in region.groups
        ],
        "evidence": {
            "plants": [shorten(table) for table in stacked(evidence)],
            "found_share": _found_share(evidence),
            "groups": compile_groups(region, evidence, weights),
            "newcomer": newcomer_tables(
                region, evidence, inside, levels, weights, most_kept(region, plants, levels)
            ),
        },
        "questions": compile_questions(region, evidence, weights, levels),
        "rules": compile_rules(region, evidence, weights, levels),
        "disturbances": compile_disturbances(region, levels),
    }


def stacked(evidence: Evidence) -> weigh.Ints:
    """[plant, 13, zone]: found by step less found, found, absent by v, implied, expected share.

    Rows 0..3 found with cover step, less row 4; 4 found, cover not given; 5..8 not found at v =
    1/4, 1/2, 3/4, 1; 9..11 covers no more than step 0, 1, 2; 12 expected presence per 10 000.
    """
    found = evidence.found.copy()
    found[:, :4] -= found[:, 4:]
    expected = round_half_up(evidence.presence * PER_10000)[:, None, :]
    return np.concatenate([found, evidence.absent, evidence.implied, expected], axis=1)


def _found_share(evidence: Evidence) -> list[Any]:
    """How often each cover step is given where the plant is reported, over the region."""
    seen = evidence.presence[:, None, :] * evidence.prior
    share = (seen * evidence.cover).sum(axis=2) / seen.sum(axis=2)
    whole: list[Any] = round_half_up(np.maximum(share * 1000.0, 1.0)).tolist()
    return whole


def _indexes(region: Region, ids: tuple[str, ...]) -> list[int]:
    at = {plant.id: p for p, plant in enumerate(region.plants)}
    return [at[one] for one in ids]


def _settings(
    region: Region, evidence: Evidence, weights: Weights, fitted: Fitted | None
) -> dict[str, Any]:
    share = evidence.prior * len(evidence.prior)
    return {
        **SESSION,
        **(fitted.session if fitted else {}),
        "temper": weights.temper,
        "area_cb": round_half_up(np.log(share) * weigh.CENTIBANS_PER_NAT).tolist(),
        "heat_load": _heat_load(region.latitude_deg),
        "fit": fitted.session.get("fit", []) if fitted else [],
    }


def _heat_load(latitude_deg: float) -> dict[str, float]:
    """Coefficients, load on level ground and what the reference slope adds or takes at most."""
    heat = {**HEAT_LOAD, "latitude_deg": latitude_deg}
    level = heat_load(heat, 0.0, 0.0)
    slope = REFERENCE_SLOPE_PCT
    loads = [heat_load(heat, slope, aspect) for aspect in (45.0, 225.0)]
    extra = {"level": level, "hot": max(loads) - level, "cool": level - min(loads)}
    return {**heat, **{name: round(value, 9) for name, value in extra.items()}}


def _cover(region: Region) -> dict[str, Any]:
    scale = region.cover_scale
    return {
        "scale_id": scale.id,
        "classes": [
            {
                "code": one.code,
                "low_pct": one.low_pct,
                "high_pct": one.high_pct,
                "mid_pct": one.mid_pct,
                "step": int(cover_step(one.mid_pct)),
            }
            for one in scale.classes
        ],
    }


def _zones(region: Region) -> list[dict[str, Any]]:
    at = {zone.id: z for z, zone in enumerate(region.zones)}
    return [
        {
            "id": zone.id,
            "letter": zone.letter,
            "kind": zone.kind,
            "band_m": list(zone.band_m),
            "centre_m": zone.centre_m,
            "soft_edge_m": max(zone.soft_edge_m, 1),
            "north_shift_m": zone.north_shift_m,
            "south_shift_m": zone.south_shift_m,
            "exposed_shift_m": zone.exposed_shift_m,
            "neighbours": sorted(at[one] for one in zone.neighbours),
        }
        for zone in region.zones
    ]
