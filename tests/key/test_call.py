"""What a call must hold to: silence of the unsearched, sums that add up."""

import copy
import random

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from builder.key.call import call
from builder.key.prepare import prepare
from builder.key.reasons import reasons_between


def found(plant, cover=None, named=None):
    return {"plant_id": plant, "state": "found", "cover": cover, "named": named}


def not_found(plant):
    return {"plant_id": plant, "state": "not_found"}


def unsure(plant):
    return {"plant_id": plant, "state": "cant_tell"}


def numbers(made):
    """All of a call that a plant could move."""
    return {name: made[name] for name in ("belief", "fit", "finds_cb", "answers", "reasons")}


def test_a_plant_nobody_can_tell_changes_nothing_to_the_last_digit(pack, random_sites):
    for at, site in enumerate(random_sites(pack, 150, 21)):
        site["whole_plot_searched"] = False
        asked = {one.get("plant_id") for one in site["findings"]}
        free = [one["id"] for one in pack["plants"] if one["id"] not in asked]
        more = {**site, "findings": [*site["findings"], unsure(random.Random(at).choice(free))]}
        assert numbers(call(pack, more)) == numbers(call(pack, site))


def test_an_unsure_ground_answer_changes_nothing(pack, random_sites):
    for site in random_sites(pack, 60, 22):
        open_ones = [q["id"] for q in pack["questions"] if q["id"] not in site["questions"]]
        told = {**site["questions"], **{name: "cant_tell" for name in open_ones}}
        assert numbers(call(pack, {**site, "questions": told})) == numbers(call(pack, site))


def test_out_of_season_is_not_absence(pack):
    plant = next(p for p in pack["plants"] if p["months"] == [3, 6] and not p["known_when_dry"])
    site = {"month": 8, "findings": [found("artemisia_nova", "2", 1)]}
    more = {**site, "findings": [*site["findings"], not_found(plant["id"])]}
    assert numbers(call(pack, more)) == numbers(call(pack, site))
    assert call(pack, {**more, "month": 5})["belief"] != call(pack, more)["belief"]


def test_a_layer_gone_is_not_scorable(tables):
    import json

    from builder.pack import compile_pack

    made = json.loads(json.dumps(compile_pack(tables.region)))
    made["disturbances"][-1]["effect"] = {"layers_gone": ["shrub"]}
    shrub = next(p["id"] for p in made["plants"] if p["layer"] == "shrub")
    site = {"disturbance": made["disturbances"][-1]["id"], "findings": []}
    more = {**site, "findings": [not_found(shrub)]}
    assert call(made, more)["belief"] == call(made, site)["belief"]
    assert call(made, {**more, "disturbance": None})["belief"] != call(made, more)["belief"]


def test_plants_of_the_mix_say_nothing_where_a_seeding_is_marked(pack):
    site = {"questions": {"old_seeding": "yes"}, "findings": [found("artemisia_nova", "2")]}
    before = call(pack, site)["belief"]
    mixed = [p["id"] for p in pack["plants"] if p["mix"]]
    assert len(mixed) > 20
    for plant in mixed:
        for row in (found(plant, "3"), not_found(plant)):
            if plant != "artemisia_nova":
                after = call(pack, {**site, "findings": [*site["findings"], row]})["belief"]
                assert after == before


def test_some_of_a_kind_alone_never_gives_a_zone_80_percent(pack, fitted_pack):
    for one in (pack, fitted_pack):
        groups = [g["id"] for g in one["groups"] if g["use"] == "answer"]
        assert len(groups) >= 5
        for group in groups:
            site = {"findings": [{"group_id": group, "state": "found"}]}
            assert max(call(one, site)["belief"].values()) < 0.8


def test_some_of_a_kind_says_less_than_its_member(pack):
    """Some big sagebrush parts the sagebrush zones less than the mountain kind by name."""
    alone = call(pack, {"findings": [{"group_id": "big_sagebrush", "state": "found"}]})
    named = call(pack, {"findings": [found("artemisia_tridentata_vaseyana")]})
    assert max(alone["belief"].values()) < max(named["belief"].values())
    both = [found("artemisia_tridentata_vaseyana"), {"group_id": "big_sagebrush", "state": "found"}]
    assert call(pack, {"findings": both})["belief"] == named["belief"]


