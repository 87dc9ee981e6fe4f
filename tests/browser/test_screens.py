"""The screens in a real browser: reach, access, safety and honesty of what a hand and an eye meet."""

import json
import re
from pathlib import Path

import pytest
from browser.helpers import Browser

AXE = Path(__file__).parent.parent.parent / "node_modules" / "axe-core" / "axe.min.js"
RULES = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"]
MODES = ["day", "night", "sun"]
JULY = "2026-07-11"
FOUND = [
    ("artemisia_tridentata_vaseyana", "3"),
    ("lupinus_argenteus", "2"),
    ("achnatherum_lettermanii", "2"),
    ("poa_fendleriana", "2"),
    ("symphoricarpos_oreophilus", "1"),
]
BOOK = [
    "", "/cautions", "/plants", "/chart", "/covers", "/soil", "/sources", "/zone/mtnsage",
    "/zone/wetmeadow",
]  # fmt: skip
SITE = [
    "place", "plants", "plants/first", "plants/find", "plants/listed", "zone", "production",
    "production/clip", "reclaim", "reclaim/order", "reclaim/test", "reclaim/topsoil",
]  # fmt: skip


def record(tables, site_id, **more):
    """A whole site check of the demo region, as a file from another phone would bring it."""
    moment = f"{JULY}T10:00:00+00:00"
    return {
        "format": 1, "id": site_id, "revision": 1, "region_id": tables["id"],
        "edition": tables["edition"], "pack_hash": tables["pack"]["hash"], "unit_id": None,
        "unit_name": "", "role": "inside", "name": f"Site {site_id[:2]}", "observer": "Ana Ruiz",
        "created_at": moment, "changed_at": moment, "date": JULY, "month": 7,
        "place": {"height_m": 2640}, "disturbance": "well_pad", "questions": {}, "findings": [],
        "whole_plot_searched": False, "digging": {"cleared": None}, "struck": [], "call": None,
        "overruled": None, "notes": "", "photos": [], "production": {}, "reclaim": {}, **more,
    }  # fmt: skip


@pytest.fixture(scope="module")
def records_file(demo_files, tmp_path_factory):
    """One site check of each verdict that the pack's own probes meet, and one of mountain sage."""
    tables = json.loads(demo_files["regions.json"])["regions"][0]
    pack = json.loads(demo_files[tables["pack"]["path"]])
    sites = {}
    for probe in pack["probes"]:
        verdict = probe["answer"]["verdict"]
        if verdict not in sites and probe["site"].get("month"):
            own = {name: value for name, value in probe["site"].items() if value is not None}
            site_id = f"{len(sites)}0000000-0000-4000-8000-000000000000"
            bare = {"place": {}, "disturbance": None, "date": f"2026-{own['month']:02d}-11"}
            sites[verdict] = record(tables, site_id, **{**bare, **own})
    findings = [
        {"plant_id": plant, "state": "found", "cover": cover, "named": None}
        for plant, cover in FOUND
    ]
    sites["sage"] = record(tables, "a0000000-0000-4000-8000-000000000000", findings=findings)
    path = tmp_path_factory.mktemp("records") / "records.json"
    path.write_text(
        json.dumps({"format": 1, "kind": "beltbook records", "sites": list(sites.values())})
    )
    return path, {name: site["id"] for name, site in sites.items()}


@pytest.fixture(scope="module")
def app(engine, site, records_file, tmp_path_factory):
    """The app with those records taken in, on one phone for the whole file."""
    here = Browser(engine)
    phone = here.phone(tmp_path_factory.mktemp("screens") / "profile")
    phone.address = site.address
    phone.page.goto(f"{site.address}#/hand")
    phone.page.locator("input[type=file]").set_input_files(records_file[0])
    phone.page.locator("[role=status] li").first.wait_for()
    yield phone
    here.put_away()


def show(app, where, mode="day", size=(390, 844)):
    """Opens a page of the app in a mode and at a size."""
    app.page.set_viewport_size({"width": size[0], "height": size[1]})
    app.page.evaluate("where => { location.hash = where; }", f"#/{where}")
    app.page.evaluate("mode => { document.documentElement.dataset.mode = mode; }", mode)
    app.page.wait_for_timeout(120)
    app.page.locator("h1").wait_for()


def every_page(ids):
    pages = ["sites", "hand", "setup", *(f"book{page}" for page in BOOK)]
    pages += [f"site/{ids['sage']}/{page}" for page in SITE]
    return pages + [f"site/{site_id}/zone" for site_id in ids.values()]


