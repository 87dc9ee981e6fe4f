"""The commands as a person meets them: what they print, write and exit with."""

import signal
import subprocess
import sys
import time

import pytest
from helpers import three_zone_files, write_region

from builder.cli import main


@pytest.fixture
def region(tmp_path, monkeypatch):
    """The three-zone region in a folder of its own, which is the working folder."""
    monkeypatch.chdir(tmp_path)
    return write_region(tmp_path / "keydata" / "willow_breaks", three_zone_files())


def test_check_of_sound_tables_says_so(region, capsys):
    assert main(["check", "keydata/willow_breaks"]) == 0
    assert capsys.readouterr().out.endswith("0 errors, 0 cautions\n")


def test_check_prints_every_problem_with_line_and_place(region, capsys):
    for file, old, new in (
        ("zones.yaml", "neighbours: [prairie]", "neighbours: [prarie]"),
        ("occurrence.yaml", "[90, 18]", "[90, 180]"),
    ):
        path = region / file
        path.write_text(path.read_text("utf-8").replace(old, new, 1), "utf-8")
    assert main(["check", "keydata/willow_breaks"]) == 1
    out = capsys.readouterr().out
    assert "keydata/willow_breaks/zones.yaml:36:18:" in out
    assert "    neighbours: [prarie]" in out
    assert 'Did you mean "prairie"?' in out
    assert "occurrence.yaml:3:30:" in out
    assert "[range]" in out


@pytest.mark.parametrize(
    "arguments",
    [
        ["check", "no_such_folder"],
        ["build", "no_such_folder", "--out", "out"],
        ["call", "no_such_folder", "plots.csv", "--out", "calls.csv"],
        ["call", "keydata/willow_breaks", "no_such_file.csv", "--out", "calls.csv"],
        ["call", "keydata/willow_breaks", "plots.csv", "--out", "no_folder/calls.csv"],
        ["call", "keydata/willow_breaks", "plots.csv", "--out", "c.csv", "--scale", "unheard"],
        ["call", "keydata/willow_breaks", "plots.csv", "--out", "c.csv", "--answers", "0"],
        ["call", "keydata/willow_breaks", "plots.csv", "--out", "c.csv", "--disturbance", "flood"],
        ["call", "keydata/willow_breaks", "keydata", "--out", "c.csv"],
        ["booklet", "keydata/willow_breaks", "--out", "b.pdf", "--format", "a7"],
        ["booklet", "keydata/willow_breaks", "--out", "b.pdf", "--zones", "moon"],
        ["booklet", "keydata/willow_breaks", "--out", "b.pdf", "--language", "xx"],
        ["records", "plots.csv", "--out", "c.csv"],
        ["records", "no_such_file.json", "--out", "c.csv"],
        ["prove", "keydata/willow_breaks", "--plots", "plots.csv"],
        ["start", "keydata/willow_breaks"],
        ["start", "keydata/Not An Id"],
        ["desk", "--open", "0.0.0.0"],
        ["build", "keydata/willow_breaks", "--out", "keydata/willow_breaks/zones.yaml"],
    ],
)
def test_a_mistake_is_told_in_a_sentence_and_leaves_nothing(region, capsys, arguments):
    (region.parent.parent / "plots.csv").write_text("plot_id,plant_id,cover_pct\n1,blue_grama,5\n")
    before = sorted(region.parent.parent.rglob("*.yaml"))
    assert main(arguments) == 1
    said = "".join(capsys.readouterr())
    assert said.strip()
    assert "Traceback" not in said
    assert sorted(region.parent.parent.rglob("*.yaml")) == before
    assert not list(region.parent.parent.glob("*c*.csv"))


def test_call_writes_one_line_a_plot_and_notes_unknown_plants(region, capsys):
    folder = region.parent.parent
    (folder / "plots.csv").write_text(
        "plot_id,plant_id,cover_pct\n"
        "p1,blue_grama,20\np1,HECO,15\np1,moon_daisy,2\n"
        "p2,Andropogon scoparius,14\np2,ponderosa_pine,22\n"
        "p3,sandbar_willow,40\np3,prairie_cordgrass,30\n"
    )
    assert main(["call", "keydata/willow_breaks", "plots.csv", "--out", "calls.csv"]) == 0
    assert "moon_daisy (1)" in capsys.readouterr().out
    head, *lines = (folder / "calls.csv").read_text().splitlines()
    assert head == "plot_id,verdict,zone_id,belief,next_zone_id,next_belief,answers,fit"
    assert [line.split(",")[0] for line in lines] == ["p1", "p2", "p3"]
    assert [line.split(",")[2] for line in lines] == ["prairie", "breaks", "bottom"]
    assert {line.split(",")[6] for line in lines} == {"9"}
    assert (
        main(["call", "keydata/willow_breaks", "plots.csv", "--out", "n.csv", "--answers", "2"])
        == 0
    )
    assert all(
        int(line.split(",")[6]) <= 2 for line in (folder / "n.csv").read_text().splitlines()[1:]
    )


