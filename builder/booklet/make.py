"""Tables in, PDF out."""

import os
import re
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from pathlib import Path

from jinja2 import Environment, FileSystemLoader, StrictUndefined, select_autoescape

from builder.booklet import fonts, style
from builder.booklet.contents import WORDS, BookletView, booklet_view, with_pages
from builder.booklet.render import Document, Press, bound, no_sweeping, pages_of, written
from builder.tables import Region
from builder.views.look import Look, look
from builder.views.phrases import phrases

HERE = Path(__file__).parent
FORMATS = {"a6": style.A6, "pocket-us": style.POCKET_US}
MOST_LAYOUTS = 3
FRONT_PAGES = 7
Progress = Callable[[str, int, int], None]


class BookletError(ValueError):
    """The booklet cannot be made as asked; the text says why and what to do."""


@dataclass(frozen=True)
class Made:
    """What was written: the file, its pages and where each part begins."""

    path: Path
    pages: int
    anchors: dict[str, int]


def write_booklet(
    region: Region,
    out: Path | str,
    format: str = "a6",
    zones: Iterable[str] | None = None,
    language: str = "en",
    progress: Progress | None = None,
    mark: str | None = None,
    cautions: Iterable[str] = (),
) -> Made:
    """Write a region's booklet as PDF, whole or not at all.

    format    one of FORMATS
    zones     ids of the zones to print; None for all
    language  language of the words
    progress  called with a stage's name, steps done and steps in all
    mark      hash of the pack the tables make
    cautions  cautions of the table check, for the last page
    """
    if format not in FORMATS:
        raise BookletError(f'there is no format "{format}"; known: {", ".join(FORMATS)}')
    chosen = _chosen(region, zones)
    tell = progress or (lambda stage, done, of: None)
    seen = look(region, language)
    trim = FORMATS[format]
    with no_sweeping():
        pdf, count, anchors = _reading_order(seen, trim, mark or "", chosen, tuple(cautions), tell)
    path = Path(out)
    path.parent.mkdir(parents=True, exist_ok=True)
    part = path.with_name(path.name + ".part")
    part.write_bytes(pdf)
    os.replace(part, path)
    return Made(path, count, anchors)


def _chosen(region: Region, zones: Iterable[str] | None) -> dict[str, None] | None:
    if zones is None:
        return None
    known = {zone.id: zone.id for zone in region.zones}
    known |= {zone.letter: zone.id for zone in region.zones}
    wanted: dict[str, None] = {}
    for name in zones:
        if name not in known:
            raise BookletError(f'there is no zone "{name}"; known: {", ".join(known)}')
        wanted[known[name]] = None
    if not wanted:
        raise BookletError("no zone is named; leave zones out to print all")
    return wanted


def _reading_order(
    seen: Look,
    trim: style.Trim,
    mark: str,
    chosen: dict[str, None] | None,
    cautions: tuple[str, ...],
    tell: Progress,
) -> tuple[bytes, int, dict[str, int]]:
    """The booklet in reading order.

    The body is set first, then the front matter with the body's page numbers in figures;
    should the front take more or fewer pages than thought, the body is set again.
    """
    zone_ids = [zone.id for zone in seen.region.zones if chosen is None or zone.id in chosen]
    foot = phrases(seen.phrases.language, WORDS).say(
        "footer", region=seen.region.name, edition=seen.region.edition
    )
    press = Press(
        [
            fonts.faces(),
            style.page_rules(seen, trim, foot, zone_ids),
            (HERE / "booklet.css").read_text("utf-8"),
        ]
    )
    book = booklet_view(seen, trim, mark, {}, chosen, cautions)
    body_html = _html("body.html", book)
    front_pages, filler = FRONT_PAGES, False
    for _ in range(MOST_LAYOUTS):
        body = press.laid_out(
            body_html, front_pages + 1, lambda page, add=front_pages: tell("layout", page + add, 0)
        )
        pages = pages_of(body, front_pages + 1)
        front = _front(press, with_pages(book, seen, pages, filler), tell)
        if len(front.pages) % 2 == 0:
            filler = True
            front = _front(press, with_pages(book, seen, pages, filler), tell)
        if len(front.pages) == front_pages:
            break
        front_pages = len(front.pages)
    else:
        raise BookletError("the front matter does not settle on a number of pages")
    pages = pages_of(front) | pages
    whole = bound([front, body])
    count = len(whole.pages)
    tell("write", 0, count)
    pdf = written(whole)
    tell("write", count, count)
    return pdf, count, pages


def _front(press: Press, book: BookletView, tell: Progress) -> Document:
    return press.laid_out(_html("front.html", book), 1, lambda page: tell("front", page, 0))


def _html(template: str, book: BookletView) -> str:
    """A part's pages as HTML, every character checked against the type."""
    html = environment().get_template(template).render(book=book)
    fonts.refuse_uncovered([_without_pictures(html)])
    return html


def _without_pictures(html: str) -> str:
    """The words of a page; drawings are addresses that hold plain letters only."""
    return re.sub(r'src="data:[^"]*"', "", html)


def environment() -> Environment:
    """The templates: no name may be missing, all text is escaped."""
    return Environment(
        loader=FileSystemLoader(HERE / "templates"),
        undefined=StrictUndefined,
        autoescape=select_autoescape(default=True),
        trim_blocks=True,
        lstrip_blocks=True,
    )
