"""The sentences of this part, read once from words/en.yaml."""

from __future__ import annotations

from functools import cache
from pathlib import Path
from typing import Any

from builder.rows import read_shipped

FILE = Path(__file__).resolve().parent / "words" / "en.yaml"


@cache
def read_sentences() -> dict[str, Any]:
    """Sentences by use. Raises ValueError when the file is wrong: it ships with the program."""
    return read_shipped(FILE)


class FileRefused(Exception):  # noqa: N818 - told to the person
    """A file that is not taken in; the text says why.

    code  too_large, too_deep, not_ours or newer
    """

    def __init__(self, code: str) -> None:
        super().__init__(read_sentences()["file"][code])
        self.code = code
