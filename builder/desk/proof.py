"""The proof of a region: what was last found, what an edit did to it, and proving as a job."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any

from flask import Blueprint, current_app, flash, redirect, render_template, url_for
from markupsafe import Markup
from werkzeug.wrappers import Response

from builder.desk import charts
from builder.desk.jobs import Busy
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.shelf import Look, shelf
from builder.desk.working import job_view, jobs
from builder.proof.kept import proved_tables
from builder.steps.notes import kept_proofs

PAIRS_SHOWN = 6
CURES_SHOWN = 3

pages = Blueprint("proof", __name__, url_prefix="/r/<region_id>")

Proof = Mapping[str, Any]


@dataclass(frozen=True)
class Figure:
    """One big figure with its label."""

    value: str
    label: str
    shape: str = ""


@dataclass(frozen=True)
class PairView:
    """Two zones that are taken for one another, and the plants that part them best."""

    first: Markup
    second: Markup
    bar: Markup
    said: str
    names: str


@dataclass(frozen=True)
class Change:
    """One measure before and after."""

    label: str
    before: str
    after: str
    changed: bool


@dataclass(frozen=True)
class ProofView:
    """What the overview shows of a proof."""

    known: bool
    said: str
    href: str
    current: bool = False
    figures: list[Figure] = field(default_factory=list)
    chart: Markup = field(default_factory=Markup)
    pairs: list[PairView] = field(default_factory=list)


def best_of(proof: Proof) -> Proof | None:
    """Figures from known plots where there are any, else from simulated sites."""
    found: Proof | None = proof.get("known") or proof.get("simulated")
    return found


def proof_view(look: Look) -> ProofView:
    """The last proof of a region."""
    say = read_phrases()["proof"]
    href = url_for("proof.show", region_id=look.id)
    kept = kept_proofs(look.folder)
    best = best_of(kept[-1]) if kept else None
    if best is None:
        return ProofView(False, "", href)
    last = kept[-1]
    current = last.get("tables") == proved_tables(look.folder)
    where = say["on_plots" if last.get("known") else "simulated"].format(n=f"{best['n']:,}")
    printed = last["printed_key"]["tested"]["forgetful"]["hit_rate"]
    figures = [
        Figure(hundred(best["hit_rate"]), say["right"].format(n=best["answers"])),
        Figure(hundred(printed), say["printed"], "down"),
    ]
    points = [
        (row["stated"], row["right"], row["band"][0], row["band"][1])
        for row in best["calibration"]
        if row["n"] >= 5
    ]
    return ProofView(
        known=True,
        said=where if current else f"{where}; {say['stale']}",
        href=href,
        current=current,
        figures=figures,
        chart=charts.calibration(points, say["chart"]),
        pairs=_pairs(look, last["pairs"]),
    )


def hundred(share: float) -> str:
    """A share as so many in a hundred."""
    return f"{100 * share:.0f}"


def _pairs(look: Look, rows: Sequence[Mapping[str, Any]]) -> list[PairView]:
    if look.region is None:
        return []
    say = read_phrases()["proof"]
    tabs = charts.tabs(look.region.zones)
    names = {plant.id: plant.common for plant in look.region.plants}
    most = max((row["error_bound"] for row in rows), default=1.0) or 1.0
    found = []
    for row in rows[:PAIRS_SHOWN]:
        first, second = row["zones"]
        if first not in tabs or second not in tabs:
            continue
        cures = [names.get(plant, plant) for plant, _ in row["plants"][:CURES_SHOWN]]
        found.append(
            PairView(
                first=tabs[first],
                second=tabs[second],
                bar=charts.length(row["error_bound"] / most),
                said=say["mixed"].format(n=f"{100 * row['error_bound']:.0f}"),
                names=", ".join(cures),
            )
        )
    return found


def changes(before: Proof, now: Proof) -> list[Change]:
    """What the tables' change did: measures of two proofs side by side."""
    say = read_phrases()["proof"]["measures"]
    old, new = best_of(before) or {}, best_of(now) or {}
    found = []
    for name in (
        "hit_rate",
        "answers_median",
        "calibration_error",
        "withheld_auc",
        "log_loss_nats",
    ):
        if name in old and name in new:
            was, is_now = f"{old[name]:g}", f"{new[name]:g}"
            found.append(Change(say[name], was, is_now, was != is_now))
    printed = [one["printed_key"]["tested"]["forgetful"]["hit_rate"] for one in (before, now)]
    found.append(
        Change(say["printed"], f"{printed[0]:g}", f"{printed[1]:g}", printed[0] != printed[1])
    )
    bounds = [
        {tuple(row["zones"]): row["error_bound"] for row in one["pairs"]} for one in (before, now)
    ]
    for pair in sorted(bounds[0].keys() | bounds[1].keys()):
        was, is_now = (f"{bound[pair]:.3f}" if pair in bound else "" for bound in bounds)
        if was != is_now:
            label = say["pair"].format(first=pair[0], second=pair[1])
            found.append(Change(label, was or say["not_listed"], is_now or say["not_listed"], True))
    return found


@pages.get("/proof")
def show(region_id: str) -> str:
    """The proof page."""
    look = shelf().look(region_id)
    kept = kept_proofs(look.folder)
    compared = changes(kept[-2], kept[-1]) if len(kept) > 1 else []
    say = read_phrases()["proof"]
    return render_template(
        "proof.html",
        page=page("proof", "wide", look),
        region_id=region_id,
        proof=proof_view(look),
        changes=compared,
        verdicts=_verdicts(kept[-1]) if kept else [],
        verdict_names=[say["verdicts"][name] for name in VERDICTS],
        disturbed=_disturbed(look, kept[-1]) if kept else [],
        job=job_view(jobs().last("prove", region_id)),
        stops=look.stops,
        problems_said=counted(len(look.errors), read_phrases()["overview"]["errors"]),
    )


VERDICTS = ("zone", "edge", "mosaic", "misfit", "thin")


def _verdicts(proof: Proof) -> list[tuple[str, list[str]]]:
    """Labelled cases (rows) against what the key said of them (columns), in 100."""
    said = (proof.get("simulated") or {}).get("verdicts", {})
    names = read_phrases()["proof"]["verdicts"]
    return [
        (names[case], [hundred(said[case].get(name, 0.0)) for name in VERDICTS])
        for case in VERDICTS
        if case in said
    ]


def _disturbed(look: Look, proof: Proof) -> list[tuple[str, str, str, str]]:
    """For each disturbance: called right, wrong though sure, too little to say, in 100."""
    said = (proof.get("simulated") or {}).get("disturbed", {})
    names = {one.id: one.name for one in look.region.disturbances} if look.region else {}
    return [
        (
            names.get(name, name),
            hundred(row["hit_rate"]),
            f"{100 * row['wrong_at_80']:.1f}",
            hundred(row["thin"]),
        )
        for name, row in said.items()
    ]


@pages.post("/prove")
def prove(region_id: str) -> Response:
    """Starts a proof."""
    look = shelf().look(region_id)
    back: Response = redirect(url_for("proof.show", region_id=region_id))
    if look.stops:
        flash(read_phrases()["build"]["stopped"])
        return back
    folder = current_app.config["KEYDATA"] / region_id
    try:
        jobs().start("prove", region_id, ["prove", str(folder)])
    except Busy:
        flash(read_phrases()["jobs"]["busy"])
    return back
