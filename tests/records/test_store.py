"""What is kept of records: merged as phones merge, whole or not at all, decided, never changed."""

import json
import subprocess
import sys
import threading
import time
from pathlib import Path

import pytest
from sqlalchemy import select, update

from builder.records import store as storing
from builder.records.database import ABOUT, DECISIONS, SITES, Database, StoreRefused
from builder.records.devices import device_of, devices, make_device, revoke
from builder.records.exchange import Records, read_records
from builder.records.finding import Wanted, cells, degrees, find
from builder.records.review import review
from builder.records.store import Decision, RecordStore, Unsigned
from tests.records.helpers import CALL, file_text, found, record

ROOT = Path(__file__).parents[2]
HERE = Wanted("willow_breaks")


@pytest.fixture
def in_file(tmp_path):
    """A database in a SQLite file."""
    made = Database(f"sqlite:///{tmp_path}/records.sqlite")
    yield made
    made.close()


def taken(store, *sites, **more):
    return store.take_in(Records(sites=list(sites), **more))


def version(revision, **edits):
    return record(revision=revision, edits=edits, notes=f"{edits}")


def test_repeats_do_nothing_and_later_versions_stand(store):
    first, later = version(1, p=1), version(2, p=2)
    assert taken(store, first).added == ["a1"]
    assert taken(store, first).same == ["a1"]
    assert taken(store, later).replaced == ["a1"]
    assert taken(store, first).kept == ["a1"]
    assert store.record("a1") == later


def test_a_batch_holds_versions_in_any_order(store):
    made = taken(store, version(1, p=1), version(3, p=3), version(2, p=2))
    assert (made.added, made.replaced, made.kept) == (["a1"], ["a1"], ["a1"])
    assert store.record("a1") == version(3, p=3)


def test_both_sides_of_a_conflict_are_kept_until_a_person_settles(store, database):
    mine, theirs = version(2, p=2), version(2, p=1, q=1)
    taken(store, mine)
    for _ in range(2):
        assert taken(store, theirs).conflicts == ["a1"]
    ((mark, side),) = store.sides("a1")
    assert (store.record("a1"), side) == (mine, theirs)
    assert find(database, Wanted("willow_breaks", only="sides")).total == 1
    assert store.settle("a1", mark, keep_side=True)
    settled = store.record("a1")
    assert (settled["notes"], settled["edits"]) == (theirs["notes"], {"p": 2, "q": 1, "desk": 1})
    assert store.sides("a1") == []
    assert find(database, Wanted("willow_breaks", only="sides")).total == 0
    assert taken(store, mine, theirs).kept == ["a1", "a1"]  # it stands over either
    assert store.settle("a1", mark, keep_side=False) is False


def test_a_version_that_holds_both_sides_ends_the_conflict(store):
    taken(store, version(2, p=2))
    taken(store, version(2, p=1, q=1))
    taken(store, version(4, p=2, q=2))
    assert store.sides("a1") == []


def test_a_file_comes_in_whole_or_not_at_all(store, database, monkeypatch):
    def broken(_photo):
        raise OSError("disk full")

    monkeypatch.setattr(storing, "_photo_row", broken)
    with pytest.raises(OSError, match="disk full"):
        taken(store, record(), photos=[{"id": "p"}])
    assert find(database, HERE).total == 0
    assert store.record("a1") is None


def test_what_comes_out_is_what_came_in(store):
    sites = [record(id=f"s{n}", place={**record()["place"], "latitude_deg": n / 7}) for n in (1, 2)]
    units = [{"id": "u", "name": "Pad", "format": 1}, {"id": "v", "name": "Other", "format": 1}]
    sites[0]["unit_id"] = "u"
    read = read_records(file_text(*sites, units=units))
    store.take_in(read)
    out = store.of_region("willow_breaks")
    assert out.sites == read.sites
    assert out.units == units[:1]  # a unit goes with its records


def doubtful(**call):
    return record(call={**CALL, **call})


