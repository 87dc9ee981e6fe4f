"""Ground: three-valued rules, question odds, height within its cap, units."""

import itertools

import numpy as np
import pytest

from builder.formulas.terrain import heat_load as formula_heat_load
from builder.key.call import call
from builder.key.compile_ground import question_chance
from builder.key.findings import read_findings
from builder.key.height import bands_at, heat_load, heat_share
from builder.key.prepare import prepare
from builder.key.rules import holds
from builder.key.unit import unit_zone

T, F, U = 1.0, 0.0, 0.5


@pytest.fixture(scope="session")
def plants(pack):
    return [one["id"] for one in pack["plants"][:4]]


def value(pack, when, rows=(), **site):
    key = prepare(pack)
    full = {"findings": list(rows), **site}
    return holds(key, full, read_findings(key, full), when)


def row(plant, state, cover=None):
    return {"plant_id": plant, "state": state, "cover": cover}


def test_truth_tables_of_three_values(pack, plants):
    rows = [row(plants[0], "found", "2"), row(plants[1], "not_found")]
    leaf = {T: {"plant": plants[0]}, F: {"plant": plants[1]}, U: {"plant": plants[2]}}
    for a, b in itertools.product((T, F, U), repeat=2):
        assert value(pack, {"all": [leaf[a], leaf[b]]}, rows) == min(a, b)
        assert value(pack, {"any": [leaf[a], leaf[b]]}, rows) == max(a, b)
        assert value(pack, {"not": leaf[a]}, rows) == 1 - a


def test_cover_at_least_lies_between_the_class_limits(pack, plants):
    when = {"plant": plants[0], "cover_at_least_pct": 10}
    for code, truth in (("T", F), ("1", F), ("2", U), ("3", T), (None, U)):
        assert value(pack, when, [row(plants[0], "found", code)]) == truth
    assert value(pack, when, [row(plants[0], "not_found")]) == F
    assert value(pack, when) == U


def test_an_unsearched_member_neither_fires_nor_blocks(pack):
    group = pack["groups"][0]
    ids = [pack["plants"][p]["id"] for p in group["members"]]
    count = {"group": group["id"], "count_at_least": 2}
    assert value(pack, count, [row(ids[0], "found")]) == U
    assert value(pack, count, [row(one, "found") for one in ids[:2]]) == T
    assert value(pack, count, [row(one, "not_found") for one in ids[: len(ids) - 1]]) == F
    cover = {"group": group["id"], "cover_at_least_pct": 25}
    assert value(pack, cover, [row(ids[0], "found", "3")]) == T
    assert value(pack, cover, [row(ids[0], "found", "1")]) == U


def test_facts_and_answers_of_the_site(pack):
    high = {"fact": "height_m", "at_least": 2000, "at_most": 3000}
    assert value(pack, high) == U
    assert [value(pack, high, place={"height_m": h}) for h in (1999, 2000, 3001)] == [F, T, F]
    moved = {"question": "soil_moved", "is": "respread"}
    assert value(pack, moved) == U
    assert value(pack, moved, questions={"soil_moved": "cant_tell"}) == U
    assert value(pack, moved, disturbance="well_pad") == T
    assert value(pack, moved, questions={"soil_moved": "no"}, disturbance="well_pad") == F


def test_a_rule_flips_the_call_and_can_be_struck_out(pack):
    sown = [p for p in pack["groups"] if p["id"] == "sown_grass"][0]["members"]
    rows = [row(pack["plants"][sown[0]]["id"], "found", "4"), row("artemisia_nova", "not_found")]
    site = {"findings": rows}
    made = call(pack, site)
    assert made["rules_fired"] == ["sown_stand"]
    struck = call(pack, {**site, "struck": ["sown_stand"]})
    assert struck["rules_fired"] == []
    assert struck["belief"] != made["belief"]


def test_question_odds_make_probabilities():
    """Shares 1/4 and 3/4, odds of e and 1: by hand e/4 / (e/4 + 3/4); error 0.07 halves."""
    chance = question_chance(np.array([[1.0, 0.0], [0.0, 0.0]]), np.array([0.25, 0.75]), 0.07)
    first = np.e / 4 / (np.e / 4 + 0.75)
    assert chance[:, 0] == pytest.approx([0.93 * first + 0.035, 0.93 * (1 - first) + 0.035])
    assert chance.sum(axis=0) == pytest.approx([1, 1])


