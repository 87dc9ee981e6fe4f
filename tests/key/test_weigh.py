"""Counts to evidence: published values, and what must never happen to a zone."""

import json
import math
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from builder.key import weigh
from builder.key.cover import cover_shares_from_counts, cover_shares_from_means, cover_step
from builder.key.grades import decibans, grade_of

GOLDEN = Path(__file__).parent.parent / "goldens" / "evidence.json"
CASES = {one["id"]: one for one in json.loads(GOLDEN.read_text(encoding="utf-8"))["values"]}
HALF_A_CENTIBAN = 10**0.005 - 1
PLAIN = weigh.Weights(overlooked=0, wrongly_named=0, temper=1)


def test_grades_change_where_jeffreys_1961_says():
    case = CASES["STAT-12"]
    for factor, rounded, grade in zip(*case["in"].values(), case["out"], strict=True):
        assert 10 * math.log10(factor) == pytest.approx(rounded, abs=0.005)
        assert grade_of(10 * math.log10(factor)) == grade
    with pytest.raises(ValueError, match="against"):
        grade_of(-1)


def test_weight_of_evidence_good_1950():
    case = CASES["STAT-13"]
    p, q = case["in"].values()
    assert decibans(p, q) == pytest.approx(case["out"]["present_db"], abs=case["abs"])
    assert decibans(1 - p, 1 - q) == pytest.approx(case["out"]["absent_db"], abs=case["abs"])


def test_prior_odds_plus_evidence():
    case = CASES["STAT-14"]
    prior = case["in"]["prior_probability"]
    odds = prior / (1 - prior) * 10 ** (case["in"]["evidence_db"] / 10)
    assert odds == pytest.approx(case["out"]["posterior_odds"], abs=case["abs"])
    belief = softmax_cb(prior_cb([prior, 1 - prior]) + np.array([150, 0]))
    assert belief[0] == pytest.approx(case["out"]["posterior_probability"], abs=case["abs"])


def test_smoothed_likelihood_ratio_half_counts():
    """(k + 1/2) / (n + 1) is the plant's mean over zones when that is one zone's plots."""
    case = CASES["STAT-15"]
    shares = []
    for found, plots in (case["in"]["present_in_zone"], case["in"]["present_elsewhere"]):
        shares.append(weigh.presence_shares([[found]], [plots], 1e9)[0, 0])
    assert shares == pytest.approx([case["out"]["p_zone"], case["out"]["p_other"]], abs=0.001)
    assert shares[0] / shares[1] == pytest.approx(case["out"]["lr_present"], abs=case["abs"])
    assert decibans(*shares) == pytest.approx(case["out"]["db_present"], abs=case["abs"])
    absent = decibans(1 - shares[0], 1 - shares[1])
    assert absent == pytest.approx(case["out"]["db_absent"], abs=case["abs"])


def test_posterior_over_three_zones():
    case = CASES["STAT-16"]
    evidence = np.array(case["in"]["evidence_db"]) * 10
    belief = softmax_cb(prior_cb(case["in"]["prior"]) + evidence)
    assert belief == pytest.approx(case["out"], abs=case["abs"])


def prior_cb(shares):
    return 100 * np.log10(np.array(shares))


def softmax_cb(total):
    weights = np.exp(total * math.log(10) / 100)
    return weights / weights.sum()


def test_presence_by_hand():
    """n 18 of 20 and 2 of 20, m 1: mean (20 + 1/2) / 41 = 0.5; p = 18.5 / 21 and 2.5 / 21."""
    shares = weigh.presence_shares([[18, 2]], [20, 20], 1)
    assert shares.tolist() == [[pytest.approx(18.5 / 21), pytest.approx(2.5 / 21)]]
    floor = weigh.noise_floor(np.array([[0.5]]), 0.10, 0.005)
    assert floor[0, 0] == pytest.approx(0.5 * 0.9 + 0.5 * 0.005)


def test_centibans_by_hand():
    """p 18.5/21 and 2.5/21, mean 1/2: 100 log10(1.7619) = 24.6, 100 log10(0.2381) = -62.3."""
    made = weigh.evidence([[18, 2]], [20, 20], PLAIN)
    assert made.found[0, 4].tolist() == [25, -62]
    assert made.absent[0, 3].tolist() == [-62, 25]
    half = 100 * np.log10((1 - np.array([18.5, 2.5]) / 42) / 0.75)
    assert made.absent[0, 1].tolist() == np.floor(half + 0.5).tolist()


