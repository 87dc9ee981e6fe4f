"""The pocket booklet: the same tables on paper."""

from builder.booklet.make import FORMATS, BookletError, write_booklet

__all__ = ["FORMATS", "BookletError", "write_booklet"]
