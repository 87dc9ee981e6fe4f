"""Nothing leaves for another host: every request that is not loopback would pass a proxy that listens."""

import socketserver
import threading

import pytest

# Chromium's own errands, made over a blank page or at the sight of a form; the site names no host
# (tests/site/test_build.py looks for addresses in every file).
BROWSERS_OWN = (".googleapis.com:443", ".google.com:443", ".googleapis.com/", ".google.com/")


class Listener(socketserver.ThreadingTCPServer):
    """A proxy that answers nothing and remembers who was asked for."""

    daemon_threads = True
    allow_reuse_address = True

    def __init__(self):
        self.asked = []
        super().__init__(("127.0.0.1", 0), Note)


class Note(socketserver.StreamRequestHandler):
    def handle(self):
        self.server.asked.append(self.rfile.readline().decode("latin-1").strip())


@pytest.fixture
def listener():
    server = Listener()
    threading.Thread(target=server.serve_forever, args=(0.05,), daemon=True).start()
    yield server
    server.shutdown()
    server.server_close()


def watched(browser, listener, profile):
    return browser.phone(
        profile, flags=[f"--proxy-server=http://127.0.0.1:{listener.server_address[1]}"]
    )


def test_no_request_leaves_for_another_host(browser, listener, site, demo_files, tmp_path):
    phone = watched(browser, listener, tmp_path / "profile")
    page = phone.page
    page.goto(site.address)
    page.get_by_role("button", name="New site").wait_for()
    page.evaluate("navigator.serviceWorker.ready.then(() => 0)")
    page.get_by_role("button", name="New site").click()
    page.wait_for_url("**/place")
    for tab in ("plants", "zone", "production", "reclaim"):
        page.locator(f"nav a[href$='/{tab}']").first.click()
        page.wait_for_url(f"**/{tab}")
        page.locator("main").first.wait_for()
    for name in ("sites", "book", "hand", "setup"):
        page.evaluate(f"location.hash = '#/{name}'")
        page.locator(f".p-{name}").wait_for()
    books = [path for path in demo_files if "/book/" in path]
    assert len(books) > 20
    for path in books:
        page.goto(site.address + path)
    page.goto(site.address + "field.html")
    page.get_by_role("button", name="New site").wait_for()
    assert phone.errors == []
    assert [line for line in listener.asked if not any(own in line for own in BROWSERS_OWN)] == []


def test_a_request_to_another_host_would_be_heard(browser, listener, tmp_path):
    phone = watched(browser, listener, tmp_path / "profile")
    with pytest.raises(Exception, match="ERR_"):
        phone.page.goto("http://beltbook.invalid/")
    assert any("beltbook.invalid" in line for line in listener.asked)
