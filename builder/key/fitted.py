"""What a fit from known plots left beside the tables: fit.yaml (figures) and fit.csv (counts).

fit.csv has one row a plant and zone: plots that hold it, those with a cover by cover step, and the
nats learned for reaching each cover threshold. Where a person has since changed a constancy in
occurrence.yaml, the table's figure is used in place of the count.
"""

from __future__ import annotations

from pathlib import Path

import numpy as np

from builder.key.compile import Arrays, Fitted
from builder.key.weigh import STEPS, Floats, Weights
from builder.problems import Problem, problem_at
from builder.rows import Row, plain, read_csv, read_yaml
from builder.tables import Region

FIT_YAML, FIT_CSV = "fit.yaml", "fit.csv"
THRESHOLDS = 3
COLUMNS = (
    "plant_id",
    "zone_id",
    "plots",
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
    said = {name: plain(root.get(name)) for name in ("plots", "weights", "session")}
    if missing or not all(isinstance(one, dict) for one in said.values()):
        wrong = f"{FIT_CSV} has no {missing[0]}" if missing else f"{FIT_YAML} is not whole"
        return None, [*problems, problem_at(sheet.at, "fit", wrong, "Run the fit again.")]
    held = np.array([float(said["plots"].get(zone.id, 0)) for zone in region.zones])
    if (held <= 0).any():
        wrong = f"{FIT_YAML} knows no plots of {region.zones[int(held.argmin())].id}"
        fix = "Run the fit again, or remove fit.yaml to go by the tables alone."
        return None, [*problems, problem_at(root.at, "fit", wrong, fix)]
    arrays = _arrays(region, held, *_by_cell(region, sheet.rows))
    return Fitted(arrays, Weights(**said["weights"]), said["session"]), problems


def correction_nats(learned: Floats, usual: Floats) -> tuple[Floats, Floats]:
    """Nats added to "found" [plant, 5, zone] and to "not found" [plant, zone].

    learned  [plant, threshold, zone] nats for reaching a cover threshold
    usual    [plant, threshold] share of plots that reach it, which centres the answers
    """
    absent = -(usual[:, :, None] * learned).sum(axis=1)
    rising = absent[:, None, :] + np.cumsum(learned, axis=1)
    return np.concatenate([rising, rising[:, -1:], rising[:, :1]], axis=1), absent


def usual_shares(found: Floats, cover_counts: Floats, plots: Floats) -> Floats:
    """Share of plots that reach each cover threshold, [plant, threshold].

    found [plant, zone] plots that hold the plant; cover_counts [plant, 4, zone]; plots [zone]
    """
    by_step = cover_counts.sum(axis=2)
    above = np.cumsum(by_step[:, ::-1], axis=1)[:, ::-1][:, 1:THRESHOLDS]
    return np.asarray(np.column_stack([found.sum(axis=1), above]) / plots.sum())


def _by_cell(region: Region, rows: list[Row]) -> tuple[Floats, Floats, Floats]:
    plants = {plant.id: p for p, plant in enumerate(region.plants)}
    zones = {zone.id: z for z, zone in enumerate(region.zones)}
    found = np.zeros((len(plants), len(zones)))
    counts = np.zeros((len(plants), STEPS, len(zones)))
    learned = np.zeros((len(plants), THRESHOLDS, len(zones)))
    for row in rows:
        cell = [plain(row.get(name)) for name in COLUMNS]
        p, z = plants.get(str(cell[0])), zones.get(str(cell[1]))
        if p is not None and z is not None:
            figures = [float(one or 0) for one in cell[2:]]
            found[p, z] = figures[0]
            counts[p, :, z] = figures[1 : 1 + STEPS]
            learned[p, :, z] = figures[1 + STEPS :]
    return found, counts, learned


def _arrays(region: Region, held: Floats, found: Floats, counts: Floats, learned: Floats) -> Arrays:
    """Counts, with constancies that were changed by hand in place of what was counted."""
    more, less = correction_nats(learned, usual_shares(found, counts, held))
    present = found.copy()
    for p, plant in enumerate(region.plants):
        for z, zone in enumerate(region.zones):
            one = region.occurrence.get((zone.id, plant.id))
            said = one.constancy if one else 0.0
            if abs(100.0 * (said - found[p, z] / held[z])) > SAME_PCT:
                present[p, z] = said * held[z]
    return Arrays(
        present,
        held,
        cover_counts=counts,
        found_correction=more,
        absent_correction=less,
        prior=held + 1.0,
        overlooked=_own([plant.overlooked for plant in region.plants]),
    )


def _own(values: list[float | None]) -> Floats:
    return np.array([np.nan if value is None else value for value in values], float)
