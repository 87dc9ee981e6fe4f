"""Edits: one value's text changes and nothing else; there is a way back; nobody is overwritten."""

import os
import subprocess
import sys
import textwrap

import pytest

from builder.desk.saving import Saver, write_whole
from tests.desk.helpers import OCCURRENCE, REGION, save, token

CELL = "occurrence/blue_grama/prairie"


def lines_changed(before, after):
    return [(a, b) for a, b in zip(before.split("\n"), after.split("\n"), strict=True) if a != b]


def test_only_the_value_changes(client, tmp_path):
    path = tmp_path / OCCURRENCE
    before = path.read_text(encoding="utf-8")
    answer = save(client, "occurrence", (CELL, "90 18", "64 6"))
    assert answer.status_code == 200
    assert answer.json["saved"] == 1
    ((old, new),) = lines_changed(before, path.read_text(encoding="utf-8"))
    assert new == old.replace("prairie: [90, 18]", "prairie: [64, 6]")


def test_a_cell_can_be_filled_and_emptied(client, tmp_path):
    path = tmp_path / OCCURRENCE
    before = path.read_text(encoding="utf-8")
    key = "occurrence/blue_grama/bottom"
    assert save(client, "occurrence", (key, "", "3 0.5")).json["saved"] == 1
    assert "bottom: [3, 0.5]}" in path.read_text(encoding="utf-8")
    assert save(client, "occurrence", (key, "3 0.5", "")).json["saved"] == 1
    assert path.read_text(encoding="utf-8") == before


def test_undo_goes_back_step_by_step(client, tmp_path):
    path = tmp_path / OCCURRENCE
    before = path.read_text(encoding="utf-8")
    save(client, "occurrence", (CELL, "90 18", "64 6"))
    between = path.read_text(encoding="utf-8")
    save(client, "occurrence", (CELL, "64 6", "50 5"))
    for expected in (between, before, before):
        client.post(f"{REGION}/undo", data={"token": token(client)})
        assert path.read_text(encoding="utf-8") == expected


def test_undo_does_not_take_back_what_somebody_else_wrote(client, tmp_path):
    path = tmp_path / OCCURRENCE
    save(client, "occurrence", (CELL, "90 18", "64 6"))
    by_hand = path.read_text(encoding="utf-8") + "# looked at in June\n"
    path.write_text(by_hand, encoding="utf-8")
    client.post(f"{REGION}/undo", data={"token": token(client)})
    assert path.read_text(encoding="utf-8") == by_hand


def test_the_second_person_is_told_and_nothing_is_overwritten(client, tmp_path):
    save(client, "occurrence", (CELL, "90 18", "64 6"))
    second = save(client, "occurrence", (CELL, "90 18", "30 2"))
    assert second.status_code == 409
    (refused,) = second.json["refused"]
    assert refused["other"]
    assert "64 6" in refused["reason"]
    assert "prairie: [64, 6]" in (tmp_path / OCCURRENCE).read_text(encoding="utf-8")


def test_two_people_in_two_cells_do_not_hinder_each_other(client, tmp_path):
    save(client, "occurrence", (CELL, "90 18", "64 6"))
    other = save(client, "occurrence", ("occurrence/blue_grama/breaks", "35 4", "36 3"))
    assert other.status_code == 200
    assert "prairie: [64, 6], breaks: [36, 3]" in (tmp_path / OCCURRENCE).read_text(
        encoding="utf-8"
    )


