"""The overview: every region, and one region with its slope, problems, proof and last build."""

from __future__ import annotations

from dataclasses import dataclass

from flask import Blueprint, render_template, url_for
from markupsafe import Markup

from builder.desk import charts
from builder.desk.built import BuiltView, built_view
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.proof import proof_view
from builder.desk.shelf import Look, shelf
from builder.desk.trouble import ProblemView, flags, problem_views
from builder.tables.regions import YAML_TABLES

PROBLEMS_SHOWN = 6
TABLES = len(YAML_TABLES) + 1

pages = Blueprint("overview", __name__)


@dataclass(frozen=True)
class RegionLine:
    """One region in the list of all."""

    name: str
    href: str
    slope: Markup
    said: str
    problems: str
    wrong: bool


@dataclass(frozen=True)
class Stage:
    """One step of the sentence and how far the region is. state: done, stop or waits."""

    name: str
    said: str
    state: str

    @property
    def ok(self) -> bool:
        """Whether the step is done."""
        return self.state == "done"

    @property
    def bad(self) -> bool:
        """Whether the region stops at this step."""
        return self.state == "stop"


@dataclass(frozen=True)
class Slope:
    """The slope's drawing and the line beside its heading."""

    said: str
    drawing: Markup


@pages.get("/")
def home() -> str:
    """All regions."""
    looks = [shelf().look(name) for name in shelf().ids()]
    lines = [_line(look) for look in looks]
    patterned = [look for look in looks if look.region is not None]
    frame = page("regions", "wide", None)
    first = patterned[0] if patterned else None
    mark = charts.mark(first.region.zones) if first and first.region else Markup()
    every = Markup("").join(
        charts.patterns(look.region.zones) for look in patterned if look.region is not None
    )
    return render_template("regions.html", page=frame.with_drawings(every, mark), regions=lines)


def _line(look: Look) -> RegionLine:
    say = read_phrases()["overview"]
    href = url_for("overview.region", region_id=look.id)
    wrong = counted(len(look.errors), say["errors"]) if look.errors else say["no_problem"]
    if look.region is None:
        return RegionLine(look.id, href, Markup(), "", wrong, True)
    region = look.region
    said = say["region_line"].format(
        edition=region.edition, date=region.date, zones=len(region.zones), plants=len(region.plants)
    )
    drawing = _slope(look, region.name).drawing
    return RegionLine(region.name, href, drawing, said, wrong, bool(look.errors))


@pages.get("/r/<region_id>/")
def region(region_id: str) -> str:
    """One region."""
    look = shelf().look(region_id)
    say = read_phrases()["overview"]
    views = problem_views(look)
    shown, rest = views[:PROBLEMS_SHOWN], len(views) - PROBLEMS_SHOWN
    built, proof = built_view(look), proof_view(look)
    return render_template(
        "overview.html",
        page=page("overview", "desk", look),
        stages=stages(look, built),
        slope=_slope(look, say["slope_title"]),
        problems=shown,
        problems_said=counted(len(look.errors), say["errors"]) if look.errors else "",
        more_problems=counted(rest, say["more"]) if rest > 0 else "",
        problems_href=url_for("overview.problems", region_id=region_id),
        proof=proof,
        built=built,
    )


@pages.get("/r/<region_id>/problems")
def problems(region_id: str) -> str:
    """Every problem of a region, with its line and what to do."""
    look = shelf().look(region_id)
    found: list[ProblemView] = problem_views(look)
    return render_template("problems.html", page=page("overview", "wide", look), problems=found)


def _slope(look: Look, title: str) -> Slope:
    say = read_phrases()["overview"]
    if look.region is None:
        return Slope(say["unreadable"], Markup())
    soft = {zone.id: zone.soft_edge_m for zone in look.region.zones}
    drawing = charts.slope(look.region.zones, soft, flags(look), title)
    low, high = look.region.elevation_m
    return Slope(say["heights"].format(low=f"{low:,.0f}", high=f"{high:,.0f}"), drawing)


def stages(look: Look, built: BuiltView) -> list[Stage]:
    """rows → tables → problems? → pack → pages, and where this region stands."""
    say = read_phrases()["overview"]
    names = say["stage_names"]
    read = look.region is not None
    rows = counted(look.rows, say["rows"])
    tables = say["tables"].format(n=look.tables, of=TABLES)
    state = "done" if read else "stop"
    found = [Stage(names["rows"], rows, state), Stage(names["tables"], tables, state)]
    wrong = counted(len(look.errors), say["to_mend"]) if look.errors else say["none"]
    found.append(Stage(names["problems"], wrong, "stop" if look.stops else "done"))
    state = "waits" if look.stops or not built.current else "done"
    found.append(Stage(names["pack"], built.pack if state == "done" else say["waits"], state))
    found.append(Stage(names["pages"], built.pages if state == "done" else say["waits"], state))
    return found
