"""The demo regions through the formulas: ground worked out elsewhere, and facts of the trade.

The facts are rules of thumb without a source: common practice. Wide on purpose; a region may
have good reasons to differ.
"""

import json
from pathlib import Path

import pytest
from scipy.stats import spearmanr

from builder.formulas import (
    cover,
    organic_matter,
    production,
    seeding,
    soil_water,
    texture,
    water_balance,
    year,
)
from builder.tables import load_region
from builder.tables.shape import columns

ROOT = Path(__file__).parent.parent.parent
GOLDENS = Path(__file__).parent.parent / "goldens"
DEMO = json.loads((GOLDENS / "demo_ground.json").read_text())["regions"]
COUNTS = json.loads((GOLDENS / "seed_counts.json").read_text())["plants"]


class Ground:
    """One demo region: plain layers, water held, and the year of each zone."""

    def __init__(self, name):
        self.region = load_region(ROOT / "keydata" / name).region
        peat = self.region.files["soils"].peat_classes
        self.peat = [self.plain(row) for row in peat]
        self.zonal = [zone for zone in self.region.zones if zone.kind == "zonal"]

    @staticmethod
    def plain(record):
        return {item.name: getattr(record, item.name) for _, _, item in columns(type(record))}

    def layers(self, zone_id):
        return [self.plain(layer) for layer in self.region.soils[zone_id].layers]

    def held(self, zone_id, depth_cm=None):
        depth = depth_cm or self.region.soils[zone_id].rooting_depth_cm
        return [row.mm for row in soil_water.profile_water(self.layers(zone_id), depth, self.peat)]

    def year(self, zone):
        months, soil = self.region.climate[zone.id], self.region.soils[zone.id]
        table = soil.water_table_cm[1] if soil.water_table_cm else None
        return year.site_year(
            self.region.latitude_deg,
            [month.tmax_c for month in months],
            [month.tmin_c for month in months],
            [month.precip_mm for month in months],
            sum(self.held(zone.id)),
            0.0 if zone.ground_water_in_reach else table,
        )


@pytest.fixture(scope="module", params=sorted(DEMO))
def ground(request):
    return Ground(request.param)


@pytest.fixture(scope="module")
def sorrel():
    return Ground("sorrel_plateau")


def test_growing_months_are_those_worked_out_elsewhere(ground):
    """All but two zones whose months were set by hand: see docs/method.md, growing months."""
    compared = 0
    for zone in ground.region.zones:
        stated = DEMO[ground.region.id][zone.id]
        if stated["set_by_hand"] and zone.id != "wetmeadow":
            assert ground.year(zone).growing == ground.year(zone).warm
            continue
        compared += 1
        assert ground.year(zone).growing == stated["growing_months"], zone.id
    assert compared >= 11


def test_water_held_is_that_worked_out_elsewhere(ground):
    """Elsewhere rounded to whole millimetres; peat and stated layers among them."""
    compared = 0
    for zone_id, stated in DEMO[ground.region.id].items():
        whole = ground.held(zone_id, 1000)
        for mm, wanted in zip(whole, stated["held_mm_by_layer"], strict=True):
            compared += 1
            assert mm == pytest.approx(wanted, abs=1.01), zone_id
        assert sum(ground.held(zone_id)) == pytest.approx(stated["held_mm"], abs=1.51), zone_id
    assert compared >= 33


def test_texture_names_are_those_worked_out_elsewhere(ground):
    compared = 0
    for zone_id, stated in DEMO[ground.region.id].items():
        for layer, name in zip(ground.layers(zone_id), stated["textures"], strict=True):
            if layer["kind"] == "mineral":
                compared += 1
                got = texture.texture_class(layer["sand_pct"], layer["silt_pct"], layer["clay_pct"])
                assert got == name, zone_id
    assert compared >= 19


def test_mix_weights_are_those_worked_out_elsewhere(sorrel):
    compared = 0
    for zone_id, mix in sorrel.region.mixes.items():
        total = sum(
            seeding.pls_kg_ha(seeds, sorrel.region.plant(plant_id).seeds_per_g)
            for plant_id, seeds in mix.plants.items()
        )
        compared += 1
        stated = DEMO["sorrel_plateau"][zone_id]["mix_pls_kg_ha"]
        assert total == pytest.approx(stated, abs=0.051), zone_id
    assert compared == 16


