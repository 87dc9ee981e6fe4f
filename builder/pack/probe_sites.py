"""Which sites a phone answers before it trusts a pack: every kind of thing the key can meet."""

from __future__ import annotations

from typing import Any

import numpy as np

from builder.key.compile import Arrays
from builder.key.plots import Plots
from builder.key.prepare import Key, Pack, Site, prepare
from builder.key.probes import probe_answer
from builder.key.session import class_code
from builder.key.usual import simulated_plots

SEED = 20260102
PER_ZONE = 4
FEWEST = 16


def make_probes(pack: Pack, arrays: Arrays) -> list[dict[str, Any]]:
    """Probes that between them meet every verdict that came up, and every month, disturbance,
    look-alike group and question of the pack, height, and plots searched whole or struck."""
    key = prepare(pack)
    candidates = [(site, probe_answer(pack, site)) for site in candidate_sites(key, pack, arrays)]
    met: set[Any] = set()
    chosen: list[dict[str, Any]] = []
    rest = list(candidates)
    while rest:
        gains = [len(_features(site, answer) - met) for site, answer in rest]
        best = int(np.argmax(gains))
        if gains[best] == 0 and len(chosen) >= FEWEST:
            break
        site, answer = rest.pop(best)
        met |= _features(site, answer)
        chosen.append({"site": site, "answer": answer})
    return chosen


def candidate_sites(key: Key, pack: Pack, arrays: Arrays) -> list[Site]:
    """Simulated sites of all zones under turning conditions; the same for the same pack."""
    rng = np.random.default_rng(SEED)
    zones, plots = simulated_plots(pack, arrays, PER_ZONE, SEED)
    sites = []
    for turn, zone in enumerate(rng.permutation(len(zones))):
        other = int(rng.integers(len(zones)))
        site = _site(key, pack, rng, turn, int(zones[zone]))
        site["findings"] = _findings(key, plots, rng, turn, (int(zone), other))
        _questions(pack, rng, turn, site)
        if pack["groups"] and turn % 2:
            group = pack["groups"][turn // 2 % len(pack["groups"])]
            state = "found" if turn // 2 % 3 else "not_found"
            site["findings"].append({"group_id": group["id"], "state": state})
        sites.append(site)
    return sites


def _site(key: Key, pack: Pack, rng: np.random.Generator, turn: int, zone: int) -> Site:
    site: Site = {"month": turn % 13 or None}
    disturbances = pack["disturbances"]
    if disturbances and turn % 2 == 0:
        site["disturbance"] = disturbances[turn // 2 % len(disturbances)]["id"]
    if turn % 2 == 0:
        height = pack["zones"][zone]["centre_m"] + int(rng.integers(-300, 300))
        site["place"] = {"height_m": round(height)}
        if turn % 4 == 0:
            site["place"] |= {"slope_pct": int(rng.integers(60)), "aspect_deg": turn * 31 % 360}
    if turn % 11 == 5:
        site["whole_plot_searched"] = True
    if turn % 13 == 6:
        site["struck"] = ["implied", *(rule["id"] for rule in pack["rules"])]
    if turn % 5 == 2:
        site["digging"] = {"cleared": "lines" if turn % 2 else "hand"}
    return site


def _findings(
    key: Key, plots: Plots, rng: np.random.Generator, turn: int, rows: tuple[int, int]
) -> list[dict[str, Any]]:
    """Up to three named and a few asked; every third site mixes two plots, some are poor."""
    mixed = turn % 3 == 1
    steps = np.maximum(plots.steps[rows[0]], plots.steps[rows[1]] if mixed else -1)
    cover = np.maximum(plots.cover[rows[0]], plots.cover[rows[1]] if mixed else 0.0)
    found = sorted(np.flatnonzero(steps >= 0).tolist(), key=lambda p: (-cover[p], p))
    named = found[: 1 if turn % 7 == 3 else 3]
    others = [int(p) for p in rng.permutation(key.plants) if p not in named]
    asked = others[: 0 if turn % 7 == 3 else 3 + turn % 6]
    findings = []
    for p in [*named, *asked]:
        state = "cant_tell" if turn % 6 == 4 and p in asked[:1] else "not_found"
        row: dict[str, Any] = {"plant_id": key.pack["plants"][p]["id"], "state": state}
        if steps[p] >= 0 and state == "not_found":
            row |= {"state": "found", "cover": class_code(key, float(cover[p]))}
            if p in named:
                row["named"] = named.index(p) + 1
        findings.append(row)
    return findings


def _questions(pack: Pack, rng: np.random.Generator, turn: int, site: Site) -> None:
    questions = pack["questions"]
    if not questions:
        return
    site["questions"] = {}
    for step in range(4):
        question = questions[(2 * turn + step) % len(questions)]
        values = [one["value"] for one in question["answers"]]
        site["questions"][question["id"]] = values[int(rng.integers(len(values)))]


def _features(site: Site, answer: dict[str, Any]) -> set[Any]:
    met: set[Any] = {
        ("verdict", answer["verdict"]),
        ("month", site["month"]),
        ("disturbance", site.get("disturbance")),
        ("look_again", answer["look_again"]),
        ("searched", site.get("whole_plot_searched", False)),
        ("struck", "struck" in site),
        ("place", *sorted(site.get("place", {}))),
    }
    met |= {("question", name) for name in site.get("questions", {})}
    for one in site["findings"]:
        if "group_id" in one:
            met.add(("group", one["group_id"], one["state"]))
        else:
            met.add(("state", one["state"]))
    return met