RULE = {"kind": "rule", "id": "wet", "answer": None}
QUEUED = {
    "low": doubtful(belief={"prairie": 0.89}),
    "edge": doubtful(verdict="edge"),
    "again": doubtful(look_again=True),
    "no_belief": doubtful(belief=3),
    "overruled": record(overruled={"zone_id": "breaks", "reason": "pines"}),
    "implied": record(struck=["implied"]),
    "struck": record(struck=["wet"]),
    "against": doubtful(reasons=[{**RULE, "points_cb": -4}]),
}
NOT_QUEUED = {
    "sure": record(),
    "just": doubtful(belief={"prairie": 0.9}),
    "no_call": record(call=None),
    "for": doubtful(reasons=[{**RULE, "points_cb": 4}]),
    "other": doubtful(reasons=[{"kind": "plant", "points_cb": -4}, 7]),
}


def test_the_queue_holds_all_that_want_a_look_and_only_them(store, database):
    sites = [{**site, "id": name} for name, site in {**QUEUED, **NOT_QUEUED}.items()]
    taken(store, *sites)
    queue = {row.id for row in find(database, Wanted("willow_breaks", only="open")).rows}
    assert queue == QUEUED.keys()
    why = {name: review(site) for name, site in QUEUED.items()}
    assert {name for name, one in why.items() if one.overruled} == {"overruled", "implied"}
    assert {name for name, one in why.items() if one.conflicted} == {"struck", "against"}


def decision(**changes):
    said = {
        "revision": 1, "kind": "corrected", "zone_id": "breaks", "person": "Ana Ruiz",
        "reason": "Pines.", "at": "2026-07-05T08:00:00+00:00",
    }  # fmt: skip
    return Decision(**said | changes)


def test_a_decision_is_kept_beside_the_record(store, database):
    site = doubtful(verdict="edge")
    taken(store, site)
    store.decide("a1", decision())
    store.decide("a1", decision(kind="confirmed", zone_id="prairie", person="B. Lee"))
    assert store.record("a1") == site
    assert [one.person for _, one in store.decisions(["a1"])] == ["Ana Ruiz", "B. Lee"]
    (row,) = find(database, HERE).rows
    assert (row.open, row.zone_id) == (False, "prairie")
    taken(store, {**site, "revision": 2, "notes": "more"})  # a later version is looked at anew
    assert find(database, Wanted("willow_breaks", only="open")).total == 1
    assert len(store.decisions(["a1"])) == 2


@pytest.mark.parametrize(
    "changes",
    [{"person": " "}, {"reason": ""}, {"kind": "x"}, {"zone_id": None}, {"revision": 2}],
)
def test_nothing_is_decided_unsigned_or_for_another_version(store, database, changes):
    taken(store, record())
    with pytest.raises(Unsigned):
        store.decide("a1", decision(**changes))
    with database.reading() as look:
        assert look.execute(select(DECISIONS)).all() == []


def test_search_finds_every_word_and_takes_none_as_a_pattern(store, database):
    taken(store, record(name="Stop 12 50%_"), record(id="b", findings=[found("skunkbush", "1")]))
    for words, ids in (
        ("STOP 12", ["a1"]), ("50%_", ["a1"]), ("5_%", []), ("stop nothing", []),
        ("skunkbush", ["b"]), ("'; drop", []), ("", ["b", "a1"]),
    ):  # fmt: skip
        got = find(database, Wanted("willow_breaks", words))
        assert ([row.id for row in got.rows], got.total) == (ids, len(ids))
    assert find(database, Wanted("elsewhere")).total == 0


def test_pages_hold_every_record_once(store, database):
    taken(store, *(record(id=f"s{n:03}", date=f"2026-07-{1 + n % 9:02}") for n in range(120)))
    pages = [find(database, HERE, page) for page in range(4)]
    assert [len(page.rows) for page in pages] == [50, 50, 20, 0]
    assert {page.total for page in pages} == {120}
    assert len({row.id for page in pages for row in page.rows}) == 120


