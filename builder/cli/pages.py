"""Commands that make and show pages: build, desk."""

from __future__ import annotations

import argparse
import shutil
import time
from pathlib import Path
from typing import Any

import builder
from builder.cli.telling import Told, say, say_step

SITE = Path("site_out")


def add_commands(commands: Any) -> None:
    """Registers the family's commands."""
    build = commands.add_parser("build", help="make the field app and the booklets")
    build.add_argument("region", nargs="+", type=Path, help="folders of tables, into one site")
    build.add_argument("--out", type=Path, default=SITE, help="folder of the site")
    build.add_argument("--no-booklet", action="store_true", help="leave the booklets as they are")
    build.set_defaults(run=run_build)

    booklet = commands.add_parser("booklet", help="make one booklet, in any of its forms")
    booklet.add_argument("region", type=Path, help="folder of tables")
    booklet.add_argument("--out", type=Path, required=True, help="PDF to write")
    booklet.add_argument(
        "--format",
        default="a6",
        metavar="FORM",
        help="a6, pocket-us, or a4- or letter- with sheets, stacks, single or cards",
    )
    booklet.add_argument("--zones", nargs="+", metavar="ZONE", help="only these, by id or letter")
    booklet.add_argument("--language", default="en", metavar="TAG", help="en, es")
    booklet.set_defaults(run=run_booklet)

    desk = commands.add_parser(
        "desk", help="edit, prove and build in the browser, on this computer"
    )
    desk.add_argument("--port", type=int, help="port to listen on; without it the first free one")
    desk.add_argument("--out", type=Path, default=SITE, help="folder of the built site")
    desk.add_argument("--demo", action="store_true", help="build the regions first where needed")
    desk.add_argument("--account", metavar="NAME", help="ask for a password, keep the account, end")
    desk.add_argument("--open", metavar="ADDRESS", help="listen there, for people with an account")
    desk.add_argument(
        "--host",
        action="append",
        default=[],
        metavar="NAME",
        help="a name the open desk is called by; may be repeated",
    )
    desk.set_defaults(run=run_desk)


def run_build(given: argparse.Namespace) -> int:
    """Checks, compiles and writes."""
    make(given.region, given.out, booklets=not given.no_booklet)
    return 0


def run_booklet(given: argparse.Namespace) -> int:
    """Makes one PDF."""
    from builder.steps.booklets import make_booklet

    made = make_booklet(
        given.region,
        given.out,
        form=given.format,
        zones=given.zones,
        language=given.language,
        tell=lambda stage, done, of: say_step(done, max(of, done), stage),
    )
    say(f"{made.path}: {made.pages} pages")
    return 0


def make(folders: list[Path], out: Path, booklets: bool) -> None:
    """Builds and says what was made."""
    from builder.steps.building import build

    started = time.monotonic()
    built = build(folders, out, say_step, booklets)
    for region_id, note in built.notes.items():
        made = "made" if region_id in built.fresh else "as it was"
        booklet = f", booklet {note.booklet_pages} pages, {made}" if booklets else ""
        say(f"{region_id}: edition {note.edition}, pack {note.pack_hash}{booklet}")
    seconds = time.monotonic() - started
    say(f"{out}: {len(built.site.changed)} files written, {seconds:.1f} s")


def copied_demo(keydata: Path) -> list[Path]:
    """The demo regions of an installed Beltbook, copied to where they can be edited."""
    from builder.steps.notes import regions_in

    packed = regions_in(Path(builder.__file__).parent / "keydata")
    if not packed:
        raise Told(f"there is no region in {keydata}/; begin with: beltbook start {keydata}/NAME")
    for folder in packed:
        shutil.copytree(folder, keydata / folder.name)
        say(f"{keydata / folder.name}: copied for you to try and change")
    return regions_in(keydata)


def run_desk(given: argparse.Namespace) -> int:
    """Serves the desk until Ctrl-C. The app opens on the first region: for a demo, the fullest."""
    from builder.desk.opening import CannotOpen, open_desk
    from builder.steps.notes import is_current, regions_in

    waiting: list[Path] = []
    if given.demo:
        waiting = regions_in(Path("keydata")) or copied_demo(Path("keydata"))
        waiting.sort(key=lambda folder: -(folder / "plants.yaml").stat().st_size)
        if all(is_current(folder, given.out) for folder in waiting):
            waiting = []
        else:
            make(waiting, given.out, booklets=False)
    try:
        open_desk(given, say, waiting)
    except CannotOpen as refusal:
        raise Told(str(refusal)) from None
    return 0
