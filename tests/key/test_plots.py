"""A plots file in every shape it comes in, and each fault at its line."""

import numpy as np
import pytest

from builder.key.plots_bind import bind_plots, names_of, read_sites, read_zones
from builder.key.plots_file import read_plots
from builder.key.scales import SCALES, scale_named


def written(tmp_path, text, encoding="utf-8"):
    path = tmp_path / "plots.csv"
    path.write_bytes(text.encode(encoding))
    return path


def rows(made):
    return [
        (made.plot_ids[p], made.names[n], None if np.isnan(c) else c)
        for p, n, c in zip(made.plot, made.name, made.cover_pct, strict=True)
    ]


def places(problems):
    return [(one.line, one.column, one.check) for one in problems]


LONG = "plot_id,plant_id,cover_pct\np1,a,5\np1,b,\np2,a,0\n"
SAME = [("p1", "a", 5.0), ("p1", "b", None), ("p2", "a", 0.0)]


@pytest.mark.parametrize(
    ("text", "encoding"),
    [
        (LONG, "utf-8"),
        (LONG, "utf-8-sig"),
        (LONG, "utf-16"),
        (LONG.replace(",", ";").replace("5", "5,0"), "utf-8"),
        (LONG.replace(",", "\t").replace("\n", "\r\n"), "utf-8"),
        ("# source: demo\n\n" + LONG, "utf-8"),
    ],
)
def test_long_files_of_every_make(tmp_path, text, encoding):
    made, problems = read_plots(written(tmp_path, text, encoding))
    assert problems == []
    assert rows(made) == SAME


def test_a_wide_table_reads_the_same(tmp_path):
    made, problems = read_plots(written(tmp_path, "plot_id,a,b\np1,5,\np2,0,2.5\n"))
    assert problems == []
    assert rows(made) == [("p1", "a", 5), ("p1", "b", 0), ("p2", "a", 0), ("p2", "b", 2.5)]


def test_latin_names_come_with_a_caution(tmp_path):
    text = "plot_id;plant_id;cover_pct\np1;Säule;2,5\n"
    made, problems = read_plots(written(tmp_path, text, "latin-1"))
    assert rows(made) == [("p1", "Säule", 2.5)]
    assert [one.severity for one in problems] == ["caution"]


def test_all_faults_at_once_each_with_its_line(tmp_path):
    text = "plot_id,plant_id,cover_pct\np1,a,120\np1,b,-1\np1,c,lots\n,d,3\np1,,3\np1,a,4\n"
    _, problems = read_plots(written(tmp_path, text))
    assert places(problems) == [
        (2, 3, "plots-range"),
        (3, 3, "plots-range"),
        (4, 3, "plots-number"),
        (5, 1, "plots-empty-cell"),
        (6, 2, "plots-empty-cell"),
        (7, 3, "plots-twice"),
    ]


def test_faults_of_a_wide_table(tmp_path):
    _, problems = read_plots(written(tmp_path, "plot_id,a,b\np1,x,\np1,1,1\n"))
    assert places(problems) == [(2, 2, "plots-number"), (3, 1, "plots-twice")]


def test_torn_lines_are_named_and_the_rest_is_read(tmp_path):
    text = 'plot_id,plant_id,cover_pct\np1,a,5,7\np1,b\n\np2,"a, tall",3\n'
    made, problems = read_plots(written(tmp_path, text))
    assert places(problems) == [(2, 1, "plots-file"), (3, 1, "plots-file")]
    assert rows(made) == [("p2", "a, tall", 3)]


@pytest.mark.parametrize(
    ("text", "place"),
    [
        ("", (1, 1, "plots-file")),
        ("# only a note\n", (1, 1, "plots-file")),
        ("plot_id,plant_id,cover_pct\n", (2, 1, "plots-empty")),
        ("a,b\n1,2\n", (1, 1, "plots-header")),
        ("plot_id,plant_id,height\n1,2,3\n", (1, 1, "plots-header")),
        ("plot_id,cover_pct\n1,2\n", (1, 1, "plots-header")),
        ("plot_id,a,a\n1,2,3\n", (1, 1, "plots-file")),
        ("plot_id,plant_id\0,cover_pct\n", (1, 1, "plots-file")),
    ],
)
def test_files_that_hold_no_plots(tmp_path, text, place):
    made, problems = read_plots(written(tmp_path, text))
    assert made is None
    assert places(problems) == [place]


