"""The same pages set by the renderer alone, to hold the booklet's own speed against."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass, field
from unittest.mock import patch

from weasyprint import CSS, HTML, Document
from weasyprint.text.fonts import FontConfiguration

from builder.booklet import make
from builder.booklet.render import Press


@dataclass
class Heard:
    """What a booklet gave the renderer: style sheets, and each part's HTML as set last."""

    styles: list[str] = field(default_factory=list)
    parts: dict[bool, str] = field(default_factory=dict)


@contextmanager
def heard_html() -> Iterator[Heard]:
    """Hears the HTML and styles of the booklet that is made inside."""
    heard = Heard()

    class HearingPress(Press):
        def __init__(self, styles: list[str]) -> None:
            super().__init__(styles)
            heard.styles = heard.styles or styles

        def laid_out(self, html: str, first_page: int, tell: Callable[[int], None]) -> Document:
            heard.parts[first_page > 1] = html
            return super().laid_out(html, first_page, tell)

    with patch.object(make, "Press", HearingPress):
        yield heard


def set_bare(heard: Heard) -> int:
    """Sets and writes each part once, with the renderer's defaults. Returns the pages."""
    pages = 0
    for html in heard.parts.values():
        fonts = FontConfiguration()
        sheets = [CSS(string=style, font_config=fonts) for style in heard.styles]
        document = HTML(string=html, base_url="/nowhere/").render(
            stylesheets=sheets, font_config=fonts, pdf_variant="pdf/ua-1"
        )
        document.write_pdf(pdf_variant="pdf/ua-1")
        pages += len(document.pages)
    return pages
