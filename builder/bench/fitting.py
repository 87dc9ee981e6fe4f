"""Fit: the counting step at two sizes with R beside it, and the whole fit with corrections."""

from __future__ import annotations

import importlib
import resource
import shutil
import subprocess
from statistics import median

import numpy as np

from builder.bench.measure import (
    Goal,
    Measure,
    NotHere,
    Reference,
    Setting,
    Taken,
    growth_ratio,
    seconds,
)
from builder.bench.plots import cover_table, write_findings, write_zones
from builder.formulas.fidelity import indval, indval_p
from builder.proof import baselines
from builder.proof.fit import fit_region

PLANTS, ZONES, PERMUTATIONS = 169, 12, 999
R_PLOTS = 1_000
R_SECONDS = 120
FOLDS = 10
LABDSV = """
suppressMessages(library(labdsv))
given <- as.data.frame(read.csv(commandArgs(TRUE)[1]))
zone <- given$zone; given$zone <- NULL
given <- given[, colSums(given) > 0]
taken <- system.time(made <- indval(given, zone, numitr = %d))
cat(taken[["elapsed"]], "\\n")
"""


def _counting(setting: Setting, plots: int) -> tuple[tuple[float, ...], int]:
    cover, zone = cover_table(plots, PLANTS, ZONES)
    turns = setting.size(PERMUTATIONS, 49)

    def work() -> None:
        indval(cover, zone)
        indval_p(cover, zone, turns)

    return seconds(work, setting.runs(3 if plots < 50_000 else 2)), turns


def small_counting(setting: Setting) -> Taken:
    """IndVal and its test on 10,000 plots; R's labdsv and ours on a size that R can do."""
    taken, turns = _counting(setting, setting.size(10_000, 2_000))
    note = f"{turns} permutations, {ZONES} zones."
    try:
        return Taken(taken, _labdsv(setting, turns), note)
    except NotHere as why:
        return Taken(taken, None, f"{note} No reference: {why}")


def _labdsv(setting: Setting, turns: int) -> Reference:
    if shutil.which("Rscript") is None:
        raise NotHere("R is not installed, so its labdsv cannot be run beside it.")
    plots = setting.size(R_PLOTS, 200)
    cover, zone = cover_table(plots, PLANTS, ZONES)
    path = setting.folder / "labdsv.csv"
    head = ",".join([*(f"p{at}" for at in range(PLANTS)), "zone"])
    table = np.column_stack([cover, zone + 1])
    np.savetxt(path, table, fmt="%d", delimiter=",", header=head, comments="")
    script = setting.folder / "labdsv.R"
    script.write_text(LABDSV % turns, encoding="utf-8")
    try:
        ran = subprocess.run(
            ["Rscript", "--vanilla", str(script), str(path)],
            capture_output=True, text=True, timeout=R_SECONDS, check=True,
        )  # fmt: skip
    except subprocess.TimeoutExpired:
        raise NotHere(f"R's labdsv took more than {R_SECONDS} s on {plots} plots.") from None
    except subprocess.CalledProcessError as error:
        last = (error.stderr.strip().splitlines() or ["no words"])[-1]
        raise NotHere(f"R could not run labdsv: {last}.") from None
    own = seconds(lambda: (indval(cover, zone), indval_p(cover, zone, turns)), setting.runs(3))
    return Reference(f"R labdsv, {plots} plots", (float(ran.stdout.split()[-1]),), own)


def large_counting(setting: Setting) -> Taken:
    """The same on 100,000 plots, and the most memory that this run has held."""
    taken, turns = _counting(setting, setting.size(100_000, 10_000))
    held = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1e6
    return Taken(taken, None, f"{turns} permutations; {held:.1f} GB held at most (goal 4).")


def whole_fit(setting: Setting) -> Taken:
    """beltbook fit, from files to a region's folder; a random forest's ten folds beside it."""
    plots = setting.size(160, 60)
    plants = setting.size(PLANTS, 40)
    zones = setting.size(8, 3)
    cover, zone = cover_table(plots, plants, zones)
    ids = [f"p{at}" for at in range(plots)]
    names = tuple(f"plant_{at}" for at in range(plants))
    found = write_findings(setting.folder / "fit_plots.csv", ids, names, cover)
    known = write_zones(setting.folder / "fit_zones.csv", ids, [f"zone_{z}" for z in zone])
    turn = iter(range(99))

    def work() -> None:
        made = fit_region(found, known, setting.folder / f"fitted_{next(turn)}")
        assert made.folder is not None, made.problems

    taken = seconds(work, 1)
    note = f"{plots} plots x {plants} plants, {zones} zones."
    if not baselines.available():
        return Taken(taken, None, f"{note} No reference: {baselines.MISSING}.")
    folds = importlib.import_module("sklearn.model_selection").cross_val_predict
    forest = baselines.models(0)["random_forest"]
    dealt = importlib.import_module("sklearn.model_selection").KFold(FOLDS)
    beside = seconds(lambda: folds(forest, cover, zone, cv=dealt), 1)
    name = f"scikit-learn random forest, {baselines.TREES} trees, {FOLDS} folds"
    return Taken(taken, Reference(name, beside), note)


def growth(setting: Setting) -> Taken:
    """The counting step at 1, 3 and 10 times the plots."""
    first = setting.size(3_000, 300)
    by_size = {}
    for times in (1, 3, 10):
        cover, zone = cover_table(first * times, PLANTS, ZONES)
        run = seconds(lambda c=cover, z=zone: indval_p(c, z, 99), setting.runs(3))  # type: ignore[misc]
        by_size[f"{first * times} plots"] = median(run)
    return Taken((growth_ratio(by_size),), None, "99 permutations.", by_size)


MEASURES = (
    Measure("fit-10000", "IndVal and its test, 10,000 plots x 169 plants", "s",
            small_counting, Goal(2)),
    Measure("fit-100000", "IndVal and its test, 100,000 plots x 169 plants", "s",
            large_counting, Goal(15)),
    Measure("fit-whole", "Fit with corrections, 160 plots x 169 plants, from files", "s",
            whole_fit, Goal(60)),
    Measure("fit-growth", "Fit, counting step: cost of 10 times the plots", "times", growth),
)  # fmt: skip
