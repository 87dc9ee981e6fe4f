"""Jobs as pages show them: state, progress, stop."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from flask import Blueprint, Response, abort, current_app, flash, redirect, url_for
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.jobs import Job, Jobs
from builder.desk.phrases import read_phrases

BAR = 300
PAGES = {"prove": "proof.show", "build": "build.show", "fit": "flat.work"}

pages = Blueprint("jobs", __name__, url_prefix="/jobs")


@dataclass(frozen=True)
class JobView:
    """A job, ready for a page."""

    number: int
    said: str
    state: str
    running: bool
    width: int
    lines: str
    href: str


def jobs() -> Jobs:
    """The running desk's jobs."""
    found: Jobs = current_app.extensions["jobs"]
    return found


def job_view(job: Job | None) -> JobView | None:
    """A job for a page, or None."""
    if job is None:
        return None
    say = read_phrases()["jobs"]
    of = f", {job.done} / {job.of}" if job.of else ""
    said = f"{say[job.state]}{of} {job.step}".strip()
    return JobView(
        number=job.number,
        said=f"{said} ({job.seconds:.0f} s)",
        state=job.state,
        running=job.state == "running",
        width=round(BAR * job.done / job.of) if job.of else 0,
        lines="\n".join(job.lines),
        href=url_for("jobs.show", number=job.number),
    )


@pages.get("/<int:number>")
def show(number: int) -> Response | dict[str, Any]:
    """A job's state, for the page that follows it."""
    found = job_view(jobs().kept.get(number))
    if found is None:
        abort(404)
    return {
        "said": found.said,
        "running": found.running,
        "width": found.width,
        "lines": found.lines,
    }


@pages.post("/<int:number>/stop")
def stop(number: int) -> BaseResponse:
    """Stops a job; what was there before stays whole."""
    found = jobs().kept.get(number)
    if found is None:
        abort(404)
    found.stop()
    flash(read_phrases()["jobs"]["was_stopped"])
    return redirect(url_for(PAGES[found.kind], region_id=found.region))
