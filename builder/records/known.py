"""What a region's tables tell about a record: names, cover classes, which plants are sensitive."""

from __future__ import annotations

import math
from dataclasses import dataclass, field

from builder.records.clean import Record
from builder.tables import Region

UNKNOWN_ROUNDING_DEG = 0.1
M_PER_DEGREE = 111_320.0
"""Length of a degree along a meridian, mean. [m]"""


@dataclass(frozen=True)
class PlantName:
    """Names of a plant and what is needed to say that it was looked for."""

    scientific: str
    common: str
    family: str
    months: tuple[int, int]
    known_when_dry: bool

    def seen_in(self, month: int) -> bool:
        """Whether it can be recognised in a month, 1 to 12."""
        first, last = self.months
        inside = first <= month <= last if first <= last else month >= first or month <= last
        return inside or self.known_when_dry


@dataclass(frozen=True)
class Known:
    """Names of one region.

    classes        cover class code → (low, high) [%]
    sensitive      ids of plants whose positions are rounded
    rounding_deg   width of the cell they are rounded to [degrees]
    plot_area_m2   of the plot searched [m2]; None when unknown
    """

    region_id: str
    name: str
    zones: dict[str, str] = field(default_factory=dict)
    plants: dict[str, PlantName] = field(default_factory=dict)
    groups: dict[str, tuple[str, tuple[str, ...]]] = field(default_factory=dict)
    questions: dict[str, tuple[str, dict[str, str]]] = field(default_factory=dict)
    disturbances: dict[str, str] = field(default_factory=dict)
    scale: str = ""
    classes: dict[str, tuple[float, float]] = field(default_factory=dict)
    sensitive: frozenset[str] = frozenset()
    rounding_deg: float = UNKNOWN_ROUNDING_DEG
    plot_area_m2: float | None = None
    is_known: bool = False


@dataclass(frozen=True)
class Position:
    """Where a record may be said to lie. [degrees, WGS 84], uncertainty_m a radius [m]"""

    latitude_deg: float
    longitude_deg: float
    uncertainty_m: float | None
    rounded: bool


def known_of(region: Region) -> Known:
    """The names of a region's tables."""
    plants = {
        one.id: PlantName(one.scientific, one.common, one.family, one.months, one.known_when_dry)
        for one in region.plants
    }
    return Known(
        region_id=region.id,
        name=region.name,
        zones={zone.id: zone.name for zone in region.zones},
        plants=plants,
        groups={group.id: (group.name, group.members) for group in region.groups},
        questions={
            one.id: (one.ask, {answer.value: answer.label for answer in one.answers})
            for one in region.questions
        },
        disturbances={one.id: one.name for one in region.disturbances},
        scale=region.head.cover_scale.name,
        classes={one.code: (one.low_pct, one.high_pct) for one in region.head.cover_scale.classes},
        sensitive=frozenset(one.id for one in region.plants if one.sensitive),
        rounding_deg=region.head.sensitive_rounding_deg,
        plot_area_m2=region.head.plots_behind.area_m2,
        is_known=True,
    )


class Knowledge:
    """Names by region; a region nobody has tables of shows ids and rounds every position."""

    def __init__(self, regions: list[Known]) -> None:
        self.regions = {one.region_id: one for one in regions}

    def of(self, site: Record) -> Known:
        """The names of a record's region."""
        region_id = site["region_id"]
        return self.regions.get(region_id) or Known(region_id, region_id)

    def unknown(self, sites: list[Record]) -> list[str]:
        """Regions of records that nobody has tables of."""
        return sorted({site["region_id"] for site in sites} - self.regions.keys())


def is_sensitive(site: Record, known: Known) -> bool:
    """Whether a record's position is rounded: a sensitive plant was found, or none can tell."""
    if not known.is_known:
        return True
    for finding in site["findings"]:
        if finding["state"] == "found" and known.sensitive.intersection(members(finding, known)):
            return True
    return False


def members(finding: Record, known: Known) -> tuple[str, ...]:
    """The plants a finding speaks of: one, or those of a group."""
    if "plant_id" in finding:
        return (finding["plant_id"],)
    return known.groups.get(finding["group_id"], ("", ()))[1]


def position_of(site: Record, known: Known) -> Position | None:
    """Where a record lies, rounded where a sensitive plant was found; None without a position.

    A rounded position is the middle of its cell, its uncertainty reaches the corners.
    """
    place = site["place"]
    latitude, longitude = place["latitude_deg"], place["longitude_deg"]
    if latitude is None or longitude is None:
        return None
    if not is_sensitive(site, known) or known.rounding_deg == 0:
        return Position(round(latitude, 7), round(longitude, 7), place["accuracy_m"], False)
    step = known.rounding_deg
    middle = min(89.9, max(-89.9, _middle(latitude, step)))
    across = step * M_PER_DEGREE * math.cos(math.radians(max(0.0, abs(middle) - step / 2)))
    reach = math.hypot(step * M_PER_DEGREE, across) / 2 + (place["accuracy_m"] or 0)
    east = min(180.0, max(-180.0, _middle(longitude, step)))
    return Position(middle, east, float(math.ceil(reach)), True)


def ground_of(site: Record, known: Known) -> Record:
    """Height, slope and aspect; nothing where the position is rounded, which they would undo."""
    hidden = is_sensitive(site, known) and known.rounding_deg > 0
    names = ("height_m", "slope_pct", "aspect_deg")
    return {name: None if hidden else site["place"][name] for name in names}


def _middle(degrees: float, step: float) -> float:
    return round((math.floor(degrees / step) + 0.5) * step, 7)


def standing_zone(site: Record) -> str | None:
    """The zone that counts: a person's where the call was overruled, else the call's."""
    overruled, kept = site["overruled"] or {}, site["call"] or {}
    found = overruled.get("zone_id") or kept.get("zone_id")
    return found if isinstance(found, str) else None


def belief_of(site: Record) -> float | None:
    """The belief of the kept call in its own zone, 0..1; None where none stands."""
    kept = site["call"] or {}
    belief = kept.get("belief")
    found = belief.get(kept.get("zone_id")) if isinstance(belief, dict) else None
    is_share = isinstance(found, int | float) and not isinstance(found, bool)
    return float(found) if is_share and 0 <= found <= 1 else None  # type: ignore[operator,arg-type]
