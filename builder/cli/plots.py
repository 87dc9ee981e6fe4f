"""Commands about plots: call, prove, fit."""

from __future__ import annotations

import argparse
import json
from pathlib import Path
from typing import Any

from builder.cli.telling import Told, say, say_problems, say_share

SCALE_HELP = "cover is written in classes of this scale"


def add_commands(commands: Any) -> None:
    """Registers the family's commands."""
    call = commands.add_parser("call", help="call a whole file of plots")
    call.add_argument("region", type=Path, help="folder of tables")
    call.add_argument("plots", type=Path, help="CSV: plot_id,plant_id,cover_pct")
    call.add_argument("--out", type=Path, required=True, help="CSV of calls to write")
    call.add_argument(
        "--answers", type=int, metavar="N", help="answer as a person would, N at most"
    )
    call.add_argument("--scale", metavar="NAME", help=SCALE_HELP)
    call.add_argument("--sites", type=Path, metavar="CSV", help="heights, slopes, months, answers")
    call.add_argument(
        "--month", type=int, choices=range(1, 13), metavar="1-12", help="of all plots"
    )
    call.add_argument("--disturbance", metavar="ID", help="of all plots that state none")
    call.add_argument(
        "--listed-only",
        action="store_true",
        help="plants not listed were not searched for; else they were not found",
    )
    call.set_defaults(run=run_call)

    prove = commands.add_parser("prove", help="say how often the key is right")
    prove.add_argument("region", type=Path, help="folder of tables")
    prove.add_argument("--plots", type=Path, metavar="CSV", help="known plots; needs --zones")
    prove.add_argument("--zones", type=Path, metavar="CSV", help="their zones: plot_id,zone_id")
    prove.add_argument("--scale", metavar="NAME", help=SCALE_HELP)
    prove.add_argument("--seed", type=int, default=0, help="the same seed gives the same figures")
    prove.add_argument("--json", type=Path, metavar="OUT", help="write the whole proof there")
    prove.add_argument("--html", type=Path, metavar="OUT", help="write it as a page with charts")
    prove.set_defaults(run=run_prove)

    fit = commands.add_parser("fit", help="make a whole region from known plots")
    fit.add_argument("plots", type=Path, help="CSV: plot_id,plant_id,cover_pct")
    fit.add_argument(
        "--zones",
        type=Path,
        required=True,
        metavar="CSV",
        help="plot_id,zone_id and, if known, height_m, slope_pct, aspect_deg, ground answers",
    )
    fit.add_argument("--out", type=Path, required=True, help="folder of the new region")
    fit.add_argument("--scale", metavar="NAME", help=SCALE_HELP)
    fit.add_argument(
        "--latitude", type=float, metavar="DEG", help="latitude of the region's middle"
    )
    fit.add_argument("--seed", type=int, default=0, help="the same seed gives the same tables")
    fit.set_defaults(run=run_fit)


def run_call(given: argparse.Namespace) -> int:
    """Calls a file of plots; unknown plants are noted, not fatal."""
    from builder.steps.calling import call_file

    if given.answers is not None and given.answers < 1:
        raise Told("--answers takes a whole number from 1 up")
    called = call_file(
        given.region,
        given.plots,
        given.out,
        scale=given.scale,
        sites_csv=given.sites,
        answers=given.answers,
        month=given.month,
        disturbance=given.disturbance,
        listed_only=given.listed_only,
    )
    if called.problems:
        say_problems(called.problems)
    if called.unknown:
        rows = ", ".join(f"{name} ({count})" for name, count in called.unknown.items())
        say(f"note: not plants of this region: {rows}")
    say(f"{given.out}: {called.plots} plots called")
    return 0


def run_prove(given: argparse.Namespace) -> int:
    """Proves a key; what was known before stands beside what holds now."""
    from builder.proof.report import report_html
    from builder.steps.proving import prove

    if (given.plots is None) != (given.zones is None):
        raise Told("--plots and --zones go together")
    proved = prove(
        given.region,
        plots=given.plots,
        zones=given.zones,
        scale=given.scale,
        seed=given.seed,
        tell=say_share,
    )
    if proved.problems:
        say_problems(proved.problems)
    if given.json:
        given.json.write_text(json.dumps(proved.now, indent=1) + "\n", encoding="utf-8")
    if given.html:
        given.html.write_text(report_html(proved.now), encoding="utf-8")
    before = (proved.before or {}).get("summary", {})
    for name, value in proved.now["summary"].items():
        was = f"   (was {before[name]})" if before.get(name, value) != value else ""
        say(f"{name}: {value}{was}")
    return 0


def run_fit(given: argparse.Namespace) -> int:
    """Makes a region folder from known plots."""
    from builder.steps.proving import fit

    made = fit(
        given.plots,
        given.zones,
        given.out,
        scale=given.scale,
        seed=given.seed,
        latitude_deg=given.latitude,
        tell=say_share,
    )
    if made.problems:
        say_problems(made.problems)
    if made.folder is None:
        return 1
    say(f"{made.folder}: {made.plots} plots, {made.plants} plants, {made.zones} zones")
    return 0
