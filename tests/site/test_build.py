"""The whole site of small regions: its parts fit together and are the same bytes every time."""

import gzip
import hashlib
import json
import re
import struct
from html.parser import HTMLParser

import pytest

from builder.site.app_files import APP, app_files
from builder.site.build import build_site, site_files
from builder.site.icons import icons
from builder.site.policy import app_policy, hash_source
from builder.site.region import SiteRegion
from builder.site.specifiers import imports_of
from builder.site.worker import worker_script


def region(name, edition="1", languages=("en",)):
    """A region's compiled files, as small as the site cares."""
    pack = {"region": {"id": name, "edition": edition, "date": "2026-01-01", "invented": True}}
    said = {
        tag: json.dumps({"region": {"name": f"{name} {tag} <b>"}}).encode() for tag in languages
    }
    return SiteRegion(json.dumps(pack).encode(), said, {"index.html": b"<!doctype html>book"})


@pytest.fixture(scope="module")
def files():
    return site_files([region("north", languages=("en", "es")), region("south")])


class Elements(HTMLParser):
    """Every element of a page with its attributes, and the text of scripts and styles."""

    def __init__(self, page):
        super().__init__()
        self.found = []
        self.feed(page)

    def handle_starttag(self, tag, attrs):
        self.ended = False
        self.found.append([tag, dict(attrs), ""])

    def handle_data(self, text):
        if self.found and not self.ended:
            self.found[-1][2] += text

    def handle_endtag(self, tag):
        self.ended = True


def parts(page, tag):
    return [
        (attributes, text)
        for name, attributes, text in Elements(page.decode()).found
        if name == tag
    ]


def test_same_packs_and_sources_give_the_same_bytes(files):
    again = site_files([region("north", languages=("en", "es")), region("south")])
    assert again == files
    assert len(files) > 60


def test_a_second_build_writes_nothing_and_an_edit_only_what_it_touches(tmp_path):
    out = tmp_path / "site"
    out.mkdir()
    (out / "README.md").write_text("about")
    first = build_site([region("north"), region("south")], out)
    booklet = out / "regions" / "north" / "booklet.pdf"
    booklet.write_bytes(b"%PDF")
    assert build_site([region("north"), region("south")], out).changed == []
    second = build_site([region("north", "2"), region("south")], out)
    assert len(first.changed) > 60
    assert second.changed == ["field.html", "regions.json", "regions/north/pack.json", "sw.js"]
    assert (out / "README.md").read_text() == "about"
    assert booklet.read_bytes() == b"%PDF"
    third = build_site([region("south")], out)
    assert not (out / "regions" / "north").exists()
    assert "regions/north/pack.json" in third.changed


def test_a_build_that_fails_leaves_the_old_site(tmp_path):
    out = tmp_path / "site"
    build_site([region("north")], out)
    before = {path: path.read_bytes() for path in out.rglob("*") if path.is_file()}
    with pytest.raises(json.JSONDecodeError):
        build_site([SiteRegion(b"{torn", {"en": b"{}"})], out)
    assert {path: path.read_bytes() for path in out.rglob("*") if path.is_file()} == before
    assert [path.name for path in tmp_path.iterdir()] == ["site"]


def test_every_import_leads_to_a_file(files):
    looked = 0
    for path, content in files.items():
        if not path.endswith(".js") or path == "sw.js":
            continue
        for name in imports_of(content.decode()):
            assert name.startswith("."), f"{path} imports {name}"
            folder = path.split("/")[:-1]
            for step in name.split("/"):
                folder = folder[:-1] if step == ".." else folder if step == "." else [*folder, step]
            assert "/".join(folder) in files, f"{path} imports {name}"
            looked += 1
    assert looked > 30


def test_the_first_page_names_only_files_that_are_there(files):
    page = files["index.html"]
    named = [a["href"] for a, _ in parts(page, "link")] + [
        a["src"] for a, _ in parts(page, "script")
    ]
    assert [name for name in named if name not in files] == []
    assert {"app/js/main.js", "app/js/before.js", "manifest.webmanifest"} <= set(named)


def test_pages_hold_no_inline_script_and_the_policy_names_no_host(files):
    for path, content in files.items():
        if path.endswith(".html") and path != "field.html":
            assert all("src" in a for a, _ in parts(content, "script")), path
    policy = dict(rule.split(" ", 1) for rule in app_policy().split("; "))
    assert policy["default-src"] == "'none'"
    assert policy["script-src"] == "'self'"
    assert "://" not in app_policy()
    [meta] = [a for a, _ in parts(files["index.html"], "meta") if "http-equiv" in a]
    assert meta["content"] == app_policy()


