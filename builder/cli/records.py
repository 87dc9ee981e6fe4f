"""Commands about records: records."""

from __future__ import annotations

import argparse
from pathlib import Path
from typing import Any

from builder.cli.telling import say

KEYDATA = Path("keydata")


def add_commands(commands: Any) -> None:
    """Registers the family's commands."""
    records = commands.add_parser("records", help="merge files of records and write them anew")
    records.add_argument("files", nargs="+", type=Path, metavar="IN", help="files from phones")
    records.add_argument("--out", type=Path, required=True, help="file to write")
    records.add_argument(
        "--format",
        choices=("json", "csv", "geojson", "dwca", "report"),
        default="json",
        help="json loses nothing and keeps positions exact; dwca is a Darwin Core archive, "
        "report a page to print",
    )
    records.add_argument(
        "--region",
        action="append",
        type=Path,
        metavar="FOLDER",
        help="tables that name the plants; without it those in keydata/",
    )
    records.add_argument("--names", action="store_true", help="observers in full, not initials")
    records.add_argument(
        "--rescore",
        action="store_true",
        help="score each record again under the tables that scored it, and tell what differs",
    )
    records.set_defaults(run=run_records)


def run_records(given: argparse.Namespace) -> int:
    """Reads, merges, writes, and tells what was left out."""
    from builder.records.sentences import read_sentences
    from builder.steps.exporting import export_files
    from builder.steps.notes import regions_in

    folders = given.region if given.region is not None else regions_in(KEYDATA)
    made = export_files(
        given.files, given.out, given.format, folders, given.names, rescoring=given.rescore
    )
    for sentence in made.told:
        say(f"note: {sentence}")
    words = read_sentences()["told"]["written"]["one" if made.sites == 1 else "many"]
    say(words.format(out=given.out, n=made.sites))
    return 0
