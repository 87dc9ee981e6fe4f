"""Each guard of the desk, tried with what it must stop and with what it must let through."""

import re

import pytest

from builder.desk.accounts import add_account, read_accounts
from builder.desk.application import Settings, create_app
from builder.desk.guards import LIMITS, Patience
from tests.desk.helpers import token

WRITES = [
    "/r/willow_breaks/editions",
    "/jobs/1/stop",
    "/r/willow_breaks/undo",
    "/r/willow_breaks/save",
    "/r/willow_breaks/build",
]


@pytest.mark.parametrize("host", ["evil.example", "127.0.0.1.evil.example", "0.0.0.0", "[::1]", ""])
def test_a_foreign_host_is_refused(client, host):
    assert client.get("/", headers={"Host": host}).status_code == 400


@pytest.mark.parametrize("host", ["127.0.0.1:8790", "localhost", "localhost:1"])
def test_the_own_host_is_answered(client, host):
    assert client.get("/", headers={"Host": host}).status_code == 200


@pytest.mark.parametrize("path", WRITES)
def test_a_write_without_token_is_refused(client, path):
    assert client.post(path).status_code == 403
    assert client.post(path, data={"token": "guess"}).status_code == 403


@pytest.mark.parametrize("path", WRITES)
@pytest.mark.parametrize(
    "headers",
    [
        {"Origin": "http://evil.example"},
        {"Origin": "null"},
        {"Origin": "http://localhost.evil.example"},
        {"Origin": "https://localhost"},
        {"Origin": "http://localhost:9"},
        {"Sec-Fetch-Site": "cross-site"},
        {"Sec-Fetch-Site": "same-site"},
        {"Sec-Fetch-Site": "none"},
    ],
)
def test_a_write_from_another_page_is_refused_even_with_the_token(client, path, headers):
    answer = client.post(path, data={"token": token(client)}, headers=headers)
    assert answer.status_code == 403


def test_a_write_from_the_own_page_goes_through(client):
    own = {"Origin": "http://localhost", "Sec-Fetch-Site": "same-origin"}
    answer = client.post("/jobs/1/stop", data={"token": token(client)}, headers=own)
    assert answer.status_code == 404  # past every guard: there is no such job


def test_a_token_of_another_session_is_refused(app, client):
    other = app.test_client()
    assert client.post("/jobs/1/stop", data={"token": token(other)}).status_code == 403


def test_too_much_at_once_is_refused(client):
    big = {"token": token(client), "text": "x" * LIMITS["MAX_CONTENT_LENGTH"]}
    assert client.post("/r/willow_breaks/save", data=big).status_code == 413
    headers = {"X-Desk-Token": token(client)}
    huge = b"x" * (LIMITS["MAX_CONTENT_LENGTH"] + 1)
    assert client.post("/r/willow_breaks/save", data=huge, headers=headers).status_code == 413


@pytest.mark.parametrize(
    "path",
    [
        "/",
        "/r/willow_breaks/",
        "/r/willow_breaks/tables",
        "/r/willow_breaks/editions",
        "/no-such-page",
    ],
)
def test_every_page_carries_the_policy(client, path):
    answer = client.get(path, follow_redirects=True)
    policy = answer.headers["Content-Security-Policy"]
    assert "default-src 'none'" in policy
    assert "unsafe" not in policy
    assert "*" not in policy
    assert answer.headers["X-Frame-Options"] == "SAMEORIGIN"
    assert answer.headers["Cache-Control"] == "no-store"


@pytest.mark.parametrize(
    "path", ["/", "/r/willow_breaks/", "/r/willow_breaks/tables", "/r/willow_breaks/editions"]
)
def test_no_page_needs_what_the_policy_forbids(client, path):
    page = client.get(path, follow_redirects=True).get_data(as_text=True)
    assert "<main" in page
    assert not re.search(r"<script(?![^>]*\bsrc=)", page)
    assert not re.search(r"\son\w+\s*=", page)
    assert not re.search(r"\sstyle\s*=", page)
    assert not re.search(r"(?:src|href)\s*=\s*[\"']?(?:https?:)?//", page)


@pytest.mark.parametrize(
    "name",
    [
        "../willow_breaks",
        "..",
        "%2e%2e",
        "Willow_Breaks",
        "willow_breaks%00",
        "no_such",
        "willow_breaks%2f..",
    ],
)
def test_a_region_is_a_folder_of_keydata_and_nothing_else(client, name):
    assert client.get(f"/r/{name}/tables/zones").status_code == 404


def opened(tmp_path):
    add_account(tmp_path / "accounts.json", "ruth", "a long password")
    accounts = read_accounts(tmp_path / "accounts.json")
    return create_app(Settings(tmp_path, tmp_path / "out", accounts=accounts)).test_client()


def log_in(client, name, password):
    form = {"token": token(client, "/login"), "name": name, "password": password}
    return client.post("/login", data=form)


def test_an_open_desk_asks_for_a_login(tmp_path):
    client = opened(tmp_path)
    assert client.get("/").headers["Location"].endswith("/login")
    assert client.get("/field/").status_code == 302
    form = {"token": token(client, "/login")}
    assert client.post("/r/willow_breaks/editions", data=form).status_code == 401
    assert log_in(client, "ruth", "a wrong password").status_code == 403
    assert log_in(client, "nobody", "nobody has this account").status_code == 403
    assert log_in(client, "ruth", "a long password").status_code == 302
    assert client.get("/").status_code == 200
    client.post("/logout", data={"token": token(client)})
    assert client.get("/").status_code == 302


def test_guessing_passwords_is_slowed(tmp_path):
    client = opened(tmp_path)
    codes = [log_in(client, "ruth", f"guess number {n}").status_code for n in range(6)]
    assert codes == [403, 403, 403, 403, 403, 429]
    assert log_in(client, "ruth", "a long password").status_code == 429


def test_waiting_ends():
    patience = Patience(tries=1, window_s=0.0)
    patience.failed("there")
    assert not patience.worn_out("there")


def test_passwords_are_kept_as_hashes_in_a_private_file(tmp_path):
    path = tmp_path / "accounts.json"
    add_account(path, "ruth", "a long password")
    assert "a long password" not in path.read_text(encoding="utf-8")
    assert read_accounts(path)["ruth"].startswith("scrypt:")
    assert path.stat().st_mode & 0o077 == 0
    with pytest.raises(ValueError, match="12"):
        add_account(path, "amos", "short")
