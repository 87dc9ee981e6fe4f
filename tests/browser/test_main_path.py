"""The main job on a phone without a signal: the right zone for known ground, and nothing lost."""

import json

from browser.helpers import Crew, key_site, known_site, records


def test_install_cut_answer_kill_and_find_again(browser, serve, demo_files, region, tmp_path):
    """All sixteen zones on one phone, after network and server are gone; then the browser is killed."""
    server = serve(demo_files)
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(server.address)
    phone.page.get_by_role("button", name="New site").wait_for()
    phone.page.evaluate("navigator.serviceWorker.ready.then(() => 0)")
    server.stop()
    phone.context.set_offline(True)
    phone.page.reload()
    phone.page.get_by_role("button", name="New site").wait_for()
    assert phone.page.evaluate("Boolean(navigator.serviceWorker.controller)")

    crew = Crew(phone, region, texts)
    ids = {zone.id: key_site(crew, known_site(region, zone.id), zone) for zone in region.zones}
    assert len(set(ids.values())) == 16
    phone.page.evaluate("location.hash = '#/sites'")
    phone.page.get_by_role("button", name="New site").wait_for()
    assert phone.errors == []
    phone.kill()

    again = browser.phone(tmp_path / "profile", offline=True)
    again.page.goto(server.address)
    again.page.get_by_role("button", name="New site").wait_for()
    listed = again.page.locator("main").inner_text()
    assert [zone.letter for zone in region.zones if f"Ground {zone.letter}" not in listed] == []
    kept = records(again.page)
    called = {
        zone: (kept[site]["call"]["verdict"], kept[site]["call"]["zone_id"])
        for zone, site in ids.items()
    }
    assert called == {zone.id: ("zone", zone.id) for zone in region.zones}
    last = region.zones[-1]
    again.page.goto(f"{server.address}#/site/{ids[last.id]}/zone")
    again.page.locator(".kept").wait_for()
    again.page.get_by_text(texts["zones"][last.id]["short"]).first.wait_for()
    assert again.errors == []


def test_a_phone_can_install_the_app(browser, site, tmp_path):
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(site.address)
    phone.page.get_by_role("button", name="New site").wait_for()
    session = phone.context.new_cdp_session(phone.page)
    assert session.send("Page.getInstallabilityErrors")["installabilityErrors"] == []
    manifest = session.send("Page.getAppManifest")
    assert manifest["errors"] == []
    assert json.loads(manifest["data"])["name"] == "Beltbook"
