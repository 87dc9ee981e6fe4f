"""The regions in keydata/ as they stand on disk, read once and kept until a file changes."""

from __future__ import annotations

import hashlib
import re
import threading
from dataclasses import dataclass
from pathlib import Path

from flask import abort, current_app

from builder.problems import Problem, cautions, errors
from builder.rows import Items, Row
from builder.steps.checking import check_region
from builder.tables import Loaded, Region

NAME = re.compile(r"[a-z][a-z0-9_]{0,63}")
TABLE_ENDINGS = {".yaml", ".csv"}


@dataclass(frozen=True)
class Look:
    """One region's tables at one moment.

    region  what could be read, with empty tables for the rest; None when not even the zones were
    stops   whether a build must not go on
    """

    id: str
    folder: Path
    region: Region | None
    problems: list[Problem]
    fingerprint: str
    stops: bool
    rows: int = 0
    tables: int = 0

    @property
    def errors(self) -> list[Problem]:
        """Problems that stop a build."""
        return errors(self.problems)

    @property
    def cautions(self) -> list[Problem]:
        """Problems that are listed and stop nothing."""
        return cautions(self.problems)


class Shelf:
    """Every region folder under keydata/."""

    def __init__(self, keydata: Path) -> None:
        self.keydata = keydata
        self.looks: dict[str, Look] = {}
        self.lock = threading.Lock()

    def ids(self) -> list[str]:
        """Region folders by name: those that hold a region.yaml."""
        if not self.keydata.is_dir():
            return []
        return sorted(
            folder.name
            for folder in self.keydata.iterdir()
            if NAME.fullmatch(folder.name) and (folder / "region.yaml").is_file()
        )

    def folder(self, region_id: str) -> Path:
        """The folder of a known region; 404 for any other name."""
        if not NAME.fullmatch(region_id) or region_id not in self.ids():
            abort(404)
        return self.keydata / region_id

    def look(self, region_id: str) -> Look:
        """The region as it stands now."""
        folder = self.folder(region_id)
        print_now = fingerprint(folder)
        with self.lock:
            kept = self.looks.get(region_id)
            if kept is None or kept.fingerprint != print_now:
                checked = check_region(folder)
                loaded = checked.loaded
                kept = Look(
                    id=region_id,
                    folder=folder,
                    region=loaded.region or shown_region(loaded),
                    problems=checked.problems,
                    fingerprint=print_now,
                    stops=checked.stops,
                    rows=row_count(loaded),
                    tables=sum(root is not None for root in loaded.roots.values())
                    + (loaded.climate_sheet is not None),
                )
                self.looks[region_id] = kept
            return kept


def shown_region(loaded: Loaded) -> Region | None:
    """As much of a spoilt region as pages can show."""
    partial = loaded.partial
    return partial if partial is not None and partial.zones and partial.head is not None else None


def row_count(loaded: Loaded) -> int:
    """How many rows the tables hold: what stands one level below each table's own fields."""
    rows = 0 if loaded.climate_sheet is None else len(loaded.climate_sheet.rows)
    for root in loaded.roots.values():
        for node in root.nodes.values() if root is not None else ():
            rows += len(node.nodes) if isinstance(node, Row | Items) else 1
    return rows


def fingerprint(folder: Path) -> str:
    """Changes when any table's name, size or time does."""
    parts = []
    for path in sorted(folder.rglob("*")):
        if path.suffix in TABLE_ENDINGS and path.is_file():
            stat = path.stat()
            parts.append(f"{path.relative_to(folder)} {stat.st_size} {stat.st_mtime_ns}")
    return hashlib.sha256("\n".join(parts).encode()).hexdigest()


def shelf() -> Shelf:
    """The running desk's shelf."""
    found: Shelf = current_app.extensions["shelf"]
    return found
