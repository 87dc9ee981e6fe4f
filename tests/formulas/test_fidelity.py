"""IndVal, phi and their kin against R, by hand, and at the edges."""

import json
import shutil
import subprocess
from pathlib import Path

import numpy as np
import pytest

from builder.formulas import fidelity

GOLDENS = Path(__file__).parents[1] / "goldens"
MINE = [
    "indval",
    "indval_parts",
    "phi",
    "constancy",
    "group_sums",
    "indval_p",
    "levins_breadth",
    "levins_standardised",
]
R_LINES = """
suppressMessages(library(vegan)); suppressMessages(library(labdsv)); data(dune); data(dune.env)
values <- indval(dune, as.integer(dune.env$Management))$indval
write.table(values, row.names = FALSE, col.names = FALSE, sep = ",")
"""


def golden(name):
    return json.loads((GOLDENS / f"{name}.json").read_text())


def dune_case():
    return next(case for case in golden("indval")["cases"] if case["id"] == "dune_all")


@pytest.mark.parametrize("name", MINE)
def test_every_golden_case_holds(name):
    cases = golden(name)["cases"]
    assert cases
    for case in cases:
        got = getattr(fidelity, name)(**case["in"])
        np.testing.assert_allclose(got, case["out"], rtol=0, atol=case["abs"] + 1e-12)


def test_indval_equals_labdsv_to_a_millionth():
    case = dune_case()
    expected = np.array(case["out"])
    if shutil.which("Rscript"):
        run = subprocess.run(["Rscript", "-e", R_LINES], capture_output=True, text=True, check=True)
        expected = np.array(
            [[float(cell) for cell in line.split(",")] for line in run.stdout.split()]
        )
    got = fidelity.indval(**case["in"])
    assert got.shape == (30, 4)
    np.testing.assert_allclose(got, expected, rtol=0, atol=1e-6)


def test_permutation_keeps_ties_and_repeats_for_a_seed():
    case = dune_case()["in"]
    first = fidelity.indval_p(**case, permutations=99, seed=3)
    assert np.array_equal(first, fidelity.indval_p(**case, permutations=99, seed=3))
    assert first.min() >= 0.01
    everywhere = fidelity.indval_p([[1], [1], [1], [1]], [0, 0, 1, 1], permutations=50)
    assert everywhere == [1.0]


def test_permutation_agrees_with_a_plain_loop():
    case = dune_case()["in"]
    cover, group = np.array(case["cover"], float) * 0.37, np.array(case["group"])
    best = fidelity.indval(cover, group).max(axis=1)
    rng = np.random.default_rng(5)
    reached = sum(
        fidelity.indval(cover, rng.permutation(group)).max(axis=1) >= best - 1e-9
        for _ in range(200)
    )
    got = fidelity.indval_p(cover, group, permutations=200, seed=5)
    np.testing.assert_allclose(got, (1 + reached) / 201)


def test_permutation_stops_when_told():
    class StopError(Exception):
        pass

    def stop(share):
        raise StopError

    with pytest.raises(StopError):
        fidelity.indval_p([[1], [0]], [0, 1], progress=stop)


def test_a_plant_found_nowhere_or_everywhere_says_nothing():
    cover = [[0, 1], [0, 1], [0, 1]]
    assert fidelity.indval(cover, [0, 0, 1])[0].tolist() == [0, 0]
    assert fidelity.phi(cover, [0, 0, 1]).tolist() == [[0, 0], [0, 0]]


def test_phi_equalised_is_phi_of_equal_groups():
    cover, group = [[1], [1], [0], [1], [0], [0]], [0, 0, 0, 1, 1, 1]
    np.testing.assert_allclose(fidelity.phi(cover, group), fidelity.phi(cover, group, True))


def test_wrong_shapes_are_refused():
    with pytest.raises(ValueError, match="group number"):
        fidelity.constancy([[1], [0]], [0])
    with pytest.raises(ValueError, match="amounts"):
        fidelity.levins_breadth([0, 0])
