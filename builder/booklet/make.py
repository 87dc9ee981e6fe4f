"""Tables in, PDF out."""

import os
import re
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from pathlib import Path

from jinja2 import Environment, FileSystemLoader, StrictUndefined, select_autoescape
from markupsafe import Markup
from weasyprint import Document

from builder.booklet import fonts, style
from builder.booklet.contents import WORDS, BookletView, booklet_view, with_pages
from builder.booklet.formats import FORMATS, Format
from builder.booklet.impose import imposed, marks_drawing
from builder.booklet.render import Press, bound, no_sweeping, pages_of, written
from builder.drawings.ink import picture
from builder.tables import Region
from builder.views.look import Look, look
from builder.views.phrases import phrases

HERE = Path(__file__).parent
MOST_LAYOUTS = 6
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
    form = FORMATS[format]
    with no_sweeping():
        pdf, count, anchors = _reading_order(
            seen, form.trim, mark or "", chosen, tuple(cautions), tell
        )
        if form.paper is not None:
            pdf, count = _on_sheets(seen, form, pdf, count, anchors, tell)
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

    The front matter is set to learn how long it is, then the body, once; then the front again
    with the page numbers in figures, and those are verified.
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
    pages: dict[str, int] = {}
    filler, begun, body = False, 0, None
    for _ in range(MOST_LAYOUTS):
        front = _front(press, with_pages(book, seen, pages, filler), tell)
        if len(front.pages) % 2 == 0:
            filler = not filler
            continue
        first = len(front.pages) + 1
        if body is None or first != begun:
            begun = first
            body = press.laid_out(body_html, begun, _after(begun, tell))
        found = pages_of(front) | pages_of(body, begun)
        if found == pages:
            break
        pages = found
    else:
        raise BookletError("the pages do not settle; a page is set differently each time")
    whole = bound([front, body])
    count = len(whole.pages)
    tell("write", 0, count)
    pdf = written(whole)
    tell("write", count, count)
    return pdf, count, pages


def _after(first: int, tell: Progress) -> Callable[[int], None]:
    """Tells page numbers of a part that begins at a page."""
    return lambda page: tell("layout", page + first - 1, 0)


def _on_sheets(
    seen: Look, form: Format, pdf: bytes, count: int, anchors: dict[str, int], tell: Progress
) -> tuple[bytes, int]:
    """Pages laid on sheets, and how many sides were printed."""
    assert form.paper is not None
    assert form.ordering is not None
    own = phrases(seen.phrases.language, WORDS)
    title = own.say("title", region=seen.region.name)
    sheets = form.ordering(count, anchors)
    html = (
        environment()
        .get_template("overlay.html")
        .render(
            language=seen.phrases.language,
            title=title,
            marks=Markup(picture(marks_drawing(form.paper, form.marks))),
            notes=[own.say(f"sheets.{form.note}_{side}") for side in ("front", "back")],
        )
    )
    press = Press([fonts.faces(), style.overlay_rules(form.paper.width, form.paper.height)])
    over = written(press.laid_out(html, 1, lambda page: None))
    done = imposed(
        pdf, sheets, form.trim, form.paper, over, title, seen.phrases.language,
        lambda side, of: tell("sheets", side, of),
    )  # fmt: skip
    return done, sum(2 if sheet.back is not None else 1 for sheet in sheets)


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