def test_every_record_with_a_position_is_on_the_map(store, database):
    places = [(45.72, -108.5), (-33.9, 18.4), (0.0, 179.99), (None, None)]
    for n, (latitude, longitude) in enumerate(places):
        place = {**record()["place"], "latitude_deg": latitude, "longitude_deg": longitude}
        taken(store, record(id=f"s{n}", place=place))
    made = cells(database, HERE)
    assert sum(made.counts.values()) == 3
    for latitude, longitude in places[:3]:
        near = [degrees(cell, made.step) for cell in made.counts]
        size = made.step / 1000
        assert any(0 <= longitude - x < size and 0 <= latitude - y < size for x, y in near)
    for cell, number in made.counts.items():
        inside = find(database, Wanted("willow_breaks", cell=(*cell, made.step)))
        assert inside.total == number


def test_writers_wait_for_each_other(store):
    def hand_in(name):
        for n in range(10):
            taken(store, record(id=f"{name}{n}"))

    threads = [threading.Thread(target=hand_in, args=(name,)) for name in "pqrs"]
    for one in threads:
        one.start()
    for one in threads:
        one.join()
    assert store.count() == {"willow_breaks": 40}


def test_a_store_of_another_version_is_refused(tmp_path):
    url = f"sqlite:///{tmp_path}/records.sqlite"
    first = Database(url)
    with first.writing() as to:
        to.execute(update(ABOUT).values(version=2))
    first.close()
    with pytest.raises(StoreRefused, match="another version"):
        Database(url)


@pytest.mark.parametrize("url", ["nonsense", "nosuch://x/y", "mysql+nosuch://x/y"])
def test_a_url_nobody_can_open_is_told(url):
    with pytest.raises(StoreRefused, match="No database goes by that URL"):
        Database(url)


def test_a_key_is_kept_only_as_its_hash_and_can_be_revoked(in_file, tmp_path):
    key = make_device(in_file, "Blue phone")
    (one,) = devices(in_file)
    assert device_of(in_file, key) == one.id
    for wrong in ("", ".", f"{one.id}.", f"{key}x", f"ffffffff.{key.partition('.')[2]}", "\ud800"):
        assert device_of(in_file, wrong) is None
    in_file.close()
    kept = b"".join(path.read_bytes() for path in tmp_path.iterdir())
    assert key.partition(".")[2].encode() not in kept
    assert revoke(in_file, one.id)
    assert revoke(in_file, one.id) is False
    assert device_of(in_file, key) is None


def test_lists_queue_and_map_read_an_index_in_its_order(in_file):
    # A hundred thousand records are listed in time only while no list sorts them all.
    with in_file.reading() as look:
        for query in (
            "region_id = 'r' ORDER BY date DESC, id DESC",
            "region_id = 'r' AND open IS 1 ORDER BY date DESC, id DESC",
            "region_id = 'r' AND zone_id = 'z' ORDER BY date DESC, id DESC",
            "region_id = 'r' AND sides > 0",
        ):
            plan = look.exec_driver_sql(f"EXPLAIN QUERY PLAN SELECT * FROM {SITES} WHERE {query}")
            said = " ".join(str(row) for row in plan)
            assert "SEARCH sites USING INDEX" in said
            assert "TEMP B-TREE" not in said


HAND_IN = """
import json, sys
from builder.records.database import Database
from builder.records.exchange import Records
from builder.records.store import RecordStore
site = json.loads(sys.argv[2])
store = RecordStore(Database(sys.argv[1]))
print("begins", flush=True)
store.take_in(Records(sites=[{**site, "id": f"s{n}"} for n in range(50_000)]))
"""


@pytest.mark.parametrize("after_s", [0.0, 0.4, 1.2])
def test_a_desk_killed_in_the_middle_leaves_nothing_half(in_file, tmp_path, after_s):
    store = RecordStore(in_file)
    taken(store, record())
    command = [sys.executable, "-c", HAND_IN, str(in_file.engine.url), json.dumps(record())]
    with subprocess.Popen(command, stdout=subprocess.PIPE, cwd=ROOT) as desk:
        desk.stdout.readline()
        time.sleep(after_s)
        desk.kill()
    assert store.count() in ({"willow_breaks": 1}, {"willow_breaks": 50_001})
    assert store.record("a1") == record()
    assert taken(store, record(id="b")).added == ["b"]
