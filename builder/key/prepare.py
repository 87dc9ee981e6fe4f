"""Arrays and look-ups made once per pack; the twin of core/prepare.js."""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import cached_property
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.rounding import NATS_PER_CENTIBAN
from builder.key.sparse import lengthen

Pack = dict[str, Any]
Site = dict[str, Any]
Floats = NDArray[np.float64]
Ints = NDArray[np.int32]


@dataclass
class Key:
    """A pack made ready to answer.

    found [plant, 5, zone], absent [plant, 4, zone], implied [plant, 3, zone]: centibans
    presence [plant, zone] chance of a report; cover, lowered [plant, 4, zone] shares of steps
    """

    pack: Pack
    found: Ints
    absent: Ints
    implied: Ints
    presence: Floats
    cover: Floats
    lowered: Floats
    plant_at: dict[str, int]
    zone_at: dict[str, int]
    group_at: dict[str, int]
    class_at: dict[str, int]
    newcomer_at: dict[tuple[int, int, int], int]
    newcomer_found: Ints
    newcomer_absent: Ints
    kept: dict[Any, Any] = field(default_factory=dict)

    @property
    def settings(self) -> dict[str, Any]:
        settings: dict[str, Any] = self.pack["settings"]
        return settings

    @property
    def plants(self) -> int:
        return len(self.pack["plants"])

    @property
    def zones(self) -> int:
        return len(self.pack["zones"])

    @cached_property
    def area(self) -> Ints:
        """Whole centibans of the zones' shares of the region, [zone]."""
        return np.array(self.settings["area_cb"], np.int32)

    @cached_property
    def pairs(self) -> tuple[NDArray[np.int64], NDArray[np.int64], NDArray[np.bool_]]:
        """First zone, second zone, are they neighbours; in pack order."""
        first, second = np.triu_indices(self.zones, 1)
        near = [set(zone["neighbours"]) for zone in self.pack["zones"]]
        edge = np.array(
            [j in near[i] or i in near[j] for i, j in zip(first, second, strict=True)], bool
        )
        return first, second, edge


_prepared: list[Key] = []
_KEPT = 8


def prepare(pack: Pack) -> Key:
    """Prepare a pack, or hand back what was prepared before for this very object."""
    for key in _prepared:
        if key.pack is pack:
            return key
    key = _build(pack)
    _prepared.insert(0, key)
    del _prepared[_KEPT:]
    return key


def _build(pack: Pack) -> Key:
    evidence = pack["evidence"]
    zones, plants = len(pack["zones"]), len(pack["plants"])
    tables = np.array([lengthen(short, zones) for short in evidence["plants"]], np.int32)
    tables = tables.reshape(plants, 13, zones)
    found = tables[:, :5].copy()
    found[:, :4] += found[:, 4:]
    cover = _cover_shares(pack, found)
    newcomer = evidence["newcomer"]
    newcomers = _newcomers(newcomer["tables"], zones)
    return Key(
        pack=pack,
        found=found,
        absent=tables[:, 5:9],
        implied=tables[:, 9:12],
        presence=tables[:, 12] / 10000.0,
        cover=cover,
        lowered=lowered_cover(cover, pack["settings"]["mosaic_lower"]),
        plant_at=_by_id(pack["plants"]),
        zone_at=_by_id(pack["zones"]),
        group_at=_by_id(pack["groups"]),
        class_at={one["code"]: at for at, one in enumerate(pack["cover"]["classes"])},
        newcomer_at={(p, lv, half): at for at, (p, lv, half) in enumerate(newcomer["rows"])},
        newcomer_found=newcomers[:, 0],
        newcomer_absent=newcomers[:, 1],
    )


def _newcomers(tables: list[Any], zones: int) -> Ints:
    """[row, found or absent, v, zone]; what no disturbance can reach stays 0."""
    made = np.zeros((len(tables), 2, 5, zones), np.int32)
    for row, short in enumerate(tables):
        table = lengthen(short, zones).reshape(2, -1, zones).cumsum(axis=1)
        made[row, :, : table.shape[1]] = table
    return made


def _by_id(rows: list[dict[str, Any]]) -> dict[str, int]:
    return {row["id"]: at for at, row in enumerate(rows)}


def _cover_shares(pack: Pack, found: Ints) -> Floats:
    """Shares of the cover steps where a plant is reported: overall shares times evidence."""
    nats = NATS_PER_CENTIBAN / pack["settings"]["temper"]
    overall = np.array(pack["evidence"]["found_share"], float).reshape(-1, 4, 1)
    shares = overall * np.exp((found[:, :4] - found[:, 4:]) * nats)
    return np.asarray(shares / shares.sum(axis=1, keepdims=True))


def lowered_cover(cover: Floats, share: float) -> Floats:
    """In patches a plant may look one step less plentiful."""
    lowered = (1.0 - share) * cover
    lowered[:, 0] = cover[:, 0]
    lowered[:, :3] += share * cover[:, 1:]
    return lowered
