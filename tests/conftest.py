"""Fixtures of the whole suite: the three-zone test region."""

import pytest
from helpers import three_zone_files, write_region

from builder.tables import load_region


@pytest.fixture
def tables(tmp_path):
    """The three-zone region as it was read, in a folder of its own."""
    loaded = load_region(write_region(tmp_path / "willow_breaks", three_zone_files()))
    assert loaded.region is not None, loaded.problems
    return loaded
