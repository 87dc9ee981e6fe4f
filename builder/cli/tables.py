"""Commands about tables: check, start, docs."""

from __future__ import annotations

import argparse
from pathlib import Path
from typing import Any

from builder.cli.telling import Told, say, say_problems


def add_commands(commands: Any) -> None:
    """Registers the family's commands."""
    check = commands.add_parser("check", help="list every problem in a region's tables")
    check.add_argument("region", nargs="+", type=Path, help="folder of tables, e.g. keydata/NAME")
    check.set_defaults(run=run_check)

    start = commands.add_parser(
        "start", help="write a new region with three zones, ready to change"
    )
    start.add_argument("region", type=Path, help="folder to write, e.g. keydata/NAME")
    start.add_argument("--name", default="", help="name for people; without it from the folder")
    start.set_defaults(run=run_start)

    docs = commands.add_parser("docs", help="write the generated pages of docs/ anew")
    docs.add_argument("--keydata", type=Path, default=Path("keydata"), help="folder of regions")
    docs.add_argument("--out", type=Path, default=Path("docs"), help="folder of the pages")
    docs.set_defaults(run=run_docs)


def run_check(given: argparse.Namespace) -> int:
    """Prints every problem of the regions; 1 when one of them stops a build."""
    from builder.steps.checking import check_region

    checked = [check_region(folder) for folder in given.region]
    say_problems(problem for one in checked for problem in one.problems)
    return 1 if any(one.stops for one in checked) else 0


def run_start(given: argparse.Namespace) -> int:
    """Writes a new, valid region into a folder that is not there yet."""
    from builder.tables.start import StartRefused, start_region

    try:
        folder = start_region(given.region, given.name)
    except StartRefused as refusal:
        raise Told(str(refusal)) from None
    say(f"{folder} stands. Next: beltbook check {folder}, or edit it with: beltbook desk")
    return 0


def run_docs(given: argparse.Namespace) -> int:
    """Writes docs/tables.md, checks.md, sources.md, performance.md and the editors' schemas."""
    from builder.bench.table import write_page
    from builder.steps.documents import write_docs

    written = write_docs(given.keydata, given.out)
    page = write_page(given.out)
    if page is not None:
        written.append(page)
    say("\n".join(map(str, written)) if written else "every page was right already")
    return 0