def faults(app, source):
    found = app.page.evaluate(
        """async ([source, rules]) => {
          if (!window.axe) (0, eval)(source);
          const result = await axe.run(document, { runOnly: rules, resultTypes: ['violations'] });
          return result.violations.map((one) => `${one.id}: ${one.nodes[0].html.slice(0, 120)}`);
        }""",
        [source, RULES],
    )
    return found


@pytest.mark.parametrize("mode", MODES)
def test_no_page_keeps_anyone_out(app, records_file, mode):
    source = AXE.read_text("utf-8")
    found = {}
    pages = every_page(records_file[1])
    for page in pages:
        show(app, page, mode)
        wrong = faults(app, source)
        if wrong:
            found[page] = wrong
    assert len(pages) > 25
    assert found == {}
    assert app.errors == []


def test_axe_sees_a_bad_page(app):
    show(app, "sites")
    app.page.evaluate(
        "['img', 'button'].forEach((name) => document.querySelector('main').append(document.createElement(name)))"
    )
    found = faults(app, AXE.read_text("utf-8"))
    app.page.evaluate(
        "document.querySelectorAll('main > img, main > button').forEach((one) => one.remove())"
    )
    app.errors.clear()
    assert {one.split(":")[0] for one in found} >= {"image-alt", "button-name"}


WHAT_IS_SMALL = """() => [...document.querySelectorAll('button, a, input, textarea, [role=button]')]
  .filter((one) => !one.closest('.spoken, label.btn') && one.getClientRects().length)
  .map((one) => [one.closest('.box, .chip') ?? one, one])
  .map(([box, one]) => [box.getBoundingClientRect(), one])
  .filter(([box]) => box.width && (Math.round(box.height) < 48 || Math.round(box.width) < 44))
  .filter(([, one]) => !one.closest('.even, .rise, .pressed, .edge.open'))
  .map(([box, one]) => `${Math.round(box.width)}x${Math.round(box.height)} ${one.outerHTML.slice(0, 90)}`)"""


def test_every_key_is_large_enough_for_a_glove(app, records_file):
    small = {}
    for page in every_page(records_file[1]):
        show(app, page)
        found = app.page.evaluate(WHAT_IS_SMALL)
        if found:
            small[page] = found
    assert small == {}


