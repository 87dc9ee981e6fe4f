"""Views: finished text in the region's own units, and one model behind both page kinds."""

from dataclasses import replace

import pytest
from helpers import three_zone_files, write_region

from builder.drawings.ink import PRINT, SCREEN
from builder.tables import load_region
from builder.views import grounds, look, plants, zone_view, zone_views
from builder.views.figures import Figures, month_runs, month_span
from builder.views.phrases import phrases

METRIC = Figures(phrases("en"))
US = Figures(phrases("en"), us=True)


@pytest.mark.parametrize(
    ("value", "digits", "text"),
    [
        (1234567, 0, "1,234,567"),
        (-60, 0, "\u221260"),
        (2.675, 2, "2.68"),
        (-0.2, 0, "0"),
        (999.5, 0, "1,000"),
    ],
)
def test_numbers_are_written_one_way(value, digits, text):
    assert METRIC.plain(value, digits) == text


def test_a_short_number_keeps_the_noughts_of_whole_numbers():
    assert METRIC.short(100) == "100"
    assert METRIC.short(2.50) == "2.5"


def test_units_of_the_region_come_first():
    assert METRIC.heights(900, 1250) == "900–1,250\u00a0m"
    assert US.heights(900, 1250) == "2,950–4,100\u00a0ft"
    assert METRIC.rain(254) == "254\u00a0mm"
    assert US.rain(254) == "10.0\u00a0in"
    assert METRIC.yields(1681) == "1,680"
    assert US.yields(1000) == "890"
    assert US.seeds(107.639104) == "10"


def test_months_run_over_the_turn_of_the_year():
    assert month_runs([11, 12, 1, 3]) == [(3, 3), (11, 1)]
    assert month_span(11, 2) == [11, 12, 1, 2]
    assert METRIC.months([12, 1, 2]) == "Dec–Feb"
    assert METRIC.months(range(1, 13)) == "all year"


def test_an_unknown_sentence_is_a_fault():
    with pytest.raises(KeyError, match="no sentence"):
        phrases("en").say("zone.nowhere")
    with pytest.raises(ValueError, match="no words"):
        phrases("xx")


def test_plants_stand_from_most_constant_down(tables):
    seen = look(tables.region)
    for zone in zone_views(seen):
        shares = [int(row.in_100) for row in zone.plants]
        assert shares == sorted(shares, reverse=True)
        assert shares


def changed(tmp_path, table, old, new):
    files = three_zone_files()
    assert old in files[table]
    files[table] = files[table].replace(old, new, 1)
    loaded = load_region(write_region(tmp_path / "changed", files))
    assert loaded.region is not None
    return loaded.region


def test_a_changed_constancy_changes_paper_and_screen_alike(tables, tmp_path):
    region = tables.region
    (zone_id, plant_id), each = next(iter(region.occurrence.items()))
    other = dict(region.occurrence)
    other[zone_id, plant_id] = replace(each, constancy=0.37)
    moved = replace(region, occurrence=other)
    for palette in (PRINT, SCREEN):
        before = zone_view(look(region, palette=palette), zone_id)
        after = zone_view(look(moved, palette=palette), zone_id)
        row = {row.plant_id: row for row in after.plants}[plant_id]
        assert row.in_100 == "37"
        assert row.bar != {row.plant_id: row for row in before.plants}[plant_id].bar
        assert "37 of 100" in row.bar


def test_paper_and_screen_say_the_same_words(tables):
    for zone_id in tables.region.zone_ids:
        paper = zone_view(look(tables.region, palette=PRINT), zone_id)
        screen = zone_view(look(tables.region, palette=SCREEN), zone_id)
        for name in (
            "band",
            "limits",
            "growth_rule",
            "year_line",
            "weeds",
            "mix",
            "damage",
            "soil",
        ):
            assert getattr(paper, name) == getattr(screen, name), name


def test_the_mix_is_live_seed_by_number_and_by_weight(tables):
    region = tables.region
    zone_id = next(zone for zone, mix in region.mixes.items() if mix.plants)
    mix = region.mixes[zone_id]
    seen = look(region)
    shown = zone_view(seen, zone_id).mix
    plant_id, live = next(iter(mix.plants.items()))
    kg_ha = live * 10 / region.plant(plant_id).seeds_per_g  # hand arithmetic
    assert shown.rows[0].weight == seen.figures.seed_weight(kg_ha)
    abreast = [row for pair in shown.pairs for row in pair if row.name]
    assert sorted(abreast, key=str) == sorted(shown.rows, key=str)


def test_every_plant_stands_once_in_the_lists(tables):
    seen = look(tables.region)
    listed = [plant.id for group in plants.by_form(seen) for plant in group.plants]
    assert sorted(listed) == sorted(tables.region.plant_ids)
    charted = [row.plant_id for row in plants.chart(seen).rows]
    assert sorted(charted) == sorted(tables.region.plant_ids)


def test_the_chart_climbs_the_slope(tables):
    seen = look(tables.region)
    places = [plants._place(seen, row.plant_id) for row in plants.chart(seen).rows]
    assert places == sorted(places)


def test_cautions_for_people_come_deadly_first(tables):
    heads = [group.head for group in grounds.region_warns(look(tables.region))]
    assert heads[0] == "Deadly to people"


def test_the_hand_test_leads_to_a_step_or_a_texture(tables):
    steps = grounds.feel_steps(look(tables.region))
    numbers = {step.number for step in steps}
    for step in steps:
        for way in step.ways:
            assert way.ends != (way.goal in numbers)


def test_hoops_show_the_regions_own_scale(tables):
    codes = [each.code for each in grounds.hoops(look(tables.region))]
    assert codes == [each.code for each in tables.region.cover_scale.classes]
