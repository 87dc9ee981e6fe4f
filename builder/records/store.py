"""The crews' records in a database: taken in as phones merge them, listed, decided, handed out."""

from __future__ import annotations

import hashlib
import json
from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from datetime import UTC, datetime
from typing import Any

from sqlalchemy import Connection, delete, func, insert, select, update

from builder.records.clean import Record
from builder.records.database import BODIES, DECISIONS, PHOTOS, SIDES, SITES, UNITS, Database
from builder.records.exchange import Records
from builder.records.known import belief_of, standing_zone
from builder.records.merge import canonical, settled, standing
from builder.records.review import review

DESK = "desk"  # the device that the desk counts as, where it settles two versions
AT_ONCE = 500
CELLS_PER_DEGREE = 1000
MOST_WORDS = 2_000
KINDS = ("confirmed", "corrected")


@dataclass
class Taken:
    """Ids of site checks by what became of them; how many units and photos were new."""

    added: list[str] = field(default_factory=list)
    replaced: list[str] = field(default_factory=list)
    kept: list[str] = field(default_factory=list)
    same: list[str] = field(default_factory=list)
    conflicts: list[str] = field(default_factory=list)
    units: int = 0
    photos: int = 0


LISTS = {"theirs": "replaced", "mine": "kept", "same": "same", "conflict": "conflicts"}


@dataclass(frozen=True)
class Decision:
    """What a person said of a call; the record stays as it came."""

    revision: int
    kind: str
    zone_id: str | None
    person: str
    reason: str
    at: str


class Unsigned(Exception):  # noqa: N818 - told to the person
    """A decision lacks a name, a reason or a zone, or the record has changed meanwhile.

    code  unsigned or changed
    """

    def __init__(self, code: str) -> None:
        super().__init__(code)
        self.code = code


class RecordStore:
    """Everything that is kept of records."""

    def __init__(self, database: Database) -> None:
        self.database = database

    def take_in(self, records: Records) -> Taken:
        """Takes a file or a batch in one transaction, by id and revision as phones do.

        New and later versions stand, earlier and equal ones do nothing, and of two that each hold
        a change the other lacks both are kept. Units and photos come in where their id is new.
        """
        taken = Taken()
        incoming: list[Record] = [*records.sites, *(site for _, site in records.sides)]
        with self.database.writing() as to:
            for start in range(0, len(incoming), AT_ONCE):
                self._merge(to, incoming[start : start + AT_ONCE], taken)
            taken.units = _add_new(
                to, UNITS, [{"id": one["id"], "body": json.dumps(one)} for one in records.units]
            )
            taken.photos = _add_new(to, PHOTOS, [_photo_row(one) for one in records.photos])
        return taken

    def _merge(self, to: Connection, incoming: Sequence[Record], taken: Taken) -> None:
        ids = {site["id"] for site in incoming}
        found = to.execute(select(BODIES).where(BODIES.c.id.in_(ids)))
        stored = {row.id: json.loads(row.body) for row in found}
        new: dict[str, Record] = {}
        later: dict[str, Record] = {}
        for site in incoming:
            mine = stored.get(site["id"])
            verdict = "new" if mine is None else standing(mine, site)
            if verdict == "new":
                new[site["id"]] = stored[site["id"]] = site
                taken.added.append(site["id"])
                continue
            getattr(taken, LISTS[verdict]).append(site["id"])
            if verdict == "theirs":
                stored[site["id"]] = site
                (new if site["id"] in new else later)[site["id"]] = site
        if new:
            to.execute(insert(BODIES), [_body(site) for site in new.values()])
            to.execute(insert(SITES), [_row(site, 0) for site in new.values()])
        for site in later.values():
            self._put(to, site)
        conflicts = set(taken.conflicts)
        for site in (one for one in incoming if one["id"] in conflicts):
            if standing(stored[site["id"]], site) == "conflict":
                self._keep_side(to, site)

    def _put(self, to: Connection, site: Record) -> None:
        to.execute(update(BODIES).where(BODIES.c.id == site["id"]).values(_body(site)))
        kept = to.execute(select(SIDES).where(SIDES.c.site_id == site["id"])).all()
        spent = [one.mark for one in kept if standing(site, json.loads(one.body)) != "conflict"]
        if spent:
            to.execute(delete(SIDES).where(SIDES.c.mark.in_(spent)))
        row = _row(site, len(kept) - len(spent))
        to.execute(update(SITES).where(SITES.c.id == site["id"]).values(row))

    def _keep_side(self, to: Connection, site: Record) -> None:
        mark = hashlib.sha256(canonical(site).encode()).hexdigest()
        if to.scalar(select(SIDES.c.mark).where(SIDES.c.mark == mark)) is not None:
            return
        to.execute(
            insert(SIDES),
            {
                "mark": mark,
                "site_id": site["id"],
                "body": json.dumps(site),
                "received_at": now(),
            },
        )
        counted = SITES.c.sides + 1
        to.execute(update(SITES).where(SITES.c.id == site["id"]).values(sides=counted))

    def record(self, site_id: str) -> Record | None:
        """One record, or None."""
        with self.database.reading() as found:
            body = found.scalar(select(BODIES.c.body).where(BODIES.c.id == site_id))
        return json.loads(body) if body is not None else None

    def sides(self, site_id: str) -> list[tuple[str, Record]]:
        """(mark, other version) of a record, oldest first."""
        wanted = select(SIDES).where(SIDES.c.site_id == site_id).order_by(SIDES.c.received_at)
        with self.database.reading() as found:
            return [(row.mark, json.loads(row.body)) for row in found.execute(wanted)]

    def settle(self, site_id: str, mark: str, keep_side: bool) -> bool:
        """Ends a conflict with one version; what results stands over both on every phone.

        False when there is no such version any more.
        """
        with self.database.writing() as to:
            side = to.scalar(
                select(SIDES.c.body).where(SIDES.c.mark == mark, SIDES.c.site_id == site_id)
            )
            mine = to.scalar(select(BODIES.c.body).where(BODIES.c.id == site_id))
            if side is None or mine is None:
                return False
            pair = [json.loads(mine), json.loads(side)]
            chosen, other = reversed(pair) if keep_side else pair
            to.execute(delete(SIDES).where(SIDES.c.mark == mark))
            self._put(to, {**settled(chosen, other, DESK), "changed_at": now()})
        return True

    def decide(self, site_id: str, decision: Decision) -> None:
        """Keeps what a person said of a call, beside the record and all said before.

        Raises Unsigned without name, reason or zone, or when the record has a later revision.
        """
        whole = decision.person.strip() and decision.reason.strip() and decision.kind in KINDS
        if not whole or (decision.kind == "corrected" and not decision.zone_id):
            raise Unsigned("unsigned")
        with self.database.writing() as to:
            body = to.scalar(select(BODIES.c.body).where(BODIES.c.id == site_id))
            if body is None or json.loads(body)["revision"] != decision.revision:
                raise Unsigned("changed")
            to.execute(insert(DECISIONS), {"site_id": site_id, **vars(decision)})
            changes: dict[str, Any] = {"open": False}
            if decision.zone_id:
                changes["zone_id"] = decision.zone_id
            to.execute(update(SITES).where(SITES.c.id == site_id).values(changes))

    def decisions(self, site_ids: Iterable[str]) -> list[tuple[str, Decision]]:
        """(record, decision) of some records, oldest first."""
        ids, made = list(site_ids), list[tuple[str, Decision]]()
        with self.database.reading() as found:
            for start in range(0, len(ids), AT_ONCE):
                wanted = DECISIONS.c.site_id.in_(ids[start : start + AT_ONCE])
                for row in found.execute(select(DECISIONS).where(wanted).order_by("number")):
                    said = (row.revision, row.kind, row.zone_id, row.person, row.reason, row.at)
                    made.append((row.site_id, Decision(*said)))
        return made

    def of_region(self, region_id: str, photos: bool = False) -> Records:
        """All records of a region with their units, to be written to a file."""
        ours = select(SITES.c.id).where(SITES.c.region_id == region_id)
        wanted = select(BODIES.c.body).join(SITES, SITES.c.id == BODIES.c.id)
        wanted = wanted.where(SITES.c.region_id == region_id).order_by(SITES.c.date, SITES.c.id)
        made = Records()
        with self.database.reading() as found:
            made.sites = [json.loads(body) for body in found.scalars(wanted)]
            units = {site["unit_id"] for site in made.sites if site["unit_id"]}
            everything = [json.loads(body) for body in found.scalars(select(UNITS.c.body))]
            made.units = [unit for unit in everything if unit["id"] in units]
            if photos:
                rows = found.execute(select(PHOTOS).where(PHOTOS.c.site_id.in_(ours)))
                made.photos = [{**json.loads(row.said), "bytes": row.bytes} for row in rows]
        return made

    def count(self) -> dict[str, int]:
        """How many records each region has."""
        counted = select(SITES.c.region_id, func.count()).group_by(SITES.c.region_id)
        with self.database.reading() as found:
            return {region_id: number for region_id, number in found.execute(counted)}


