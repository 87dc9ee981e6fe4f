"""One record at the desk: everything it holds, why it waits, what people said of it."""

from __future__ import annotations

import json
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from flask import (
    Blueprint,
    Response,
    abort,
    flash,
    redirect,
    render_template,
    request,
    session,
    url_for,
)
from sqlalchemy import select
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.keeping import database, store
from builder.desk.page import page
from builder.desk.phrases import read_phrases
from builder.desk.records import WHY, known_here
from builder.desk.shelf import shelf
from builder.records.clean import PICTURES, Record
from builder.records.database import PHOTOS
from builder.records.known import Known, standing_zone
from builder.records.merge import canonical
from builder.records.report import sheet_of
from builder.records.rescoring import rescore, rescored_said
from builder.records.review import review
from builder.records.sentences import read_sentences
from builder.records.store import Decision, Unsigned, now
from builder.records.values import text
from builder.steps.rescoring import packs_at_hand

LONGEST_REASON = 2_000
LONGEST_VALUE = 120

pages = Blueprint("record", __name__, url_prefix="/r/<region_id>/records/one/<site_id>")


@dataclass(frozen=True)
class SideView:
    """Another version of the record, and where it differs: field, here, there."""

    mark: str
    said: str
    rows: list[tuple[str, str, str]]


@dataclass(frozen=True)
class DecisionView:
    """What a person said of a call."""

    said: str
    reason: str
    when: str


def record_or_404(region_id: str, site_id: str) -> Record:
    """A record of this region."""
    site = store().record(site_id)
    if site is None or site["region_id"] != region_id:
        abort(404)
    return site


@pages.get("")
def show(region_id: str, site_id: str) -> str:
    """The record's page."""
    look, site = shelf().look(region_id), record_or_404(region_id, site_id)
    known, say = known_here(look), read_phrases()["records"]
    why = review(site)
    decisions = [one for _, one in store().decisions([site_id])]
    decided = any(one.revision == site["revision"] for one in decisions)
    reasons = [say["why"][name] for name in WHY if getattr(why, name)]
    waits = say["waits"].format(why=", ".join(reasons)) if reasons and not decided else ""
    again: list[str] = []
    if request.args.get("again") == "1":
        packs = packs_at_hand([look.folder], [site["pack_hash"]])
        again = rescored_said(rescore(site, packs), site_id) or [say["same"]]
    return render_template(
        "record.html",
        page=page("records", "wide", look),
        region_id=region_id,
        site=site,
        sheet=sheet_of(site, known),
        waits=waits,
        struck=", ".join(site["struck"]),
        decisions=[_decision_view(one, known) for one in decisions],
        zones=list(known.zones.items()),
        has_zone=standing_zone(site) is not None,
        person=session.get("account", ""),
        sides=[_side_view(mark, site, side) for mark, side in store().sides(site_id)],
        photos=_photos(site_id),
        again=again,
    )


def _decision_view(one: Decision, known: Known) -> DecisionView:
    words = read_phrases()["records"]["decision"][one.kind]
    zone = known.zones.get(one.zone_id or "", one.zone_id or "")
    said = words.format(person=one.person, zone=zone, revision=one.revision)
    return DecisionView(said, one.reason, _minute(one.at))


def _minute(moment: str) -> str:
    """A moment to the minute, at the clock it was written by."""
    return moment.replace("T", " ")[:16]


def _side_view(mark: str, mine: Record, theirs: Record) -> SideView:
    words = read_phrases()["records"]["side"]
    said = words.format(observer=theirs["observer"], when=_minute(theirs["changed_at"]))
    return SideView(mark, said, list(_differing(mine, theirs)))


def _differing(mine: Record, theirs: Record) -> Iterator[tuple[str, str, str]]:
    for name in sorted({*mine, *theirs} - {"edits", "revision", "changed_at"}):
        if canonical(mine.get(name)) != canonical(theirs.get(name)):
            yield name, _short(mine.get(name)), _short(theirs.get(name))


def _short(value: Any) -> str:
    said = value if isinstance(value, str) else json.dumps(value, ensure_ascii=False)
    return said if len(said) <= LONGEST_VALUE else said[: LONGEST_VALUE - 1] + "…"


def _photos(site_id: str) -> list[tuple[str, str]]:
    rows = select(PHOTOS.c.id, PHOTOS.c.said).where(PHOTOS.c.site_id == site_id)
    unsaid = read_sentences()["lists"]["photo"]
    with database().reading() as found:
        return [(row.id, json.loads(row.said)["caption"] or unsaid) for row in found.execute(rows)]


@pages.get("/photo/<photo_id>")
def photo(region_id: str, site_id: str, photo_id: str) -> Response:
    """One of the record's photos."""
    record_or_404(region_id, site_id)
    wanted = select(PHOTOS).where(PHOTOS.c.id == photo_id, PHOTOS.c.site_id == site_id)
    with database().reading() as found:
        row = found.execute(wanted).one_or_none()
    kind = json.loads(row.said)["type"] if row is not None else ""
    if row is None or kind not in PICTURES:
        abort(404)
    return Response(row.bytes, content_type=kind)


@pages.post("/decide")
def decide(region_id: str, site_id: str) -> BaseResponse:
    """Keeps what a person says of the call; the record stays as it came."""
    look, site = shelf().look(region_id), record_or_404(region_id, site_id)
    say, given = read_phrases()["records"], request.form
    kind, zone = given.get("kind", ""), given.get("zone", "")
    if kind == "confirmed":
        zone = standing_zone(site) or ""
    elif zone not in known_here(look).zones:
        zone = ""
    said = Decision(
        revision=given.get("revision", 0, type=int),
        kind=kind,
        zone_id=zone or None,
        person=text(given.get("person", ""), 200),
        reason=text(given.get("reason", ""), LONGEST_REASON),
        at=now(),
    )
    try:
        store().decide(site_id, said)
        flash(say["decided_now"])
    except Unsigned as refused:
        flash(say[refused.code])
    return redirect(url_for("record.show", region_id=region_id, site_id=site_id))


@pages.post("/settle")
def settle(region_id: str, site_id: str) -> BaseResponse:
    """Ends a conflict with one of two versions."""
    record_or_404(region_id, site_id)
    say, mark = read_phrases()["records"], request.form.get("mark", "")
    done = store().settle(site_id, mark, request.form.get("keep") == "side")
    flash(say["settled" if done else "changed"])
    return redirect(url_for("record.show", region_id=region_id, site_id=site_id))
