"""Building from the desk: what was built last, building as a job, preview, and handing it out."""

from __future__ import annotations

import io
import zipfile
from dataclasses import dataclass, field
from pathlib import Path

from flask import (
    Blueprint,
    Response,
    abort,
    current_app,
    flash,
    redirect,
    render_template,
    send_file,
    url_for,
)
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.jobs import Busy
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.shelf import Look, shelf
from builder.desk.working import job_view, jobs
from builder.steps.notes import last_build, tables_hash

ZIP_DATE = (2020, 1, 1, 0, 0, 0)  # fixed, so that the same site gives the same file

pages = Blueprint("build", __name__)


@dataclass(frozen=True)
class OutLink:
    """One thing that was built and can be opened."""

    text: str
    href: str


@dataclass(frozen=True)
class BuiltView:
    """The last build of a region. current: made from the tables as they stand now."""

    current: bool
    said: str
    pack: str
    pages: str
    links: list[OutLink] = field(default_factory=list)
    app: str = ""
    booklet: str = ""


def built_view(look: Look) -> BuiltView:
    """What stands in the output folder for a region."""
    say = read_phrases()["build"]
    out: Path = current_app.config["OUT"]
    note = last_build(out, look.id)
    app = out / "index.html"
    if note is None or not app.is_file():
        return BuiltView(False, say["never"], "", "")
    booklet = out / "regions" / look.id / "booklet.pdf"
    links = [OutLink(say["open_app"], url_for("field.send", name=""))]
    booklet_href = ""
    if booklet.is_file():
        booklet_href = url_for("field.send", name=f"regions/{look.id}/booklet.pdf")
        links.append(OutLink(say["open_booklet"], booklet_href))
    if (out / "field.html").is_file():
        links.append(OutLink(say["single"], url_for("field.send", name="field.html")))
    current = note.tables == tables_hash(look.folder)
    said = say["current" if current else "stale"].format(edition=note.edition, at=note.at)
    return BuiltView(
        current=current,
        said=said,
        pack=note.pack_hash,
        pages=counted(note.booklet_pages, say["pages"]),
        links=links,
        app=url_for("field.send", name=""),
        booklet=booklet_href,
    )


@pages.get("/r/<region_id>/build")
def show(region_id: str) -> str:
    """The build page."""
    look = shelf().look(region_id)
    return render_template(
        "build.html",
        page=page("build", "wide", look),
        region_id=region_id,
        built=built_view(look),
        job=job_view(jobs().last("build", region_id)),
        stops=look.stops,
        problems_said=counted(len(look.errors), read_phrases()["overview"]["errors"]),
    )


@pages.post("/r/<region_id>/build")
def build(region_id: str) -> BaseResponse:
    """Starts a build of every region that has nothing to mend, this one first."""
    look = shelf().look(region_id)
    say = read_phrases()["jobs"]
    if look.stops:
        flash(read_phrases()["build"]["stopped"])
        return redirect(url_for("build.show", region_id=region_id))
    others = [name for name in shelf().ids() if name != region_id and not shelf().look(name).stops]
    keydata: Path = current_app.config["KEYDATA"]
    folders = [str(keydata / name) for name in [region_id, *others]]
    try:
        out = str(current_app.config["OUT"])
        jobs().start("build", region_id, ["build", *folders, "--out", out])
    except Busy:
        flash(say["busy"])
    return redirect(url_for("build.show", region_id=region_id))


@pages.get("/site.zip")
def site_zip() -> Response:
    """The built site as one file for any static host."""
    out: Path = current_app.config["OUT"]
    if not (out / "index.html").is_file():
        abort(404)
    made = io.BytesIO()
    with zipfile.ZipFile(made, "w", zipfile.ZIP_DEFLATED) as packed:
        for path in sorted(out.rglob("*")):
            name = path.relative_to(out).as_posix()
            if path.is_file() and not path.is_symlink() and name != "README.md":
                info = zipfile.ZipInfo(name, ZIP_DATE)
                info.compress_type = zipfile.ZIP_DEFLATED
                info.external_attr = 0o644 << 16
                packed.writestr(info, path.read_bytes())
    made.seek(0)
    return send_file(made, "application/zip", as_attachment=True, download_name="beltbook-site.zip")
