"""The store in a real browser: nothing lost, nothing overwritten, every fault told by its code."""

import pytest

from builder.site.app_files import APP
from builder.site.slim import slim_script


@pytest.fixture
def page(browser, serve, tmp_path):
    """A page of an origin that serves the store's modules as they are built."""
    files = {
        f"store/{path.name}": slim_script(path.read_text("utf-8")).encode()
        for path in (APP / "js" / "store").glob("*.js")
    }
    assert len(files) > 10
    files["index.html"] = b"<!doctype html><title>store</title>"
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(serve(files).address)
    return phone.page


START = """
  const S = await import('/store/index.js');
  const TX = await import('/store/tx.js');
  const tables = { region_id: 'r', edition: '1', hash: 'aaaa' };
  const told = (promise) => promise.then(() => 'saved', (fault) => fault.code ?? String(fault));
"""


def run(page, body):
    """Runs a piece of script with the store at hand and gives what it returns."""
    return page.evaluate(f"async () => {{ {START} {body} }}")


def test_a_record_is_listed_loaded_and_counted(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const first = await S.saveSite(store, S.newSite(tables, { name: 'Pad 7' }));
        const second = await S.saveSite(store, { ...first, notes: 'seep' });
        const again = await S.openStore();
        const loaded = await S.loadSite(again, first.id);
        const listed = await S.listSites(again);
        return { revisions: [first.revision, second.revision], loaded, listed: listed.length,
                 device: await S.deviceId(store), none: await S.loadSite(store, 'no such id') };
        """,
    )
    assert got["revisions"] == [1, 2]
    assert got["loaded"]["name"] == "Pad 7"
    assert got["loaded"]["notes"] == "seep"
    assert got["loaded"]["pack_hash"] == "aaaa"
    assert got["loaded"]["edits"] == {got["device"]: 2}
    assert got["listed"] == 1
    assert got["none"] is None


def test_two_tabs_on_one_record_keep_both(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const first = await S.saveSite(store, S.newSite(tables, { name: 'Pad 7' }));
        const other = await S.openStore();
        const mine = await S.saveSite(store, { ...first, notes: 'from one tab' });
        const writer = S.siteWriter(other, first);
        await told(writer.write({ ...first, notes: 'from the ot' }));
        const code = await told(writer.write({ ...first, notes: 'from the other' }));
        const rows = await S.listSides(store, first.id);
        const [side] = await S.listSides(store, first.id);
        const kept = await S.loadSite(store, first.id);
        const settled = await S.settleSide(store, side.key, 'theirs');
        return { code, rows: rows.length, kept: kept.notes, side: side.site.notes, settled,
                 left: (await S.listSides(store, first.id)).length, revision: mine.revision };
        """,
    )
    assert (got["code"], got["rows"]) == ("conflict", 1)
    assert got["kept"] == "from one tab"
    assert got["side"] == "from the other"
    assert got["settled"]["notes"] == "from the other"
    assert got["settled"]["revision"] > got["revision"]
    assert got["left"] == 0


