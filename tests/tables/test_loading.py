"""Loading: quick, read again only where a file changed, wrong rows told once."""

import os

from helpers import three_zone_files, write_region

from builder.checks import checked_region
from builder.tables import load_region


def test_a_changed_file_is_read_again_even_within_the_same_second(tmp_path):
    folder = write_region(tmp_path / "r", three_zone_files())
    first = load_region(folder)
    path = folder / "zones.yaml"
    stamp = path.stat()
    text = path.read_text(encoding="utf-8").replace("centre_m: 1325", "centre_m: 1300")
    path.write_text(text, encoding="utf-8")
    os.utime(path, ns=(stamp.st_atime_ns, stamp.st_mtime_ns))
    second = load_region(folder)
    assert first.region.zone("breaks").centre_m == 1325
    assert second.region.zone("breaks").centre_m == 1300
    assert second.region.plants is first.region.plants


def test_the_same_text_in_another_folder_keeps_its_own_places(tmp_path):
    for name in ("one", "two"):
        loaded = load_region(write_region(tmp_path / name, three_zone_files()))
        assert loaded.region.zone("breaks").at.file == str(tmp_path / name / "zones.yaml")


def test_a_row_that_cannot_be_read_brings_no_second_problem(tmp_path):
    """Tables that speak of the zone do not complain that it is unknown."""
    files = three_zone_files()
    files["zones.yaml"] = files["zones.yaml"].replace("    centre_m: 1325\n", "", 1)
    problems = checked_region(write_region(tmp_path / "r", files)).problems
    assert [(p.check, p.line) for p in problems] == [("missing-field", 21)]


def test_references_are_told_with_their_places(tables):
    said = {(r.table, r.id, r.field) for r in tables.references}
    assert ("zones", "breaks", "neighbours") in said
    assert ("plants", "little_bluestem", "lookalikes") in said
    assert ("groups", "bunch_grass", "group") not in said
    assert ("plants", "ponderosa_pine", "plant") in said
    assert ("questions", "stripped", "states") in said
    assert all(r.place.line >= 1 for r in tables.references)


def test_a_word_that_yaml_turns_is_told_once(tmp_path):
    for written in ("no", ""):
        files = three_zone_files()
        files["zones.yaml"] = files["zones.yaml"].replace("centre_m: 1325", f"centre_m: {written}")
        problems = checked_region(write_region(tmp_path / f"r{written}", files)).problems
        assert [p.check for p in problems] == ["turned-value" if written else "empty-value"]
