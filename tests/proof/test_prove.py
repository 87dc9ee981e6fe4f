"""A proof end to end on the test region and on known plots; its figures travel to the pack."""

import json

import numpy as np
import pytest

from builder.key.call import call
from builder.key.compile import weigh_region
from builder.key.couplets import as_values, follow, key_lines, printed_key
from builder.key.plots import Plots
from builder.key.prepare import prepare
from builder.key.weigh import Weights
from builder.pack import compile_pack
from builder.proof import (
    baselines,
    estimate,
    known_proof,
    prove,
    simulated_proof,
    simulator,
)
from builder.proof.calls import call_sites, pack_for, record_of, with_settings, without_zone
from builder.proof.cases import Traits, plot_pairs, proof_cases, setting_cases, zone_pairs
from builder.proof.kept import keep_proof, read_proof, with_session
from builder.proof.known import Known
from builder.proof.pairs import answer_overlap, hardest_pairs, never_help
from builder.proof.report import report_html
from builder.proof.sessions import Sessions, bare_key


@pytest.fixture
def small(monkeypatch):
    """A proof with few sites, for the plumbing rather than the figures."""
    for name, value in {
        "SITES": 60, "SETTING_SITES": 60, "BLIND_ZONES": 2, "BLIND_SITES": 10,
        "USUAL_SITES": 10, "THREE_SITES": 6,
    }.items():  # fmt: skip
        monkeypatch.setattr(simulated_proof, name, value)
    monkeypatch.setattr(prove, "PRINTED_SITES", 90)


def traits_of(region):
    return Traits([p.layer for p in region.plants], [p.response for p in region.plants])


def some_plots(region, count=90, seed=5):
    pack, arrays = pack_for(region, usual_sites=10)
    rng = np.random.default_rng(seed)
    key = prepare(pack)
    return pack, arrays, key, proof_cases(key, arrays, traits_of(region), rng, count)


def test_sites_called_together_are_called_as_one_by_one(tables):
    pack, _, key, cases = some_plots(tables.region)
    plots = cases["zone"].plots.take(np.arange(12))
    calls = call_sites(key, plots, 6)
    for at in range(12):
        record = record_of(key, calls.heard, plots, at)
        one = call(pack, record)
        assert list(one["belief"].values()) == calls.belief[at].tolist()
        assert one["fit"] == calls.fit[at]


def test_the_bare_key_sums_what_the_session_believes(tables):
    _, arrays, key, cases = some_plots(tables.region)
    evidence = weigh_region(arrays, Weights())
    bare = bare_key(evidence, key.settings)
    plots = cases["zone"].plots
    sums = Sessions(bare).after(plots, 5)
    said = np.floor(sums.implied * bare.settings["implied_weight"] + 0.5)
    drag = 1 + bare.settings["drag"] * np.clip(sums.n - 1, 0, 20)
    score = (bare.area + (sums.points + said) / drag[:, None]) * np.log(10) / 100
    share = np.exp(score) / np.exp(score).sum(axis=1, keepdims=True)
    np.testing.assert_allclose(sums.belief, 0.98 * share + 0.02 / bare.zones, atol=1e-6)


def test_both_generators_make_every_kind_of_case(tables):
    _, arrays, key, cases = some_plots(tables.region)
    rng = np.random.default_rng(1)
    other = setting_cases(key, arrays, traits_of(tables.region), rng, 30)
    near, far = zone_pairs(key)
    for made in (cases, other):
        assert set(made) == {
            "zone",
            *(["edge"] if len(near) else []),
            *(["mosaic"] if len(far) else []),
        }
        for case in made.values():
            assert len(case.plots) == len(case.zones)
    assert (cases["zone"].zones[:, 0] == cases["zone"].zones[:, 1]).all()


def test_pairs_of_real_plots_hold_what_their_plots_hold():
    steps = np.array([[2, -1, 1], [-1, 2, 1]], np.int8)
    plots = Plots(["a", "b"], steps, np.where(steps >= 0, 10.0, 0.0).astype(np.float32))
    zone, pairs = np.array([0, 1]), np.array([[0, 1]])
    rng = np.random.default_rng(0)
    patches = plot_pairs(plots, zone, pairs, 20, "patches", rng).plots
    assert (patches.steps >= 0).all()
    either = plot_pairs(plots, zone, pairs, 200, "either", rng).plots
    share = (either.steps >= 0).mean(axis=0)
    assert share[2] == 1.0
    assert 0.4 < share[0] < 0.6


def test_a_region_without_a_zone_forgets_it_everywhere(tables):
    region = tables.region
    gone = region.zones[1].id
    fewer = without_zone(region, gone)
    assert gone not in fewer.zone_ids
    assert all(zone != gone for zone, _ in fewer.occurrence)
    assert all(gone not in zone.neighbours for zone in fewer.zones)


def test_overlap_is_one_with_itself_and_names_what_parts(tables):
    pack, _ = pack_for(tables.region, usual_sites=10)
    key = prepare(pack)
    overlap = answer_overlap(key)
    np.testing.assert_allclose(np.einsum("pzz->pz", overlap), 1.0)
    rows = hardest_pairs(key)
    bounds = [row["error_bound"] for row in rows]
    assert bounds == sorted(bounds, reverse=True)
    assert len(rows) == 3
    best = rows[0]["plants"][0][0]
    assert best in tables.region.plant_ids
    assert best not in never_help(key)


