"""Records for the tests of this part, on the three-zone region."""

import copy
import json
from functools import cache
from pathlib import Path

from builder.records.clean import clean_site
from builder.records.exchange import KIND

WHOLE = json.loads(
    (Path(__file__).parents[1] / "goldens" / "cleaning.json").read_text(encoding="utf-8")
)["cases"][0]["raw"]
CALL = {
    "verdict": "zone", "zone_id": "prairie", "next_zone_id": "breaks", "belief": {"prairie": 0.97},
    "look_again": False, "answers": 5, "difference_cb": 12, "reasons": [
        {"kind": "plant", "id": "blue_grama", "answer": "found", "points_cb": 9},
        {"kind": "height", "id": None, "answer": None, "points_cb": 3},
    ],
}  # fmt: skip


@cache
def _clean():
    made = clean_site(WHOLE).record
    made.pop("edits", None)
    return made


def record(**changes):
    """A cleaned record of the three-zone region with some fields replaced."""
    made = copy.deepcopy(_clean())
    made |= {
        "id": "a1", "region_id": "willow_breaks", "edition": "t1", "findings": [], "questions": {},
        "revision": 1, "call": copy.deepcopy(CALL), "overruled": None, "struck": [],
        "unit_id": None, "unit_name": "", "disturbance": "none", "month": 7, "date": "2026-07-04",
        "whole_plot_searched": False, "photos": [], "notes": "",
    }  # fmt: skip
    made["place"] = {
        "latitude_deg": 45.72, "longitude_deg": -108.5, "accuracy_m": 6, "height_m": 1010,
        "slope_pct": 5, "aspect_deg": 90,
    }  # fmt: skip
    return made | changes


def found(plant_id, cover=None, state="found"):
    """A finding of one plant."""
    return {"plant_id": plant_id, "state": state, "cover": cover, "named": None}


def file_text(*sites, units=()):
    """A file of records as a phone writes it."""
    return json.dumps({"format": 1, "kind": KIND, "sites": list(sites), "units": list(units)})