def now() -> str:
    """This moment, with offset."""
    return datetime.now(UTC).isoformat(timespec="seconds")


def _add_new(to: Connection, table: Any, rows: list[dict[str, Any]]) -> int:
    fresh = {row["id"]: row for row in reversed(rows)}
    ids = list(fresh)
    for start in range(0, len(ids), AT_ONCE):
        known = select(table.c.id).where(table.c.id.in_(ids[start : start + AT_ONCE]))
        for one in to.scalars(known):
            del fresh[one]
    if fresh:
        to.execute(insert(table), list(fresh.values()))
    return len(fresh)


def _photo_row(photo: Record) -> dict[str, Any]:
    said = {name: value for name, value in photo.items() if name != "bytes"}
    return {
        "id": photo["id"],
        "site_id": photo["site_id"],
        "said": json.dumps(said),
        "bytes": photo["bytes"],
    }


def _body(site: Record) -> dict[str, Any]:
    return {"id": site["id"], "body": json.dumps(site)}


def _row(site: Record, sides: int) -> dict[str, Any]:
    """What lists, searches and maps need of a record; a new revision is open to review anew."""
    place, why = site["place"], review(site)
    kept = (site["call"] or {}).get("verdict")
    latitude, longitude = place["latitude_deg"], place["longitude_deg"]
    on_map = latitude is not None and longitude is not None
    zone = standing_zone(site)
    plain = ("id", "revision", "region_id", "edition", "unit_id", "unit_name", "name", "observer")
    return {
        **{name: site[name] for name in (*plain, "role", "date")},
        "verdict": kept[:16] if isinstance(kept, str) else None,
        "zone_id": zone[:64] if zone else None,
        "belief": belief_of(site),
        "cell_x": int((longitude + 180) * CELLS_PER_DEGREE) if on_map else None,
        "cell_y": int((latitude + 90) * CELLS_PER_DEGREE) if on_map else None,
        **vars(why),
        "open": why.wanted,
        "sides": sides,
        "words": _words(site),
        "received_at": now(),
    }


def _words(site: Record) -> str:
    plants = [one.get("plant_id", "") for one in site["findings"] if one["state"] == "found"]
    parts = [site[name] for name in ("name", "unit_name", "observer", "id", "date", "notes")]
    return " ".join([*parts, *plants]).lower()[:MOST_WORDS]
