"""Phones hand records in with a key of their own; the desk makes, lists and revokes keys.

A batch is the file that phones write (builder.records.exchange). It is taken whole or not at all,
and sending it again changes nothing, so a phone repeats whatever got no answer.
"""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from flask import Blueprint, current_app, flash, redirect, render_template, request, url_for
from werkzeug.wrappers import Response

from builder.desk.guards import Patience
from builder.desk.keeping import database, store
from builder.desk.page import page
from builder.desk.phrases import read_phrases
from builder.desk.shelf import shelf
from builder.records.devices import device_of, devices, make_device, revoke, seen
from builder.records.exchange import Records, read_records
from builder.records.sentences import FileRefused, read_sentences

WRONG_KEYS, WRONG_WINDOW_S = 10, 300.0
BATCHES, BATCH_WINDOW_S = 120, 60.0
BEARER = "Bearer "

pages = Blueprint("upload", __name__)

Answer = tuple[dict[str, Any], int] | tuple[dict[str, Any], int, dict[str, str]]


class Pace:
    """How often an address may try a wrong key, and a phone may hand in."""

    def __init__(self) -> None:
        self.wrong = Patience(WRONG_KEYS, WRONG_WINDOW_S)
        self.batches = Patience(BATCHES, BATCH_WINDOW_S)


def _pace() -> Pace:
    found: Pace = current_app.extensions.setdefault("pace", Pace())
    return found


@pages.post("/upload")
def receive() -> Answer:
    """Takes one batch and says what became of every record."""
    say, address = read_phrases()["upload"], request.remote_addr or "unknown"
    if _pace().wrong.worn_out(address):
        return _wait(say["wait"], WRONG_WINDOW_S)
    given = request.headers.get("Authorization", "")
    key = given.removeprefix(BEARER) if given.startswith(BEARER) else ""
    device = device_of(database(), key)
    if device is None:
        _pace().wrong.failed(address)
        return {"refused": say["no_key"]}, 401
    if _pace().batches.worn_out(device):
        return _wait(say["slower"], BATCH_WINDOW_S)
    _pace().batches.failed(device)
    try:
        read = read_records(request.get_data())
    except FileRefused as refused:
        return {"refused": str(refused), "why": refused.code}, 400
    taken = store().take_in(read)
    seen(database(), device)
    return {**asdict(taken), "refused_entries": _refused(read), "changed": _changed(read)}, 200


def _wait(words: str, window_s: float) -> Answer:
    return {"refused": words}, 429, {"Retry-After": f"{window_s:.0f}"}


def _refused(read: Records) -> list[dict[str, Any]]:
    say = read_sentences()
    return [
        {**asdict(one), "said": say["entry"][one.why].format(at=one.at + 1, what=one.what)}
        for one in read.refused
    ]


def _changed(read: Records) -> list[dict[str, Any]]:
    return [{"id": site_id, "fields": list(fields)} for site_id, fields in read.changed]


@pages.get("/r/<region_id>/records/phones")
def phones(region_id: str) -> str:
    """Every phone's key, and the form for a new one."""
    return _phones(region_id)


def _phones(region_id: str, key: str = "") -> str:
    look = shelf().look(region_id)
    return render_template(
        "phones.html",
        page=page("records", "wide", look),
        region_id=region_id,
        key=key,
        address=url_for("upload.receive", _external=True),
        phones=devices(database()),
    )


@pages.post("/r/<region_id>/records/phones")
def let_in(region_id: str) -> str | Response:
    """Makes a key and shows it, once."""
    name = request.form.get("name", "").strip()
    if not name:
        flash(read_phrases()["upload"]["no_name"])
        return redirect(url_for("upload.phones", region_id=region_id))
    return _phones(region_id, make_device(database(), name))


@pages.post("/r/<region_id>/records/phones/<device_id>/revoke")
def shut_out(region_id: str, device_id: str) -> Response:
    """Revokes a key for good."""
    shelf().folder(region_id)
    done = revoke(database(), device_id)
    flash(read_phrases()["upload"]["revoked" if done else "no_phone"])
    return redirect(url_for("upload.phones", region_id=region_id))