@pytest.mark.parametrize(
    ("table", "key", "was", "text"),
    [
        ("occurrence", CELL, "90 18", "64"),
        ("occurrence", CELL, "90 18", "140 6"),
        ("occurrence", CELL, "90 18", "a b c"),
        ("zones", "zones/0/centre_m", "1075", "high"),
        ("zones", "zones/0/kind", "zonal", "tidal"),
        ("zones", "zones/0/no_such_field", "", "1"),
        ("zones", "zones/99/name", "", "1"),
        ("zones", "../../../etc/passwd", "", "1"),
        ("zones", "", "", "1"),
        ("climate", "0/tmax_c", "0", "warm"),
        ("climate", "0/no_such_column", "", "1"),
        ("climate", "9999/tmax_c", "", "1"),
    ],
)
def test_what_is_no_value_is_refused_and_the_file_stays(client, tmp_path, table, key, was, text):
    files = sorted((tmp_path / "keydata").rglob("*.*"))
    before = [path.read_bytes() for path in files]
    answer = save(client, table, (key, was, text))
    assert answer.status_code in {200, 409}
    assert answer.json["saved"] == 0
    assert len(answer.json["refused"]) == 1
    assert answer.json["refused"][0]["reason"]
    assert [path.read_bytes() for path in files] == before


def test_trying_says_what_is_wrong_and_saves_nothing(client, tmp_path):
    before = (tmp_path / OCCURRENCE).read_bytes()
    answer = save(client, "occurrence", (CELL, "90 18", "140 6"), **{"try": "1"})
    assert "140" in answer.json["refused"][0]["reason"]
    assert save(client, "occurrence", (CELL, "90 18", "64 6"), **{"try": "1"}).json == {
        "refused": []
    }
    assert (tmp_path / OCCURRENCE).read_bytes() == before


def test_a_text_that_yaml_would_turn_is_written_so_that_it_stays(client, tmp_path):
    path = tmp_path / "keydata/willow_breaks/zones.yaml"
    was = "Mixed prairie"
    for text in ("no", "1:30", "2026-05-01", "# not a note", "a: b", "'", '"', "[x", "{", "ü – é"):
        assert save(client, "zones", ("zones/0/name", was, text)).json["saved"] == 1, text
        was = text
    page = client.get(f"{REGION}/tables/zones/zones/0").get_data(as_text=True)
    assert 'value="ü – é"' in page
    assert path.read_text(encoding="utf-8").count("\n  - id: ") == 3


def test_line_ends_of_another_system_stay(client, tmp_path):
    path = tmp_path / OCCURRENCE
    path.write_bytes(path.read_bytes().replace(b"\n", b"\r\n"))
    assert save(client, "occurrence", (CELL, "90 18", "64 6")).json["saved"] == 1
    content = path.read_bytes()
    assert content.count(b"\r\n") == content.count(b"\n")


def test_climate_is_edited_cell_by_cell(client, tmp_path):
    path = tmp_path / "keydata/willow_breaks/climate.csv"
    before = path.read_text(encoding="utf-8")
    page = client.get(f"{REGION}/tables/climate").get_data(as_text=True)
    assert 'data-key="0/tmax_c"' in page
    was = page.partition('data-key="0/tmax_c" data-was="')[2].partition('"')[0]
    assert save(client, "climate", ("0/tmax_c", was, "9.75")).json["saved"] == 1
    assert len(lines_changed(before, path.read_text(encoding="utf-8"))) == 1


def test_a_row_is_added_as_a_copy_and_taken_out_again(client, tmp_path):
    path = tmp_path / "keydata/willow_breaks/plants.yaml"
    before = path.read_text(encoding="utf-8")
    form = {"token": token(client), "table": "plants", "part": "plants", "like": "needle_grass"}
    client.post(f"{REGION}/add", data=form | {"new": "Not An Id"})
    client.post(f"{REGION}/add", data=form | {"new": "blue_grama"})
    assert path.read_text(encoding="utf-8") == before
    there = client.post(f"{REGION}/add", data=form | {"new": "porcupine_grass"}).headers["Location"]
    assert path.read_text(encoding="utf-8").count("id: porcupine_grass,") == 1
    row = there.rpartition("/")[2]
    form |= {"row": row, "name": "porcupine_grass"}
    client.post(f"{REGION}/remove", data=form)
    assert "porcupine_grass" in path.read_text(encoding="utf-8")
    client.post(f"{REGION}/remove", data=form | {"name": "needle_grass", "sure": "1"})
    assert "porcupine_grass" in path.read_text(encoding="utf-8")
    client.post(f"{REGION}/remove", data=form | {"sure": "1"})
    assert path.read_text(encoding="utf-8") == before


