"""Records at the desk: list, search, queue, in from a file, out in every form."""

from __future__ import annotations

import io
from dataclasses import dataclass, replace
from typing import Any

from flask import (
    Blueprint,
    Response,
    abort,
    flash,
    redirect,
    render_template,
    request,
    send_file,
    url_for,
)
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.keeping import database, store
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.shelf import Look, shelf
from builder.records.exchange import merged, read_records
from builder.records.finding import PER_PAGE, SHOWN, Wanted, find
from builder.records.flat import csv_line, harmless
from builder.records.known import Knowledge, Known, known_of
from builder.records.sentences import FileRefused, read_sentences
from builder.records.values import text
from builder.steps.exporting import FORMS, told_of, written

ENDINGS = {
    "json": ("json", "application/json"),
    "csv": ("csv", "text/csv; charset=utf-8"),
    "geojson": ("geojson", "application/geo+json"),
    "dwca": ("zip", "application/zip"),
    "report": ("html", "text/html; charset=utf-8"),
}
DECISION_COLUMNS = ("site_id", "revision", "kind", "zone_id", "person", "reason", "at")
WHY = ("doubtful", "overruled", "conflicted")
LONGEST_SEARCH = 200
TOLD = 6
LAST_PAGE = 1_000_000

pages = Blueprint("records", __name__, url_prefix="/r/<region_id>/records")


@dataclass(frozen=True)
class RecordLine:
    """One record in the list."""

    name: str
    href: str
    day: str
    unit: str
    observer: str
    zone: str
    verdict: str
    why: str


@dataclass(frozen=True)
class Choice:
    """One way to narrow the list."""

    value: str
    text: str
    here: bool
    href: str


def known_here(look: Look) -> Known:
    """Names of the region, with exact positions: what stands at the desk is not handed out."""
    known = known_of(look.region) if look.region else Known(look.id, look.id)
    return replace(known, sensitive=frozenset(), is_known=True)


def wanted_of(region_id: str) -> Wanted:
    """What a request asks to see; 404 for what no link of the desk asks."""
    only, cell = request.args.get("only", ""), request.args.get("cell", "")
    if only and only not in SHOWN:
        abort(404)
    parts = cell.split("-") if cell else []
    if parts and (len(parts) != 3 or not all(p.isdecimal() and len(p) < 7 for p in parts)):
        abort(404)
    return Wanted(
        region_id,
        words=text(request.args.get("q", ""), LONGEST_SEARCH),
        only=only,
        zone_id=text(request.args.get("zone", ""), 64),
        cell=(int(parts[0]), int(parts[1]), int(parts[2])) if parts else None,
    )


def asked(wanted: Wanted, **changes: Any) -> dict[str, Any]:
    """The arguments of an address that asks for the same, with some changed."""
    cell = "-".join(map(str, wanted.cell)) if wanted.cell else ""
    given = {"q": wanted.words, "only": wanted.only, "zone": wanted.zone_id, "cell": cell}
    given |= changes
    return {"region_id": wanted.region_id, **{name: one for name, one in given.items() if one}}


@pages.get("")
def show(region_id: str) -> str:
    """The list, searched and narrowed."""
    look, wanted = shelf().look(region_id), wanted_of(region_id)
    number = request.args.get("page", 0, type=int)
    if not 0 <= number <= LAST_PAGE:
        abort(404)
    found, say = find(database(), wanted, number), read_phrases()["records"]
    known = known_here(look)
    first = number * PER_PAGE
    said = say["span"].format(first=first + 1, last=first + len(found.rows), n=f"{found.total:,}")
    more = first + PER_PAGE < found.total
    choices = [_only(wanted, name, say["only"][name or "all"]) for name in ("", *SHOWN)]
    return render_template(
        "records.html",
        page=page("records", "wide", look),
        region_id=region_id,
        wanted=wanted,
        lines=[line_of(row, known) for row in found.rows],
        said=said if found.rows else say["nothing"],
        choices=choices,
        zones=[
            Choice(zone, name, zone == wanted.zone_id, "") for zone, name in known.zones.items()
        ],
        before=url_for("records.show", **asked(wanted, page=number - 1)) if number else "",
        after=url_for("records.show", **asked(wanted, page=number + 1)) if more else "",
        whole=url_for("records.show", region_id=region_id) if wanted.cell else "",
        map_href=url_for("map.show", **asked(wanted, cell="")),
        strange=_strange(say),
        forms=[(form, say["forms"][form]) for form in (*FORMS, "decisions")],
    )