def test_a_layer_over_the_equations_organic_matter_is_told(sorrel):
    told = {
        zone.id: [row.at_limit for row in soil_water.profile_water(sorrel.layers(zone.id), 200)]
        for zone in sorrel.region.zones
    }
    assert {zone_id for zone_id, marks in told.items() if any(marks)} == {"alpine", "wetmeadow"}


def test_the_worked_case_of_sagebrush_steppe(sorrel):
    made = sorrel.region.production["wyosage"]
    short = made.normal_kg_ha * production.year_share(0.7, made.rain_response)
    assert short == pytest.approx(496, abs=0.5)
    low, high = production.year_range(short, made.site_spread_cv)
    assert (low, high) == pytest.approx((387, 635), abs=0.5)
    usual = production.year_range(made.normal_kg_ha, made.site_spread_cv)
    assert usual == pytest.approx((578, 947), abs=0.5)
    assert production.place_of(496, *usual) == "under"
    assert production.place_of(496, low, high) == "inside"
    dust = made.normal_kg_ha * production.year_share(0.1, made.rain_response)
    assert dust == pytest.approx(made.normal_kg_ha / 10)


def test_the_worked_seed_order_of_wyoming_sagebrush(sorrel):
    plant = sorrel.region.plant("artemisia_tridentata_wyomingensis")
    wanted = sorrel.region.mixes["wyosage"].plants[plant.id]
    assert (wanted, plant.seeds_per_g) == (60, 5512)
    assert seeding.order_bulk_kg(wanted, plant.seeds_per_g, 0.12, 4) == pytest.approx(
        3.63, abs=0.005
    )


def test_seed_counts_lie_near_the_published_ones(sorrel):
    """Counts differ between lots; the tolerance is the spread between sources."""
    by_name = {plant.scientific: plant for plant in sorrel.region.plants}
    compared = 0
    for row in COUNTS:
        plant = by_name.get(row["scientific"])
        if plant is None or not plant.seeds_per_g:
            continue
        compared += 1
        per_lb = plant.seeds_per_g * 453.59237
        assert per_lb == pytest.approx(row["seeds_per_lb"], rel=row["rel"]), row["scientific"]
    assert compared >= 15


def test_common_practice_it_gets_colder_and_wetter_upslope(sorrel):
    """TR-01, common practice."""
    below_mean, below_rain = 99.0, 0.0
    for zone in sorrel.zonal:
        made = sorrel.year(zone)
        mean, rain = sum(made.mean_c) / 12, sum(made.rain_mm)
        assert mean <= below_mean + 0.3, zone.id
        assert rain >= below_rain, zone.id
        below_mean, below_rain = mean, rain
    assert sum(sorrel.year(sorrel.zonal[0]).rain_mm) < 400
    assert 700 < below_rain < 1300


def test_common_practice_cold_hollows_stay_as_they_are(sorrel):
    """TR-02, common practice: a hollow may be colder than the belt above; nothing mends it."""
    lows = {z.id: min(m.tmin_c for m in sorrel.region.climate[z.id]) for z in sorrel.region.zones}
    assert lows["wetmeadow"] < lows["sprucefir"]
    hollow = sorrel.region.zone("wetmeadow")
    months = sorrel.region.climate["wetmeadow"]
    stated = [(month.tmax_c + month.tmin_c) / 2 for month in months]
    assert sorrel.year(hollow).mean_c == pytest.approx(stated)


def test_common_practice_never_more_dry_months_in_a_higher_belt(sorrel):
    """TR-03, common practice."""
    counts = [len(sorrel.year(zone).dry) for zone in sorrel.zonal]
    assert counts == sorted(counts, reverse=True)
    assert counts[0] >= 2
    assert counts[-1] == 0


def test_common_practice_growth_has_the_order_of_its_belt(sorrel):
    """TR-04, common practice; understory alone is far less than grass or forest."""
    for zone in sorrel.region.zones:
        made = sorrel.region.production[zone.id]
        rain = sum(month.precip_mm for month in sorrel.region.climate[zone.id])
        if "trees left out" in made.counted:
            assert made.normal_kg_ha < 0.7 * production.rain_line_kg_ha(rain), zone.id
        elif zone.kind == "zonal":
            assert 200 < made.normal_kg_ha < 2000, zone.id
            assert 1 <= production.rain_use_kg_ha_mm(made.normal_kg_ha, rain) <= 10, zone.id
            assert made.normal_kg_ha < 1.1 * production.rain_line_kg_ha(rain), zone.id