def test_a_problem_that_only_other_tables_show_is_told_after_the_save(client):
    answer = save(client, "plants", ("plants/0/lookalikes", "little_bluestem", "no_such_plant"))
    assert answer.json["saved"] == 1
    assert any("no_such_plant" in problem["wrong"] for problem in answer.json["problems"])
    page = client.get(f"{REGION}/").get_data(as_text=True)
    assert "no_such_plant" in page


def test_a_save_killed_at_any_moment_leaves_a_whole_table(tmp_path):
    (tmp_path / "r").mkdir()
    path = tmp_path / "r" / "zones.yaml"
    old, new = "zones: []\n" * 20_000, "zones: [1]\n" * 20_000
    path.write_text(old, encoding="utf-8")
    program = textwrap.dedent(
        """
        import sys
        from pathlib import Path
        from builder.desk.saving import write_whole
        path, texts = Path(sys.argv[1]), ["zones: []\\n" * 20000, "zones: [1]\\n" * 20000]
        print("ready", flush=True)
        while True:
            for text in texts:
                write_whole(path, text)
        """
    )
    for wait_ms in (3, 11, 24):
        with subprocess.Popen(
            [sys.executable, "-c", program, str(path)], stdout=subprocess.PIPE
        ) as writer:
            assert writer.stdout is not None
            writer.stdout.readline()
            try:
                writer.wait(wait_ms / 1000)
            except subprocess.TimeoutExpired:
                writer.kill()
        assert path.read_text(encoding="utf-8") in (old, new)


def test_a_full_or_closed_folder_leaves_the_old_table(tmp_path, monkeypatch):
    path = tmp_path / "zones.yaml"
    path.write_text("old", encoding="utf-8")

    def full(_descriptor):
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(os, "fsync", full)
    with pytest.raises(OSError, match="No space"):
        write_whole(path, "new")
    assert path.read_text(encoding="utf-8") == "old"


def test_only_the_last_steps_are_kept(tmp_path, monkeypatch):
    monkeypatch.setattr("builder.desk.saving.STEPS_KEPT", 3)
    (tmp_path / "region").mkdir()
    saver = Saver(tmp_path / "region", tmp_path / "state")
    for number in range(6):
        saver.save("zones.yaml", "one", lambda _text, number=number: f"{number}\n")
    assert len(list(saver.kept.glob("*.json"))) == 3


def test_a_list_inside_a_row_grows_and_shrinks_with_what_was_typed(client, tmp_path):
    path = tmp_path / "keydata/willow_breaks/plants.yaml"
    form = {
        "token": token(client),
        "table": "plants",
        "part": "plants",
        "row": "0",
        "at": "plants/0/cautions",
        "key": "plants/0/common",
        "was": "Blue grama",
        "text": "Blue grama grass",
    }
    there = client.post(f"{REGION}/more", data=form).headers["Location"]
    page = client.get(there).get_data(as_text=True)
    assert "common: Blue grama grass" in path.read_text(encoding="utf-8")
    assert 'data-key="plants/0/cautions/0/text"' in page
    client.post(f"{REGION}/more", data=form)
    assert save(client, "plants", ("plants/0/cautions/1/text", "?", "Sharp.")).json["saved"] == 1
    client.post(f"{REGION}/less", data=form | {"at": "plants/0/cautions/0"})
    page = client.get(there).get_data(as_text=True)
    assert ">Sharp.<" in page or 'value="Sharp."' in page
    assert "cautions/1" not in page
    before = path.read_bytes()
    for wrong in ("plants/0/common", "plants/99/cautions", "no/such", "../.."):
        client.post(f"{REGION}/more", data=form | {"at": wrong})
    assert path.read_bytes() == before
