"""The browser is killed at random moments while a person taps: at most the last tap is lost.

Three times in a usual run; BELTBOOK_KILLS=200 is the full test.
"""

import os
import random
import threading

from browser.helpers import browser_process, records

KILLS = int(os.environ.get("BELTBOOK_KILLS", "3"))
LONGEST_S = 1.5  # a kill falls anywhere within so many seconds of tapping


def tap_until_killed(page, process, seconds):
    """Answers what is asked, as fast as the page takes it. Returns how many taps came back."""
    taps = 0
    timer = threading.Timer(seconds, os.kill, (process, 9))
    timer.start()
    try:
        while True:
            page.locator(".answer button.cover").first.click(timeout=5_000)
            taps += 1
    except Exception as error:
        if not any(word in str(error) for word in ("closed", "crashed", "Timeout")):
            raise
    timer.join()
    return taps


def answered(record):
    return len(record["findings"]) + len(record["questions"])


def test_a_killed_browser_loses_at_most_the_last_tap(browser, site, tmp_path):
    chance = random.Random(20260704)
    profile = tmp_path / "profile"
    lost, tapped = [], 0
    for _ in range(KILLS):
        phone = browser.phone(profile, service_workers="block")
        phone.page.goto(site.address)
        phone.page.get_by_role("button", name="New site").click()
        phone.page.wait_for_url("**/place")
        site_id = phone.page.url.split("/site/")[1].split("/")[0]
        phone.page.evaluate("location.hash = location.hash.replace('place', 'plants/next')")
        phone.page.locator(".answer button.cover").first.wait_for()
        taps = tap_until_killed(
            phone.page, browser_process(profile), chance.uniform(0.05, LONGEST_S)
        )
        phone.close()
        again = browser.phone(profile, service_workers="block")
        again.page.goto(site.address)
        again.page.get_by_role("button", name="New site").wait_for()
        stored = answered(records(again.page)[site_id])
        again.close()
        lost.append(taps - stored)
        tapped += taps
    assert tapped > KILLS, "the kills fell before anything was tapped"
    # A tap that was stored but whose return the kill cut off counts as minus one.
    assert max(lost) <= 1, f"taps lost at each kill: {lost}"
    assert min(lost) >= -1, f"more stored than tapped: {lost}"