def test_nothing_of_the_site_points_elsewhere(files):
    """Addresses in scripts, styles and pages: namespaces and licences only."""
    allowed = {"http://www.w3.org"}
    found = set()
    for path, content in files.items():
        if (
            path.endswith((".js", ".css", ".html", ".json", ".webmanifest"))
            and path != "field.html"
        ):
            found |= set(re.findall(r"https?://[\w.-]+", content.decode()))
    assert "http://www.w3.org" in found
    licence_lines = {"https://github.com"}  # one library keeps its address in its first line
    assert found - licence_lines == allowed


def test_the_worker_lists_every_file_of_a_version_with_its_hash(files):
    first, rest = files["sw.js"].decode().split("\n", 1)
    build = json.loads(first[len("const BUILD = ") : -1])
    left_out = set(files) - set(build["files"])
    assert left_out == {
        "sw.js", "field.html", "regions/north/book/index.html", "regions/south/book/index.html",
    }  # fmt: skip
    for path, digest in build["files"].items():
        assert hashlib.sha256(files[path]).hexdigest().startswith(digest)
        assert len(digest) == 32
    assert rest == (APP / "sw.js").read_text("utf-8").split("\n", 1)[1]


def test_any_change_makes_another_version(files):
    source = (APP / "sw.js").read_text("utf-8")

    def version(script):
        return json.loads(script.split("\n", 1)[0][len("const BUILD = ") : -1])["version"]

    same = version(worker_script(source, files))
    assert version(worker_script(source, {**files, "app/css/app.css": b"a"})) != same
    assert version(worker_script(source + "\n// more", files)) != same
    assert version(worker_script(source, {**files, "field.html": b"a"})) == same
    with pytest.raises(ValueError, match="first line|must start"):
        worker_script("self.x = 1;\n", files)


def test_the_region_list_lets_a_phone_check_what_it_fetched(files):
    listed = json.loads(files["regions.json"])["regions"]
    assert [one["id"] for one in listed] == ["north", "south"]
    north = listed[0]
    assert north["name"] == "north en <b>"
    assert sorted(north["texts"]) == ["en", "es"]
    for part in (north["pack"], *north["texts"].values()):
        assert hashlib.sha256(files[part["path"]]).hexdigest() == part["sha256"]
    assert north["pack"]["sha256"].startswith(north["pack"]["hash"])
    assert north["book"] in files


def test_the_manifest_names_icons_of_the_sizes_it_says(files):
    manifest = json.loads(files["manifest.webmanifest"])
    seen = []
    for icon in manifest["icons"]:
        content = files[icon["src"]]
        if icon["type"] == "image/png":
            width, height = struct.unpack(">II", content[16:24])
            assert icon["sizes"] == f"{width}x{height}"
            seen.append((width, icon.get("purpose")))
    assert seen == [(192, None), (512, None), (512, "maskable")]
    assert icons()["icon-512.png"] == files["app/icons/icon-512.png"]


def test_the_single_file_allows_exactly_what_it_holds(files):
    page = files["field.html"]
    [meta] = [a["content"] for a, _ in parts(page, "meta") if "http-equiv" in a]
    policy = {rule.split(" ", 1)[0]: rule.split(" ")[1:] for rule in meta.split("; ")}
    scripts = [
        (a, text) for a, text in parts(page, "script") if a.get("type") != "application/json"
    ]
    hashes = {hash_source(text) for _, text in scripts}
    assert set(policy["script-src"]) == hashes | {"data:"}
    assert {hash_source(text) for _, text in parts(page, "style")} == set(policy["style-src"])
    [imports] = [json.loads(text)["imports"] for a, text in scripts if a.get("type") == "importmap"]
    inside = {a["data-path"]: text for a, text in parts(page, "script") if "data-path" in a}
    assert {"regions.json", "app/words/en.json", "regions/north/pack.json"} <= set(inside)
    for offer in json.loads(inside["regions.json"])["regions"]:
        for part in (offer["pack"], *offer["texts"].values()):
            assert hashlib.sha256(inside[part["path"]].encode()).hexdigest() == part["sha256"]
    assert not any("<" in text for text in inside.values())
    assert json.loads(inside["regions/north/texts.en.json"])["region"]["name"] == "north en <b>"
    assert set(imports) == {
        path for path in files if path.endswith(".js") and path not in ("sw.js", "app/js/before.js")
    }
    loads = [a for tag, a, _ in Elements(page.decode()).found if ("src" in a or tag == "link")]
    assert all(a.get("href", a.get("src", "")).startswith("data:") for a in loads)


def test_an_app_without_its_libraries_says_how_to_get_them(tmp_path):
    with pytest.raises(FileNotFoundError, match=r"hatch_build\.py"):
        app_files(tmp_path)


def test_sizes_are_reported_as_they_travel(tmp_path):
    report = build_site([region("north")], tmp_path / "site")
    content = (tmp_path / "site" / "index.html").read_bytes()
    assert report.sizes["index.html"] == (len(content), len(gzip.compress(content, 6, mtime=0)))
