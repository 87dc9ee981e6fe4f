"""The benchmark runs, prints what it must, and never makes up a figure. No speed is judged here."""

import json
import shutil
from pathlib import Path

import pytest

from builder.bench import building, fitting, phones
from builder.bench.measure import Goal, Measure, NotHere, Reference, Setting, Taken
from builder.bench.run import MEASURES, chosen, taken_line
from builder.bench.synthetic import synthetic_region
from builder.bench.table import HEADS, cells, number, page, text_table, write_page
from builder.cli import main
from builder.steps.checking import check_region

KEYDATA = Path(__file__).parent.parent / "keydata"
CHEAP = ["fit-growth", "call-growth", "build-check", "size-key", "other"]


@pytest.fixture
def setting(tmp_path):
    """A shortened run on the demo region."""
    return Setting(KEYDATA, tmp_path, quick=True)


def run_of(*lines):
    """A run with these lines, on a machine at rest."""
    machine = {
        "cpu": "Some processor", "cores": 2, "memory_gb": 8.0, "system": "Linux x86_64",
        "python": "3.11.7", "load": 0.1, "quiet": True,
    }  # fmt: skip
    head = {"version": "0", "date": "2026-01-01", "quick": False, "seconds": 1.0}
    return {**head, "machine": machine, "lines": list(lines)}


def test_cheap_lines_are_measured_printed_and_written(tmp_path, capsys):
    out = tmp_path / "run.json"
    given = ["bench", "--quick", "--only", *CHEAP, "--json", str(out), "--keydata", str(KEYDATA)]
    assert main(given) == 0
    said = capsys.readouterr().out
    made = json.loads(out.read_text("utf-8"))
    assert {"cpu", "cores", "memory_gb", "python", "load", "quiet"} <= set(made["machine"])
    taken = [line for line in made["lines"] if line["why_not"] is None]
    assert [line["name"] for line in taken] == CHEAP[:-1]
    for line in taken:
        assert line["low"] <= line["median"] <= line["high"]
        assert line["median"] > 0
        assert line["what"] in said
    assert {name.partition("-")[0] for name in CHEAP} == {
        line["name"].partition("-")[0] for line in made["lines"]
    }
    untaken = [line for line in made["lines"] if line["why_not"] is not None]
    assert untaken
    assert said.count("not measured") == len(untaken)
    assert all(line["why_not"].split()[0] in said for line in untaken)
    assert f"Python {made['machine']['python']}" in said
    growth = next(line for line in taken if line["name"] == "call-growth")
    assert len(growth["growth"]) == 3


def test_every_goal_is_listed_once():
    names = [measure.name for measure in MEASURES]
    assert len(names) == len(set(names)) >= 25
    assert len({measure.what for measure in MEASURES}) == len(names)
    assert [measure.name for measure in chosen(["size"])] == [
        name for name in names if name.startswith("size-")
    ]
    assert chosen([]) == list(MEASURES)


@pytest.mark.parametrize(
    "given",
    [["--only", "no-such-line"], ["--json", "no_such_folder/run.json", "--only", "other-demo"]],
)
def test_a_mistake_is_told_before_anything_is_measured(tmp_path, monkeypatch, capsys, given):
    monkeypatch.chdir(tmp_path)
    assert main(["bench", "--quick", "--keydata", str(KEYDATA), *given]) == 1
    said = capsys.readouterr()
    assert "no such" in said.err.replace("_", " ").replace("-", " ")
    assert said.out == ""


def test_a_line_that_cannot_be_taken_says_why(setting):
    def take(setting):
        raise NotHere("no wind today")

    line = taken_line(Measure("sail", "Sailing", "s", take, Goal(5)), setting)
    assert "median" not in line
    assert cells(line)[:3] == ("Sailing", "≤ 5 s", "not measured")
    assert "no wind today" in text_table(run_of(line))
    assert "Sailing: no wind today" in page(run_of(line))