def test_an_abort_is_told_and_does_not_hang(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const code = await told(TX.inStore(store.records, ['sites'], 'readwrite', (rows) => {
          const request = rows.put({ id: 'x' });
          rows.transaction.abort();
          return request;
        }));
        return { code, stored: await S.loadSite(store, 'x') };
        """,
    )
    assert got == {"code": "aborted", "stored": None}


def limited(page, bytes_):
    """Sets the browser's own limit for this origin, so that its own error arrives."""
    page.context.new_cdp_session(page).send(
        "Storage.overrideQuotaForOrigin",
        {"origin": page.evaluate("location.origin"), "quotaSize": bytes_},
    )


FILL = """
  const store = await S.openStore();
  const fill = async () => {
    for (let n = 0; n < 200; n += 1) {
      const bytes = crypto.getRandomValues(new Uint8Array(60000)).buffer;
      const code = await told(S.addPhoto(store, 'x', { bytes, type: 'image/jpeg' }));
      if (code !== 'saved') return code;
    }
    return 'never full';
  };
"""


def test_a_full_phone_is_told_and_the_change_waits_until_there_is_room(page):
    limited(page, 400_000)
    got = run(
        page,
        FILL
        + """
        const faults = [];
        const writer = S.siteWriter(store, S.newSite(tables), { onFault: (fault) => faults.push(fault.code) });
        await writer.write({ ...writer.stored, name: 'Pad 7' });
        const filled = await fill();
        const code = await told(writer.write({ ...writer.stored, notes: 'x'.repeat(100_000) }));
        window.writer = writer;
        return { filled, code, faults, unsaved: writer.unsaved, kept: (await S.loadSite(store, writer.stored.id)).notes };
        """,
    )
    assert got == {
        "filled": "full",
        "code": "full",
        "faults": ["full"],
        "unsaved": True,
        "kept": "",
    }
    limited(page, 100_000_000)
    after = run(
        page,
        """
        const saved = await window.writer.flush();
        return [saved.revision, saved.notes.length, window.writer.unsaved];
        """,
    )
    assert after == [2, 100_000, False]


def test_the_reserve_takes_what_was_entered_on_a_full_phone(page):
    limited(page, 2_000_000)
    got = run(
        page,
        FILL
        + """
        const before = await S.askForRoom(store);
        const told_ = [];
        const writer = S.siteWriter(store, S.newSite(tables), {
          onFault: (fault) => told_.push(fault.code), onLittleRoom: () => told_.push('little room') });
        await writer.write({ ...writer.stored, name: 'Pad 7' });
        const filled = await fill();
        const saved = await writer.write({ ...writer.stored, notes: 'x'.repeat(100_000) });
        const after = await S.askForRoom(store);
        return { filled, told: told_, length: (await S.loadSite(store, saved.id)).notes.length,
                 room: [before.nearly_full, after.nearly_full] };
        """,
    )
    assert got == {
        "filled": "full",
        "told": ["little room"],
        "length": 100_000,
        "room": [False, True],
    }


def test_a_lost_connection_is_opened_once_more(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const first = await S.saveSite(store, S.newSite(tables));
        (await TX.opened(store.records)).close();
        const second = await S.saveSite(store, { ...first, notes: 'after' });
        return [second.revision, (await S.loadSite(store, first.id)).notes];
        """,
    )
    assert got == [2, "after"]


def test_a_connection_that_stays_lost_is_told(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        IDBDatabase.prototype.transaction = () => { throw new DOMException('gone', 'InvalidStateError'); };
        return told(S.saveSite(store, S.newSite(tables)));
        """,
    )
    assert got == "lost"


def test_a_phone_that_stores_nothing_is_told(page):
    got = run(
        page,
        """
        Object.defineProperty(window, 'indexedDB', { value: undefined });
        return told(S.openStore());
        """,
    )
    assert got == "none"


def test_records_of_a_newer_app_are_left_alone(page):
    got = run(
        page,
        """
        await new Promise((resolve) => {
          const request = indexedDB.open('beltbook-records', 99);
          request.onsuccess = () => { request.result.close(); resolve(); };
        });
        return told(S.openStore());
        """,
    )
    assert got == "newer"


def test_changes_in_quick_succession_are_all_kept(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const saved = [];
        const writer = S.siteWriter(store, S.newSite(tables), { onSaved: (site) => saved.push(site.revision) });
        const findings = [];
        const writes = [];
        for (let i = 0; i < 40; i += 1) {
          findings.push({ plant_id: `p${i}`, state: 'found', cover: '1', named: null });
          writes.push(writer.write({ ...writer.stored, findings: [...findings] }));
        }
        await Promise.all(writes);
        const site = await S.loadSite(store, writer.stored.id);
        return { n: site.findings.length, sides: (await S.listSides(store)).length, rising: saved.every((r, i) => r === i + 1) };
        """,
    )
    assert got == {"n": 40, "sides": 0, "rising": True}


def test_a_clock_set_back_changes_nothing(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const first = await S.saveSite(store, S.newSite(tables, { notes: 'before' }));
        const RealDate = Date;
        globalThis.Date = class extends RealDate {
          constructor(...args) { super(...(args.length ? args : [RealDate.now() - 400 * 86400000])); }
        };
        const second = await S.saveSite(store, { ...first, notes: 'after' });
        const merged = await S.mergeSites(store, [first]);
        globalThis.Date = RealDate;
        const site = await S.loadSite(store, first.id);
        return { earlier: second.changed_at < first.changed_at, notes: site.notes, revision: site.revision, merged };
        """,
    )
    assert got["earlier"] is True
    assert (got["notes"], got["revision"]) == ("after", 2)
    assert len(got["merged"]["kept"]) == 1


def test_merging_adds_replaces_keeps_and_holds_both_on_conflict(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const a = await S.saveSite(store, S.newSite(tables, { name: 'a' }));
        const elsewhere = (site, more) => ({ ...site, ...more, revision: site.revision + 1, edits: { ...site.edits, other: 1 } });
        const fresh = { ...S.newSite(tables, { name: 'b' }), revision: 1, edits: { other: 1 } };
        const first = await S.mergeSites(store, [fresh, elsewhere(a, { notes: 'later' })]);
        const again = await S.mergeSites(store, [fresh, elsewhere(a, { notes: 'later' }), a]);
        const mine = await S.saveSite(store, { ...(await S.loadSite(store, a.id)), notes: 'mine' });
        const theirs = { ...elsewhere(a, { notes: 'theirs' }), edits: { ...a.edits, other: 2 }, revision: 3 };
        const clash = await S.mergeSites(store, [theirs]);
        const repeat = await S.mergeSites(store, [theirs]);
        const sides = await S.listSides(store, a.id);
        return { first, again, clash, repeat, sides: sides.map((side) => side.site.notes), mine: (await S.loadSite(store, a.id)).notes };
        """,
    )
    count = {
        kind: {name: len(ids) for name, ids in got[kind].items()}
        for kind in ("first", "again", "clash", "repeat")
    }
    none = {"added": 0, "replaced": 0, "kept": 0, "same": 0, "conflicts": 0}
    assert count["first"] == {**none, "added": 1, "replaced": 1}
    assert count["again"] == {**none, "same": 2, "kept": 1}
    assert count["clash"] == {**none, "conflicts": 1}
    assert count["repeat"] == {**none, "conflicts": 1}
    assert got["sides"] == ["theirs"]
    assert got["mine"] == "mine"


def test_removing_a_record_takes_its_photos_along(page):
    got = run(
        page,
        """
        const store = await S.openStore();
        const site = await S.saveSite(store, S.newSite(tables));
        const id = await S.addPhoto(store, site.id, { bytes: new Uint8Array([1, 2, 3]).buffer, type: 'image/jpeg' });
        await S.addPhoto(store, 'another', { bytes: new ArrayBuffer(1), type: 'image/jpeg' });
        await S.captionPhoto(store, id, 'north side');
        const [before] = await S.photosOf(store, site.id);
        await S.removeSite(store, site.id);
        return { caption: before.caption, bytes: [...new Uint8Array(before.bytes)],
                 left: (await S.photosOf(store, site.id)).length, others: (await S.photosOf(store, 'another')).length };
        """,
    )
    assert got == {"caption": "north side", "bytes": [1, 2, 3], "left": 0, "others": 1}


TABLES = """
  const sha = async (text) => Array.from(new Uint8Array(await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text))),
    (byte) => byte.toString(16).padStart(2, '0')).join('');
  const offerOf = async (edition, languages = ['en']) => {
    const files = { 'pack.json': JSON.stringify({ edition }) };
    const texts = {};
    for (const tag of languages) {
      files[`texts.${tag}.json`] = JSON.stringify({ tag, edition });
      texts[tag] = { path: `texts.${tag}.json`, sha256: await sha(files[`texts.${tag}.json`]) };
    }
    const sha256 = await sha(files['pack.json']);
    return { files, id: 'r', edition, date: '2026-01-01', pack: { path: 'pack.json', sha256, hash: sha256.slice(0, 16) }, texts };
  };
  const store = await S.openStore();
  const start = (offer, differences = []) => S.tablesAtStart(store, offer,
    { readFile: async (path) => offer.files[path], checkProbes: () => differences });
