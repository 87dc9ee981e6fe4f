"""A new region: valid from the first minute, never over something that is there."""

import pytest

from builder.checks import checked_region
from builder.tables.start import StartRefused, start_files, start_region


def test_a_new_region_is_valid(tmp_path):
    folder = start_region(tmp_path / "blue_hills", date="2026-04-01")
    loaded = checked_region(folder)
    assert loaded.problems == []
    assert (loaded.region.id, loaded.region.name) == ("blue_hills", "Blue Hills")
    assert (loaded.region.date, len(loaded.region.zones)) == ("2026-04-01", 3)
    assert [path.name for path in tmp_path.iterdir()] == ["blue_hills"]


def test_the_comments_that_guide_are_kept(tmp_path):
    files = start_files("blue_hills", "Blue: hills", "2026-04-01")
    assert files["region.yaml"].startswith("# What holds")
    assert "name: 'Blue: hills'" in files["region.yaml"]


@pytest.mark.parametrize("name", ["Blue Hills", "1st", "blue-hills", "a\n"])
def test_a_name_that_is_no_id_is_refused(tmp_path, name):
    with pytest.raises(StartRefused):
        start_region(tmp_path / name)


def test_what_is_there_stays(tmp_path):
    (tmp_path / "hills").mkdir()
    (tmp_path / "hills" / "mine.txt").write_text("mine")
    with pytest.raises(StartRefused):
        start_region(tmp_path / "hills")
    assert (tmp_path / "hills" / "mine.txt").read_text() == "mine"


def test_a_folder_that_cannot_be_written_is_refused(tmp_path):
    (tmp_path / "file").write_text("x")
    with pytest.raises(StartRefused):
        start_region(tmp_path / "file" / "hills")
