"""The command line: `beltbook COMMAND`.

Exit codes: 0 done, 1 something is wrong with what was given, 2 the command was not understood,
130 stopped by Ctrl-C. A person's mistake is told in a sentence, never as a traceback.
"""

from __future__ import annotations

import argparse
import sys

from builder import __version__
from builder.cli import bench, pages, plots, records, tables
from builder.cli.telling import Told, say_problems
from builder.steps.refusals import Stopped, ToldByStep

STOPPED_BY_HAND = 130


def parser() -> argparse.ArgumentParser:
    """The commands and their options."""
    top = argparse.ArgumentParser(
        prog="beltbook",
        description="Region tables in; field app and pocket booklet out.",
    )
    top.add_argument("--version", action="version", version=f"beltbook {__version__}")
    commands = top.add_subparsers(title="commands", metavar="COMMAND", dest="command")
    for family in (tables, pages, plots, records, bench):
        family.add_commands(commands)
    return top


def main(argv: list[str] | None = None) -> int:
    """Runs one command; returns the exit code."""
    top = parser()
    given = top.parse_args(argv)
    if given.command is None:
        top.print_help()
        return 2
    try:
        code: int = given.run(given)
        return code
    except Stopped as stopped:
        say_problems(stopped.problems)
        return 1
    except (Told, ToldByStep, OSError) as told:
        print(f"beltbook: {told}", file=sys.stderr)
        return 1
    except KeyboardInterrupt:
        print("\nStopped.", file=sys.stderr)
        return STOPPED_BY_HAND


__all__ = ["main", "parser"]
