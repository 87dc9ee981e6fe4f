"""What a fit from known plots left beside the tables: fit.yaml (figures) and fit.csv (counts).

fit.csv has one row a plant and zone: plots that hold it, those plots by cover step, and the nats
learned for reaching each cover threshold. Where a person has since changed a constancy in
occurrence.yaml, the table's figure is used in place of the count.
"""

from __future__ import annotations

from pathlib import Path
from typing import Any

import numpy as np

from builder.key.compile import Arrays, Fitted
from builder.key.weigh import STEPS, Floats, Weights
from builder.problems import Problem, problem_at
from builder.rows import Node, Row, Value, read_csv, read_yaml
from builder.tables import Region

FIT_YAML, FIT_CSV = "fit.yaml", "fit.csv"
THRESHOLDS = 3
COLUMNS = (
    "plant_id",
    "zone_id",
    *(f"step_{step}" for step in range(STEPS)),
    *(f"nats_{level}" for level in range(THRESHOLDS)),
)
SAME_PCT = 0.06
"""Constancies are written to a tenth of a percent."""


def read_fit(folder: Path, region: Region) -> tuple[Fitted | None, list[Problem]]:
    """The fit beside a region's tables; None where the region was typed by hand."""
    if not (folder / FIT_YAML).is_file():
        return None, []
    root, problems = read_yaml(folder / FIT_YAML, str(folder / FIT_YAML), folder)
    sheet, more = read_csv(folder / FIT_CSV, str(folder / FIT_CSV), folder)
    problems = problems + more
    if root is None or sheet is None:
        return None, problems
    missing = [name for name in COLUMNS if name not in sheet.columns]
    said = {name: _plain(root.get(name)) for name in ("plots", "weights", "session")}
    if missing or not all(isinstance(one, dict) for one in said.values()):
        wrong = f"{FIT_CSV} has no {missing[0]}" if missing else f"{FIT_YAML} is not whole"
        return None, [*problems, problem_at(sheet.at, "fit", wrong, "Run the fit again.")]
    held = np.array([float(said["plots"].get(zone.id, 0)) for zone in region.zones])
    if (held <= 0).any():
        zone = region.zones[int(held.argmin())].id
        fix = "Run the fit again, or remove fit.yaml to go by the tables alone."
        return None, [*problems, problem_at(root.at, "fit", f"{FIT_YAML} knows no plots of {zone}", fix)]
    counts, learned = _by_cell(region, sheet.rows)
    arrays = _arrays(region, held, counts, learned)
    return Fitted(arrays, Weights(**said["weights"]), said["session"]), problems


def correction_nats(learned: Floats, usual: Floats) -> tuple[Floats, Floats]:
    """Nats added to "found" [plant, 5, zone] and to "not found" [plant, zone].

    learned  [plant, threshold, zone] nats for reaching a cover threshold
    usual    [plant, threshold] share of plots that reach it, which centres the answers
    """
    absent = -(usual[:, :, None] * learned).sum(axis=1)
    rising = absent[:, None, :] + np.cumsum(learned, axis=1)
    return np.concatenate([rising, rising[:, -1:], rising[:, :1]], axis=1), absent


def usual_shares(cover_counts: Floats, plots: Floats) -> Floats:
    """Share of plots that reach each cover threshold, [plant, threshold]."""
    by_step = cover_counts.sum(axis=2)
    above = np.cumsum(by_step[:, ::-1], axis=1)[:, ::-1]
    return np.asarray(above[:, :THRESHOLDS] / plots.sum())


def _by_cell(region: Region, rows: list[Row]) -> tuple[Floats, Floats]:
    plants = {plant.id: p for p, plant in enumerate(region.plants)}
    zones = {zone.id: z for z, zone in enumerate(region.zones)}
    counts = np.zeros((len(plants), STEPS, len(zones)))
    learned = np.zeros((len(plants), THRESHOLDS, len(zones)))
    for row in rows:
        cell = [_plain(row.get(name)) for name in COLUMNS]
        p, z = plants.get(str(cell[0])), zones.get(str(cell[1]))
        if p is not None and z is not None:
            counts[p, :, z] = [float(one or 0) for one in cell[2 : 2 + STEPS]]
            learned[p, :, z] = [float(one or 0) for one in cell[2 + STEPS :]]
    return counts, learned


def _arrays(region: Region, held: Floats, counts: Floats, learned: Floats) -> Arrays:
    """Counts, with constancies that were changed by hand in place of what was counted."""
    found, absent = correction_nats(learned, usual_shares(counts, held))
    present = counts.sum(axis=1)
    for p, plant in enumerate(region.plants):
        for z, zone in enumerate(region.zones):
            one = region.occurrence.get((zone.id, plant.id))
            said = one.constancy if one else 0.0
            if abs(100.0 * (said - present[p, z] / held[z])) > SAME_PCT:
                present[p, z] = said * held[z]
    return Arrays(
        present,
        held,
        cover_counts=counts,
        found_correction=found,
        absent_correction=absent,
        prior=held + 1.0,
        overlooked=_own([plant.overlooked for plant in region.plants]),
    )


def _own(values: list[float | None]) -> Floats:
    return np.array([np.nan if value is None else value for value in values], float)


def _plain(node: Node | None) -> Any:
    if isinstance(node, Value):
        return node.value
    if isinstance(node, Row):
        return {name: _plain(below) for name, below in node.items()}
    return [_plain(one) for one in node] if node is not None else None
