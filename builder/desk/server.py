"""Starts the desk's web server and says where it is."""

from __future__ import annotations

import errno
import signal
import sys
import threading
from collections.abc import Callable
from pathlib import Path

from flask import Flask
from waitress import create_server

from builder.desk.application import Settings, create_app
from builder.desk.jobs import Job

FIRST_PORT = 8790
PORTS_TRIED = 20
LOOPBACK = "127.0.0.1"


class CannotServe(Exception):  # noqa: N818 - told to the person
    """The desk cannot listen where it was asked to; the text says why and what to do."""


def listen(app: Flask, address: str, port: int | None) -> tuple[object, int]:
    """A server bound to a port: the one asked for, or the first free one from FIRST_PORT up."""
    ports = [port] if port is not None else range(FIRST_PORT, FIRST_PORT + PORTS_TRIED)
    for number in ports:
        try:
            server = create_server(app, host=address, port=number, threads=8, ident=None)
        except OSError as error:
            if error.errno == errno.EADDRINUSE and port is None:
                continue
            reason = (error.strerror or "it is refused").lower()
            raise CannotServe(f"cannot listen on {address} port {number}: {reason}") from None
        return server, int(server.effective_port)
    raise CannotServe(f"ports {FIRST_PORT} to {FIRST_PORT + PORTS_TRIED - 1} are all taken")


def serve(
    settings: Settings,
    port: int | None = None,
    address: str = LOOPBACK,
    say: Callable[[str], None] = print,
    set_booklets: list[Path] | None = None,
) -> None:
    """Serves until Ctrl-C. Raises CannotServe when it cannot listen.

    set_booklets  folders of regions whose booklets are still to be made, while serving
    """
    app = create_app(settings)
    server, number = listen(app, address, port)
    base = f"http://{address}:{number}"
    say(f"  desk      {base}/")
    if (settings.out / "index.html").is_file():
        say(f"  app       {base}/field/")
    if set_booklets:
        say("  booklet   being set, about a minute a region; its address follows here")
        arguments = ["build", *map(str, set_booklets), "--out", str(settings.out)]
        job = app.extensions["jobs"].start("build", set_booklets[0].name, arguments)
        threading.Thread(target=_tell, args=(job, settings, base, say), daemon=True).start()
    else:
        _say_booklets(settings, base, say)
    say("Ctrl-C stops it.")
    signal.signal(signal.SIGTERM, lambda *_: sys.exit(128 + signal.SIGTERM))  # jobs end, too
    try:
        server.run()  # type: ignore[attr-defined]
    finally:
        server.close()  # type: ignore[attr-defined]


def _say_booklets(settings: Settings, base: str, say: Callable[[str], None]) -> None:
    for booklet in sorted(settings.out.glob("regions/*/booklet.pdf")):
        say(f"  booklet   {base}/field/{booklet.relative_to(settings.out).as_posix()}")


def _tell(job: Job, settings: Settings, base: str, say: Callable[[str], None]) -> None:
    """Says where the booklets are once they are set, or why they are not."""
    job.finished.wait()
    if job.state == "done":
        _say_booklets(settings, base, say)
    elif job.state == "failed":
        say("  booklet   could not be set:")
        for line in list(job.lines)[-3:]:
            say(f"            {line}")
