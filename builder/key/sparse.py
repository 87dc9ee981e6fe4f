"""Zone tables written short: what all other zones share once, then the zones that differ.

Most plants stand in a third of the zones; elsewhere their evidence is the same number. A table
[row, zone] becomes [rest, zones, here]: rest [row] holds for every zone not listed in zones,
here [zone listed][row] for those. Half the bytes of the full table after gzip.
"""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

Ints = NDArray[np.int32]


def shorten(table: Ints) -> list[Any]:
    """[rest, zones, here] of a table [row, zone]."""
    columns, at, counts = np.unique(table, axis=1, return_inverse=True, return_counts=True)
    rest = int(counts.argmax())
    zones = np.flatnonzero(at.reshape(-1) != rest)
    return [columns[:, rest].tolist(), zones.tolist(), table[:, zones].T.tolist()]


def lengthen(short: list[Any], zone_count: int) -> Ints:
    """The table [row, zone] again."""
    rest, zones, here = short
    table = np.repeat(np.array(rest, np.int32)[:, None], zone_count, axis=1)
    for z, column in zip(zones, here, strict=True):
        table[:, z] = column
    return table
