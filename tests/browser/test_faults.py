"""Storage faults reach the person in words, and what was entered stays on the screen."""

import json
from secrets import token_hex

import pytest
from browser.helpers import records


@pytest.fixture
def words(demo_files):
    return json.loads(demo_files["app/words/en.json"])["store"]


@pytest.fixture
def page(browser, site, tmp_path):
    """A new site check, open at its Place."""
    phone = browser.phone(tmp_path / "profile", service_workers="block")
    phone.page.goto(site.address)
    phone.page.get_by_role("button", name="New site").click()
    phone.page.wait_for_url("**/place")
    phone.page.get_by_label("Notes").fill("before")
    phone.page.keyboard.press("Tab")
    return phone.page


def write(page, text):
    page.get_by_label("Notes").fill(text)
    page.keyboard.press("Tab")


def notes(page):
    [record] = records(page).values()
    return record["notes"]


def told(page, text):
    page.locator("[role=alert]").get_by_text(text).wait_for()


def test_an_aborted_change_is_told_and_kept_with_the_next(page, words):
    page.evaluate(
        """() => {
          const put = IDBObjectStore.prototype.put;
          IDBObjectStore.prototype.put = function failing(...row) {
            IDBObjectStore.prototype.put = put;
            const request = put.apply(this, row);
            this.transaction.abort();
            return request;
          };
        }"""
    )
    write(page, "aborted")
    told(page, words["aborted"])
    assert page.get_by_label("Notes").input_value() == "aborted"
    assert notes(page) == "before"
    write(page, "and again")
    page.locator("[role=alert]").wait_for(state="detached")
    assert notes(page) == "and again"


def test_a_lost_connection_is_told_and_mended(page, words):
    page.evaluate(
        """() => {
          window.transaction = IDBDatabase.prototype.transaction;
          IDBDatabase.prototype.transaction = () => { throw new DOMException('gone', 'InvalidStateError'); };
        }"""
    )
    write(page, "lost")
    told(page, words["lost"])
    page.evaluate("() => { IDBDatabase.prototype.transaction = window.transaction; }")
    write(page, "found")
    page.locator("[role=alert]").wait_for(state="detached")
    assert notes(page) == "found"


FILL = """async () => {
  const db = await new Promise((resolve) => {
    const open = indexedDB.open('beltbook-records');
    open.onsuccess = () => resolve(open.result);
  });
  for (let n = 0; n < 500; n += 1) {
    const bytes = crypto.getRandomValues(new Uint8Array(20000)).buffer;
    const full = await new Promise((resolve) => {
      const tx = db.transaction('photos', 'readwrite');
      tx.objectStore('photos').put({ id: `fill ${Math.random()}`, site_id: 'none', bytes });
      tx.oncomplete = () => resolve(false);
      tx.onabort = () => resolve(true);
    });
    if (full) { db.close(); return n; }
  }
  return -1;
}"""


def test_a_full_phone_is_told_first_in_time_then_in_earnest(browser, site, words, tmp_path):
    """The limit is the browser's own. The reserve goes first; then nothing is kept, and it says so."""
    phone = browser.phone(tmp_path / "full", service_workers="block")
    page = phone.page
    page.goto(site.address + "regions.json")
    session = page.context.new_cdp_session(page)
    origin = page.evaluate("location.origin")
    session.send("Storage.overrideQuotaForOrigin", {"origin": origin, "quotaSize": 4_000_000})
    page.goto(site.address)
    page.get_by_role("button", name="New site").click()
    page.wait_for_url("**/place")
    page.locator("html").evaluate("() => navigator.storage.persisted()")
    page.wait_for_timeout(500)  # the reserve is laid down after the first page shows
    assert page.evaluate(FILL) > 10
    write(page, token_hex(80_000))
    told(page, words["little_room"])
    assert len(notes(page)) == 160_000
    assert page.evaluate(FILL) >= 0
    kept = notes(page)
    write(page, token_hex(90_000))
    told(page, words["full"])
    assert notes(page) == kept
    session.send("Storage.overrideQuotaForOrigin", {"origin": origin})
    write(page, "room again")
    page.locator("[role=alert]").wait_for(state="detached")
    assert notes(page) == "room again"


def test_two_tabs_on_one_record_are_told_and_both_kept(page, words):
    other = page.context.new_page()
    other.goto(page.url)
    other.get_by_label("Notes").wait_for()
    assert other.get_by_label("Notes").input_value() == "before"
    write(page, "from one tab")
    page.wait_for_timeout(100)
    write(other, "from the other")
    told(other, words["conflict"])
    assert notes(page) == "from one tab"
    other.evaluate("location.hash = '#/hand'")
    other.locator(".p-hand").wait_for()
    both = other.locator("main")
    both.get_by_text("both").first.wait_for()
    assert "from" in notes(page)


def test_where_nothing_can_be_stored_the_page_says_so(browser, site, words, tmp_path):
    phone = browser.phone(tmp_path / "other", service_workers="block")
    phone.page.add_init_script("Object.defineProperty(window, 'indexedDB', { value: undefined })")
    phone.page.goto(site.address)
    phone.page.get_by_text(words["none"]).wait_for()


def test_a_photo_outlives_a_browser_killed_behind_the_camera(browser, site, tmp_path):
    profile = tmp_path / "profile"
    phone = browser.phone(profile, service_workers="block")
    phone.page.goto(site.address)
    phone.page.get_by_role("button", name="New site").click()
    phone.page.wait_for_url("**/place")
    address = phone.page.url
    phone.page.get_by_label("Notes").fill("typed before the camera")
    picture = phone.page.screenshot(type="jpeg", clip={"x": 0, "y": 0, "width": 200, "height": 100})
    chooser = phone.page.locator("input[type=file][accept^='image']")
    chooser.set_input_files({"name": "a.jpg", "mimeType": "image/jpeg", "buffer": picture})
    phone.page.locator(".photos img").wait_for()
    phone.kill()
    again = browser.phone(profile, service_workers="block")
    again.page.goto(address)
    again.page.locator(".photos img").wait_for()
    assert again.page.get_by_label("Notes").input_value() == "typed before the camera"
