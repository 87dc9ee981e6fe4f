"""Quick tables: plots, clipping, slope, seed and success, as finished text."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from builder.formulas.clipping import hoop_length, plot_factor_kg_ha
from builder.formulas.sample import plots_in_all
from builder.formulas.terrain import slope_deg
from builder.formulas.units import converted
from builder.views import grounds
from builder.views.look import Look

SPREADS = (0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8)
PRECISIONS = (0.1, 0.2, 0.3)
CONFIDENCE = 0.8
"""Two-sided, so that one side is missed one time in ten."""
SLOPES_PCT = (5, 10, 20, 30, 40, 50, 70, 100)
CLIP_AREAS_M2 = (0.25, 0.5, 1.0, 2.0)


Row = tuple[str, tuple[str, ...]]


@dataclass(frozen=True)
class Table:
    """A small table: a title, a note, heads, and rows whose first cell names the row."""

    title: str
    note: str
    heads: tuple[str, ...]
    rows: tuple[Row, ...]


def quick_tables(look: Look) -> list[Table]:
    """All of them, in the order of a day's work."""
    found = [
        _plot(look),
        _slopes(look),
        _clip(look),
        _textures(look),
        _plots_needed(look),
        _methods(look),
        _units(look),
        _success(look),
    ]
    return [table for table in found if table.rows]


def _table(look: Look, name: str, rows: Sequence[Row], **note: str) -> Table:
    say = look.phrases.say
    return Table(
        say(f"quick.{name}.title"),
        say(f"quick.{name}.note", **note),
        tuple(look.phrases.words(f"quick.{name}.heads")),
        tuple(rows),
    )


def _plot(look: Look) -> Table:
    """How far to pace for the region's own plot."""
    behind, figures = look.region.head.plots_behind, look.figures
    area = behind.area_m2
    radius, side = math.sqrt(area / math.pi), math.sqrt(area)
    rows = [
        (
            look.phrases.say(f"quick.plot.{name}"),
            (figures.short(length, 1), figures.short(converted(length, "m", "ft"), 1)),
        )
        for name, length in (("circle", radius), ("square", side))
    ]
    return _table(
        look, "plot", rows,
        area=figures.short(area), minutes=figures.short(behind.search_minutes),
        shape=look.phrases.named("quick.plot.shapes", behind.shape),
    )  # fmt: skip


def _slopes(look: Look) -> Table:
    figures = look.figures
    return _table(
        look, "slopes",
        [
            (
                f"{pct} %",
                (f"{figures.plain(slope_deg(pct))}°", f"1 : {figures.short(100 / pct, 1)}"),
            )
            for pct in SLOPES_PCT
        ],
    )  # fmt: skip


def _clip(look: Look) -> Table:
    """What a gram in the bag means to the hectare, and the hoop to clip in."""
    figures = look.figures
    rows = []
    for area in CLIP_AREAS_M2:
        kg_ha = plot_factor_kg_ha(area)
        rows.append(
            (
                f"{figures.short(area)} m²",
                (
                    f"{figures.short(hoop_length(area) * 100, 0)} cm",
                    figures.short(kg_ha, 1),
                    figures.short(converted(kg_ha, "kg_ha", "lb_acre"), 1),
                ),
            )
        )
    return _table(look, "clip", rows)


def _textures(look: Look) -> Table:
    """Water that plants can take from soil by its feel."""
    rows: list[Row] = [(each.name, (each.held,)) for each in grounds.texture_rows(look)]
    return _table(look, "textures", rows)


def _plots_needed(look: Look) -> Table:
    return _table(
        look, "needed",
        [
            (
                look.figures.per_cent(spread),
                tuple(str(plots_in_all(1.0, spread, each, CONFIDENCE)) for each in PRECISIONS),
            )
            for spread in SPREADS
        ],
    )  # fmt: skip


def _methods(look: Look) -> Table:
    rows = [
        (look.phrases.named("methods", name), (f"× {look.figures.short(factor, 1)}",))
        for name, factor in look.region.seeding_methods.items()
        if factor is not None
    ]
    return _table(look, "methods", rows)


def _success(look: Look) -> Table:
    """The zones' own standards beside the region's rule."""
    figures, rows = look.figures, []
    for zone in look.region.zones:
        own = look.region.reclaim.zones[zone.id].success
        share = own.perennial_cover_share_of_reference
        rows.append(
            (
                f"{zone.letter} {look.zone_short(zone.id)}",
                (
                    figures.per_cent(share) if share is not None else "",
                    str(own.min_native_perennials),
                    figures.per_cent(own.max_weed_share_of_cover),
                    str(own.earliest_year),
                ),
            )
        )
    return _table(look, "success", rows, rule=look.region.success_rule.text)


def _units(look: Look) -> Table:
    figures = look.figures
    pairs = (
        ("kg_ha", "lb_acre", "kg/ha", "lb/ac", 100),
        ("ha", "acre", "ha", "ac", 1),
        ("m", "ft", "m", "ft", 100),
        ("mm", "in", "mm", "in", 100),
        ("per_m2", "per_ft2", "1/m²", "1/ft²", 100),
        ("kg", "lb", "kg", "lb", 1),
    )
    rows = []
    for unit, other, name, other_name, amount in pairs:
        there = figures.short(converted(amount, unit, other), 2)
        back = figures.short(converted(amount, other, unit), 2)
        cells = (f"{there} {other_name}", f"{amount} {other_name}", f"{back} {name}")
        rows.append((f"{amount} {name}", cells))
    return _table(look, "units", rows)
