"""A region out to a spreadsheet and back in."""

from __future__ import annotations

import io
import zipfile

from flask import Blueprint, Response, flash, redirect, render_template, request, send_file, url_for
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.saving import saver
from builder.desk.shelf import shelf
from builder.tables.edit import EditRefused
from builder.tables.sheets import SheetFault
from builder.tables.workbook import changed_texts, csv_texts, sheets_of_workbook, workbook_bytes

XLSX = "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet"

pages = Blueprint("sheets", __name__, url_prefix="/r/<region_id>/sheets")


@pages.get("")
def show(region_id: str) -> str:
    """Down and up."""
    look = shelf().look(region_id)
    return render_template("sheets.html", page=page("sheets", "sheet", look), region_id=region_id)


@pages.get("/workbook.xlsx")
def workbook(region_id: str) -> BaseResponse:
    """The whole region as one workbook."""
    folder = shelf().folder(region_id)
    try:
        made = workbook_bytes(folder)
    except SheetFault as fault:
        return _told(region_id, str(fault))
    name = f"{region_id}.xlsx"
    return send_file(io.BytesIO(made), XLSX, as_attachment=True, download_name=name)


@pages.get("/tables.zip")
def tables(region_id: str) -> BaseResponse:
    """Every table as CSV, in one zip."""
    folder = shelf().folder(region_id)
    try:
        texts = csv_texts(folder)
    except SheetFault as fault:
        return _told(region_id, str(fault))
    made = io.BytesIO()
    with zipfile.ZipFile(made, "w", zipfile.ZIP_DEFLATED) as packed:
        for name, text in sorted(texts.items()):
            packed.writestr(f"{name}.csv", text)
    made.seek(0)
    name = f"{region_id}-csv.zip"
    return send_file(made, "application/zip", as_attachment=True, download_name=name)


@pages.post("")
def receive(region_id: str) -> BaseResponse:
    """Brings a workbook's changes into the tables, each table as one step that undo takes back."""
    folder = shelf().folder(region_id)
    say = read_phrases()["sheets"]
    sent = request.files.get("workbook")
    if sent is None or not sent.filename:
        return _told(region_id, say["none"])
    try:
        changed = changed_texts(folder, sheets_of_workbook(sent.read()))
    except (SheetFault, EditRefused) as fault:
        return _told(region_id, str(fault))
    for file, text in changed.items():
        words = say["words"].format(file=file)
        saver(region_id).save(file, words, lambda _before, text=text: text)  # type: ignore[misc]
    return _told(region_id, counted(len(changed), say["taken"]) if changed else say["same"])


def _told(region_id: str, words: str) -> Response:
    flash(words)
    answer: Response = redirect(url_for("sheets.show", region_id=region_id))  # type: ignore[assignment]
    return answer
