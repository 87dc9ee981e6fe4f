"""A file of plots as written, long or wide, with everything that is wrong in it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from builder.key.plots_text import PLOT, Table, read_table
from builder.problems import Place, Problem, in_order, problem_at

PLANT = "plant_id"
COVERS = ("cover_pct", "cover_class", "cover")
SHOWN_OF_A_KIND = 50
LONG_FIX = "The columns are plot_id,plant_id,cover_pct, or plot_id and one column a plant."


@dataclass(frozen=True)
class WrittenPlots:
    """Findings as written; rows point into plot_ids and names.

    plot, name  [row] indexes; cover_pct [row] percent, 0 for written as not there,
    not-a-number for there without a cover; line [row] in the file
    """

    plot_ids: list[str]
    names: list[str]
    plot: NDArray[np.int64]
    name: NDArray[np.int64]
    cover_pct: NDArray[np.float64]
    line: NDArray[np.int64]


def read_plots(
    path: Path, scale: Mapping[str, float] | None = None
) -> tuple[WrittenPlots | None, list[Problem]]:
    """Plots of a CSV file and all its problems; None where it cannot be used at all.

    Long: plot_id,plant_id,cover_pct (or cover_class with a scale); wide: plot_id and one column a
    plant, an empty cell or 0 is "not there". Comma, semicolon or tab; with semicolon or tab a
    decimal comma; with or without byte order mark; not UTF-8 is read as Windows-1252.

    scale  percent by class code, when cover is written as classes
    """
    table, problems = read_table(path)
    if table is None:
        return None, problems
    shown = str(path)
    if PLOT not in table.frame.columns:
        found = ", ".join(table.frame.columns[:6])
        wrong = f'the header has no column "{PLOT}" (it has {found})'
        return None, [
            *problems,
            problem_at(Place(shown, table.header, 1), "plots-header", wrong, LONG_FIX),
        ]
    rows, more = _wide(table, shown) if PLANT not in table.frame.columns else _long(table, shown)
    problems += more
    if rows is None:
        return None, in_order(problems)
    cover, more = _cover(rows, scale, table, shown)
    problems += more + _twice(rows, shown)
    if not len(rows):
        start = Place(shown, table.header + 1, 1)
        problems.append(problem_at(start, "plots-empty", "the file holds no plot", LONG_FIX))
        return None, in_order(problems)
    plot, plot_ids = pd.factorize(rows[PLOT])
    name, names = pd.factorize(rows[PLANT])
    written = WrittenPlots(
        [str(one) for one in plot_ids],
        [str(one) for one in names],
        plot,
        name,
        cover,
        rows["line"].to_numpy(),
    )
    return written, in_order(problems)


def _long(table: Table, shown: str) -> tuple[pd.DataFrame | None, list[Problem]]:
    frame = table.frame
    cover = next((name for name in COVERS if name in frame.columns), None)
    if cover is None:
        wrong = "the header has no column for cover"
        return None, [problem_at(Place(shown, table.header, 1), "plots-header", wrong, LONG_FIX)]
    rows = pd.DataFrame(
        {
            PLOT: _stripped(frame[PLOT]),
            PLANT: _stripped(frame[PLANT]),
            "cover": _stripped(frame[cover]),
            "line": table.lines,
        }
    )
    column = list(frame.columns).index
    empty = [
        (PLOT, "plots-empty-cell", "the plot has no id", "Write the plot's id."),
        (
            PLANT,
            "plots-empty-cell",
            "the plant has no name",
            "Write the plant's id, or drop the line.",
        ),
    ]
    problems: list[Problem] = []
    for name, check, wrong, fix in empty:
        bad = rows.index[rows[name] == ""]
        places = [Place(shown, int(rows["line"][at]), column(name) + 1) for at in bad]
        problems += _some([problem_at(place, check, wrong, fix) for place in places])
    rows["column"] = column(cover) + 1
    return rows[(rows[PLOT] != "") & (rows[PLANT] != "")].reset_index(drop=True), problems


def _stripped(column: pd.Series) -> NDArray[np.object_]:
    """A column's cells without blanks about them; a word that stands often is looked at once."""
    code, words = pd.factorize(column)
    stripped: NDArray[np.object_] = np.array([word.strip() for word in words], object)
    return np.asarray(stripped[code])