def test_common_practice_forest_stands_a_hundredfold(sorrel):
    """TR-05, common practice."""
    crop = {
        zone.id: sorrel.region.production[zone.id].standing_crop_t_ha
        for zone in sorrel.region.zones
    }
    closed = [crop[zone_id].normal for zone_id in ("mixcon", "sprucefir")]
    assert all(100 <= tonnes <= 300 for tonnes in closed)
    grass = sorrel.region.production["mtnsage"].normal_kg_ha / 1000
    assert all(tonnes > 50 * grass for tonnes in closed)


def test_common_practice_growing_months_tell_more_than_warm_ones(sorrel):
    """TR-06, common practice."""
    years = [sorrel.year(zone) for zone in sorrel.zonal]
    growth = [sorrel.region.production[zone.id].normal_kg_ha for zone in sorrel.zonal]
    growing = spearmanr([len(made.growing) for made in years], growth).statistic
    warm = spearmanr([len(made.warm) for made in years], growth).statistic
    assert growing > warm


def test_common_practice_water_held_in_the_top_half_metre(sorrel):
    """TR-07, common practice: a few centimetres in thin high soil, more in fine low soil."""
    top = {zone.id: sum(sorrel.held(zone.id, 50)) for zone in sorrel.region.zones}
    assert 20 <= top["alpine"] <= 60
    assert all(30 <= top[zone_id] <= 120 for zone_id in ("ponderosa", "mixcon", "sprucefir"))
    assert min(top["saltflat"], top["alkbottom"], top["basinsage"]) > top["alpine"]
    assert top["sandgrass"] < top["saltflat"]


def test_common_practice_organic_matter_of_turf_conifers_and_grass(sorrel):
    """TR-08, common practice: per cent in the top layer; nitrogen near a twentieth of it."""
    top = {zone.id: sorrel.layers(zone.id)[0]["organic_matter_pct"] for zone in sorrel.region.zones}
    assert top["alpine"] > top["sprucefir"] > top["mixcon"] > top["ponderosa"]
    assert 0.2 <= top["ponderosa"] / top["alpine"] <= 0.4
    assert top["mtnsage"] > top["ponderosa"]
    assert organic_matter.nitrogen_t_ha(20) == pytest.approx(1.0)


def test_common_practice_plants_fall_into_narrow_wide_and_split_ranges(sorrel):
    """TR-09, common practice; weeds among them."""
    order = [zone.id for zone in sorrel.zonal]
    kinds = {"narrow": set(), "wide": set(), "split": set()}
    for plant in sorrel.region.plants:
        at = [i for i, zone in enumerate(order) if (zone, plant.id) in sorrel.region.occurrence]
        if len(at) == 1:
            kinds["narrow"].add(plant.id)
        elif len(at) >= 6:
            kinds["wide"].add(plant.id)
        if at and at[-1] - at[0] + 1 > len(at):
            kinds["split"].add(plant.id)
    weeds = {plant.id for plant in sorrel.region.plants if plant.weed != "none"}
    assert all(len(plants) >= 5 for plants in kinds.values())
    assert weeds & kinds["wide"]


def test_common_practice_woodpeckers_need_trees_and_crust_is_spared(sorrel):
    """TR-10 and TR-12, common practice: what the notes say of birds and of the crust."""
    notes = sorrel.region.reclaim.zones
    for zone in sorrel.region.zones:
        foliar = sorrel.region.production[zone.id].foliar_cover_pct.get("tree", 0)
        if "woodpecker" in " ".join(notes[zone.id].wildlife.values()).lower():
            assert foliar >= 5, zone.id
    for zone_id in ("saltflat", "sandgrass", "wyosage"):
        assert "crust" in notes[zone_id].soil_life["biocrust"].lower()


def test_expected_plants_are_missed_by_a_stated_chance(sorrel):
    """A plant of nine plots in ten, one in ten overlooked: 19 in 100 that it is not recorded."""
    found = sorrel.region.occurrence["wyosage", "artemisia_tridentata_wyomingensis"]
    missed = cover.chance_of_miss(found.constancy, 0.1)
    assert 0.05 < missed < 0.3
    assert missed == pytest.approx(1 - found.constancy * 0.9)


def test_snow_and_rain_add_up_over_the_year(ground):
    for zone in ground.region.zones:
        months = ground.region.climate[zone.id]
        rain = [month.precip_mm for month in months]
        means = [month.mean_c for month in months]
        water, packs = water_balance.snow_months(rain, means)
        assert sum(water) == pytest.approx(sum(rain), abs=1e-3)
        assert min(packs) >= 0
