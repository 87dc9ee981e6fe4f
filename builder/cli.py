"""The command line: `beltbook COMMAND`.

Exit codes: 0 done, 1 something is wrong with what was given, 2 the command was not understood,
130 stopped by Ctrl-C. A person's mistake is told in a sentence, never as a traceback.
"""

from __future__ import annotations

import argparse
import sys
import time
from collections.abc import Callable
from pathlib import Path

from builder import __version__, steps
from builder.problems import in_order, render_all
from builder.tables.start import StartRefused, start_region

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

    build = commands.add_parser("build", help="make the field app and the booklets")
    build.add_argument("region", nargs="+", type=Path, help="folders of tables, into one site")
    build.add_argument("--out", type=Path, default=Path("site_out"), help="folder of the site")
    build.add_argument("--no-booklet", action="store_true", help="leave the booklets as they are")
    build.set_defaults(run=run_build)

    call = commands.add_parser("call", help="call a whole file of plots")
    call.add_argument("region", type=Path, help="folder of tables")
    call.add_argument("plots", type=Path, help="CSV: plot_id,plant_id,cover_pct")
    call.add_argument("--out", type=Path, required=True, help="CSV of calls to write")
    call.add_argument("--answers", type=int, metavar="N", help="answer as a person would, N at most")
    call.add_argument("--scale", metavar="NAME", help="cover is written in classes of this scale")
    call.add_argument("--sites", type=Path, metavar="CSV", help="heights, slopes, months, answers")
    call.add_argument("--month", type=int, choices=range(1, 13), metavar="1-12", help="of all plots")
    call.add_argument("--disturbance", metavar="ID", help="of all plots that state none")
    call.add_argument(
        "--listed-only", action="store_true",
        help="plants not listed were not searched for; else they were not found",
    )  # fmt: skip
    call.set_defaults(run=run_call)

    start = commands.add_parser("start", help="write a new region with three zones, ready to change")
    start.add_argument("region", type=Path, help="folder to write, e.g. keydata/NAME")
    start.add_argument("--name", default="", help="name for people; without it from the folder")
    start.set_defaults(run=run_start)

    docs = commands.add_parser("docs", help="write the generated pages of docs/ anew")
    docs.add_argument("--keydata", type=Path, default=Path("keydata"), help="folder of regions")
    docs.add_argument("--out", type=Path, default=Path("docs"), help="folder of the pages")
    docs.set_defaults(run=run_docs)

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


def run_build(given: argparse.Namespace) -> int:
    """Checks, compiles and writes; 1 with every problem when tables stop it."""
    started = time.monotonic()
    try:
        built = steps.build(given.region, given.out, say_step, booklets=not given.no_booklet)
    except steps.Stopped as stopped:
        print(render_all(in_order(stopped.problems)))
        return 1
    except (steps.BuilderBusy, OSError) as error:
        raise Told(str(error)) from None
    for region_id, note in built.notes.items():
        made = "made" if region_id in built.fresh else "as it was"
        booklet = "" if given.no_booklet else f", booklet {note.booklet_pages} pages, {made}"
        print(f"{region_id}: edition {note.edition}, pack {note.pack_hash}{booklet}")
    seconds = time.monotonic() - started
    print(f"{given.out}: {len(built.site.changed)} files written, {seconds:.1f} s")
    return 0


def run_start(given: argparse.Namespace) -> int:
    """Writes a new, valid region into a folder that is not there yet."""
    try:
        folder = start_region(given.region, given.name)
    except StartRefused as refusal:
        raise Told(str(refusal)) from None
    print(f"{folder} stands. Next: beltbook check {folder}, or edit it with: beltbook desk")
    return 0


def run_docs(given: argparse.Namespace) -> int:
    """Writes docs/tables.md, checks.md, sources.md and the editors' schemas."""
    try:
        written = steps.write_docs(given.keydata, given.out)
    except steps.Stopped as stopped:
        print(render_all(in_order(stopped.problems)))
        return 1
    print("\n".join(map(str, written)) if written else "every page was right already")
    return 0


def run_call(given: argparse.Namespace) -> int:
    """Calls a file of plots; unknown plants are noted, not fatal."""
    if given.answers is not None and given.answers < 1:
        raise Told("--answers takes a whole number from 1 up")
    try:
        called = steps.call_file(
            given.region, given.plots, given.out, scale=given.scale, sites_csv=given.sites,
            answers=given.answers, month=given.month, disturbance=given.disturbance,
            listed_only=given.listed_only,
        )  # fmt: skip
    except steps.Stopped as stopped:
        print(render_all(in_order(stopped.problems)))
        return 1
    except (steps.UnknownName, OSError) as error:
        raise Told(str(error)) from None
    if called.problems:
        print(render_all(in_order(called.problems)))
    if called.unknown:
        rows = ", ".join(f"{name} ({count})" for name, count in called.unknown.items())
        print(f"note: not plants of this region: {rows}")
    print(f"{given.out}: {called.plots} plots called")
    return 0


def say_line(words: str) -> None:
    """One line for the person, at once."""
    print(words, flush=True)


def say_step(done: int, of: int, words: str) -> None:
    """One line of progress, which the desk reads too."""
    print(f"[{done}/{of}] {words}", flush=True)


def run_desk(given: argparse.Namespace) -> int:
    """Serves the desk until Ctrl-C."""
    from builder.desk.opening import CannotOpen, open_desk

    waiting: list[Path] = []
    if given.demo:
        waiting = steps.regions_in(Path("keydata"))
        if not waiting:
            raise Told("there is no region in keydata/")
        if all(steps.is_current(folder, given.out) for folder in waiting):
            waiting = []
        else:
            made = run_build(argparse.Namespace(region=waiting, out=given.out, no_booklet=True))
            if made != 0:
                return made
    try:
        open_desk(given, say_line, waiting)
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
