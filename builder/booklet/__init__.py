"""The pocket booklet: the same tables on paper."""

from builder.booklet.formats import FORMATS
from builder.booklet.make import BookletError, write_booklet

__all__ = ["FORMATS", "BookletError", "write_booklet"]
