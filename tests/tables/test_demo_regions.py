"""Both demo regions stand in the tables in full, and nothing is wrong with them."""

from pathlib import Path

import pytest

from builder.checks import checked_region
from builder.rows import Value
from builder.tables.sources import COMMON, DEMO, PUBLISHED

KEYDATA = Path(__file__).parent.parent.parent / "keydata"
REGIONS = ("sorrel_plateau", "ravenmoss_upland")


@pytest.mark.parametrize("name", REGIONS)
def test_no_problem_is_left(name):
    demo = checked_region(KEYDATA / name)
    assert demo.problems == []
    assert demo.region.invented


@pytest.mark.parametrize(
    ("name", "zones", "azonal", "plants", "occurrences", "questions", "disturbances"),
    [("sorrel_plateau", 16, 4, 151, 809, 19, 5), ("ravenmoss_upland", 11, 3, 100, 451, 18, 7)],
)
def test_everything_is_there(name, zones, azonal, plants, occurrences, questions, disturbances):
    region = checked_region(KEYDATA / name).region
    assert len(region.zones) == zones
    assert sum(zone.kind == "azonal" for zone in region.zones) == azonal
    assert len(region.plants) == plants
    assert len(region.occurrence) == occurrences
    assert len(region.questions) == questions
    assert sum(each.notes for each in region.disturbances) == disturbances
    assert sum(len(n.by_disturbance) for n in region.reclaim.zones.values()) == zones * disturbances
    assert {zone.id for zone in region.zones} == set(region.mixes) == set(region.climate)
    assert all(len(months) == 12 for months in region.climate.values())


@pytest.mark.parametrize("name", REGIONS)
def test_every_figure_is_asked_for_its_source(name):
    region = checked_region(KEYDATA / name).region
    for zone_id, plant_id in region.occurrence:
        assert region.source_of_occurrence(zone_id, plant_id).text == DEMO
    kinds = {
        found.kind
        for zone in region.zones
        if (found := region.source_of(zone, "band_m")) is not None
    }
    assert kinds == {DEMO}
    line = region.files["production"].reference_lines[0]
    found = region.source_of(line, "figures")
    assert found.kind == PUBLISHED
    assert found.key in region.sources


def test_the_nearest_source_wins_by_field():
    region = checked_region(KEYDATA / "sorrel_plateau").region
    sown = region.plant("artemisia_tridentata_wyomingensis")
    assert region.source_of(sown, "seeds_per_g").text == COMMON
    assert region.source_of(sown, "planning_pls").text == DEMO
    assert region.source_of(sown, "lookalike_tell").key == "sagebrush_uv"
    clip = region.production["saltflat"].clip
    assert region.source_of(clip, "area_m2").text == COMMON
    assert region.source_of(clip, "every").text == DEMO
    assert isinstance(region.source_of(clip, "every").written, Value)


def test_known_rows_say_what_the_tables_say():
    region = checked_region(KEYDATA / "sorrel_plateau").region
    pinyon = region.occurrence["pj", "pinus_edulis"]
    assert (pinyon.constancy, pinyon.constancy_pct, pinyon.cover_pct) == (0.88, 88, 11)
    assert region.zone("wyosage").letter == "C"
    assert region.production["wyosage"].normal_kg_ha == 740
    assert region.mixes["saltflat"].plants["atriplex_confertifolia"] == 70
    assert region.cover_scale.class_of(5).code == "2"
    assert region.cover_scale.class_of(0.2).code == "T"
    assert region.question("water_table").digs_cm == 100
    upland = checked_region(KEYDATA / "ravenmoss_upland").region
    assert [c.code for c in upland.cover_scale.classes][:3] == ["+", "1", "2"]
    assert upland.seeding_methods["drilled"] is None
    assert upland.soils["blanketbog"].layers[0].sand_pct is None
    assert upland.mixes["flush"].method == "none"
    assert upland.production["dryheath"].standing_crop_t_ha.by_age[0] == (3, 2.5)
    assert upland.words["es"].plants["calluna_vulgaris"]


def test_no_line_is_sown_twice_over():
    """Live seeds add to the totals that the mixes were written for."""
    region = checked_region(KEYDATA / "sorrel_plateau").region
    totals = {zone: sum(mix.plants.values()) for zone, mix in region.mixes.items()}
    assert totals["saltflat"] == 460
    assert totals["sandgrass"] == 272
    assert totals["wyosage"] == 320
    assert totals["wetmeadow"] == 700
