"""Plots as a session reads them, in arrays: what stood on each plot and what its site was."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Any

import numpy as np
from numpy.typing import NDArray

NOT_SEARCHED, ABSENT, NO_COVER = -2, -1, 4


@dataclass(frozen=True)
class Plots:
    """Plots in the order of the file; plants in the order of the pack.

    ids      plot ids
    steps    [plot, plant] int8: -2 not searched, -1 not found, 0..3 cover step, 4 no cover given
    cover    [plot, plant] float32 cover, 0 where not found; decides what covers most [percent]
    place    columns by name, [plot], not-a-number where unknown: height_m, slope_pct, aspect_deg
    month    [plot] 1..12, 0 unknown; disturbance: ids, None where undisturbed or unknown
    answers  {question id: [plot] value or None}
    """

    ids: list[str]
    steps: NDArray[np.int8]
    cover: NDArray[np.float32]
    place: dict[str, NDArray[np.float64]] = field(default_factory=dict)
    month: NDArray[np.int64] | None = None
    disturbance: list[str | None] | None = None
    answers: dict[str, list[str | None]] = field(default_factory=dict)

    def __len__(self) -> int:
        return len(self.ids)

    def site(self, at: int, month: int | None, disturbance: str | None) -> dict[str, Any]:
        """The site check record of one plot without findings; its own state before the given."""
        place = {
            name: None if np.isnan(values[at]) else float(values[at])
            for name, values in self.place.items()
        }
        own_month = int(self.month[at]) if self.month is not None else 0
        own = self.disturbance[at] if self.disturbance is not None else None
        asked = {name: values[at] for name, values in self.answers.items()}
        return {
            "place": place,
            "month": own_month or month,
            "disturbance": own or disturbance,
            "questions": {name: value for name, value in asked.items() if value is not None},
            "digging": {"cleared": "lines"},
            "findings": [],
        }

    def take(self, rows: NDArray[np.int64]) -> Plots:
        """These plots alone."""
        picked = [int(row) for row in rows]
        return Plots(
            [self.ids[row] for row in picked],
            self.steps[rows],
            self.cover[rows],
            {name: values[rows] for name, values in self.place.items()},
            None if self.month is None else self.month[rows],
            None if self.disturbance is None else [self.disturbance[row] for row in picked],
            {name: [values[row] for row in picked] for name, values in self.answers.items()},
        )
