"""Databases for the tests of the store: a SQLite file, and a real PostgreSQL server on loopback."""

import os
import shutil
import socket
import subprocess
import tempfile
from pathlib import Path

import pytest

from builder.records.database import META, Database
from builder.records.store import RecordStore

UNPRIVILEGED = "postgres"  # the server refuses to run for the one who may do everything


def programs():
    """The folder of the newest PostgreSQL server, or None."""
    found = sorted(Path("/usr/lib/postgresql").glob("*/bin/initdb"))
    beside = shutil.which("initdb")
    return found[-1].parent if found else Path(beside).parent if beside else None


@pytest.fixture(scope="session")
def postgresql():
    """The URL of a server that lives as long as the tests."""
    pytest.importorskip("pg8000", reason="no PostgreSQL driver here")
    folder = programs()
    if folder is None:
        pytest.skip("no PostgreSQL server here")
    home = Path(tempfile.mkdtemp(prefix="beltbook-pg-"))
    other = {"user": UNPRIVILEGED} if os.geteuid() == 0 else {}
    if other:
        shutil.chown(home, UNPRIVILEGED)
    with socket.socket() as free:
        free.bind(("127.0.0.1", 0))
        port = free.getsockname()[1]

    def run(name, *words):
        command = [folder / name, "-D", home / "data", *words]
        subprocess.run(command, check=True, cwd=home, stdout=subprocess.DEVNULL, **other)

    run("initdb", "-A", "trust", "-U", "crew")
    run("pg_ctl", "-w", "-l", home / "log", "-o", f"-h 127.0.0.1 -p {port} -k {home}", "start")
    yield f"postgresql+pg8000://crew@127.0.0.1:{port}/postgres"
    run("pg_ctl", "-m", "immediate", "stop")
    shutil.rmtree(home)


@pytest.fixture(params=["sqlite", "postgresql"])
def database(request, tmp_path):
    """An empty store's database, once of each kind."""
    if request.param == "sqlite":
        made = Database(f"sqlite:///{tmp_path}/records.sqlite")
    else:
        made = Database(request.getfixturevalue("postgresql"))
    yield made
    if request.param == "postgresql":
        META.drop_all(made.engine)
    made.close()


@pytest.fixture
def store(database):
    """The store on it."""
    return RecordStore(database)
