"""The one rounding rule of builder and phone: halves up."""

from __future__ import annotations

import math
from typing import Any

import numpy as np
from numpy.typing import ArrayLike, NDArray

NATS_PER_CENTIBAN = math.log(10.0) / 100.0
"""Natural log units in one centiban; 100 centibans are a factor ten."""


def round_half_up(values: ArrayLike) -> NDArray[np.int32]:
    """Whole numbers, halves up. values: any shape"""
    return np.floor(np.asarray(values, float) + 0.5).astype(np.int32)


def round6(values: Any) -> Any:
    """To 1e-6, halves up: belief, gain and fit before any comparison. A number or an array."""
    if isinstance(values, np.ndarray):
        return np.floor(values * 1e6 + 0.5) / 1e6
    return math.floor(float(values) * 1e6 + 0.5) / 1e6
