"""Records leave a phone whole and come in clean: the store's JSON in a real browser."""

import json

import pytest

from builder.site.app_files import APP

START = """
  const S = { ...await import('/store/index.js'), ...await import('/store/exchange.js') };
  const tables = { region_id: 'sorrel_plateau', edition: '1', hash: 'aaaa' };
  const told = (work) => { try { return work(); } catch (fault) { return fault.code ?? String(fault); } };
"""
WHOLE = {
    "format": 1, "id": "11111111-2222-4333-8444-555555555555", "revision": 3,
    "region_id": "sorrel_plateau", "edition": "1", "pack_hash": "aaaa", "date": "2026-07-04",
}  # fmt: skip


@pytest.fixture
def page(browser, serve, tmp_path):
    files = {
        f"store/{path.name}": path.read_bytes() for path in (APP / "js" / "store").glob("*.js")
    }
    files["index.html"] = b"<!doctype html><title>store</title>"
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(serve(files).address)
    return phone.page


def run(page, body, arg=None):
    return page.evaluate(f"async (arg) => {{ {START} {body} }}", arg)


def file_of(*sites, **more):
    return json.dumps({"format": 1, "kind": "beltbook records", "sites": list(sites), **more})


def test_a_file_brings_every_record_back_exactly(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const unit = await S.saveUnit(store, S.newUnit('Pad 7', 'sorrel_plateau'));
        const jpeg = new Uint8Array(70000); jpeg.set([0xff, 0xd8, 0xff, 0xe0]); jpeg.set([1, 2, 3], 69990);
        let site = S.newSite(tables, { name: 'north <toe> "a" ✓', observer: 'Ana María Ruiz', unit_id: unit.id, unit_name: 'Pad 7',
          questions: { salt_crust: 'none' }, findings: [{ plant_id: 'artr', state: 'found', cover: '2', named: 1 }],
          place: { latitude_deg: 41.123456, longitude_deg: -110.5, accuracy_m: 4, height_m: 2100, slope_pct: 12, aspect_deg: 270 },
          production: { clip: { rows: [1, 2.5] } }, patches: { a: 60, b: 40 }, stand: 'patches' });
        site = await S.saveSite(store, site);
        await S.addPhoto(store, site.id, { bytes: jpeg.buffer, type: 'image/jpeg', caption: 'toe' });
        const before = [await S.loadSite(store, site.id), await S.photosOf(store, site.id)];
        const text = await S.exportRecords(store, [site.id], { photos: true, names: true });
        await S.removeSite(store, site.id);
        const read = S.readRecords(text);
        const first = await S.takeIn(store, read);
        const second = await S.takeIn(store, S.readRecords(text));
        const after = [await S.loadSite(store, site.id), await S.photosOf(store, site.id)];
        const bytes = [...new Uint8Array(after[1][0].bytes)];
        const short = JSON.parse(await S.exportRecords(store, [site.id]));
        return { same: JSON.stringify(sorted(before[0])) === JSON.stringify(sorted(after[0])), refused: read.refused, changed: read.changed,
                 first, second, photo: [bytes.length, bytes[69991], after[1][0].caption, after[1][0].taken_at === before[1][0].taken_at],
                 short: [short.sites[0].observer, short.photos.length, short.units[0].name] };
        function sorted(v) { return v && typeof v === 'object' && !Array.isArray(v) ? Object.fromEntries(Object.keys(v).sort().map((k) => [k, sorted(v[k])])) : v; }
        """,
    )
    assert got["same"] is True
    assert (got["refused"], got["changed"]) == ([], [])
    assert (len(got["first"]["added"]), got["first"]["photos"]) == (1, 1)
    assert (len(got["second"]["same"]), got["second"]["photos"]) == (1, 0)
    assert got["photo"] == [70000, 2, "toe", True]
    assert got["short"] == ["A. M. R.", 0, "Pad 7"]


@pytest.mark.parametrize(
    ("text", "code"),
    [
        ("", "not_ours"),
        ("{", "not_ours"),
        ("[1]", "not_ours"),
        ('{"kind": "another file"}', "not_ours"),
        ("[" * 200_000, "not_ours"),
        (json.dumps({"kind": "beltbook records", "format": 2}), "newer"),
    ],
    ids=["empty", "torn", "list", "another", "deep", "newer"],
)
def test_a_file_that_is_none_of_ours_is_refused(page, text, code):
    assert run(page, "return told(() => { S.readRecords(arg); return 'taken'; });", text) == code


def test_a_file_of_more_than_50_mb_is_refused_unread(page):
    made = "told(() => { S.readRecords('x'.repeat(50_000_001)); return 'taken'; })"
    assert run(page, f"return {made};") == "too_large"


@pytest.mark.parametrize(
    ("change", "why"),
    [
        ({"id": "../../x y"}, "incomplete"),
        ({"id": ["a"]}, "incomplete"),
        ({"revision": "3"}, "incomplete"),
        ({"revision": 0}, "incomplete"),
        ({"date": "4 July"}, "incomplete"),
        ({"pack_hash": None}, "incomplete"),
        ({"format": 2}, "newer"),
    ],
)
def test_a_record_without_its_essentials_is_refused(page, change, why):
    got = run(page, "return S.readRecords(arg);", file_of({**WHOLE, **change}, WHOLE, "text"))
    assert [one["id"] for one in got["sites"]] == [WHOLE["id"]]
    assert got["refused"] == [
        {"what": "site", "at": 0, "why": why},
        {"what": "site", "at": 2, "why": "not_a_record"},
    ]


def test_what_has_the_wrong_type_becomes_empty_and_is_told(page):
    hostile = {
        **WHOLE,
        "name": {"toString": "x"},
        "notes": "a\u0000b\u202ec<script>alert(1)</script>",
        "role": "owner",
        "place": {"latitude_deg": 1e9, "longitude_deg": "x", "height_m": 2000},
        "questions": {"salt_crust": "none", "__proto__": "x", "bad id": "none", "lime": ["a"]},
        "findings": [
            {"plant_id": "artr", "state": "found", "cover": "2", "named": 9, "more": "x"},
            {"plant_id": "artr", "state": "eaten"},
            {"plant_id": "<b>", "state": "found"},
            None,
        ],
        "whole_plot_searched": "yes",
        "edits": {"phone": 99},
        "extra": "dropped",
        "month": 13,
    }
    got = run(page, "return S.readRecords(arg);", file_of(hostile))
    [site] = got["sites"]
    [changed] = got["changed"]
    assert sorted(changed["fields"]) == ["month", "name", "role", "whole_plot_searched"]
    assert site["name"] == ""
    assert site["notes"] == "abc<script>alert(1)</script>"
    assert (site["role"], site["month"], site["whole_plot_searched"]) == ("inside", 7, False)
    assert site["place"]["latitude_deg"] is None
    assert site["place"]["longitude_deg"] is None
    assert site["place"]["height_m"] == 2000
    assert site["questions"] == {"salt_crust": "none"}
    assert site["findings"] == [{"plant_id": "artr", "state": "found", "cover": "2", "named": None}]
    assert "edits" not in site
    assert "extra" not in site


def test_deep_or_vast_parts_are_left_out(page):
    deep = []
    for _ in range(200):
        deep = [deep]
    got = run(
        page,
        "return S.readRecords(arg);",
        file_of({**WHOLE, "production": {"deep": deep}, "reclaim": {"rows": [0] * 30_000}}),
    )
    assert got["sites"][0]["production"] == {}
    assert got["sites"][0]["reclaim"] == {}


def test_a_photo_that_is_no_picture_is_refused(page):
    photo = {
        "id": "p1",
        "site_id": WHOLE["id"],
        "type": "image/jpeg",
        "bytes_base64": "PHNjcmlwdD4=",
    }
    wrong = [
        photo,
        {**photo, "type": "image/svg+xml"},
        {**photo, "bytes_base64": "%%%"},
        {**photo, "bytes_base64": "/9j/4A=="},
    ]
    got = run(page, "return S.readRecords(arg);", file_of(WHOLE, photos=wrong))
    assert len(got["photos"]) == 1
    assert [one["why"] for one in got["refused"]] == [
        "not_a_picture",
        "incomplete",
        "not_a_picture",
    ]


def test_the_same_id_with_other_content_is_kept_beside(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        await S.takeIn(store, S.readRecords(arg[0]));
        const done = await S.takeIn(store, S.readRecords(arg[1]));
        const [side] = await S.listSides(store);
        return [done.conflicts.length, (await S.listSites(store))[0].name, side.site.name];
        """,
        [
            file_of({**WHOLE, "name": "one", "edits": {"a": 3}}),
            file_of({**WHOLE, "name": "two", "edits": {"b": 3}}),
        ],
    )
    assert got == [1, "one", "two"]
