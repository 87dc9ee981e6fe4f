"""Known plots are read with every fault at its line; an error leaves nothing half done."""

import pytest

from builder.problems import errors
from builder.proof.fit import fit_region
from builder.proof.reading import read_known

PLOTS = "plot_id,plant_id,cover_pct\n" + "".join(
    f"a{n},sage,{20 + n}\na{n},grass,5\nb{n},spruce,{30 + n}\nb{n},grass,3\n" for n in range(5)
)
ZONES = "plot_id,zone_id\n" + "".join(f"a{n},low\nb{n},high\n" for n in range(5))


def read(tmp_path, plots=PLOTS, zones=ZONES):
    (tmp_path / "plots.csv").write_text(plots, encoding="utf-8")
    (tmp_path / "zones.csv").write_text(zones, encoding="utf-8")
    return read_known(tmp_path / "plots.csv", tmp_path / "zones.csv")


def test_sound_files_become_known_plots(tmp_path):
    known, problems = read(tmp_path)
    assert errors(problems) == []
    assert known.plants == ("sage", "grass", "spruce")
    assert known.zone_ids == ("low", "high")
    assert known.counts.tolist() == [5, 5]
    assert known.plots.steps[0].tolist() == [2, 2, -1]


def test_few_plots_are_a_caution_only(tmp_path):
    _, problems = read(tmp_path)
    assert [one.check for one in problems] == ["zones-few"]


@pytest.mark.parametrize(
    ("plots", "zones", "check", "line"),
    [
        (PLOTS + "c1,sage,5\n", ZONES, "zones-missing", 22),
        (PLOTS, ZONES + "c1,middle\n", "zones-empty", 12),
        (PLOTS + "c1,sage,5\n", ZONES + "c1,middle\n", "zones-small", 12),
        (PLOTS, ZONES.replace("low", "high"), "zones-one", 1),
        (PLOTS + "a1,spruce,101\n", ZONES, "plots-range", 22),
        (PLOTS + "a1,spruce,-1\n", ZONES, "plots-range", 22),
        (PLOTS + "a1,spruce,much\n", ZONES, "plots-number", 22),
        (PLOTS + "a1,sage,5\n", ZONES, "plots-twice", 22),
        ("", ZONES, "plots-file", 1),
        (PLOTS, ZONES + "a1,high\n", "plots-twice", 12),
    ],
)
def test_each_fault_is_told_at_its_line_and_stops(tmp_path, plots, zones, check, line):
    known, problems = read(tmp_path, plots, zones)
    assert known is None
    told = [(one.check, one.line) for one in errors(problems)]
    assert (check, line) in told
    out = tmp_path / "region"
    made = fit_region(tmp_path / "plots.csv", tmp_path / "zones.csv", out)
    assert made.folder is None
    assert not out.exists()


def test_a_plot_without_findings_is_left_out_and_told(tmp_path):
    known, problems = read(tmp_path, zones=ZONES + "a9,low\n")
    assert len(known) == 10
    assert ("zones-extra", 12) in [(one.check, one.line) for one in problems]


def test_a_plant_never_found_is_left_out_and_told(tmp_path):
    known, problems = read(tmp_path, PLOTS + "a1,ghost,0\n")
    assert "ghost" not in known.plants
    assert "plots-plant" in [one.check for one in problems]


def test_semicolons_decimal_commas_and_latin_1_are_read(tmp_path):
    text = PLOTS.replace(",", ";").replace("a0;sage;20", "a0;sage;20,5").replace("spruce", "ñandú")
    (tmp_path / "plots.csv").write_bytes(text.encode("latin-1"))
    (tmp_path / "zones.csv").write_text("\ufeff" + ZONES, encoding="utf-8")
    known, problems = read_known(tmp_path / "plots.csv", tmp_path / "zones.csv")
    assert errors(problems) == []
    assert known.plants == ("sage", "grass", "ñandú")
    assert known.plots.cover[0, 0] == pytest.approx(20.5)


def test_heights_and_ground_answers_stand_beside_the_zones(tmp_path):
    lines = ZONES.splitlines()
    zones = "\n".join(
        [lines[0] + ",height_m,soil"]
        + [
            f"{line},{1500 + 10 * n},{'deep' if n % 2 else 'shallow'}"
            for n, line in enumerate(lines[1:])
        ]
    )
    known, problems = read(tmp_path, zones=zones)
    assert errors(problems) == []
    assert known.plots.place["height_m"].tolist()[:2] == [1500, 1510]
    assert set(known.plots.answers["soil"]) == {"deep", "shallow"}
    _, problems = read(tmp_path, zones=zones.replace(",1500,", ",high up,"))
    assert ("plots-site", 2, 3) in [(one.check, one.line, one.column) for one in problems]
