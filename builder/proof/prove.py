"""Everything that can be said about how often a region's key is right, in one run.

Real and simulated are never mixed: `known` holds figures from known plots, `simulated` those from
simulated sites, and each names its set and n.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from typing import Any

import numpy as np

from builder.key.cards import card_calls
from builder.key.compile import Fitted
from builder.key.couplets import as_values, follow, printed_key
from builder.proof import simulator
from builder.proof.calls import pack_for, with_settings
from builder.proof.cases import Traits, proof_cases
from builder.proof.known import Known, zone_means
from builder.proof.known_proof import prove_known
from builder.proof.pairs import hardest_pairs, never_help
from builder.proof.region_tables import neighbours_by_likeness
from builder.proof.simulated_proof import SimulatedProof
from builder.tables import Region

Tell = Callable[[str, float], None]
FORMAT = 1
PRINTED_SITES = 1200
CARD_PLANTS = (3, 8)


def prove_region(
    region: Region,
    fitted: Fitted | None = None,
    known: Known | None = None,
    seed: int = 0,
    progress: Tell | None = None,
) -> dict[str, Any]:
    """The proof of a region's key, as plain values.

    fitted  what a fit from known plots left beside the tables (builder.key.fitted)
    known   known plots with the region's own plants and zones; their key is made anew without
            each fold, so that no plot is called by a key that has seen it
    seed    the same seed gives the same figures
    progress  told stage and share done; may raise to stop
    """
    tell = progress or (lambda stage, share: None)
    simulated, session = None, {}
    if fitted is None:
        run = SimulatedProof(region, None, seed, tell)
        simulated, session = run.figures(), run.session
    pack, arrays = pack_for(region, fitted)
    key = with_settings(pack, session)
    on_plots = None
    if known is not None:
        known = in_region_order(known, region)
        near = neighbours_by_likeness(zone_means(known))
        name = f"known plots of {region.id} ({known.names[0]}, {known.names[1]})"
        on_plots = prove_known(known, near, seed, name, tell)
        on_plots["zone_ids"] = list(known.zone_ids)
    tell("printed key", 0.0)
    printed = printed_key(key.pack, arrays)
    traits = Traits([one.layer for one in region.plants], [one.response for one in region.plants])
    rng = np.random.default_rng(seed + 2)
    tested = _printed_figures(region, printed, key, arrays, traits, rng)
    tell("pairs", 0.0)
    made: dict[str, Any] = {
        "format": FORMAT,
        "region": region.id,
        "edition": region.edition,
        "seed": seed,
        "zone_ids": [zone.id for zone in region.zones],
        "session": session,
        "known": on_plots,
        "simulated": simulated,
        "pairs": hardest_pairs(key),
        "never_help": never_help(key),
        "printed_key": {**as_values(printed), "tested": tested},
    }
    made["summary"] = summary(made)
    tell("done", 1.0)
    return made


def in_region_order(known: Known, region: Region) -> Known:
    """The same plots with zones in the region's order and by its ids; others follow after them.

    A zone may be called by its id, its name, its short name or its name in known plots.
    """
    ids = {
        one: zone.id
        for zone in region.zones
        for one in (zone.short, zone.name, zone.plots_id, zone.id)
    }
    told = [ids.get(name, name) for name in known.zone_ids]
    place = {zone.id: z for z, zone in enumerate(region.zones)}
    order = sorted(range(len(told)), key=lambda z: (place.get(told[z], len(place)), z))
    rank = np.empty(len(order), int)
    rank[order] = np.arange(len(order))
    return replace(known, zone_ids=tuple(told[z] for z in order), zone=rank[known.zone])


def _printed_figures(
    region: Region, printed: Any, key: Any, arrays: Any, traits: Traits, rng: np.random.Generator
) -> dict[str, Any]:
    """Hit rates of the printed key and the card on simulated sites of the proof's generator."""
    made: dict[str, Any] = {
        "tested_on": "simulated",
        "set": f"simulated sites of {region.id}",
        "n": PRINTED_SITES,
    }
    people = {"careful": simulator.CAREFUL, "forgetful": simulator.FORGETFUL}
    for name, person in people.items():
        case = proof_cases(key, arrays, traits, rng, PRINTED_SITES, person)["zone"]
        true = case.zones[:, 0]
        ends, steps = follow(printed, case.plots)
        made[name] = {
            "hit_rate": _share([end.zone == z for end, z in zip(ends, true, strict=True)]),
            "hit_or_second": _share(
                [
                    z == end.zone or (end.names_two and z == end.other)
                    for end, z in zip(ends, true, strict=True)
                ]
            ),
            "couplets_mean": round(float(steps.mean()), 2),
            **{
                f"card_{most}": _share(list(card_calls(printed.card, case.plots, most) == true))
                for most in CARD_PLANTS
            },
        }
    return made


def _share(right: list[Any]) -> float:
    return round(float(np.mean(right)), 4)


def summary(proof: dict[str, Any]) -> dict[str, Any]:
    """The few figures that stand where belief is shown; from plots where there are any."""
    best = proof["known"] or proof["simulated"]
    printed = proof["printed_key"]["tested"]["forgetful"]
    made: dict[str, Any] = {
        "tested_on": "simulated",
        "n": 0,
        "printed_key_hit_rate": printed["hit_rate"],
        "card_hit_rate": printed["card_8"],
        "printed_key_tested_on": "simulated",
        "hardest_pairs": [row["zones"] for row in proof["pairs"][:3]],
    }
    if best is None:
        return made
    names = ("tested_on", "set", "n", "answers", "hit_rate", "kappa", "stated_minus_right")
    return (
        made
        | {name: best[name] for name in names}
        | {
            "answers_median": best["answers_median"],
            "calibrated": best["calibration_error"] <= best["perfect_band"][1],
            "withheld_auc": best["withheld_auc"],
        }
    )
