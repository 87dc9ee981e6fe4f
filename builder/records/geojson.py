"""Records as GeoJSON for maps. RFC 7946 (2016): longitude first, WGS 84, no crs member."""

from __future__ import annotations

import json
from typing import Any

from builder.records.clean import Record
from builder.records.exchange import Records, shown_site
from builder.records.flat import SITE_COLUMNS, site_cells
from builder.records.known import Knowledge, Known, position_of

GEOMETRY = {"latitude_deg", "longitude_deg"}


def write_geojson(records: Records, knowledge: Knowledge, names: bool = False) -> str:
    """A FeatureCollection, one feature a record; one without position has no geometry.

    names  observers in full, else as initials
    """
    features = [_feature(shown_site(site, names), knowledge.of(site)) for site in records.sites]
    collection = {"type": "FeatureCollection", "features": features}
    return json.dumps(collection, ensure_ascii=False, allow_nan=False) + "\n"


def _feature(site: Record, known: Known) -> dict[str, Any]:
    position = position_of(site, known)
    cells = dict(zip(SITE_COLUMNS, site_cells(site, known), strict=True))
    about = {name: cell for name, cell in cells.items() if name not in GEOMETRY}
    point = None
    if position is not None:
        point = {"type": "Point", "coordinates": [position.longitude_deg, position.latitude_deg]}
    return {
        "type": "Feature",
        "id": site["id"],
        "geometry": point,
        "properties": {
            **about,
            "questions": site["questions"],
            "struck": site["struck"],
            "findings": site["findings"],
        },
    }
