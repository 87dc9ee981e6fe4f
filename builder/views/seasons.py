"""A zone's year and soil: warmth, rain, growing months, water held."""

from markupsafe import Markup

from builder.drawings.year import year
from builder.formulas.soil_water import profile_water
from builder.formulas.texture import texture_class
from builder.formulas.year import SiteYear, site_year
from builder.tables import Record, Zone
from builder.tables.shape import columns
from builder.views.look import Look


def zone_year(look: Look, zone_id: str) -> SiteYear:
    """The year at the zone's own height, from its climate and soil."""
    normals = look.region.climate[zone_id]
    return site_year(
        look.region.latitude_deg,
        [month.tmax_c for month in normals],
        [month.tmin_c for month in normals],
        [month.precip_mm for month in normals],
        held_mm(look, zone_id),
        water_table_cm(look, zone_id),
    )


def water_table_cm(look: Look, zone_id: str) -> float | None:
    """Usual depth to ground water; 0 where the zone's roots always reach it. [cm]"""
    table = look.region.soils[zone_id].water_table_cm
    if table is not None:
        return table[1]
    return 0.0 if look.zones[zone_id].ground_water_in_reach else None


def held_mm(look: Look, zone_id: str) -> float:
    """Water the soil holds within reach of roots. [mm]"""
    soil = look.region.soils[zone_id]
    return sum(
        layer.mm
        for layer in profile_water(
            [_plain(layer) for layer in soil.layers],
            soil.rooting_depth_cm,
            [_plain(each) for each in look.region.files["soils"].peat_classes],
        )
    )


def _plain(record: Record) -> dict[str, object]:
    """A record's fields by name, for the formulas."""
    return {item.name: getattr(record, item.name) for _, _, item in columns(type(record))}


def year_of(look: Look, zone: Zone) -> tuple[Markup, str]:
    normals = look.region.climate[zone.id]
    figures, say = look.figures, look.phrases.say
    growing = zone_year(look, zone.id).growing
    total = sum(month.precip_mm for month in normals)
    names = figures.months(growing) if growing else say("months.none")
    line = say("zone.year_line", rain=figures.rain(total), months=names, days=zone.frost_free_days)
    drawing = year(
        [figures.rain_scale(month.precip_mm) for month in normals],
        [figures.warmth(month.mean_c) for month in normals],
        growing,
        look.belts[zone.id],
        look.phrases.words("months.initials"),
        line,
        look.palette,
        height=20.5,
    )
    return look.show(drawing), line


def soil_of(look: Look, zone_id: str) -> tuple[str, ...]:
    """The soil in a sentence or two: what it is, how deep, how much water it holds."""
    soil = look.region.soils[zone_id]
    figures, say = look.figures, look.phrases.say
    held = held_mm(look, zone_id)
    parts = [
        say(
            "zone.soil",
            summary=soil.summary[:1].upper() + soil.summary[1:],
            depth=figures.depth(soil.rooting_depth_cm),
            held=figures.rain(held),
        )
    ]
    parts.append(say("zone.restriction", text=soil.restriction))
    top = soil.layers[0]
    if top.kind == "mineral" and top.sand_pct is not None:
        name = texture_class(top.sand_pct, top.silt_pct or 0, top.clay_pct or 0)
        parts.append(
            say(
                "zone.topsoil",
                texture=look.phrases.named("texture", name.replace(" ", "_")),
                depth=figures.depth(top.bottom_cm),
                ph=figures.short(top.ph, 1),
            )
        )
    return tuple(parts)
