"""A zone's page as finished text and drawings."""

from collections.abc import Mapping
from dataclasses import dataclass

from markupsafe import Markup

from builder.drawings.bars import constancy_bar, range_bar
from builder.drawings.slope import heights
from builder.drawings.year import months
from builder.tables import Plant, Zone
from builder.views.look import Look
from builder.views.mixes import MixView, mix_view
from builder.views.seasons import soil_of, year_of

PLANTS_SHOWN = 12
WEEDS_SHOWN = 12
ALSO_SHOWN = 4
COMMON_FROM = 0.4


@dataclass(frozen=True)
class PlantRow:
    """One plant of a zone: how often, how much."""

    plant_id: str
    name: str
    latin: str
    form: Markup
    bar: Markup
    in_100: str
    hoop: Markup
    cover: str
    weed: bool


@dataclass(frozen=True)
class Kin:
    """A neighbour and how to tell it apart."""

    zone_id: str
    tab: Markup
    short: str
    tell: str
    anchor: str


@dataclass(frozen=True)
class Line:
    """A run-in heading and its text."""

    head: str
    text: str


@dataclass(frozen=True)
class Damage:
    """What to do after one kind of disturbance."""

    name: str
    do: str
    avoid: str
    unlikely: bool


@dataclass(frozen=True)
class ZoneView:
    """Everything the pages say about one zone."""

    id: str
    letter: str
    name: str
    short: str
    one_line: str
    tab: Markup
    heights: Markup
    heights_low: Markup
    band: str
    why_here: str
    limits: str
    kin: tuple[Kin, ...]
    plants: tuple[PlantRow, ...]
    more_plants: str
    growth: Markup
    growth_unit: str
    growth_rule: str
    year: Markup
    year_line: str
    rain_unit: str
    soil: tuple[str, ...]
    after: tuple[Line, ...]
    wildlife: tuple[Line, ...]
    soil_life: tuple[Line, ...]
    weeds: str
    cautions: str
    work: tuple[Line, ...]
    months: Markup
    months_line: str
    damage: tuple[Damage, ...]
    mix: MixView


def zone_view(look: Look, zone_id: str) -> ZoneView:
    """A zone's view."""
    zone = look.zones[zone_id]
    say = look.phrases.say
    notes = look.region.reclaim.zones[zone_id]
    rows = plant_rows(look, zone_id)
    growth, growth_rule = _growth(look, zone)
    year_picture, year_line = year_of(look, zone)
    strip, strip_line = _months(look, zone)
    return ZoneView(
        id=zone.id,
        letter=zone.letter,
        name=look.zone_name(zone_id),
        short=look.zone_short(zone_id),
        one_line=look.zone_line(zone_id),
        tab=look.tab(zone_id, 13),
        heights=_heights(look, zone, 18.5),
        heights_low=_heights(look, zone, 11.5),
        band=band_line(look, zone),
        why_here=zone.why_here,
        limits=say("zone.limits", list=", ".join(zone.limits)) if zone.limits else "",
        kin=tuple(
            Kin(other, look.tab(other), look.zone_short(other), tell, f"zone-{other}")
            for other, tell in zone.told_from.items()
        ),
        plants=tuple(rows[:PLANTS_SHOWN]),
        more_plants=_more(look, zone_id, rows[PLANTS_SHOWN:]),
        growth=growth,
        growth_unit=say("zone.growth_unit", unit=look.figures.yield_unit),
        growth_rule=growth_rule,
        year=year_picture,
        year_line=year_line,
        rain_unit=look.figures.rain_unit,
        soil=soil_of(look, zone_id),
        after=(
            Line(say("zone.remnants"), zone.remnant_clues),
            Line(say("zone.absence"), zone.what_absence_means),
        ),
        wildlife=_lines(look, "life.wildlife", notes.wildlife),
        soil_life=_lines(look, "life.soil", notes.soil_life),
        weeds=_weeds(look, zone_id),
        cautions=notes.cautions,
        work=tuple(
            Line(say(f"work.{name}"), getattr(notes, name))
            for name in ("topsoil", "seedbed", "method", "protection", "fertiliser", "fails")
            if getattr(notes, name)
        ),
        months=strip,
        months_line=strip_line,
        damage=_damage(look, zone_id),
        mix=mix_view(look, zone_id),
    )


def _heights(look: Look, zone: Zone, tall: float) -> Markup:
    """The zone among the others at their true heights; tall is the drawing's height. [mm]"""
    band = look.figures.heights(*zone.band_m)
    title = look.phrases.say("zone.heights_title", name=zone.short, band=band)
    region = look.region
    return look.show(
        heights(region.zones, region.elevation_m, title, zone.id, look.palette, height=tall)
    )


def _lines(look: Look, group: str, texts: Mapping[str, str]) -> tuple[Line, ...]:
    """Named texts of a table as run-in heads and sentences."""
    return tuple(Line(look.phrases.named(group, name), text) for name, text in texts.items())


def band_line(look: Look, zone: Zone) -> str:
    """The band and how slopes shift it, in one sentence."""
    say, figures = look.phrases.say, look.figures
    shifts = [
        say(
            f"zone.{name}_{'lower' if shift < 0 else 'higher'}",
            metres=figures.height(abs(shift)),
        )
        for name, shift in (
            ("north", zone.north_shift_m),
            ("south", zone.south_shift_m),
            ("exposed", zone.exposed_shift_m),
        )
        if shift
    ]
    band = figures.heights(*zone.band_m)
    return say("zone.band_shifted", band=band, shifts=", ".join(shifts)) if shifts else band


