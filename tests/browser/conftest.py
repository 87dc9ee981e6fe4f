"""A small web server and a phone to hold: the built site on loopback, Debian's Chromium beside it.

    site      address of the demo site, built once from the tables in keydata/
    serve     serve(folder_or_files) -> Server, for tests that change what is served
    browser   browser.phone(profile) -> Phone: one browser process with a profile that outlives it
"""

from __future__ import annotations

import hashlib
import http.server
import os
import shutil
import signal
import threading
from pathlib import Path
from urllib.parse import unquote, urlsplit

import pytest

ROOT = Path(__file__).parent.parent.parent
DEMO = "sorrel_plateau"
TYPES = {
    ".html": "text/html; charset=utf-8",
    ".js": "text/javascript; charset=utf-8",
    ".css": "text/css; charset=utf-8",
    ".json": "application/json",
    ".webmanifest": "application/manifest+json",
    ".svg": "image/svg+xml",
    ".png": "image/png",
    ".woff2": "font/woff2",
}
FLAGS = [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
]


class Handler(http.server.BaseHTTPRequestHandler):
    """Answers from the server's files, with ETags made of the content."""

    protocol_version = "HTTP/1.1"

    def do_GET(self):  # noqa: N802 - the name http.server calls
        path = unquote(urlsplit(self.path).path).lstrip("/")
        path = path + "index.html" if path == "" or path.endswith("/") else path
        self.server.owner.asked.append(path)
        content = self.server.owner.read(path)
        if content is None:
            self.reply(404, b"", {})
            return
        tag = f'"{hashlib.sha256(content).hexdigest()[:32]}"'
        head = {"ETag": tag, "Cache-Control": "no-cache"}
        if self.headers.get("If-None-Match") == tag:
            self.reply(304, b"", head)
            return
        head["Content-Type"] = TYPES.get(Path(path).suffix, "application/octet-stream")
        self.reply(200, content, head)

    def reply(self, status, content, head):
        self.send_response(status)
        for name, value in head.items():
            self.send_header(name, value)
        self.send_header("Content-Length", str(len(content)))
        self.end_headers()
        self.wfile.write(content)

    def log_message(self, *args):
        """Tests look at `asked`, not at a log."""


class Server:
    """Serves a folder or a dict of files on loopback; can be stopped and started at one address."""

    def __init__(self, source):
        self.source = source
        self.asked = []  # every path asked for, in order
        self.torn = {}  # path -> bytes sent instead
        self.port = 0
        self.http = None
        self.start()

    @property
    def address(self):
        return f"http://127.0.0.1:{self.port}/"

    def read(self, path):
        if path in self.torn:
            return self.torn[path]
        if isinstance(self.source, dict):
            return self.source.get(path)
        file = Path(self.source, path)
        return file.read_bytes() if file.is_file() else None

    def start(self):
        self.http = http.server.ThreadingHTTPServer(("127.0.0.1", self.port), Handler)
        self.http.daemon_threads = True
        self.http.owner = self
        self.port = self.http.server_address[1]
        threading.Thread(target=self.http.serve_forever, args=(0.02,), daemon=True).start()

    def stop(self):
        if self.http:
            self.http.shutdown()
            self.http.server_close()
            self.http = None


class Phone:
    """One browser process on a profile folder that outlives it."""

    def __init__(self, playwright, profile, options):
        self.profile = Path(profile)
        self.errors = []  # what pages complained of: script errors and blocked loads
        self.context = playwright.chromium.launch_persistent_context(
            str(profile),
            executable_path=shutil.which("chromium"),
            headless=True,
            args=[*FLAGS, *options.pop("flags", [])],
            **{"viewport": {"width": 390, "height": 844}, "has_touch": True, **options},
        )
        self.context.set_default_timeout(10_000)
        self.context.on("weberror", lambda error: self.errors.append(str(error.error)))
        self.context.on("console", self.note)
        self.page = self.context.pages[0]

    def note(self, message):
        if message.type == "error":
            self.errors.append(message.text)

    def kill(self):
        """SIGKILL to the browser process itself, as a phone short of memory does."""
        os.kill(browser_process(self.profile), signal.SIGKILL)
        self.close()

    def close(self):
        try:
            self.context.close()
        except Exception as error:  # a killed browser cannot say good-bye
            assert "closed" in str(error) or "crashed" in str(error), error


def browser_process(profile):
    """The id of the one main browser process that runs on a profile."""
    wanted = f"--user-data-dir={profile}".encode()
    found = []
    for folder in Path("/proc").glob("[0-9]*"):
        try:
            words = (folder / "cmdline").read_bytes().split(b"\0")
        except OSError:
            continue
        if wanted in words and not any(word.startswith(b"--type=") for word in words):
            found.append(int(folder.name))
    assert len(found) == 1, f"{len(found)} browser processes on {profile}"
    return found[0]


class Browser:
    """Starts phones and puts away those a test leaves running."""

    def __init__(self, playwright):
        self.playwright = playwright
        self.running = []

    def phone(self, profile, **options):
        phone = Phone(self.playwright, profile, options)
        self.running.append(phone)
        return phone

    def put_away(self):
        while self.running:
            self.running.pop().close()


@pytest.fixture(scope="session")
def engine():
    """The driver, started once."""
    if shutil.which("chromium") is None:
        pytest.fail("chromium is missing; .ci/setup test installs it")
    from playwright.sync_api import sync_playwright

    with sync_playwright() as playwright:
        yield playwright


@pytest.fixture
def browser(engine):
    """Phones for one test."""
    here = Browser(engine)
    yield here
    here.put_away()


@pytest.fixture
def serve():
    """Servers for one test."""
    running = []

    def start(source):
        running.append(Server(source))
        return running[-1]

    yield start
    for server in running:
        server.stop()


@pytest.fixture(scope="session")
def region():
    """The demo region's tables."""
    from builder.tables import load_region

    return load_region(ROOT / "keydata" / DEMO).region


@pytest.fixture(scope="session")
def demo_files(region):
    """The demo site as path -> bytes, built once from the tables."""
    from builder.site.build import site_files
    from builder.site.region import site_region

    return site_files([site_region(region)])


@pytest.fixture(scope="session")
def site(demo_files):
    """The demo site, served for the whole run."""
    server = Server(demo_files)
    yield server
    server.stop()
