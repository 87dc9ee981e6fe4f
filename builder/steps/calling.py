"""A whole file of plots, called by a region's key."""

from __future__ import annotations

import csv
import os
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from pathlib import Path

from builder.key.bulk import call_plots
from builder.key.plots_bind import bind_plots, names_of, read_sites
from builder.key.plots_file import read_plots
from builder.key.scales import SCALES
from builder.pack import compile_pack
from builder.problems import Problem, errors
from builder.steps.checking import check_regions, region_of
from builder.steps.refusals import Stopped, ToldByStep
from builder.tables import Region

COLUMNS = (
    "plot_id",
    "verdict",
    "zone_id",
    "belief",
    "next_zone_id",
    "next_belief",
    "answers",
    "fit",
)


@dataclass(frozen=True)
class Called:
    """How many plots were called, what the region does not know of the file, cautions."""

    plots: int
    unknown: dict[str, int]
    problems: list[Problem]


class UnknownName(ToldByStep):
    """A scale or disturbance that neither the region nor the house knows; says which there are."""

    def __init__(self, what: str, name: str, known: Iterable[str]) -> None:
        super().__init__(f'there is no {what} named "{name}". Known: {", ".join(known) or "none"}.')


def scale_of(region: Region | None, name: str | None) -> dict[str, float] | None:
    """Percent by class code of a region's own or a published scale. UnknownName for another."""
    if name is None:
        return None
    own = region.cover_scale if region is not None else None
    if own is not None and name == own.id:
        return {one.code: one.mid_pct for one in own.classes}
    if name not in SCALES:
        raise UnknownName("cover scale", name, [*([own.id] if own is not None else []), *SCALES])
    return dict(SCALES[name])


def call_file(
    folder: Path,
    plots_csv: Path,
    out: Path,
    *,
    scale: str | None = None,
    sites_csv: Path | None = None,
    answers: int | None = None,
    month: int | None = None,
    disturbance: str | None = None,
    listed_only: bool = False,
    progress: Callable[[int, int], None] | None = None,
) -> Called:
    """Calls every plot of a file and writes one line a plot, whole or not at all.

    A zone made from known plots is written as those plots name it (plots_id).

    Raises Stopped when tables or plots have errors, UnknownName for a scale or
    disturbance nobody knows.
    """
    (checked,) = check_regions([folder])
    region = region_of(checked)
    known = [one.id for one in region.disturbances]
    if disturbance is not None and disturbance not in known:
        raise UnknownName("disturbance", disturbance, known)
    written, problems = read_plots(plots_csv, scale_of(region, scale))
    if written is None or errors(problems):
        raise Stopped(problems)
    bound = bind_plots(written, list(region.plant_ids), names_of(region), listed_only)
    pack, plots = compile_pack(region, checked.fitted), bound.plots
    if sites_csv is not None:
        plots, more = read_sites(sites_csv, pack, plots)
        problems += more
        if errors(more):
            raise Stopped(problems)
    calls = call_plots(
        pack, plots, answers=answers, month=month, disturbance=disturbance, progress=progress
    )
    shown = {zone.id: zone.plots_id or zone.id for zone in region.zones}
    for column in ("zone_id", "next_zone_id"):
        calls[column] = [shown.get(zone_id, zone_id) for zone_id in calls[column]]
    part = out.with_name(f".{out.name}.part")
    with part.open("w", encoding="utf-8", newline="") as file:
        lines = csv.writer(file, lineterminator="\n")
        lines.writerow(COLUMNS)
        lines.writerows(zip(*(calls[name] for name in COLUMNS), strict=True))
    os.replace(part, out)
    return Called(len(plots), bound.unknown, problems)
