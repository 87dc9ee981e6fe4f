"""Fits of simulated known plots: whole, checkable, the same again, and better than a guess."""

import numpy as np
import pytest

from builder.key.bulk import call_plots
from builder.key.fitted import read_fit
from builder.key.plots import Plots
from builder.key.plots_bind import names_of
from builder.pack import compile_pack
from builder.problems import errors
from builder.proof import estimate
from builder.proof.fit import fit_region
from builder.proof.known import Known, in_slope_order
from builder.proof.known_fit import fit_known
from builder.proof.reading import read_known
from builder.proof.region_tables import neighbours_of, plain_ids
from builder.steps.checking import check_region

pytestmark = pytest.mark.usefixtures("few_folds")
ZONES = ("Low ground", "middle", "high")


@pytest.fixture
def few_folds(monkeypatch):
    """Fewer inner folds than a real fit, for speed."""
    monkeypatch.setattr(estimate, "INNER_FOLDS", 4)


def plots_of(count=72, plants=14, seed=0):
    """Plants that each have a zone of their own, one that grows everywhere, and noise."""
    rng = np.random.default_rng(seed)
    zone = np.arange(count) % 3
    own = np.arange(plants) % 3
    chance = np.where(own[None] == zone[:, None], 0.7, 0.15)
    chance[:, 0] = 0.8
    found = rng.random((count, plants)) < chance
    found[:, 0] |= ~found.any(axis=1)
    cover = np.where(found, np.round(rng.gamma(1.5, 8.0, found.shape), 1) + 0.1, 0.0)
    return zone, np.minimum(cover, 99.0)


def write(tmp_path, zone, cover):
    lines = ["plot_id,plant_id,cover_pct"]
    for n, row in enumerate(cover):
        lines += [f"p{n},Plant {p},{value:.1f}" for p, value in enumerate(row) if value > 0]
    (tmp_path / "plots.csv").write_text("\n".join(lines) + "\n", encoding="utf-8")
    zones = [f"p{n},{ZONES[z]},{1500 + 400 * z + n}" for n, z in enumerate(zone)]
    text = "\n".join(["plot_id,zone_id,height_m", *zones]) + "\n"
    (tmp_path / "zones.csv").write_text(text, encoding="utf-8")
    return tmp_path / "plots.csv", tmp_path / "zones.csv"


def contents(folder):
    return {path.name: path.read_bytes() for path in sorted(folder.iterdir())}


def test_a_fit_is_whole_checkable_and_calls_its_plots(tmp_path):
    zone, cover = plots_of()
    files = write(tmp_path, zone, cover)
    stages = []
    made = fit_region(
        *files, tmp_path / "ridge", seed=3, date="2026-12-01",
        progress=lambda stage, share: stages.append(stage),
    )  # fmt: skip
    assert errors(made.problems) == []
    assert (made.plots, made.plants, made.zones) == (72, 14, 3)
    assert {"read", "sessions", "corrections", "temper", "verdicts", "indval"} <= set(stages)

    checked = check_region(made.folder)
    assert errors(checked.problems) == []
    region = checked.region
    assert [zone.id for zone in region.zones] == ["low_ground", "middle", "high"]
    assert region.zones[0].band_m[0] < region.zones[2].band_m[0]

    pack = compile_pack(region, checked.fitted)
    known, _ = read_known(*files, plants=region.plant_ids, names=names_of(region))
    calls = call_plots(pack, known.plots, answers=8)
    ids = plain_ids(known.zone_ids, "zone")
    right = np.mean([z == ids[k] for z, k in zip(calls["zone_id"], known.zone, strict=True)])
    assert right > 0.8

    again = fit_region(*files, tmp_path / "two" / "ridge", seed=3, date="2026-12-01")
    assert contents(again.folder) == contents(made.folder)


def test_a_constancy_changed_by_hand_wins_over_the_count(tmp_path):
    files = write(tmp_path, *plots_of())
    folder = fit_region(*files, tmp_path / "ridge", date="2026-12-01").folder
    table = folder / "occurrence.yaml"
    text = table.read_text(encoding="utf-8")
    line = next(one for one in text.splitlines() if one.startswith("  plant_0:"))
    first = line.split("[")[1].split(",")[0]
    table.write_text(text.replace(line, line.replace(f"[{first},", "[50,", 1)), encoding="utf-8")
    region = check_region(folder).region
    fitted, problems = read_fit(folder, region)
    assert problems == []
    plant, zone = region.plant_ids.index("plant_0"), 0
    where = line.split("{")[1].split(":")[0]
    zone = region.zone_ids.index(where)
    assert fitted.arrays.present[plant, zone] == pytest.approx(0.5 * fitted.arrays.plots[zone])


def test_a_stopped_fit_leaves_nothing(tmp_path):
    files = write(tmp_path, *plots_of())

    def stop(stage, share):
        if stage == "indval" and share > 0.5:
            raise KeyboardInterrupt

    with pytest.raises(KeyboardInterrupt):
        fit_region(*files, tmp_path / "ridge", progress=stop)
    assert sorted(path.name for path in tmp_path.iterdir()) == ["plots.csv", "zones.csv"]


def test_a_place_that_is_taken_is_refused(tmp_path):
    files = write(tmp_path, *plots_of())
    out = tmp_path / "ridge"
    out.mkdir()
    (out / "note.txt").write_text("mine")
    made = fit_region(*files, out)
    assert made.folder is None
    assert [one.check for one in errors(made.problems)] == ["fit-out"]
    assert (out / "note.txt").read_text() == "mine"


def test_names_become_ids_in_the_house_form():
    assert plain_ids(("Abies lasiocarpa", "3", "sage", "Sage", "—"), "plant") == [
        "abies_lasiocarpa", "plant_3", "sage", "sage_2", "plant",
    ]  # fmt: skip


def test_fitted_temper_cools_evidence_that_is_noise():
    """Plants that have nothing to do with the zones must not be believed."""
    rng = np.random.default_rng(8)
    steps = np.where(rng.random((90, 20)) < 0.4, 1, -1).astype(np.int8)
    cover = np.where(steps >= 0, 3.0, 0.0).astype(np.float32)
    known = Known(
        Plots([str(n) for n in range(90)], steps, cover),
        tuple(str(p) for p in range(20)),
        ("a", "b", "c"),
        np.arange(90) % 3,
    )
    known = in_slope_order(known)
    learned = fit_known(known, neighbours_of(known))
    weights, session = learned.fitted.weights, learned.fitted.session
    assert weights.tau * weights.temper / (1 + 7 * session["drag"]) < 0.3
    assert learned.loss < np.log(3) + 0.05
