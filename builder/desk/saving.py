"""Puts a changed table on the disk: at one stroke, with a way back, over nobody's change."""

from __future__ import annotations

import fcntl
import hashlib
import json
import os
import time
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import asdict, dataclass
from pathlib import Path

from flask import current_app

from builder.desk.shelf import shelf

STEPS_KEPT = 200


@dataclass(frozen=True)
class Step:
    """One save that can be taken back: which file, what stood in it, what was written."""

    number: int
    file: str
    before: str
    after: str
    at: float
    words: str


@dataclass(frozen=True)
class Undone:
    """What an undo did; done is False when the file has changed since."""

    step: Step | None
    done: bool


def text_hash(text: str) -> str:
    """SHA-256 of a table's text."""
    return hashlib.sha256(text.encode()).hexdigest()


def read_whole(path: Path) -> str:
    """A table's text with the line ends it has; empty when there is no file."""
    if not path.exists():
        return ""
    with path.open(encoding="utf-8", newline="") as file:
        return file.read()


def write_whole(path: Path, text: str) -> None:
    """Replaces a file's text at one stroke: killed at any moment, the old or the new stands."""
    fresh = path.with_name(f".{path.name}.new")
    with fresh.open("w", encoding="utf-8", newline="") as file:
        file.write(text)
        file.flush()
        os.fsync(file.fileno())
    if path.exists():
        os.chmod(fresh, path.stat().st_mode & 0o777)
    fresh.replace(path)


class Saver:
    """Saves and takes back changes of one region's tables.

    state  private folder of the desk; what stood in a file before goes there
    """

    def __init__(self, folder: Path, state: Path) -> None:
        self.folder = folder
        self.kept = state / "undo" / folder.name

    @contextmanager
    def alone(self) -> Iterator[None]:
        """Holds every other save of this region back, also that of another desk."""
        self.kept.mkdir(parents=True, exist_ok=True)
        with (self.kept / "lock").open("w") as lock:
            fcntl.flock(lock, fcntl.LOCK_EX)
            yield

    def save(self, file: str, words: str, change: Callable[[str], str]) -> bool:
        """Changes one table's text; False when the change leaves it as it was.

        file    name of the table's file in the region's folder
        words   what was done, for the undo button
        change  text → new text; what it raises stops the save
        """
        path = self.folder / file
        with self.alone():
            before = read_whole(path)
            after = change(before.replace("\r\n", "\n"))
            if "\r\n" in before:
                after = after.replace("\n", "\r\n")
            if after == before:
                return False
            self._remember(file, before, after, words)
            write_whole(path, after)
            return True

    def _remember(self, file: str, before: str, after: str, words: str) -> None:
        numbers = self._numbers()
        number = numbers[-1] + 1 if numbers else 1
        step = Step(number, file, before, text_hash(after), time.time(), words)
        write_whole(self.kept / f"{number:06}.json", json.dumps(asdict(step)))
        for old in numbers[: -STEPS_KEPT + 1]:
            (self.kept / f"{old:06}.json").unlink(missing_ok=True)

    def _numbers(self) -> list[int]:
        return sorted(int(path.stem) for path in self.kept.glob("[0-9]*.json"))

    def last(self) -> Step | None:
        """The save that an undo would take back."""
        numbers = self._numbers() if self.kept.is_dir() else []
        if not numbers:
            return None
        read = json.loads((self.kept / f"{numbers[-1]:06}.json").read_text(encoding="utf-8"))
        return Step(**read)

    def undo(self) -> Undone:
        """Takes the last save back, unless the file has changed since."""
        with self.alone():
            step = self.last()
            if step is None:
                return Undone(None, False)
            path = self.folder / step.file
            now = read_whole(path)
            if text_hash(now) not in (step.after, text_hash(step.before)):
                return Undone(step, False)
            write_whole(path, step.before)
            (self.kept / f"{step.number:06}.json").unlink()
            return Undone(step, True)


def saver(region_id: str) -> Saver:
    """What saves and takes back for a region of the running desk."""
    return Saver(shelf().folder(region_id), current_app.config["STATE"])