def plant_rows(look: Look, zone_id: str) -> list[PlantRow]:
    """The zone's plants, most constant first; ties keep the order of the plant table."""
    belt = look.belts[zone_id]
    found = look.region.occurrence
    order = {plant.id: place for place, plant in enumerate(look.region.plants)}
    here = [each for (zone, _), each in found.items() if zone == zone_id]
    here.sort(key=lambda each: (-each.constancy, order[each.plant_id]))
    rows = []
    for each in here:
        plant = look.plants[each.plant_id]
        in_100 = look.figures.plain(each.constancy * 100)
        rows.append(
            PlantRow(
                plant_id=plant.id,
                name=look.plant_name(plant.id),
                latin=plant.scientific,
                form=look.form(plant.form),
                bar=look.show(
                    constancy_bar(
                        each.constancy, belt, look.phrases.say("zone.of_100", count=in_100),
                        look.palette,
                    )
                ),
                in_100=in_100,
                hoop=look.hoop(each.cover_pct),
                cover=look.figures.short(each.cover_pct, 1),
                weed=plant.weed in ("ruderal", "invasive"),
            )
        )  # fmt: skip
    return rows


def _more(look: Look, zone_id: str, rest: list[PlantRow]) -> str:
    """The plants after the chart's last, by name, as far as they stand in a fifth of the plots."""
    found = look.region.occurrence
    names = [
        row.name
        for row in rest
        if found[zone_id, row.plant_id].constancy >= COMMON_FROM and not row.weed
    ]
    return look.phrases.say("zone.also", list=", ".join(names[:ALSO_SHOWN])) if names else ""


def _growth(look: Look, zone: Zone) -> tuple[Markup, str]:
    """The expected range and the rule of thumb for a dry or wet year."""
    made = look.region.production[zone.id]
    figures, say = look.figures, look.phrases.say
    three = (made.low_kg_ha, made.normal_kg_ha, made.high_kg_ha)
    highest = max(each.high_kg_ha for each in look.region.production.values())
    top = figures.yield_number(highest) * 1.08
    labels = tuple(figures.yields(value) for value in three)
    title = say(
        "zone.growth_title", low=labels[0], normal=labels[1], high=labels[2],
        unit=figures.yield_unit,
    )  # fmt: skip
    drawing = range_bar(
        tuple(figures.yield_number(value) for value in three),  # type: ignore[arg-type]
        top,
        labels,  # type: ignore[arg-type]
        look.belts[zone.id],
        title,
        palette=look.palette,
        height=14,
    )
    parts = []
    if made.rain_response:
        way = "less" if made.rain_response > 0 else "more"
        parts.append(
            say(
                f"zone.rain_rule_{way}",
                percent=figures.short(abs(made.rain_response) * 10, 1),
                months=figures.months(made.rain_months),
            )
        )
    if made.warmth_response_per_c:
        way = "more" if made.warmth_response_per_c > 0 else "less"
        parts.append(
            say(
                f"zone.warmth_rule_{way}",
                percent=figures.short(abs(made.warmth_response_per_c) * 100, 1),
                months=figures.months(made.warmth_months),
            )
        )
    if made.clip.every > 1:
        parts.append(say("zone.clip", area=figures.short(made.clip.area_m2), every=made.clip.every))
    return look.show(drawing), " ".join(parts)


def _weeds(look: Look, zone_id: str) -> str:
    """Weeds whose table range reaches this zone or a neighbour, most constant first."""
    zone = look.zones[zone_id]
    near = [zone_id, *zone.neighbours]
    found = look.region.occurrence
    scored = []
    for place, plant in enumerate(look.region.plants):
        if plant.weed not in ("ruderal", "invasive"):
            continue
        here = [found[each, plant.id].constancy for each in near if (each, plant.id) in found]
        if here:
            own = found[zone_id, plant.id].constancy if (zone_id, plant.id) in found else 0.0
            scored.append((-own, -max(here), place, plant))
    scored.sort(key=lambda each: each[:3])
    names = [_weed_name(look, plant, -own) for own, _, _, plant in scored[:WEEDS_SHOWN]]
    return ", ".join(names) if names else look.phrases.say("zone.no_weeds")


def _weed_name(look: Look, plant: Plant, here: float) -> str:
    name = look.plant_name(plant.id)
    if plant.weed == "invasive":
        name = look.phrases.say("zone.invasive", name=name)
    return name if here else look.phrases.say("zone.from_neighbour", name=name)


def _months(look: Look, zone: Zone) -> tuple[Markup, str]:
    notes = look.region.reclaim.zones[zone.id]
    windows = notes.windows
    chosen = set(windows.sow_months) | set(windows.plant_months)
    say = look.phrases.say
    title = say("zone.months_title", months=look.figures.months(chosen))
    drawing = months(
        chosen, look.belts[zone.id], look.phrases.words("months.initials"), title, look.palette
    )
    return look.show(drawing), notes.season


def _damage(look: Look, zone_id: str) -> tuple[Damage, ...]:
    notes = look.region.reclaim.zones[zone_id].by_disturbance
    return tuple(
        Damage(
            look.disturbance_name(each.id, each.name),
            notes[each.id].do,
            notes[each.id].avoid,
            notes[each.id].expect == "unlikely",
        )
        for each in look.region.disturbances
        if each.id in notes
    )


def zone_views(look: Look, chosen: Mapping[str, object] | None = None) -> list[ZoneView]:
    """Views of all zones, or of those chosen, in the order of the table."""
    return [
        zone_view(look, zone.id)
        for zone in look.region.zones
        if chosen is None or zone.id in chosen
    ]
