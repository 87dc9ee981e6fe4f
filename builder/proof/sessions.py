"""Sessions on many known plots: the sums behind the belief after so many answers.

The arithmetic is builder.key's own; this only keeps points, implied points and the count apart, so
that temper, drag and the weight of implication can be fitted afterwards.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk_ground import ground_of
from builder.key.bulk_session import hear_all, hear_session
from builder.key.bulk_weigh import Heard, implied_many, weigh_many
from builder.key.context import Context, context_of
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key, lowered_cover
from builder.key.tables_bulk import AnswerTables, answer_tables
from builder.key.weigh import Evidence

Whole = NDArray[np.int64]
PLAIN_PLANT: dict[str, Any] = {
    "form": "forb",
    "layer": "forb",
    "months": [],
    "known_when_dry": False,
    "weed": "none",
    "mix": False,
    "fate": "",
    "response": "",
    "groups": [],
    "price_micronats": 0,
}
PLAIN_ZONE: dict[str, Any] = {"neighbours": [], "kind": "zonal", "band_m": None}


@dataclass(frozen=True)
class Sums:
    """What sessions of one length added up to, before temper, drag and the prior.

    points, implied  [plot, zone] centibans, implied before its weight
    n                [plot] answers that tell zones apart
    asked            [plot, plant] was it answered
    belief           [plot, zone] as the key itself gives it
    """

    points: Floats
    implied: Floats
    n: Whole
    asked: NDArray[np.bool_]
    belief: Floats


HALF_GONE: dict[str, Any] = {
    "id": "half_gone",
    "notes": False,
    "dug": False,
    "states": {},
    "effect": {"kept": {"any": 0.5}},
    "disturbs": True,
}


def bare_key(
    evidence: Evidence, settings: dict[str, Any], near: Sequence[set[int]] | None = None
) -> Key:
    """A key of plants alone, for fitting: no ground questions, no seasons, no prices.

    near  neighbours of each zone; none if not given
    """
    plants, _, zones = evidence.found.shape
    pack = {
        "settings": settings,
        "zones": [
            {"id": str(z), **PLAIN_ZONE, "neighbours": sorted(near[z]) if near else []}
            for z in range(zones)
        ],
        "plants": [{"id": str(p), **PLAIN_PLANT} for p in range(plants)],
        "groups": [],
        "questions": [],
        "rules": [],
        "disturbances": [HALF_GONE],
    }
    none = np.zeros((0, 5, zones), np.int32)
    return Key(
        pack=pack,
        found=evidence.found,
        absent=evidence.absent,
        implied=evidence.implied,
        presence=evidence.presence,
        cover=evidence.cover,
        lowered=lowered_cover(evidence.cover, settings["mosaic_lower"]),
        plant_at={},
        zone_at={},
        group_at={},
        class_at={},
        newcomer_at={},
        newcomer_found=none,
        newcomer_absent=none,
    )


class Sessions:
    """Sessions of one key on undisturbed ground, of any length."""

    def __init__(self, key: Key) -> None:
        self.key = key
        self.context: Context = context_of(key, {})
        self.tables: AnswerTables = answer_tables(key, self.context)
        whole = {**key.settings, "implied_weight": 1}
        self._whole = replace(key, pack={**key.pack, "settings": whole})

    def after(self, plots: Plots, answers: int | None) -> Sums:
        """Up to three plants named, then the key's prompts; None: every plant answered."""
        ground = ground_of(self.key, self.context, plots)
        if answers is None:
            heard = hear_all(self.key, self.context, plots, ground)
        else:
            heard = hear_session(self.key, self.context, self.tables, plots, ground, answers)
        return self._sums(heard)

    def _sums(self, heard: Heard) -> Sums:
        weighing = weigh_many(self.key, self.context, self.tables, heard)
        return Sums(
            weighing.summed.points.astype(float),
            implied_many(self._whole, self.context, heard).astype(float),
            weighing.n,
            heard.steps > -2,
            weighing.belief,
        )
