"""Written plots tied to a pack's plants, and their sites, zones and answers."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace
from pathlib import Path
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from builder.key.cover import cover_step
from builder.key.plots import ABSENT, NO_COVER, NOT_SEARCHED, Plots
from builder.key.plots_file import WrittenPlots
from builder.key.plots_text import PLOT, Table, read_table
from builder.key.prepare import Pack
from builder.problems import CAUTION, Place, Problem, in_order, nearest, problem_at
from builder.tables import Region

PLACE_LIMITS = {
    "height_m": (-500.0, 9000.0),
    "slope_pct": (0.0, 1000.0),
    "aspect_deg": (0.0, 360.0),
}
SITE_CHECK = "plots-site"


@dataclass(frozen=True)
class Bound:
    """Plots in a pack's order, and how often names occur that it does not know."""

    plots: Plots
    unknown: dict[str, int]


def names_of(region: Region) -> dict[str, str]:
    """Every name a plots file may use for a plant: id, codes, scientific name, synonyms."""
    names: dict[str, str] = {}
    for plant in region.plants:
        for name in (*plant.synonyms, *plant.codes, plant.scientific, plant.id):
            names[name.casefold()] = plant.id
    return names


def bind_plots(
    written: WrittenPlots,
    plant_ids: list[str],
    names: Mapping[str, str] | None = None,
    listed_only: bool = False,
) -> Bound:
    """Findings in arrays.

    plant_ids    plants in the order of the pack (or of a fit)
    names        other names by case-folded word, as names_of() makes them
    listed_only  plants not listed for a plot were not searched for; else they were not found
    """
    at = {one: p for p, one in enumerate(plant_ids)}
    known = [at.get((names or {}).get(one.casefold(), one), -1) for one in written.names]
    plant = np.array(known, int)[written.name] if len(written.name) else np.zeros(0, int)
    here = plant >= 0
    shape = (len(written.plot_ids), len(plant_ids))
    steps = np.full(shape, NOT_SEARCHED if listed_only else ABSENT, np.int8)
    cover = np.zeros(shape, np.float32)
    rows, columns, pct = written.plot[here], plant[here], written.cover_pct[here]
    step = np.where(np.isnan(pct), NO_COVER, cover_step(np.nan_to_num(pct)))
    step = np.where(pct == 0, ABSENT, step)
    keep = _most_per_plant(rows, columns, step, pct)
    steps[rows[keep], columns[keep]] = step[keep]
    cover[rows[keep], columns[keep]] = np.nan_to_num(pct[keep])
    lost = pd.Series(written.name[~here]).value_counts()
    unknown = {written.names[int(k)]: int(n) for k, n in lost.items()}
    return Bound(Plots(list(written.plot_ids), steps, cover), dict(sorted(unknown.items())))


def _most_per_plant(rows: Any, columns: Any, step: Any, pct: Any) -> NDArray[np.int64]:
    """Order in which a plant under two names ends with its larger cover."""
    order: NDArray[np.int64] = np.lexsort((np.nan_to_num(pct), step >= 0, columns, rows))
    return order


def read_zones(path: Path) -> tuple[dict[str, str], dict[str, int], list[Problem]]:
    """Known zones: plot_id,zone_id. Returns zone by plot, line by plot, problems."""
    table, problems = read_table(path)
    if table is None:
        return {}, {}, problems
    shown = str(path)
    missing = [name for name in (PLOT, "zone_id") if name not in table.frame.columns]
    if missing:
        place = Place(shown, table.header, 1)
        wrong = f'the header has no column "{missing[0]}"'
        fix = "The columns are plot_id,zone_id."
        return {}, {}, [*problems, problem_at(place, "plots-header", wrong, fix)]
    zones: dict[str, str] = {}
    lines: dict[str, int] = {}
    columns = (table.frame[PLOT].str.strip(), table.frame["zone_id"].str.strip(), table.lines)
    for plot, zone, line in zip(*columns, strict=True):
        place = Place(shown, int(line), 1)
        if plot == "" or zone == "":
            wrong = "a plot or zone is empty"
            problems.append(problem_at(place, "plots-empty-cell", wrong, "Fill both cells."))
        elif plot in zones and zones[plot] != zone:
            wrong = f'plot "{plot}" has a second zone (first on line {lines[plot]})'
            problems.append(problem_at(place, "plots-twice", wrong, "Keep one line a plot."))
        else:
            zones.setdefault(plot, zone)
            lines.setdefault(plot, int(line))
    return zones, lines, in_order(problems)