def test_some_of_a_kind_but_not_this_one_is_some_of_the_others(pack):
    """Two of the three big sagebrushes not found: then it is the third."""
    members = [
        pack["plants"][p]["id"]
        for g in pack["groups"]
        if g["id"] == "big_sagebrush"
        for p in g["members"]
    ]
    rows = [not_found(one) for one in members[:2]]
    some = call(pack, {"findings": [*rows, {"group_id": "big_sagebrush", "state": "found"}]})
    third = call(pack, {"findings": [*rows, found(members[2])]})
    for zone, share in third["belief"].items():
        assert some["belief"][zone] == pytest.approx(share, abs=0.01)
    none = [*rows, not_found(members[2]), {"group_id": "big_sagebrush", "state": "found"}]
    assert call(pack, {"findings": none})["belief"] == call(pack, {"findings": none[:3]})["belief"]


@settings(max_examples=60, deadline=None)
@given(st.integers(0, 10**6), st.integers(0, 15), st.integers(0, 15))
def test_reasons_add_up_for_any_pair(pack, random_sites, seed, a, b):
    site = random_sites(pack, 1, seed)[0]
    zones = [zone["id"] for zone in pack["zones"]]
    made = reasons_between(pack, site, zones[a], zones[b])
    assert sum(one["points_cb"] for one in made["reasons"]) == made["difference_cb"]
    back = reasons_between(pack, site, zones[b], zones[a])
    assert abs(made["difference_cb"] + back["difference_cb"]) <= 1
    kinds = {one["kind"] for one in made["reasons"]}
    lines = {"implied", "height", "area", "drag"}
    assert kinds <= {"plant", "group", "question", "rule"} | lines


def test_the_difference_is_that_of_the_belief_before_the_floor(pack, random_sites):
    import math

    for site in random_sites(pack, 80, 24):
        made = call(pack, site)
        floor = pack["settings"]["uniform_share"] / len(pack["zones"])
        first, second = (made["belief"][made[n]] - floor for n in ("zone_id", "next_zone_id"))
        if second > 1e-3:
            shown = 100 * math.log10(first / second)
            assert shown == pytest.approx(made["difference_cb"], abs=0.5 + 0.05)


def test_only_answers_that_part_zones_are_counted(pack):
    assert call(pack, {"findings": [not_found("pinus_edulis")]})["answers"] == 1
    assert call(pack, {"findings": [unsure("pinus_edulis")]})["answers"] == 0
    sown = {"questions": {"old_seeding": "yes"}, "findings": [found("agropyron_cristatum")]}
    assert call(pack, sown)["answers"] == 0


def test_belief_is_rounded_and_ties_keep_the_order_of_the_pack(pack):
    made = call(pack, {})
    assert list(made["belief"].values()) == [0.0625] * 16
    assert [made["zone_id"], made["next_zone_id"]] == [z["id"] for z in pack["zones"][:2]]
    assert made["verdict"] == "thin"


def test_what_is_named_says_something_of_what_is_not(pack):
    site = {"findings": [found("artemisia_nova", "1", 1)]}
    made = call(pack, site)
    line = [one for one in made["reasons"] if one["kind"] == "implied"]
    assert len(line) == 1
    struck = call(pack, {**site, "struck": ["implied"]})
    assert not [one for one in struck["reasons"] if one["kind"] == "implied"]
    burnt = call(pack, {**site, "disturbance": "burn"})
    assert not [one for one in burnt["reasons"] if one["kind"] == "implied"]


def test_thin_evidence_is_said(pack):
    weeds = [p["id"] for p in pack["plants"] if p["weed"] == "ruderal"][:3]
    made = call(pack, {"findings": [found(one, "1") for one in weeds]})
    assert made["verdict"] == "thin"
    assert not made["look_again"]


def test_drag_stops_at_its_cap(pack):
    key = prepare(pack)
    from builder.key.belief import drag_of

    assert [drag_of(key, n) for n in (0, 1, 2, 21, 150)] == [1, 1, 1.04, 1.8, 1.8]


def test_found_dead_trees_and_leaking_ditch(pack):
    """Water led in by people: what speaks for azonal ground counts a quarter."""
    site = {"findings": [found("carex_aquatilis", "2")]}
    wet = call(pack, site)
    led = call(pack, {**site, "questions": {"leaking_ditch": "yes"}})
    assert led["belief"]["wetmeadow"] < wet["belief"]["wetmeadow"]


def test_a_call_leaves_pack_and_site_alone(pack, random_sites):
    site = random_sites(pack, 1, 3)[0]
    before = copy.deepcopy((pack, site))
    call(pack, site)
    assert (pack, site) == before
