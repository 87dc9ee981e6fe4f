"""One plot answered as a person would: the most plentiful by name, then the key's own prompts."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.call import Call, call
from builder.key.context import context_of
from builder.key.prepare import Key, Site


def ask(
    key: Key,
    site: Site,
    steps: NDArray[np.int8],
    cover: NDArray[np.float32],
    answers: int,
) -> tuple[Call, int]:
    """The call after at most this many answers, and how many were given.

    site   place, month, disturbance and the ground answers that could be given
    steps, cover  [plant] what stands on the plot, as in plots.Plots

    Up to three plants of most cover are named (neither weeds nor sown on disturbed ground); then
    the best prompt is answered until the key is sure or nothing helps. What was not searched for
    is passed over and is no answer.
    """
    told = site.get("questions") or {}
    states = {
        q["id"] for q in key.pack["questions"] if not any("evidence" in a for a in q["answers"])
    }
    known = {name: value for name, value in told.items() if name in states}
    record: dict[str, Any] = {**site, "questions": known, "findings": []}
    names = most_plentiful(key, site, steps, cover)[: min(key.settings["named_first"], answers)]
    record["findings"] = [finding(key, p, steps, cover, k + 1) for k, p in enumerate(names)]
    asked = len(names)
    made = call(key.pack, record, prompts=1)
    while asked < answers and not made["sure"] and made["prompts"]:
        prompt = made["prompts"][0]
        if prompt["kind"] == "question":
            value = told.get(prompt["id"], "cant_tell")
            known[prompt["id"]] = value
            asked += value != "cant_tell"
        else:
            answer = finding(key, key.plant_at[prompt["id"]], steps, cover, None)
            record["findings"].append(answer)
            asked += answer["state"] != "cant_tell"
        made = call(key.pack, record, prompts=1)
    return made, asked


def most_plentiful(
    key: Key, site: Site, steps: NDArray[np.int8], cover: NDArray[np.float32]
) -> list[int]:
    """Plants found, most cover first; on disturbed ground neither weeds nor what may be sown."""
    context = context_of(key, site)
    found = [p for p in range(key.plants) if steps[p] >= 0]
    if context.disturbed:
        plants = key.pack["plants"]
        found = [p for p in found if plants[p]["weed"] == "none" and not context.sown[p]]
    return sorted(found, key=lambda p: (-cover[p], p))


def finding(
    key: Key,
    p: int,
    steps: NDArray[np.int8],
    cover: NDArray[np.float32],
    named: int | None,
) -> dict[str, Any]:
    """The finding of one plant as a record holds it."""
    state = "found" if steps[p] >= 0 else "not_found" if steps[p] == -1 else "cant_tell"
    code = class_code(key, float(cover[p])) if 0 <= steps[p] < 4 else None
    plant_id = key.pack["plants"][p]["id"]
    return {"plant_id": plant_id, "state": state, "cover": code, "named": named}


def class_code(key: Key, cover_pct: float) -> str:
    """The region's cover class of a cover; its lower limit belongs to the class. [percent]"""
    classes = key.pack["cover"]["classes"]
    inside = [one for one in classes if cover_pct >= one["low_pct"]] or classes[:1]
    return str(inside[-1]["code"])
