"""What records become for other programs and people: CSV, GeoJSON, Darwin Core, a page."""

import csv
import dataclasses
import io
import json
import struct
import xml.etree.ElementTree as ET
import zipfile
import zlib

import pytest
from helpers import three_zone_files, write_region

from builder.cli import main
from builder.records.darwin_core import EVENT, MEASUREMENT, OCCURRENCE, write_archive
from builder.records.exchange import Records, read_records, write_records
from builder.records.flat import csv_line, harmless, write_csv
from builder.records.geojson import write_geojson
from builder.records.known import Knowledge, known_of, position_of
from builder.records.pictures import without_metadata
from builder.records.report import write_report
from builder.tables import load_region
from tests.records.helpers import file_text, found, record

TEXT = "{http://rs.tdwg.org/dwc/text/}"
TERMS = "http://rs.tdwg.org/dwc/terms/"


@pytest.fixture(scope="module")
def known(tmp_path_factory):
    folder = write_region(tmp_path_factory.mktemp("keydata") / "willow_breaks", three_zone_files())
    return known_of(load_region(folder).region)


@pytest.fixture(scope="module")
def guarded(known):
    """The same region with one plant marked sensitive."""
    return dataclasses.replace(known, sensitive=frozenset({"skunkbush"}))


def csv_rows(*sites, known, **also):
    text = write_csv(Records(sites=list(sites)), Knowledge([known]), **also)
    return list(csv.DictReader(io.StringIO(text, newline="")))


def archive(*sites, known):
    packed = zipfile.ZipFile(
        io.BytesIO(write_archive(Records(sites=list(sites)), Knowledge([known])))
    )
    tables = {}
    for name in packed.namelist():
        if name.endswith(".txt"):
            head, *lines = packed.read(name).decode().splitlines()
            heads = head.split("\t")
            tables[name] = [dict(zip(heads, line.split("\t"), strict=True)) for line in lines]
    return packed, tables


def test_csv_quoting():
    # RFC 4180 (2005), section 2
    cells = ['a "b"', "c, d", "plain", "two\nlines"]
    assert csv_line(cells) == '"a ""b""","c, d",plain,"two\nlines"\r\n'


@pytest.mark.parametrize("start", ["=", "+", "-", "@", "\t", "\r", " =", "\uff1d"])
def test_cells_a_spreadsheet_would_run_are_made_harmless(known, start):
    hostile = f'{start}HYPERLINK("x")'
    (row,) = csv_rows(record(name=hostile, notes=hostile), known=known)
    assert row["name"] == row["notes"] == f"'{hostile}"
    assert (harmless(-108.5), harmless("a-b"), harmless(None)) == (-108.5, "a-b", None)


def test_csv_holds_a_line_for_each_finding(known):
    findings = [found("blue_grama", "2"), found("skunkbush", state="not_found")]
    rows = csv_rows(record(findings=findings, observer="Ana Ruiz"), record(id="b"), known=known)
    assert [(row["site_id"], row["plant_id"], row["state"]) for row in rows] == [
        ("a1", "blue_grama", "found"), ("a1", "skunkbush", "not_found"), ("b", "", ""),
    ]  # fmt: skip
    first = rows[0]
    assert (first["scientific_name"], first["cover_low_pct"]) == ("Bouteloua gracilis", "5")
    assert (first["latitude_deg"], first["longitude_deg"]) == ("45.72", "-108.5")
    assert (first["observer"], first["belief"], first["zone_id"]) == ("A. R.", "0.97", "prairie")
    (named,) = csv_rows(record(observer="Ana Ruiz"), known=known, names=True)
    assert named["observer"] == "Ana Ruiz"


def test_geojson_is_longitude_first_on_wgs_84(known):
    # RFC 7946 (2016), sections 3.1.1 and 4
    place = dict.fromkeys(record()["place"])
    made = json.loads(
        write_geojson(Records(sites=[record(), record(id="b", place=place)]), Knowledge([known]))
    )
    assert (made["type"], "crs" in made) == ("FeatureCollection", False)
    first, second = made["features"]
    assert first["geometry"] == {"type": "Point", "coordinates": [-108.5, 45.72]}
    assert (first["type"], first["id"], second["geometry"]) == ("Feature", "a1", None)
    assert first["properties"]["zone_id"] == "prairie"
    assert "latitude_deg" not in first["properties"]


