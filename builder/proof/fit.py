"""From known plots to a complete region folder, written whole or not at all."""

from __future__ import annotations

import csv
import datetime
import hashlib
import io
import os
import shutil
import tempfile
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import numpy as np

from builder.formulas.fidelity import indval, indval_p, phi
from builder.key.fitted import COLUMNS, FIT_CSV, FIT_YAML
from builder.key.weigh import STEPS
from builder.problems import Place, Problem, in_order, problem_at
from builder.proof.estimate import Learned, Progress
from builder.proof.known import Known, in_slope_order
from builder.proof.known_fit import fit_known
from builder.proof.reading import read_known
from builder.proof.region_tables import (
    LETTERS,
    empty_tables,
    neighbours_of,
    occurrence_table,
    plain_ids,
    plants_table,
    questions_table,
    region_table,
    zones_table,
)
from builder.rows import block_text, flow_text, scalar_text

PERMUTATIONS = 999
CLIMATE_HEADER = "# source: common practice\nzone_id,elevation_m,month,tmax_c,tmin_c,precip_mm\n"


@dataclass(frozen=True)
class FitResult:
    """What a fit came to.

    folder    where the region was written, None where an error stopped it
    problems  everything to be told, errors and cautions
    plots, plants, zones  how many went in
    """

    folder: Path | None
    problems: list[Problem]
    plots: int = 0
    plants: int = 0
    zones: int = 0


def fit_region(
    plots_path: Path,
    zones_path: Path,
    out: Path,
    *,
    scale: Mapping[str, float] | None = None,
    seed: int = 0,
    latitude_deg: float | None = None,
    date: str | None = None,
    progress: Progress | None = None,
) -> FitResult:
    """Makes a region from known plots.

    plots_path  findings (plot_id,plant_id,cover_pct or wide); zones_path: plot_id,zone_id and,
                if wanted, height_m, slope_pct, aspect_deg and ground answers
    out         the region's folder; it must not hold anything yet
    scale       percent by class code where cover is written as classes (builder.key.scales)
    seed        the same seed and files give the same tables
    date        of the edition, year-month-day; today if not given
    progress    told stage and share done; may raise to stop, then nothing is left behind
    """
    tell = progress or (lambda stage, share: None)
    tell("read", 0.0)
    known, problems = read_known(plots_path, zones_path, scale)
    if out.exists() and (not out.is_dir() or any(out.iterdir())):
        wrong = "there is something in this place already"
        problems = [
            problem_at(Place(str(out), 1, 1), "fit-out", wrong, "Name a new folder."),
            *problems,
        ]
        known = None
    if known is not None and len(known.zone_ids) > len(LETTERS):
        wrong = f"{len(known.zone_ids)} zones are more than the {len(LETTERS)} letters for them"
        problems = [
            *problems,
            problem_at(Place(str(zones_path), 1, 1), "zones-many", wrong, "Join some."),
        ]
        known = None
    if known is None:
        return FitResult(None, in_order(problems))
    known = in_slope_order(known)
    learned = fit_known(known, neighbours_of(known), seed, tell)
    digest = hashlib.sha256(plots_path.read_bytes() + zones_path.read_bytes()).hexdigest()[:16]
    day = date or datetime.date.today().isoformat()
    files = region_files(
        known, learned, plain_ids((out.name,), "region")[0], day, seed, digest, latitude_deg, tell
    )
    write_whole(out, files)
    return FitResult(out, in_order(problems), len(known), len(known.plants), len(known.zone_ids))


