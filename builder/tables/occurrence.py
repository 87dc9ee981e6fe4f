"""occurrence.yaml: which plant stands in which zone, how constantly and how much of it."""

from __future__ import annotations

from dataclasses import dataclass

from builder.problems import Place
from builder.tables.shape import Keyed, Presence, Record, column


@dataclass(frozen=True, slots=True)
class Occurrence:
    """Constancy and mean cover where present, of one plant in one zone."""

    zone_id: str
    plant_id: str
    constancy: float
    cover_pct: float
    at: Place

    @property
    def constancy_pct(self) -> float:
        """Constancy as written. [%]"""
        return self.constancy * 100


@dataclass(frozen=True, kw_only=True)
class OccurrenceFile(Record):
    """occurrence.yaml as written: one plant a line, zone: [constancy, cover]."""

    occurrence: dict[str, dict[str, tuple[float | str, float | str]]] = column(
        Keyed(Keyed(Presence(), table="zones"), table="plants")
    )
