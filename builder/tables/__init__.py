"""Region tables as typed records that know where each value was written."""

from builder.tables.climate import Month
from builder.tables.loading import Loaded, load_region
from builder.tables.occurrence import Occurrence
from builder.tables.plants import Caution, Group, Plant
from builder.tables.production import Production
from builder.tables.questions import Answer, Condition, Effect, Question, Rule
from builder.tables.reclaim import Cell, ReclaimFile, Success, ZoneNotes
from builder.tables.region import CoverClass, CoverScale, Disturbance, RegionHead, SuccessRule
from builder.tables.regions import Region
from builder.tables.seed import Mix, Propagule
from builder.tables.shape import Record
from builder.tables.soils import Layer, Soil
from builder.tables.sources import Provenance, Source
from builder.tables.zones import Zone

__all__ = [
    "Answer",
    "Caution",
    "Cell",
    "Condition",
    "CoverClass",
    "CoverScale",
    "Disturbance",
    "Effect",
    "Group",
    "Layer",
    "Loaded",
    "Mix",
    "Month",
    "Occurrence",
    "Plant",
    "Production",
    "Propagule",
    "Provenance",
    "Question",
    "ReclaimFile",
    "Record",
    "Region",
    "RegionHead",
    "Rule",
    "Soil",
    "Source",
    "Success",
    "SuccessRule",
    "Zone",
    "ZoneNotes",
    "load_region",
]
