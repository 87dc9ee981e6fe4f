"""A desk on the three-zone region, in a folder of its own."""

import pytest
from helpers import three_zone_files, write_region

from builder.desk.application import Settings, create_app


@pytest.fixture
def app(tmp_path):
    """A desk whose keydata holds the three-zone region and whose output is empty."""
    write_region(tmp_path / "keydata" / "willow_breaks", three_zone_files())
    (tmp_path / "site_out").mkdir()
    made = create_app(Settings(tmp_path, tmp_path / "site_out"))
    made.testing = True
    yield made
    made.extensions["jobs"].stop_all()


@pytest.fixture
def client(app):
    """A browser's worth of cookies at that desk."""
    return app.test_client()
