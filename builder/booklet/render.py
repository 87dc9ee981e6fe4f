"""Pages to PDF: every message of the renderer is an error, and the same pages give the same bytes."""

import logging
from collections.abc import Callable, Iterator
from contextlib import contextmanager

from weasyprint import CSS, HTML, Document
from weasyprint.text.fonts import FontConfiguration

LOGGERS = ("weasyprint", "fontTools", "pydyf")
Progress = Callable[[str, int, int], None]


class RendererComplained(RuntimeError):
    """The renderer had something to say about our own pages."""


class _Collector(logging.Handler):
    def __init__(self) -> None:
        super().__init__(logging.WARNING)
        self.messages: list[str] = []

    def emit(self, record: logging.LogRecord) -> None:
        self.messages.append(record.getMessage())


@contextmanager
def no_complaints() -> Iterator[None]:
    """Raise RendererComplained at the end when any warning was logged inside."""
    collector = _Collector()
    loggers = [logging.getLogger(name) for name in LOGGERS]
    for logger in loggers:
        logger.addHandler(collector)
    try:
        yield
    finally:
        for logger in loggers:
            logger.removeHandler(collector)
    if collector.messages:
        raise RendererComplained("; ".join(dict.fromkeys(collector.messages)))


def laid_out(html: str, styles: list[str]) -> Document:
    """The pages, set but not yet written."""
    fonts = FontConfiguration()
    with no_complaints():
        sheets = [CSS(string=style, font_config=fonts) for style in styles]
        return HTML(string=html, base_url="/nowhere/").render(
            stylesheets=sheets, font_config=fonts, pdf_variant="pdf/ua-1"
        )


def written(document: Document) -> bytes:
    """The finished PDF."""
    with no_complaints():
        pdf = document.write_pdf(pdf_variant="pdf/ua-1", pdf_identifier=b"beltbook")
    return bytes(pdf)


def pages_of(document: Document) -> dict[str, int]:
    """Page number of each anchor."""
    found: dict[str, int] = {}
    for number, page in enumerate(document.pages, start=1):
        for anchor in page.anchors:
            found.setdefault(anchor, number)
    return found