def _only(wanted: Wanted, name: str, words: str) -> Choice:
    return Choice(
        name, words, name == wanted.only, url_for("records.show", **asked(wanted, only=name))
    )


def _strange(say: dict[str, Any]) -> str:
    """Records of regions this desk has no tables of, which no list shows."""
    elsewhere = {name: n for name, n in store().count().items() if name not in shelf().ids()}
    if not elsewhere:
        return ""
    return counted(sum(elsewhere.values()), say["strange"], regions=", ".join(sorted(elsewhere)))


def line_of(row: Any, known: Known) -> RecordLine:
    """A stored record's own figures as one line."""
    say, names = read_phrases()["records"], read_sentences()["report"]
    why = [say["why"][name] for name in WHY if getattr(row, name)]
    if why and not row.open:
        why.append(say["decided"])
    if row.sides:
        why.append(counted(row.sides, say["sides"]))
    return RecordLine(
        name=row.name or names["unnamed"],
        href=url_for("record.show", region_id=row.region_id, site_id=row.id),
        day=row.date,
        unit=row.unit_name,
        observer=row.observer,
        zone=known.zones.get(row.zone_id, row.zone_id or ""),
        verdict=names["verdicts"].get(row.verdict, row.verdict or ""),
        why=", ".join(why),
    )


@pages.post("")
def receive(region_id: str) -> BaseResponse:
    """Takes a file in, whole or not at all."""
    shelf().folder(region_id)
    sent, say = request.files.get("file"), read_phrases()["records"]
    if sent is None or not sent.filename:
        return _back(region_id, [say["no_file"]])
    try:
        read = read_records(sent.read())
    except FileRefused as refused:
        return _back(region_id, [str(refused)])
    taken = store().take_in(read)
    counts = {name: len(getattr(taken, name)) for name in say["taken_parts"]}
    told = [
        words.format(n=counts[name]) for name, words in say["taken_parts"].items() if counts[name]
    ]
    sentences = told_of([read], merged([read]))
    if len(sentences) > TOLD:
        sentences = [*sentences[:TOLD], say["told_more"].format(n=len(sentences) - TOLD)]
    return _back(region_id, [say["taken"].format(parts=", ".join(told) or say["none"]), *sentences])


def _back(region_id: str, notes: list[str]) -> BaseResponse:
    for note in notes:
        flash(note)
    return redirect(url_for("records.show", region_id=region_id))


@pages.get("/export/<form>")
def export(region_id: str, form: str) -> BaseResponse:
    """All records of the region in one form; decisions as a CSV of their own."""
    look = shelf().look(region_id)
    if form == "decisions":
        return _attached(_decisions(region_id), f"{region_id}-decisions.csv", ENDINGS["csv"][1])
    if form not in ENDINGS:
        abort(404)
    records = store().of_region(region_id, photos=form == "json")
    knowledge = Knowledge([known_of(look.region)] if look.region else [])
    ending, kind = ENDINGS[form]
    made = written(records, form, knowledge, request.args.get("names") == "1")
    return _attached(made, f"{region_id}-records.{ending}", kind)


def _decisions(region_id: str) -> bytes:
    ids = [site["id"] for site in store().of_region(region_id).sites]
    lines = [csv_line(list(DECISION_COLUMNS))]
    for site_id, one in store().decisions(ids):
        cells = [site_id, one.revision, one.kind, one.zone_id, one.person, one.reason, one.at]
        lines.append(csv_line([harmless(cell) for cell in cells]))
    return "".join(lines).encode()


def _attached(content: bytes, name: str, kind: str) -> Response:
    return send_file(io.BytesIO(content), kind, as_attachment=True, download_name=name)
