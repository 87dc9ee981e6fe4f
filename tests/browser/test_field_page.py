"""field.html: the whole app in one file, opened from a stick without a server."""

import json

from browser.helpers import Crew, key_site, known_site, records


def on_stick(demo_files, folder):
    path = folder / "stick" / "field.html"
    path.parent.mkdir()
    path.write_bytes(demo_files["field.html"])
    return path.as_uri()


def test_the_single_file_keys_a_site_and_keeps_it(browser, demo_files, region, tmp_path):
    address = on_stick(demo_files, tmp_path)
    phone = browser.phone(tmp_path / "profile", offline=True)
    phone.page.goto(address)
    phone.page.get_by_role("button", name="New site").wait_for()
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    zone = region.zones[5]
    site_id = key_site(Crew(phone, region, texts), known_site(region, zone.id), zone)
    for tab in ("production", "reclaim"):
        phone.page.evaluate(f"location.hash = '#/site/{site_id}/{tab}'")
        phone.page.locator("main h2").first.wait_for()
    phone.page.evaluate("location.hash = '#/book'")
    phone.page.locator(".p-book").wait_for()
    assert phone.errors == []
    phone.kill()
    again = browser.phone(tmp_path / "profile", offline=True)
    again.page.goto(address)
    again.page.get_by_text(f"Ground {zone.letter}").wait_for()
    assert records(again.page)[site_id]["call"]["zone_id"] == zone.id
    assert again.errors == []


def test_where_a_file_viewer_stores_nothing_it_says_so(browser, demo_files, tmp_path):
    words = json.loads(demo_files["app/words/en.json"])["store"]
    phone = browser.phone(tmp_path / "profile", offline=True)
    phone.page.add_init_script("Object.defineProperty(window, 'indexedDB', { value: undefined })")
    phone.page.goto(on_stick(demo_files, tmp_path))
    phone.page.get_by_text(words["none"]).wait_for()
    assert phone.page.get_by_role("button", name="New site").count() == 0