@pytest.mark.parametrize("question", ["water_table", "salt_crust", "shallow_lime", "deep_sand"])
def test_each_azonal_question_can_flip_a_call(pack, question):
    values = [a for q in pack["questions"] if q["id"] == question for a in q["answers"]]
    leaders = {call(pack, {"questions": {question: one["value"]}})["zone_id"] for one in values}
    assert len(leaders) > 1


def test_height_never_parts_zones_by_more_than_its_cap(pack, random_sites):
    for site in random_sites(pack, 60, 41):
        bare = {"place": {**site["place"], "height_m": 1450}}
        made = call(pack, bare)
        points = [r["points_cb"] for r in made["reasons"] if r["kind"] == "height"]
        assert all(abs(one) <= pack["settings"]["height"]["most_cb"] for one in points)
        assert max(made["belief"].values()) < 0.6


def test_a_frost_hollow_switches_height_off(pack):
    site = {"place": {"height_m": 3300}}
    hollow = {**site, "questions": {"cold_air_pocket": "yes"}}
    assert call(pack, hollow)["notes"]["height_off"]
    flat = call(pack, {"questions": {"cold_air_pocket": "yes"}})
    assert call(pack, hollow)["belief"] == flat["belief"]


def test_heat_load_is_that_of_the_formulas(pack):
    heat = pack["settings"]["heat_load"]
    for slope in (0, 10, 30):
        for aspect in range(0, 360, 45):
            ours = heat_load({**heat, "latitude_deg": 40}, 100 * np.tan(np.radians(slope)), aspect)
            assert ours == pytest.approx(
                formula_heat_load(40, slope, aspect if slope else None), abs=1e-12
            )


def test_warm_slopes_lift_the_band_and_cool_ones_lower_it(pack):
    key = prepare(pack)
    hot = heat_share(key, {"place": {"slope_pct": 40, "aspect_deg": 225}})
    cool = heat_share(key, {"place": {"slope_pct": 40, "aspect_deg": 45}})
    assert hot == pytest.approx(1, abs=1e-6)
    assert cool == pytest.approx(-1, abs=1e-6)
    assert heat_share(key, {"place": {"slope_pct": 40}}) == 0
    zone = pack["zones"][0]
    assert bands_at(key, hot)[0][0] == pytest.approx(zone["band_m"][0] + zone["south_shift_m"])
    assert bands_at(key, cool)[0][0] == pytest.approx(zone["band_m"][0] + zone["north_shift_m"])


def edge(name, zone, lat=None, verdict="zone", **more):
    place = {"latitude_deg": lat, "longitude_deg": -110.0 if lat else None}
    made = {"verdict": verdict, "zone_id": zone, "pair": None}
    return {"id": name, "role": "edge", "call": made, "place": place, **more}


def test_a_unit_takes_its_zone_from_two_sides(pack):
    a, b = (zone["id"] for zone in pack["zones"][:2])
    assert unit_zone(pack, [edge("1", a)])["state"] == "too_few"
    carried = unit_zone(pack, [edge("1", a), edge("2", a)])
    assert (carried["state"], carried["zone_id"], carried["sides"]) == ("carried", a, 2)
    differ = unit_zone(pack, [edge("1", b), edge("2", a)])
    assert (differ["state"], differ["zone_id"], differ["zone_ids"]) == ("differ", None, [a, b])


def test_what_does_not_count_as_a_side(pack):
    a = pack["zones"][0]["id"]
    near = [edge("1", a, 38.0), edge("2", a, 38.0001)]
    assert unit_zone(pack, near)["sides"] == 1
    assert unit_zone(pack, [edge("1", a, 38.0), edge("2", a, 38.001)])["sides"] == 2
    thin = [edge("1", a), edge("2", a, verdict="thin"), edge("3", a, role="inside")]
    assert unit_zone(pack, thin)["sides"] == 1
    own = edge("2", a, verdict="thin", overruled={"zone_id": a, "reason": "seen before"})
    assert unit_zone(pack, [edge("1", a), own])["state"] == "carried"
