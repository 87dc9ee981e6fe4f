"""A record is scored again by the very tables that scored it, and differences are told."""

import json

import pytest
from helpers import three_zone_files, write_region

from builder.cli import main
from builder.key.call import call
from builder.pack import compile_pack, pack_bytes, pack_hash
from builder.records.rescoring import Difference, rescore, rescored_said
from builder.steps.checking import check_region
from builder.steps.rescoring import packs_at_hand
from builder.tables import load_region
from tests.records.helpers import file_text, found, record

KEPT = (
    "verdict", "zone_id", "next_zone_id", "pair", "belief", "zone_share", "fit", "finds_cb",
    "answers", "look_again", "reasons", "difference_cb",
)  # fmt: skip


@pytest.fixture(scope="module")
def folder(tmp_path_factory):
    home = tmp_path_factory.mktemp("home")
    return write_region(home / "keydata" / "willow_breaks", three_zone_files())


@pytest.fixture(scope="module")
def scored(folder):
    """A record with the call a phone keeps of it, through JSON as a file goes."""
    checked = check_region(folder)
    content = pack_bytes(checked.region, checked.fitted, checked.proof)
    pack = json.loads(content)
    site = record(
        pack_hash=pack_hash(content),
        findings=[found("blue_grama", "3"), found("skunkbush", "1"), found("needle_grass", "2")],
    )
    made = call(pack, site)
    site["call"] = json.loads(json.dumps({name: made[name] for name in KEPT}))
    return site


def test_the_same_tables_give_the_same_digits(folder, scored):
    packs = packs_at_hand([folder], [scored["pack_hash"]])
    assert rescore(scored, packs).state == "same"


def test_a_changed_answer_is_told(folder, scored):
    packs = packs_at_hand([folder], [scored["pack_hash"]])
    site = {**scored, "findings": [*scored["findings"], found("ponderosa_pine", "2")]}
    made = rescore(site, packs)
    assert made.state == "differs"
    was = scored["call"]["answers"]
    assert Difference("answers", str(was), str(was + 1)) in made.differences
    assert any(one.what.startswith("plant ponderosa_pine") for one in made.differences)
    assert rescored_said(made, "a1")[0].startswith("Record a1 is called differently")


def test_only_the_very_pack_counts(folder, scored):
    other = {"ffff": compile_pack(load_region(folder).region)}
    assert rescore({**scored, "pack_hash": "0000"}, other).state == "no_pack"
    assert rescore({**scored, "call": None}, {}).state == "no_call"


def test_an_edition_that_was_kept_still_scores(folder, scored, tmp_path):
    files = three_zone_files()
    write_region(tmp_path / "editions" / "willow_breaks" / "t1", files)
    files["region.yaml"] = files["region.yaml"].replace("'t1'", "'t2'")
    changed = write_region(tmp_path / "keydata" / "willow_breaks", files)
    packs = packs_at_hand([changed], [scored["pack_hash"]])
    assert rescore(scored, packs).state == "same"


def test_a_hostile_call_does_not_stop_it(folder, scored):
    packs = packs_at_hand([folder], [scored["pack_hash"]])
    for kept in ({}, {"belief": 3, "reasons": 4}, {"reasons": [7, {"kind": [1]}]}):
        assert rescore({**scored, "call": kept}, packs).state == "differs"


def test_the_command_tells_it(folder, scored, monkeypatch, capsys):
    home = folder.parent.parent
    monkeypatch.chdir(home)
    stale = {**scored, "id": "b", "call": {**scored["call"], "verdict": "misfit"}}
    (home / "in.json").write_text(file_text(scored, stale))
    assert main(["records", "in.json", "--out", "out.json", "--rescore"]) == 0
    said = capsys.readouterr().out
    assert "Record b is called differently" in said
    assert "1 record scored again, the same." in said
