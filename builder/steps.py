"""The sentence as a few functions: rows → tables → problems? → pack → pages.

Each only calls; values are made in the parts. Nothing here prints.
"""

from __future__ import annotations

import hashlib
import json
from dataclasses import dataclass
from pathlib import Path

from builder.checks import checked_region
from builder.problems import Problem, errors
from builder.tables import Loaded, Region

TABLE_ENDINGS = {".yaml", ".csv"}
NOTES = ".beltbook"


@dataclass(frozen=True)
class Checked:
    """A region's tables and everything that is wrong with them."""

    loaded: Loaded

    @property
    def problems(self) -> list[Problem]:
        """Every problem, in order of place."""
        return self.loaded.problems

    @property
    def region(self) -> Region | None:
        """The region, when all its tables could be read."""
        return self.loaded.region

    @property
    def stops(self) -> bool:
        """Whether a build must not go on."""
        return self.region is None or bool(errors(self.problems))


@dataclass(frozen=True)
class BuildNote:
    """What is remembered of a region's last build, beside the output.

    tables  hash of the tables it was made from
    at      local time, to the minute
    """

    edition: str
    tables: str
    pack_hash: str
    booklet_pages: int
    at: str


def check_region(folder: Path) -> Checked:
    """Rows → tables → problems: reads a region and runs every check."""
    return Checked(checked_region(folder))


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
        read = json.loads((notes_folder(out) / "builds.json").read_text(encoding="utf-8"))
        return BuildNote(**read[region_id])
    except (OSError, ValueError, KeyError, TypeError):
        return None
