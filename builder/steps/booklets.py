"""One booklet on its own, in any of its forms."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from pathlib import Path

from builder.booklet import BookletError, write_booklet
from builder.pack import pack_bytes, pack_hash
from builder.problems import cautions
from builder.steps.checking import check_regions, region_of
from builder.steps.refusals import ToldByStep
from builder.views.phrases import languages

Tell = Callable[[str, int, int], None]


@dataclass(frozen=True)
class Printed:
    """The file that was written, and its pages or printed sides."""

    path: Path
    pages: int


def make_booklet(
    folder: Path,
    out: Path,
    *,
    form: str = "a6",
    zones: Sequence[str] | None = None,
    language: str = "en",
    tell: Tell | None = None,
) -> Printed:
    """Tables → booklet. Raises Stopped for tables with errors, ToldByStep for what cannot be made.

    form   one of builder.booklet.FORMATS
    zones  ids or letters of the zones to print; None for all
    """
    (checked,) = check_regions([folder])
    region = region_of(checked)
    if language not in languages():
        known = ", ".join(languages())
        raise ToldByStep(f'the booklet has no words for "{language}"; known: {known}')
    mark = pack_hash(pack_bytes(region, checked.fitted, checked.proof))
    noted = [problem.wrong for problem in cautions(checked.problems)]
    try:
        made = write_booklet(region, out, form, zones or None, language, tell, mark, noted)
    except BookletError as refusal:
        raise ToldByStep(str(refusal)) from None
    return Printed(made.path, made.pages)
