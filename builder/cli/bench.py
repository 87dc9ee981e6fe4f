"""The benchmark's command: bench."""

from __future__ import annotations

import argparse
import json
from pathlib import Path
from typing import Any

import builder
from builder.cli.telling import Told, say, say_step


def add_commands(commands: Any) -> None:
    """Registers the family's command."""
    bench = commands.add_parser("bench", help="measure speed and size here, goals beside")
    bench.add_argument(
        "--only", nargs="+", metavar="NAME", default=[], help="these lines, or lines beginning so"
    )
    bench.add_argument("--json", type=Path, metavar="OUT", help="write the run there, too")
    bench.add_argument("--quick", action="store_true", help="less work, in under a minute")
    bench.add_argument("--keydata", type=Path, default=Path("keydata"), help="folder of regions")
    bench.set_defaults(run=run_bench)


def run_bench(given: argparse.Namespace) -> int:
    """Measures, prints one table; beyond a goal is no fault of the command."""
    from builder.bench.run import UnknownMeasure, chosen, run
    from builder.bench.table import text_table
    from builder.steps.notes import regions_in

    keydata = given.keydata
    if not regions_in(keydata):
        keydata = Path(builder.__file__).parent / "keydata"
    if not regions_in(keydata):
        raise Told(f"there is no region in {given.keydata}/ to measure with")
    if given.json and not given.json.parent.is_dir():
        raise Told(f"there is no folder {given.json.parent}")
    try:
        measures = chosen(given.only)
    except UnknownMeasure as unknown:
        raise Told(str(unknown)) from None
    made = run(keydata, measures, given.quick, say_step)
    say("")
    say(text_table(made))
    if given.json:
        text = json.dumps(made, indent=1, ensure_ascii=False) + "\n"
        given.json.write_text(text, encoding="utf-8")
    return 0
