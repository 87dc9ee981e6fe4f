"""A start of a new region: a valid one with three zones, to be changed by hand or on the desk."""

from __future__ import annotations

import datetime
from pathlib import Path
from typing import Any

from builder.rows import parse_yaml, plain
from builder.tables.edit import replace_value
from builder.tables.gather import Gathered
from builder.tables.merge import fresh_text
from builder.tables.reading import ID_FORM

BLANK = Path(__file__).parent / "blank"
LETTERS = "ABCDEFGHJKLMNOPQRSTUV"
ROWS = {
    "zones.yaml": "zones",
    "plants.yaml": "plants",
    "production.yaml": "production",
    "soils.yaml": "soils",
    "reclaim.yaml": "zones",
}
NO_MIX = {
    "method": "none",
    "other_method": "to be written",
    "live_plants": ["to be written"],
}


class StartRefused(ValueError):  # noqa: N818 - told to the person
    """The region cannot be started here; the text says why."""


def start_files(region_id: str, name: str, date: str) -> dict[str, str]:
    """File name to text of a new region.

    region_id  stable name, lower case with underscores
    name       name for people
    date       day of the first edition, year-month-day
    """
    if not ID_FORM.fullmatch(region_id):
        raise StartRefused(
            f'"{region_id}" cannot be a region\'s id: lower case letters, digits and _, a letter '
            "first."
        )
    files = {
        path.name: path.read_text(encoding="utf-8")
        for path in sorted(BLANK.iterdir())
        if path.suffix in (".yaml", ".csv")
    }
    head = files["region.yaml"]
    for field, value in (("id", region_id), ("name", name), ("date", date)):
        head = replace_value(head, (field,), value)
    return files | {"region.yaml": head}


def start_region(
    folder: Path | str, name: str = "", date: str = "", found: Gathered | None = None
) -> Path:
    """Writes a new region into a folder that is not there yet, and hands the folder back.

    The folder's own name becomes the id; zones, plants and occurrence come from `found` where
    a spreadsheet was gathered. Files are written beside it first, so that a stop in
    between leaves no half region. Raises StartRefused.
    """
    folder = Path(folder)
    if folder.exists():
        raise StartRefused(f"{folder} is there already; nothing was written.")
    shown = name or folder.name.replace("_", " ").title()
    day = date or datetime.date.today().isoformat()
    if found is None:
        files = start_files(folder.name, shown, day)
    else:
        files = start_from(folder.name, shown, day, found)
    fresh = folder.with_name(f".{folder.name}.new")
    try:
        fresh.mkdir(parents=True)
        for file, text in files.items():
            (fresh / file).write_text(text, encoding="utf-8", newline="\n")
        fresh.rename(folder)
    except OSError as error:
        reason = (error.strerror or "it cannot be written").lower()
        raise StartRefused(f"{folder} cannot be written: {reason}.") from error
    return folder


def start_from(region_id: str, name: str, date: str, found: Gathered) -> dict[str, str]:
    """File name to text of a new region whose zones, plants and occurrence were gathered.

    All else is copied from the start region and waits to be written; the region is valid.
    """
    if len(found.zones) > len(LETTERS):
        raise StartRefused(f"{len(found.zones)} zones are too many; {len(LETTERS)} have a letter.")
    files = start_files(region_id, name, date)
    first = {file: _first_row(files, file, table) for file, table in ROWS.items()}
    zones = [
        first["zones.yaml"]
        | {"id": zone, "letter": letter, "short": shown[:20].strip(), "name": shown}
        | {"neighbours": [], "told_from": {}}
        for (zone, shown), letter in zip(found.zones.items(), LETTERS, strict=False)
    ]
    _part_shorts(zones)
    plants = [
        _plant_row(first["plants.yaml"], plant, shown) for plant, shown in found.plants.items()
    ]
    data: dict[str, Any] = {
        "zones.yaml": {"zones": zones},
        "plants.yaml": {"plants": plants},
        "occurrence.yaml": {"occurrence": found.occurrence},
        "production.yaml": {"production": dict.fromkeys(found.zones, first["production.yaml"])},
        "soils.yaml": {"soils": dict.fromkeys(found.zones, first["soils.yaml"])},
        "reclaim.yaml": {"zones": dict.fromkeys(found.zones, first["reclaim.yaml"])},
        "seed.yaml": {"mixes": dict.fromkeys(found.zones, NO_MIX)},
        "questions.yaml": {"questions": [_first_row(files, "questions.yaml", "questions", at=1)]},
    }
    for file, new in data.items():
        head = plain(parse_yaml(files[file], file)[0])
        kept = {key: value for key, value in head.items() if not isinstance(value, list | dict)}
        if isinstance(head.get("source"), dict):
            kept["source"] = head["source"]
        files[file] = fresh_text(kept | new)
    return files | {"climate.csv": _climate_of(files["climate.csv"], list(found.zones))}


def _first_row(files: dict[str, str], file: str, table: str, at: int = 0) -> Any:
    rows = plain(parse_yaml(files[file], file)[0])[table]
    return list(rows.values())[at] if isinstance(rows, dict) else rows[at]


def _plant_row(row: dict[str, Any], plant: str, shown: str) -> dict[str, Any]:
    left_out = ("lookalikes", "lookalike_tell", "codes", "seeds_per_g", "planning_pls")
    made = {name: value for name, value in row.items() if name not in left_out}
    return made | {
        "id": plant,
        "scientific": shown,
        "common": shown,
        "family": "to be written",
        "form": "forb_perennial",
        "fate": "regrows_slowly",
        "response": "neutral",
    }


def _part_shorts(zones: list[dict[str, Any]]) -> None:
    """Short names that were cut alike get their letter at the end."""
    cut = [zone["short"] for zone in zones]
    for zone in zones:
        if cut.count(zone["short"]) > 1:
            zone["short"] = f"{zone['short'][:17].strip()} {zone['letter']}"


def _climate_of(text: str, zones: list[str]) -> str:
    lines = text.split("\n")
    head = [line for line in lines if line.startswith("#")]
    columns, *rows = [line for line in lines if line and not line.startswith("#")]
    one = [row.split(",", 1)[1] for row in rows[:12]]
    return "\n".join([*head, columns, *(f"{zone},{row}" for zone in zones for row in one)]) + "\n"
