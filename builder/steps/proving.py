"""A region's key proved, and a region fitted from known plots."""

from __future__ import annotations

import json
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from builder.key.fitted import read_fit
from builder.key.plots_bind import names_of
from builder.problems import Problem, errors
from builder.proof.fit import FitResult, fit_region
from builder.proof.kept import keep_proof, proved_tables
from builder.proof.prove import prove_region
from builder.proof.reading import read_known
from builder.steps.calling import scale_of
from builder.steps.checking import check_regions, region_of
from builder.steps.notes import kept_proofs, proof_notes
from builder.steps.refusals import Stopped

Tell = Callable[[str, float], None]
PROOFS_KEPT = 12


@dataclass(frozen=True)
class Proved:
    """What a proof came to, and what the one before it said."""

    now: dict[str, Any]
    before: dict[str, Any] | None
    problems: list[Problem]


def prove(
    folder: Path,
    *,
    plots: Path | None = None,
    zones: Path | None = None,
    scale: str | None = None,
    seed: int = 0,
    tell: Tell | None = None,
) -> Proved:
    """Proves a region's key and keeps the result beside the tables and in the notes.

    plots, zones  known plots (plot_id,plant_id,cover_pct) and their zones (plot_id,zone_id)
    Raises Stopped when tables or plots have errors, UnknownName for an unknown scale.
    """
    (checked,) = check_regions([folder])
    region = region_of(checked)
    known, problems = None, list[Problem]()
    if plots is not None and zones is not None:
        known, problems = read_known(
            plots, zones, scale_of(region, scale), region.plant_ids, names_of(region)
        )
        if known is None or errors(problems):
            raise Stopped(problems)
    fitted, _ = read_fit(folder, region)
    made = prove_region(region, fitted, known, seed, tell)
    made["tables"] = proved_tables(folder)
    before = kept_proofs(folder)
    keep_proof(folder, made)
    _keep(folder, made)
    return Proved(made, before[-1] if before else None, problems)


def _keep(folder: Path, made: dict[str, Any]) -> None:
    notes = proof_notes(folder)
    notes.mkdir(parents=True, exist_ok=True)
    old = sorted(notes.glob("[0-9]*.json"))
    number = int(old[-1].stem) + 1 if old else 1
    fresh = notes / f"{number:06}.new"
    fresh.write_text(json.dumps(made), encoding="utf-8")
    fresh.replace(notes / f"{number:06}.json")
    for path in old[: -PROOFS_KEPT + 1]:
        path.unlink(missing_ok=True)


def fit(
    plots: Path,
    zones: Path,
    out: Path,
    *,
    scale: str | None = None,
    seed: int = 0,
    latitude_deg: float | None = None,
    tell: Tell | None = None,
) -> FitResult:
    """Makes a whole region from known plots. UnknownName for an unknown scale."""
    known_scale = scale_of(None, scale)
    return fit_region(
        plots, zones, out, scale=known_scale, seed=seed, latitude_deg=latitude_deg, progress=tell
    )
