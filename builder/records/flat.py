"""Records as one flat CSV: a line for each finding, or one for a record without any.

RFC 4180 (2005), section 2: lines end in CRLF, quotes are doubled. A spreadsheet runs cells that
begin with = + - @, a tab or a line end; text of that kind gets an apostrophe in front.
"""

from __future__ import annotations

import csv
import io
from collections.abc import Iterator
from typing import Any

from builder.records.clean import Record
from builder.records.exchange import Records, shown_site
from builder.records.known import Knowledge, Known, belief_of, ground_of, position_of

RUN_BY_SPREADSHEETS = ("=", "+", "-", "@", "\t", "\r", "\n", "\uff1d", "\uff0b", "\uff0d", "\uff20")
SITE_COLUMNS = (
    "site_id", "revision", "region_id", "edition", "pack_hash", "unit_id", "unit_name", "role",
    "name", "observer", "date", "latitude_deg", "longitude_deg", "uncertainty_m",
    "position_rounded", "height_m", "slope_pct", "aspect_deg", "disturbance",
    "whole_plot_searched", "verdict", "zone_id", "belief", "overruled_zone_id",
    "overruled_reason", "struck", "questions", "notes",
)  # fmt: skip
FINDING_COLUMNS = (
    "plant_id", "group_id", "scientific_name", "state", "cover", "cover_low_pct",
    "cover_high_pct", "named",
)  # fmt: skip
NO_FINDING = ("",) * len(FINDING_COLUMNS)


def harmless(value: Any) -> Any:
    """A cell no spreadsheet runs: numbers as they are, text with an apostrophe where needed."""
    if isinstance(value, str) and value.lstrip(" ").startswith(RUN_BY_SPREADSHEETS):
        return f"'{value}"
    return value


def csv_line(cells: list[Any]) -> str:
    """One line, CRLF at its end; None is empty, yes and no are true and false."""
    line = io.StringIO()
    csv.writer(line, lineterminator="\r\n").writerow([_said(cell) for cell in cells])
    return line.getvalue()


def _said(cell: Any) -> Any:
    if isinstance(cell, bool):
        return "true" if cell else "false"
    return "" if cell is None else cell


def write_csv(records: Records, knowledge: Knowledge, names: bool = False) -> str:
    """Every record as CSV. names: observers in full, else as initials"""
    lines = [csv_line([*SITE_COLUMNS, *FINDING_COLUMNS])]
    for site in records.sites:
        known = knowledge.of(site)
        about = site_cells(shown_site(site, names), known)
        for finding in _findings(site, known):
            lines.append(csv_line([harmless(cell) for cell in (*about, *finding)]))
    return "".join(lines)


def site_cells(site: Record, known: Known) -> list[Any]:
    """What the columns of a site check hold, in their order."""
    position = position_of(site, known)
    kept, overruled = site["call"] or {}, site["overruled"] or {}
    answers = "; ".join(f"{name}={value}" for name, value in sorted(site["questions"].items()))
    where: list[Any] = [None, None, None, None]
    if position is not None:
        where = [position.latitude_deg, position.longitude_deg]
        where += [position.uncertainty_m, position.rounded]
    return [
        site["id"],
        *(site[name] for name in SITE_COLUMNS[1:11]),
        *where,
        *ground_of(site, known).values(),
        site["disturbance"],
        site["whole_plot_searched"],
        *(text_or_none(kept.get(name)) for name in ("verdict", "zone_id")),
        belief_of(site),
        *(text_or_none(overruled.get(name)) for name in ("zone_id", "reason")),
        "; ".join(site["struck"]),
        answers,
        site["notes"],
    ]


def text_or_none(value: Any) -> str | None:
    """Text as it is; None for anything else that a kept call may hold."""
    return value if isinstance(value, str) else None


def _findings(site: Record, known: Known) -> Iterator[tuple[Any, ...]]:
    if not site["findings"]:
        yield NO_FINDING
    for one in site["findings"]:
        plant = known.plants.get(one.get("plant_id", ""))
        low, high = known.classes.get(one["cover"] or "", (None, None))
        yield (
            one.get("plant_id"),
            one.get("group_id"),
            plant.scientific if plant else None,
            one["state"],
            one["cover"],
            low,
            high,
            one["named"],
        )
