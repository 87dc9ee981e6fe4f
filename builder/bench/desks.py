"""The desk: one save of a large table, and a hundred thousand records listed and taken in."""

from __future__ import annotations

import json
import re
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Any

import numpy as np

from builder.bench.measure import Goal, Measure, Setting, Taken, seconds
from builder.desk.application import Settings, create_app
from builder.records.clean import clean_site
from builder.records.database import Database
from builder.records.devices import make_device
from builder.records.exchange import KIND, Records
from builder.records.store import RecordStore
from builder.rows import plain, read_yaml

RUNS = 5
UPLOADED = 1_000
AT_ONCE = 10_000


@contextmanager
def _desk(setting: Setting) -> Iterator[Any]:
    """A desk on the run's own folder, as a browser on this computer sees it."""
    app = create_app(Settings(setting.folder, setting.folder / "site_out"))
    yield app.test_client()
    app.extensions["jobs"].stop_all()
    app.extensions["records"].close()


def save(setting: Setting) -> Taken:
    """One constancy changed by the desk's form: table written, region checked, problems told."""
    name = setting.large.name
    root, _ = read_yaml(setting.large / "occurrence.yaml", "occurrence.yaml")
    assert root is not None
    plant, row = next(iter(plain(root)["occurrence"].items()))
    zone, (share, cover) = next(iter(row.items()))
    was = [f"{share} {cover}"]
    turn = iter(range(21, 99))
    with _desk(setting) as client:
        page = client.get("/").get_data(as_text=True)
        token = re.search(r'name="(?:desk-)?token" (?:content|value)="([^"]+)"', page)
        assert token, "the desk's page holds no token"
        headers = {"X-Desk-Token": token[1]}

        def work() -> None:
            new = f"{next(turn)} {cover}"
            key = f"occurrence/{plant}/{zone}"
            given = {"table": "occurrence", "key": key, "was": was[0], "text": new}
            answer = client.post(f"/r/{name}/save", data=given, headers=headers)
            assert answer.get_json()["saved"] == 1, answer.get_json()
            was[0] = new

        taken = _milliseconds(work, setting)
    return Taken(taken, None, "40 zones x 400 plants, no browser.")


def _milliseconds(work: Any, setting: Setting) -> tuple[float, ...]:
    return tuple(1000 * one for one in seconds(work, setting.runs(RUNS)))


def site_checks(region_id: str, zones: list[str], plants: list[str], count: int,
                first: int = 0) -> list[dict[str, Any]]:  # fmt: skip
    """Raw records as phones write them: eight findings, a place, a kept call."""
    rng = np.random.default_rng(first)
    made = []
    for at in range(first, first + count):
        rows = [
            {"plant_id": plants[p], "state": "found" if turn < 5 else "not_found",
             "cover": None, "named": None}
            for turn, p in enumerate(rng.choice(len(plants), 8, replace=False))
        ]  # fmt: skip
        zone = zones[int(rng.integers(len(zones)))]
        day = f"20{20 + at % 6}-{1 + at % 12:02}-{1 + at % 28:02}"
        place = {"latitude_deg": 38 + float(rng.normal(0, 0.3)),
                 "longitude_deg": -109 + float(rng.normal(0, 0.4)), "accuracy_m": 5}  # fmt: skip
        call = {"verdict": "zone", "zone_id": zone, "belief": {zone: 0.93}, "answers": 8}
        made.append({
            "format": 1, "id": f"bench-{at:07}", "revision": 1, "region_id": region_id,
            "edition": "1", "pack_hash": "0" * 16, "date": day, "name": f"Spot {at}",
            "unit_name": f"Unit {at % 900}", "observer": f"Crew {at % 40}", "place": place,
            "findings": rows, "call": call, "notes": f"slope {at % 77} by the old fence",
        })  # fmt: skip
    return made


def _stored(setting: Setting) -> tuple[Path, int]:
    """The desk's file of records, filled on first use, and how many it holds."""
    count = setting.size(100_000, 2_000)
    state = setting.folder / ".beltbook"
    path = state / "records.sqlite"
    if not path.is_file():
        state.mkdir(exist_ok=True)
        database = Database(f"sqlite:///{path}")
        store, region = RecordStore(database), setting.region
        for start in range(0, count, AT_ONCE):
            raw = site_checks(region.id, list(region.zone_ids), list(region.plant_ids),
                              min(AT_ONCE, count - start), start)  # fmt: skip
            cleaned = [clean_site(one).record for one in raw]
            store.take_in(Records(sites=[one for one in cleaned if one is not None]))
        database.close()
    return path, count


def _page(setting: Setting, address: str) -> Taken:
    """One page of the desk's records, asked for again and again."""
    _, count = _stored(setting)
    folder = setting.folder / "keydata" / setting.demo.name
    if not folder.is_dir():
        folder.parent.mkdir(exist_ok=True)
        folder.symlink_to(setting.demo.resolve(), target_is_directory=True)
    with _desk(setting) as client:

        def work() -> None:
            answer = client.get(f"/r/{setting.demo.name}/records{address}")
            assert answer.status_code == 200, answer.status

        work()
        taken = _milliseconds(work, setting)
    return Taken(taken, None, f"{count:,} records, the whole page made, no browser.")


def upload(setting: Setting) -> Taken:
    """A phone's file of records: sent, read, cleaned, merged into what is there, stored."""
    path, count = _stored(setting)
    database = Database(f"sqlite:///{path}")
    headers = {"Authorization": f"Bearer {make_device(database, 'bench')}"}
    database.close()
    region, many = setting.region, setting.size(UPLOADED, 100)
    files = iter([
        json.dumps({"format": 1, "kind": KIND, "units": [], "sites": site_checks(
            region.id, list(region.zone_ids), list(region.plant_ids), many, 10_000_000 + turn * many
        )}) for turn in range(RUNS)
    ])  # fmt: skip
    with _desk(setting) as client:

        def work() -> None:
            answer = client.post("/upload", data=next(files), headers=headers)
            assert len(answer.get_json()["added"]) == many, answer.get_json()

        taken = seconds(work, setting.runs(3))
    return Taken(taken, None, f"{many:,} new records beside {count:,}, no network.")


MEASURES = (
    Measure("desk-save", "Desk: one save, with the table's problems", "ms", save),
    Measure("desk-list", "Desk: list of 100,000 records", "ms",
            lambda setting: _page(setting, ""), Goal(200)),
    Measure("desk-search", "Desk: search in 100,000 records", "ms",
            lambda setting: _page(setting, "?q=crew+7+fence"), Goal(200)),
    Measure("desk-map", "Desk: map of 100,000 records", "ms",
            lambda setting: _page(setting, "/map"), Goal(200)),
    Measure("desk-upload", "Desk: upload of 1,000 records", "s", upload, Goal(5)),
)  # fmt: skip
