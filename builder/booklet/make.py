"""Tables in, PDF out."""

import os
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from pathlib import Path

from jinja2 import Environment, FileSystemLoader, StrictUndefined, select_autoescape

from builder.booklet import fonts, style
from builder.booklet.contents import booklet_view
from builder.booklet.render import laid_out, pages_of, written
from builder.tables import Region
from builder.views.look import Look, look

HERE = Path(__file__).parent
FORMATS = {"a6": style.A6, "pocket-us": style.POCKET_US}
MOST_LAYOUTS = 3
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
    """The booklet in reading order; page numbers are those of the last layout, verified."""
    zone_ids = [zone.id for zone in seen.region.zones if chosen is None or zone.id in chosen]
    foot = seen.region.name
    styles = [
        fonts.faces(),
        style.page_rules(seen, trim, foot, zone_ids),
        (HERE / "booklet.css").read_text("utf-8"),
    ]
    pages: dict[str, int] = {}
    for turn in range(MOST_LAYOUTS):
        html = html_of(seen, trim, mark, pages, chosen, cautions)
        tell("layout", turn, MOST_LAYOUTS)
        document = laid_out(html, styles)
        found = pages_of(document)
        if found == pages:
            break
        pages = found
    else:
        raise BookletError("page numbers do not settle; a page is set differently each time")
    tell("write", 0, len(document.pages))
    pdf = written(document)
    tell("write", len(document.pages), len(document.pages))
    return pdf, len(document.pages), pages


def html_of(
    seen: Look,
    trim: style.Trim,
    mark: str,
    pages: dict[str, int],
    chosen: dict[str, None] | None,
    cautions: tuple[str, ...],
) -> str:
    """The pages as HTML, every character checked against the type."""
    book = booklet_view(seen, trim, mark, pages, chosen, cautions)
    html = environment().get_template("booklet.html").render(book=book)
    fonts.refuse_uncovered([html])
    return html


def environment() -> Environment:
    """The templates: no name may be missing, all text is escaped."""
    return Environment(
        loader=FileSystemLoader(HERE / "templates"),
        undefined=StrictUndefined,
        autoescape=select_autoescape(default=True),
        trim_blocks=True,
        lstrip_blocks=True,
    )
