"""Zones as pages: links to what is printed, and how closely a page must be set."""

from dataclasses import dataclass, replace

from builder.booklet.style import A6, Trim
from builder.views.zones import ZoneView

FIRST_LINES, REST_LINES, MOST_LINES = 20, 52, 59
"""Lines that fit a zone's first page, and its last two set easily and closely, beside their
drawings; counted on pages."""
LOW_FROM, LATER_FROM = 27, 29
"""Lines and neighbours together from which the first page takes the low drawing of heights, and
from which what to look for moves on to the work; counted on pages."""
WIDE_NAME = 18
LINE_MM, PLANT_ROW_MM, ZONE_CHARTS_MM = 3.7, 4.45, 77.0


@dataclass(frozen=True)
class Spread:
    """A zone's pages; a page with much to say is set a little closer.

    later  what to look for after damage stands with the work, not on the first page
    long   too much for four pages: wildlife takes a fifth, with room for notes
    """

    zone: ZoneView
    first: str
    rest: str
    later: bool
    long: bool


def linked(zone: ZoneView, printed: set[str]) -> ZoneView:
    """The zone with links to those neighbours only that are printed too."""
    kin = tuple(each if each.zone_id in printed else replace(each, anchor="") for each in zone.kin)
    return replace(zone, kin=kin)


def spread(zone: ZoneView, trim: Trim) -> Spread:
    """Set a zone's pages; lines are reckoned from the length of the texts."""
    lost = round((A6.text_height - trim.text_height) / LINE_MM)
    rows = int((trim.text_height - ZONE_CHARTS_MM) / PLANT_ROW_MM)
    zone = replace(zone, plants=zone.plants[:rows])
    first = (
        _lines(zone.one_line, 56)
        + _lines(zone.name, 30)
        + _lines(zone.band)
        + sum(_lines(kin.short + kin.tell, 60) for kin in zone.kin)
        + _lines(zone.why_here + zone.limits)
        + _lines(" ".join(zone.soil))
        + sum(_lines(line.head + line.text) for line in zone.after)
    )
    mix = zone.mix
    rest = (
        _lines(zone.cautions)
        + _lines(zone.months_line)
        + sum(_lines(line.head + line.text) for line in zone.work)
        + sum(_lines(each.name + each.do + each.avoid, 62) for each in zone.damage)
        + sum(max(_lines(each.name, WIDE_NAME) for each in pair) for pair in mix.pairs)
        + sum(_lines(each) for each in (mix.other_method, *mix.planted))
        + _lines(zone.weeds)
        + _lines("".join(line.head + line.text for line in zone.wildlife))
        + _lines("".join(line.head + line.text for line in zone.soil_life))
    )
    full = first + len(zone.kin) + lost
    if full >= LOW_FROM:
        zone = replace(zone, heights=zone.heights_low)
    later = full >= LATER_FROM
    if later:
        rest += sum(_lines(line.head + line.text) for line in zone.after)
    long = rest > MOST_LINES - 2 * lost
    return Spread(
        zone,
        "tight" if first > FIRST_LINES - lost else "easy",
        "tight" if rest > REST_LINES - 2 * lost and not long else "easy",
        later,
        long,
    )


def _lines(text: str, wide: int = 66) -> int:
    """Lines a text takes at so many letters a line."""
    return -(-len(text) // wide)
