"""The built app is served as a static host would, and nothing beside it."""

import os

import pytest


def put(app, name, text):
    path = app.config["OUT"] / name
    path.parent.mkdir(parents=True, exist_ok=True)
    path.write_text(text, encoding="utf-8")
    return path


def test_a_rebuild_in_the_same_second_is_seen(app, client):
    path = put(app, "index.html", "<p>old</p>")
    os.utime(path, (1_700_000_000, 1_700_000_000))
    first = client.get("/field/")
    assert first.data == b"<p>old</p>"
    unchanged = client.get("/field/", headers={"If-None-Match": first.headers["ETag"]})
    assert unchanged.status_code == 304
    path.write_text("<p>new</p>", encoding="utf-8")
    os.utime(path, (1_700_000_000, 1_700_000_000))
    rebuilt = client.get("/field/", headers={"If-None-Match": first.headers["ETag"]})
    assert (rebuilt.status_code, rebuilt.data) == (200, b"<p>new</p>")
    assert "Last-Modified" not in rebuilt.headers


@pytest.mark.parametrize(
    ("name", "kind"),
    [
        ("sw.js", "text/javascript; charset=utf-8"),
        ("manifest.webmanifest", "application/manifest+json"),
        ("regions/demo/pack.json", "application/json"),
        ("regions/demo/booklet.pdf", "application/pdf"),
        ("app/fonts/a.woff2", "font/woff2"),
    ],
)
def test_each_file_says_what_it_is(app, client, name, kind):
    put(app, name, "x")
    answer = client.get(f"/field/{name}")
    assert answer.headers["Content-Type"] == kind
    assert answer.headers["X-Content-Type-Options"] == "nosniff"


def test_a_part_of_a_file_can_be_asked_for(app, client):
    put(app, "regions/demo/booklet.pdf", "0123456789")
    answer = client.get("/field/regions/demo/booklet.pdf", headers={"Range": "bytes=2-4"})
    assert (answer.status_code, answer.data) == (206, b"234")


@pytest.mark.parametrize(
    "name",
    [
        "../secret.txt",
        "..%2fsecret.txt",
        "%2e%2e/secret.txt",
        "app/../../secret.txt",
        "..\\secret.txt",
        "/etc/hostname",
        ".git/config",
        "link.txt",
        "linked/secret.txt",
        "a%00b",
    ],
)
def test_nothing_beside_the_built_site_is_served(app, client, name):
    put(app, "index.html", "x")
    outside = app.config["OUT"].parent / "secret.txt"
    outside.write_text("secret", encoding="utf-8")
    put(app, ".git/config", "secret")
    (app.config["OUT"] / "link.txt").symlink_to(outside)
    (app.config["OUT"] / "linked").symlink_to(outside.parent)
    answer = client.get(f"/field/{name}")
    assert answer.status_code in {308, 404}
    assert b"secret" not in answer.data


def test_a_pdf_is_shown_by_the_browsers_own_parts(app, client):
    put(app, "regions/demo/booklet.pdf", "%PDF-")
    policy = client.get("/field/regions/demo/booklet.pdf").headers["Content-Security-Policy"]
    assert policy == "frame-ancestors 'self'"


def test_the_app_may_use_camera_and_position_and_the_desk_not(app, client):
    put(app, "index.html", "x")
    assert "geolocation=(self)" in client.get("/field/").headers["Permissions-Policy"]
    assert "geolocation=()" in client.get("/").headers["Permissions-Policy"]
