"""The upland on a phone: peat, ground water, growth that follows warmth, a rule by trajectory."""

import json
from pathlib import Path

import pytest
from browser.helpers import Browser, Server
from browser.test_screens import record, show

from builder.site.build import site_files
from builder.steps.building import compile_region
from builder.steps.checking import check_region

ROOT = Path(__file__).parent.parent.parent
ZONES = ("birchwood", "limegrass", "wetheath", "blanketbog", "valleymire", "streamside")
SITE = [
    "place", "plants", "zone", "production", "production/clip", "production/cover",
    "production/pit", "reclaim", "reclaim/order", "reclaim/test", "reclaim/topsoil",
]  # fmt: skip


def site_id(number):
    return f"c{number}000000-0000-4000-8000-000000000000"


@pytest.fixture(scope="module")
def app(engine, tmp_path_factory):
    """The app with the upland and one site check in each of six zones, warm by a degree and a half."""
    files = site_files([compile_region(check_region(ROOT / "keydata" / "ravenmoss_upland"))])
    server = Server(files)
    tables = json.loads(files["regions.json"])["regions"][0]
    rows = [
        record(
            tables, site_id(number), place={"height_m": 300}, disturbance=None,
            overruled={"zone_id": zone, "reason": "known ground"}, whole_plot_searched=True,
            production={"warmer_c": 1.5, "rain_source": "office", "measured_kg_ha": 2000},
        )
        for number, zone in enumerate(ZONES)
    ]  # fmt: skip
    path = tmp_path_factory.mktemp("upland") / "records.json"
    path.write_text(json.dumps({"format": 1, "kind": "beltbook records", "sites": rows}))
    here = Browser(engine)
    phone = here.phone(tmp_path_factory.mktemp("upland") / "profile")
    phone.page.goto(f"{server.address}#/hand")
    phone.page.locator("input[type=file]").set_input_files(path)
    phone.page.locator("[role=status] li").first.wait_for()
    yield phone
    here.put_away()
    server.stop()


def test_every_sheet_opens_in_every_zone_without_a_hole(app):
    seen = 0
    for number, zone in enumerate(ZONES):
        for page in SITE:
            show(app, f"site/{site_id(number)}/{page}")
            text = app.page.locator("main").inner_text()
            seen += 1
            assert "NaN" not in text, (zone, page)
            assert "undefined" not in text, (zone, page)
            assert app.errors == [], (zone, page)
    assert seen == len(ZONES) * len(SITE)


def test_peat_and_ground_water_make_the_year(app):
    show(app, f"site/{site_id(ZONES.index('blanketbog'))}/production")
    part = app.page.locator("section", has_text="The year here")
    part.locator("svg").wait_for()
    text = part.inner_text()
    assert "Ground water stands 8 cm down" in text
    assert "soil holds 99 mm" in text


def test_a_warm_year_moves_the_range_where_rain_moves_nothing(app):
    """Birch wood: normal 750, 4 % a degree, 1.5 degrees: 795, spread 0.5: 534 to 1,183."""
    show(app, f"site/{site_id(0)}/production")
    text = app.page.locator("main").inner_text()
    assert "534 to 1,183 kg/ha" in text
    field = app.page.get_by_label("Warmer than usual")
    field.fill("-2")
    app.page.get_by_text("464 to 1,027 kg/ha").wait_for()
    field.fill("40")
    assert "Type a number from" in app.page.get_by_role("alert").inner_text()
    field.fill("1.5")
    assert app.errors == []


def test_a_trajectory_is_read_by_years_since_the_work(app):
    """Blanket bog, year 4: bare peat at most half way between 30 and its line of year 5."""
    show(app, f"site/{site_id(ZONES.index('blanketbog'))}/reclaim/test")
    app.page.get_by_label("Full years since").fill("4")
    part = app.page.locator("section", has_text="Bare peat, %")
    part.get_by_role("textbox").fill("2 3 2 4")
    text = part.inner_text()
    assert "at most" in text
    assert "On course, mean 2.8" in text
    part.get_by_role("textbox").fill("90 92 95 91")
    assert "Off course, mean 92.0" in part.inner_text()
    assert app.errors == []
