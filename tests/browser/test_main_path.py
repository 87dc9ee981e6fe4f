"""The main job on a phone without a signal: the right zone for known ground, and nothing lost."""

import json

LISTED_FROM = 0.5  # a known site holds the plants that stand in half the zone's plots or more
MOST_ANSWERS = 24


def known_site(region, zone_id):
    """Cover in percent of every plant on typical ground of a zone, most cover first."""
    held = {
        plant: found.cover_pct
        for (zone, plant), found in region.occurrence.items()
        if zone == zone_id and found.constancy >= LISTED_FROM
    }
    return dict(sorted(held.items(), key=lambda each: -each[1]))


class Crew:
    """A person at the phone: taps what the page offers, knows the ground."""

    def __init__(self, phone, region, texts):
        self.page = phone.page
        self.region = region
        self.ids = {text["common"]: plant for plant, text in texts["plants"].items()}
        self.names = {plant: name for name, plant in self.ids.items()}
        self.classes = region.cover_scale.classes

    def start(self, name, height_m):
        """A new site check, named, its height typed. Returns its id."""
        self.page.evaluate("location.hash = '#/sites'")
        self.page.get_by_role("button", name="New site").click()
        self.page.wait_for_url("**/place")
        self.page.get_by_label("Or type it").fill(str(height_m))
        self.page.get_by_label("Name of this spot").fill(name)
        self.page.keyboard.press("Tab")
        return self.page.url.split("/site/")[1].split("/")[0]

    def open(self, tab):
        self.page.locator(f"nav a[href$='/{tab}']").first.click()

    def cover_key(self, cover_pct):
        """The key of the class a cover lies in; keys stand in the order of the scale."""
        place = next(
            at
            for at, one in enumerate(self.classes)
            if one.low_pct <= cover_pct and (cover_pct < one.high_pct or one.high_pct == 100)
        )
        keys = self.page.locator(".covers button")
        return keys.nth(keys.count() - len(self.classes) + place)

    def name_first(self, plants):
        """Names the plants that cover most, by search."""
        for plant, cover_pct in plants:
            self.page.locator("input[type=search]").fill(self.names[plant])
            self.page.locator(f"a[href$='/name/{plant}']").click()
            self.page.locator(".covers button").first.wait_for()
            self.cover_key(cover_pct).click()
            self.page.wait_for_url("**/plants")

    def answer(self, ground):
        """Answers what the key asks next. False where it asks no more."""
        head = self.page.locator(".told h2").first
        head.wait_for()
        asked = head.inner_text()
        sure = self.page.locator(".told .hint a[href$='/zone']").count() > 0
        if sure or self.page.locator(".told h2.verdict").count():
            return False
        plant = self.ids.get(asked)
        if plant is None:
            self.page.locator(".under button").first.click()
        elif plant in ground:
            self.cover_key(ground[plant]).click()
        else:
            self.page.locator(".covers button").first.click()
        return asked


def key_site(crew, ground, zone):
    """One site check from new to kept call. Returns the record's id."""
    site_id = crew.start(f"Ground {zone.letter}", round(zone.centre_m))
    crew.open("plants")
    crew.name_first(list(ground.items())[:3])
    answers = 3
    while answers < MOST_ANSWERS and crew.answer(ground):
        answers += 1
    crew.open("zone")
    crew.page.locator(".deep .btn.go").first.click()
    crew.page.locator(".kept").wait_for()
    return site_id


def records(page):
    """Every stored record by id, read past the app."""
    return page.evaluate(
        """() => new Promise((resolve, reject) => {
          const open = indexedDB.open('beltbook-records');
          open.onerror = () => reject(open.error);
          open.onsuccess = () => {
            const all = open.result.transaction('sites').objectStore('sites').getAll();
            all.onsuccess = () => {
              open.result.close();
              resolve(Object.fromEntries(all.result.map((site) => [site.id, site])));
            };
          };
        })"""
    )


def test_install_cut_answer_kill_and_find_again(browser, serve, demo_files, region, tmp_path):
    """All sixteen zones on one phone, after network and server are gone; then the browser is killed."""
    server = serve(demo_files)
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    phone = browser.phone(tmp_path / "profile")
    phone.page.goto(server.address)
    phone.page.get_by_role("button", name="New site").wait_for()
    phone.page.evaluate("navigator.serviceWorker.ready.then(() => 0)")
    server.stop()
    phone.context.set_offline(True)
    phone.page.reload()
    phone.page.get_by_role("button", name="New site").wait_for()
    assert phone.page.evaluate("Boolean(navigator.serviceWorker.controller)")

    crew = Crew(phone, region, texts)
    ids = {
        zone.id: key_site(crew, known_site(region, zone.id), zone) for zone in region.zones
    }
    assert len(set(ids.values())) == 16
    phone.page.evaluate("location.hash = '#/sites'")
    phone.page.get_by_role("button", name="New site").wait_for()
    assert phone.errors == []
    phone.kill()

    again = browser.phone(tmp_path / "profile", offline=True)
    again.page.goto(server.address)
    again.page.get_by_role("button", name="New site").wait_for()
    listed = again.page.locator("main").inner_text()
    assert [zone.letter for zone in region.zones if f"Ground {zone.letter}" not in listed] == []
    kept = records(again.page)
    called = {zone: (kept[site]["call"]["verdict"], kept[site]["call"]["zone_id"]) for zone, site in ids.items()}
    assert called == {zone.id: ("zone", zone.id) for zone in region.zones}
    last = region.zones[-1]
    again.page.goto(f"{server.address}#/site/{ids[last.id]}/zone")
    again.page.locator(".kept").wait_for()
    again.page.get_by_text(texts["zones"][last.id]["short"]).first.wait_for()
    assert again.errors == []
