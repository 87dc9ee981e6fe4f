"""Booklets: pages in a second, cold and again, bare WeasyPrint beside; pages onto sheets."""

from __future__ import annotations

import subprocess
import sys
import time
from functools import partial
from pathlib import Path
from typing import Any
from unittest.mock import patch

from builder.bench.measure import Goal, Measure, Reference, Setting, Taken, seconds
from builder.booklet import make, write_booklet
from builder.booklet.bare import heard_html, set_bare
from builder.booklet.impose import imposed
from builder.steps.checking import check_region, region_of
from builder.tables.start import start_region


def _folder(setting: Setting) -> Path:
    """The demo region; a region of three zones when quick."""
    if not setting.quick:
        return setting.demo
    folder = setting.folder / "keydata" / "three_zones"
    return folder if folder.is_dir() else start_region(folder, "Three zones")


def cold(setting: Setting) -> Taken:
    """beltbook booklet as a command of its own: start, check, compile, set, write."""
    folder, out = _folder(setting), setting.folder / "cold.pdf"
    command = [sys.executable, "-m", "builder", "booklet", str(folder), "--out", str(out)]
    rates = []
    pages = 0
    for _ in range(setting.runs(2)):
        start = time.perf_counter()
        ran = subprocess.run(command, capture_output=True, text=True, check=True)
        pages = int(ran.stdout.rsplit(" pages", 1)[0].rsplit(" ", 1)[1])
        rates.append(pages / (time.perf_counter() - start))
    return Taken(tuple(rates), None, f"{pages} pages, the whole command.")


def again(setting: Setting) -> Taken:
    """The booklet made a second time in one process; the same HTML by WeasyPrint alone."""
    region, out = region_of(check_region(_folder(setting))), setting.folder / "again.pdf"
    with heard_html() as heard:
        first = write_booklet(region, out)
    before = out.read_bytes()
    work = partial(write_booklet, region, out)
    rates = tuple(first.pages / taken for taken in seconds(work, setting.runs(2)))
    same = "the same bytes" if out.read_bytes() == before else "OTHER BYTES than the first time"
    start = time.perf_counter()
    pages = set_bare(heard)
    bare = pages / (time.perf_counter() - start)
    note = f"{first.pages} pages, {same}."
    return Taken(rates, Reference("bare WeasyPrint, pages/s", (bare,)), note)


def imposition(setting: Setting) -> Taken:
    """Pages laid on A4 sheets and written, once they are set."""
    region, out = region_of(check_region(_folder(setting))), setting.folder / "sheets.pdf"
    taken = []

    def timed(*given: Any) -> bytes:
        start = time.perf_counter()
        done = imposed(*given)
        taken.append(1000 * (time.perf_counter() - start))
        return done

    pages = [0]

    def tell(stage: str, done: int, of: int) -> None:
        if stage == "write":
            pages[0] = of

    with patch.object(make, "imposed", timed):
        write_booklet(region, out, "a4-sheets", progress=tell)
    each = tuple(one / pages[0] for one in taken)
    return Taken(each, None, f"{pages[0]} pages onto A4, file written; one run.")


MEASURES = (
    Measure("booklet-cold", "Booklet from a cold start", "pages/s", cold, Goal(8, least=True)),
    Measure("booklet-again", "Booklet made again", "pages/s", again, Goal(12, least=True),
            ratio=Goal(0.9, least=True)),
    Measure("booklet-sheets", "Pages onto sheets", "ms/page", imposition, Goal(1)),
)  # fmt: skip
