"""Puts the desk together: settings, guards, page families, templates that hold no logic."""

from __future__ import annotations

import http
from dataclasses import dataclass, field
from pathlib import Path

from flask import Flask, Response, render_template, request, send_from_directory
from jinja2 import StrictUndefined
from werkzeug.exceptions import HTTPException

from builder.desk import (
    accounts,
    built,
    changing,
    editions,
    flat,
    guards,
    overview,
    proof,
    record,
    record_map,
    records,
    served,
    sheets,
    start,
    tables,
    upload,
    working,
)
from builder.desk.jobs import Jobs
from builder.desk.keeping import keep_records
from builder.desk.phrases import read_phrases
from builder.desk.shelf import Shelf

APP_SOURCE = Path(__file__).resolve().parent.parent / "app"


@dataclass(frozen=True)
class Settings:
    """What a desk is started with.

    home      folder that holds keydata/; the desk writes nowhere else but `out`
    out       folder of the built site
    hosts     names it may be called by
    accounts  name → password hash; empty while it is only reachable from this computer
    records   URL of the database of records; empty for a file among the desk's own
    """

    home: Path
    out: Path
    hosts: list[str] = field(default_factory=lambda: list(guards.LOOPBACK_HOSTS))
    accounts: dict[str, str] = field(default_factory=dict)
    records: str = ""

    @property
    def keydata(self) -> Path:
        """The folder of region folders."""
        return self.home / "keydata"

    @property
    def state(self) -> Path:
        """Accounts, backups and job notes; private to this computer."""
        return self.home / ".beltbook"


def create_app(settings: Settings) -> Flask:
    """The desk as a Flask application."""
    app = Flask(__name__)
    app.config.update(
        HOME=settings.home,
        OUT=settings.out,
        KEYDATA=settings.keydata,
        STATE=settings.state,
        ACCOUNTS=settings.accounts,
    )
    app.jinja_env.undefined = StrictUndefined
    app.jinja_env.trim_blocks = app.jinja_env.lstrip_blocks = True
    app.jinja_env.globals["say"] = read_phrases()
    guards.guard(app, settings.hosts)
    app.extensions["patience"] = guards.Patience()
    app.extensions["shelf"] = Shelf(settings.keydata)
    app.extensions["jobs"] = Jobs(settings.home)
    keep_records(app, settings.state, settings.records)
    families = (
        accounts, overview, tables, changing, proof, built, working, editions, sheets, start,
        flat, records, record, record_map, upload, served,
    )  # fmt: skip
    for family in families:
        app.register_blueprint(family.pages)
    app.add_url_rule("/face/<path:name>", "face", face)
    app.register_error_handler(HTTPException, refuse)
    return app


def face(name: str) -> Response:
    """Tokens and typefaces, which the desk shares with the field app."""
    folder = APP_SOURCE / ("vendor/fonts" if name.endswith(".woff2") else "css")
    return send_from_directory(folder, name, max_age=3600)


def refuse(error: HTTPException) -> tuple[str | dict[str, str], int]:
    """A refusal in plain words, as a page or, for a script or a phone, as JSON."""
    code = error.code or http.HTTPStatus.INTERNAL_SERVER_ERROR
    if error.response is not None:
        return error.response, code  # type: ignore[return-value]
    phrases = read_phrases()["refused"]
    reason = error.description if error.description in phrases else str(code)
    text = phrases.get(reason, phrases["other"])
    if request.headers.get("X-Desk-Token") or request.endpoint in guards.KEYED:
        return {"refused": text}, code
    return render_template("refused.html", text=text, code=code), code
