"""Every check's docstring shows samples that pass and fail, and they do what they say."""

import re
import shutil
from pathlib import Path

import pytest

import builder.tables
from builder.checks import CHECKS, checked_region
from builder.rows import parse_yaml, plain
from builder.tables.cells import replace_cell
from builder.tables.edit import remove_value, replace_value

START = Path(builder.tables.__file__).parent / "blank"
SAMPLE = re.compile(r"(?P<file>\S+) (?P<path>\S+): (?P<value>.*)", re.DOTALL)


def samples(manual):
    """(Passes or Fails, sample) of a check's docstring; deeper lines go on with the one above."""
    joined = re.sub(r"\n {4,}", " ", manual)
    return re.findall(r"^(Passes|Fails): (.+)$", joined, re.MULTILINE)


ALL = [(check, kind, text) for check in CHECKS for kind, text in samples(check.manual)]


def with_sample(folder, text):
    """The start region with one value set as the sample says."""
    shutil.copytree(START, folder)
    found = SAMPLE.match(text)
    path = tuple(int(step) if step.isdigit() else step for step in found["path"].split("/"))
    table = folder / found["file"]
    if not table.exists():
        table.parent.mkdir(exist_ok=True)
        table.write_text("language: es\n", encoding="utf-8")
    before = table.read_text(encoding="utf-8")
    if found["value"] == "(left out)":
        after = remove_value(before, path)
    elif table.suffix == ".csv":
        after = replace_cell(before, path[0], path[1], float(found["value"]))
    else:
        root, problems = parse_yaml(_one_value(found["value"]), "sample")
        assert problems == [], text
        after = replace_value(before, path, plain(root)["value"])
    table.write_text(after, encoding="utf-8")
    return folder


def _one_value(text):
    """The sample's value as YAML; a sentence stands in quotes so that it may hold anything."""
    plain_start = text[0] in "[{'\"" or re.fullmatch(r"[\w.-]+", text)
    return f"value: {text}" if plain_start else "value: '" + text.replace("'", "''") + "'"


def test_every_check_shows_both():
    assert len(CHECKS) >= 15
    for check in CHECKS:
        kinds = {kind for kind, _ in samples(check.manual)}
        assert kinds == {"Passes", "Fails"}, check.id


def test_check_names_are_their_own():
    names = [check.id for check in CHECKS]
    assert len(set(names)) == len(names)


def test_the_start_region_has_no_problem():
    assert checked_region(START).problems == []


@pytest.mark.parametrize(("check", "kind", "text"), ALL, ids=[f"{c.id} {k}" for c, k, _ in ALL])
def test_a_sample_does_what_it_says(tmp_path, check, kind, text):
    problems = checked_region(with_sample(tmp_path / "region", text)).problems
    found = [problem for problem in problems if problem.check == check.id]
    assert bool(found) == (kind == "Fails"), problems
