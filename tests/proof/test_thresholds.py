"""Verdict lines: they part what can be parted, and thin never takes in more than its share."""

import numpy as np

from builder.proof.thresholds import NAMES, fit_lines, thin_line


def cases(rng, count=300):
    made = {"zone": rng.normal([-2, -2, 0], 1, (count, 3))}
    for k, name in enumerate(NAMES):
        middle = np.array([-2.0, -2.0, 0.0])
        middle[k] += 4
        made[name] = rng.normal(middle, 1, (count, 3))
    return made


def test_lines_fitted_on_some_cases_part_others():
    lines = fit_lines(cases(np.random.default_rng(1)))
    for k, (name, told) in enumerate(cases(np.random.default_rng(2)).items()):
        plus = np.array([lines[one]["plus"] for one in NAMES])
        times = np.array([lines[one]["times"] for one in NAMES])
        scores = np.column_stack([np.zeros(len(told)), told * times + plus])
        assert (scores.argmax(axis=1) == k).mean() > 0.8, name


def test_a_kind_without_cases_is_never_said():
    made = cases(np.random.default_rng(1))
    del made["mosaic"]
    assert fit_lines(made)["mosaic"]["plus"] == -50.0


def test_thin_leaves_out_confident_calls_and_never_rises_above_its_default():
    default = {"finds_cb": 185, "belief": 0.85}
    finds = np.arange(100.0)
    assert thin_line(finds, np.full(100, 0.5), default) == 1
    assert thin_line(finds, np.full(100, 0.9), default) == 185
    assert thin_line(finds + 1000, np.full(100, 0.5), default) == 185
