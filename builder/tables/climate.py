"""climate.csv: monthly normals of each zone at its height."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import HEIGHT, MONTH, Number, Record, Ref, column


@dataclass(frozen=True, kw_only=True)
class Month(Record):
    """The normals of one month in one zone."""

    zone_id: str = column(Ref("zones"))
    elevation_m: float = column(HEIGHT)
    month: int = column(MONTH)
    tmax_c: float = column(Number(-70, 60))
    tmin_c: float = column(Number(-70, 60))
    precip_mm: float = column(Number(0, 3000))

    @property
    def mean_c(self) -> float:
        """Mean of day and night. [degrees C]"""
        return (self.tmax_c + self.tmin_c) / 2
