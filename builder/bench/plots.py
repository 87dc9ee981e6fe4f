"""Simulated plots of a region, in arrays and as files, for measures of fit and call."""

from __future__ import annotations

import csv
from pathlib import Path

import numpy as np
from numpy.typing import NDArray

from builder.key.compile import arrays_of
from builder.key.plots import Plots
from builder.key.simulate import Field, draw, erring_truth, observe
from builder.tables import Region

AT_ONCE = 10_000
FILLED = 0.12
"""Share of filled cells in a table of plots by plants, as in open vegetation tables."""
Floats = NDArray[np.float64]
Whole = NDArray[np.int64]


def cover_table(plots: int, plants: int, zones: int, seed: int = 0) -> tuple[Floats, Whole]:
    """Cover in whole percent of so many plots and plants, and each plot's zone.

    Every plant has its own chance in every zone; about one cell in eight is filled.
    """
    rng = np.random.default_rng(seed)
    zone = np.concatenate([np.arange(zones), rng.integers(0, zones, plots - zones)])
    chance = rng.beta(0.3, 0.3 / FILLED - 0.3, (zones, plants))
    cover = np.zeros((plots, plants))
    for start in range(0, plots, AT_ONCE):
        part = zone[start : start + AT_ONCE]
        found = rng.random((len(part), plants)) < chance[part]
        amount = np.clip(np.round(rng.lognormal(1.0, 1.0, found.shape)), 1, 95)
        cover[start : start + AT_ONCE] = np.where(found, amount, 0.0)
    return cover, zone


def region_plots(region: Region, count: int, seed: int = 0) -> tuple[Plots, Whole]:
    """Plots of a region as a person would write them down, and each one's zone."""
    rng = np.random.default_rng(seed)
    arrays, field = arrays_of(region), Field()
    constancy = arrays.present / arrays.plots
    layer = [plant.form for plant in region.plants]
    assert arrays.cover_mean_pct is not None
    truth = erring_truth(constancy, arrays.cover_mean_pct, layer, field, rng)
    zone = rng.integers(0, len(region.zones), count)
    parts = []
    for start in range(0, count, AT_ONCE):
        present, cover = draw(truth, zone[start : start + AT_ONCE], field, rng)
        parts.append(observe(present, cover, field, rng))
    steps = np.concatenate([part.steps for part in parts])
    cover32 = np.concatenate([part.cover for part in parts])
    return Plots([f"s{at:06d}" for at in range(count)], steps, cover32), zone


def write_findings(path: Path, ids: list[str], plants: tuple[str, ...], cover: Floats) -> Path:
    """Findings as plot_id,plant_id,cover_pct. Returns the path."""
    rows, columns = np.nonzero(cover > 0)
    with path.open("w", encoding="utf-8", newline="") as file:
        lines = csv.writer(file, lineterminator="\n")
        lines.writerow(("plot_id", "plant_id", "cover_pct"))
        pct = [f"{value:.1f}" for value in cover[rows, columns]]
        lines.writerows(
            (ids[row], plants[column], value)
            for row, column, value in zip(rows, columns, pct, strict=True)
        )
    return path


def write_zones(path: Path, ids: list[str], names: list[str]) -> Path:
    """Known zones as plot_id,zone_id. Returns the path."""
    lines = [f"{plot},{zone}" for plot, zone in zip(ids, names, strict=True)]
    path.write_text("\n".join(["plot_id,zone_id", *lines]) + "\n", encoding="utf-8")
    return path
