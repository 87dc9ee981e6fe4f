"""Phones hand in with a key of their own: once or again the same, whole or not at all."""

import re

import pytest

from builder.desk import upload
from builder.desk.application import Settings, create_app
from builder.records import store as storing
from builder.records.devices import device_of, devices
from builder.records.exchange import Records
from builder.records.store import RecordStore
from tests.desk.helpers import REGION, token
from tests.records.helpers import file_text, record

PHONES = f"{REGION}/records/phones"


@pytest.fixture
def database(app):
    keeping = app.extensions["records"]
    yield keeping.database()
    keeping.close()


@pytest.fixture
def key(client, database):
    page = client.post(PHONES, data={"token": token(client), "name": "Blue phone"}).text
    return re.search(r"<code>(\w{8}\.[\w-]+)</code>", page)[1]


def send(client, key, content, **headers):
    return client.post(
        "/upload", data=content, headers={"Authorization": f"Bearer {key}"} | headers
    )


def test_a_key_is_shown_once(client, database, key):
    assert device_of(database, key)
    again = client.get(PHONES).text
    assert "Blue phone" in again
    assert key not in again
    assert key.partition(".")[2] not in again


def test_a_batch_is_taken_and_repeats_do_nothing(app, client, database, key):
    batch = file_text(record(), record(id="b"), 7)
    first = app.test_client().post(
        "/upload", data=batch, headers={"Authorization": f"Bearer {key}"}
    )
    assert (first.status_code, first.json["added"]) == (200, ["a1", "b"])
    (refused,) = first.json["refused_entries"]
    assert (refused["at"], refused["why"]) == (2, "not_a_record")
    again = send(client, key, batch)
    assert (again.json["added"], again.json["same"]) == ([], ["a1", "b"])
    assert RecordStore(database).count() == {"willow_breaks": 2}
    assert devices(database)[0].seen_at


def test_a_file_gives_what_an_upload_gives(app, client, database, key):
    versions = [
        record(revision=2, edits={"p": 2}), record(revision=2, edits={"p": 1, "q": 1}),
        record(id="b", name="Stop"), record(id="b", name="Stop", revision=2),
    ]  # fmt: skip
    assert send(client, key, file_text(*versions)).json["conflicts"] == ["a1"]
    uploaded = RecordStore(database)
    other = create_app(Settings(app.config["HOME"] / "other", app.config["OUT"]))
    filed = RecordStore(other.extensions["records"].database())
    filed.take_in(Records(sites=versions))
    for name in ("a1", "b"):
        assert uploaded.record(name) == filed.record(name)
        assert uploaded.sides(name) == filed.sides(name)
    other.extensions["records"].close()


@pytest.mark.parametrize(
    "wrong", ["", "Bearer ", "Bearer x.y", "Basic {key}", "{key}", "Bearer {key}x"]
)
def test_no_key_no_entry(client, database, key, wrong):
    headers = {"Authorization": wrong.format(key=key)}
    answer = client.post("/upload", data=file_text(record()), headers=headers)
    assert (answer.status_code, "key" in answer.json["refused"]) == (401, True)
    assert RecordStore(database).count() == {}


def test_a_session_is_no_key(client, database):
    headers = {"X-Desk-Token": token(client)}
    assert client.post("/upload", data=file_text(record()), headers=headers).status_code == 401


def test_a_revoked_key_opens_nothing(client, database, key):
    path = f"{PHONES}/{key.partition('.')[0]}/revoke"
    assert client.post(path, data={"token": "guess"}).status_code == 403
    assert (
        "shut out." in client.post(path, data={"token": token(client)}, follow_redirects=True).text
    )
    assert send(client, key, file_text(record())).status_code == 401


def test_wrong_keys_make_an_address_wait(client, database, key):
    for _ in range(upload.WRONG_KEYS):
        assert send(client, "x.y", "{}").status_code == 401
    answer = send(client, key, file_text(record()))
    assert (answer.status_code, answer.headers["Retry-After"]) == (429, "300")


def test_a_phone_that_sends_too_often_waits(client, key, monkeypatch):
    monkeypatch.setattr(upload, "BATCHES", 2)
    codes = [send(client, key, file_text(record())).status_code for _ in range(3)]
    assert codes == [200, 200, 429]


@pytest.mark.parametrize(
    ("content", "why"), [("[]", "not_ours"), ("[" * 100_000, "too_deep"), ("\x00", "not_ours")]
)
def test_a_hostile_batch_is_refused_in_a_sentence(client, key, content, why):
    answer = send(client, key, content)
    assert (answer.status_code, answer.json["why"]) == (400, why)


def test_too_much_at_once_is_refused(client, key):
    answer = send(client, key, b" " * 32_000_001)
    assert (answer.status_code, "refused" in answer.json) == (413, True)


def test_a_batch_that_breaks_leaves_nothing_half(client, database, key, monkeypatch):
    real = storing._row
    monkeypatch.setattr(
        storing, "_row", lambda site, n: real(site, n) if site["id"] != "b" else 1 / 0
    )
    batch = file_text(record(), record(id="b"))
    with pytest.raises(ZeroDivisionError):
        send(client, key, batch)
    assert RecordStore(database).count() == {}
    monkeypatch.setattr(storing, "_row", real)
    assert send(client, key, batch).json["added"] == ["a1", "b"]


def test_an_open_desk_takes_batches_by_key_alone(tmp_path, app):
    shut = create_app(Settings(tmp_path, tmp_path / "site_out", accounts={"ana": "x"}))
    client = shut.test_client()
    assert client.get(PHONES).status_code == 302
    assert client.get(f"{REGION}/records").status_code == 302
    answer = client.post("/upload", data="{}", headers={"Authorization": "Bearer a.b"})
    assert answer.status_code == 401
    shut.extensions["records"].close()
