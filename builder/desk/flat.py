"""A new region from a flat spreadsheet of known plots: bring it, say what each column is, fit."""

from __future__ import annotations

import csv
import re
import secrets
from dataclasses import dataclass
from pathlib import Path

from flask import Blueprint, abort, current_app, flash, redirect, render_template, request, url_for
from werkzeug.wrappers import Response

from builder.desk.jobs import Busy
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.shelf import NAME
from builder.desk.working import job_view, jobs
from builder.key.scales import SCALES
from builder.rows import parse_csv, plain
from builder.tables.sheets import SheetFault
from builder.tables.workbook import sheets_of_workbook

KEY = re.compile(r"[0-9a-f]{16}")
NEEDED = ("plot", "plant", "zone")
ALL = ("plot", "plant", "cover", "zone", "height_m", "slope_pct", "aspect_deg")
GUESSES = {
    "plot": ("plot_id", "plot", "releve", "site", "sample"),
    "plant": ("plant_id", "plant", "species", "taxon", "scientific"),
    "cover": ("cover_pct", "cover", "cover_class", "abundance"),
    "zone": ("zone_id", "zone", "type", "community", "group"),
    "height_m": ("height_m", "elevation_m", "elevation", "altitude", "height"),
    "slope_pct": ("slope_pct", "slope"),
    "aspect_deg": ("aspect_deg", "aspect"),
}
ROWS_SHOWN = 5

pages = Blueprint("flat", __name__, url_prefix="/start/plots")


@dataclass(frozen=True)
class FlatTable:
    """A sheet as rows of text under column names."""

    columns: list[str]
    rows: list[list[str]]


@dataclass(frozen=True)
class Question:
    """Which column holds one thing: the choices, the likeliest chosen."""

    name: str
    label: str
    required: bool
    choices: list[tuple[str, bool]]


def read_flat(name: str, raw: bytes) -> FlatTable:
    """The first sheet of a workbook, or a CSV. Raises SheetFault with a sentence."""
    if name.lower().endswith(".xlsx"):
        sheets = sheets_of_workbook(raw)
        first = next(iter(sheets.values()))
        rows = [[_text(row.get(column)) for column in first.columns] for row in first.rows]
        return _filled(FlatTable(first.columns, rows))
    try:
        text = raw.decode("utf-8-sig")
    except UnicodeDecodeError:
        text = raw.decode("cp1252", errors="replace")
    sheet, problems = parse_csv(text.replace("\r\n", "\n").replace("\r", "\n"), name)
    if sheet is None or problems:
        first_problem = problems[0]
        raise SheetFault(f"{name}:{first_problem.line}: {first_problem.wrong}. {first_problem.fix}")
    rows = [[_text(plain(row.get(column))) for column in sheet.columns] for row in sheet.rows]
    return _filled(FlatTable(sheet.columns, rows))


def _text(value: object) -> str:
    return "" if value is None else str(value).strip()


def _filled(table: FlatTable) -> FlatTable:
    if len(table.columns) < len(NEEDED) or not table.rows:
        raise SheetFault(read_phrases()["flat"]["too_small"])
    return table


def _incoming() -> Path:
    folder: Path = current_app.config["STATE"] / "incoming"
    folder.mkdir(parents=True, exist_ok=True)
    return folder


def _kept(key: str) -> FlatTable:
    path = _incoming() / f"{key}.csv"
    if not KEY.fullmatch(key) or not path.is_file():
        abort(404)
    with path.open(encoding="utf-8", newline="") as file:
        lines = list(csv.reader(file))
    return FlatTable(lines[0], lines[1:])


def _write(path: Path, lines: list[list[str]]) -> None:
    with path.open("w", encoding="utf-8", newline="") as file:
        csv.writer(file, lineterminator="\n").writerows(lines)


@pages.get("")
def show() -> str:
    """Where the spreadsheet is chosen."""
    title = read_phrases()["flat"]["title"]
    return render_template("flat.html", page=page("start", "sheet", None, title))


