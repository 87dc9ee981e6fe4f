"""Starts the desk's web server and says where it is."""

from __future__ import annotations

import errno
from collections.abc import Callable

from waitress import create_server

from builder.desk.application import Settings, create_app

FIRST_PORT = 8790
PORTS_TRIED = 20
LOOPBACK = "127.0.0.1"


class CannotServe(Exception):
    """The desk cannot listen where it was asked to; the text says why and what to do."""


def listen(settings: Settings, address: str, port: int | None) -> tuple[object, int]:
    """A server bound to a port: the one asked for, or the first free one from FIRST_PORT up."""
    app = create_app(settings)
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
) -> None:
    """Serves until Ctrl-C. Raises CannotServe when it cannot listen."""
    server, number = listen(settings, address, port)
    base = f"http://{address}:{number}"
    say(f"  desk      {base}/")
    if (settings.out / "index.html").is_file():
        say(f"  app       {base}/field/")
    for booklet in sorted(settings.out.glob("regions/*/booklet.pdf")):
        say(f"  booklet   {base}/field/{booklet.relative_to(settings.out).as_posix()}")
    say("Ctrl-C stops it.")
    try:
        server.run()  # type: ignore[attr-defined]
    finally:
        server.close()  # type: ignore[attr-defined]
