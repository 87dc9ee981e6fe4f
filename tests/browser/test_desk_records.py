"""The desk's pages of records in a real browser: accessible by day and night, nothing off the page."""

import shutil
import threading
from pathlib import Path

import pytest
from helpers import three_zone_files, write_region
from waitress import create_server

from builder.desk.application import Settings, create_app
from builder.records.exchange import Records
from builder.records.store import RecordStore
from tests.records.helpers import CALL, found, record

QUIET = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-sync"]
LIST = "/r/willow_breaks/records"
PAGES = (LIST, f"{LIST}?only=open", f"{LIST}/map", f"{LIST}/one/a1", f"{LIST}/phones")


@pytest.fixture
def desk(tmp_path):
    """Address of a running desk that holds a few records, one of them in two versions."""
    write_region(tmp_path / "keydata" / "willow_breaks", three_zone_files())
    app = create_app(Settings(tmp_path, tmp_path / "site_out"))
    keeping = app.extensions["records"]
    one = record(findings=[found("blue_grama", "2")], call={**CALL, "verdict": "edge"})
    far = {**one["place"], "latitude_deg": 45.9, "longitude_deg": -108.1}
    sides = [{**one, "edits": {"p": 1}}, {**one, "edits": {"q": 1}, "notes": "x" * 300}]
    many = [record(id=f"s{n}", name=f"Stop {n}", place=far) for n in range(60)]
    RecordStore(keeping.database()).take_in(Records(sites=[*sides, *many]))
    server = create_server(app, host="127.0.0.1", port=0, threads=4)
    thread = threading.Thread(target=server.run, daemon=True)
    thread.start()
    yield f"http://127.0.0.1:{server.effective_port}"
    server.close()
    thread.join(10)
    keeping.close()


@pytest.fixture
def chromium(engine):
    started = engine.chromium.launch(executable_path=shutil.which("chromium"), args=QUIET)
    yield started
    started.close()


@pytest.mark.parametrize("mode", ["light", "dark"])
def test_pages_of_records_are_accessible_and_fit(desk, chromium, mode):
    script = (Path(__file__).parents[2] / "node_modules/axe-core/axe.min.js").read_text("utf-8")
    context = chromium.new_context(color_scheme=mode, bypass_csp=True)
    page = context.new_page()
    for path in PAGES:
        for width in (1280, 700):
            page.set_viewport_size({"width": width, "height": 800})
            page.goto(desk + path)
            assert page.evaluate("document.documentElement.scrollWidth - innerWidth") <= 0, path
        page.evaluate(script)
        found = page.evaluate("axe.run().then((said) => said.violations.map((one) => one.id))")
        assert found == [], path
    context.close()


def test_a_call_is_found_on_the_map_and_corrected(desk, chromium):
    page = chromium.new_page(viewport={"width": 1280, "height": 800})
    complaints = []
    page.on("console", lambda said: complaints.append(said.text) if said.type == "error" else None)
    page.goto(f"{desk}{LIST}/map?only=open")
    page.locator(".map a").first.focus()
    page.keyboard.press("Enter")
    page.locator("tbody a").first.click()
    page.get_by_label("Your name").fill("Ana Ruiz")
    page.get_by_label("Why").fill("Pines stand on the rim.")
    page.get_by_label("Zone, where you correct").select_option("breaks")
    page.get_by_role("button", name="Correct it").click()
    page.get_by_text("Ana Ruiz set Pine breaks").wait_for()
    page.goto(f"{desk}{LIST}?only=open")
    assert "No record is like that." in page.locator("main").inner_text()
    assert complaints == []
