"""Reading: each kind of value, and what is told when it is another."""

import pytest
from helpers import three_zone_files, write_region

from builder.rows import parse_yaml
from builder.tables import load_region
from builder.tables.occurrence import OccurrenceFile
from builder.tables.production import ReferenceLine
from builder.tables.reading import Reader
from builder.tables.zones import Zone


def read(record, text):
    """(record or None, checks told) of YAML text read as a record."""
    root, problems = parse_yaml(text, "t")
    assert problems == []
    reader = Reader()
    made = reader.record(record, root, "t")
    return made, [problem.check for problem in reader.problems]


@pytest.mark.parametrize(
    ("text", "figures", "told"),
    [
        ("text: x\nfigures: {a: 1, b: [1, 2]}", {"a": 1, "b": (1, 2)}, []),
        ("text: x\nfigures: {a: 1, source: demo}", {"a": 1}, []),
        ("text: x\nfigures: {a: word}", {}, ["value-kind"]),
        ("text: x\nfigures: {a: [1, word]}", {}, ["value-kind"]),
    ],
)
def test_figures_are_numbers_or_lists_of_them(text, figures, told):
    made, checks = read(ReferenceLine, text)
    assert checks == told
    assert made.figures == figures


def test_a_field_that_must_stand_and_is_wrong_leaves_no_record():
    made, checks = read(ReferenceLine, "text: x\nfigures: 3")
    assert (made, checks) == (None, ["value-kind"])
    made, checks = read(ReferenceLine, "figures: {a: 1}")
    assert (made, checks) == (None, ["missing-field"])
    made, checks = read(ReferenceLine, "text: ' '\nfigures: {a: 1}")
    assert (made, checks) == (None, ["value-kind"])


def test_a_field_that_may_be_left_out_may_be_null():
    made, checks = read(ReferenceLine, "text: x\nfigures: {a: 1}\nzones: null")
    assert checks == []
    assert made.zones == ()


def test_a_list_keeps_what_can_be_read():
    made, checks = read(ReferenceLine, "text: x\nfigures: {a: 1}\nzones: [one, 'Two', [3]]")
    assert checks == ["id-form", "value-kind"]
    assert made.zones == ("one",)


@pytest.mark.parametrize("pair", ["[1]", "[1, 2, 3]", "word", "[1, true]", "[[1], 2]", "{a: 1}"])
def test_an_occurrence_is_a_pair(pair):
    made, checks = read(OccurrenceFile, f"occurrence: {{plant: {{zone: {pair}}}}}")
    assert checks == ["value-kind"]
    assert made.occurrence == {"plant": {}}


def test_a_row_that_is_no_table_is_told():
    reader = Reader()
    root, _ = parse_yaml("zone: word", "t")
    assert reader.record(Zone, root.get("zone"), "zone") is None
    assert [problem.check for problem in reader.problems] == ["value-kind"]


def test_climate_without_its_columns_is_told_once(tmp_path):
    files = three_zone_files()
    files["climate.csv"] = "# source: demo\nzone,month\nprairie,1\n"
    loaded = load_region(write_region(tmp_path / "r", files))
    assert loaded.region is None
    assert [(p.check, p.line) for p in loaded.problems] == [("missing-field", 2)]


def test_another_language_that_cannot_be_read_stops_the_region(tmp_path):
    files = three_zone_files() | {"words/es.yaml": "language: [\n"}
    loaded = load_region(write_region(tmp_path / "r", files))
    assert loaded.region is None
    assert [p.check for p in loaded.problems] == ["readable"]