def region_files(
    known: Known,
    learned: Learned,
    region_id: str,
    date: str,
    seed: int,
    digest: str,
    latitude_deg: float | None,
    tell: Progress,
) -> dict[str, str]:
    """Every file of the region by name, as text."""
    zone_ids = plain_ids(known.zone_ids, "zone")
    plant_ids = plain_ids(known.plants, "plant")
    tables = {
        "region": region_table(region_id, known, date, latitude_deg),
        "zones": zones_table(known, zone_ids),
        "plants": plants_table(known, plant_ids),
        "questions": questions_table(known, zone_ids),
        **empty_tables(known, digest, seed),
    }
    files = {f"{name}.yaml": "\n".join(block_text(one)) + "\n" for name, one in tables.items()}
    files["occurrence.yaml"] = _occurrence_text(occurrence_table(known, plant_ids, zone_ids))
    files["climate.csv"] = CLIMATE_HEADER
    files[FIT_YAML] = (
        "\n".join(block_text(fit_figures(known, learned, zone_ids, seed, digest))) + "\n"
    )
    files[FIT_CSV] = _fit_csv(known, learned, plant_ids, zone_ids, seed, tell)
    return files


def fit_figures(
    known: Known, learned: Learned, zone_ids: list[str], seed: int, digest: str
) -> dict[str, Any]:
    """fit.yaml: how many plots, and the figures fitted to them."""
    weights = learned.fitted.weights
    return {
        "source": "published known_plots",
        "files": list(known.names),
        "digest": digest,
        "seed": seed,
        "inner_log_loss_nats": round(float(learned.loss), 4),
        "plots": {zone: int(n) for zone, n in zip(zone_ids, known.counts, strict=True)},
        "weights": {
            name: float(getattr(weights, name))
            for name in (
                "shrink_plots",
                "overlooked",
                "wrongly_named",
                "cover_shrink_plots",
                "temper",
                "answer_error",
                "tau",
            )
        },
        "session": dict(learned.fitted.session),
    }


def _occurrence_text(occurrence: Mapping[str, Mapping[str, list[float]]]) -> str:
    lines = ["source: published known_plots", "occurrence:"]
    lines += [f"  {scalar_text(plant)}: {flow_text(row)}" for plant, row in occurrence.items()]
    return "\n".join(lines) + "\n"


def _fit_csv(
    known: Known,
    learned: Learned,
    plant_ids: list[str],
    zone_ids: list[str],
    seed: int,
    tell: Progress,
) -> str:
    """fit.csv: counts, learned nats, and how faithful each plant is to each zone."""
    cover = known.plots.cover
    present = (known.plots.steps >= 0).astype(float)
    worth = np.where(present > 0, np.maximum(cover, 0.01), 0.0)
    values, faith = indval(worth, known.zone), phi(present, known.zone, equalised=True)
    chance = indval_p(worth, known.zone, PERMUTATIONS, seed, lambda share: tell("indval", share))
    arrays = learned.fitted.arrays
    assert arrays.cover_counts is not None
    text = io.StringIO()
    rows = csv.writer(text, lineterminator="\n")
    rows.writerow([*COLUMNS, "indval", "indval_p", "phi_equalised"])
    for p, plant in enumerate(plant_ids):
        for z, zone in enumerate(zone_ids):
            counts = [
                int(arrays.present[p, z]),
                *(int(arrays.cover_counts[p, a, z]) for a in range(STEPS)),
            ]
            nats = [f"{value:.4f}" for value in learned.learned[p, :, z]]
            told = [f"{values[p, z]:.4f}", f"{chance[p]:.3f}", f"{faith[p, z]:.4f}"]
            rows.writerow([plant, zone, *counts, *nats, *told])
    return "# source: published known_plots\n" + text.getvalue()


def write_whole(out: Path, files: Mapping[str, str]) -> None:
    """All files of a new folder, or none: written beside it and moved in one step."""
    out.parent.mkdir(parents=True, exist_ok=True)
    beside = Path(tempfile.mkdtemp(prefix=f".{out.name}-", dir=out.parent))
    try:
        for name, text in files.items():
            (beside / name).write_text(text, encoding="utf-8", newline="\n")
        beside.chmod(0o755)
        if out.is_dir():
            out.rmdir()
        os.replace(beside, out)
    except BaseException:
        shutil.rmtree(beside, ignore_errors=True)
        raise
