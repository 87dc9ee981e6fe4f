"""Records as a Darwin Core archive: events, what was found and looked for in vain, measurements.

Terms: Darwin Core (TDWG), http://rs.tdwg.org/dwc/terms/. Layout: its text guide, a zip with
meta.xml, a core file and extensions; tab-separated UTF-8 without quotes, so tabs and line ends
inside a value become blanks. Plants that were searched for and not found are absent; after a
whole plot was searched so are those nobody listed that can be recognised in that month.
"""

from __future__ import annotations

import io
import zipfile
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any
from xml.sax.saxutils import quoteattr

from builder.records.clean import Record
from builder.records.exchange import Records, shown_site
from builder.records.flat import harmless, text_or_none
from builder.records.known import (
    Knowledge,
    Known,
    belief_of,
    ground_of,
    members,
    position_of,
    standing_zone,
)
from builder.records.sentences import read_sentences

TERMS = "http://rs.tdwg.org/dwc/terms/"
TEXT = "http://rs.tdwg.org/dwc/text/"
ZIP_TIME = (1980, 1, 1, 0, 0, 0)  # so that the same records give the same bytes
EVENT = (
    "eventID", "parentEventID", "eventDate", "samplingProtocol", "sampleSizeValue",
    "sampleSizeUnit", "habitat", "fieldNumber", "decimalLatitude", "decimalLongitude",
    "geodeticDatum", "coordinateUncertaintyInMeters", "minimumElevationInMeters",
    "maximumElevationInMeters",
)  # fmt: skip
OCCURRENCE = (
    "eventID", "occurrenceID", "basisOfRecord", "scientificName", "taxonRank", "vernacularName",
    "occurrenceStatus", "organismQuantity", "organismQuantityType", "recordedBy",
    "identificationQualifier",
)  # fmt: skip
MEASUREMENT = (
    "eventID", "measurementID", "measurementType", "measurementValue", "measurementUnit",
    "measurementMethod", "measurementAccuracy",
)  # fmt: skip


@dataclass(frozen=True)
class Sheet:
    """One file of the archive; its first column is the event's id."""

    file: str
    row_type: str
    terms: tuple[str, ...]


EVENTS = Sheet("event.txt", "Event", EVENT)
OCCURRENCES = Sheet("occurrence.txt", "Occurrence", OCCURRENCE)
MEASUREMENTS = Sheet("measurement.txt", "MeasurementOrFact", MEASUREMENT)
SHEETS = (EVENTS, OCCURRENCES, MEASUREMENTS)


def write_archive(records: Records, knowledge: Knowledge, names: bool = False) -> bytes:
    """The archive as bytes of a zip. names: observers in full, else as initials"""
    rows: dict[str, list[tuple[Any, ...]]] = {sheet.file: [] for sheet in SHEETS}
    for site in (shown_site(one, names) for one in records.sites):
        known = knowledge.of(site)
        rows[EVENTS.file].append(_event(site, known))
        rows[OCCURRENCES.file] += _occurrences(site, known)
        rows[MEASUREMENTS.file] += _measurements(site, known)
    made = io.BytesIO()
    with zipfile.ZipFile(made, "w") as packed:
        packed.writestr(zipfile.ZipInfo("meta.xml", ZIP_TIME), meta_xml(), zipfile.ZIP_DEFLATED)
        for sheet in SHEETS:
            lines = [sheet.terms, *rows[sheet.file]]
            text = "".join("\t".join(map(_cell, line)) + "\n" for line in lines)
            packed.writestr(zipfile.ZipInfo(sheet.file, ZIP_TIME), text, zipfile.ZIP_DEFLATED)
    return made.getvalue()


def meta_xml() -> str:
    """What each file and column of the archive is."""
    parts = [f'<?xml version="1.0" encoding="UTF-8"?>\n<archive xmlns="{TEXT}">']
    for sheet in SHEETS:
        part, mark = ("core", "id") if sheet is EVENTS else ("extension", "coreid")
        row_type = quoteattr(TERMS + sheet.row_type)
        parts.append(
            f'  <{part} encoding="UTF-8" fieldsTerminatedBy="\\t" linesTerminatedBy="\\n"'
            f' fieldsEnclosedBy="" ignoreHeaderLines="1" rowType={row_type}>\n'
            f"    <files><location>{sheet.file}</location></files>\n"
            f'    <{mark} index="0"/>'
        )
        for index, term in enumerate(sheet.terms):
            if index > 0 or sheet is EVENTS:
                parts.append(f'    <field index="{index}" term="{TERMS}{term}"/>')
        parts.append(f"  </{part}>")
    return "\n".join([*parts, "</archive>", ""])


