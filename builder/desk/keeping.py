"""The desk's store of records: opened on first use, and told of when it cannot be reached."""

from __future__ import annotations

import os
import threading
from pathlib import Path

from flask import Flask, current_app
from sqlalchemy.exc import SQLAlchemyError
from werkzeug.exceptions import ServiceUnavailable
from werkzeug.wrappers import Response

from builder.records.database import Database, StoreRefused
from builder.records.store import RecordStore

FILE = "records.sqlite"
AWAY = "records-away"


class Keeping:
    """The one database of a running desk."""

    def __init__(self, state: Path, url: str) -> None:
        self.state, self.url = state, url
        self.lock = threading.Lock()
        self.opened: Database | None = None

    def database(self) -> Database:
        """The database, made when it is not there."""
        with self.lock:
            if self.opened is None:
                self.opened = Database(self.url or f"sqlite:///{self._file()}")
            return self.opened

    def _file(self) -> Path:
        """The desk's own file, which nobody else on this computer may read."""
        self.state.mkdir(parents=True, exist_ok=True, mode=0o700)
        path = self.state / FILE
        os.close(os.open(path, os.O_CREAT | os.O_RDWR, 0o600))
        return path

    def close(self) -> None:
        """Lets go of the database."""
        with self.lock:
            if self.opened is not None:
                self.opened.close()
                self.opened = None


def keep_records(app: Flask, state: Path, url: str) -> None:
    """Gives a desk its store. url: of a database; empty for a file among the desk's own"""
    app.extensions["records"] = Keeping(state, url)
    for fault in (SQLAlchemyError, StoreRefused):
        app.register_error_handler(fault, _away)


def _away(fault: Exception) -> Response:
    current_app.logger.error("%s", fault, exc_info=fault)
    return current_app.make_response(current_app.handle_http_exception(ServiceUnavailable(AWAY)))


def database() -> Database:
    """The running desk's database."""
    keeping: Keeping = current_app.extensions["records"]
    return keeping.database()


def store() -> RecordStore:
    """The running desk's store."""
    return RecordStore(database())
