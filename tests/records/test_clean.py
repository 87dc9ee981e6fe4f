"""Records that came in a file are cleaned here as on the phone, or refused with a sentence."""

import base64
import json
from pathlib import Path

import pytest

from builder.records.clean import clean_photo, clean_site, clean_unit
from builder.records.exchange import (
    KIND,
    LARGEST_BYTES,
    Records,
    initials_of,
    read_records,
    write_records,
)
from builder.records.sentences import FileRefused, read_sentences

GOLDEN = json.loads(
    (Path(__file__).parents[1] / "goldens" / "cleaning.json").read_text(encoding="utf-8")
)
PNG = base64.b64encode(b"\x89PNG\r\n\x1a\n").decode()
WHOLE = GOLDEN["cases"][0]["raw"]
MADE_AT = "2026-07-04T14:05:00-06:00"


@pytest.mark.parametrize("case", GOLDEN["cases"], ids=lambda case: case["id"])
def test_a_site_check_is_cleaned_or_refused(case):
    got = clean_site(case["raw"])
    if "refused" in case:
        assert (got.record, got.refused) == (None, case["refused"])
    else:
        assert got.record == case["out"]
        assert list(got.changed) == case["changed"]


def test_a_cleaned_record_is_clean():
    seen = 0
    for case in GOLDEN["cases"]:
        if "out" in case:
            seen += 1
            again = clean_site(case["out"])
            assert (again.record, again.changed) == (case["out"], ())
    assert seen >= 10


def file_of(*sites, **more):
    return json.dumps({"format": 1, "kind": KIND, "sites": list(sites), **more})


@pytest.mark.parametrize(
    ("content", "code"),
    [
        ("{", "not_ours"),
        ("[]", "not_ours"),
        ('{"kind": "something else"}', "not_ours"),
        ('{"kind": "beltbook records", "sites": [NaN]}', "not_ours"),
        (b"\xff\xfe\x00", "not_ours"),
        (file_of(format=2), "newer"),
        ("[" * 200_000, "too_deep"),
        (b" " * (LARGEST_BYTES + 1), "too_large"),
    ],
)
def test_a_hostile_file_is_refused_in_a_sentence(content, code):
    with pytest.raises(FileRefused) as no:
        read_records(content)
    assert no.value.code == code
    assert str(no.value) == read_sentences()["file"][code]


def test_a_file_of_ours_near_the_limit_is_read():
    many = file_of(*([7] * 200_000), more="x" * 45_000_000)
    assert len(read_records(many).refused) == 200_000


def test_huge_numbers_do_not_stop_a_file():
    said = json.dumps(WHOLE)[:-1]
    for digits in ("9" * 400, "1e999", "9" * 5_000):
        site = f'{said}, "place": {{"height_m": {digits}}}}}'
        found = read_records(f'{{"kind": "{KIND}", "sites": [{site}]}}')
        assert found.sites[0]["place"]["height_m"] is None


def test_what_is_left_out_is_counted():
    photo = {"id": "p", "site_id": WHOLE["id"], "type": "image/png", "bytes_base64": "aGVsbG8="}
    units = [{"id": "u", "name": "Pad 7", "year_sown": 2024}, {"id": "u"}]
    found = read_records(file_of(WHOLE, 7, {**WHOLE, "name": 3}, units=units, photos=[photo]))
    assert [(one.what, one.at, one.why) for one in found.refused] == [
        ("site", 1, "not_a_record"),
        ("unit", 1, "incomplete"),
        ("photo", 0, "not_a_picture"),
    ]
    assert found.changed == [(WHOLE["id"], ("name",))]
    assert found.units == [{"id": "u", "name": "Pad 7", "year_sown": 2024, "format": 1}]
    entry = read_sentences()["entry"]
    assert all(one.why in entry for one in found.refused)


def test_units_and_photos_are_held_to_the_same_rules():
    assert clean_unit(7).refused == "not_a_record"
    assert clean_unit({"format": 9}).refused == "newer"
    assert clean_photo({"id": "p"}).refused == "incomplete"
    photo = {"id": "p", "site_id": "s", "type": "image/png", "bytes_base64": PNG, "caption": 4}
    assert clean_photo(photo).record == {
        "id": "p", "site_id": "s", "type": "image/png", "caption": "",
        "taken_at": "1970-01-01T00:00:00Z",
    }  # fmt: skip


def test_the_round_trip_is_exact():
    sites = [case["out"] for case in GOLDEN["cases"] if "out" in case]
    sites = [{**site, "id": f"s{n}"} for n, site in enumerate(sites)]
    sites[0]["place"] = {**sites[0]["place"], "latitude_deg": 41.1234567, "accuracy_m": 1e-7}
    photo = {"id": "p", "site_id": "s0", "type": "image/png", "bytes_base64": PNG}
    text = file_of(*sites, units=[{"id": "u", "name": "ñ", "format": 1}], photos=[photo])
    first = read_records(text)
    written = write_records(first, MADE_AT, names=True)
    second = read_records(written)
    assert second == first
    assert second.sites == sites
    assert write_records(second, MADE_AT, names=True) == written


@pytest.mark.parametrize(
    ("name", "initials"),
    [("Ana María Ruiz", "A. M. R."), ("A. M. R.", "A. M. R."), ("", ""), (" éva ", "É.")],
)
def test_observers_are_initials_unless_asked(name, initials):
    assert initials_of(name) == initials
    records = Records(sites=[{**WHOLE, "observer": name}])
    assert json.loads(write_records(records, MADE_AT))["sites"][0]["observer"] == initials
    assert json.loads(write_records(records, MADE_AT, True))["sites"][0]["observer"] == name