def _wide(table: Table, shown: str) -> tuple[pd.DataFrame | None, list[Problem]]:
    frame = table.frame
    if len(frame.columns) < 2 or any(name in frame.columns for name in COVERS):
        wrong = f'the header has no column "{PLANT}"'
        return None, [problem_at(Place(shown, table.header, 1), "plots-header", wrong, LONG_FIX)]
    ids = frame[PLOT].str.strip()
    problems = _some(
        [
            problem_at(
                Place(shown, int(table.lines[at]), 1),
                "plots-twice",
                f'the plot "{ids[at]}" stands here a second time',
                "Keep one line a plot.",
            )
            for at in np.flatnonzero(ids.duplicated())
        ]
    )
    plants = [name for name in frame.columns if name != PLOT]
    rows = frame.assign(**{PLOT: ids, "line": table.lines}).melt(
        [PLOT, "line"], plants, var_name=PLANT, value_name="cover"
    )
    rows["cover"] = rows["cover"].str.strip()
    rows.loc[rows["cover"] == "", "cover"] = "0"
    rows["column"] = rows[PLANT].map({name: at + 1 for at, name in enumerate(frame.columns)})
    rows = rows.sort_values("line", kind="stable").drop_duplicates([PLOT, PLANT])
    return rows.reset_index(drop=True), problems


def _cover(
    rows: pd.DataFrame, scale: Mapping[str, float] | None, table: Table, shown: str
) -> tuple[NDArray[np.float64], list[Problem]]:
    """Cover as percent, and what is wrong with it."""
    words = rows["cover"]
    if scale is not None:
        percent = words.map({**dict(scale), "0": 0.0, "": np.nan}).to_numpy(float)
        codes = set(scale) | {"0", ""}
        bad = np.flatnonzero(~words.isin(codes))
        fix = f"The classes are {', '.join(scale)}."
        wrongs = [f'"{words[at]}" is no class of the scale' for at in bad]
        return percent, _at(rows, bad, shown, "plots-class", wrongs, fix)
    text = words.str.replace(",", ".", regex=False) if table.decimal_comma else words
    numbers = pd.to_numeric(text, errors="coerce").to_numpy(float)
    no_number = np.isnan(numbers) & (words != "").to_numpy()
    problems: list[Problem] = []
    kinds: list[tuple[Any, str, str, str]] = [
        (no_number, "plots-number", "is no number", "Write percent; classes need --scale NAME."),
        (numbers < 0, "plots-range", "is below 0", "Cover lies between 0 and 100 percent."),
        (numbers > 100, "plots-range", "is above 100", "Cover lies between 0 and 100 percent."),
        (np.isinf(numbers), "plots-range", "is no cover", "Cover lies between 0 and 100 percent."),
    ]
    for mask, check, wrong, fix in kinds:
        bad = np.flatnonzero(mask)
        problems += _at(
            rows, bad, shown, check, [f'cover "{words[at]}" {wrong}' for at in bad], fix
        )
    return numbers, problems


def _twice(rows: pd.DataFrame, shown: str) -> list[Problem]:
    """The same plant a second time on the same plot."""
    again = rows.duplicated([PLOT, PLANT])
    if not again.any():
        return []
    first = rows[~again].set_index([PLOT, PLANT])["line"].to_dict()
    bad = np.flatnonzero(again)
    wrongs = [
        f'"{rows[PLANT][at]}" stands on plot "{rows[PLOT][at]}" a second time '
        f"(first on line {first[rows[PLOT][at], rows[PLANT][at]]})"
        for at in bad[: SHOWN_OF_A_KIND + 1]
    ]
    return _at(rows, bad[: len(wrongs)], shown, "plots-twice", wrongs, "Keep one of the two lines.")


def _at(
    rows: pd.DataFrame,
    bad: NDArray[np.int64],
    shown: str,
    check: str,
    wrongs: list[str],
    fix: str,
) -> list[Problem]:
    places = [
        Place(shown, int(rows["line"][at]), int(rows["column"][at]) if "column" in rows else 1)
        for at in bad
    ]
    return _some(
        [problem_at(*one, fix) for one in zip(places, [check] * len(bad), wrongs, strict=True)]
    )


def _some(problems: list[Problem]) -> list[Problem]:
    """The first of many of one kind, and how many more there are."""
    if len(problems) <= SHOWN_OF_A_KIND:
        return problems
    more = len(problems) - SHOWN_OF_A_KIND
    last = problems[SHOWN_OF_A_KIND]
    note = problem_at(last.place, last.check, f"{more} more lines like this one", last.fix)
    return [*problems[:SHOWN_OF_A_KIND], note]