def _cell(value: Any) -> str:
    if value is None:
        return ""
    return " ".join(value.split()) if isinstance(value, str) else str(value)


def _event(site: Record, known: Known) -> tuple[Any, ...]:
    position, height = position_of(site, known), ground_of(site, known)["height_m"]
    zone = standing_zone(site)
    where: tuple[Any, ...] = (None,) * 4
    if position is not None:
        where = (position.latitude_deg, position.longitude_deg, "EPSG:4326", position.uncertainty_m)
    area = known.plot_area_m2
    return (
        site["id"],
        site["unit_id"],
        site["date"],
        read_sentences()["archive"]["protocol"].format(edition=site["edition"], name=known.name),
        area,
        None if area is None else "square metre",
        known.zones.get(zone or "", zone),
        harmless(site["name"]),
        *where,
        height,
        height,
    )


def _occurrences(site: Record, known: Known) -> Iterator[tuple[Any, ...]]:
    told: set[str] = set()
    for finding in site["findings"]:
        told.update(members(finding, known))
        if finding["state"] == "cant_tell":
            continue
        subject = finding.get("plant_id") or finding["group_id"]
        found = finding["state"] == "found"
        cover = finding["cover"] if found else None
        scale = f"cover class, {known.scale}" if known.scale else "cover class"
        yield (
            site["id"],
            f"{site['id']}:{subject}",
            "HumanObservation",
            *_taxon(finding, known),
            "present" if found else "absent",
            cover,
            scale if cover else None,
            harmless(site["observer"]),
            _qualifier(finding, known),
        )
    if not site["whole_plot_searched"]:
        return
    for plant_id, plant in known.plants.items():
        if plant_id not in told and plant.seen_in(site["month"]):
            yield (
                site["id"], f"{site['id']}:{plant_id}", "HumanObservation", plant.scientific,
                _rank(plant.scientific), plant.common, "absent", None, None,
                harmless(site["observer"]), None,
            )  # fmt: skip


def _taxon(finding: Record, known: Known) -> tuple[str, str | None, str | None]:
    """Scientific name, rank and common name; of a group the taxon its members share."""
    if "plant_id" in finding:
        plant = known.plants.get(finding["plant_id"])
        if plant is None:
            return finding["plant_id"], None, None
        return plant.scientific, _rank(plant.scientific), plant.common
    name = known.groups.get(finding["group_id"], (finding["group_id"], ()))[0]
    plants = [known.plants[one] for one in members(finding, known) if one in known.plants]
    genera = {plant.scientific.split()[0] for plant in plants}
    families = {plant.family for plant in plants}
    if len(genera) == 1:
        return genera.pop(), "genus", name
    if len(families) == 1:
        return families.pop(), "family", name
    return "Plantae", "kingdom", name


def _rank(scientific: str) -> str:
    for mark, rank in ((" subsp. ", "subspecies"), (" ssp. ", "subspecies"), (" var. ", "variety")):
        if mark in scientific:
            return rank
    return "genus" if scientific.endswith(" spp.") or " " not in scientific else "species"


def _qualifier(finding: Record, known: Known) -> str | None:
    if "plant_id" in finding:
        return None
    plants = [known.plants[one] for one in members(finding, known) if one in known.plants]
    return "one of: " + "; ".join(plant.scientific for plant in plants) if plants else None


def _measurements(site: Record, known: Known) -> Iterator[tuple[Any, ...]]:
    ground = ground_of(site, known)
    rows: list[tuple[str, Any, str | None]] = [
        ("slope", ground["slope_pct"], "percent"),
        ("aspect", ground["aspect_deg"], "degree from north"),
        ("disturbance", site["disturbance"], None),
        ("vegetation zone called", text_or_none((site["call"] or {}).get("zone_id")), None),
        ("belief in the zone called", belief_of(site), "share"),
        *(
            (f"ground question {name}", value, None)
            for name, value in sorted(site["questions"].items())
            if value != "cant_tell"
        ),
    ]
    for kind, value, unit in rows:
        if value is not None:
            yield (
                site["id"], f"{site['id']}:{kind.replace(' ', '_')}", kind, value, unit, None, None,
            )  # fmt: skip
