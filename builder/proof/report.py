"""A proof as a page for people: finished strings, tables and charts."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from functools import cache
from pathlib import Path
from typing import Any

from jinja2 import Environment, FileSystemLoader, StrictUndefined
from markupsafe import Markup

from builder.key.bulk import VERDICTS
from builder.proof.charts import bars_chart, calibration_chart, confusion_chart, pair_bar
from builder.rows import read_shipped

HERE = Path(__file__).parent
FIGURES = (
    "hit_rate",
    "kappa",
    "log_loss_nats",
    "brier",
    "calibration_error",
    "perfect_band",
    "stated_minus_right",
    "sure_share",
    "sure_stated_minus_right",
    "answers_median",
    "half_lost",
    "withheld_auc",
    "all_plants",
)


@dataclass(frozen=True)
class Section:
    """One part of the page; cells and texts are finished."""

    title: str
    texts: tuple[str, ...] = ()
    charts: tuple[Markup, ...] = ()
    heads: tuple[str, ...] = ()
    rows: tuple[tuple[Any, ...], ...] = ()


@dataclass(frozen=True)
class Page:
    """What the template shows."""

    title: str
    edition: str
    warning: str
    summary: str
    sections: list[Section] = field(default_factory=list)


@cache
def words() -> dict[str, Any]:
    """The sentences of the report."""
    return read_shipped(HERE / "words" / "en.yaml")


def report_html(proof: dict[str, Any]) -> str:
    """The report of builder.proof.prove.prove_region's values as one page without links."""
    loader = FileSystemLoader(HERE / "templates")
    pages = Environment(loader=loader, autoescape=True, undefined=StrictUndefined)
    return str(pages.get_template("report.html").render(page=page_of(proof)))


def page_of(proof: dict[str, Any]) -> Page:
    """The page's strings, tables and charts."""
    say, best = words(), proof["known"] or proof["simulated"]
    sections = []
    for name in ("known", "simulated"):
        if proof[name]:
            zones = proof[name].get("zone_ids", proof["zone_ids"])
            sections += _figures(proof[name], say["headings"][name], zones)
    sections += [_pairs(proof), _never(proof), _printed(proof)]
    summary = ""
    if best:
        summary = say["summary"].format(
            hit=_pct(best["hit_rate"]),
            answers=best["answers"],
            n=best["n"],
            kind=say["kinds"][best["tested_on"]],
            set=best["set"],
        )
    return Page(
        title=say["title"].format(region=proof["region"]),
        edition=say["edition"].format(edition=proof["edition"], seed=proof["seed"]),
        warning="" if proof["known"] else say["untested"],
        summary=summary,
        sections=sections,
    )


def _figures(made: dict[str, Any], title: str, zones: list[str]) -> list[Section]:
    """All sections of one set of figures, each headed by the set's own title."""
    say = words()
    heads = say["headings"]
    named = [(say["figures"][one], _plainly(made[one])) for one in FIGURES if one in made]
    under = f"{title}: {{}}".format
    sections = [
        Section(title, (f"{made['set']}, n = {made['n']}", *_note(made)), rows=tuple(named)),
        Section(
            under(heads["calibration"]),
            (say["calibration_note"],),
            (
                Markup(
                    calibration_chart(
                        made["calibration"],
                        under(heads["calibration"]),
                        say["calibration_x"],
                        say["calibration_y"],
                    )
                ),
            ),
        ),
        Section(
            under(heads["confusion"]),
            charts=(Markup(confusion_chart(made["confusion"], zones, under(heads["confusion"]))),),
        ),
        Section(
            under(heads["needed"]),
            charts=(
                Markup(bars_chart(made["answers_needed"], under(heads["needed"]), say["needed_x"])),
            ),
        ),
        _verdicts(made["verdicts"], under(heads["verdicts"])),
    ]
    if made.get("baselines"):
        sections.insert(1, _baselines(made, under(heads["baselines"])))
    if made.get("three_looks"):
        sections.append(_verdicts(made["three_looks"], under(heads["three"])))
    if made.get("observers"):
        sections.append(_observers(made["observers"], under(heads["observers"])))
    if made.get("disturbed"):
        sections.append(_disturbed(made["disturbed"], under(heads["disturbed"])))
    return sections


