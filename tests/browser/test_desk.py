"""The desk in a real browser: by keyboard, with problems beside the cell, under its strict policy."""

import shutil
import threading
from pathlib import Path

import pytest
from helpers import three_zone_files, write_region
from waitress import create_server

from builder.desk.application import Settings, create_app

QUIET = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-sync"]
OCCURRENCE = "keydata/willow_breaks/occurrence.yaml"
GRID = "/r/willow_breaks/tables/occurrence"
CELL = '[data-key="occurrence/blue_grama/prairie"]'


@pytest.fixture
def desk(tmp_path):
    """Address of a running desk on the three-zone region in tmp_path."""
    write_region(tmp_path / "keydata" / "willow_breaks", three_zone_files())
    app = create_app(Settings(tmp_path, tmp_path / "site_out"))
    server = create_server(app, host="127.0.0.1", port=0, threads=4)
    thread = threading.Thread(target=server.run, daemon=True)
    thread.start()
    yield f"http://127.0.0.1:{server.effective_port}"
    server.close()
    thread.join(10)


@pytest.fixture
def page(engine):
    """A wide page; anything the browser complains about fails the test."""
    chromium = engine.chromium.launch(executable_path=shutil.which("chromium"), args=QUIET)
    here = chromium.new_page(viewport={"width": 1280, "height": 800})
    complaints = []
    here.on("console", lambda said: complaints.append(said.text) if said.type == "error" else None)
    here.on("pageerror", lambda error: complaints.append(str(error)))
    yield here
    chromium.close()
    # a refused save answers 409, which the browser logs; nothing else may be there
    assert [text for text in complaints if "409" not in text] == []


def text_of(tmp_path):
    return (tmp_path / OCCURRENCE).read_text(encoding="utf-8")


def test_a_cell_is_changed_saved_and_taken_back_by_keyboard_alone(desk, page, tmp_path):
    before = text_of(tmp_path)
    page.goto(desk + GRID)
    page.locator(CELL).focus()
    page.keyboard.type("64 6")
    page.keyboard.press("Enter")
    assert page.locator(CELL).inner_text().split() == ["64", "6"]
    assert page.locator("[data-save-cells]").inner_text() == "Save, 1"
    assert page.locator(":focus").get_attribute("data-key") == "occurrence/little_bluestem/prairie"
    page.locator("[data-save-cells]").focus()
    page.keyboard.press("Enter")
    page.locator("[data-undo] button:not([disabled])").wait_for()
    assert text_of(tmp_path) == before.replace("prairie: [90, 18]", "prairie: [64, 6]", 1)
    page.locator("[data-undo] button").focus()
    page.keyboard.press("Enter")
    page.locator(".note").wait_for()
    assert text_of(tmp_path) == before


def test_a_wrong_value_is_told_beside_the_cell_before_it_is_saved(desk, page, tmp_path):
    before = text_of(tmp_path)
    page.goto(desk + GRID)
    page.locator(CELL).focus()
    page.keyboard.type("140 6")
    page.locator("[data-cell-wrong]", has_text="140").wait_for()
    page.keyboard.press("Escape")
    assert page.locator(CELL).inner_text().split() == ["90", "18"]
    assert page.locator("[data-save-cells]").is_disabled()
    assert text_of(tmp_path) == before


def test_cells_pasted_from_a_spreadsheet_fill_a_block(desk, page, tmp_path):
    page.goto(desk + GRID)
    page.locator(CELL).focus()
    page.evaluate(
        """() => {
          const data = new DataTransfer();
          data.setData('text/plain', '11 1\\t12 2\\r\\n21 1\\t22 2\\r\\n');
          document.activeElement.dispatchEvent(
            new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
        }"""
    )
    assert page.locator("[data-save-cells]").inner_text() == "Save, 4"
    page.locator("[data-save-cells]").click()
    page.locator("[data-undo] button:not([disabled])").wait_for()
    assert "blue_grama: {prairie: [11, 1], breaks: [12, 2]}" in text_of(tmp_path)
    assert "little_bluestem: {prairie: [21, 1], breaks: [22, 2]}" in text_of(tmp_path)


