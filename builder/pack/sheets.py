"""What field sheets stand on: occurrence, the season, ground water, limits of tags and piles."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from builder.formulas.year import SeasonRule
from builder.tables import Region

# Common practice: seed laws ask for a new germination test after 5 to 15 months, most after 12.
TAG_STALE_MONTHS = 12
# Common practice: a lift this much saltier or stonier than the one above is kept apart; over a
# year in the pile, or over this height, life in topsoil is in doubt.
TOPSOIL_LIMITS = {"ec_ds_m": 4, "stones_vol_pct": 15, "stored_months": 12, "pile_height_m": 3}


def sheets(region: Region) -> dict[str, Any]:
    """occurrence: by plant [[zone, constancy per cent, cover per cent], ...]; season_rule;
    ground_water_cm by zone; peat_classes; tag_stale_months; topsoil_limits."""
    return {
        "occurrence": occurrence(region),
        "season_rule": season_rule(region),
        "ground_water_cm": {zone.id: ground_water_cm(region, zone.id) for zone in region.zones},
        "peat_classes": [
            {
                "von_post": list(each.von_post),
                "field_capacity": each.field_capacity,
                "wilting_point": each.wilting_point,
            }
            for each in region.files["soils"].peat_classes
        ],
        "tag_stale_months": TAG_STALE_MONTHS,
        "topsoil_limits": TOPSOIL_LIMITS,
    }


def season_rule(region: Region) -> dict[str, Any]:
    """The season's thresholds, with the region's own depth of near ground water."""
    rules = region.files["soils"].water_rules
    rule = SeasonRule() if rules is None else SeasonRule(near_water_cm=rules.near_water_cm)
    return asdict(rule)


def ground_water_cm(region: Region, zone_id: str) -> float | None:
    """Usual depth to ground water; 0 where roots always reach it, None unknown. [cm]"""
    soil = region.soils.get(zone_id)
    if soil is not None and soil.water_table_cm is not None:
        return soil.water_table_cm[1]
    return 0 if region.zone(zone_id).ground_water_in_reach else None


def occurrence(region: Region) -> list[list[list[float]]]:
    """Rows of each plant in the order of the zones; a zone without the plant has no row."""
    return [
        [
            [z, round(found.constancy * 100, 1), found.cover_pct]
            for z, zone in enumerate(region.zones)
            if (found := region.occurrence.get((zone.id, plant.id))) is not None
        ]
        for plant in region.plants
    ]
