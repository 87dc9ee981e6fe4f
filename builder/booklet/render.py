"""Pages to PDF: each message of the renderer is an error, same pages give the same bytes."""

import gc
import logging
from collections.abc import Callable, Iterator
from contextlib import contextmanager

from weasyprint import CSS, HTML, Document
from weasyprint.text.fonts import FontConfiguration

LOGGERS = ("weasyprint", "fontTools", "pydyf")
Progress = Callable[[str, int, int], None]


class RendererError(RuntimeError):
    """The renderer had something to say about our own pages."""


class _Collector(logging.Handler):
    def __init__(self) -> None:
        super().__init__(logging.WARNING)
        self.messages: list[str] = []

    def emit(self, record: logging.LogRecord) -> None:
        self.messages.append(record.getMessage())


@contextmanager
def no_complaints() -> Iterator[None]:
    """Raise RendererError at the end when any warning was logged inside."""
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
        raise RendererError("; ".join(dict.fromkeys(collector.messages)))


@contextmanager
def no_sweeping() -> Iterator[None]:
    """Leave dead objects lie while pages are set.

    The pages live to the end anyway, and looking them over again and again took a quarter
    of the time (27.0 to 20.9 s for 130 pages).
    """
    was_on = gc.isenabled()
    gc.disable()
    try:
        yield
    finally:
        if was_on:
            gc.enable()


class _PageTicker(logging.Handler):
    """Hears which page the renderer sets, and tells it on."""

    def __init__(self, tell: Callable[[int], None]) -> None:
        super().__init__(logging.INFO)
        self._tell = tell

    def emit(self, record: logging.LogRecord) -> None:
        if isinstance(record.args, tuple) and "Creating layout" in str(record.msg):
            self._tell(int(str(record.args[0])))


@contextmanager
def telling_pages(tell: Callable[[int], None]) -> Iterator[None]:
    """Call tell with the number of each page as it is set."""
    logger = logging.getLogger("weasyprint.progress")
    ticker, level, passed_on = _PageTicker(tell), logger.level, logger.propagate
    logger.addHandler(ticker)
    logger.setLevel(logging.INFO)
    logger.propagate = False
    try:
        yield
    finally:
        logger.removeHandler(ticker)
        logger.setLevel(level)
        logger.propagate = passed_on


class Press:
    """One booklet's renderer: parts set apart share their type, then are bound as one."""

    def __init__(self, styles: list[str]) -> None:
        """Read the style sheets once; they hold for every part."""
        self._fonts = FontConfiguration()
        with no_complaints():
            self._sheets = [CSS(string=style, font_config=self._fonts) for style in styles]

    def laid_out(self, html: str, first_page: int, tell: Callable[[int], None]) -> Document:
        """The pages of one part, set but not yet written.

        first_page  number of its first page; odd ones are right-hand pages
        """
        side = "right" if first_page % 2 else "left"
        start = CSS(
            string=f"html {{ break-before: {side} }}"
            f" @page :first {{ counter-reset: page {first_page} }}"
            if first_page > 1
            else "",
            font_config=self._fonts,
        )
        with no_complaints(), telling_pages(tell):
            return HTML(string=html, base_url="/nowhere/").render(
                stylesheets=[*self._sheets, start],
                font_config=self._fonts,
                pdf_variant="pdf/ua-1",
            )


def bound(parts: list[Document]) -> Document:
    """Parts as one document, in order; the first gives the title and language."""
    return parts[0].copy([page for part in parts for page in part.pages])


def written(document: Document) -> bytes:
    """The finished PDF."""
    with no_complaints():
        pdf = document.write_pdf(pdf_variant="pdf/ua-1", pdf_identifier=b"beltbook")
    return bytes(pdf)


def pages_of(document: Document, first_page: int = 1) -> dict[str, int]:
    """Page number of each anchor."""
    found: dict[str, int] = {}
    for number, page in enumerate(document.pages, start=first_page):
        for anchor in page.anchors:
            found.setdefault(anchor, number)
    return found
