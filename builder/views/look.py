"""What every view needs: the region, its words, its figures, its inks and its belts."""

from dataclasses import dataclass
from functools import cached_property

from markupsafe import Markup

from builder.drawings.belts import Belt, belts_of, in_stack_order, tab
from builder.drawings.forms import form
from builder.drawings.hoops import hoop
from builder.drawings.ink import PRINT, Palette, picture
from builder.tables import Plant, Region, Zone
from builder.views.figures import Figures
from builder.views.phrases import Phrases, phrases


@dataclass(frozen=True)
class Look:
    """One region as it will be shown: in a language, on paper or on a screen."""

    region: Region
    phrases: Phrases
    palette: Palette = PRINT

    @property
    def figures(self) -> Figures:
        """How numbers are written here."""
        return Figures(self.phrases, us=self.region.units == "us")

    @cached_property
    def belts(self) -> dict[str, Belt]:
        """Each zone's belt."""
        return belts_of(self.region.zones)

    @cached_property
    def zones(self) -> dict[str, Zone]:
        """Zones by id."""
        return {zone.id: zone for zone in self.region.zones}

    @cached_property
    def plants(self) -> dict[str, Plant]:
        """Plants by id."""
        return {plant.id: plant for plant in self.region.plants}

    @cached_property
    def in_columns(self) -> list[Belt]:
        """Belts as charts show them: the slope, then the ground beside it."""
        slope_first = sorted(self.region.zones, key=lambda zone: zone.kind == "azonal")
        return [self.belts[zone.id] for zone in slope_first]

    @cached_property
    def column_ids(self) -> list[str]:
        """Zone ids in the order of in_columns."""
        return [zone.id for zone in sorted(self.region.zones, key=lambda z: z.kind == "azonal")]

    @cached_property
    def stack(self) -> list[str]:
        """Zone ids from the foot of the edge up."""
        return [zone.id for zone in in_stack_order(self.region.zones)]

    def plant_name(self, plant_id: str) -> str:
        """A plant's common name; its scientific name where this language has none."""
        plant = self.plants[plant_id]
        words = self.region.words.get(self.phrases.language)
        if words is None:
            return plant.common
        return words.plants.get(plant_id) or plant.scientific

    def zone_name(self, zone_id: str) -> str:
        """A zone's full name."""
        words = self.region.words.get(self.phrases.language)
        own = words.zones.get(zone_id) if words is not None else None
        return own.name if own is not None else self.zones[zone_id].name

    def zone_short(self, zone_id: str) -> str:
        """A zone's short name."""
        words = self.region.words.get(self.phrases.language)
        own = words.zones.get(zone_id) if words is not None else None
        return (own.short or own.name) if own is not None else self.zones[zone_id].short

    def zone_line(self, zone_id: str) -> str:
        """The one line that says what a zone looks like."""
        words = self.region.words.get(self.phrases.language)
        own = words.zones.get(zone_id) if words is not None else None
        return (own.one_line if own is not None else "") or self.zones[zone_id].one_line

    def disturbance_name(self, disturbance_id: str, name: str) -> str:
        """A disturbance's name."""
        words = self.region.words.get(self.phrases.language)
        return (words.disturbances.get(disturbance_id) if words is not None else None) or name

    def show(self, drawing: str) -> Markup:
        """A drawing for the page: inline on a screen, a picture of its own on paper."""
        return Markup(picture(drawing) if self.palette.inline else drawing)

    def tab(self, zone_id: str, side: float = 5.6) -> Markup:
        """A zone's square mark."""
        return self.show(tab(self.belts[zone_id], self.palette, side))

    def hoop(self, cover_pct: float, size: float = 4.6) -> Markup:
        """The hoop of the class a cover falls into."""
        each = self.region.cover_scale.class_of(cover_pct)
        return self.show(hoop(each.mid_pct / 100, each.label, self.palette, size))

    def form(self, name: str, size: float = 4.6) -> Markup:
        """A growth form's pictogram."""
        return self.show(form(name, self.phrases.named("forms.one", name), self.palette, size))

    def shares(self, plant_id: str) -> list[float]:
        """A plant's constancy in each zone, in the order of in_columns. [0..1]"""
        found = self.region.occurrence
        return [
            found[zone, plant_id].constancy if (zone, plant_id) in found else 0.0
            for zone in self.column_ids
        ]


def look(region: Region, language: str = "en", palette: Palette = PRINT) -> Look:
    """A region's look. Refused: a language without words (ValueError)."""
    return Look(region, phrases(language), palette)
