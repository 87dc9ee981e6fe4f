"""The Book can be read with scripts off, and leads from page to page."""

import posixpath
import re
from pathlib import Path

import pytest


def test_the_first_page_without_script_leads_to_every_book_page(
    browser, site, demo_files, tmp_path
):
    phone = browser.phone(tmp_path / "profile", java_script_enabled=False)
    page = phone.page
    page.goto(site.address)
    page.get_by_role("link", name="Sorrel Plateau").click()
    page.wait_for_url("**/book/index.html")
    assert page.locator("h1").inner_text() == "Sorrel Plateau"
    assert "Invented district" in page.locator("footer").inner_text()
    reached, waiting = set(), ["regions/sorrel_plateau/book/index.html"]
    while waiting:
        path = waiting.pop()
        if path in reached:
            continue
        reached.add(path)
        for link in re.findall(r'href="([^"#]+)', demo_files[path].decode()):
            target = posixpath.normpath(posixpath.join(posixpath.dirname(path), link))
            assert target in demo_files or target.endswith("/booklet.pdf"), (
                f"{path} leads to {target}"
            )
            if "/book/" in target:
                waiting.append(target)
    assert reached == {path for path in demo_files if "/book/" in path and "/book/es/" not in path}
    assert len(reached) > 30
    assert phone.errors == []


def test_a_zone_page_says_what_the_tables_say(browser, site, region, demo_files, tmp_path):
    page = browser.phone(tmp_path / "profile", java_script_enabled=False).page
    for zone in region.zones:
        page.goto(f"{site.address}regions/sorrel_plateau/book/zone-{zone.id}.html")
        said = page.locator("main").inner_text()
        assert zone.name in said
        assert zone.one_line in said
        assert zone.why_here in said
    page.goto(f"{site.address}regions/sorrel_plateau/book/cautions.html")
    said = page.locator("main").inner_text()
    deadly = [
        p
        for p in region.plants
        if any(c.who == "people" and c.level == "deadly" for c in p.cautions)
    ]
    assert len(deadly) > 0
    for plant in deadly:
        assert plant.common in said


def test_book_pages_fit_a_narrow_phone(browser, site, demo_files, tmp_path):
    page = browser.phone(tmp_path / "profile", viewport={"width": 320, "height": 640}).page
    wide = []
    for path in [path for path in demo_files if "/book/" in path]:
        page.goto(site.address + path)
        if page.evaluate("document.documentElement.scrollWidth") > 320:
            wide.append(path)
    assert wide == []


AXE = Path(__file__).parent.parent.parent / "node_modules" / "axe-core" / "axe.min.js"
KINDS = ("index", "zone-mtnsage", "plants-succulent", "chart", "ground", "help", "cautions")


@pytest.mark.parametrize("mode", ["day", "night", "sun"])
def test_book_pages_are_open_to_everyone(browser, site, tmp_path, mode):
    """Every rule by day; by night and in the sun only colours differ, and their contrast."""
    page = browser.phone(tmp_path / "profile").page
    page.add_init_script(f"localStorage.setItem('beltbook.settings', '{{\"mode\": \"{mode}\"}}')")
    rules = "{}" if mode == "day" else "{ runOnly: ['color-contrast'] }"
    found, passed = {}, 0
    for kind in KINDS:
        page.goto(f"{site.address}regions/sorrel_plateau/book/{kind}.html")
        assert page.locator("html").get_attribute("data-mode") == mode
        page.evaluate(AXE.read_text("utf-8"))
        told = page.evaluate(f"axe.run({rules})")
        passed += len(told["passes"])
        found[kind] = [(one["id"], one["nodes"][0]["html"][:120]) for one in told["violations"]]
    assert passed >= len(KINDS)
    assert {kind: faults for kind, faults in found.items() if faults} == {}
