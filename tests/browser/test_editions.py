"""New tables on a phone with records: they wait, the person decides, old records keep their digits."""

import hashlib
import json
import re
import shutil

import pytest
from browser.helpers import Crew, key_site, known_site, records

from builder.site.build import site_files
from builder.steps.building import compile_region
from builder.steps.checking import check_region


@pytest.fixture(scope="module")
def next_files(request, tmp_path_factory):
    """The demo site with edition 2: one plant of one zone moved from common to rare."""
    folder = tmp_path_factory.mktemp("next") / "sorrel_plateau"
    shutil.copytree(request.config.rootpath / "keydata" / "sorrel_plateau", folder)
    head = folder / "region.yaml"
    text, n = re.subn(r"(?m)^edition: .*$", 'edition: "2"', head.read_text("utf-8"))
    assert n == 1
    head.write_text(text, "utf-8")
    table = folder / "occurrence.yaml"
    text, n = re.subn(r"mtnsage: \[9\d, ", "mtnsage: [40, ", table.read_text("utf-8"), count=1)
    assert n == 1
    table.write_text(text, "utf-8")
    checked = check_region(folder)
    assert not checked.stops, checked.problems
    return site_files([compile_region(checked)])


def hash_of(files):
    return json.loads(files["regions.json"])["regions"][0]["pack"]["hash"]


def zone_page(page, address, site_id):
    """What the Zone page of a record says."""
    page.goto(f"{address}#/site/{site_id}/zone")
    page.locator(".kept").wait_for()
    return page.locator("main").inner_text()


def to_setup(page):
    page.evaluate("location.hash = '#/setup'")
    page.locator(".p-setup").wait_for()


def test_new_tables_wait_and_old_records_keep_their_digits(
    browser, serve, demo_files, next_files, region, tmp_path
):
    old, new = hash_of(demo_files), hash_of(next_files)
    assert old != new
    server = serve(demo_files)
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    phone = browser.phone(tmp_path / "profile")
    page = phone.page
    page.goto(server.address)
    page.get_by_role("button", name="New site").wait_for()
    page.evaluate("navigator.serviceWorker.ready.then(() => 0)")
    crew = Crew(phone, region, texts)
    zone = next(zone for zone in region.zones if zone.id == "mtnsage")
    site_id = key_site(crew, known_site(region, "mtnsage"), zone)
    before = zone_page(page, server.address, site_id)

    server.source = next_files
    page.reload()
    page.locator(".kept").wait_for()
    to_setup(page)
    page.get_by_role("button", name="Use it now").wait_for()
    assert zone_page(page, server.address, site_id) == before, "an open record is left alone"

    to_setup(page)
    with page.expect_navigation():
        page.get_by_role("button", name="Use it now").click()
    page.locator(".p-setup").wait_for()
    assert zone_page(page, server.address, site_id) == before, (
        "the new program, still the old tables"
    )
    to_setup(page)
    with page.expect_navigation():
        page.get_by_role("button", name="Use the new edition").click()
    page.locator(".p-setup").wait_for()
    page.evaluate("location.hash = '#/sites'")
    page.get_by_text("edition 2").wait_for()
    assert zone_page(page, server.address, site_id) == before, "the edition that scored it"

    fresh = key_site(crew, known_site(region, "mtnsage"), zone)
    kept = records(page)
    assert (kept[site_id]["pack_hash"], kept[site_id]["edition"]) == (old, "1")
    assert (kept[fresh]["pack_hash"], kept[fresh]["edition"]) == (new, "2")
    assert kept[fresh]["call"]["belief"] != kept[site_id]["call"]["belief"]
    assert phone.errors == []


def test_a_phone_that_answers_otherwise_keeps_the_old_tables_and_says_so(
    browser, serve, demo_files, next_files, tmp_path
):
    """The pack's own probes are given other answers, as if this phone computed differently."""
    wrong = dict(next_files)
    pack = json.loads(wrong["regions/sorrel_plateau/pack.json"])
    answer = pack["probes"][0]["answer"]
    answer["belief"][0] = round(answer["belief"][0] + 0.25, 6)
    content = json.dumps(pack).encode()
    listed = json.loads(wrong["regions.json"])
    wrong.update(offer_of(listed, content))

    server = serve(demo_files)
    phone = browser.phone(tmp_path / "profile", service_workers="block")
    phone.page.goto(server.address)
    phone.page.get_by_text("edition 1").wait_for()
    server.source = wrong
    phone.page.reload()
    phone.page.get_by_text("edition 1").wait_for()
    to_setup(phone.page)
    phone.page.locator("p.care").wait_for()
    assert "gave other answers on this phone" in phone.page.locator("p.care").inner_text()

    first_time = browser.phone(tmp_path / "other", service_workers="block")
    first_time.page.goto(server.address)
    first_time.page.get_by_text("calls are refused").first.wait_for()


def offer_of(listed, content):
    """regions.json and pack.json for other bytes of the pack."""
    digest = hashlib.sha256(content).hexdigest()
    listed["regions"][0]["pack"].update(sha256=digest, hash=digest[:16])
    return {
        "regions.json": json.dumps(listed).encode(),
        "regions/sorrel_plateau/pack.json": content,
    }