def test_the_printed_key_leads_every_site_to_a_leaf(tables):
    pack, arrays, key, cases = some_plots(tables.region)
    printed = printed_key(pack, arrays)
    assert as_values(printed) == as_values(printed_key(pack, arrays))
    leaves, steps = follow(printed, cases["zone"].plots)
    true = cases["zone"].zones[:, 0]
    assert np.mean([leaf.zone == z for leaf, z in zip(leaves, true, strict=True)]) > 0.6
    assert steps.max() <= 2
    names = {plant: plant for plant in tables.region.plant_ids}
    letters = {zone.id: zone.letter for zone in tables.region.zones}
    lines = key_lines(printed, names, letters)
    assert len(lines) == 1 + len(printed.start) + 2 * len(printed.couplets)
    for leaf in leaves:
        assert leaf.names_two == (leaf.share < 0.6)


def test_a_proof_of_a_typed_region_is_simulated_and_says_so(tables, small):
    region = tables.region
    stages = set()
    made = prove.prove_region(region, seed=4, progress=lambda stage, share: stages.add(stage))
    assert {"thresholds", "observers", "verdicts", "three looks", "disturbed", "pairs"} <= stages
    assert made["known"] is None
    assert made["summary"]["tested_on"] == "simulated"
    assert made["summary"]["n"] == made["simulated"]["n"] >= 60
    page = report_html(json.loads(json.dumps(made)))
    assert "Not tested on real plots" in page
    assert page.count("<svg") >= 4
    assert page.count("<title>") == page.count("<svg") + 1

    again = prove.prove_region(region, seed=4)
    assert again == made


def test_a_proof_is_kept_and_an_edit_makes_it_untested(tables, small):
    folder = tables.folder
    region = tables.region
    made = prove.prove_region(region, seed=4)
    keep_proof(folder, made)
    kept, problems = read_proof(folder)
    assert problems == []
    assert kept.figures["n"] == made["summary"]["n"]
    assert kept.figures["hit_rate"] == made["summary"]["hit_rate"]
    pack = compile_pack(region, with_session(region, None, kept), kept.figures)
    assert pack["settings"]["edge"] == made["session"]["edge"]
    assert pack["proof"]["tested_on"] == "simulated"

    table = folder / "occurrence.yaml"
    table.write_text(table.read_text(encoding="utf-8") + "# changed\n", encoding="utf-8")
    kept, _ = read_proof(folder)
    assert kept.figures is None
    assert kept.session == made["session"]


def known_of(tables, count=75):
    _, _, _, cases = some_plots(tables.region, count)
    case = cases["zone"]
    region = tables.region
    return Known(case.plots, region.plant_ids, region.zone_ids, case.zones[:, 0])


@pytest.fixture
def quick(monkeypatch):
    """Fewer inner folds and trees, for the plumbing rather than the figures."""
    monkeypatch.setattr(estimate, "INNER_FOLDS", 3)
    monkeypatch.setattr(baselines, "TREES", 20)


def test_known_plots_are_proved_out_of_fold_beside_their_rivals(tables, quick):
    near = [{1}, {0, 2}, {1}]
    made = known_proof.prove_known(known_of(tables), near, 0, "some plots", lambda s, x: None)
    assert made["tested_on"] == "plots"
    assert made["n"] == sum(map(sum, made["confusion"])) >= 75
    assert sum(made["answers_needed"]) == made["n"]
    assert made["hit_rate"] > 0.6
    assert set(made["baselines"]) == set(baselines.NAMES)
    assert 0.0 < made["withheld_auc"] <= 1.0
    assert made["verdicts"]["zone"]["n"] == made["n"]


def test_without_rivals_the_proof_says_what_to_install(tables, quick, monkeypatch):
    monkeypatch.setattr(baselines, "available", lambda: False)
    near = [{1}, {0, 2}, {1}]
    made = known_proof.prove_known(known_of(tables, 30), near, 0, "plots", lambda s, x: None)
    assert made["baselines"] == {}
    assert "beltbook[proof]" in made["note"]


def test_zones_of_known_plots_take_the_regions_order_and_ids(tables):
    region = tables.region
    known = known_of(tables, 30)
    names = [zone.name for zone in region.zones]
    turned = Known(known.plots, known.plants, tuple(reversed(names)), len(names) - 1 - known.zone)
    back = prove.in_region_order(turned, region)
    assert back.zone_ids == region.zone_ids
    assert np.array_equal(back.zone, known.zone)


def test_disturbed_and_poor_sites_are_made_from_the_regions_own_figures(tables, small):
    run = simulated_proof.SimulatedProof(tables.region, None, 1, lambda s, x: None)
    disturbed = run.figures()["disturbed"]
    assert set(disturbed) == {"haul_road", "fire"}
    for row in disturbed.values():
        assert 0.0 <= row["wrong_at_80"] <= 1.0 - row["hit_rate"]
    assert isinstance(simulator.CAREFUL.overlooked, float)
    assert with_settings(run.pack, {"sure": 2.0}).settings["sure"] == 2.0
