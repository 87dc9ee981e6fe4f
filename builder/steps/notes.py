"""What is remembered of builds: beside the output folder, never in what is handed out."""

from __future__ import annotations

import fcntl
import hashlib
import json
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import asdict, dataclass
from functools import cache
from pathlib import Path
from typing import Any

from builder.steps.refusals import ToldByStep

TABLE_ENDINGS = {".yaml", ".csv"}
NOTES = ".beltbook"
KEYDATA = "keydata"
BOOKLET = "booklet.pdf"
PROGRAM = Path(__file__).resolve().parent.parent


@dataclass(frozen=True)
class BuildNote:
    """What is remembered of a region's last build, beside the output.

    tables   hash of the tables it was made from; program: of the program that made it
    booklet  hash of all a booklet is made from, and of the PDF itself
    at       local time, to the minute
    """

    edition: str
    tables: str
    program: str
    pack_hash: str
    booklet: tuple[str, str]
    booklet_pages: int
    at: str


def file_hash(path: Path) -> str:
    """SHA-256 of a file's content."""
    return hashlib.sha256(path.read_bytes()).hexdigest()


@cache
def program_hash() -> str:
    """SHA-256 over the program's own sources: a changed program makes every booklet again."""
    digest = hashlib.sha256()
    for path in sorted(PROGRAM.rglob("*")):
        if path.suffix in {".py", ".html", ".css", ".yaml", ".woff2"} and path.is_file():
            if "desk" not in path.parts:
                digest.update(path.relative_to(PROGRAM).as_posix().encode() + path.read_bytes())
    return digest.hexdigest()


def tables_hash(folder: Path) -> str:
    """SHA-256 over every table of a region, names included."""
    digest = hashlib.sha256()
    for path in sorted(folder.rglob("*")):
        if path.suffix in TABLE_ENDINGS and path.is_file():
            content = path.read_bytes()
            name = path.relative_to(folder).as_posix()
            digest.update(f"{name}\0{len(content)}\0".encode() + content)
    return digest.hexdigest()


def notes_folder(out: Path) -> Path:
    """Where notes about an output folder are kept: beside it, never in what is handed out."""
    return out.resolve().parent / NOTES


def last_build(out: Path, region_id: str) -> BuildNote | None:
    """The note of a region's last build into a folder; None without one or when it is spoilt."""
    try:
        read = json.loads(_notes_file(out).read_text(encoding="utf-8"))[region_id]
        return BuildNote(**read | {"booklet": tuple(read["booklet"])})
    except (OSError, ValueError, KeyError, TypeError):
        return None


def is_current(folder: Path, out: Path) -> bool:
    """Whether a region's app and booklet in `out` are made from these tables by this program."""
    note = last_build(out, folder.name)
    booklet = out / "regions" / folder.name / BOOKLET
    return (
        note is not None
        and (note.tables, note.program) == (tables_hash(folder), program_hash())
        and (out / "index.html").is_file()
        and booklet.is_file()
        and note.booklet[1] == file_hash(booklet)
    )


def regions_in(keydata: Path) -> list[Path]:
    """Every region's folder under keydata, by name."""
    return sorted(path.parent for path in keydata.glob("*/region.yaml"))


def _notes_file(out: Path) -> Path:
    return notes_folder(out) / f"builds-{out.name}.json"


def remember(out: Path, notes: dict[str, BuildNote]) -> None:
    path = _notes_file(out)
    fresh = path.with_suffix(".new")
    fresh.write_text(json.dumps({name: asdict(note) for name, note in notes.items()}, indent=1))
    fresh.replace(path)


class BuilderBusy(ToldByStep):
    """Another build writes into the same folder."""


@contextmanager
def only_builder(out: Path) -> Iterator[None]:
    """Holds the output folder for one build. Raises BuilderBusy when another has it."""
    notes_folder(out).mkdir(parents=True, exist_ok=True)
    with (notes_folder(out) / f"builds-{out.name}.lock").open("w") as lock:
        try:
            fcntl.flock(lock, fcntl.LOCK_EX | fcntl.LOCK_NB)
        except BlockingIOError:
            raise BuilderBusy(f"another build is writing into {out}") from None
        yield


def proof_notes(folder: Path) -> Path:
    """Where whole proofs of a region are kept: beside keydata, or beside a folder elsewhere."""
    above = folder.resolve().parent
    home = above.parent if above.name == KEYDATA else above
    return home / NOTES / "proofs" / folder.name


def kept_proofs(folder: Path) -> list[dict[str, Any]]:
    """Whole proofs of a region, oldest first; one that is spoilt is passed over."""
    found = []
    for path in sorted(proof_notes(folder).glob("[0-9]*.json")):
        try:
            found.append(json.loads(path.read_text(encoding="utf-8")))
        except (OSError, ValueError):
            continue
    return found