def test_the_second_person_is_told_at_the_cell(desk, page, tmp_path):
    page.goto(desk + GRID)
    path = tmp_path / OCCURRENCE
    path.write_text(text_of(tmp_path).replace("prairie: [90, 18]", "prairie: [70, 9]"), "utf-8")
    page.locator(CELL).focus()
    page.keyboard.type("64 6")
    page.keyboard.press("Enter")
    page.locator("[data-save-cells]").click()
    page.locator(f'{CELL}[aria-invalid="true"]').wait_for()
    page.locator(CELL).focus()
    page.locator("[data-cell-wrong]", has_text="Somebody else made this 70 9").wait_for()
    assert "prairie: [70, 9]" in text_of(tmp_path)


def test_a_form_tells_a_problem_as_it_is_typed_and_works_without_script(desk, page, tmp_path):
    page.goto(f"{desk}/r/willow_breaks/tables/zones/zones/0")
    page.locator('[data-key="zones/0/centre_m"]').fill("high")
    page.locator('output[data-for="zones/0/centre_m"]', has_text="high").wait_for()
    context = page.context.browser.new_context(java_script_enabled=False)
    plain = context.new_page()
    plain.goto(f"{desk}/r/willow_breaks/tables/zones/zones/0")
    plain.locator('[data-key="zones/0/centre_m"]').fill("1080")
    plain.locator("[data-save]").click()
    assert "1 change saved." in plain.locator(".note").inner_text()
    assert "centre_m: 1080" in (tmp_path / "keydata/willow_breaks/zones.yaml").read_text()
    plain.locator('[data-key="zones/0/centre_m"]').fill("1090")
    with plain.expect_navigation():
        plain.keyboard.press("Enter")  # saves, whatever other buttons stand in the form
    assert "1 change saved." in plain.locator(".note").inner_text()
    assert "centre_m: 1090" in (tmp_path / "keydata/willow_breaks/zones.yaml").read_text()
    context.close()


@pytest.mark.parametrize("mode", ["light", "dark"])
def test_the_accessibility_checker_finds_nothing(desk, page, mode):
    """axe-core, a general checker for web pages, on each kind of page."""
    script = (Path(__file__).parents[2] / "node_modules/axe-core/axe.min.js").read_text("utf-8")
    context = page.context.browser.new_context(color_scheme=mode, bypass_csp=True)
    there = context.new_page()
    region = "/r/willow_breaks"
    for path in (
        "/", "/start", f"{region}/", GRID, f"{region}/tables/zones", f"{region}/tables/region",
        f"{region}/tables/zones/zones/0", f"{region}/tables/climate", f"{region}/proof",
        f"{region}/build", f"{region}/editions", f"{region}/sheets", f"{region}/problems",
    ):  # fmt: skip
        there.goto(desk + path)
        there.evaluate(script)
        found = there.evaluate("axe.run().then((said) => said.violations.map((one) => one.id))")
        assert found == [], path
    context.close()


@pytest.mark.parametrize("mode", ["light", "dark"])
@pytest.mark.parametrize("width", [1280, 700])
def test_nothing_runs_off_the_page_in_day_and_night(desk, page, mode, width):
    page.emulate_media(color_scheme=mode)
    page.set_viewport_size({"width": width, "height": 800})
    for path in ("/", "/r/willow_breaks/", GRID, "/r/willow_breaks/tables/zones", "/start"):
        page.goto(desk + path)
        assert page.evaluate("document.documentElement.dataset.mode") == (
            "night" if mode == "dark" else "day"
        )
        assert page.evaluate("document.documentElement.scrollWidth - innerWidth") <= 0, path
        assert page.evaluate("document.fonts.check('16px \"Source Sans 3\"')")
