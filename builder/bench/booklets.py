"""Booklets: pages in a second, cold and again, bare WeasyPrint beside; pages onto sheets."""

from __future__ import annotations

import subprocess
import sys
import time
from functools import partial

from builder.bench.measure import Goal, Measure, Reference, Setting, Taken, seconds
from builder.booklet import write_booklet
from builder.booklet.bare import heard_html, set_bare

FEW_ZONES = 2


def _zones(setting: Setting) -> list[str] | None:
    """All zones, or few of them when quick."""
    return list(setting.region.zone_ids[:FEW_ZONES]) if setting.quick else None


def cold(setting: Setting) -> Taken:
    """beltbook booklet as a command of its own: start, check, compile, set, write."""
    out = setting.folder / "cold.pdf"
    zones = _zones(setting)
    command = [sys.executable, "-m", "builder", "booklet", str(setting.demo), "--out", str(out)]
    command += ["--zones", *zones] if zones else []
    rates = []
    for _ in range(setting.runs(2)):
        start = time.perf_counter()
        ran = subprocess.run(command, capture_output=True, text=True, check=True)
        pages = int(ran.stdout.rsplit(" pages", 1)[0].rsplit(" ", 1)[1])
        rates.append(pages / (time.perf_counter() - start))
    return Taken(tuple(rates), None, f"{pages} pages, the whole command.")


def again(setting: Setting) -> Taken:
    """The booklet made a second time in one process; the same HTML by WeasyPrint alone."""
    out = setting.folder / "again.pdf"
    zones = _zones(setting)
    with heard_html() as heard:
        first = write_booklet(setting.region, out, zones=zones)
    before = out.read_bytes()
    work = partial(write_booklet, setting.region, out, zones=zones)
    rates = tuple(first.pages / taken for taken in seconds(work, setting.runs(2)))
    same = "the same bytes" if out.read_bytes() == before else "OTHER BYTES than the first time"
    bare = []
    for _ in range(1 if setting.quick else 2):
        start = time.perf_counter()
        pages = set_bare(heard)
        bare.append(pages / (time.perf_counter() - start))
    note = f"{first.pages} pages, {same}."
    return Taken(rates, Reference("bare WeasyPrint, pages/s", tuple(bare)), note)


def imposition(setting: Setting) -> Taken:
    """Pages laid on A4 sheets: time between setting the pages and writing the sheets."""
    out = setting.folder / "sheets.pdf"
    taken = []
    pages = 0
    for _ in range(setting.runs(2)):
        begun = [0.0, 0]

        def tell(stage: str, done: int, of: int, begun: list[float] = begun) -> None:
            if stage == "write" and done == of:
                begun[0], begun[1] = time.perf_counter(), of

        write_booklet(
            setting.region, out, "a4-sheets", list(setting.region.zone_ids[:FEW_ZONES]), "en", tell
        )
        pages = int(begun[1])
        taken.append(1000 * (time.perf_counter() - begun[0]) / pages)
    return Taken(tuple(taken), None, f"{pages} pages, marks drawn and file written included.")


MEASURES = (
    Measure("booklet-cold", "Booklet from a cold start", "pages/s", cold, Goal(8, least=True)),
    Measure("booklet-again", "Booklet made again", "pages/s", again, Goal(12, least=True),
            ratio=Goal(0.9, least=True)),
    Measure("booklet-sheets", "Pages onto sheets", "ms/page", imposition, Goal(1)),
)  # fmt: skip
