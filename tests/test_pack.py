"""The pack: the same bytes for the same tables, small, no sentences, probes of all kinds."""

import gzip
import json
from pathlib import Path

import numpy as np
import pytest
from helpers import three_zone_files, write_region

from builder.key.compile import compile_key
from builder.key.prepare import prepare
from builder.key.sparse import lengthen, shorten
from builder.pack import compile_texts, pack_bytes, pack_hash, texts_bytes
from builder.pack.canonical import canonical
from builder.tables import load_region

DEMO = Path(__file__).parent.parent / "keydata" / "sorrel_plateau"
KEY_KB, TEXTS_KB = 40, 60


@pytest.fixture(scope="module")
def region():
    return load_region(DEMO).region


@pytest.fixture(scope="module")
def content(region):
    return pack_bytes(region)


def test_same_tables_same_bytes(region, content):
    again = pack_bytes(load_region(DEMO).region)
    assert again == content
    assert pack_hash(content) == pack_hash(again)
    assert len(pack_hash(content)) == 16


def test_one_constancy_changed_changes_the_hash(region, content):
    import dataclasses

    where, one = next(iter(region.occurrence.items()))
    other = dataclasses.replace(one, constancy=one.constancy / 2)
    changed = dataclasses.replace(region, occurrence={**region.occurrence, where: other})
    assert pack_hash(pack_bytes(changed)) != pack_hash(content)


def test_it_is_canonical(content):
    assert canonical(json.loads(content)) == content
    assert canonical({"b": 2.0, "a": (1, 2.5)}) == b'{"a":[1,2.5],"b":2}'
    with pytest.raises(ValueError, match="JSON"):
        canonical({"a": float("nan")})


def test_it_is_small(region, content):
    assert len(gzip.compress(content, 9)) <= KEY_KB * 1000
    for language in region.head.languages:
        assert len(gzip.compress(texts_bytes(region, language), 9)) <= TEXTS_KB * 1000


def test_it_holds_every_zone_plant_and_question(region, content):
    pack = json.loads(content)
    assert [one["id"] for one in pack["zones"]] == list(region.zone_ids)
    assert [one["id"] for one in pack["plants"]] == list(region.plant_ids)
    assert [one["id"] for one in pack["questions"]] == [one.id for one in region.questions]
    for name in ("production", "climate", "soils", "seed", "reclaim"):
        assert set(pack[name]) == set(region.zone_ids)
    assert pack["proof"]["tested_on"] == "simulated"


def sentences(value, path=()):
    if isinstance(value, dict):
        for name, one in value.items():
            yield from sentences(one, (*path, name))
    elif isinstance(value, list):
        for one in value:
            yield from sentences(one, path)
    elif isinstance(value, str) and len(value.split()) > 3:
        yield path


def test_sentences_stand_in_the_texts(content):
    assert {path[0] for path in sentences(json.loads(content))} <= {"production"}


def test_texts_of_each_language_hold_the_same_ids(region):
    english = compile_texts(region, "en")
    for language in region.head.languages[1:]:
        other = compile_texts(region, language)
        assert other["fallback"]
        assert not english["fallback"]
        for name in ("zones", "plants", "questions", "groups", "disturbances", "rules"):
            assert set(other[name]) == set(english[name])
        assert other["zones"] != english["zones"]
    with pytest.raises(KeyError):
        compile_texts(region, "xx")


def test_two_cautions_of_a_plant_are_not_made_one_in_another_language(region):
    import dataclasses

    words = region.words["es"].plant_cautions
    plant = next(one for one in region.plants if one.id in words)
    second = dataclasses.replace(plant.cautions[0], text="Its sap blisters the skin.")
    twice = dataclasses.replace(plant, cautions=(*plant.cautions, second))
    plants = tuple(twice if one is plant else one for one in region.plants)
    changed = dataclasses.replace(region, plants=plants)
    told = compile_texts(changed, "es")["plants"][plant.id]["cautions"]
    assert [one["text"] for one in told] == [one.text for one in twice.cautions]
    once = compile_texts(region, "es")["plants"][plant.id]["cautions"]
    assert [one["text"] for one in once] == [words[plant.id]]


def test_notes_and_mix_carry_the_source_their_tables_give(region, tmp_path):
    texts = compile_texts(region, "en")
    for zone_id, mix in region.mixes.items():
        assert texts["seed"][zone_id]["sources"] == [region.source_of(mix).text]
        notes = texts["reclaim"]["zones"][zone_id]
        assert notes["sources"] == ["common practice"]
        assert {tuple(cell["sources"]) for cell in notes["by_disturbance"].values()} == {
            ("common practice",)
        }
    files = three_zone_files()
    files["reclaim.yaml"] = files["reclaim.yaml"].replace("source: common practice", "source: demo")
    other = load_region(write_region(tmp_path / "other", files)).region
    told = compile_texts(other, "en")["reclaim"]["zones"]
    assert {tuple(notes["sources"]) for notes in told.values()} == {("demo",)}


def test_evidence_survives_the_short_form(region, content):
    key = prepare(json.loads(content))
    table = compile_key(region)["evidence"]["plants"][5]
    assert lengthen(table, 16).shape == (13, 16)
    assert key.found[5, 4].tolist() == lengthen(table, 16)[4].tolist()
    rng = np.random.default_rng(1)
    for _ in range(50):
        full = rng.integers(-3, 3, (13, 16)).astype(np.int32)
        assert (lengthen(shorten(full), 16) == full).all()


def test_probes_meet_every_kind_of_thing(content):
    pack = json.loads(content)
    sites = [one["site"] for one in pack["probes"]]
    answers = [one["answer"] for one in pack["probes"]]
    assert {one["verdict"] for one in answers} == {"zone", "edge", "mosaic", "misfit", "thin"}
    assert {site["month"] for site in sites} == {None, *range(1, 13)}
    met = {site.get("disturbance") for site in sites}
    assert {one["id"] for one in pack["disturbances"]} <= met
    asked = {name for site in sites for name in site.get("questions", {})}
    assert {one["id"] for one in pack["questions"]} <= asked
    groups = {row.get("group_id") for site in sites for row in site["findings"]}
    assert {one["id"] for one in pack["groups"]} <= groups
    assert any("height_m" in site.get("place", {}) for site in sites)


def test_a_region_of_three_zones_on_another_scale(tables):
    pack = json.loads(pack_bytes(tables.region))
    assert len(pack["zones"]) == 3
    assert pack["probes"]
    steps = {one["code"]: one["step"] for one in pack["cover"]["classes"]}
    assert steps == {"r": 0, "+": 0, "1": 1, "2": 2, "3": 3, "4": 3, "5": 3}
