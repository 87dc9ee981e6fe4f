"""A desk on a copy of the demo region, in a folder of its own."""

import shutil
from pathlib import Path

import pytest

from builder.desk.application import Settings, create_app

KEYDATA = Path(__file__).parents[2] / "keydata"


@pytest.fixture
def app(tmp_path):
    """A desk whose keydata holds the demo region and whose output is empty."""
    shutil.copytree(KEYDATA / "sorrel_plateau", tmp_path / "keydata" / "sorrel_plateau")
    (tmp_path / "site_out").mkdir()
    made = create_app(Settings(tmp_path, tmp_path / "site_out"))
    made.testing = True
    yield made
    made.extensions["jobs"].stop_all()


@pytest.fixture
def client(app):
    """A browser's worth of cookies at that desk."""
    return app.test_client()
