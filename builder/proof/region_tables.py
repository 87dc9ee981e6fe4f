"""The tables of a region made from known plots, as plain values ready to be written.

What plots cannot tell (seasons, fates, growth, soils, mixes) is left at the value that says least
and named in the region's note, for the ecologist to fill in.
"""

from __future__ import annotations

import math
import re
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.formulas.diversity import percent_similarity
from builder.proof.known import Known, zone_heights, zone_means

SOURCE = "published known_plots"
COMMON = "common practice"
LETTERS = "ABCDEFGHJKLMNOPQRSTUV"
NOT_YET = "Not written yet."
LONGEST_CODE = 12
LOWEST_M, HIGHEST_M = 0, 5000
SOFT_EDGE_M = 100
CLASSES = (
    ("T", "under 1%, a trace", 0, 1, 0.5),
    ("1", "1 to 5%", 1, 5, 3),
    ("2", "5 to 25%", 5, 25, 15),
    ("3", "25 to 50%", 25, 50, 37.5),
    ("4", "50 to 75%", 50, 75, 62.5),
    ("5", "75 to 95%", 75, 95, 85),
    ("6", "95 to 100%", 95, 100, 97.5),
)
CONSTANCY = (("I", 1, 20), ("II", 21, 40), ("III", 41, 60), ("IV", 61, 80), ("V", 81, 100))
DISTURBANCES: list[dict[str, Any]] = [
    {"id": "none", "name": "Undisturbed ground", "notes": False},
    {
        "id": "half_gone",
        "name": "About half of the plants gone",
        "notes": False,
        "kept": {"any": 0.5},
        "newcomer": 1.0,
    },
    {
        "id": "most_gone",
        "name": "Most of the plants gone",
        "notes": False,
        "kept": {"any": 0.25},
        "newcomer": 1.0,
        "dug": True,
    },
]


def plain_ids(names: tuple[str, ...], stem: str) -> list[str]:
    """Ids in the house form for names as files write them; a name that fits stays as it is."""
    made: list[str] = []
    for name in names:
        word = re.sub(r"[^a-z0-9]+", "_", name.strip().lower()).strip("_") or stem
        base = word if word[0].isalpha() else f"{stem}_{word}"
        turn, one = 2, base
        while one in made:
            one, turn = f"{base}_{turn}", turn + 1
        made.append(one)
    return made


def region_table(
    region_id: str, known: Known, date: str, latitude_deg: float | None
) -> dict[str, Any]:
    """region.yaml"""
    heights = zone_heights(known)
    band = _region_band(known)
    return {
        "id": region_id,
        "name": region_id.replace("_", " ").capitalize(),
        "edition": "1",
        "date": date,
        "answers_for": "nobody yet",
        "invented": False,
        "source": COMMON,
        "texts_source": COMMON,
        "note": _note(known, heights is not None, latitude_deg is not None),
        "latitude_deg": 45 if latitude_deg is None else latitude_deg,
        "elevation_m": band,
        "units": "metric",
        "languages": ["en"],
        "address": None,
        "sensitive_rounding_deg": 0.1,
        "cover_scale": {
            "id": "six_class_with_trace",
            "name": "Six classes with a trace class",
            "source": COMMON,
            "classes": [
                {"code": code, "label": label, "low_pct": low, "high_pct": high, "mid_pct": mid}
                for code, label, low, high, mid in CLASSES
            ],
        },
        "constancy_classes": [
            {"code": code, "low_pct": low, "high_pct": high} for code, low, high in CONSTANCY
        ],
        "plots_behind": {
            "area_m2": 100,
            "shape": "square",
            "search_minutes": 30,
            "months": list(range(1, 13)),
            "assumed_n": int(max(1, round(float(np.median(known.counts))))),
            "note": "The files do not say how large the plots were or when they were read.",
        },
        "lapse": {
            "tmax_c_per_km": [-6.5] * 12,
            "tmin_c_per_km": [-6.5] * 12,
            "rain_pct_per_km": [0] * 12,
        },
        "newcomers": {"weed_inside": 0.3, "weed_outside": 0.03, "wind_seed": 0.1, "sown": 0.35},
        "disturbances": DISTURBANCES,
        "success_rule": {
            "kind": "standard",
            "text": "Not written yet: the local rule decides, and this region does not state it.",
            "null_kind": "direct",
            "share": 0.9,
            "alpha": 0.1,
        },
        "seeding_methods": {"drilled": 1, "broadcast": 2},
        "cautions": [
            {
                "id": "lines",
                "who": "people",
                "level": "deadly",
                "text": "Before any spade goes in, have buried lines marked, or dig by hand to "
                "30 cm where no marker is in sight.",
            }
        ],
    }


