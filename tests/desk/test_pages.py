"""Every page is served, says what the tables say, and its links lead somewhere."""

import io
import re

import pytest
from jinja2 import nodes

from tests.desk.helpers import OCCURRENCE, REGION, save, token

TABLES = [
    "region", "zones", "plants", "occurrence", "questions", "production", "soils", "reclaim",
    "seed", "sources", "climate",
]  # fmt: skip
LINK = re.compile(r'(?:href|src|action)="(/[^"#?]*)')


def test_links_from_the_overview_lead_to_pages(client):
    seen, waiting = set(), ["/"]
    while waiting:
        path = waiting.pop()
        if path in seen:
            continue
        seen.add(path)
        answer = client.get(path)
        if answer.status_code == 405:  # the address of a form
            continue
        assert answer.status_code in {200, 302}, path
        if answer.mimetype == "text/html":
            waiting += LINK.findall(answer.get_data(as_text=True))
        answer.close()
    assert len(seen) >= 60


@pytest.mark.parametrize("table", TABLES)
def test_every_table_has_a_page(client, table):
    page = client.get(f"{REGION}/tables/{table}")
    assert page.status_code == 200
    assert b"data-key" in page.data or b'class="list"' in page.data


def test_the_form_of_a_row_holds_every_value(client):
    page = client.get(f"{REGION}/tables/zones/zones/0").get_data(as_text=True)
    for value in ("Mixed prairie", "1075", "Knee-high grass on loam.", "breaks, bottom"):
        assert f'value="{value}"' in page or f">{value}</textarea>" in page
    assert "whole number from 0 to 366" in page


def test_mend_leads_to_the_form_that_holds_the_line(client, tmp_path):
    path = tmp_path / "keydata/willow_breaks/zones.yaml"
    lines = path.read_text(encoding="utf-8").split("\n")
    line = next(n for n, text in enumerate(lines, 1) if "name: Pine breaks" in text)
    there = client.get(f"{REGION}/at?file=zones.yaml&line={line}").headers["Location"]
    assert there == f"{REGION}/tables/zones/zones/1#line-{line}"
    assert f'id="line-{line}"' in client.get(there).get_data(as_text=True)


def test_a_region_that_cannot_be_read_is_shown_with_its_problems(client, tmp_path):
    (tmp_path / "keydata/willow_breaks/zones.yaml").write_text("zones: [\n", encoding="utf-8")
    for path in ("/", f"{REGION}/", f"{REGION}/problems", f"{REGION}/build", f"{REGION}/editions"):
        assert client.get(path).status_code == 200
    assert b"zones.yaml:" in client.get(f"{REGION}/").data
    assert client.get(f"{REGION}/tables/zones").status_code == 404
    assert client.get(f"{REGION}/tables/plants").status_code == 200


def test_a_flag_stands_on_the_zone_whose_table_is_wrong(client, tmp_path):
    path = tmp_path / OCCURRENCE
    path.write_text(
        path.read_text("utf-8").replace("prairie: [90, 18]", "prairie: [90, 180]"), "utf-8"
    )
    page = client.get(f"{REGION}/").get_data(as_text=True)
    assert page.count('fill="var(--warn)" stroke="var(--warn)"') == 1
    assert client.get(f"{REGION}/tables/occurrence").data.count(b'aria-invalid="true"') == 1


def test_an_edition_is_kept_and_its_changes_are_told_in_words(client):
    form = {"token": token(client), "edition": "t2", "date": "2026-04-01"}
    for wrong in ({"edition": "../x"}, {"edition": ""}, {"date": "April"}, {"date": "2026-02-30"}):
        client.post(f"{REGION}/editions", data=form | wrong)
    assert "No edition has been kept" in client.get(f"{REGION}/editions").get_data(as_text=True)
    client.post(f"{REGION}/editions", data=form)
    assert "edition t2" in client.get(f"{REGION}/").get_data(as_text=True)
    save(client, "occurrence", ("occurrence/blue_grama/prairie", "90 18", "64 18"))
    save(client, "zones", ("zones/0/centre_m", "1075", "1080"))
    page = client.get(f"{REGION}/editions").get_data(as_text=True)
    assert "2 changes since edition t2" in page
    assert re.search(r"Blue grama, Prairie: <del>90, 18</del> → <ins>64, 18</ins>", page)
    assert re.search(r"<del>1075 m</del> → <ins>1080 m</ins>", page)
    client.post(f"{REGION}/editions", data=form)
    assert "is kept already" in client.get(f"{REGION}/editions").get_data(as_text=True)


def test_a_workbook_goes_out_and_comes_back_without_loss(client, tmp_path):
    folder = tmp_path / "keydata" / "willow_breaks"
    before = {path: path.read_bytes() for path in folder.rglob("*.*")}
    book = client.get(f"{REGION}/sheets/workbook.xlsx").data
    answer = send_book(client, book)
    assert "Nothing in it differs" in answer
    assert {path: path.read_bytes() for path in folder.rglob("*.*")} == before
    for wrong in (b"", b"PK\x03\x04 no workbook", b"x" * 5000):
        send_book(client, wrong)
    assert {path: path.read_bytes() for path in folder.rglob("*.*")} == before


def send_book(client, content):
    form = {"token": token(client), "workbook": (io.BytesIO(content), "book.xlsx")}
    answer = client.post(f"{REGION}/sheets", data=form, follow_redirects=True)
    assert answer.status_code == 200
    return answer.get_data(as_text=True)


def test_a_region_is_started_and_passes_every_check(client, tmp_path):
    form = {"token": token(client), "name": "Red Hills", "id": "red_hills"}
    for wrong in ("../red", "Red", "", "willow_breaks", "a/b", "con:1", "."):
        assert client.post("/start", data=form | {"id": wrong}).status_code == 400
    client.post("/start", data=form)
    assert sorted(path.name for path in (tmp_path / "keydata").iterdir()) == [
        "red_hills",
        "willow_breaks",
    ]
    page = client.get("/r/red_hills/").get_data(as_text=True)
    assert "Red Hills" in page
    assert "Nothing to mend." in page


FORBIDDEN = (
    nodes.BinExpr, nodes.Compare, nodes.CondExpr, nodes.Assign, nodes.AssignBlock, nodes.Getitem,
    nodes.Filter, nodes.Not,
)  # fmt: skip


def logic_in(app, source):
    """Template constructs that decide something."""
    tree = app.jinja_env.parse(source)
    return [type(found).__name__ for found in tree.find_all(FORBIDDEN)]


def test_templates_hold_no_logic(app):
    names = app.jinja_env.list_templates()
    assert len(names) >= 12
    for name in names:
        source, _, _ = app.jinja_env.loader.get_source(app.jinja_env, name)
        assert logic_in(app, source) == [], name


@pytest.mark.parametrize(
    "text", ["{{ a + 1 }}", "{% if a > 1 %}x{% endif %}", "{% set a = 1 %}", "{{ a[0] }}"]
)
def test_logic_in_a_template_is_caught(app, text):
    assert logic_in(app, text)
