"""A new region from the desk: a valid one with three zones, to be changed row by row."""

from __future__ import annotations

from pathlib import Path

from flask import Blueprint, current_app, flash, redirect, render_template, request, url_for
from werkzeug.wrappers import Response

from builder.desk.page import page
from builder.desk.phrases import read_phrases
from builder.tables.start import StartRefused, start_region

pages = Blueprint("start", __name__, url_prefix="/start")


@pages.get("")
def show(refused: str = "", name: str = "", region_id: str = "") -> str:
    """The form."""
    title = read_phrases()["start"]["title"]
    return render_template(
        "start.html",
        page=page("start", "sheet", None, title),
        refused=refused,
        name=name,
        region_id=region_id,
    )


@pages.post("")
def begin() -> Response | tuple[str, int]:
    """Writes the new region and opens it."""
    name, region_id = (request.form.get(key, "").strip() for key in ("name", "id"))
    keydata: Path = current_app.config["KEYDATA"]
    if not region_id or Path(region_id).name != region_id:
        return show(read_phrases()["edit"]["id"], name, region_id), 400
    try:
        start_region(keydata / region_id, name)
    except StartRefused as refusal:
        return show(str(refusal), name, region_id), 400
    flash(read_phrases()["start"]["started"].format(name=name or region_id))
    return redirect(url_for("tables.table", region_id=region_id, table="region"))
