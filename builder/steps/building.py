"""The whole sentence for several regions: into one site, with a booklet each."""

from __future__ import annotations

import hashlib
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from datetime import datetime
from pathlib import Path

from builder.booklet import write_booklet
from builder.pack import pack_bytes, texts_bytes
from builder.problems import ERROR, cautions
from builder.site import SiteRegion, SiteReport, build_site
from builder.site.book import book_pages
from builder.steps.checking import Checked, check_regions, region_of
from builder.steps.notes import (
    BOOKLET,
    BuildNote,
    file_hash,
    last_build,
    only_builder,
    program_hash,
    remember,
    tables_hash,
)
from builder.steps.refusals import Stopped

ENGLISH = "en"
WHOLE = "complete"
"""The check that tells of tables a region fitted to plots does not have yet: it can be called and
proved, but pages would be empty."""
Progress = Callable[[int, int, str], None]


@dataclass(frozen=True)
class Built:
    """What a build wrote. notes: region id → note; fresh: booklets that were made again."""

    site: SiteReport
    notes: dict[str, BuildNote]
    fresh: list[str]


def build(folders: Sequence[Path], out: Path, progress: Progress, booklets: bool = True) -> Built:
    """Writes app and booklets. Raises Stopped before anything is made, BuilderBusy beside another.

    progress  called with steps done, steps in all, and what is being done
    booklets  False leaves the booklets as they are
    """
    if out.exists() and not out.is_dir():
        raise NotADirectoryError(f"{out} is a file; the site needs a folder")
    of = 2 + len(folders) * (2 if booklets else 1)
    progress(0, of, "checking tables")
    checked = check_regions(folders)
    unwritten = [problem for one in checked for problem in one.problems if problem.check == WHOLE]
    if unwritten:
        raise Stopped([replace(problem, severity=ERROR) for problem in unwritten])
    with only_builder(out):
        packed = []
        for done, one in enumerate(checked, start=1):
            progress(done, of, f"compiling {region_of(one).name}")
            packed.append(compile_region(one))
        progress(len(checked) + 1, of, "writing the site")
        report = build_site(packed, out)
        notes, fresh = {}, []
        for done, (one, made) in enumerate(zip(checked, packed, strict=True), len(checked) + 2):
            region = region_of(one)
            old = last_build(out, region.id)
            sheet = (old.booklet, old.booklet_pages) if old is not None else (("", ""), 0)
            if booklets:
                progress(done, of, f"setting the booklet of {region.name}")
                sheet, again = _booklet(one, made.hash, out, old)
                fresh += [region.id] * again
            notes[region.id] = BuildNote(
                edition=region.edition,
                tables=tables_hash(one.loaded.folder),
                program=program_hash(),
                pack_hash=made.hash,
                booklet=sheet[0],
                booklet_pages=sheet[1],
                at=datetime.now().astimezone().strftime("%Y-%m-%d %H:%M"),
            )
        remember(out, notes)
    progress(of, of, "done")
    return Built(report, notes, fresh)


def compile_region(checked: Checked) -> SiteRegion:
    """Tables → pack, texts and Book pages, in memory."""
    region = region_of(checked)
    languages = [name for name in region.head.languages if name in {ENGLISH, *region.words}]
    return SiteRegion(
        pack=pack_bytes(region, checked.fitted, checked.proof),
        texts={name: texts_bytes(region, name) for name in languages},
        book=book_pages(region),
    )


def _booklet(
    checked: Checked, mark: str, out: Path, old: BuildNote | None
) -> tuple[tuple[tuple[str, str], int], bool]:
    """A region's booklet, made again only when something it is made from has changed.

    Returns (hashes, pages) for the note, and whether it was made again.
    """
    region = region_of(checked)
    path = out / "regions" / region.id / BOOKLET
    inputs = f"{tables_hash(checked.loaded.folder)} {mark} {program_hash()}"
    wanted = hashlib.sha256(inputs.encode()).hexdigest()
    if old is not None and path.is_file() and old.booklet == (wanted, file_hash(path)):
        return (old.booklet, old.booklet_pages), False
    noted = [problem.wrong for problem in cautions(checked.problems)]
    made = write_booklet(region, path, mark=mark, cautions=noted)
    return ((wanted, file_hash(path)), made.pages), True