def test_answers_are_larger_still(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/plants/enter/bromus_tectorum")
    sizes = app.page.locator(".covers button").evaluate_all(
        "keys => keys.map((key) => key.offsetHeight)"
    )
    assert len(sizes) == 8
    assert min(sizes) >= 76


@pytest.mark.parametrize("size", [(320, 640), (390, 844), (844, 390), (1024, 768), (195, 422)])
def test_nothing_runs_out_of_the_page(app, records_file, size):
    """195 px is a 390 px phone at 200 % zoom."""
    wide = {}
    for page in every_page(records_file[1]):
        show(app, page, size=size)
        over = app.page.evaluate(
            """() => [document.documentElement, ...document.querySelectorAll('main, .rolls, .told, .found, .answer, .bar, .foot')]
              .filter((one) => one.scrollWidth > one.clientWidth + 1 && getComputedStyle(one).display !== 'none')
              .map((one) => `${one.tagName}.${one.className} ${one.scrollWidth} > ${one.clientWidth}`)"""
        )
        if over:
            wide[page] = over
    assert wide == {}


def test_hoops_are_true_to_share(app):
    """The dark area of each cover class, counted on a canvas, is its middle within 0.3 %."""
    show(app, "book/covers")
    shares = app.page.evaluate(
        """() => [...document.querySelectorAll('.hoops li')].map((item) => {
          const wide = 1000;
          const pen = Object.assign(document.createElement('canvas'), { width: wide, height: wide }).getContext('2d', { willReadFrequently: true });
          pen.scale(wide / 100, wide / 100);
          const count = (path) => {
            pen.clearRect(0, 0, 100, 100);
            pen.fill(path);
            const data = pen.getImageData(0, 0, wide, wide).data;
            let sum = 0;
            for (let i = 3; i < data.length; i += 4) sum += data[i];
            return sum;
          };
          const hoop = new Path2D();
          hoop.arc(50, 50, 46, 0, 7);
          const part = count(new Path2D(item.querySelector('path').getAttribute('d'))) / count(hoop);
          const gaps = item.querySelector('.disc').classList.contains('gaps');
          return [Number(/middle ([\\d.]+)/.exec(item.textContent)[1]), 100 * (gaps ? 1 - part : part)];
        })"""
    )
    assert len(shares) == 7
    assert [round(drawn - middle, 3) for middle, drawn in shares if abs(drawn - middle) > 0.3] == []


def test_a_plant_with_its_cover_is_three_taps(app, records_file):
    site_id = records_file[1]["thin"]
    show(app, f"site/{site_id}/plants/find")
    app.page.locator("input[type=search]").fill("utha junper")
    app.page.locator(".found a[href$='juniperus_osteosperma']").tap()
    app.page.locator(".covers button").nth(2).tap()
    app.page.get_by_text("Utah juniper: 1–5 %").wait_for(state="attached")
    app.page.get_by_role("link", name=re.compile("^Listed")).tap()
    row = app.page.locator(".row", has_text="Utah juniper")
    assert "1–5 %" in row.inner_text()
    app.page.get_by_role("button", name="Undo").tap()
    row.wait_for(state="detached")


def test_poison_is_told_before_the_name(app, records_file, demo_files):
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    deadly = [
        plant for plant, text in texts["plants"].items()
        if any(one["who"] == "people" and one["level"] in ("deadly", "harm") for one in text["cautions"])
    ]  # fmt: skip
    assert deadly
    for plant in deadly:
        show(app, f"site/{records_file[1]['sage']}/plants/enter/{plant}")
        order = app.page.evaluate(
            "() => { const all = [...document.querySelectorAll('main *')]; return [all.indexOf(document.querySelector('.danger')), all.indexOf(document.querySelector('main h2'))]; }"
        )
        assert 0 <= order[0] < order[1], plant


def test_a_group_with_a_poison_in_it_is_found_by_name_and_warns_first(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/plants/find")
    app.page.locator("input[type=search]").fill("carrot")
    row = app.page.locator("a.row", has_text="Carrot-family plant")
    assert row.locator(".care").count() == 1
    row.tap()
    app.page.locator(".danger").wait_for()
    show(app, f"site/{records_file[1]['sage']}/plants/enter/spruce")
    app.page.get_by_role("heading", name="Spruce of some kind").wait_for()
    assert app.page.locator(".danger").count() == 0


def test_a_long_list_rolls_inside_the_page(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/plants/find")
    app.page.get_by_role("button", name="Perennial herb").tap()
    app.page.locator("a.row .care").first.wait_for()
    assert app.page.evaluate("document.scrollingElement.scrollHeight - innerHeight") == 0


def test_digging_waits_for_its_safety_answer(app, records_file):
    show(app, f"site/{records_file[1]['zone']}/place")
    ask = app.page.locator(".ask", has_text="free water")
    assert ask.locator("button").count() == 0
    app.page.get_by_role("button", name="Cleared by the line owners").tap()
    assert ask.locator("button").count() > 2
    app.page.get_by_role("button", name="Not checked, so not dug").tap()
    assert ask.locator("button").count() == 0


def test_overruling_needs_a_reason_and_both_stay(app, records_file):
    show(app, f"site/{records_file[1]['zone']}/zone")
    called = app.page.locator(".opened h2").inner_text()
    app.page.get_by_role("button", name="Not right?").tap()
    keep = app.page.get_by_role("button", name="Keep mine")
    app.page.get_by_role("button", name="A Saltbush flat").tap()
    assert keep.count() == 0
    app.page.get_by_label("Why?").fill("Saltbush all round")
    keep.tap()
    assert "You say Saltbush flat: Saltbush all round" in app.page.locator("main").inner_text()
    assert app.page.locator(".opened h2").inner_text() == called


def test_reasons_add_up_for_every_pair(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/zone")
    pairs = app.page.locator(".letters button")
    assert pairs.count() == 15
    for pair in range(pairs.count()):
        pairs.nth(pair).click()
        more = app.page.locator(".rise .btn")
        if more.count():
            more.click()
        points = [
            int(text.replace("−", "-").replace("+", "").replace(".", ""))
            for text in app.page.locator(".rise tbody .n").all_inner_texts()
        ]
        assert sum(points[:-1]) == points[-1]


def test_thin_shows_no_big_name(app, records_file):
    show(app, f"site/{records_file[1]['thin']}/zone")
    assert app.page.locator(".verdict").first.inner_text() == "Too little to say."
    assert app.page.locator(".opened, .edge.open h2").count() == 0


def test_each_verdict_opens_the_edge_in_its_own_way(app, records_file):
    ids = records_file[1]
    seen = {}
    for verdict in ("zone", "edge", "mosaic", "misfit", "thin"):
        show(app, f"site/{ids[verdict]}/zone")
        count = {
            name: app.page.locator(f".edge.open {name}").count()
            for name in (".opened", ".inlay", ".gap", ".even")
        }
        seen[verdict] = count
    assert seen["zone"][".opened"] == 1
    assert seen["edge"][".opened"] == 2
    assert (seen["mosaic"][".opened"], seen["mosaic"][".inlay"]) == (1, 1)
    assert (seen["misfit"][".opened"], seen["misfit"][".gap"]) == (0, 1)
    assert seen["thin"][".even"] == 12


def test_no_bag_is_red_before_its_tag_or_the_print_key_is_touched(app, records_file):
    show(app, "sites")
    show(app, f"site/{records_file[1]['edge']}/reclaim/order")
    page = app.page
    page.locator(".bag").first.wait_for()
    bags = page.locator(".bag").count()
    assert bags > 1
    assert page.locator(".bag.held, .bag .hold").count() == 0
    assert page.locator(".bag", has_text="Tag not typed yet").count() == bags
    page.get_by_role("button", name="Print the order").click()
    page.locator(".bag.held").first.wait_for()
    assert page.locator(".bag.held").count() == bags
    assert page.get_by_role("button", name="Print the order").count() == 0


def test_three_looks_are_read_together_and_kept(app, records_file):
    edge = records_file[1]["edge"]
    page = app.page
    for way in ("Look 50 m up", "50 m down"):
        show(app, f"site/{edge}/zone")
        page.get_by_role("button", name=way).click()
        page.locator("input[type=search]").wait_for()
        page.locator("input[type=search]").fill("muttongrass")
        page.locator(".found a[href$='poa_fendleriana']").click()
        page.locator(".covers button").nth(2).click()
        page.locator("input[type=search]").wait_for()
    show(app, f"site/{edge}/zone")
    page.get_by_role("button", name="Changing within 50 m").click()
    said = page.locator(".three .verdict").inner_text()
    page.get_by_role("button", name="Keep what three looks say").click()
    page.locator(".three .kept").wait_for()
    show(app, "sites")
    row = page.locator(f"a.site[href*='{edge}']").inner_text()
    assert said.replace("\n", " ") in row.replace("\n", " ")


def test_belief_says_that_no_real_plot_tested_it(app, records_file):
    for verdict in ("zone", "edge", "mosaic", "misfit"):
        show(app, f"site/{records_file[1][verdict]}/zone")
        assert app.page.get_by_text("not tested on real plots").count() >= 1, verdict


def test_a_guess_of_rain_gives_no_verdict_that_counts(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/production")
    app.page.get_by_label("Or type a mean").fill("1390")
    app.page.get_by_role("button", name="Less rain").click()
    guess = app.page.get_by_text("The rain is a guess")
    guess.wait_for()
    app.page.get_by_role("button", name="Gauge").click()
    guess.wait_for(state="detached")
    assert app.page.locator(".verdict").first.inner_text() == "Inside this year’s range."


def test_a_subspecies_is_not_ordered_by_its_species_name(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/reclaim/order")
    bag = app.page.locator(".bag", has_text="Mountain big sagebrush")
    bag.get_by_role("button").click()
    bag.get_by_label("Kind and subspecies").fill("Artemisia tridentata")
    bag.get_by_label("Purity").fill("16")
    bag.get_by_label("Germination").fill("78")
    bag.get_by_label("Test date").fill("2026-03-01")
    bag.get_by_role("button", name="Keep the tag").click()
    assert "Not taken without its subspecies" in bag.inner_text()
    assert app.page.get_by_role("button", name="Print the order").count() == 0


def test_an_area_is_typed_and_a_bad_one_is_named_at_its_field(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/reclaim/order")
    page = app.page
    area = page.locator(".slide").get_by_role("textbox")
    live = page.locator(".bag .kg small").first
    area.fill("10")
    whole = float(live.inner_text().split()[0])
    area.fill("2,5")
    assert float(live.inner_text().split()[0]) == pytest.approx(whole / 4, abs=0.005)
    area.fill("2,5 ha")
    page.get_by_text("Type a number from 0.01 to 100,000.").wait_for()
    assert live.inner_text() == ""
    assert page.get_by_role("button", name="Print the order").count() == 0
    page.get_by_role("button", name="More area").click()
    assert area.input_value() == "0.5"
    assert float(live.inner_text().split()[0]) == pytest.approx(whole / 20, abs=0.005)


def test_every_page_with_odds_says_that_no_real_plot_tested_it(app, records_file):
    site_id = records_file[1]["sage"]
    for page in (f"site/{site_id}/production", f"site/{site_id}/reclaim", "sites"):
        show(app, page)
        told = app.page.get_by_text("not tested on real plots")
        told.first.wait_for()
        assert told.count() == 1, page
    for page in ("reclaim", "reclaim/order", "reclaim/test"):
        show(app, f"site/{site_id}/{page}")
        mark = app.page.get_by_text("Invented district")
        mark.first.wait_for()
        assert mark.count() == 1, page


def test_a_disturbed_site_is_told_what_its_range_is_of(app, records_file):
    told = "says nothing yet of this disturbed ground"
    show(app, f"site/{records_file[1]['sage']}/production")
    app.page.get_by_text(told).wait_for()
    show(app, f"site/{records_file[1]['sage']}/place")
    app.page.get_by_role("button", name="Undisturbed ground").first.click()
    show(app, f"site/{records_file[1]['sage']}/production")
    assert app.page.get_by_text(told).count() == 0


def test_a_plant_looked_for_out_of_its_season_says_that_it_does_not_weigh(app, records_file):
    """Low larkspur is known from April to June; the site check is of July."""
    site_id = records_file[1]["sage"]
    show(app, f"site/{site_id}/plants/enter/delphinium_nuttallianum")
    assert app.page.locator(".told .hint", has_text="Not in season now").count() == 1
    app.page.get_by_role("button", name="not found").click()
    app.page.locator("input[type=search]").wait_for()
    show(app, f"site/{site_id}/plants/listed")
    told = app.page.locator(".row", has_text="does not weigh")
    assert told.count() == 1
    assert "larkspur" in told.inner_text().lower()


def test_the_book_holds_every_caution_of_the_region(app, demo_files):
    texts = json.loads(demo_files["regions/sorrel_plateau/texts.en.json"])
    show(app, "book/cautions")
    app.page.locator(".cautions").first.wait_for()
    said = app.page.locator("main").inner_text()
    assert [one["id"] for one in texts["region"]["cautions"] if one["text"] not in said] == []


def test_a_site_check_by_keyboard_alone(app, records_file):
    """From the list to a new record, three plants named, one answer, and the zone: no pointer used."""
    page = app.page
    show(app, "sites")
    press_to(page, "New site")
    page.keyboard.press("Enter")
    page.wait_for_url("**/place")
    page.get_by_role("heading", level=1).wait_for()
    press_to(page, "North-east, NE")
    page.keyboard.press("Space")
    assert page.get_by_role("button", name="North-east, NE").get_attribute("aria-pressed") == "true"
    press_to(page, "Start with plants")
    page.keyboard.press("Enter")
    for name in ("Muttongrass", "Silvery lupine", "Western yarrow"):
        page.locator("input[type=search]").wait_for()
        press_to(page, "Any name")
        page.keyboard.type(name)
        press_to(page, name, back=True)
        page.keyboard.press("Enter")
        page.locator(".covers").wait_for()
        press_to(page, "1–5 %")
        page.keyboard.press("Enter")
    page.locator(".told h2").wait_for()
    press_to(page, "not found")
    page.keyboard.press("Enter")
    assert page.evaluate("document.activeElement.textContent.trim()") == "not found"
    press_to(page, "Zone")
    page.keyboard.press("Enter")
    page.locator(".edge.open").wait_for()
    assert page.evaluate("document.activeElement.tagName") == "H1"


def press_to(page, name, back=False, most=120):
    """Tabs until the thing of that name has the focus."""
    for _ in range(most):
        page.keyboard.press("Shift+Tab" if back else "Tab")
        said = page.evaluate(
            "() => { const one = document.activeElement; return (one.getAttribute('aria-label') ?? one.innerText ?? '').trim(); }"
        )
        if said.split("\n")[0].strip() == name:
            return
    raise AssertionError(f"no focus on {name}")


def test_an_answer_is_read_out_with_what_comes_next(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/plants/next")
    while not app.page.locator(".covers").count():
        app.page.get_by_role("button", name="Ask another").click()
    asked = app.page.locator(".told h2").inner_text()
    app.page.locator(".covers button").first.click()
    app.page.wait_for_timeout(150)
    spoken = app.page.locator("p.spoken[aria-live]").text_content()
    next_one = app.page.locator(".told h2").inner_text()
    app.page.get_by_role("button", name="Undo").click()
    assert spoken.startswith(f"{asked}: not found.")
    assert next_one in spoken


def test_the_edge_changes_side_for_the_left_hand(app, records_file):
    show(app, f"site/{records_file[1]['sage']}/plants/find")
    where = "() => document.querySelector('.edge.ajar').getBoundingClientRect().left"
    assert app.page.evaluate(where) == 0
    app.page.evaluate("document.documentElement.dataset.hand = 'left'")
    assert app.page.evaluate(where) > 300
    app.page.evaluate("document.documentElement.dataset.hand = 'right'")