@pages.post("")
def receive() -> Response:
    """Takes the spreadsheet in and asks what its columns are."""
    sent = request.files.get("sheet")
    if sent is None or not sent.filename:
        flash(read_phrases()["sheets"]["none"])
        return redirect(url_for("flat.show"))
    try:
        table = read_flat(Path(sent.filename).name, sent.read())
    except SheetFault as fault:
        flash(str(fault))
        return redirect(url_for("flat.show"))
    key = secrets.token_hex(8)
    _write(_incoming() / f"{key}.csv", [table.columns, *table.rows])
    return redirect(url_for("flat.columns", key=key))


@pages.get("/<key>")
def columns(key: str) -> str:
    """What is which column?"""
    table = _kept(key)
    say = read_phrases()["flat"]
    questions = [
        Question(
            name,
            say["columns"][name],
            name in NEEDED,
            [("", guess_of(name, table.columns) == "")]
            + [(column, column == guess_of(name, table.columns)) for column in table.columns],
        )
        for name in ALL
    ]
    return render_template(
        "flat_columns.html",
        page=page("start", "wide", None, say["title"]),
        key=key,
        questions=questions,
        scales=list(SCALES),
        heads=table.columns,
        rows=table.rows[:ROWS_SHOWN],
        said=counted(len(table.rows), read_phrases()["tables"]["rows_n"]),
    )


def guess_of(name: str, columns: list[str]) -> str:
    """The likeliest column for a thing; empty when none is like it."""
    folded = {column.casefold().replace(" ", "_"): column for column in columns}
    return next((folded[guess] for guess in GUESSES[name] if guess in folded), "")


@pages.post("/<key>")
def fit(key: str) -> Response:
    """Writes plots and zones apart and starts the fit."""
    table = _kept(key)
    say = read_phrases()["flat"]
    chosen = {name: request.form.get(name, "") for name in ALL}
    region_id, scale = request.form.get("id", "").strip(), request.form.get("scale", "")
    back: Response = redirect(url_for("flat.columns", key=key))
    if any(chosen[name] not in table.columns for name in NEEDED):
        flash(say["needed"])
        return back
    keydata: Path = current_app.config["KEYDATA"]
    if not NAME.fullmatch(region_id) or (keydata / region_id).exists():
        flash(say["name"])
        return back
    plots, zones = _split(table, chosen, bool(scale))
    folder = _incoming() / key
    folder.mkdir(exist_ok=True)
    _write(folder / "plots.csv", plots)
    _write(folder / "zones.csv", zones)
    command = ["fit", str(folder / "plots.csv"), "--zones", str(folder / "zones.csv")]
    command += ["--out", str(keydata / region_id)]
    if scale in SCALES:
        command += ["--scale", scale]
    try:
        jobs().start("fit", region_id, command)
    except Busy:
        flash(read_phrases()["jobs"]["busy"])
        return back
    return redirect(url_for("flat.work", region_id=region_id))


def _split(
    table: FlatTable, chosen: dict[str, str], classes: bool
) -> tuple[list[list[str]], list[list[str]]]:
    """plots.csv and zones.csv as lines; of a plot's zone and site the first row speaks."""
    at = {name: table.columns.index(column) for name, column in chosen.items() if column}
    cover = ["cover_class" if classes else "cover_pct"] if "cover" in at else []
    plots = [["plot_id", "plant_id", *cover]]
    sites = [name for name in ("height_m", "slope_pct", "aspect_deg") if name in at]
    zones = {"": ["plot_id", "zone_id", *sites]}
    for row in table.rows:
        plots.append([row[at[name]] for name in ("plot", "plant", "cover") if name in at])
        zones.setdefault(row[at["plot"]], [row[at[n]] for n in ("plot", "zone", *sites)])
    return plots, list(zones.values())


@pages.get("/at-work/<region_id>")
def work(region_id: str) -> str:
    """The fit at work; when it is done, the way to the region."""
    job = jobs().last("fit", region_id)
    if job is None:
        abort(404)
    return render_template(
        "flat_work.html",
        page=page("start", "sheet", None, read_phrases()["flat"]["title"]),
        job=job_view(job),
        done=job.state == "done",
        region_id=region_id,
    )
