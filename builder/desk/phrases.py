"""The desk's sentences, read once from words/en.yaml."""

from __future__ import annotations

from functools import cache
from pathlib import Path
from typing import Any

from builder.rows import read_shipped

FILE = Path(__file__).resolve().parent / "words" / "en.yaml"


@cache
def read_phrases() -> dict[str, Any]:
    """Sentences by page. Raises ValueError when the file is wrong: it ships with the program."""
    return read_shipped(FILE)


def counted(number: int, words: dict[str, str], **more: object) -> str:
    """ "1 problem" or "2 problems" from {one, many}."""
    return (words["one"] if number == 1 else words["many"]).format(n=f"{number:,}", **more)
