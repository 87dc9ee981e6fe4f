"""Sheets: cut, piled and folded, the pages come in order; sizes and places are true."""

import re
import subprocess
from functools import cache
from pathlib import Path
from tempfile import mkdtemp

import pikepdf
import pytest
from helpers import three_zone_files, write_region
from PIL import Image

from builder.booklet import FORMATS, write_booklet
from builder.booklet.formats import zone_runs
from builder.booklet.impose import A4, LETTER, corner, imposed
from builder.booklet.orders import SECTION_PAGES, cards, folded, sections, single, stacks
from builder.booklet.render import Press, written
from builder.booklet.style import A6, POCKET_US, overlay_rules, tab_box
from builder.tables import load_region
from builder.views import look

MM = 72 / 25.4
DPI = 254  # ten dots to the millimetre


def as_bound(sheets, count):
    """Pages as read after cutting across, laying top on bottom, and folding each section."""
    read, at = [], 0
    for first, last in sections(count):
        number = (last - first + 1) // 8
        own = sheets[at : at + number]
        at += number
        leaves = [(s.front[0], s.front[1], s.back[0], s.back[1]) for s in own]
        leaves += [(s.front[2], s.front[3], s.back[2], s.back[3]) for s in own]
        read += [page for leaf in leaves for page in (leaf[1], leaf[2])]
        read += [page for leaf in reversed(leaves) for page in (leaf[3], leaf[0])]
    return read


def as_piled(sheets):
    """Pages as read after cutting into four piles and laying the first on top."""
    read = []
    for pile in range(4):
        for sheet in sheets:
            read.append(sheet.front[pile])
            if sheet.back is not None:
                read.append(sheet.back[pile ^ 1])  # turned on the long edge: left lies right
    return read


@pytest.mark.parametrize("count", [1, 7, 8, 30, 64, 65, 128, 131])
def test_folded_pages_come_in_order(count):
    read = [page for page in as_bound(folded(count), count) if page is not None]
    assert read == list(range(1, count + 1))


@pytest.mark.parametrize("count", [1, 2, 9, 16, 127, 128])
def test_piled_pages_come_in_order(count):
    for order in (stacks, single):
        read = [page for page in as_piled(order(count)) if page is not None]
        assert read == list(range(1, count + 1))


def test_the_check_of_order_can_fail():
    turned = [type(s)(s.front, (s.back[1], s.back[0], s.back[3], s.back[2])) for s in stacks(16)]
    assert [page for page in as_piled(turned) if page] != list(range(1, 17))


def test_sections_are_even_and_no_fatter_than_a_stapler():
    for count in (8, 64, 65, 128, 200):
        found = sections(count)
        long = [last - first + 1 for first, last in found]
        assert max(long) <= SECTION_PAGES
        assert max(long) - min(long) <= 8
        assert found[0][0] == 1
        assert found[-1][1] >= count


def test_a_zone_lies_on_one_sheet_of_its_own():
    runs = zone_runs(20, {"zone-a": 6, "zone-b": 10, "chart-0": 14, "plants": 15})
    assert runs == [(6, 9), (10, 13)]
    assert [sheet.front for sheet in cards(runs)] == [(6, 7, 8, 9), (10, 11, 12, 13)]


def test_four_pages_fill_the_sheet_without_scaling():
    assert corner(3, POCKET_US, LETTER) == pytest.approx((107.95, 0))
    assert corner(0, POCKET_US, LETTER) == pytest.approx((0, 139.7))
    assert corner(0, A6, A4) == pytest.approx((0, 148.5))
    assert corner(3, A6, A4) == pytest.approx((105, 0.5))


@cache
def region():
    folder = Path(mkdtemp(prefix="booklet"))
    loaded = load_region(write_region(folder / "willow_breaks", three_zone_files()))
    assert loaded.region is not None
    return loaded.region


@cache
def made(format):
    path = Path(mkdtemp(prefix="booklet")) / f"{format}.pdf"
    return write_booklet(region(), path, format)


