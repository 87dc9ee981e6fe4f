"""Bulk calls: all plants at once, and as a person who answers prompts."""

from __future__ import annotations

from statistics import median

import numpy as np

from builder.bench.measure import Goal, Measure, Setting, Taken, growth_ratio, seconds
from builder.bench.plots import region_plots, write_findings
from builder.key.bulk import call_plots
from builder.steps.calling import call_file

ANSWERS = 8


def whole_table(setting: Setting) -> Taken:
    """Calls of plots that are already in memory."""
    count = setting.size(100_000, 2_000)
    plots, _ = region_plots(setting.region, count)
    taken = seconds(lambda: call_plots(setting.pack, plots), setting.runs(2))
    return Taken(taken, None, f"{count:,} plots x {len(setting.region.plants)} plants in memory.")


def whole_file(setting: Setting) -> Taken:
    """beltbook call: tables checked, file read, plots called, calls written."""
    count = setting.size(100_000, 2_000)
    plots, _ = region_plots(setting.region, count)
    path = setting.folder / "call_plots.csv"
    write_findings(path, plots.ids, setting.region.plant_ids, plots.cover.astype(float))
    findings = int((plots.steps >= 0).sum())
    taken = seconds(lambda: call_file(setting.demo, path, setting.folder / "calls.csv"), 1)
    path.unlink()
    return Taken(taken, None, f"{count:,} plots, {findings:,} findings, checks and files included.")


def prompted(setting: Setting) -> Taken:
    """Calls in which a person names three plants and follows the prompts."""
    count = setting.size(10_000, 500)
    plots, _ = region_plots(setting.region, count)
    taken = seconds(lambda: call_plots(setting.pack, plots, answers=ANSWERS), 1)
    return Taken(taken, None, f"{count:,} plots, {ANSWERS} answers at most.")


def growth(setting: Setting) -> Taken:
    """Calls at 1, 3 and 10 times the plots."""
    first = setting.size(5_000, 500)
    plots, _ = region_plots(setting.region, 10 * first)
    by_size = {}
    for times in (1, 3, 10):
        part = plots.take(np.arange(first * times))
        run = seconds(lambda some=part: call_plots(setting.pack, some), setting.runs(3))  # type: ignore[misc]
        by_size[f"{first * times} plots"] = median(run)
    return Taken((growth_ratio(by_size),), None, "", by_size)


MEASURES = (
    Measure("call-100000", "Bulk call, every searched plant counts", "s", whole_table, Goal(10)),
    Measure("call-file", "beltbook call, from file to file", "s", whole_file, Goal(10)),
    Measure("call-answers", "beltbook call --answers 8", "s", prompted),
    Measure("call-growth", "Bulk call: cost of 10 times the plots", "times", growth),
)
