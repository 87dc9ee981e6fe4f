"""A small web server, a phone to hold, and a crew member who knows the ground."""

from __future__ import annotations

import hashlib
import http.server
import os
import shutil
import signal
import sys
import threading
from pathlib import Path
from urllib.parse import unquote, urlsplit

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


class Patient(http.server.ThreadingHTTPServer):
    """A server for browsers that are killed in the middle of an answer."""

    daemon_threads = True

    def handle_error(self, request, client_address):
        error = sys.exception()
        if not isinstance(error, ConnectionError):
            super().handle_error(request, client_address)


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
        self.http = Patient(("127.0.0.1", self.port), Handler)
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
            if not any(word in str(error) for word in ("closed", "crashed")):
                raise


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


LISTED_FROM = 0.5  # a known site holds the plants that stand in half the zone's plots or more
MOST_ANSWERS = 24


def known_site(region, zone_id):
    """Cover in percent of every plant on typical ground of a zone, most cover first."""
    held = {
        plant: found.cover_pct
        for (zone, plant), found in region.occurrence.items()
        if zone == zone_id and found.constancy >= LISTED_FROM
    }
    return dict(sorted(held.items(), key=lambda each: -each[1]))


class Crew:
    """A person at the phone: taps what the page offers, knows the ground."""

    def __init__(self, phone, region, texts):
        self.page = phone.page
        self.region = region
        self.ids = {text["common"]: plant for plant, text in texts["plants"].items()}
        self.names = {plant: name for name, plant in self.ids.items()}
        self.classes = region.cover_scale.classes

    def start(self, name, height_m):
        """A new site check, named, its height typed. Returns its id."""
        self.page.evaluate("location.hash = '#/sites'")
        self.page.get_by_role("button", name="New site").click()
        self.page.wait_for_url("**/place")
        self.page.get_by_label("Or type it").fill(str(height_m))
        self.page.get_by_label("Name of this spot").fill(name)
        self.page.keyboard.press("Tab")
        return self.page.url.split("/site/")[1].split("/")[0]

    def open(self, tab):
        self.page.locator(f"nav a[href$='/{tab}']").first.click()

    def cover_key(self, cover_pct):
        """The key of the class a cover lies in; keys stand in the order of the scale."""
        place = next(
            at
            for at, one in enumerate(self.classes)
            if one.low_pct <= cover_pct and (cover_pct < one.high_pct or one.high_pct == 100)
        )
        keys = self.page.locator(".covers button")
        return keys.nth(keys.count() - len(self.classes) + place)

    def name_first(self, plants):
        """Names the plants that cover most, by search."""
        for plant, cover_pct in plants:
            self.page.locator("input[type=search]").fill(self.names[plant])
            self.page.locator(f"a[href$='/name/{plant}']").click()
            self.page.locator(".covers button").first.wait_for()
            self.cover_key(cover_pct).click()
            self.page.wait_for_url("**/plants")

    def answer(self, ground):
        """Answers what the key asks next. False where it asks no more."""
        head = self.page.locator(".told h2").first
        head.wait_for()
        asked = head.inner_text()
        sure = self.page.locator(".told .hint a[href$='/zone']").count() > 0
        if sure or self.page.locator(".told h2.verdict").count():
            return False
        plant = self.ids.get(asked)
        if plant is None:
            self.page.locator(".under button").first.click()
        elif plant in ground:
            self.cover_key(ground[plant]).click()
        else:
            self.page.locator(".covers button").first.click()
        return asked


def key_site(crew, ground, zone):
    """One site check from new to kept call. Returns the record's id."""
    site_id = crew.start(f"Ground {zone.letter}", round(zone.centre_m))
    crew.open("plants")
    crew.name_first(list(ground.items())[:3])
    answers = 3
    while answers < MOST_ANSWERS and crew.answer(ground):
        answers += 1
    crew.open("zone")
    crew.page.locator(".deep .btn.go").first.click()
    crew.page.locator(".kept").wait_for()
    return site_id


def records(page):
    """Every stored record by id, read past the app."""
    return page.evaluate(
        """() => new Promise((resolve, reject) => {
          const open = indexedDB.open('beltbook-records');
          open.onerror = () => reject(open.error);
          open.onsuccess = () => {
            const all = open.result.transaction('sites').objectStore('sites').getAll();
            all.onsuccess = () => {
              open.result.close();
              resolve(Object.fromEntries(all.result.map((site) => [site.id, site])));
            };
          };
        })"""
    )
