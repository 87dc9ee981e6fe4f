"""The booklet's pages: facts about the file, one at a time."""

import re
import subprocess
import sys
from dataclasses import replace
from functools import cache
from pathlib import Path
from tempfile import mkdtemp

import pikepdf
import pytest
from helpers import three_zone_files, write_region

from builder.booklet import BookletError, make, write_booklet
from builder.booklet.contents import WORDS
from builder.booklet.fonts import MissingCharactersError, covered, refuse_uncovered
from builder.booklet.keying import grown
from builder.booklet.make import environment
from builder.booklet.render import Press, RendererError, written
from builder.booklet.samples import write_samples
from builder.booklet.style import A6, POCKET_US, tab_box
from builder.rows import plain, read_yaml
from builder.tables import load_region
from builder.views import look
from builder.views.phrases import FOLDER

MM = 72 / 25.4
TEMPLATES = Path(make.__file__).parent / "templates"
TOLD = {}
INLINE = re.compile(r"(?:\}\}|[.:,;]) <(?:b|i|span|small)\b")


@cache
def region():
    folder = Path(mkdtemp(prefix="booklet"))
    loaded = load_region(write_region(folder / "willow_breaks", three_zone_files()))
    assert loaded.region is not None
    return loaded.region


def made(format="a6"):
    """The three-zone booklet, made once for all tests of this file."""
    return made_once(format)


@cache
def made_once(format):
    path = Path(mkdtemp(prefix="booklet")) / "booklet.pdf"
    told = TOLD.setdefault(format, [])
    return write_booklet(
        region(),
        path,
        format,
        mark="0123456789abcdef",
        progress=lambda stage, done, of: told.append((stage, done)),
    )


@cache
def words(number, format="a6"):
    """Text of a page, counted from 1."""
    command = ["pdftotext", "-f", str(number), "-l", str(number), "-layout"]
    done = subprocess.run(
        [*command, str(made(format).path), "-"], capture_output=True, text=True, check=True
    )
    return done.stdout


@pytest.mark.parametrize(("format", "trim"), [("a6", A6), ("pocket-us", POCKET_US)])
def test_pages_have_the_formats_size(format, trim):
    with pikepdf.open(made(format).path) as pdf:
        assert len(pdf.pages) == made(format).pages
        for page in pdf.pages:
            left, foot, right, head = (float(side) for side in page.mediabox)
            assert right - left == pytest.approx(trim.width * MM, abs=0.01)
            assert head - foot == pytest.approx(trim.height * MM, abs=0.01)


def test_the_file_says_what_it_is():
    with pikepdf.open(made().path) as pdf:
        assert str(pdf.Root.Lang) == "en"
        assert bool(pdf.Root.MarkInfo.Marked)
        assert str(pdf.docinfo["/Title"]) == "Beltbook, Willow Breaks"
        with pdf.open_metadata() as meta:
            assert meta["pdfuaid:part"] == "1"
        with pdf.open_outline() as outline:
            titles = [item.title for item in outline.root]
    for zone in region().zones:
        assert zone.name in titles


def test_all_type_is_embedded():
    done = subprocess.run(
        ["pdffonts", str(made().path)], capture_output=True, text=True, check=True
    )
    rows = done.stdout.splitlines()[2:]
    assert rows
    for row in rows:
        assert "Source-S" in row
        assert re.search(r"yes yes yes", row), row


def test_each_zone_opens_on_a_left_hand_page_with_its_name():
    for zone in region().zones:
        number = made().anchors[f"zone-{zone.id}"]
        assert number % 2 == 0
        assert zone.name.split()[0] in words(number)


def test_page_numbers_in_the_contents_are_those_of_the_pages():
    text = words(made().anchors["contents"])
    for zone in region().zones:
        number = made().anchors[f"zone-{zone.id}"]
        row = next(line for line in text.splitlines() if zone.short in line)
        assert row.split()[-1] == str(number)


def test_page_feet_count_without_a_gap():
    for number in range(2, made().pages + 1):
        text = words(number).strip()
        if text:
            assert re.search(rf"(?:^|\s){number}(?:\s|$)", text.splitlines()[-1]), number


def test_nothing_is_set_outside_the_text_block_but_tabs_and_feet():
    done = subprocess.run(
        ["pdftotext", "-bbox", str(made().path), "-"], capture_output=True, text=True, check=True
    )
    pages = done.stdout.split("<page ")[1:]
    assert len(pages) == made().pages
    seen = 0
    for number, page in enumerate(pages[1:], start=2):
        outer, inner = (A6.outer, A6.inner) if number % 2 == 0 else (A6.inner, A6.outer)
        for x0, y0, x1, y1, word in re.findall(
            r'<word xMin="([\d.]+)" yMin="([\d.]+)" xMax="([\d.]+)" yMax="([\d.]+)">([^<]*)', page
        ):
            seen += 1
            if re.fullmatch("[A-Z]", word) and float(y0) < (A6.height - A6.bottom) * MM:
                continue  # a letter on a thumb tab
            assert float(x0) >= outer * MM - 1, (number, word)
            assert float(x1) <= (A6.width - inner) * MM + 1, (number, word)
            assert float(y1) <= (A6.height - 2) * MM, (number, word)
    assert seen > 500