@cache
def picture(number):
    """A page of the A6 booklet in greys, ten dots to the millimetre."""
    path = made("a6").path
    command = ["pdftoppm", "-r", str(DPI), "-gray", "-png", "-singlefile"]
    subprocess.run(
        [*command, "-f", str(number), "-l", str(number), str(path), str(path.with_suffix(""))],
        check=True,
    )
    with Image.open(path.with_suffix(".png")) as image:
        return image.convert("L")


def dark_rows(image, x_mm, under=110):
    """Millimetres down the page where a column is dark, the middle of each run."""
    x = round(x_mm * DPI / 25.4)
    rows = [y for y in range(image.height) if image.getpixel((x, y)) < under]
    runs = []
    for y in rows:
        if runs and runs[-1][-1] == y - 1:
            runs[-1].append(y)
        else:
            runs.append([y])
    return [(run[0] + run[-1] + 1) / 2 * 25.4 / DPI for run in runs]


def test_the_rule_on_the_cover_is_true_to_a_tenth_of_a_millimetre():
    image = picture(1)
    centimetres = dark_rows(image, A6.width - 3.0)
    assert centimetres[-1] - centimetres[0] == pytest.approx(140, abs=0.1)
    inches = [y for y in dark_rows(image, 3.6)]
    assert inches[-1] - inches[0] == pytest.approx(5 * 25.4, abs=0.1)


def test_a_tab_stands_at_its_belts_place_on_the_edge():
    seen = look(region())
    for zone in region().zones:
        number = made("a6").anchors[f"zone-{zone.id}"]
        image = picture(number)
        top, tall = tab_box(seen, zone.id, A6)
        x = round(0.6 * DPI / 25.4)
        inked = [y for y in range(image.height) if image.getpixel((x, y)) < 250]
        assert inked[0] * 25.4 / DPI == pytest.approx(top, abs=0.3)
        assert inked[-1] * 25.4 / DPI == pytest.approx(top + tall, abs=0.3)


@pytest.mark.parametrize(("format", "paper"), [("a4-sheets", A4), ("letter-stacks", LETTER)])
def test_sheets_have_the_papers_size_and_hold_each_page_once_at_true_size(format, paper):
    pages = []
    with pikepdf.open(made(format).path) as pdf:
        for sheet in pdf.pages:
            _, _, width, height = (float(side) for side in sheet.mediabox)
            assert width == pytest.approx(paper.width * MM, abs=0.01)
            assert height == pytest.approx(paper.height * MM, abs=0.01)
            drawn = sheet.Contents.read_bytes().decode()
            placed = re.findall(r"q 1 0 0 1 ([\d.]+) ([\d.]+) cm /Page(\d+) Do Q", drawn)
            trim = FORMATS[format].trim
            corners = {
                tuple(round(mm * MM, 2) for mm in corner(place, trim, paper)) for place in range(4)
            }
            for x, y, page in placed:
                pages.append(int(page))
                assert (round(float(x), 2), round(float(y), 2)) in corners
            assert drawn.endswith("/Marks Do Q")
    assert sorted(pages) == list(range(1, max(pages) + 1))


def test_sheets_are_the_same_bytes_twice():
    pages = made("a6").path.read_bytes()
    press = Press([overlay_rules(A4.width, A4.height)])
    page = (
        '<html lang="en"><title>x</title><body><p>front</p><p style="break-before: page">back</p>'
    )
    over = written(press.laid_out(page, 1, lambda _: None))
    first, second = (
        imposed(pages, stacks(made("a6").pages), A6, A4, over, "x", "en", lambda *_: None)
        for _ in range(2)
    )
    assert first == second


def test_every_format_is_known_by_name_and_has_its_note():
    assert set(FORMATS) >= {"a6", "pocket-us", "a4-sheets", "letter-sheets", "a4-cards"}
    for form in FORMATS.values():
        assert (form.paper is None) == (form.note == "")
