"""Known plots from two files: plots, and the zone of each with what its site was like."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace
from pathlib import Path

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from builder.key.plots_bind import PLACE_LIMITS, bind_plots, read_zones
from builder.key.plots_file import WrittenPlots, read_plots
from builder.key.plots_text import PLOT, read_table
from builder.problems import CAUTION, Place, Problem, errors, in_order, problem_at
from builder.proof.known import Known

FEW_PLOTS = 5
USUAL_PLOTS = 60
MOST_ANSWERS = 8
"""A site column with more different words than this is no ground question."""


def read_known(
    plots_path: Path,
    zones_path: Path,
    scale: Mapping[str, float] | None = None,
    plants: tuple[str, ...] | None = None,
    names: Mapping[str, str] | None = None,
) -> tuple[Known | None, list[Problem]]:
    """Known plots and everything wrong with the files; None where an error stops the work.

    scale   percent by class code, when cover is written as classes
    plants  plant ids in the order of a region; None: every plant the file names, in its order
    names   other names of those plants, case-folded
    """
    written, problems = read_plots(plots_path, scale)
    zones, lines, more = read_zones(zones_path)
    problems = problems + more
    if written is None or not zones:
        if not errors(problems):
            place = Place(str(zones_path), 1, 1)
            problems.append(
                problem_at(place, "zones-empty", "the file names no zone", "One line a plot.")
            )
        return None, in_order(problems)
    problems += _matching(written, zones, lines, plots_path, zones_path)
    problems += _sizes(written, zones, lines, zones_path)
    if errors(problems):
        return None, in_order(problems)
    found = tuple(written.names) if plants is None else plants
    bound = bind_plots(written, list(found), names)
    zone_ids = tuple(dict.fromkeys(zones[plot] for plot in bound.plots.ids))
    at = {one: z for z, one in enumerate(zone_ids)}
    zone = np.array([at[zones[plot]] for plot in bound.plots.ids])
    ground, answers, more = _sites(zones_path, bound.plots.ids)
    plots = replace(bound.plots, place=ground, answers=answers)
    known = Known(plots, found, zone_ids, zone, (plots_path.name, zones_path.name))
    if plants is None:
        known, told = _without_unfound(known, plots_path)
        more += told
    return known, in_order([*problems, *more])


def _matching(
    written: WrittenPlots,
    zones: Mapping[str, str],
    lines: Mapping[str, int],
    plots_path: Path,
    zones_path: Path,
) -> list[Problem]:
    """Plots without a zone, and lines of zones without a plot."""
    problems = []
    for at, plot in enumerate(written.plot_ids):
        if plot not in zones:
            line = int(written.line[np.flatnonzero(written.plot == at)[0]])
            wrong = f'plot "{plot}" has no zone in {zones_path.name}'
            place = Place(str(plots_path), line, 1)
            problems.append(
                problem_at(place, "zones-missing", wrong, "Add its line plot_id,zone_id.")
            )
    held = set(written.plot_ids)
    seen = {zones[plot] for plot in held if plot in zones}
    empty: set[str] = set()
    for plot, zone in zones.items():
        if plot in held or zone in empty:
            continue
        place = Place(str(zones_path), lines[plot], 1)
        if zone not in seen:
            empty.add(zone)
            wrong = f'zone "{zone}" has no plot in {plots_path.name}'
            problems.append(
                problem_at(place, "zones-empty", wrong, "Add its plots or drop its lines.")
            )
        else:
            wrong = f'plot "{plot}" is not in {plots_path.name}'
            problems.append(problem_at(place, "zones-extra", wrong, "It is left out.", CAUTION))
    return problems


def _sizes(
    written: WrittenPlots, zones: Mapping[str, str], lines: Mapping[str, int], path: Path
) -> list[Problem]:
    """One zone only, zones of one plot (errors), of fewer than five, and few plots in all."""
    members: dict[str, list[str]] = {}
    for plot in written.plot_ids:
        if plot in zones:
            members.setdefault(zones[plot], []).append(plot)
    problems = []
    for zone, plots in members.items():
        place = Place(str(path), lines[plots[0]], 1)
        if len(plots) == 1:
            wrong = f'zone "{zone}" has one plot only'
            problems.append(problem_at(place, "zones-small", wrong, "Give it more, or join it."))
        elif len(plots) < FEW_PLOTS:
            wrong = f'zone "{zone}" has only {len(plots)} plots'
            fix = "Its constancies are rough; five and more are better."
            problems.append(problem_at(place, "zones-small", wrong, fix, CAUTION))
    if len(members) == 1:
        wrong = f'all plots are of one zone, "{next(iter(members))}"'
        problems.append(
            problem_at(Place(str(path), 1, 1), "zones-one", wrong, "A key parts two or more.")
        )
    total = sum(len(plots) for plots in members.values())
    if total < USUAL_PLOTS:
        wrong = f"there are only {total} known plots"
        fix = f"From {USUAL_PLOTS} up a fit can be relied on; read its figures with care."
        problems.append(problem_at(Place(str(path), 1, 1), "zones-few", wrong, fix, CAUTION))
    return problems


def _without_unfound(known: Known, path: Path) -> tuple[Known, list[Problem]]:
    ever = np.asarray((known.plots.steps >= 0).any(axis=0))
    problems = [
        problem_at(
            Place(str(path), 1, 1),
            "plots-plant",
            f'plant "{known.plants[p]}" is found on no plot',
            "It is left out.",
            CAUTION,
        )
        for p in np.flatnonzero(~ever)
    ]
    plots = replace(known.plots, steps=known.plots.steps[:, ever], cover=known.plots.cover[:, ever])
    plants = tuple(plant for p, plant in enumerate(known.plants) if ever[p])
    return replace(known, plots=plots, plants=plants), problems


def _sites(
    path: Path, ids: list[str]
) -> tuple[dict[str, NDArray[np.float64]], dict[str, list[str | None]], list[Problem]]:
    """Heights, slopes and aspects, and every other column with few different words as answers."""
    table, _ = read_table(path)
    place: dict[str, NDArray[np.float64]] = {}
    answers: dict[str, list[str | None]] = {}
    problems: list[Problem] = []
    if table is None:
        return place, answers, problems
    frame = table.frame.assign(**{PLOT: table.frame[PLOT].str.strip()}).drop_duplicates(PLOT)
    frame = frame.set_index(PLOT).reindex(ids)
    for column, name in enumerate(table.frame.columns):
        if name in (PLOT, "zone_id"):
            continue
        words = frame[name].fillna("").str.strip()
        at = Place(str(path), table.header, column + 1)
        if name in PLACE_LIMITS:
            text = words.str.replace(",", ".", regex=False) if table.decimal_comma else words
            values = pd.to_numeric(text, errors="coerce").to_numpy(float)
            low, high = PLACE_LIMITS[name]
            wrong = (words != "").to_numpy() & ~((values >= low) & (values <= high))
            if wrong.any():
                first = int(wrong.argmax())
                row = list(table.frame[PLOT].str.strip()).index(ids[first])
                told = f'{name} "{words.iloc[first]}" is no number from {low:g} to {high:g}'
                here = Place(str(path), int(table.lines[row]), column + 1)
                fix = "It counts as unknown."
                problems.append(problem_at(here, "plots-site", told, fix, CAUTION))
            place[name] = np.where(wrong, np.nan, values)
        elif 2 <= words[words != ""].nunique() <= MOST_ANSWERS:
            answers[name] = [word or None for word in words]
        else:
            wrong_column = f'the column "{name}" is not read'
            fix = f"A ground answer has two to {MOST_ANSWERS} different words."
            problems.append(problem_at(at, "plots-site", wrong_column, fix, CAUTION))
    return place, answers, problems
