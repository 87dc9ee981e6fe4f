"""Prompts: only what can be seen, dug and told; best first."""

import math

import numpy as np
import pytest

from builder.key.belief import weigh_site
from builder.key.call import call
from builder.key.prepare import prepare
from builder.key.prompt import prompts


def plants_of(pack, site):
    return {one["id"] for one in prompts(pack, site, 999) if one["kind"] == "plant"}


@pytest.mark.parametrize("month", range(1, 13))
def test_only_plants_that_can_be_seen_this_month(pack, month):
    inside = {
        p["id"]
        for p in pack["plants"]
        if (p["months"][0] <= month <= p["months"][1]) or p["months"] == [1, 12]
    }
    asked = plants_of(pack, {"month": month})
    assert asked
    assert asked <= inside


def test_what_was_answered_is_not_asked_again(pack):
    first = prompts(pack, {"month": 7}, 3)
    for state in ("found", "not_found", "cant_tell"):
        rows = [{"plant_id": one["id"], "state": state} for one in first if one["kind"] == "plant"]
        again = plants_of(pack, {"month": 7, "findings": rows})
        assert not again & {one["plant_id"] for one in rows}


def test_digging_only_after_its_safety_answer(pack):
    dug = {q["id"]: q["digs_cm"] for q in pack["questions"] if q["digs_cm"]}
    assert dug

    def asked(digging):
        site = {"month": 7, "digging": digging}
        free = {**pack, "settings": {**pack["settings"], "least_gain": -9}}
        return {one["id"] for one in prompts(free, site, 999) if one["id"] in dug}

    assert asked(None) == set() == asked({"cleared": None})
    assert asked({"cleared": "lines"}) == set(dug)
    assert asked({"cleared": "hand"}) == {name for name, depth in dug.items() if depth <= 30}


def test_gain_is_the_expected_fall_in_entropy(pack):
    """By brute force: entropy now less the mean entropy after each answer, by Bayes' rule."""
    key = prepare(pack)
    site = {"month": 7, "findings": [{"plant_id": "pinus_edulis", "state": "found"}]}
    belief = weigh_site(key, site).belief
    for one in prompts(pack, site, 40):
        if one["kind"] != "plant":
            continue
        p = key.plant_at[one["id"]]
        chances = np.vstack([key.presence[p] * key.cover[p], 1 - key.presence[p]])
        after = 0.0
        for chance in chances:
            joint = belief * chance
            after += joint.sum() * entropy(joint / joint.sum())
        price = pack["plants"][p]["price_micronats"] / 1e6
        expected = entropy(belief / belief.sum()) - after - price
        assert one["gain"] == pytest.approx(expected, abs=3e-5)


def entropy(shares):
    return -sum(share * math.log(share) for share in shares if share > 0)


def test_best_first_and_ties_in_pack_order(pack, random_sites):
    for site in random_sites(pack, 40, 31):
        gains = [one["gain"] for one in prompts(pack, site, 30)]
        assert gains == sorted(gains, reverse=True)
        assert all(gain > pack["settings"]["least_gain"] for gain in gains)


def test_sown_and_come_since_plants_are_not_asked(pack):
    mixed = {p["id"] for p in pack["plants"] if p["mix"] or p["weed"] == "seeded"}
    weeds = {p["id"] for p in pack["plants"] if p["weed"] in ("ruderal", "invasive")}
    assert not plants_of(pack, {"month": 7, "questions": {"old_seeding": "yes"}}) & mixed
    assert not plants_of(pack, {"month": 7, "disturbance": "burn"}) & weeds


def test_names_come_first_and_not_on_disturbed_ground(pack):
    assert call(pack, {})["name_more"] == 3
    one = {"plant_id": "pinus_edulis", "state": "found", "cover": "2", "named": 1}
    assert call(pack, {"findings": [one]})["name_more"] == 2
    assert call(pack, {"disturbance": "burn"})["name_more"] == 0