def test_positions_of_sensitive_plants_are_rounded(guarded):
    here, other = record(), record(findings=[found("skunkbush", "1")])
    assert position_of(here, guarded).rounded is False
    made = position_of(other, guarded)
    assert (made.latitude_deg, made.longitude_deg, made.rounded) == (45.725, -108.475, True)
    # Half the diagonal of a cell of 0.05 degrees there, by the haversine formula: 3,398 m, + 6 m
    assert made.uncertainty_m == pytest.approx(3404, abs=8)
    looked = record(findings=[found("skunkbush", state="not_found")])
    assert position_of(looked, guarded).rounded is False


def test_no_export_tells_where_a_sensitive_plant_stands(guarded):
    site = record(findings=[found("skunkbush", "1")])
    site["place"] |= {"latitude_deg": 45.7212345, "longitude_deg": -108.5123456}
    site["place"] |= {"height_m": 1234.5, "slope_pct": 37.25, "aspect_deg": 211.5}
    records, knowledge = Records(sites=[site]), Knowledge([guarded])
    packed, _ = archive(site, known=guarded)
    texts = [
        write_csv(records, knowledge), write_geojson(records, knowledge),
        write_report(records, knowledge, "2026-07-05"),
        *(packed.read(name).decode() for name in packed.namelist()),
    ]  # fmt: skip
    for text in texts:
        assert "45.721" not in text
        assert "108.512" not in text
        assert not any(ground in text for ground in ("1234", "1,234", "37.25", "211.5"))


def test_without_tables_every_position_is_rounded():
    (row,) = csv_rows(record(region_id="elsewhere"), known=known_of_nothing())
    assert (row["position_rounded"], row["latitude_deg"]) == ("true", "45.75")
    assert Knowledge([]).unknown([record()]) == ["willow_breaks"]


def known_of_nothing():
    return Knowledge([]).of(record())


def test_a_darwin_core_archive_reads_as_its_meta_says(known):
    site = record(findings=[found("blue_grama", "2"), found("skunkbush", state="not_found")])
    packed, tables = archive(site, known=known)
    meta = ET.fromstring(packed.read("meta.xml"))
    core, *extensions = list(meta)
    assert core.tag == f"{TEXT}core"
    assert [one.tag for one in extensions] == [f"{TEXT}extension"] * 2
    for part in (core, *extensions):
        name = part.find(f"{TEXT}files/{TEXT}location").text
        heads = packed.read(name).decode().splitlines()[0].split("\t")
        for field in part.findall(f"{TEXT}field"):
            assert field.get("term") == TERMS + heads[int(field.get("index"))]
        assert part.get("linesTerminatedBy") == "\\n"
    assert {row["eventID"] for rows in tables.values() for row in rows} == {"a1"}


def test_darwin_core_names_the_terms():
    # Darwin Core (TDWG), http://rs.tdwg.org/dwc/terms/
    assert {
        "eventID", "parentEventID", "eventDate", "samplingProtocol", "sampleSizeValue",
        "sampleSizeUnit", "habitat", "fieldNumber", "decimalLatitude", "decimalLongitude",
        "geodeticDatum", "coordinateUncertaintyInMeters", "minimumElevationInMeters",
    } <= set(EVENT)  # fmt: skip
    assert {
        "occurrenceID", "eventID", "basisOfRecord", "scientificName", "taxonRank",
        "vernacularName", "occurrenceStatus", "organismQuantity", "organismQuantityType",
        "recordedBy", "identificationQualifier",
    } <= set(OCCURRENCE)  # fmt: skip
    assert {
        "measurementID", "measurementType", "measurementValue", "measurementUnit",
        "measurementMethod", "measurementAccuracy",
    } <= set(MEASUREMENT)  # fmt: skip


def test_absent_species_are_recorded(known):
    findings = [found("blue_grama", "+"), found("skunkbush", state="cant_tell")]
    _, tables = archive(record(findings=findings, whole_plot_searched=True), known=known)
    rows = {row["scientificName"]: row for row in tables["occurrence.txt"]}
    here = rows["Bouteloua gracilis"]
    assert (here["occurrenceStatus"], here["organismQuantity"]) == ("present", "+")
    assert here["organismQuantityType"] == "cover class, Braun-Blanquet"
    assert rows["Pinus ponderosa"]["occurrenceStatus"] == "absent"
    assert "Rhus trilobata" not in rows  # nobody could tell
    _, tables = archive(record(findings=findings), known=known)
    assert [row["scientificName"] for row in tables["occurrence.txt"]] == ["Bouteloua gracilis"]


