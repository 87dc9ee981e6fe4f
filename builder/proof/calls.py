"""Calls of many sites on one kind of ground, with all that a proof wants to see."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk import VERDICTS, judge_many
from builder.key.bulk_ground import ground_of
from builder.key.bulk_session import hear_all, hear_session
from builder.key.bulk_weigh import Heard, weigh_many
from builder.key.compile import Arrays, Fitted, arrays_of, compile_key
from builder.key.context import context_of
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key, Pack, Site, prepare
from builder.key.session import class_code
from builder.key.tables_bulk import answer_tables
from builder.key.usual import usual_fit
from builder.tables import Region

ASK_ON: dict[str, Any] = {"sure": 2.0, "least_gain": -9.0}
"""Settings of a session that goes on to its last answer."""


@dataclass(frozen=True)
class Calls:
    """Calls in arrays.

    belief [site, zone]; verdict [site] index into VERDICTS; pair, fit, finds_cb, asked [site]
    scores [site, 4] zone, edge, mosaic, misfit; heard: what was answered
    """

    belief: Floats
    verdict: NDArray[np.int64]
    pair: NDArray[np.int64]
    fit: Floats
    scores: Floats
    finds_cb: NDArray[np.int64]
    asked: NDArray[np.int64]
    heard: Heard

    @property
    def leader(self) -> NDArray[np.int64]:
        """Index of the zone believed most, first of equals."""
        return np.asarray(self.belief.argmax(axis=1))

    @property
    def stated(self) -> Floats:
        """Belief in the leader."""
        return np.asarray(self.belief.max(axis=1))

    def share(self, verdict: str) -> float:
        """How often a verdict was given."""
        return float((self.verdict == VERDICTS.index(verdict)).mean())


def call_sites(key: Key, plots: Plots, answers: int | None, site: Site | None = None) -> Calls:
    """Calls of sites that share month, disturbance and answers of state.

    answers  at most this many, as builder.key.session asks; None: every plant searched
    site     what the sites share: month, disturbance, questions of state
    """
    context = context_of(key, site or {})
    tables = answer_tables(key, context)
    ground = ground_of(key, context, plots)
    if answers is None:
        heard = hear_all(key, context, plots, ground)
    else:
        heard = hear_session(key, context, tables, plots, ground, answers)
    weighing = weigh_many(key, context, tables, heard)
    made = judge_many(key, context, tables, heard, weighing)
    return Calls(
        made["belief"],
        made["verdict"],
        made["pair"],
        made["fit"],
        made["scores"],
        made["finds_cb"],
        made["answers"],
        heard,
    )


def pack_for(
    region: Region, fitted: Fitted | None = None, usual_sites: int | None = None
) -> tuple[Pack, Arrays]:
    """The key's part of a region's pack, and the counts behind it.

    usual_sites  simulated sites a zone for what is usual; None: as the pack has it
    """
    pack = compile_key(region, fitted)
    arrays = fitted.arrays if fitted else arrays_of(region)
    if not pack["settings"]["fit"]:
        more = {} if usual_sites is None else {"sites_per_zone": usual_sites}
        pack["settings"]["fit"] = usual_fit(pack, arrays, **more)
    return pack, arrays


def with_settings(pack: Pack, settings: dict[str, Any]) -> Key:
    """A key of the same pack with some settings replaced."""
    return prepare({**pack, "settings": {**pack["settings"], **settings}})


def without_zone(region: Region, zone_id: str) -> Region:
    """A region whose tables do not know one of its zones."""
    zones = tuple(
        replace(zone, neighbours=tuple(one for one in zone.neighbours if one != zone_id))
        for zone in region.zones
        if zone.id != zone_id
    )
    kept = {at: one for at, one in region.occurrence.items() if at[0] != zone_id}
    return replace(region, zones=zones, occurrence=kept)


def record_of(key: Key, heard: Heard, plots: Plots, at: int) -> Site:
    """The site check a person would hand in for one of the sites."""
    named = [int(p) for p in heard.named[at] if p >= 0]
    others = [int(p) for p in np.flatnonzero(heard.steps[at] > -2) if p not in named]
    findings = []
    for p in [*named, *others]:
        found = heard.steps[at, p] >= 0
        row: dict[str, Any] = {
            "plant_id": key.pack["plants"][p]["id"],
            "state": "found" if found else "not_found",
        }
        if found:
            row["cover"] = class_code(key, float(plots.cover[at, p]))
        if p in named:
            row["named"] = named.index(p) + 1
        findings.append(row)
    return {"findings": findings}