def _note(known: Known, height: bool, latitude: bool) -> str:
    parts = [
        f"Made from {len(known)} known plots in {len(known.zone_ids)} zones "
        f"({known.names[0]}, {known.names[1]}).",
        "Constancy, cover and evidence come from them; seasons, fates, families, growth, soils, "
        "climate, notes and mixes do not, and wait to be written.",
    ]
    if not height:
        parts.append("Heights are not known: every band covers the whole range and says nothing.")
    if not latitude:
        parts.append("The latitude was not given; 45 degrees stands in for it.")
    return " ".join(parts)


def _region_band(known: Known) -> list[int]:
    heights = zone_heights(known)
    if heights is None:
        return [LOWEST_M, HIGHEST_M]
    low = 10 * math.floor(heights.min() / 10) - 10
    return [low, max(10 * math.ceil(heights.max() / 10) + 10, low + 10)]


def zones_table(known: Known, ids: list[str]) -> dict[str, Any]:
    """zones.yaml; neighbours are the zones most alike in mean cover, both ways."""
    near = neighbours_of(known)
    return {
        "source": SOURCE,
        "zones": [
            {
                "id": zone_id,
                "letter": LETTERS[z],
                "short": _short(known.zone_ids[z], z),
                "name": known.zone_ids[z],
                **({} if zone_id == known.zone_ids[z] else {"plots_id": known.zone_ids[z]}),
                "kind": "zonal",
                "one_line": f"{known.counts[z]} known plots.",
                "why_here": NOT_YET,
                **_band(known, z),
                "north_shift_m": 0,
                "south_shift_m": 0,
                "frost_free_days": 0,
                "limits": [],
                "neighbours": [ids[other] for other in sorted(near[z])],
                "told_from": {},
                "remnant_clues": NOT_YET,
                "what_absence_means": NOT_YET,
                "note": "Frost-free days are not known; 0 stands in for them.",
            }
            for z, zone_id in enumerate(ids)
        ],
    }


def _short(name: str, z: int) -> str:
    return name if len(name) <= 20 else f"{LETTERS[z]} {name[:18].strip()}"


def _band(known: Known, z: int) -> dict[str, Any]:
    heights = zone_heights(known)
    low, high = _region_band(known)
    if heights is None:
        return {
            "band_m": [low, high],
            "centre_m": (low + high) // 2,
            "soft_edge_m": SOFT_EDGE_M,
        }
    foot, middle, top = (int(round(float(value))) for value in heights[z])
    top = max(top, foot + 1)
    return {
        "band_m": [foot, top],
        "centre_m": min(max(middle, foot), top),
        "soft_edge_m": max(20, round((top - foot) / 2)),
    }


def neighbours_of(known: Known) -> list[set[int]]:
    """Zones that may meet: the next on the slope, and the most alike in mean cover."""
    return neighbours_by_likeness(zone_means(known))


def neighbours_by_likeness(means: NDArray[np.float64]) -> list[set[int]]:
    """The next zone in order, and the zone most alike; both ways. means [zone, plant] cover"""
    count = len(means)
    near: list[set[int]] = [set() for _ in range(count)]
    alike = np.full((count, count), -1.0)
    for i in range(count):
        for j in range(i):
            alike[i, j] = alike[j, i] = percent_similarity(means[i], means[j])
    for i in range(count):
        best = int(alike[i].argmax())
        for j in {best, i + 1} if i + 1 < count else {best}:
            near[i].add(j)
            near[j].add(i)
    return near