def test_plants_out_of_season_are_not_absent(known):
    site = record(whole_plot_searched=True, month=1)
    _, tables = archive(site, known=known)
    absent = {row["scientificName"] for row in tables["occurrence.txt"]}
    hidden = {one.scientific for one in known.plants.values() if not one.seen_in(1)}
    assert "Pinus ponderosa" in absent
    assert not absent & hidden


def test_the_report_escapes_what_people_wrote(known):
    hostile = "<script>alert(1)</script>"
    sites = [
        record(
            unit_id="u",
            name=hostile,
            notes=hostile,
            overruled={"zone_id": "breaks", "reason": hostile},
        ),
        record(id="b"),
    ]
    records = Records(sites=sites, units=[{"id": "u", "name": "Pad <7>"}])
    page = write_report(records, Knowledge([known]), "2026-07-05")
    assert "<script" not in page
    assert "Unit: Pad &lt;7&gt;" in page
    assert page.index("Unit: Pad") < page.index("Site checks without a unit")
    assert "Zones that stand: Pine breaks (1)." in page
    assert "Mixed prairie: zone, belief 97 of 100" in page


JFIF = b"\xff\xe0\x00\x04JF"
EXIF = b"\xff\xe1\x00\x0aExif\0\0GP"
SCAN = b"\xff\xda\x00\x02picture\xff\xd9"


def chunk(kind, data):
    return struct.pack(">I", len(data)) + kind + data + struct.pack(">I", zlib.crc32(kind + data))


@pytest.mark.parametrize(
    ("kind", "content", "bare"),
    [
        ("image/jpeg", b"\xff\xd8" + JFIF + EXIF + SCAN, b"\xff\xd8" + JFIF + SCAN),
        (
            "image/png",
            b"\x89PNG\r\n\x1a\n" + chunk(b"eXIf", b"GP") + chunk(b"IEND", b""),
            b"\x89PNG\r\n\x1a\n" + chunk(b"IEND", b""),
        ),
        (
            "image/webp",
            b"RIFF\x1c\0\0\0WEBPVP8 \x04\0\0\0abcdEXIF\x04\0\0\0GPSx",
            b"RIFF\x10\0\0\0WEBPVP8 \x04\0\0\0abcd",
        ),
    ],
)
def test_photo_metadata_is_dropped(kind, content, bare):
    assert without_metadata(content, kind) == bare
    photo = {"id": "p", "site_id": "a1", "type": kind, "bytes": content}
    text = write_records(Records(photos=[photo]), "2026-07-04T14:05:00-06:00")
    assert read_records(text).photos[0]["bytes"] == bare


@pytest.fixture
def home(tmp_path, monkeypatch):
    write_region(tmp_path / "keydata" / "willow_breaks", three_zone_files())
    monkeypatch.chdir(tmp_path)
    (tmp_path / "one.json").write_text(file_text(record(), record(id="b")))
    (tmp_path / "two.json").write_text(file_text(record(revision=2, name="later"), 7))
    return tmp_path


@pytest.mark.parametrize("form", ["json", "csv", "geojson", "dwca", "report"])
def test_the_command_writes_every_form(home, form, capsys):
    assert main(["records", "one.json", "two.json", "--out", "out", "--format", form]) == 0
    said = capsys.readouterr().out
    assert "out: 2 records" in said
    assert "Entry 2 of the site check list is not a record" in said
    content = (home / "out").read_bytes()
    if form == "dwca":
        assert zipfile.ZipFile(io.BytesIO(content)).testzip() is None
    else:
        assert "later" in content.decode()


def test_the_command_tells_what_it_cannot_read(home, capsys):
    (home / "bad.json").write_text("[]")
    assert main(["records", "one.json", "bad.json", "--out", "out"]) == 1
    assert "not a file of records" in capsys.readouterr().err
    assert not (home / "out").exists()
