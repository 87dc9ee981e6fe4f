"""A printable page of records by unit: finished strings for one template, no script, no links."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

from jinja2 import Environment, FileSystemLoader, StrictUndefined

from builder.records.clean import Record
from builder.records.exchange import Records, shown_site
from builder.records.known import (
    Knowledge,
    Known,
    belief_of,
    ground_of,
    position_of,
    standing_zone,
)
from builder.records.sentences import read_sentences

HERE = Path(__file__).parent
MOST_REASONS = 40


@dataclass(frozen=True)
class Table:
    """One table: title, column heads, rows of finished cells."""

    title: str
    heads: tuple[str, ...]
    rows: Sequence[tuple[str, ...]]


@dataclass(frozen=True)
class Sheet:
    """One site check, ready to print."""

    title: str
    lead: str
    facts: list[tuple[str, str]]
    tables: list[Table]
    caution: str = ""


@dataclass(frozen=True)
class UnitPart:
    """One unit with its site checks."""

    title: str
    said: str
    sheets: list[Sheet]


@dataclass(frozen=True)
class Page:
    """What the template shows."""

    title: str
    made: str
    units: list[UnitPart] = field(default_factory=list)


def write_report(records: Records, knowledge: Knowledge, day: str, names: bool = False) -> str:
    """The report as one page of HTML. day: when it is written; names: observers in full"""
    loader = FileSystemLoader(HERE / "templates")
    pages = Environment(loader=loader, autoescape=True, undefined=StrictUndefined)
    pages.trim_blocks = pages.lstrip_blocks = True
    return str(
        pages.get_template("report.html").render(page=page_of(records, knowledge, day, names))
    )


def page_of(records: Records, knowledge: Knowledge, day: str, names: bool) -> Page:
    """The page's strings: units by name, site checks without one last."""
    say = read_sentences()["report"]
    unit_names = {unit["id"]: unit["name"] for unit in records.units}
    parts: dict[str | None, list[Record]] = {}
    for site in sorted(records.sites, key=lambda site: (site["date"], site["name"], site["id"])):
        parts.setdefault(site["unit_id"], []).append(shown_site(site, names))
    titled = []
    for unit_id, sites in parts.items():
        name = unit_names.get(unit_id or "") or next(
            (site["unit_name"] for site in sites if site["unit_name"]), say["unnamed"]
        )
        title = say["lone"] if unit_id is None else say["unit"].format(name=name)
        sheets = [sheet_of(site, knowledge.of(site)) for site in sites]
        titled.append((unit_id is None, UnitPart(title, _zones(sites, knowledge), sheets)))
    units = [part for _, part in sorted(titled, key=lambda one: (one[0], one[1].title))]
    made = say["made"].format(day=day, n=f"{len(records.sites):,}")
    return Page(say["title"], made, units)


def _zones(sites: list[Record], knowledge: Knowledge) -> str:
    say = read_sentences()["report"]
    found: Counter[str] = Counter()
    for site in sites:
        zone = standing_zone(site)
        if zone is not None:
            found[knowledge.of(site).zones.get(zone, zone)] += 1
    listed = ", ".join(say["one_of"].format(zone=zone, n=n) for zone, n in found.most_common())
    return str(say["zones"].format(zones=listed) if listed else say["no_zone"])


def sheet_of(site: Record, known: Known) -> Sheet:
    """One site check: what was seen, what was called and why."""
    say = read_sentences()["report"]
    position = position_of(site, known)
    return Sheet(
        title=site["name"] or say["unnamed"],
        lead=say["tables"].format(region=known.name, edition=site["edition"]),
        facts=[(say["facts"][name], value) for name, value in _facts(site, known) if value],
        tables=[one for one in (_found(site, known), _answers(site, known)) if one.rows]
        + reasons_table(site, known),
        caution=say["rounded"] if position is not None and position.rounded else "",
    )


def _facts(site: Record, known: Known) -> list[tuple[str, str]]:
    say, place = read_sentences()["report"], ground_of(site, known)
    height, overruled = place["height_m"], site["overruled"] or {}
    own = overruled.get("zone_id")
    disturbance = site["disturbance"] or ""
    return [
        ("day", site["date"]),
        ("observer", site["observer"]),
        ("role", say["roles"][site["role"]]),
        ("where", where_said(site, known)),
        ("height", "" if height is None else say["height"].format(m=height)),
        ("slope", _slope(place)),
        ("disturbance", known.disturbances.get(disturbance, disturbance)),
        ("searched", say["searched_whole" if site["whole_plot_searched"] else "searched_part"]),
        ("call", call_said(site, known)),
        ("own", _own(own, overruled.get("reason"), known) if isinstance(own, str) else ""),
        ("notes", site["notes"]),
        ("photos", str(len(site["photos"])) if site["photos"] else ""),
    ]


