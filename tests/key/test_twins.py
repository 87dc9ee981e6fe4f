"""One truth: the phone, in a real browser, gives the builder's digits on thousands of sites."""

import json

import pytest

from builder.key.call import call, call_three
from builder.key.reasons import reasons_between
from builder.key.sparse import lengthen, shorten
from builder.key.unit import unit_zone
from builder.pack import compile_pack

CALLS = "given.sites.map((site) => key.call(given.pack, site))"


def on_phone(page, expression, given):
    """The value of an expression on the phone; `key` is the phone's key, `given` what we send.

    It travels as text, since a browser driver takes ten times as long over nested lists.
    """
    script = f"""async (text) => {{
      const key = await import('/index.js');
      const given = JSON.parse(text);
      return JSON.stringify({expression});
    }}"""
    return json.loads(page.evaluate(script, json.dumps(given)))


def same(value):
    """As it looks after a trip through JSON."""
    return json.loads(json.dumps(value))


@pytest.mark.parametrize(("which", "count"), [("pack", 1600), ("fitted_pack", 800)])
def test_the_phone_calls_as_the_builder_does(request, core_page, random_sites, which, count):
    pack = request.getfixturevalue(which)
    sites = random_sites(pack, count, 5)
    phone = on_phone(core_page, CALLS, {"pack": pack, "sites": sites})
    verdicts = set()
    for site, theirs in zip(sites, phone, strict=True):
        ours = same(call(pack, site))
        verdicts.add(ours["verdict"])
        assert theirs == ours, site
    assert verdicts == {"zone", "edge", "mosaic", "misfit", "thin"}


def test_another_scale_and_another_region_alike(core_page, random_sites, tables):
    pack = same(compile_pack(tables.region))
    sites = random_sites(pack, 300, 8)
    phone = on_phone(core_page, CALLS, {"pack": pack, "sites": sites})
    assert phone == [same(call(pack, site)) for site in sites]


def test_records_with_holes_and_strange_words_alike(core_page, pack):
    plant, group = pack["plants"][0]["id"], pack["groups"][0]["id"]
    found = {"plant_id": plant, "state": "found"}
    sites = [
        {},
        {"findings": None, "questions": None, "place": None, "struck": None, "digging": None},
        {
            "findings": [
                {"plant_id": "nobody", "state": "found"},
                {"group_id": "none", "state": "found"},
            ]
        },
        {"findings": [{**found, "cover": "nothing", "named": 1}], "disturbance": "flood"},
        {"findings": [found, {**found, "state": "not_found"}, {**found, "state": "cant_tell"}]},
        {"findings": [{"group_id": group, "state": "cant_tell"}], "whole_plot_searched": True},
        {"questions": {"water_table": "very deep", "colour": "red"}, "month": 0},
        {"place": {"height_m": -400, "slope_pct": 900, "aspect_deg": 360}, "month": 13},
    ]
    phone = on_phone(core_page, CALLS, {"pack": pack, "sites": sites})
    assert phone == [same(call(pack, site)) for site in sites]


def only_first_zone(pack):
    """The same pack with one zone left."""
    count = len(pack["zones"])
    made = same(pack)
    evidence = made["evidence"]
    made["zones"] = [{**made["zones"][0], "neighbours": []}]
    first = [shorten(lengthen(one, count)[:, :1]) for one in evidence["plants"]]
    evidence["plants"] = first
    evidence["newcomer"] = {"levels": [], "rows": [], "tables": []}
    evidence["groups"] = [{name: one[name][:1] for name in one} for one in evidence["groups"]]
    made["disturbances"], made["questions"], made["rules"] = [], [], []
    made["settings"]["area_cb"] = [0]
    for band in made["settings"]["fit"]:
        band.update({name: value[:1] for name, value in band.items() if name != "asked_to"})
    return same(made)


def test_a_region_of_one_zone_is_called_too(core_page, pack, random_sites):
    one = only_first_zone(pack)
    sites = random_sites(one, 30, 12)
    phone = on_phone(core_page, CALLS, {"pack": one, "sites": sites})
    assert phone == [same(call(one, site)) for site in sites]
    assert {made["zone_id"] for made in phone} == {pack["zones"][0]["id"]}


def test_three_looks_alike(core_page, random_sites, pack):
    sites = random_sites(pack, 300, 6)
    stands = [None, "one_kind", "changes_near", "patches"]
    threes = [[*sites[at : at + 3], stands[at % 4]] for at in range(0, 297, 3)]
    script = "given.threes.map((one) => key.callThree(given.pack, ...one))"
    phone = on_phone(core_page, script, {"pack": pack, "threes": threes})
    assert phone == [same(call_three(pack, *one)) for one in threes]


def test_reasons_of_any_pair_alike(core_page, random_sites, pack):
    zones = [zone["id"] for zone in pack["zones"]]
    sites = random_sites(pack, 100, 7)
    pairs = [[s, zones[at % 16], zones[(at * 7 + 3) % 16]] for at, s in enumerate(sites)]
    script = "given.pairs.map((one) => key.reasonsBetween(given.pack, ...one))"
    phone = on_phone(core_page, script, {"pack": pack, "pairs": pairs})
    assert phone == [same(reasons_between(pack, *one)) for one in pairs]


def test_units_alike(core_page, random_sites, pack):
    sites = random_sites(pack, 120, 9)
    zones = [zone["id"] for zone in pack["zones"]]
    checks = [
        {
            **site,
            "id": str(at),
            "role": "edge" if at % 5 else "inside",
            "call": {**same(call(pack, site)), "verdict": "zone", "zone_id": zones[at // 9 % 16]},
        }
        for at, site in enumerate(sites)
    ]
    units = [checks[at : at + at % 5] for at in range(0, 110)]
    script = "given.units.map((one) => key.unitZone(given.pack, one))"
    phone = on_phone(core_page, script, {"pack": pack, "units": units})
    assert phone == [same(unit_zone(pack, one)) for one in units]
    assert {one["state"] for one in phone} == {"carried", "differ", "too_few"}


def test_probes_agree_and_one_changed_digit_is_found(core_page, pack):
    check = "key.checkProbes(given)"
    assert on_phone(core_page, check, pack) == []
    spoilt = same(pack)
    spoilt["evidence"]["plants"][3][0][4] += 40
    assert on_phone(core_page, check, spoilt) != []
    wrong = same(pack)
    wrong["probes"][0]["answer"]["belief"][0] += 0.000001
    assert len(on_phone(core_page, check, wrong)) == 1
