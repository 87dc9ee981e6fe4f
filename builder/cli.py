"""The command line: `beltbook COMMAND`."""

from __future__ import annotations

import argparse

from builder import __version__


def parser() -> argparse.ArgumentParser:
    """The commands and their options."""
    top = argparse.ArgumentParser(
        prog="beltbook",
        description="Region tables in; field app and pocket booklet out.",
    )
    top.add_argument("--version", action="version", version=f"beltbook {__version__}")
    return top


def main(argv: list[str] | None = None) -> int:
    """Run one command; returns the exit code."""
    parser().parse_args(argv)
    parser().print_help()
    return 0
