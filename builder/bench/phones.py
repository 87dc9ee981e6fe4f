"""The app in a real browser whose processor is slowed six times, as a plain phone's is.

The slowing holds for the page, not for its service worker, which the browser runs apart.
"""

from __future__ import annotations

import functools
import http.server
import importlib.util
import json
import shutil
import threading
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import TYPE_CHECKING, Any

from builder.bench.measure import Goal, Measure, NotHere, Setting, Taken
from builder.bench.plots import region_plots
from builder.key.plots import Plots
from builder.site import SiteRegion, build_site
from builder.site.app_files import APP
from builder.steps.checking import region_of
from builder.tables import Region

if TYPE_CHECKING:
    from playwright.sync_api import ViewportSize

SLOWER = 6
BROWSERS = ("chromium", "chromium-browser", "google-chrome", "chrome")
FLAGS = ["--no-sandbox", "--disable-gpu", "--disable-background-networking", "--no-first-run"]
PHONE: ViewportSize = {"width": 390, "height": 844}
STARTED = "#app main button, #app main a.btn"
PATIENCE_MS = 60_000
ANSWERS = 12
ZONES_PLANTS = "40 zones x 400 plants"
WATCH = """
window.usable = new Promise((done) => {
  const look = () => {
    if (!document.querySelector('%s')) return;
    watching.disconnect();
    requestAnimationFrame(() => setTimeout(() => done(performance.now())));
  };
  const watching = new MutationObserver(look);
  watching.observe(document, { childList: true, subtree: true });
});
"""
TAP = """(at) => new Promise((done, fail) => {
  const head = () => document.querySelector('.told h2')?.textContent;
  const keys = document.querySelectorAll('.covers button, .grounds button');
  const key = keys[Math.min(at, keys.length - 1)];
  if (!key) { done(null); return; }
  const before = head();
  const start = performance.now();
  key.click();
  requestAnimationFrame(() => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => done({ ms: performance.now() - start, changed: head() !== before });
    port2.postMessage(0);
  });
})"""
SCORE = """async (text) => {
  const key = await import('/core/index.js');
  const { pack, sites } = JSON.parse(text);
  const timed = () => sites.map((site) => {
    const start = performance.now();
    key.call(pack, site);
    return performance.now() - start;
  });
  timed();
  timed();
  return timed();
}"""


@contextmanager
def _served(folder: Path) -> Iterator[str]:
    """A folder on loopback."""

    class Quiet(http.server.SimpleHTTPRequestHandler):
        def log_message(self, format: str, *args: Any) -> None:
            """The table is what people read."""

    handler = functools.partial(Quiet, directory=str(folder))
    with http.server.ThreadingHTTPServer(("127.0.0.1", 0), handler) as server:
        threading.Thread(target=server.serve_forever, args=(0.05,), daemon=True).start()
        yield f"http://127.0.0.1:{server.server_address[1]}/"
        server.shutdown()


def _browser_path() -> str:
    """The browser to run. NotHere without one, or without what drives it."""
    if importlib.util.find_spec("playwright") is None:
        raise NotHere('playwright is not installed: pip install "beltbook[test]"')
    path = next((found for name in BROWSERS if (found := shutil.which(name))), None)
    if path is None:
        raise NotHere("chromium is not installed")
    return path


@contextmanager
def _phone() -> Iterator[Any]:
    """A page of a fresh browser."""
    path = _browser_path()
    from playwright.sync_api import Error, sync_playwright

    with sync_playwright() as play:
        try:
            browser = play.chromium.launch(executable_path=path, args=FLAGS)
            page = browser.new_context(viewport=PHONE, has_touch=True).new_page()
            page.set_default_timeout(PATIENCE_MS)
            yield page
            browser.close()
        except Error as error:
            raise NotHere(f"the browser gave up: {error.message.splitlines()[0]}") from None


def _slow(page: Any) -> None:
    session = page.context.new_cdp_session(page)
    session.send("Emulation.setCPUThrottlingRate", {"rate": SLOWER})


def _written(setting: Setting, name: str, region: SiteRegion) -> Path:
    out = setting.folder / "phone" / name
    if not out.is_dir():
        build_site([region], out)
    return out


