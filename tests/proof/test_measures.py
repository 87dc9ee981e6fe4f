"""Measures of belief, by hand."""

import numpy as np
import pytest

from builder.proof import measures
from builder.proof.folds import stratified_folds


def test_kappa_of_a_worked_table():
    """20 both yes, 5 and 10 mixed, 15 both no: agreement .7, chance .5, kappa .4 (by hand)."""
    said = np.repeat([0, 1, 0, 1], [20, 5, 10, 15])
    true = np.repeat([0, 0, 1, 1], [20, 5, 10, 15])
    assert measures.kappa(said, true, 2) == pytest.approx(0.4)


def test_log_loss_and_brier_by_hand():
    belief = np.array([[0.8, 0.2], [0.4, 0.6]])
    true = np.array([0, 0])
    assert measures.log_loss(belief, true) == pytest.approx(-(np.log(0.8) + np.log(0.4)) / 2)
    assert measures.brier(belief, true) == pytest.approx((0.08 + 0.72) / 2)


def test_a_perfect_key_lies_inside_its_own_band_and_a_boaster_outside():
    rng = np.random.default_rng(1)
    stated = rng.uniform(0.3, 1.0, 600)
    right = rng.random(600) < stated
    low, high = measures.perfect_band(stated, rng)
    assert low < measures.calibration_error(stated, right) < high
    assert measures.calibration_error(np.full(600, 0.99), right) > high


def test_area_under_curve_counts_ties_half():
    assert measures.area_under_curve(np.array([1.0, 2.0]), np.array([2.0, 3.0])) == 0.875
    assert measures.area_under_curve(np.array([1.0]), np.array([1.0])) == 0.5


def test_figures_name_their_n_and_are_rounded():
    belief = np.array([[0.95, 0.05], [0.3, 0.7], [0.6, 0.4]])
    made = measures.figures(belief, np.array([0, 1, 1]), np.random.default_rng(0))
    assert made["n"] == 3
    assert made["hit_rate"] == 0.6667
    assert made["sure_share"] == 0.3333


def test_folds_hold_their_share_of_every_zone():
    zone = np.repeat([0, 1, 2], [20, 10, 5])
    fold = stratified_folds(zone, 5, np.random.default_rng(3))
    for k in range(5):
        assert np.bincount(zone[fold == k]).tolist() == [4, 2, 1]
