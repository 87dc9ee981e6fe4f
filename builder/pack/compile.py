"""A region's tables to pack and texts."""

from __future__ import annotations

import hashlib
from typing import Any

from builder.key.compile import Fitted, arrays_of, compile_key
from builder.key.usual import usual_fit
from builder.pack.canonical import canonical, figures
from builder.pack.probe_sites import make_probes
from builder.pack.sheets import sheets
from builder.pack.texts import compile_texts
from builder.tables import Region

FORMAT = 1
HASH_DIGITS = 16
UNTESTED: dict[str, Any] = {"tested_on": "simulated", "n": 0}


def compile_pack(
    region: Region, fitted: Fitted | None = None, proof: dict[str, Any] | None = None
) -> dict[str, Any]:
    """The pack of a region as plain values; builder.pack says what stands where.

    fitted  what a fit from known plots puts in place of the tables' own counts
    proof   figures that stand where belief is shown; without them the key is untested
    """
    key = compile_key(region, fitted)
    pack: dict[str, Any] = {
        "format": FORMAT,
        "region": _region(region),
        **key,
        **_ground(region),
        **sheets(region),
        "proof": proof or UNTESTED,
        "probes": [],
    }
    arrays = fitted.arrays if fitted else arrays_of(region)
    if not pack["settings"]["fit"]:
        pack["settings"]["fit"] = usual_fit(pack, arrays)
    pack["probes"] = make_probes(pack, arrays)
    return pack


def pack_bytes(
    region: Region, fitted: Fitted | None = None, proof: dict[str, Any] | None = None
) -> bytes:
    """pack.json of a region: the same tables give the same bytes."""
    return canonical(compile_pack(region, fitted, proof))


def pack_hash(content: bytes) -> str:
    """What records keep as pack_hash: 16 hex digits of SHA-256."""
    return hashlib.sha256(content).hexdigest()[:HASH_DIGITS]


def texts_bytes(region: Region, language: str) -> bytes:
    """texts.<language>.json of a region."""
    return canonical(compile_texts(region, language))


def _region(region: Region) -> dict[str, Any]:
    head = region.head
    return {
        "id": head.id,
        "edition": head.edition,
        "date": head.date,
        "latitude_deg": head.latitude_deg,
        "elevation_m": list(head.elevation_m),
        "units": head.units,
        "invented": head.invented,
        "languages": list(head.languages),
        "address": head.address,
        "sensitive_rounding_deg": head.sensitive_rounding_deg,
        "plots_behind": figures(head.plots_behind),
    }


def _ground(region: Region) -> dict[str, Any]:
    """Production, climate, soils, seed and reclamation by zone: figures only."""
    return {
        "production": {
            zone: {**figures(one), "counted": one.counted, "source": _source(region, one)}
            for zone, one in region.production.items()
        },
        "climate": {
            zone: {
                "elevation_m": months[0].elevation_m,
                "tmax_c": [one.tmax_c for one in months],
                "tmin_c": [one.tmin_c for one in months],
                "precip_mm": [one.precip_mm for one in months],
            }
            for zone, months in region.climate.items()
            if months
        },
        "lapse": figures(region.head.lapse),
        "soils": {zone: figures(one) for zone, one in region.soils.items()},
        "seed": {zone: figures(one) for zone, one in region.mixes.items()},
        "seed_plants": {
            plant.id: {
                "seeds_per_g": plant.seeds_per_g,
                "planning_pls": plant.planning_pls,
                "subspecies_matters": plant.subspecies_matters,
            }
            for plant in region.plants
            if plant.seeds_per_g is not None
        },
        "seeding_methods": region.seeding_methods,
        "reclaim": {
            zone: {"windows": figures(notes.windows), "success": figures(notes.success)}
            for zone, notes in region.reclaim.zones.items()
        },
        "success_rule": figures(region.success_rule),
    }


def _source(region: Region, record: Any) -> str:
    found = region.source_of(record)
    return found.text if found else ""
