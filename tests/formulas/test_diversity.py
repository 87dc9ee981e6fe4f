"""Diversity, likeness and correspondence analysis against vegan's values and by hand."""

import json
from pathlib import Path

import numpy as np
import pytest

from builder.formulas import diversity

GOLDENS = Path(__file__).parents[1] / "goldens"
MINE = [
    "richness",
    "shannon",
    "gini_simpson",
    "inverse_simpson",
    "bray_curtis",
    "sorensen",
    "jaccard",
    "percent_similarity",
    "correspondence_order",
    "correspondence_eigenvalues",
]


def golden(name):
    return json.loads((GOLDENS / f"{name}.json").read_text())


@pytest.mark.parametrize("name", MINE)
def test_every_golden_case_holds(name):
    cases = golden(name)["cases"]
    assert cases
    for case in cases:
        got = getattr(diversity, name)(**case["in"])
        np.testing.assert_allclose(got, case["out"], rtol=0, atol=case["abs"] + 1e-12)


def test_first_axes_of_the_dune_data_are_vegans():
    """VEG-09: eigenvalues 0.53601, 0.40014, 0.25979 of 2.11526 (vegan 2.6-4 cca)."""
    dune = golden("correspondence_order")["cases"][0]["in"]["amounts"]
    values = diversity.correspondence_eigenvalues(dune)
    np.testing.assert_allclose(values[:3], [0.53601, 0.40014, 0.25979], atol=2e-5)
    np.testing.assert_allclose(values.sum(), 2.11526, atol=2e-5)
    np.testing.assert_allclose(values[0] / values.sum(), 0.253399, atol=2e-6)


def test_order_does_not_depend_on_the_way_the_axis_runs():
    rows = [[5, 1, 0, 0], [2, 4, 1, 0], [0, 1, 4, 2], [0, 0, 1, 5]]
    assert diversity.correspondence_order(rows) == [0, 1, 2, 3]
    turned = diversity.correspondence_order([row[::-1] for row in rows])
    assert turned == [0, 1, 2, 3]


def test_impossible_input_is_refused():
    with pytest.raises(ValueError, match="negative"):
        diversity.shannon([1, -1])
    with pytest.raises(ValueError, match="same plants"):
        diversity.jaccard([1], [1, 2])
    with pytest.raises(ValueError, match="empty plot"):
        diversity.correspondence_order([[1, 2], [0, 0]])
    with pytest.raises(ValueError, match="like nothing"):
        diversity.percent_similarity([0, 0], [1, 0])
