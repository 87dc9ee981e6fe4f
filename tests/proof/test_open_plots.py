"""The key on open vegetation plots: 160 plots x 169 plants of Bryce Canyon, zones by height.

The plots come with the R package labdsv (data sets bryceveg and brycesite, GPL); they are read from
it and never stored here. Where R is not installed, planted plots of the same size stand in, so that
the same claims are always tested.
"""

import csv
import io
import shutil
import subprocess

import numpy as np

from builder.formulas.fidelity import indval
from builder.key.cover import cover_step
from builder.key.plots import Plots
from builder.proof import baselines, known_proof
from builder.proof.known import Known
from builder.proof.region_tables import neighbours_of

CODES_PCT = {0.0: 0.0, 0.2: 0.5, 0.5: 0.7, 1.0: 3.0, 2.0: 15.0, 3.0: 37.5, 4.0: 62.5, 5.0: 85.0}
R_LINES = """
suppressMessages(library(labdsv)); data(bryceveg); data(brycesite)
write.csv(cbind(elev = brycesite$elev, bryceveg), row.names = FALSE)
"""
INDVAL_LINES = """
suppressMessages(library(labdsv)); data(bryceveg); data(brycesite)
group <- as.integer(cut(rank(brycesite$elev, ties.method = "first"), 5))
write.table(indval(bryceveg, group)$indval, row.names = FALSE, col.names = FALSE, sep = ",")
"""


def from_r(lines):
    """What R prints, as a table of numbers; None where R or the package is missing."""
    if not shutil.which("Rscript"):
        return None
    run = subprocess.run(["Rscript", "-e", lines], capture_output=True, text=True, check=False)
    if run.returncode:
        return None
    rows = list(csv.reader(io.StringIO(run.stdout)))
    first = 0 if rows[0][0].replace(".", "").isdigit() else 1
    return np.array([[float(cell) for cell in row] for row in rows[first:]])


def planted():
    """Plots along a gradient, plants with an optimum and a width each: codes as bryceveg has."""
    rng = np.random.default_rng(11)
    height = rng.uniform(2000, 2800, 160)
    best, width = rng.uniform(1900, 2900, 169), rng.uniform(80, 300, 169)
    share = 0.6 * np.exp(-(((height[:, None] - best) / width) ** 2) / 2)
    codes = np.where(rng.random(share.shape) < share, rng.choice([0.5, 1.0, 2.0], share.shape), 0.0)
    codes[:, 0] = np.maximum(codes[:, 0], 0.2)
    return np.column_stack([height, codes])


def fifths(height):
    """Five groups of 32 plots by rank of height."""
    rank = np.argsort(np.argsort(height, kind="stable"), kind="stable")
    return rank * 5 // len(height)


def known_plots(table):
    cover = np.vectorize(lambda code: CODES_PCT[round(float(code), 1)], otypes=[float])(
        table[:, 1:]
    )
    steps = np.where(cover > 0, cover_step(cover), -1).astype(np.int8)
    ids = [str(at) for at in range(len(table))]
    plants = tuple(str(p) for p in range(cover.shape[1]))
    zones = tuple("abcde")
    plots = Plots(ids, steps, cover.astype(np.float32))
    return Known(plots, plants, zones, fifths(table[:, 0]))


def test_eight_answers_stand_beside_a_forest_that_sees_every_plant(monkeypatch):
    monkeypatch.setattr(baselines, "TREES", 150)
    table = from_r(R_LINES)
    known = known_plots(planted() if table is None else table)
    assert len(known) == 160
    made = known_proof.prove_known(known, neighbours_of(known), 0, "plots", lambda s, x: None)
    rivals = made["baselines"]
    assert made["hit_rate"] > rivals["random_forest"]["hit_rate"] - 0.05
    assert made["hit_rate"] > rivals["tree_depth_6"]["hit_rate"] + 0.03
    assert made["calibration_error"] <= made["perfect_band"][1]
    assert made["stated_minus_right"] < 0.03
    assert made["sure_stated_minus_right"] < 0.03


def test_indval_of_160_by_169_equals_labdsv_where_r_is_installed():
    """Without R the same table is held to IndVal worked out plot by plot."""
    table = from_r(R_LINES)
    expected = None if table is None else from_r(INDVAL_LINES)
    table = planted() if table is None else table
    cover, group = table[:, 1:], fifths(table[:, 0])
    if expected is None:
        means = np.array([cover[group == g].mean(axis=0) for g in range(5)]).T
        held = np.array([(cover[group == g] > 0).mean(axis=0) for g in range(5)]).T
        total = means.sum(axis=1, keepdims=True)
        expected = np.where(total > 0, means / np.where(total > 0, total, 1), 0) * held
    got = indval(cover, group)
    assert got.shape == expected.shape
    np.testing.assert_allclose(got, expected, rtol=0, atol=1e-6)
