"""Editions: keep the tables as they stand under a name, and say what changed since."""

from __future__ import annotations

import re
import shutil
from dataclasses import dataclass
from datetime import date
from pathlib import Path

from flask import Blueprint, abort, current_app, flash, redirect, render_template, request, url_for
from werkzeug.wrappers import Response

from builder.desk.differences import Difference, differences
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.saving import saver
from builder.desk.shelf import TABLE_ENDINGS, shelf
from builder.tables.edit import EditRefused, replace_value

EDITION = re.compile(r"[A-Za-z0-9][A-Za-z0-9 ._-]{0,19}")
DAY = re.compile(r"\d{4}-\d{2}-\d{2}")
SHOWN = 400

pages = Blueprint("editions", __name__, url_prefix="/r/<region_id>/editions")


@dataclass(frozen=True)
class EditionLine:
    """One kept edition."""

    name: str
    href: str
    here: bool


def kept_folder(region_id: str) -> Path:
    """Where a region's editions are kept: beside keydata, for the owner's own records."""
    home: Path = current_app.config["HOME"]
    return home / "editions" / region_id


def texts_in(folder: Path) -> dict[str, str]:
    """Every table's text by its name in the folder."""
    return {
        path.relative_to(folder).as_posix(): path.read_text(encoding="utf-8-sig")
        for path in sorted(folder.rglob("*"))
        if path.suffix in TABLE_ENDINGS and path.is_file() and not path.name.startswith(".")
    }


def kept_editions(region_id: str) -> list[str]:
    """Names of kept editions, oldest first."""
    folder = kept_folder(region_id)
    if not folder.is_dir():
        return []
    found = [path for path in folder.iterdir() if path.is_dir() and EDITION.fullmatch(path.name)]
    return [path.name for path in sorted(found, key=lambda path: path.stat().st_mtime_ns)]


@pages.get("")
def show(region_id: str) -> str:
    """Kept editions, and what changed since one of them."""
    look = shelf().look(region_id)
    say = read_phrases()["editions"]
    names = kept_editions(region_id)
    since = request.args.get("since", names[-1] if names else "")
    found: list[Difference] = []
    if since:
        if since not in names:
            abort(404)
        found = differences(texts_in(kept_folder(region_id) / since), texts_in(look.folder))
    lines = [
        EditionLine(name, url_for("editions.show", region_id=region_id, since=name), name == since)
        for name in names
    ]
    return render_template(
        "editions.html",
        page=page("editions", "wide", look),
        region_id=region_id,
        lines=lines,
        since=since,
        said=counted(len(found), say["changes"], since=since) if since else say["none_kept"],
        found=found[:SHOWN],
        edition=look.region.edition if look.region else "",
        today=date.today().isoformat(),
        stops=look.stops,
    )


@pages.post("")
def keep(region_id: str) -> Response:
    """Names the tables as they stand, and keeps a copy of them."""
    look = shelf().look(region_id)
    say = read_phrases()["editions"]
    name, day = request.form.get("edition", "").strip(), request.form.get("date", "").strip()
    back = redirect(url_for("editions.show", region_id=region_id))
    if look.stops:
        flash(say["stopped"])
    elif not EDITION.fullmatch(name) or not _is_day(day):
        flash(say["name_form"])
    elif name in kept_editions(region_id):
        flash(say["taken"].format(name=name))
    else:
        _keep(region_id, look.folder, name, day)
        flash(say["kept"].format(name=name))
    return back


def _is_day(text: str) -> bool:
    try:
        return bool(DAY.fullmatch(text)) and bool(date.fromisoformat(text))
    except ValueError:
        return False


def _keep(region_id: str, folder: Path, name: str, day: str) -> None:
    def named(text: str) -> str:
        return replace_value(replace_value(text, ("edition",), name), ("date",), day)

    try:
        saver(region_id).save("region.yaml", read_phrases()["editions"]["words"], named)
    except EditRefused:
        abort(409)
    target = kept_folder(region_id) / name
    beside = target.with_name(f".{name}.new")
    shutil.rmtree(beside, ignore_errors=True)
    beside.mkdir(parents=True)
    for file, text in texts_in(folder).items():
        (beside / file).parent.mkdir(parents=True, exist_ok=True)
        (beside / file).write_text(text, encoding="utf-8")
    beside.rename(target)
