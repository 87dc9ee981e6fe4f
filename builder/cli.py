"""The command line: `beltbook COMMAND`.

Exit codes: 0 done, 1 something is wrong with what was given, 2 the command was not understood,
130 stopped by Ctrl-C. A person's mistake is told in a sentence, never as a traceback.
"""

from __future__ import annotations

import argparse
import sys
from collections.abc import Callable
from pathlib import Path

from builder import __version__, steps
from builder.problems import in_order, render_all

Command = Callable[[argparse.Namespace], int]
STOPPED = 130


class Told(Exception):  # noqa: N818 - a person's mistake, told and not traced
    """What was given cannot be worked with; the text says why."""


def parser() -> argparse.ArgumentParser:
    """The commands and their options."""
    top = argparse.ArgumentParser(
        prog="beltbook",
        description="Region tables in; field app and pocket booklet out.",
    )
    top.add_argument("--version", action="version", version=f"beltbook {__version__}")
    commands = top.add_subparsers(title="commands", metavar="COMMAND", dest="command")

    check = commands.add_parser("check", help="list every problem in a region's tables")
    check.add_argument("region", nargs="+", type=Path, help="folder of tables, e.g. keydata/NAME")
    check.set_defaults(run=run_check)

    desk = commands.add_parser("desk", help="edit, prove and build in the browser, on this computer")
    desk.add_argument("--port", type=int, help="port to listen on; without it the first free one")
    desk.add_argument("--out", type=Path, default=Path("site_out"), help="folder of the built site")
    desk.add_argument("--demo", action="store_true", help="build the regions first where needed")
    desk.add_argument("--account", metavar="NAME", help="ask for a password, keep the account, end")
    desk.add_argument("--open", metavar="ADDRESS", help="listen there, for people with an account")
    desk.add_argument(
        "--host", action="append", default=[], metavar="NAME",
        help="a name the open desk is called by; may be repeated",
    )  # fmt: skip
    desk.set_defaults(run=run_desk)
    return top


def run_check(given: argparse.Namespace) -> int:
    """Prints every problem of the regions; 1 when one of them stops a build."""
    found, stops = [], False
    for folder in given.region:
        checked = steps.check_region(folder)
        found += checked.problems
        stops = stops or checked.stops
    print(render_all(in_order(found)))
    return 1 if stops else 0


def run_desk(given: argparse.Namespace) -> int:
    """Serves the desk until Ctrl-C."""
    from builder.desk.opening import CannotOpen, open_desk

    try:
        open_desk(given, print)
    except CannotOpen as refusal:
        raise Told(str(refusal)) from None
    return 0


def main(argv: list[str] | None = None) -> int:
    """Runs one command; returns the exit code."""
    top = parser()
    given = top.parse_args(argv)
    if given.command is None:
        top.print_help()
        return 2
    try:
        run: Command = given.run
        return run(given)
    except Told as told:
        print(f"beltbook: {told}", file=sys.stderr)
        return 1
    except KeyboardInterrupt:
        print("\nStopped.", file=sys.stderr)
        return STOPPED
    except BrokenPipeError:
        sys.stderr.close()
        return 1