"""


def test_new_tables_wait_for_the_person_and_old_records_keep_theirs(page):
    got = run(
        page,
        TABLES
        + """
        const one = await start(await offerOf('1'));
        const site = await S.saveSite(store, S.newSite(one.tables));
        const two = await start(await offerOf('2'));
        const still = await S.tablesInUse(store, 'r');
        await S.useTables(store, two.offered);
        const now = await start(await offerOf('2'));
        const old = await S.tablesOf(store, site);
        const dropped = await S.dropUnusedTables(store, [now.tables.hash]);
        await S.removeSite(store, site.id);
        const later = await S.dropUnusedTables(store, [now.tables.hash]);
        return { states: [one.state, two.state, now.state], offered: two.offered.edition, still: still.edition,
                 now: now.tables.edition, old: old.pack.edition, dropped, later: later.length };
        """,
    )
    assert got["states"] == ["ready", "offered", "ready"]
    assert (got["offered"], got["still"], got["now"], got["old"]) == ("2", "1", "2", "1")
    assert (got["dropped"], got["later"]) == ([], 1)


def test_tables_whose_probes_differ_are_not_taken(page):
    got = run(
        page,
        TABLES
        + """
        const refused = await start(await offerOf('1'), [{ probe: 0 }]);
        const first = await start(await offerOf('1'));
        const kept = await start(await offerOf('2'), [{ probe: 0 }]);
        return { refused: [refused.state, refused.fault.code, refused.unproved.edition, refused.tables],
                 first: first.state, kept: [kept.state, kept.fault.code, kept.tables.edition] };
        """,
    )
    assert got["refused"] == ["refused", "probes", "1", None]
    assert got["first"] == "ready"
    assert got["kept"] == ["kept", "probes", "1"]


@pytest.mark.parametrize("path", ["pack.json", "texts.en.json"])
def test_torn_tables_are_not_taken(page, path):
    got = run(
        page,
        TABLES
        + f"""
        await start(await offerOf('1'));
        const offer = await offerOf('2');
        offer.files['{path}'] = offer.files['{path}'].replace('2', '3');
        const kept = await start(offer);
        return [kept.state, kept.fault.code, kept.tables.edition];
        """,
    )
    assert got == ["kept", "torn", "1"]


def test_a_language_that_comes_later_joins_the_same_edition(page):
    got = run(
        page,
        TABLES
        + """
        await start(await offerOf('1'));
        const both = await start(await offerOf('1', ['en', 'es']));
        const stored = await S.tablesInUse(store, 'r');
        return [both.state, both.tables.texts.es.tag, stored.texts.es.tag];
        """,
    )
    assert got == ["ready", "es", "es"]
