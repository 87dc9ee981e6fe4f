"""Long work beside the pages: one command line at a time, with progress and stop.

A job is the same `beltbook` command a person would type, in a process of its own, so that stopping
it can leave nothing of the desk half done; the commands put finished output in place at one stroke.
"""

from __future__ import annotations

import atexit
import os
import re
import signal
import subprocess
import sys
import threading
import time
from collections import deque
from dataclasses import dataclass, field
from pathlib import Path

STEP = re.compile(r"\[(\d+)/(\d+)\] (.*)")
COMMAND = ["-m", "builder"]
LINES_KEPT = 400
PATIENCE_S = 5.0


class Busy(Exception):  # noqa: N818 - told to the person
    """Another job is running."""


@dataclass
class Job:
    """One command at work. state: running, done, failed or stopped."""

    number: int
    kind: str
    region: str
    process: subprocess.Popen[str]
    started: float
    state: str = "running"
    done: int = 0
    of: int = 0
    step: str = ""
    lines: deque[str] = field(default_factory=lambda: deque(maxlen=LINES_KEPT))
    ended: float | None = None
    code: int | None = None
    finished: threading.Event = field(default_factory=threading.Event)

    @property
    def seconds(self) -> float:
        """How long it has run, or ran. [s]"""
        return (self.ended or time.monotonic()) - self.started

    def read(self) -> None:
        """Follows the command's lines until it ends."""
        assert self.process.stdout is not None
        for line in self.process.stdout:
            line = line.rstrip("\n")
            if found := STEP.fullmatch(line):
                self.done, self.of, self.step = int(found[1]), int(found[2]), found[3]
            else:
                self.lines.append(line)
        self.process.stdout.close()
        self.code = self.process.wait()
        self.ended = time.monotonic()
        if self.state == "running":
            self.state = "done" if self.code == 0 else "failed"
            if self.code == 0:
                self.done = self.of
        self.finished.set()

    def stop(self) -> None:
        """Ends the command and all it started."""
        if self.process.poll() is not None:
            return
        self.state = "stopped"
        os.killpg(self.process.pid, signal.SIGTERM)
        try:
            self.process.wait(PATIENCE_S)
        except subprocess.TimeoutExpired:
            os.killpg(self.process.pid, signal.SIGKILL)


class Jobs:
    """The desk's jobs: at most one running, the last ones remembered."""

    def __init__(self, home: Path) -> None:
        self.home = home
        self.kept: dict[int, Job] = {}
        self.lock = threading.Lock()
        self.count = 0
        atexit.register(self.stop_all)

    def running(self) -> Job | None:
        """The job at work, if any."""
        return next((job for job in self.kept.values() if job.state == "running"), None)

    def start(self, kind: str, region: str, arguments: list[str]) -> Job:
        """Starts `beltbook ARGUMENTS`. Raises Busy while another job runs."""
        with self.lock:
            if self.running() is not None:
                raise Busy
            process = subprocess.Popen(
                [sys.executable, "-u", *COMMAND, *arguments],
                cwd=self.home,
                stdin=subprocess.DEVNULL,
                stdout=subprocess.PIPE,
                stderr=subprocess.STDOUT,
                text=True,
                encoding="utf-8",
                errors="replace",
                start_new_session=True,
            )
            self.count += 1
            job = Job(self.count, kind, region, process, time.monotonic())
            self.kept[job.number] = job
            for old in sorted(self.kept)[:-20]:
                del self.kept[old]
        threading.Thread(target=job.read, daemon=True).start()
        return job

    def last(self, kind: str, region: str) -> Job | None:
        """The newest job of a kind for a region."""
        fitting = [job for job in self.kept.values() if (job.kind, job.region) == (kind, region)]
        return fitting[-1] if fitting else None

    def stop_all(self) -> None:
        """Ends what still runs, as the desk closes."""
        for job in list(self.kept.values()):
            job.stop()
