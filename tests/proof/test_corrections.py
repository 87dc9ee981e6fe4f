"""Learned points: they centre on nothing, obey their penalty, and find what was planted."""

import numpy as np
import pytest

from builder.key.fitted import correction_nats
from builder.proof.corrections import Lessons, learn, reached


def lessons(seed=0, plots=400):
    """Plant 0 stands in zone 1 only; the points from counts know nothing."""
    rng = np.random.default_rng(seed)
    zone = rng.integers(2, size=plots)
    steps = np.where(rng.random((plots, 2)) < [0.9, 0.5], 1, -1).astype(np.int8)
    steps[zone == 0, 0] = -1
    told = reached(steps)
    usual = told.mean(axis=0)
    made = Lessons(
        np.zeros((plots, 2)),
        np.zeros((plots, 2)),
        (told - usual).reshape(plots, -1),
        np.ones(plots),
        np.ones(plots),
        zone,
        np.zeros(plots, int),
    )
    return made, usual


def test_a_planted_plant_is_learned_and_a_random_one_is_not():
    made, usual = lessons()
    learned = learn(made, usual, 2.0).learned
    assert learned[0, 0, 1] - learned[0, 0, 0] > 1.0
    assert abs(learned[1]).max() < 0.3


def test_a_heavy_penalty_learns_nothing():
    made, usual = lessons()
    assert abs(learn(made, usual, 1e6).learned).max() < 1e-3


def test_points_are_centred_on_the_usual_answer():
    learned = np.array([[[0.4, -0.4], [0.2, -0.2], [0.0, 0.0]]])
    usual = np.array([[0.5, 0.25, 0.0]])
    found, absent = correction_nats(learned, usual)
    assert absent[0, 0] == pytest.approx(-(0.5 * 0.4 + 0.25 * 0.2))
    mean = 0.5 * absent[0, 0] + 0.25 * found[0, 0, 0] + 0.25 * found[0, 1, 0]
    assert mean == pytest.approx(0.0)
    assert found[0, 4, 0] == found[0, 0, 0]


def test_a_find_without_cover_reaches_only_the_first_threshold():
    told = reached(np.array([[-1, 0, 1, 2, 3, 4, -2]], np.int8))[0]
    assert told.sum(axis=1).tolist() == [0, 1, 2, 3, 3, 1, 0]