def test_missing_tools_are_told(setting, monkeypatch):
    monkeypatch.setattr(shutil, "which", lambda name: None)
    taken = fitting.small_counting(setting)
    assert taken.reference is None
    assert "R is not installed" in taken.note
    with pytest.raises(NotHere, match="chromium"):
        phones.scoring(setting)
    monkeypatch.setattr(phones.importlib.util, "find_spec", lambda name: None)
    with pytest.raises(NotHere, match="playwright"):
        phones.scoring(setting)


@pytest.mark.parametrize(
    ("goal", "values", "own", "met", "ratio"),
    [
        (Goal(2), (1.0, 3.0, 1.5), (), True, 0.75),
        (Goal(1), (1.0, 3.0, 1.5), (), False, 0.75),
        (Goal(1, least=True), (1.0, 3.0, 1.5), (), True, 0.75),
        (None, (1.0,), (4.0,), None, 2.0),
    ],
)
def test_median_spread_goal_and_ratio(setting, goal, values, own, met, ratio):
    taken = Taken(values, Reference("rival", (2.0,), own))
    line = taken_line(Measure("x", "X", "s", lambda given: taken, goal), setting)
    assert (line["low"], line["high"]) == (min(values), max(values))
    assert line["met"] is met
    assert line["reference"]["ratio"] == ratio
    assert len(cells(line)) == len(HEADS)


def test_the_worst_run_and_the_ratio_have_goals_of_their_own(setting):
    def line(**goals):
        taken = Taken((10.0, 20.0, 90.0), Reference("rival", (40.0,)))
        return taken_line(Measure("x", "X", "ms", lambda given: taken, **goals), setting)

    assert line(goal=Goal(50), worst=Goal(100))["met"] is True
    assert line(goal=Goal(50), worst=Goal(80))["met"] is False
    assert line(goal=Goal(50), ratio=Goal(0.9, least=True))["met"] is False
    assert "BEYOND" in text_table(run_of(line(goal=Goal(5))))


def test_a_busy_machine_is_told():
    run = run_of()
    assert "NOT QUIET" not in text_table(run)
    run["machine"] |= {"load": 9.0, "quiet": False}
    assert "NOT QUIET" in text_table(run)
    assert "NOT QUIET" in page(run)


def test_numbers_for_people():
    shown = [number(value) for value in (0, 0.01234, 1.005, 12.345, 1234.5, 0.000012)]
    assert shown == ["0", "0.0123", "1", "12.3", "1,234", "0.000012"]


def test_the_page_is_written_once_from_the_run_beside_it(setting, tmp_path):
    assert write_page(tmp_path) is None
    line = taken_line(Measure("x", "X", "s", lambda given: Taken((1.0,)), Goal(2)), setting)
    (tmp_path / "performance.json").write_text(json.dumps(run_of(line)))
    path = write_page(tmp_path)
    assert path == tmp_path / "performance.md"
    text = path.read_text("utf-8")
    table = [row for row in text.splitlines() if row.startswith("|")]
    assert {row.count("|") for row in table} == {len(HEADS) + 1}
    assert "| X | ≤ 2 s | 1 s |" in text
    assert write_page(tmp_path) is None


def test_the_made_up_region_can_be_read_and_has_its_size(setting):
    region = setting.large_checked.region
    assert (len(region.zones), len(region.plants)) == (40, 400)
    assert {one.check for one in setting.large_checked.problems} == {"letters"}
    other = KEYDATA / "ravenmoss_upland"
    made = check_region(synthetic_region(other, setting.folder / "other", 21, 130)).region
    assert (len(made.zones), len(made.plants)) == (21, 130)
    with pytest.raises(ValueError, match="ravenmoss_upland has"):
        synthetic_region(other, setting.folder / "small", 2, 130)
    marks = [plant.marks for plant in region.plants]
    assert len(set(marks)) == len(marks)


def test_the_shell_counts_what_a_first_visit_loads(setting):
    taken = building.shell(setting)
    assert "app/js/main.js" in taken.note
    assert 0 < taken.values[0] < taken.reference.values[0]
