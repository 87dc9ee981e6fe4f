"""Plants as finished text and drawings: pages by growth form, rows of the diagonal chart."""

from dataclasses import dataclass

from markupsafe import Markup

from builder.drawings.kites import amplitude, kite_head, kite_row
from builder.drawings.year import months
from builder.tables import Caution, Plant
from builder.views.figures import month_span
from builder.views.look import Look

FORM_ORDER = (
    "tree", "shrub", "dwarf_shrub", "subshrub", "succulent", "vine", "grass_bunch", "grass_sod",
    "grass_annual", "sedge_rush", "forb_perennial", "forb_biennial", "forb_annual", "fern", "moss",
    "lichen",
)  # fmt: skip

OFF_SLOPE_FROM = 0.6
"""A plant with this share of its constancy beside the slope is sorted with that ground."""


@dataclass(frozen=True)
class Warn:
    """A caution as it is shown: for whom, how bad, what to do."""

    head: str
    text: str
    people: bool
    deadly: bool


@dataclass(frozen=True)
class PlantView:
    """Everything the pages say about one plant."""

    id: str
    name: str
    latin: str
    family: str
    also: str
    form: Markup
    form_name: str
    marks: str
    when: str
    season: Markup
    amplitude: Markup
    home: str
    tell: str
    kin: str
    after: str
    warns: tuple[Warn, ...]


@dataclass(frozen=True)
class FormGroup:
    """Plants of one growth form."""

    form: str
    title: str
    picture: Markup
    plants: tuple[PlantView, ...]


@dataclass(frozen=True)
class KiteRow:
    """One plant in the diagonal chart."""

    plant_id: str
    name: str
    kite: Markup


@dataclass(frozen=True)
class Chart:
    """The diagonal chart: plants in order of where they stand on the slope."""

    head: Markup
    rows: tuple[KiteRow, ...]


def warn(look: Look, caution: Caution, text: str = "") -> Warn:
    """A caution's view."""
    head = look.phrases.say(f"cautions.{caution.who}_{caution.level}")
    return Warn(head, text or caution.text, caution.who == "people", caution.level == "deadly")


def plant_warns(look: Look, plant: Plant) -> tuple[Warn, ...]:
    """A plant's cautions, those for people first."""
    words = look.region.words.get(look.phrases.language)
    own = words.plant_cautions.get(plant.id, "") if words is not None else ""
    ordered = sorted(plant.cautions, key=lambda each: each.who != "people")
    return tuple(warn(look, each, own if len(plant.cautions) == 1 else "") for each in ordered)


def plant_view(look: Look, plant: Plant) -> PlantView:
    """A plant's view."""
    say = look.phrases.say
    name = look.plant_name(plant.id)
    shares = look.shares(plant.id)
    inside = month_span(*plant.months)
    when = look.figures.months(inside)
    also = [*plant.local, *plant.synonyms]
    return PlantView(
        id=plant.id,
        name=name,
        latin=plant.scientific if name != plant.scientific else "",
        family=plant.family,
        also=say("plant.also", list=", ".join(also)) if also else "",
        form=look.form(plant.form, 5.2),
        form_name=look.phrases.named("forms.one", plant.form),
        marks=plant.marks,
        when=say("plant.when_dry" if plant.known_when_dry else "plant.when", months=when),
        season=look.show(
            months(
                inside, look.belts[look.column_ids[0]], look.phrases.words("months.initials"),
                say("plant.season_title", months=when), look.palette, 30, 2.6,
            )
        ),
        amplitude=look.show(
            amplitude(
                shares, look.in_columns, say("plant.amplitude_title", zones=_home(look, shares)),
                look.palette,
                27,
                3.5,
            )
        ),
        home=_home(look, shares),
        tell=plant.lookalike_tell,
        kin=(
            say("plant.told", names=", ".join(look.plant_name(each) for each in plant.lookalikes))
            if plant.lookalikes
            else ""
        ),
        after="; ".join(
            words
            for words in (
                look.phrases.named("fates", plant.fate),
                look.phrases.named("responses", plant.response),
                _origin(look, plant),
            )
            if words
        ),
        warns=plant_warns(look, plant),
    )  # fmt: skip


def _home(look: Look, shares: list[float]) -> str:
    """Letters of the zones that hold the plant, the most constant first."""
    held = sorted(
        ((-share, place) for place, share in enumerate(shares) if share > 0),
    )
    return ", ".join(look.in_columns[place].letter for _, place in held)


def _origin(look: Look, plant: Plant) -> str:
    if plant.weed in ("ruderal", "invasive"):
        return look.phrases.named("weeds", plant.weed)
    return look.phrases.named("origins", plant.origin) if plant.origin != "native" else ""


def by_form(look: Look) -> list[FormGroup]:
    """Plants grouped by growth form; look-alikes stand next to one another.

    Within a form the order is that of the slope, and each plant is followed by its
    look-alikes of the same form that have not been set yet.
    """
    places = {plant.id: _place(look, plant.id) for plant in look.region.plants}
    order = {plant.id: number for number, plant in enumerate(look.region.plants)}
    groups = []
    for form in FORM_ORDER:
        here = [plant for plant in look.region.plants if plant.form == form]
        if not here:
            continue
        here.sort(key=lambda plant: (places[plant.id], order[plant.id]))
        groups.append(
            FormGroup(
                form,
                look.phrases.named("forms.many", form),
                look.form(form, 8),
                tuple(plant_view(look, plant) for plant in _pairs_together(here)),
            )
        )
    return groups


def _pairs_together(plants: list[Plant]) -> list[Plant]:
    known = {plant.id: plant for plant in plants}
    placed: dict[str, Plant] = {}
    for plant in plants:
        if plant.id in placed:
            continue
        placed[plant.id] = plant
        for other in plant.lookalikes:
            if other in known and other not in placed:
                placed[other] = known[other]
    return list(placed.values())


def _place(look: Look, plant_id: str) -> float:
    """Mean place on the slope, weighted by constancy.

    Plants that live mostly beside the slope come after it; plants in no table come last.
    """
    shares = look.shares(plant_id)
    total = sum(shares)
    if not total:
        return float(len(shares))
    lens = [belt.lens for belt in look.in_columns]
    beside = sum(share for share, off in zip(shares, lens, strict=True) if off)
    wanted = beside / total >= OFF_SLOPE_FROM
    held = [
        (place, share)
        for place, (share, off) in enumerate(zip(shares, lens, strict=True))
        if off == wanted
    ]
    weight = sum(share for _, share in held)
    return round(sum(place * share for place, share in held) / weight, 6)


def chart(look: Look, width: float = 50, least: float = 0.0) -> Chart:
    """The diagonal chart.

    least  plants that reach this constancy in some zone [0..1]
    """
    order = {plant.id: number for number, plant in enumerate(look.region.plants)}
    chosen = [
        plant for plant in look.region.plants if max(look.shares(plant.id), default=0) >= least
    ]
    chosen.sort(key=lambda plant: (_place(look, plant.id), order[plant.id]))
    rows = tuple(
        KiteRow(
            plant.id,
            look.plant_name(plant.id),
            look.show(
                kite_row(
                    look.shares(plant.id), look.in_columns,
                    look.phrases.say("chart.row_title", name=look.plant_name(plant.id),
                                     zones=_home(look, look.shares(plant.id))),
                    look.palette, width,
                )
            ),
        )
        for plant in chosen
    )  # fmt: skip
    return Chart(look.show(kite_head(look.in_columns, look.palette, width)), rows)
