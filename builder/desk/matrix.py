"""The plants × zones grid: one row a plant, a pale kite behind it, cells that take typing."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from flask import url_for
from markupsafe import Markup

from builder.desk import charts
from builder.desk.edits import cell_text
from builder.desk.shelf import Look
from builder.rows import Row, descend
from builder.tables import Zone


@dataclass(frozen=True)
class Cell:
    """One plant in one zone as written: constancy, cover, and the text an input takes."""

    key: str
    constancy: str
    cover: str
    text: str
    gap: bool
    zone: str
    bad: bool


@dataclass(frozen=True)
class PlantRow:
    """One plant's row."""

    name: str
    latin: str
    href: str
    kite: Markup
    cells: list[Cell]


@dataclass(frozen=True)
class Matrix:
    """Head and rows; `slope` columns carry the kite, the others stand beside."""

    heads: list[tuple[Markup, str, bool]]
    rows: list[PlantRow]


def in_columns(zones: Sequence[Zone]) -> list[Zone]:
    """The slope low to high, then the ground beside it."""
    return sorted(zones, key=lambda zone: zone.kind == "azonal")


def matrix(look: Look, root: Row) -> Matrix:
    """The grid of a region whose tables could be read."""
    assert look.region is not None
    zones = in_columns(look.region.zones)
    slope = [zone for zone in zones if zone.kind != "azonal"]
    first_beside = zones[len(slope)].id if len(slope) < len(zones) else ""
    marks = charts.tabs(zones)
    heads = [(marks[zone.id], zone.short, zone.id == first_beside) for zone in zones]
    bad = {(p.line, p.column) for p in look.errors if p.file.endswith("occurrence.yaml")}
    plants = {plant.id: plant for plant in look.region.plants}
    written = descend(root, ("occurrence",))
    rows = []
    for plant_id, row in written.items() if isinstance(written, Row) else ():
        if plant_id == "source" or not isinstance(row, Row):
            continue
        cells = [_cell(root, row, plant_id, zone, zone.id == first_beside, bad) for zone in zones]
        shares = [look.region.occurrence.get((zone.id, plant_id)) for zone in zones]
        plant = plants.get(plant_id)
        rows.append(
            PlantRow(
                name=plant.common if plant else plant_id,
                latin=plant.scientific if plant else plant_id,
                href=url_for(
                    "tables.row",
                    region_id=look.id,
                    table="occurrence",
                    part="occurrence",
                    key=plant_id,
                ),
                kite=charts.kite(
                    [0.0 if found is None else found.constancy for found in shares[: len(slope)]],
                    len(slope) / len(zones),
                ),
                cells=cells,
            )
        )
    return Matrix(heads, rows)


def _cell(
    root: Row, row: Row, plant_id: str, zone: Zone, gap: bool, bad: set[tuple[int, int]]
) -> Cell:
    path = ("occurrence", plant_id, zone.id)
    node = row.get(zone.id)
    text = cell_text(root, path) if node is not None else ""
    constancy, _, cover = text.partition(" ")
    wrong = node is not None and any(
        line == node.at.line and node.at.column <= column <= node.at.column + len(text) + 4
        for line, column in bad
    )
    return Cell("/".join(path), constancy, cover, text, gap, f"{zone.letter}, {zone.short}", wrong)