def plants_table(known: Known, ids: list[str]) -> dict[str, Any]:
    """plants.yaml; only names are known, all else stands at the value that says least."""
    rows = []
    for plant_id, name in zip(ids, known.plants, strict=True):
        row: dict[str, Any] = {"id": plant_id, "scientific": name, "common": name}
        if name != plant_id and len(name) <= LONGEST_CODE:
            row["codes"] = [name]
        rows.append(
            {
                **row,
                "family": "not given",
                "form": "forb_perennial",
                "origin": "native",
                "weed": "none",
                "months": [1, 12],
                "best_season": "not known",
                "known_when_dry": True,
                "response": "neutral",
                "fate": "resprouts",
                "remnant": "medium",
                "marks": NOT_YET,
            }
        )
    return {"source": COMMON, "plants": rows}


def occurrence_table(
    known: Known, plant_ids: list[str], zone_ids: list[str]
) -> dict[str, dict[str, list[float]]]:
    """Occurrences by plant and zone: constancy to a tenth of a percent, mean cover where found."""
    found = known.plots.steps >= 0
    made: dict[str, dict[str, list[float]]] = {}
    for p, plant_id in enumerate(plant_ids):
        row: dict[str, list[float]] = {}
        for z, zone_id in enumerate(zone_ids):
            own = known.zone == z
            held = found[:, p] & own
            if held.any():
                cover = float(known.plots.cover[held, p].mean())
                share = 100.0 * float(held.sum()) / float(own.sum())
                row[zone_id] = [round(share, 1), max(round(cover, 2), 0.01)]
        made[plant_id] = row
    return made


def questions_table(known: Known, zone_ids: list[str]) -> dict[str, Any]:
    """questions.yaml from the answers beside the known zones.

    log odds of an answer: ln (plots of the zone with it + 1/2) / (answered + k/2), against the
    mean over zones, k answers in all.
    """
    rows = []
    ids = plain_ids(tuple(known.plots.answers), "q")
    for question_id, (name, words) in zip(ids, known.plots.answers.items(), strict=True):
        values = sorted({word for word in words if word})
        value_ids = plain_ids(tuple(values), "a")
        counts = np.array(
            [
                [sum(w == value and k == z for w, k in zip(words, known.zone, strict=True))
                 for z in range(len(zone_ids))]
                for value in values
            ],
            float,
        )  # fmt: skip
        share = (counts + 0.5) / (counts.sum(axis=0) + 0.5 * len(values))
        odds = np.log(share) - np.log(share).mean(axis=1, keepdims=True)
        often = counts.sum(axis=1) / max(counts.sum(), 1.0)
        rows.append(
            {
                "id": question_id,
                "kind": "azonal",
                "ask": f"What is {name} here?",
                "answers": [
                    {
                        "value": value_ids[a],
                        "label": value,
                        "share": round(float(often[a]), 4),
                        "zone_log_odds": {
                            zone_id: round(float(odds[a, z]), 3)
                            for z, zone_id in enumerate(zone_ids)
                        },
                    }
                    for a, value in enumerate(values)
                ],
                "why": "The known plots differ in it.",
                "act": NOT_YET,
            }
        )
    return {"source": SOURCE, "questions": rows}


def empty_tables(known: Known, digest: str, seed: int) -> dict[str, dict[str, Any]]:
    """Tables that known plots say nothing about, and where the figures come from."""
    return {
        "production": {
            "source": COMMON,
            "crop_year": NOT_YET,
            "air_dry": NOT_YET,
            "years_meaning": NOT_YET,
            "production": {},
        },
        "soils": {"source": COMMON, "soils": {}},
        "reclaim": {"source": COMMON, "general": [], "zones": {}},
        "seed": {"source": COMMON, "mixes": {}},
        "sources": {
            "sources": {
                "known_plots": {
                    "text": f"{len(known)} known plots: findings in {known.names[0]}, zones in "
                    f"{known.names[1]}; SHA-256 of both {digest}; fitted with seed {seed}.",
                    "read": "full text",
                }
            }
        },
    }
