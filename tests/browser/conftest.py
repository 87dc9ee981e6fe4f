"""The built site on loopback, and Debian's Chromium beside it.

site      the demo site, built once from the tables in keydata/ and served
serve     serve(folder_or_files) -> Server, for tests that change what is served
browser   browser.phone(profile) -> Phone: one browser process with a profile that outlives it
"""

from __future__ import annotations

from pathlib import Path

import pytest
from browser.helpers import Browser, Server

from builder.site.build import site_files
from builder.steps.building import compile_region
from builder.steps.checking import check_region

ROOT = Path(__file__).parent.parent.parent
DEMO = "sorrel_plateau"


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
    return check_region(ROOT / "keydata" / DEMO).region


@pytest.fixture(scope="session")
def demo_files():
    """The demo site as path -> bytes, built once from the tables."""
    return site_files([compile_region(check_region(ROOT / "keydata" / DEMO))])


@pytest.fixture(scope="session")
def site(demo_files):
    """The demo site, served for the whole run."""
    server = Server(demo_files)
    yield server
    server.stop()
