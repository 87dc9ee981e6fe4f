"""Spreadsheets: a whole region to one workbook or CSV files and back without loss."""

import io
from pathlib import Path

import pytest
from helpers import three_zone_files, write_region
from openpyxl import Workbook, load_workbook

from builder.checks import checked_region
from builder.proof.kept import PROOF_YAML
from builder.rows import parse_yaml, plain
from builder.tables.merge import merged_text
from builder.tables.sheets import SheetFault
from builder.tables.workbook import (
    changed_texts,
    csv_texts,
    sheets_of_csv,
    sheets_of_workbook,
    workbook_bytes,
)

KEYDATA = Path(__file__).parent.parent.parent / "keydata"


def there_and_back(folder, way):
    if way == "xlsx":
        return sheets_of_workbook(workbook_bytes(folder))
    return sheets_of_csv(csv_texts(folder))


@pytest.mark.parametrize("way", ["xlsx", "csv"])
@pytest.mark.parametrize("region", ["sorrel_plateau", "ravenmoss_upland", "three zones"])
def test_a_region_comes_back_without_loss(tmp_path, region, way):
    folder = KEYDATA / region
    if region == "three zones":
        folder = write_region(tmp_path / "here", three_zone_files())
    sheets = there_and_back(folder, way)
    assert changed_texts(folder, sheets) == {}
    empty = tmp_path / "fresh"
    empty.mkdir()
    fresh = write_region(empty, changed_texts(empty, sheets))
    assert checked_region(fresh).problems == []
    # What was measured on the tables stays behind: it is made again by a proof.
    tables = [path for path in folder.rglob("*.yaml") if path.name != PROOF_YAML]
    assert len(tables) > 9
    for path in tables:
        again = (fresh / path.relative_to(folder)).read_text(encoding="utf-8")
        first = plain(parse_yaml(path.read_text(encoding="utf-8"), "a")[0])
        assert plain(parse_yaml(again, "b")[0]) == first, path.name


def edited(folder, sheet, column, where, value):
    """The workbook of a folder with one cell typed over."""
    book = load_workbook(io.BytesIO(workbook_bytes(folder)))
    page = book[sheet]
    names = [cell.value for cell in page[1]]
    for row in page.iter_rows(min_row=2):
        if row[0].value == where:
            row[names.index(column)].value = value
    out = io.BytesIO()
    book.save(out)
    return out.getvalue()


@pytest.mark.parametrize(
    ("sheet", "column", "where", "typed", "file", "old", "new"),
    [
        ("constancy", "prairie", "blue_grama", 95, "occurrence.yaml", "[90, 18]", "[95, 18]"),
        (
            "zones",
            "short",
            "bottom",
            "Low bottom",
            "zones.yaml",
            "short: River bottom",
            "short: Low bottom",
        ),
        ("climate", "tmax_c", "prairie", None, "climate.csv", None, None),
        (
            "plants.cautions",
            "text",
            "death_camas",
            "Never touch.",
            "plants.yaml",
            "All parts kill. Do not handle.",
            "Never touch.",
        ),
        (
            "plants",
            "planning_pls",
            "blue_grama",
            "0.65",
            "plants.yaml",
            "planning_pls: 0.6,",
            "planning_pls: 0.65,",
        ),
    ],
)
def test_one_cell_changes_one_value(tmp_path, sheet, column, where, typed, file, old, new):
    folder = write_region(tmp_path / "r", three_zone_files())
    before = (folder / file).read_text(encoding="utf-8")
    changed = changed_texts(folder, sheets_of_workbook(edited(folder, sheet, column, where, typed)))
    assert list(changed) == [file]
    if old is not None:
        assert changed[file] == before.replace(old, new, 1)


def test_a_code_that_a_spreadsheet_made_a_number_is_text_again(tmp_path):
    folder = write_region(tmp_path / "r", three_zone_files())
    raw = edited(folder, "region.cover_scale.classes", "code", "1", 1)
    assert changed_texts(folder, sheets_of_workbook(raw)) == {}


def test_nothing_in_the_files_runs_as_a_formula(tmp_path):
    files = three_zone_files()
    files["zones.yaml"] = files["zones.yaml"].replace(
        "one_line: Knee-high grass on loam.", "one_line: '=HYPERLINK(\"x\")'"
    )
    folder = write_region(tmp_path / "r", files)
    book = load_workbook(io.BytesIO(workbook_bytes(folder)))
    kinds = {cell.data_type for page in book.worksheets for row in page for cell in row}
    assert "f" not in kinds
    texts = csv_texts(folder)
    assert "'=HYPERLINK" in texts["zones"]
    assert changed_texts(folder, sheets_of_csv(texts)) == {}


@pytest.mark.parametrize("raw", [b"", b"no workbook", b"PK\x03\x04" + b"x" * 50])
def test_what_is_no_workbook_is_refused(raw):
    with pytest.raises(SheetFault):
        sheets_of_workbook(raw)


def test_half_an_occurrence_is_refused(tmp_path):
    folder = write_region(tmp_path / "r", three_zone_files())
    raw = edited(folder, "cover", "prairie", "blue_grama", None)
    with pytest.raises(SheetFault, match="blue_grama in prairie"):
        changed_texts(folder, sheets_of_workbook(raw))


def test_a_workbook_without_a_table_leaves_it_alone(tmp_path):
    folder = write_region(tmp_path / "r", three_zone_files())
    book = Workbook()
    book.active.title = "notes"
    out = io.BytesIO()
    book.save(out)
    assert changed_texts(folder, sheets_of_workbook(out.getvalue())) == {}


def test_a_broken_table_cannot_be_exported(tmp_path):
    folder = write_region(tmp_path / "r", three_zone_files() | {"zones.yaml": "a: [\n"})
    with pytest.raises(SheetFault, match="zones.yaml:2"):
        workbook_bytes(folder)


def test_merging_keeps_comments_and_rows_that_stay():
    text = (
        "# top\nrows:\n  # first\n  - {id: a, n: 1}\n  - {id: b, n: 2}   # second\nmore: [1, 2]\n"
    )
    new = {"rows": [{"id": "b", "n": 3}, {"id": "c", "n": 4}], "more": [1, 2]}
    after = merged_text(text, new)
    assert plain(parse_yaml(after, "t")[0]) == new
    assert "# top" in after
    assert "{id: b, n: 3}   # second" in after
    assert merged_text(text, plain(parse_yaml(text, "t")[0])) == text
    turned = {"rows": [{"id": "b", "n": 2}, {"id": "a", "n": 1}], "more": [1, 2]}
    assert plain(parse_yaml(merged_text(text, turned), "t")[0]) == turned