def test_build_writes_the_whole_site_and_the_second_time_nothing(region, capsys):
    assert main(["build", "keydata/willow_breaks", "--out", "out"]) == 0
    out = region.parent.parent / "out"
    for name in ("index.html", "sw.js", "field.html", "regions/willow_breaks/pack.json"):
        assert (out / name).is_file()
    booklet = out / "regions/willow_breaks/booklet.pdf"
    first = {path: path.stat().st_mtime_ns for path in out.rglob("*.*")}
    assert booklet.read_bytes().startswith(b"%PDF-")
    capsys.readouterr()
    assert main(["build", "keydata/willow_breaks", "--out", "out"]) == 0
    assert "0 files written" in capsys.readouterr().out
    assert {path: path.stat().st_mtime_ns for path in out.rglob("*.*")} == first


def test_tables_with_errors_leave_the_old_site_whole(region, capsys):
    assert main(["build", "keydata/willow_breaks", "--out", "out", "--no-booklet"]) == 0
    out = region.parent.parent / "out"
    before = {path: path.read_bytes() for path in out.rglob("*.*")}
    (region / "zones.yaml").write_text("zones: [\n")
    assert main(["build", "keydata/willow_breaks", "--out", "out", "--no-booklet"]) == 1
    assert "zones.yaml:" in capsys.readouterr().out
    assert {path: path.read_bytes() for path in out.rglob("*.*")} == before


def test_two_builds_into_one_folder_do_not_meet(region, capsys):
    from builder.steps.notes import only_builder

    with only_builder(region.parent.parent / "out"):
        assert main(["build", "keydata/willow_breaks", "--out", "out", "--no-booklet"]) == 1
    assert "another build" in capsys.readouterr().err


def test_ctrl_c_ends_the_desk_clean(region):
    command = [sys.executable, "-m", "builder", "desk", "--port", "0"]
    with subprocess.Popen(
        command, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True, cwd=region.parent.parent
    ) as desk:
        assert desk.stdout is not None
        assert "http://127.0.0.1:" in desk.stdout.readline()
        while "Ctrl-C" not in desk.stdout.readline():
            assert desk.poll() is None
        desk.send_signal(signal.SIGINT)
        started = time.monotonic()
        _, errors = desk.communicate(timeout=20)
    assert time.monotonic() - started < 15
    assert "Traceback" not in errors
    assert desk.returncode in (0, 130)


def test_fit_takes_zones_by_option_and_calls_them_as_the_plots_did(region, capsys):
    folder = region.parent.parent
    own = {"Zone C1": ("ash", "elm"), "2": ("fir", "yew")}
    zones, plots = ["plot_id,zone_id"], ["plot_id,plant_id,cover_pct"]
    for number in range(64):
        zone = list(own)[number % 2]
        zones.append(f"q{number},{zone}")
        plots.append(f"q{number},{own[zone][number // 2 % 2]},{10 + number % 30}")
        plots.append(f"q{number},sedge,{1 + number % 5}")
    (folder / "known.csv").write_text("\n".join(plots) + "\n")
    (folder / "zones.csv").write_text("\n".join(zones) + "\n")
    assert main(["fit", "known.csv", "--zones", "zones.csv", "--out", "keydata/known"]) == 0
    assert main(["check", "keydata/known"]) == 0
    assert main(["call", "keydata/known", "known.csv", "--out", "calls.csv"]) == 0
    called = dict(
        line.split(",")[0:3:2] for line in (folder / "calls.csv").read_text().splitlines()
    )
    told = dict(line.split(",") for line in zones)
    assert set(called.values()) == {"zone_id", *own}
    assert sum(called[plot] == told[plot] for plot in told) == len(told)


def test_a_booklet_of_one_zone_is_made_for_folding(region, capsys):
    arguments = ["booklet", "keydata/willow_breaks", "--out", "fold.pdf", "--zones", "A"]
    assert main([*arguments, "--format", "a4-sheets"]) == 0
    assert (region.parent.parent / "fold.pdf").read_bytes().startswith(b"%PDF-")
    assert "fold.pdf: " in capsys.readouterr().out
