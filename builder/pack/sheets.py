"""What the field sheets stand on: occurrence for the Book, the season's rule, limits of tags and piles."""

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
    tag_stale_months; topsoil_limits."""
    return {
        "occurrence": occurrence(region),
        "season_rule": asdict(SeasonRule()),
        "tag_stale_months": TAG_STALE_MONTHS,
        "topsoil_limits": TOPSOIL_LIMITS,
    }


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