def read_sites(path: Path, pack: Pack, plots: Plots) -> tuple[Plots, list[Problem]]:
    """Plots with what a site table says of them.

    Columns, all but plot_id optional: height_m, slope_pct, aspect_deg, month, disturbance, and
    ground question ids with the value of the answer (or cant_tell).
    """
    table, problems = read_table(path)
    if table is None:
        return plots, problems
    shown = str(path)
    if PLOT not in table.frame.columns:
        place = Place(shown, table.header, 1)
        fix = "The first column is plot_id."
        return plots, [*problems, problem_at(place, "plots-header", 'no column "plot_id"', fix)]
    reader = _Sites(table, shown, {one: at for at, one in enumerate(plots.ids)}, problems)
    reader.match()
    made: dict[str, Any] = {"place": {}, "answers": {}}
    questions = {one["id"]: one for one in pack["questions"]}
    disturbances = [one["id"] for one in pack["disturbances"]]
    for name in table.frame.columns:
        if name == PLOT:
            continue
        if name in PLACE_LIMITS:
            made["place"][name] = reader.numbers(name, PLACE_LIMITS[name])
        elif name == "month":
            made["month"] = np.nan_to_num(reader.numbers(name, (1.0, 12.0))).astype(int)
        elif name == "disturbance":
            made["disturbance"] = reader.words(name, disturbances)
        elif name in questions:
            values = [one["value"] for one in questions[name]["answers"]]
            told = reader.words(name, [*values, "cant_tell"])
            made["answers"][name] = [None if one == "cant_tell" else one for one in told]
        else:
            known = [*PLACE_LIMITS, "month", "disturbance", *questions]
            reader.unknown_column(name, known)
    return replace(plots, **made), in_order(reader.problems)


@dataclass
class _Sites:
    """A site table being read; row [plot] is its line in the table, -1 for none."""

    table: Table
    shown: str
    at: dict[str, int]
    problems: list[Problem]
    row: Any = None

    def match(self) -> None:
        self.row = np.full(len(self.at), -1)
        for k, plot in enumerate(self.table.frame[PLOT].str.strip()):
            where = self.at.get(plot)
            if where is None:
                self._note(k, PLOT, f'plot "{plot}" is not among the plots', "", CAUTION)
            elif self.row[where] >= 0:
                self._note(k, PLOT, f'plot "{plot}" stands here a second time', "Keep one line.")
            else:
                self.row[where] = k

    def numbers(self, name: str, limits: tuple[float, float]) -> NDArray[np.float64]:
        words = self.table.frame[name].str.strip()
        text = words.str.replace(",", ".", regex=False) if self.table.decimal_comma else words
        values = pd.to_numeric(text, errors="coerce").to_numpy(float)
        low, high = limits
        for k in np.flatnonzero(np.isnan(values) & (words != "").to_numpy()):
            self._note(int(k), name, f'"{words[k]}" is no number', "Write a plain number.")
        for k in np.flatnonzero((values < low) | (values > high)):
            fix = f"It lies between {low:g} and {high:g}."
            self._note(int(k), name, f'{name} "{words[k]}" is out of range', fix)
        return np.where(self.row >= 0, values[self.row], np.nan)

    def words(self, name: str, known: list[str]) -> list[str | None]:
        values = self.table.frame[name].str.strip().tolist()
        for k, value in enumerate(values):
            if value and value not in known:
                self._note(k, name, f'"{value}" is no value of {name}', nearest(value, known))
        return [values[k] or None if k >= 0 else None for k in self.row]

    def unknown_column(self, name: str, known: list[str]) -> None:
        place = Place(self.shown, self.table.header, self._column(name))
        wrong = f'the column "{name}" is not read'
        self.problems.append(problem_at(place, SITE_CHECK, wrong, nearest(name, known), CAUTION))

    def _column(self, name: str) -> int:
        return list(self.table.frame.columns).index(name) + 1

    def _note(self, k: int, name: str, wrong: str, fix: str, severity: str = "error") -> None:
        place = Place(self.shown, int(self.table.lines[k]), self._column(name))
        self.problems.append(problem_at(place, SITE_CHECK, wrong, fix, severity))
