"""Records: what a plant, a scale, a condition and a place can be asked."""

import pytest
from helpers import all_records

from builder.problems import Place
from builder.tables.regions import YAML_TABLES
from builder.tables.shape import columns


def test_a_record_knows_where_its_values_stand(tables):
    zone = tables.region.zone("breaks")
    folder = tables.folder
    assert zone.at.file == str(folder / "zones.yaml")
    assert zone.place("neighbours", 0).line == zone.at.line + 15
    assert zone.place("no_such_field") == zone.at
    assert zone.key_place("told_from", "prairie").column == 17
    assert isinstance(zone.place("band_m", 1), Place)


def test_class_words_stand_for_the_middle_of_their_class(tables):
    seen = tables.region.occurrence["breaks", "skunkbush"]
    assert (seen.constancy, seen.cover_pct) == (0.905, 15)


def test_a_plant_has_the_traits_of_its_form_fate_and_response(tables):
    willow = tables.region.plant("sandbar_willow")
    for trait in ("shrub", "resprouts", "decreaser", "any"):
        assert willow.has_trait(trait)
    for trait in ("grass", "killed", "tree"):
        assert not willow.has_trait(trait)
    assert tables.region.plant("blue_grama").has_trait("grass")
    assert not tables.region.plant("blue_grama").has_trait("gras")


def test_conditions_hold_conditions(tables):
    rule = tables.region.rules[0]
    assert rule.when.all[0].plant == "ponderosa_pine"
    assert rule.when.all[1].no.question == "stripped"


def test_an_unknown_id_is_a_key_error(tables):
    for ask in (
        tables.region.zone,
        tables.region.plant,
        tables.region.group,
        tables.region.question,
    ):
        with pytest.raises(KeyError):
            ask("nobody")
    assert [g.id for g in tables.region.groups_of("blue_grama")] == ["bunch_grass"]


def test_the_lower_limit_belongs_to_the_cover_class(tables):
    scale = tables.region.cover_scale
    assert [scale.class_of(p).code for p in (0, 0.49, 0.5, 1, 5, 25, 75, 100)] == [
        "r",
        "r",
        "+",
        "1",
        "2",
        "3",
        "5",
        "5",
    ]
    assert scale.by_code("4").mid_pct == 62.5
    assert scale.by_code("9") is None


def test_every_field_of_every_record_has_a_kind():
    counted = 0
    for table in YAML_TABLES.values():
        for record in all_records(table):
            own = [name for name in record.__dataclass_fields__ if name != "row"]
            assert len(own) == len(columns(record)), record
            counted += len(own)
    assert counted > 150