def _note(made: dict[str, Any]) -> Iterable[str]:
    return [made["note"]] if made.get("note") else []


def _baselines(made: dict[str, Any], title: str) -> Section:
    say = words()
    names, figures = say["rivals"], say["figures"]
    rows = [
        (
            names["key"].format(answers=made["answers"]),
            _pct(made["hit_rate"]),
            f"{made['kappa']:.2f}",
            _pct(made["half_lost"]),
        )
    ]
    rows += [
        (names[name], _pct(one["hit_rate"]), f"{one['kappa']:.2f}", _pct(one["half_lost"]))
        for name, one in made["baselines"].items()
    ]
    heads = (say["rival"], figures["hit_rate"], figures["kappa"], figures["half_lost"])
    return Section(title, heads=heads, rows=tuple(rows))


def _verdicts(table: dict[str, dict[str, Any]], title: str) -> Section:
    say = words()
    names = say["verdict_names"]
    rows = [
        (names[true], *(_pct(row[verdict]) for verdict in VERDICTS), row["n"])
        for true, row in table.items()
    ]
    heads = (say["truth"], *(names[verdict] for verdict in VERDICTS), say["count"])
    return Section(title, heads=heads, rows=tuple(rows))


def _observers(table: dict[str, dict[str, Any]], title: str) -> Section:
    say = words()
    rows = [
        (name, _pct(row["hit_rate"]), f"{row['answers_median']:g}", row["n"])
        for name, row in table.items()
    ]
    figures = say["figures"]
    heads = (say["observer"], figures["hit_rate"], figures["answers_median"], say["count"])
    return Section(title, heads=heads, rows=tuple(rows))


def _disturbed(table: dict[str, dict[str, Any]], title: str) -> Section:
    say = words()
    rows = [
        (name, _pct(row["hit_rate"]), _pct(row["wrong_at_80"]), _pct(row["thin"]), row["n"])
        for name, row in table.items()
    ]
    heads = (
        say["disturbance"],
        say["figures"]["hit_rate"],
        say["wrong_80"],
        say["thin"],
        say["count"],
    )
    return Section(title, heads=heads, rows=tuple(rows))


def _pairs(proof: dict[str, Any]) -> Section:
    say = words()
    most = max((row["error_bound"] for row in proof["pairs"]), default=1.0)
    rows = []
    for row in proof["pairs"]:
        names = " / ".join(row["zones"])
        bar = Markup('<div class="bar">{}</div>').format(
            Markup(pair_bar(row["error_bound"], most, names))
        )
        question = row["question"][0] if row["question"] else say["nothing"]
        parts = ", ".join(plant for plant, _ in row["plants"])
        rows.append((names, f"{100 * row['error_bound']:.1f} %", bar, parts, question))
    heads = (say["pair"], say["bound"], "", say["by"], say["question"])
    return Section(say["headings"]["pairs"], heads=heads, rows=tuple(rows))


def _never(proof: dict[str, Any]) -> Section:
    say, plants = words(), proof["never_help"]
    text = say["none_helps"].format(plants=", ".join(plants)) if plants else say["all_help"]
    return Section(say["headings"]["never"], (text,))


def _printed(proof: dict[str, Any]) -> Section:
    say, tested = words(), proof["printed_key"]["tested"]
    text = say["printed"].format(
        n=tested["n"],
        careful=_pct(tested["careful"]["hit_rate"]),
        forgetful=_pct(tested["forgetful"]["hit_rate"]),
        couplets=tested["forgetful"]["couplets_mean"],
        three=_pct(tested["forgetful"]["card_3"]),
        eight=_pct(tested["forgetful"]["card_8"]),
    )
    return Section(say["headings"]["printed"], (text,))


def _pct(share: float) -> str:
    return f"{100 * share:.0f} %"


def _plainly(value: Any) -> str:
    if value is None:
        return str(words()["nothing"])
    if isinstance(value, list):
        return f"{value[0]:.3f} to {value[1]:.3f}"
    return f"{value:.3f}"
