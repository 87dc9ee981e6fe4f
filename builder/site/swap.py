"""Puts a whole new folder in the place of an old one; what did not change is not written again."""

from __future__ import annotations

import os
import shutil
from collections.abc import Callable, Mapping
from pathlib import Path


def put_in_place(out: Path, files: Mapping[str, bytes], keeps: Callable[[str], bool]) -> list[str]:
    """Make `out` hold exactly these files, and those of its old files that `keeps` names.

    out    the folder; its parent must be writable, since the new one is built beside it
    files  path → content
    keeps  says of an old file that is not in `files` whether it stays

    Returns the paths that were written or removed, sorted. With none, nothing is touched. Stopped
    at any moment, `out` is the whole old folder, or the whole new one, or (between two renames) is
    brought back by the next call.
    """
    beside, before = out.with_name(f".{out.name}.new"), out.with_name(f".{out.name}.old")
    if before.exists() and not out.exists():
        before.rename(out)
    shutil.rmtree(beside, ignore_errors=True)
    shutil.rmtree(before, ignore_errors=True)
    old = _paths_in(out)
    kept = {path for path in old if path not in files and keeps(path)}
    changed = {path for path, content in files.items() if not _holds(out / path, content)}
    gone = set(old) - kept - set(files)
    if not changed and not gone:
        return []
    for path in sorted(kept | set(files)):
        target = beside / path
        target.parent.mkdir(parents=True, exist_ok=True)
        if path in changed:
            target.write_bytes(files[path])
        else:
            _same_file(out / path, target)
    if out.exists():
        out.rename(before)
    try:
        beside.rename(out)
    except OSError:
        if before.exists():
            before.rename(out)
        raise
    shutil.rmtree(before, ignore_errors=True)
    return sorted(changed | gone)


def _paths_in(folder: Path) -> list[str]:
    return [path.relative_to(folder).as_posix() for path in folder.rglob("*") if path.is_file()]


def _holds(path: Path, content: bytes) -> bool:
    """True when the file already has this content."""
    try:
        return path.stat().st_size == len(content) and path.read_bytes() == content
    except OSError:
        return False


def _same_file(old: Path, new: Path) -> None:
    """The same file under the new folder: a link where the disk allows it, else a copy."""
    try:
        os.link(old, new)
    except OSError:
        shutil.copy2(old, new)
