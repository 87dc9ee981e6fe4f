"""The service worker: a version is on the phone whole or not at all, and waits for the person."""

import json

import pytest

from builder.site.app_files import APP
from builder.site.slim import slim_script
from builder.site.worker import worker_script

SHELL = ["index.html", "app/js/main.js", "app/a.css", "regions/r/pack.json", "words here.txt"]


def version(mark):
    """A small site whose every file says which version it belongs to, with the real worker."""
    files = {path: f"{path} of {mark}".encode() for path in SHELL}
    files["index.html"] = (
        f"<!doctype html><title>{mark}</title><h1>{mark}</h1>"
        '<script type="module" src="app/js/main.js"></script>'
    ).encode()
    for name in ("updates", "files", "faults"):
        script = (APP / "js" / "store" / f"{name}.js").read_text("utf-8")
        files[f"app/js/{name}.js"] = slim_script(script).encode()
    files["app/js/main.js"] = f"""
      import {{ watchVersions }} from './updates.js';
      window.told = [];
      document.documentElement.dataset.main = '{mark}';
      const tell = (name) => () => {{ window.told.push(name); document.documentElement.dataset.told = window.told.join(' '); }};
      window.versions = await watchVersions({{ onWaiting: tell('waiting'), onReplaced: tell('replaced'), onOffline: tell('offline') }});
    """.encode()
    files["regions/r/booklet.pdf"] = b"large and not kept"
    files["sw.js"] = worker_script((APP / "sw.js").read_text("utf-8"), files).encode()
    return files


@pytest.fixture
def phone(browser, tmp_path):
    return browser.phone(tmp_path / "profile")


def installed(phone, server):
    """Opens the site and waits until it works without a network."""
    phone.page.goto(server.address)
    phone.page.locator("html[data-told~=offline]").wait_for(state="attached")


def cut(phone, server):
    server.stop()
    phone.context.set_offline(True)


def mend(phone, server):
    server.start()
    phone.context.set_offline(False)


def title(phone):
    phone.page.reload()
    return phone.page.locator("h1").inner_text()


def texts(phone):
    """What the open page gets for every file of the shell."""
    return phone.page.evaluate(
        "async (paths) => Promise.all(paths.map(async (path) => (await fetch(path)).text()))",
        SHELL,
    )


def test_a_version_answers_after_network_and_server_are_gone(phone, serve):
    server = serve(version("one"))
    installed(phone, server)
    cut(phone, server)
    assert title(phone) == "one"
    assert texts(phone) == [version("one")[path].decode() for path in SHELL]
    phone.page.goto(server.address + "index.html?from=home#/sites")
    assert phone.page.locator("h1").inner_text() == "one"


def test_only_files_of_the_version_are_kept(phone, serve):
    server = serve(version("one"))
    installed(phone, server)
    kept = phone.page.evaluate(
        "async () => (await (await caches.open((await caches.keys())[0])).keys()).map((one) => one.url)"
    )
    listed = json.loads(version("one")["sw.js"].decode().split("\n")[0][len("const BUILD = ") : -1])
    assert len(kept) == len(listed["files"]) == len(SHELL) + 3
    assert not any("booklet" in url or "sw.js" in url for url in kept)


def test_a_new_version_waits_until_the_person_puts_it_to_use(phone, serve):
    server = serve(version("one"))
    installed(phone, server)
    asked = len(server.asked)
    server.source = version("two")
    phone.page.reload()
    phone.page.locator("html[data-told~=waiting]").wait_for(state="attached")
    assert phone.page.locator("h1").inner_text() == "one"
    assert title(phone) == "one"
    phone.page.locator("html[data-told~=waiting]").wait_for(state="attached")
    assert "app/js/updates.js" not in server.asked[asked:], (
        "what did not change is not fetched again"
    )
    cut(phone, server)
    assert title(phone) == "one"
    phone.page.locator("html[data-told~=waiting]").wait_for(state="attached")
    assert phone.page.evaluate("versions.use()") is True
    phone.page.locator("html[data-told~=replaced]").wait_for(state="attached")
    assert phone.page.locator("h1").inner_text() == "one", "an open page is not loaded again"
    assert title(phone) == "two"
    assert texts(phone) == [version("two")[path].decode() for path in SHELL]
    assert len(phone.page.evaluate("caches.keys()")) == 1


TRY_UPDATE = """async () => {
  const registration = await navigator.serviceWorker.ready;
  const seen = new Promise((resolve) => registration.addEventListener('updatefound', () => {
    const worker = registration.installing;
    worker.addEventListener('statechange', () => resolve(worker.state));
  }, { once: true }));
  await registration.update().catch(() => {});
  return seen;
}"""


def test_an_update_torn_at_any_file_leaves_the_old_version(phone, serve):
    """One phone, one try after another: Chromium takes 5 s over the first update of each phone."""
    old, new = version("one"), version("two")
    server = serve(old)
    installed(phone, server)
    tried = 0
    for path in [name for name in new if name not in ("sw.js", "regions/r/booklet.pdf")]:
        if old[path] == new[path]:
            continue
        for broken in (new[path][:-3], None):
            server.source = {**new, path: broken}
            assert phone.page.evaluate(TRY_UPDATE) == "redundant", path
            assert len(phone.page.evaluate("caches.keys()")) == 1
            assert texts(phone) == [old[name].decode() for name in SHELL]
            tried += 1
    assert tried == 2 * len(SHELL)
    cut(phone, server)
    assert title(phone) == "one"
    mend(phone, server)
    server.source = new
    phone.page.reload()
    phone.page.locator("html[data-told~=waiting]").wait_for(state="attached")


def test_an_unchanged_site_is_no_new_version(phone, serve):
    server = serve(version("one"))
    installed(phone, server)
    server.source = version("one")
    phone.page.evaluate("versions.check()")
    state = phone.page.evaluate(
        "async () => { const r = await navigator.serviceWorker.ready; return [r.installing, r.waiting]; }"
    )
    assert state == [None, None]
    assert phone.page.evaluate("told") == ["offline"]


def test_the_worker_stays_short():
    by_hand = (APP / "sw.js").read_text("utf-8").splitlines()
    assert len(by_hand) < 80
