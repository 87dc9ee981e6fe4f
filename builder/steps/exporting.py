"""Files of records → one file of another form."""

from __future__ import annotations

import os
from collections.abc import Sequence
from dataclasses import dataclass, field
from datetime import datetime
from pathlib import Path

from builder.records.darwin_core import write_archive
from builder.records.exchange import (
    LARGEST_BYTES,
    Records,
    merged,
    read_records,
    write_records,
)
from builder.records.flat import write_csv
from builder.records.geojson import write_geojson
from builder.records.known import Knowledge, known_of
from builder.records.report import write_report
from builder.records.rescoring import rescore, rescored_said
from builder.records.sentences import FileRefused, read_sentences
from builder.steps.checking import check_regions, region_of
from builder.steps.refusals import ToldByStep
from builder.steps.rescoring import packs_at_hand

FORMS = ("json", "csv", "geojson", "dwca", "report")


@dataclass(frozen=True)
class Exported:
    """How many records were written, and what a person should know of the rest, as sentences."""

    sites: int
    told: list[str] = field(default_factory=list)


class NotRead(ToldByStep):
    """A file of records that is not taken; the text names it and says why."""


def export_files(
    files: Sequence[Path],
    out: Path,
    form: str,
    regions: Sequence[Path],
    names: bool = False,
    rescoring: bool = False,
) -> Exported:
    """Reads files of records, merges them by id and revision and writes one, whole or not at all.

    form     one of FORMS
    regions  folders of the tables that name plants and say which are sensitive
    names    observers in full, else as initials
    rescoring  also tell what each record's own tables say of it now

    Raises NotRead when a file is refused or none holds a record, Stopped when tables have errors.
    """
    read = [_read(path) for path in files]
    records = merged(read)
    if not records.sites and not records.units:
        raise NotRead(read_sentences()["told"]["none"])
    knowledge = Knowledge([known_of(region_of(one)) for one in check_regions(regions)])
    content = written(records, form, knowledge, names)
    part = out.with_name(f".{out.name}.part")
    part.write_bytes(content)
    os.replace(part, out)
    told = told_of(read, records)
    if form != "json":
        unknown = read_sentences()["told"]["unknown"]
        told += [unknown.format(region=name) for name in knowledge.unknown(records.sites)]
    if rescoring:
        told += _rescored(records, regions)
    return Exported(len(records.sites), told)


def _rescored(records: Records, regions: Sequence[Path]) -> list[str]:
    packs = packs_at_hand(regions, {site["pack_hash"] for site in records.sites})
    made = [(site["id"], rescore(site, packs)) for site in records.sites]
    same = sum(one.state == "same" for _, one in made)
    words = read_sentences()["rescored"]["same"]["one" if same == 1 else "many"]
    told = [sentence for site_id, one in made for sentence in rescored_said(one, site_id)]
    return [*told, words.format(n=same)]


def written(records: Records, form: str, knowledge: Knowledge, names: bool) -> bytes:
    """The records in one form."""
    now = datetime.now().astimezone().isoformat(timespec="seconds")
    if form == "dwca":
        return write_archive(records, knowledge, names)
    if form == "json":
        text = write_records(records, now, names)
    elif form == "csv":
        text = write_csv(records, knowledge, names)
    elif form == "geojson":
        text = write_geojson(records, knowledge, names)
    else:
        text = write_report(records, knowledge, now[:10], names)
    return text.encode()


def told_of(read: Sequence[Records], whole: Records) -> list[str]:
    """What was left out, emptied or kept beside, as sentences."""
    say = read_sentences()
    entry, lists = say["entry"], say["lists"]
    told = []
    for one in read:
        for refusal in one.refused:
            words = entry[refusal.why]
            told.append(words.format(at=refusal.at + 1, what=lists[refusal.what]))
        for site_id, fields in one.changed:
            told.append(entry["changed"].format(id=site_id, fields=", ".join(fields)))
    told += [entry["side"].format(id=site_id) for site_id, _ in whole.sides]
    return told


def _read(path: Path) -> Records:
    try:
        if path.stat().st_size > LARGEST_BYTES:
            raise FileRefused("too_large")
        return read_records(path.read_bytes())
    except FileRefused as refused:
        raise NotRead(f"{path}: {refused}") from None