@given(st.integers(1, 60), st.integers(1, 60), st.floats(0.2, 5))
def test_a_constancy_of_0_or_100_never_vetoes(one, other, shrink):
    weights = weigh.Weights(shrink_plots=shrink)
    made = weigh.evidence([[one, 0]], [one, other], weights)
    assert np.abs(made.found).max() < 400
    assert made.found[0, 4, 0] >= 0 >= made.found[0, 4, 1]
    assert (made.presence > 0).all()
    assert (made.presence < 1).all()


@given(st.lists(st.floats(0, 20), min_size=3, max_size=3))
def test_evidence_is_centred_on_the_zones(present):
    """Weighted by how likely the answer is at all, no answer can favour every zone."""
    made = weigh.evidence([present], [20, 20, 20], PLAIN)
    for points in (made.found[0, 4], made.absent[0, 3]):
        assert points.max() >= 0 >= points.min()
        assert np.exp(points * math.log(10) / 100).mean() == pytest.approx(1, abs=HALF_A_CENTIBAN)


def test_less_left_of_a_plant_says_less():
    made = weigh.evidence([[19, 1, 5]], [20, 20, 20])
    spread = np.ptp(made.absent[0], axis=1)
    assert (np.diff(spread) > 0).all()


def test_newcomers_hold_their_absence_back_and_find_little_alone():
    made = weigh.evidence([[19, 1]], [20, 20])
    arrival = np.array([[0.3, 0.3]])
    found, absent = weigh.newcomer_evidence(made.presence, arrival, weigh.Weights())
    assert found[0, 0].tolist() == [0, 0]
    assert absent[0, 0].tolist() == [0, 0]
    assert np.ptp(found[0, 4]) < np.ptp(made.found[0, 4])
    p = made.presence[0]
    by_hand = 1 - (1 - p * 0.5) * (1 - 0.3)
    assert weigh.newcomer_presence(made.presence, arrival, 0.5)[0] == pytest.approx(by_hand)


def test_cover_steps_lower_limit_belongs_to_the_step():
    assert cover_step([0, 0.99, 1, 4.9, 5, 24.9, 25, 100]).tolist() == [0, 0, 1, 1, 2, 2, 3, 3]


def test_cover_shares_are_drawn_to_the_plants_own():
    """One plot at 25 % and more in zone 0, ten of 1-5 % in zone 1."""
    counts = np.zeros((1, 4, 3))
    counts[0, 3, 0], counts[0, 1, 1] = 1, 10
    shares = cover_shares_from_counts(counts, 4)
    assert shares.sum(axis=1) == pytest.approx(np.ones((1, 3)))
    pooled = np.array([0.5, 10.5, 0.5, 1.5]) / 13
    own = (counts.sum(axis=2)[0] + 4 * pooled) / 15
    assert shares[0, :, 2] == pytest.approx(own)
    assert shares[0, 3, 0] == pytest.approx((1 + 4 * own[3]) / 5)


def test_cover_from_a_mean_is_a_beta_distribution():
    """Mean 20 %: phi 4.5, Beta(0.9, 3.6); its share under 25 % from scipy."""
    from scipy.stats import beta

    shares = cover_shares_from_means(np.array([[20.0]]), np.array([[1e9]]), (1.5, 0.6), 4)
    assert shares[0, :3, 0].sum() == pytest.approx(beta(0.9, 3.6).cdf(0.25), abs=1e-6)


def test_corrections_are_added_after_tau():
    found = np.full((1, 5, 2), 0.1)
    plain = weigh.evidence([[18, 2]], [20, 20], weigh.Weights(temper=2, tau=0.5))
    more = weigh.evidence(
        [[18, 2]], [20, 20], weigh.Weights(temper=2, tau=0.5), found_correction=found
    )
    assert np.abs(more.found - plain.found - 0.1 * 2 * weigh.CENTIBANS_PER_NAT).max() <= 1


@pytest.mark.parametrize(
    ("present", "plots"),
    [([[1, 2]], [3]), ([[5, 1]], [4, 4]), ([[1, 1]], [0, 4]), ([[-1, 1]], [4, 4])],
)
def test_counts_that_cannot_be_are_refused(present, plots):
    with pytest.raises(ValueError, match="must be|at least|cannot"):
        weigh.evidence(present, plots)
