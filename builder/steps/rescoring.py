"""Every pack at hand: the regions' tables as they stand, and the editions kept beside keydata."""

from __future__ import annotations

import json
from collections.abc import Iterable, Sequence
from pathlib import Path
from typing import Any

from builder.pack import pack_bytes, pack_hash
from builder.steps.checking import check_region

EDITIONS = "editions"


def edition_folders(folder: Path) -> list[Path]:
    """A region's tables, newest first: as they stand, then kept editions by time."""
    kept = folder.resolve().parent.parent / EDITIONS / folder.name
    found = [path for path in kept.glob("*") if (path / "region.yaml").is_file()]
    return [folder, *sorted(found, key=lambda path: path.stat().st_mtime_ns, reverse=True)]


def packs_at_hand(folders: Sequence[Path], wanted: Iterable[str]) -> dict[str, dict[str, Any]]:
    """pack_hash → pack, of those wanted that can be compiled anew, byte for byte.

    Tables with errors are passed over: they scored nothing.
    """
    missing, packs = set(wanted), dict[str, dict[str, Any]]()
    for folder in (one for region in folders for one in edition_folders(region)):
        if not missing:
            break
        checked = check_region(folder)
        if checked.region is None or checked.stops:
            continue
        content = pack_bytes(checked.region, checked.fitted, checked.proof)
        name = pack_hash(content)
        if name in missing:
            packs[name] = json.loads(content)
            missing.discard(name)
    return packs
