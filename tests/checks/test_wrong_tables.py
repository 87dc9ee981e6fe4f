"""Whatever a person writes into the tables ends in problems, never in a raised error."""

import random
import shutil
from pathlib import Path

import pytest
from helpers import three_zone_files, write_region

import builder.tables
from builder.checks import checked_region
from builder.problems import errors, render_all
from builder.tables.regions import YAML_TABLES

JUNK = [
    "null",
    "[]",
    "{}",
    "''",
    "-1",
    "999999",
    "true",
    "[1, 2, 3]",
    "{a: 1}",
    "no_such_thing",
    "[no_such_thing]",
    "0",
    "'no'",
    "[[]]",
    "{lower: [1]}",
    "'2026'",
]


@pytest.mark.parametrize("file", [f"{name}.yaml" for name in YAML_TABLES] + ["climate.csv"])
@pytest.mark.parametrize("kind", ["missing", "empty", "binary", "latin", "folder", "cut off"])
def test_one_broken_file_is_told_and_the_others_are_still_checked(tmp_path, file, kind):
    files = three_zone_files()
    text = files[file]
    other = "seed.yaml" if file != "seed.yaml" else "soils.yaml"
    files[other] = files[other].replace("source: demo", "source: hearsay")
    folder = write_region(tmp_path / "r", files)
    (folder / file).unlink()
    if kind == "empty":
        (folder / file).write_text("")
    elif kind == "binary":
        (folder / file).write_bytes(bytes(range(256)))
    elif kind == "latin":
        (folder / file).write_bytes(b"a: \xff\xfe\n")
    elif kind == "folder":
        (folder / file).mkdir()
    elif kind == "cut off":
        (folder / file).write_text(text[: len(text) // 2] + "\n  [")
    loaded = checked_region(folder)
    assert loaded.region is None
    told = errors(loaded.problems)
    assert any(problem.file == str(folder / file) for problem in told)
    if file != "sources.yaml":
        assert any(p.check == "known-sources" and p.file.endswith(other) for p in told)
    assert render_all(loaded.problems).count("  [") >= len(told)


@pytest.mark.parametrize("seed", range(12))
def test_random_junk_in_random_places_never_raises(tmp_path, seed):
    dice = random.Random(seed)
    start = Path(builder.tables.__file__).parent / "blank"
    for turn in range(25):
        folder = tmp_path / str(turn)
        shutil.copytree(start, folder)
        for _ in range(dice.randint(1, 4)):
            table = folder / f"{dice.choice(list(YAML_TABLES))}.yaml"
            lines = table.read_text(encoding="utf-8").split("\n")
            at = [n for n, line in enumerate(lines) if ": " in line and "#" not in line]
            where = dice.choice(at)
            name = lines[where].split(": ")[0]
            lines[where] = f"{name}: {dice.choice(JUNK)}"
            table.write_text("\n".join(lines), encoding="utf-8")
        loaded = checked_region(folder)
        assert loaded.region is not None or errors(loaded.problems)


def test_a_region_that_is_no_folder(tmp_path):
    (tmp_path / "file").write_text("x")
    for path in (tmp_path / "nowhere", tmp_path / "file"):
        loaded = checked_region(path)
        assert loaded.region is None
        assert [(p.file, p.line, p.check) for p in loaded.problems] == [(str(path), 1, "readable")]
