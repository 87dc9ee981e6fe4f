"""The demo region's pack, a fitted one, and random sites that leave nothing of the key out."""

import json
import random
import shutil
from pathlib import Path

import numpy as np
import pytest

from builder.key.compile import Fitted, arrays_of
from builder.key.weigh import Weights
from builder.pack import compile_pack
from builder.tables import load_region

ROOT = Path(__file__).parent.parent.parent
CORE = ROOT / "builder" / "app" / "js" / "core"
HOST = "http://core.test/"


@pytest.fixture(scope="session")
def demo():
    """The demo region's tables."""
    loaded = load_region(ROOT / "keydata" / "sorrel_plateau")
    assert loaded.region is not None, loaded.problems
    return loaded.region


@pytest.fixture(scope="session")
def pack(demo):
    """The demo region's pack, as a phone reads it."""
    return json.loads(json.dumps(compile_pack(demo)))


@pytest.fixture(scope="session")
def fitted_pack(demo):
    """A pack with everything a fit can put in: counts by cover, shares, corrections."""
    rng = np.random.default_rng(11)
    base = arrays_of(demo)
    plots = rng.integers(5, 40, len(base.plots)).astype(float)
    present = np.minimum(rng.binomial(40, base.present / base.plots) / 40 * plots, plots).round()
    counts = rng.multinomial(1000, [0.3, 0.3, 0.3, 0.1], present.shape) / 1000
    arrays = type(base)(
        present,
        plots,
        cover_counts=np.moveaxis(counts, -1, 1) * present[:, None, :],
        found_correction=rng.normal(0, 0.2, (len(present), 5, len(plots))),
        absent_correction=rng.normal(0, 0.05, present.shape),
        prior=plots,
    )
    fitted = Fitted(arrays, Weights(temper=1.1, tau=0.9), {"drag": 0.06, "implied_weight": 0.4})
    return json.loads(json.dumps(compile_pack(demo, fitted)))


@pytest.fixture(scope="session")
def random_sites():
    """random_sites(pack, count, seed): site checks with every kind of answer, in any mixture."""
    return make_sites


def make_sites(pack, count, seed):
    rng = random.Random(seed)
    return [make_site(pack, rng) for _ in range(count)]


def make_site(pack, rng):
    codes = [one["code"] for one in pack["cover"]["classes"]]
    disturbances = [one["id"] for one in pack["disturbances"]]
    site = {
        "month": rng.choice([None, *range(1, 13)]),
        "disturbance": rng.choice([None, None, *disturbances]),
        "place": {},
        "questions": {},
        "findings": [],
    }
    named = 0
    for plant in rng.sample(
        pack["plants"], min(rng.choice([0, 1, 3, 5, 8, 14]), len(pack["plants"]))
    ):
        state = rng.choices(["found", "not_found", "cant_tell"], [5, 4, 1])[0]
        row = {"plant_id": plant["id"], "state": state, "cover": None, "named": None}
        if state == "found":
            row["cover"] = rng.choice([*codes, None])
            if named < 3 and rng.random() < 0.5:
                named += 1
                row["named"] = named
        site["findings"].append(row)
    for group in pack["groups"]:
        if rng.random() < 0.12:
            state = rng.choice(["found", "not_found", "cant_tell"])
            site["findings"].append({"group_id": group["id"], "state": state})
    rng.shuffle(site["findings"])
    for question in pack["questions"]:
        if rng.random() < 0.15:
            values = [one["value"] for one in question["answers"]]
            site["questions"][question["id"]] = rng.choice([*values, "cant_tell"])
    if rng.random() < 0.6:
        low, high = pack["region"]["elevation_m"]
        site["place"]["height_m"] = rng.randint(int(low), int(high))
    if rng.random() < 0.5:
        site["place"] |= {"slope_pct": rng.randint(0, 90), "aspect_deg": rng.randint(0, 360)}
    site["whole_plot_searched"] = rng.random() < 0.2
    site["struck"] = ["implied"] if rng.random() < 0.1 else []
    site["digging"] = {"cleared": rng.choice(["lines", "hand", None, None])}
    return site


@pytest.fixture(scope="session")
def core_page(engine):
    """A page of real Chromium that can import the phone's key."""
    flags = ["--no-sandbox", "--disable-gpu", "--disable-quic"]
    browser = engine.chromium.launch(executable_path=shutil.which("chromium"), args=flags)
    page = browser.new_page()
    page.route(f"{HOST}**", serve_core)
    page.goto(HOST)
    yield page
    browser.close()


def serve_core(route):
    name = route.request.url.removeprefix(HOST)
    if not name:
        route.fulfill(content_type="text/html", body="<!doctype html><title>key</title>")
    else:
        script = (CORE / name).read_text(encoding="utf-8")
        route.fulfill(content_type="text/javascript", body=script)