def usable(setting: Setting) -> Taken:
    """From the tap on the icon until the first page stands and can be tapped, all from cache."""
    _browser_path()
    out = _written(setting, "demo", setting.demo_site)
    with _phone() as page, _served(out) as address:
        page.add_init_script(WATCH % STARTED)
        page.goto(address)
        page.wait_for_selector(STARTED)
        page.evaluate("navigator.serviceWorker.ready.then(() => 0)")
        page.reload()
        page.evaluate("window.usable")
        assert page.evaluate("Boolean(navigator.serviceWorker.controller)"), "not from cache"
        _slow(page)
        taken = []
        for _ in range(setting.runs(7)):
            page.reload(wait_until="commit")
            taken.append(float(page.evaluate("window.usable")))
    return Taken(tuple(taken), None, f"{SLOWER} times slower, demo region, reloaded from cache.")


def answer_to_paint(setting: Setting) -> Taken:
    """From the tap on an answer until the next prompt is painted, 40 zones x 400 plants."""
    _browser_path()
    out = _written(setting, "large", setting.large_site)
    region = region_of(setting.large_checked)
    with _phone() as page, _served(out) as address:
        page.goto(address)
        page.locator(STARTED).first.wait_for()
        page.evaluate("location.hash = '#/sites'")
        page.get_by_role("button", name="New site").click()
        page.wait_for_url("**/place")
        root = page.url.removesuffix("/place")
        for plant in _leading(region, 3):
            page.evaluate("(hash) => { location.hash = hash; }",
                          f"#{root.partition('#')[2]}/plants/name/{plant}")  # fmt: skip
            page.locator(".covers button").nth(1).click()
            page.wait_for_url("**/plants")
        page.locator(".told h2").first.wait_for()
        _slow(page)
        taken = []
        for turn in range(ANSWERS if not setting.quick else 4):
            tapped = page.evaluate(TAP, 2 if turn % 4 == 3 else 0)
            if tapped is None:
                break
            assert tapped["changed"], "the page did not change after an answer"
            taken.append(float(tapped["ms"]))
            page.wait_for_timeout(300)
    note = f"{SLOWER} times slower, {ZONES_PLANTS}, one run an answer, up to a frame's wait in it."
    return Taken(tuple(taken), None, note)


def _leading(region: Region, count: int) -> list[str]:
    """Plants that cover most in the first zone."""
    zone = region.zones[0].id
    held = [(one.cover_pct or 0.0, p) for (z, p), one in region.occurrence.items() if z == zone]
    return [plant for _, plant in sorted(held, reverse=True)[:count]]


def scoring(setting: Setting) -> Taken:
    """A whole call: belief, verdict, reasons and the ranking of every prompt, 40 x 400."""
    _browser_path()
    region = region_of(setting.large_checked)
    plots, _ = region_plots(region, setting.size(60, 12))
    pack = json.loads(setting.large_site.pack)
    given = json.dumps({"pack": pack, "sites": _sites(region, plots)})
    with _phone() as page, _served(APP / "js") as address:
        page.goto(f"{address}core/")
        _slow(page)
        made = page.evaluate(SCORE, given)
    note = f"{SLOWER} times slower, {ZONES_PLANTS}, one run a site, reasons included."
    return Taken(tuple(made), None, note)


def _sites(region: Region, plots: Plots) -> list[dict[str, Any]]:
    """Site checks with three to fourteen answers each."""
    code = region.cover_scale.classes[1].code
    sites = []
    for at in range(len(plots)):
        rows: list[dict[str, Any]] = []
        found = [p for p, step in enumerate(plots.steps[at]) if step >= 0][: 3 + at % 12]
        for turn, p in enumerate(found):
            plant = region.plant_ids[p]
            named = turn + 1 if turn < 3 else None
            rows.append({"plant_id": plant, "state": "found", "cover": code, "named": named})
        sites.append({"month": 7, "findings": rows, "questions": {}, "place": {}})
    return sites


MEASURES = (
    Measure("phone-usable", "App usable from cache, 6 times slower", "ms", usable, Goal(600)),
    Measure("phone-answer", "Answer to paint, 6 times slower", "ms", answer_to_paint, Goal(50),
            worst=Goal(100)),
    Measure("phone-scoring", "Scoring and ranking, 6 times slower", "ms", scoring, Goal(5)),
)  # fmt: skip
