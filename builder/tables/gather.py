"""Zones, plants and occurrence out of a flat spreadsheet of plots, or of constancies.

Plots: one line a plant in a plot, with the plot's zone. Constancies: one line a plant in a zone.
Which column is which is guessed from its name and may be said by the person.
"""

from __future__ import annotations

import re
import unicodedata
from collections import defaultdict
from dataclasses import dataclass, field

from builder.tables.sheets import Cell, Flat, SheetFault

ROLES = ("plot", "zone", "plant", "constancy_pct", "cover_pct")
_GUESSES = {
    "plot": ("plot", "releve", "sample", "site", "quadrat"),
    "zone": ("zone", "belt", "community", "association", "type", "cluster", "unit"),
    "plant": ("plant", "species", "taxon", "scientific", "name"),
    "constancy_pct": ("constancy", "frequency", "freq", "presence"),
    "cover_pct": ("cover", "abundance", "coverage"),
}


@dataclass
class Gathered:
    """What a flat spreadsheet holds: names by id, and [constancy, cover] by plant and zone."""

    zones: dict[str, str] = field(default_factory=dict)
    plants: dict[str, str] = field(default_factory=dict)
    occurrence: dict[str, dict[str, list[float]]] = field(default_factory=dict)
    plots: dict[str, int] = field(default_factory=dict)


def guessed_columns(columns: list[str]) -> dict[str, str]:
    """Role to column name, as far as the names tell; each column is used once."""
    found: dict[str, str] = {}
    for role, words in _GUESSES.items():
        for word in words:
            match = next(
                (name for name in columns if word in name.lower() and name not in found.values()),
                None,
            )
            if match is not None:
                found[role] = match
                break
    return found


def gathered(flat: Flat, columns: dict[str, str]) -> Gathered:
    """Zones, plants and occurrence of a sheet.

    columns  role to column name: plant and zone, with either plot (and cover_pct) or
             constancy_pct (and cover_pct). Raises SheetFault with a sentence.
    """
    for role in ("plant", "zone"):
        if columns.get(role) not in flat.columns:
            raise SheetFault(f"Say which column holds the {role}.")
    if columns.get("plot") in flat.columns:
        return _from_plots(flat, columns)
    if columns.get("constancy_pct") in flat.columns:
        return _from_constancies(flat, columns)
    raise SheetFault("Say which column holds the plot, or the constancy.")


def _from_plots(flat: Flat, columns: dict[str, str]) -> Gathered:
    made = Gathered()
    zone_of: dict[str, str] = {}
    covers: dict[tuple[str, str], dict[str, float]] = defaultdict(dict)
    for line, row in enumerate(flat.rows, start=2):
        plot = _text(row.get(columns["plot"]))
        if not plot:
            continue
        zone = _id_of(made.zones, row.get(columns["zone"]), line, "zone")
        if zone_of.setdefault(plot, zone) != zone:
            raise SheetFault(f"Line {line}: plot {plot} stands in two zones.")
        plant = _text(row.get(columns["plant"]))
        if not plant:
            continue
        key = _id_of(made.plants, plant, line, "plant")
        cover = _percent(row.get(columns.get("cover_pct", "")), line, 1.0)
        covers[key, zone][plot] = covers[key, zone].get(plot, 0.0) + cover
    for zone in zone_of.values():
        made.plots[zone] = made.plots.get(zone, 0) + 1
    for (plant, zone), seen in covers.items():
        constancy = 100 * len(seen) / made.plots[zone]
        mean = min(100.0, sum(seen.values()) / len(seen))
        made.occurrence.setdefault(plant, {})[zone] = [
            round(constancy, 1),
            max(0.1, round(mean, 1)),
        ]
    return _held(made)


def _from_constancies(flat: Flat, columns: dict[str, str]) -> Gathered:
    made = Gathered()
    for line, row in enumerate(flat.rows, start=2):
        if not _text(row.get(columns["plant"])):
            continue
        zone = _id_of(made.zones, row.get(columns["zone"]), line, "zone")
        plant = _id_of(made.plants, row.get(columns["plant"]), line, "plant")
        constancy = _percent(row.get(columns["constancy_pct"]), line, 0.0)
        cover = _percent(row.get(columns.get("cover_pct", "")), line, 1.0)
        if constancy <= 0:
            continue
        rows = made.occurrence.setdefault(plant, {})
        if zone in rows:
            raise SheetFault(f"Line {line}: {made.plants[plant]} stands twice in {zone}.")
        rows[zone] = [constancy, max(0.1, cover)]
    return _held(made)


def _held(made: Gathered) -> Gathered:
    if not made.occurrence:
        raise SheetFault("No plant was found in the sheet.")
    made.plants = {plant: name for plant, name in made.plants.items() if plant in made.occurrence}
    return made


def id_from(name: str) -> str:
    """An id from a name: lower case letters, digits and _, a letter first."""
    bare = unicodedata.normalize("NFKD", name).encode("ascii", "ignore").decode().lower()
    bare = re.sub(r"\b(ssp|subsp|var|spp|sp)\.", " ", bare)
    made = re.sub(r"[^a-z0-9]+", "_", bare).strip("_")
    return made if made[:1].isalpha() else f"x_{made}".rstrip("_")


def _id_of(known: dict[str, str], cell: Cell, line: int, what: str) -> str:
    name = _text(cell)
    if not name:
        raise SheetFault(f"Line {line}: the {what} is empty.")
    made = id_from(name)
    if known.setdefault(made, name).lower() != name.lower():
        raise SheetFault(f'Line {line}: "{name}" and "{known[made]}" would have one id, {made}.')
    return made


def _text(cell: Cell) -> str:
    return "" if cell is None else " ".join(str(cell).split())


def _percent(cell: Cell, line: int, otherwise: float) -> float:
    if cell is None:
        return otherwise
    text = _text(cell).rstrip("%").replace(",", ".")
    try:
        value = float(text)
    except ValueError:
        raise SheetFault(f'Line {line}: "{_text(cell)}" is no percent.') from None
    if not 0 <= value <= 100:
        raise SheetFault(f"Line {line}: {value:g} is outside 0 to 100.")
    return value