def test_tabs_stand_in_stack_order_and_fill_the_edge():
    seen = look(region())
    boxes = [tab_box(seen, zone_id, A6) for zone_id in seen.stack]
    assert boxes[0][0] + boxes[0][1] == pytest.approx(A6.height)
    assert boxes[-1][0] == pytest.approx(0, abs=1e-9)
    for (top, _), (next_top, tall) in zip(boxes, boxes[1:], strict=False):
        assert next_top + tall == pytest.approx(top)


def test_same_tables_same_bytes(tmp_path):
    again = write_booklet(region(), tmp_path / "again.pdf", mark="0123456789abcdef")
    assert again.path.read_bytes() == made().path.read_bytes()


def test_an_unknown_zone_or_format_is_refused_before_anything_is_written(tmp_path):
    with pytest.raises(BookletError, match="no zone"):
        write_booklet(region(), tmp_path / "x.pdf", zones=["nowhere"])
    with pytest.raises(BookletError, match="no format"):
        write_booklet(region(), tmp_path / "x.pdf", format="a7")
    assert not list(tmp_path.iterdir())


def test_progress_comes_by_page():
    pages = made().pages
    laid = [done for stage, done in TOLD["a6"] if stage == "layout"]
    assert laid == sorted(laid)
    assert laid[-1] == pages


@pytest.mark.parametrize(
    "html",
    [
        '<p style="colour: red">x</p>',
        '<img src="nowhere.png" alt="x">',
        '<a href="#nowhere">x</a>',
    ],
)
def test_whatever_the_renderer_says_is_an_error(html):
    page = f'<html lang="en"><title>x</title><body>{html}'
    with pytest.raises(RendererError):
        written(Press([]).laid_out(page, 1, lambda _: None))


def test_a_character_without_type_is_named():
    with pytest.raises(MissingCharactersError, match="U\\+2265"):
        refuse_uncovered(["at least \u2265 3"])
    refuse_uncovered(["Straße, año, 2½ m², −3 °C, 1–2"])
    assert ord("ñ") in covered("Source Serif 4")


def test_templates_refuse_a_missing_name():
    with pytest.raises(Exception, match="undefined"):
        environment().from_string("{{ nothing.here }}").render()


def test_no_template_sets_a_space_before_an_inline_part():
    """The renderer breaks a text that fills its line but for a last space after its first word."""
    found = []
    for path in sorted(TEMPLATES.glob("*.html")):
        found += [f"{path.name}: {hit.group()}" for hit in INLINE.finditer(path.read_text("utf-8"))]
    assert len(list(TEMPLATES.glob("*.html"))) > 10
    assert found == []
    assert INLINE.search("<p>{{ line }} <b>x</b></p>")


def test_the_accessibility_checker_finds_no_error():
    """outloud checks PDF/UA-1 (ISO 14289-1) by the Matterhorn protocol."""
    checker = Path(sys.executable).with_name("outloud")
    done = subprocess.run(
        [str(checker), "--fail-on", "error", str(made().path)], capture_output=True, text=True
    )
    assert done.returncode == 0, done.stdout[-3000:]


def test_the_key_stands_with_its_own_hit_rate_and_the_pages_it_names():
    first = made().anchors["key"]
    text = "".join(words(number) for number in range(first, made().anchors["card"] + 1))
    tested = grown(region()).tested
    assert 0 < tested.key <= 1
    assert f"right {round(tested.key * 100)} times in 100" in " ".join(text.split())
    assert "Not tested on real plots" in " ".join(text.split())
    for zone in region().zones:
        assert re.search(rf"\b{made().anchors[f'zone-{zone.id}']}\b", text), zone.id


def test_a_region_with_an_address_gets_a_code_and_one_without_none(tmp_path):
    assert region().head.address is None
    assert "signal" not in words(made().anchors["about"])
    head = replace(region().head, address="https://example.org/beltbook/")
    first = region().zones[0]
    moved = replace(region(), head=head)
    coded = write_booklet(moved, tmp_path / "coded.pdf", zones=[first.letter])
    found = [name for name in coded.anchors if name.startswith("zone-")]
    assert found == [f"zone-{first.id}"]  # and only the zones asked for
    command = ["pdftotext", "-f", "2", "-l", "2", str(coded.path), "-"]
    done = subprocess.run(command, capture_output=True, text=True, check=True)
    assert "https://example.org/beltbook/" in "".join(done.stdout.split())


def test_six_typical_pages_become_pictures(tmp_path):
    found = write_samples(made().path, made().anchors, tmp_path)
    assert len(found) == 6
    assert all(path.read_bytes().startswith(b"\x89PNG") for path in found)


def test_the_booklet_can_be_made_in_spanish(tmp_path):
    first = region().zones[0].id
    done = write_booklet(region(), tmp_path / "es.pdf", language="es", zones=[first])
    with pikepdf.open(done.path) as pdf:
        assert str(pdf.Root.Lang) == "es"
    text = subprocess.run(
        ["pdftotext", str(done.path), "-"], capture_output=True, text=True, check=True
    ).stdout
    assert "Antes de tocar nada" in text


def test_spanish_holds_no_name_that_english_lacks():
    def names(tree, above=""):
        for name, below in tree.items():
            path = f"{above}{name}"
            yield from names(below, f"{path}.") if isinstance(below, dict) else [path]

    for folder in (WORDS, FOLDER):
        trees = {path.stem: set(names(plain(read_yaml(path)[0]))) for path in folder.glob("*.yaml")}
        assert trees["es"] <= trees["en"], trees["es"] - trees["en"]
        assert len(trees["es"]) > 0.9 * len(trees["en"])
