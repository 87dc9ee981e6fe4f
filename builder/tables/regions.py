"""A region: all its tables as records."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Any, TypeVar

from builder.rows import Row
from builder.tables.climate import Month
from builder.tables.languages import Words
from builder.tables.occurrence import Occurrence, OccurrenceFile
from builder.tables.plants import Caution, Group, Plant, PlantsFile
from builder.tables.production import Production, ProductionFile
from builder.tables.questions import Question, QuestionsFile, Rule
from builder.tables.reclaim import ReclaimFile
from builder.tables.region import CoverScale, Disturbance, RegionHead, SuccessRule
from builder.tables.seed import Mix, SeedFile
from builder.tables.shape import Record
from builder.tables.soils import Soil, SoilsFile
from builder.tables.sources import Provenance, Source, SourcesFile, provenance_of
from builder.tables.zones import Zone, ZonesFile

YAML_TABLES: dict[str, type[Record]] = {
    "region": RegionHead,
    "zones": ZonesFile,
    "plants": PlantsFile,
    "occurrence": OccurrenceFile,
    "questions": QuestionsFile,
    "production": ProductionFile,
    "soils": SoilsFile,
    "reclaim": ReclaimFile,
    "seed": SeedFile,
    "sources": SourcesFile,
}
CLIMATE_COLUMNS = ("zone_id", "elevation_m", "month", "tmax_c", "tmin_c", "precip_mm")


Named = TypeVar("Named", Zone, Plant, Group, Question)


@dataclass(frozen=True)
class Region:
    """Everything a region's tables say."""

    head: RegionHead
    zones: tuple[Zone, ...]
    plants: tuple[Plant, ...]
    groups: tuple[Group, ...]
    occurrence: dict[tuple[str, str], Occurrence]
    questions: tuple[Question, ...]
    rules: tuple[Rule, ...]
    production: dict[str, Production]
    soils: dict[str, Soil]
    climate: dict[str, tuple[Month, ...]]
    reclaim: ReclaimFile
    mixes: dict[str, Mix]
    sources: dict[str, Source]
    words: dict[str, Words]
    files: dict[str, Any] = field(repr=False)

    @property
    def id(self) -> str:
        """The region's stable name."""
        return self.head.id

    @property
    def name(self) -> str:
        """The region's name for people."""
        return self.head.name

    @property
    def edition(self) -> str:
        """The edition every record keeps."""
        return self.head.edition

    @property
    def date(self) -> str:
        """The edition's date, year-month-day."""
        return self.head.date

    @property
    def latitude_deg(self) -> float:
        """Latitude of the region's middle. [degrees]"""
        return self.head.latitude_deg

    @property
    def elevation_m(self) -> tuple[float, float]:
        """Lowest and highest ground. [m]"""
        return self.head.elevation_m

    @property
    def units(self) -> str:
        """Units shown first: metric or us."""
        return self.head.units

    @property
    def invented(self) -> bool:
        """Whether the region is made up."""
        return self.head.invented

    @property
    def cover_scale(self) -> CoverScale:
        """The region's cover scale."""
        return self.head.cover_scale

    @property
    def disturbances(self) -> tuple[Disturbance, ...]:
        """Kinds of disturbance in table order."""
        return self.head.disturbances

    @property
    def success_rule(self) -> SuccessRule:
        """When reclaimed ground counts as done."""
        return self.head.success_rule

    @property
    def seeding_methods(self) -> dict[str, float | None]:
        """Rate factor by method; None where the method is not used."""
        return self.head.seeding_methods

    @property
    def cautions(self) -> tuple[Caution, ...]:
        """The region's own cautions."""
        return self.head.cautions

    @property
    def zone_ids(self) -> tuple[str, ...]:
        """Zone ids in table order."""
        return tuple(zone.id for zone in self.zones)

    @property
    def plant_ids(self) -> tuple[str, ...]:
        """Plant ids in table order."""
        return tuple(plant.id for plant in self.plants)

    def zone(self, zone_id: str) -> Zone:
        """The zone of an id. KeyError when there is none."""
        return _by_id(self.zones, zone_id)

    def plant(self, plant_id: str) -> Plant:
        """The plant of an id. KeyError when there is none."""
        return _by_id(self.plants, plant_id)

    def group(self, group_id: str) -> Group:
        """The group of an id. KeyError when there is none."""
        return _by_id(self.groups, group_id)

    def question(self, question_id: str) -> Question:
        """The ground question of an id. KeyError when there is none."""
        return _by_id(self.questions, question_id)

    def groups_of(self, plant_id: str) -> tuple[Group, ...]:
        """The groups a plant belongs to, in table order."""
        return tuple(group for group in self.groups if plant_id in group.members)

    def source_of(self, record: Record | Row, *path: str | int) -> Provenance | None:
        """Where the figure at a path below a record comes from; the nearest source wins."""
        return provenance_of(record.row if isinstance(record, Record) else record, *path)

    def source_of_occurrence(self, zone_id: str, plant_id: str) -> Provenance | None:
        """Where a constancy and cover come from."""
        return provenance_of(self.files["occurrence"].row, "occurrence", plant_id, zone_id)


def _by_id(rows: tuple[Named, ...], wanted: str) -> Named:
    for row in rows:
        if row.id == wanted:
            return row
    raise KeyError(wanted)