def test_a_missing_file_and_a_folder(tmp_path):
    for path in (tmp_path / "none.csv", tmp_path):
        made, problems = read_plots(path)
        assert made is None
        assert len(problems) == 1


def test_classes_need_their_scale(tmp_path):
    path = written(tmp_path, "plot_id,plant_id,cover_class\np1,a,+\np1,b,2a\np1,c,9\n")
    made, problems = read_plots(path, SCALES["braun_blanquet"])
    assert places(problems) == [(4, 3, "plots-class")]
    assert made.cover_pct[:2].tolist() == [0.55, 8.75]
    _, problems = read_plots(path)
    assert places(problems) == [(2, 3, "plots-number"), (3, 3, "plots-number")]


def test_scales_by_name_the_regions_own_first():
    """Daubenmire (1959) midpoints; Currall (1987) D^2.6 / 4."""
    assert scale_named("six_class", "own", {})["2"] == 15.0
    assert scale_named("own", "own", {"x": 1.0}) == {"x": 1.0}
    assert scale_named("nothing", "own", {}) is None
    published = [0.25, 1.52, 4.35, 9.19, 16.42, 26.37, 39.37, 55.72, 75.68, 99.53]
    assert [SCALES["domin"][str(d)] for d in range(1, 11)] == pytest.approx(published, abs=0.01)


def test_many_faults_of_a_kind_are_counted(tmp_path):
    lines = "".join(f"p{at},a,200\n" for at in range(300))
    _, problems = read_plots(written(tmp_path, "plot_id,plant_id,cover_pct\n" + lines))
    assert len(problems) == 51
    assert "250 more" in problems[-1].wrong


def test_binding_to_the_plants_of_a_pack(tmp_path, demo):
    text = (
        "plot_id,plant_id,cover_pct\np1,artemisia_nova,5\np1,Pinus edulis,\np1,nobody,3\n"
        "p2,pinus_edulis,0\n"
    )
    made, _ = read_plots(written(tmp_path, text))
    ids = list(demo.plant_ids)
    at = [ids.index(one) for one in ("artemisia_nova", "pinus_edulis")]
    whole = bind_plots(made, ids, names_of(demo))
    assert whole.unknown == {"nobody": 1}
    assert whole.plots.steps[:, at].tolist() == [[2, 4], [-1, -1]]
    assert set(np.unique(whole.plots.steps)) == {-1, 2, 4}
    listed = bind_plots(made, ids, names_of(demo), listed_only=True)
    assert listed.plots.steps[:, at].tolist() == [[2, 4], [-2, -1]]


def test_known_zones(tmp_path):
    path = written(tmp_path, "plot_id,zone_id\np1,x\np2,y\np1,y\np3,\n")
    zones, lines, problems = read_zones(path)
    assert zones == {"p1": "x", "p2": "y"}
    assert lines["p2"] == 3
    assert places(problems) == [(4, 1, "plots-twice"), (5, 1, "plots-empty-cell")]


def test_a_site_table_and_its_faults(tmp_path, demo, pack):
    made, _ = read_plots(written(tmp_path, LONG))
    plots = bind_plots(made, list(demo.plant_ids)).plots
    path = tmp_path / "sites.csv"
    path.write_text(
        "plot_id;height_m;month;disturbance;water_table;colour\n"
        "p2;2000,5;7;burn;lt30;red\np1;x;13;fire;;\np9;1;1;;;\n",
        encoding="utf-8",
    )
    sited, problems = read_sites(path, pack, plots)
    assert [(one.line, one.column, one.severity) for one in problems] == [
        (1, 6, "caution"),
        (3, 2, "error"),
        (3, 3, "error"),
        (3, 4, "error"),
        (4, 1, "caution"),
    ]
    assert sited.place["height_m"][1] == 2000.5
    assert np.isnan(sited.place["height_m"][0])
    assert sited.answers["water_table"] == [None, "lt30"]
    assert sited.disturbance[1] == "burn"
