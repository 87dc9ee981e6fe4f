"""The proof's own simulated sites: right shares, plants that vary together, mixtures in between."""

import numpy as np
import pytest

from builder.key.compile import Arrays
from builder.proof import simulator
from builder.proof.known_proof import half_lost

PLANTS, ZONES = 40, 3
LAYER = ["tree", "shrub", "grass", "forb"] * 10
RESPONSE = ["decreaser", "increaser", "neutral", "invader"] * 10


@pytest.fixture
def arrays():
    rng = np.random.default_rng(1)
    share = rng.uniform(0.05, 0.9, (PLANTS, ZONES))
    return Arrays(20 * share, np.full(ZONES, 20.0), cover_mean_pct=rng.uniform(1, 30, share.shape))


def world(arrays, table_plots=1e6):
    rng = np.random.default_rng(2)
    return simulator.world_of(arrays, LAYER, RESPONSE, rng, table_plots, 0.0)


def test_sites_hold_each_plant_as_often_as_the_truth_says(arrays):
    truth = world(arrays)
    zones = np.repeat(np.arange(ZONES), 4000)
    present, _ = simulator.pure(truth, zones, np.random.default_rng(3))
    for z in range(ZONES):
        share = present[zones == z].mean(axis=0)
        assert np.abs(share - truth.chance[:, z]).max() < 0.05


def test_plants_vary_together(arrays):
    """Richness varies more than independence gives (twice as much on the demo region)."""
    truth = world(arrays)
    present, _ = simulator.pure(truth, np.zeros(4000, int), np.random.default_rng(4))
    share = truth.chance[:, 0]
    ratio = present.sum(axis=1).var() / (share * (1 - share)).sum()
    assert 1.1 < ratio < 4.0


def test_edges_lie_between_and_mosaics_hold_more(arrays):
    truth = world(arrays)
    pairs = np.tile([0, 1], (3000, 1))
    edge, _ = simulator.edges(truth, pairs, np.random.default_rng(5))
    patches, cover = simulator.mosaics(truth, pairs, np.random.default_rng(6))
    middle = truth.chance[:, :2].mean(axis=1)
    assert np.abs(edge.mean(axis=0) - middle).mean() < 0.06
    assert patches.sum(axis=1).mean() > 1.2 * edge.sum(axis=1).mean()
    assert cover.max() <= 99.0


def test_people_miss_and_mistake_as_they_are_said_to(arrays):
    present = np.zeros((2000, PLANTS), bool)
    present[:, :20] = True
    cover = np.full(present.shape, 10.0)
    plots = simulator.observe(present, cover, simulator.Person(0.2, 0.05), np.random.default_rng(7))
    found = plots.steps >= 0
    assert found[:, :20].mean() == pytest.approx(0.8, abs=0.01)
    assert found[:, 20:].mean() == pytest.approx(0.05, abs=0.01)
    assert (plots.cover[~found] == 0).all()


def test_remnants_and_half_lost_take_away_what_they_should(arrays):
    present = np.ones((4000, PLANTS), bool)
    rng = np.random.default_rng(8)
    left = simulator.remnants(present, np.full(PLANTS, 0.3), np.zeros(PLANTS), rng)
    assert left.mean() == pytest.approx(0.3, abs=0.01)
    plots = simulator.observe(present, np.full(present.shape, 9.0), simulator.Person(0, 0), rng)
    assert (half_lost(plots, rng).steps >= 0).mean() == pytest.approx(0.5, abs=0.01)


def test_a_plant_out_of_season_is_not_there(arrays):
    present = np.ones((5, PLANTS), bool)
    rng = np.random.default_rng(9)
    plots = simulator.observe(present, np.full(present.shape, 9.0), simulator.Person(0, 0), rng)
    hidden = np.arange(PLANTS) < 3
    bare = simulator.out_of_season(plots, hidden)
    assert (bare.steps[:, :3] == -1).all()
    assert (bare.steps[:, 3:] >= 0).all()