def where_said(site: Record, known: Known) -> str:
    """Position with its uncertainty, empty where there is none."""
    position = position_of(site, known)
    if position is None:
        return ""
    say = read_sentences()["report"]
    where = say["where"].format(
        lat=position.latitude_deg, lon=position.longitude_deg, digits=2 if position.rounded else 5
    )
    if position.uncertainty_m is None:
        return str(where)
    return str(say["within"].format(where=where, m=position.uncertainty_m))


def _slope(place: dict[str, Any]) -> str:
    say, slope, aspect = read_sentences()["report"], place["slope_pct"], place["aspect_deg"]
    if slope is None:
        return ""
    words = say["slope"] if aspect is None else say["facing"]
    return str(words.format(slope=slope, aspect=aspect))


def _own(zone: str, reason: Any, known: Known) -> str:
    said = reason if isinstance(reason, str) else ""
    words = read_sentences()["report"]["own"]
    return str(words.format(zone=known.zones.get(zone, zone), reason=said))


def call_said(site: Record, known: Known) -> str:
    """The kept call in a few words."""
    say, kept = read_sentences()["report"], site["call"] or {}
    zone, verdict = kept.get("zone_id"), kept.get("verdict")
    if not isinstance(zone, str) or not isinstance(verdict, str):
        return str(say["no_call"])
    belief = belief_of(site)
    words = say["call"] if belief is None else say["call_belief"]
    named = say["verdicts"].get(verdict, verdict)
    return str(
        words.format(zone=known.zones.get(zone, zone), verdict=named, share=100 * (belief or 0))
    )


def _found(site: Record, known: Known) -> Table:
    say = read_sentences()["report"]
    rows = [
        (subject_said(one, known), str(say["states"][one["state"]]), one["cover"] or "")
        for one in site["findings"]
    ]
    return Table(say["findings"], tuple(say["heads"].values()), rows)


def subject_said(finding: Record, known: Known) -> str:
    """The plant or group of a finding, by its names."""
    if "group_id" in finding:
        return known.groups.get(finding["group_id"], (finding["group_id"], ()))[0]
    plant = known.plants.get(finding["plant_id"])
    return f"{plant.common} ({plant.scientific})" if plant else str(finding["plant_id"])


def _answers(site: Record, known: Known) -> Table:
    say = read_sentences()["report"]
    rows = []
    for question, value in site["questions"].items():
        ask, labels = known.questions.get(question, (question, {}))
        rows.append((ask, say["cant_tell"] if value == "cant_tell" else labels.get(value, value)))
    return Table(say["answers"], (), rows)


def reasons_table(site: Record, known: Known) -> list[Table]:
    """Reasons of the kept call; no table where none were kept."""
    say, kept = read_sentences()["report"], site["call"] or {}
    reasons = kept.get("reasons")
    if not isinstance(reasons, list):
        return []
    rows = []
    for one in reasons[:MOST_REASONS]:
        if isinstance(one, dict) and isinstance(one.get("points_cb"), int):
            rows.append((_reason_said(one, known), f"{one['points_cb']:+d}"))
    rival = kept.get("next_zone_id")
    named = known.zones.get(rival, rival) if isinstance(rival, str) else ""
    heads = tuple(say["reason_heads"].values())
    return [Table(say["reasons"].format(rival=named), heads, rows)] if rows else []


def _reason_said(reason: dict[str, Any], known: Known) -> str:
    say, name = read_sentences()["report"], str(reason.get("id") or "")
    kind, answer = str(reason.get("kind")), str(reason.get("answer") or "")
    if kind == "plant" and name in known.plants:
        name = known.plants[name].common
    elif kind == "group" and name in known.groups:
        name = known.groups[name][0]
    elif kind == "question" and name in known.questions:
        ask, labels = known.questions[name]
        name, answer = ask, labels.get(answer, answer)
    said = [str(say["kinds"].get(kind, "")), name, str(say["states"].get(answer, answer))]
    return " ".join(part for part in said if part)
