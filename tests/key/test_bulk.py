"""Whole files of plots: the same calls as one by one, and quickly."""

import dataclasses
import time

import numpy as np
import pytest

from builder.key.bulk import call_plots
from builder.key.call import call
from builder.key.compile import arrays_of
from builder.key.plots import Plots
from builder.key.prepare import prepare
from builder.key.session import ask, finding, most_plentiful
from builder.key.usual import simulated_plots


@pytest.fixture(scope="session")
def field(demo, pack):
    """64 simulated plots on all kinds of ground, some plants not searched for."""
    rng = np.random.default_rng(7)
    _, plots = simulated_plots(pack, arrays_of(demo), 4, 7)
    count = len(plots)
    steps = plots.steps.copy()
    steps[rng.random(steps.shape) < 0.05] = -2
    height = rng.uniform(1450, 3450, count)
    height[::5] = np.nan
    place = {
        "height_m": height,
        "slope_pct": rng.uniform(0, 60, count),
        "aspect_deg": rng.uniform(0, 360, count),
    }
    kinds = [None, "none", "burn", "well_pad", "overgrazed"]
    answers = {}
    for name in ("water_table", "cold_air_pocket", "old_seeding", "dry_year"):
        values = [a["value"] for q in pack["questions"] if q["id"] == name for a in q["answers"]]
        picked = rng.integers(0, len(values) + 2, count)
        answers[name] = [values[at] if at < len(values) else None for at in picked]
    disturbance = [kinds[at % 5] for at in range(count)]
    return Plots(plots.ids, steps, plots.cover, place, np.arange(count) % 13, disturbance, answers)


def row(made, at):
    names = (
        "verdict",
        "zone_id",
        "belief",
        "next_zone_id",
        "fit",
        "pair",
        "finds_cb",
        "zone_share",
    )
    return {name: made[name][at] for name in names}


def one(called):
    belief = called["belief"][called["zone_id"]]
    return {**{name: called[name] for name in row_names(called)}, "belief": belief}


def row_names(called):
    return [
        n for n in ("verdict", "zone_id", "next_zone_id", "fit", "pair", "finds_cb", "zone_share")
    ]


@pytest.mark.parametrize("answers", [1, 3, 8])
def test_sessions_in_bulk_are_those_of_one_person(pack, field, answers):
    key = prepare(pack)
    made = call_plots(pack, field, answers=answers)
    assert made["plot_id"] == field.ids
    for at in range(len(field)):
        site = field.site(at, None, None)
        called, asked = ask(key, site, field.steps[at], field.cover[at], answers)
        assert row(made, at) == one(called)
        assert made["answers"][at] == asked <= answers


def test_all_plants_in_bulk_are_a_plot_searched_whole(pack, field):
    key = prepare(pack)
    made = call_plots(pack, field)
    for at in range(len(field)):
        site = field.site(at, None, None)
        names = most_plentiful(key, site, field.steps[at], field.cover[at])[:3]
        rows = [
            finding(
                key, p, field.steps[at], field.cover[at], names.index(p) + 1 if p in names else None
            )
            for p in range(key.plants)
        ]
        site["findings"] = [row for row in rows if row["state"] != "cant_tell"]
        called = call(pack, site)
        if not called["rules_fired"]:
            assert row(made, at) == one(called)


def test_month_and_disturbance_hold_for_plots_that_state_none(pack, field):
    bare = dataclasses.replace(field, month=None, disturbance=None, answers={})
    given = call_plots(pack, bare, month=8, disturbance="burn")
    count = len(field)
    own = dataclasses.replace(bare, month=np.full(count, 8), disturbance=["burn"] * count)
    assert given == call_plots(pack, own, month=1, disturbance=None)
    assert given["belief"] != call_plots(pack, bare)["belief"]


def test_no_plots_and_plots_without_plants(pack):
    plants = len(pack["plants"])
    none = Plots([], np.zeros((0, plants), np.int8), np.zeros((0, plants), np.float32))
    assert call_plots(pack, none)["verdict"] == []
    bare = np.full((2, plants), -2, np.int8)
    made = call_plots(pack, Plots(["a", "b"], bare, np.zeros((2, plants), np.float32)), answers=8)
    assert made["verdict"] == ["thin", "thin"]
    assert made["answers"] == [0, 0]


def test_simulated_sites_are_called_right(demo, pack):
    """Sanity only: tables right on average, a forgetful person, eight answers at most."""
    zones, plots = simulated_plots(pack, arrays_of(demo), 60, 99)
    made = call_plots(pack, plots, answers=8)
    right = np.array([pack["zones"][z]["id"] for z in zones]) == np.array(made["zone_id"])
    belief = np.array(made["belief"])
    assert right.mean() > 0.85
    sure = belief >= 0.9
    assert abs(belief[sure].mean() - right[sure].mean()) < 0.04
    assert np.median(made["answers"]) <= 8


def test_progress_is_told_and_ends_whole(pack, field):
    told = []
    call_plots(pack, field, progress=lambda done, whole: told.append((done, whole)))
    assert told[-1] == (64, 64)
    assert [done for done, _ in told] == sorted(done for done, _ in told)


def test_ten_thousand_plots_do_not_take_minutes(demo, pack):
    """A guard against loops, not a measurement; the benchmark measures."""
    _, plots = simulated_plots(pack, arrays_of(demo), 625, 3)
    start = time.process_time()
    call_plots(pack, plots)
    assert time.process_time() - start < 10
