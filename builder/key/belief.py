"""From answers to belief: sum, drag, prior, softmax, and a little doubt that never leaves."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from builder.key.answers import Answer, Reading, read_answers
from builder.key.context import Context
from builder.key.findings import Findings, step_of
from builder.key.height import height_points
from builder.key.prepare import Floats, Ints, Key, Site
from builder.key.rounding import NATS_PER_CENTIBAN, round6, round_half_up


@dataclass(frozen=True)
class Weighed:
    """Everything a call is made of.

    n        answers that tell two zones apart; drag: what the sum is divided by
    bound    lowest cover step named as most plentiful, -1 for none
    implied, height  whole centibans per zone; total: centibans per zone before the doubt floor
    belief   per zone, rounded to 1e-6; order: zone indexes by belief, ties in pack order
    """

    reading: Reading
    n: int
    drag: float
    bound: int
    implied: Ints
    height: Ints
    total: Floats
    belief: Floats
    order: list[int]

    @property
    def best_two(self) -> tuple[int, int]:
        """Zone with most belief and the runner-up; itself again where a region has one zone."""
        return self.order[0], self.order[min(1, len(self.order) - 1)]

    @property
    def answers(self) -> list[Answer]:
        return self.reading.answers

    @property
    def context(self) -> Context:
        return self.reading.context

    @property
    def findings(self) -> Findings:
        return self.reading.findings


def weigh_site(key: Key, site: Site) -> Weighed:
    """total = area + height + (sum of points + implied) / drag, in centibans per zone."""
    reading = read_answers(key, site)
    n = sum(one.counts for one in reading.answers)
    points = sum((one.points for one in reading.answers), np.zeros(key.zones, np.int64))
    bound = _implied_bound(key, site, reading)
    implied = _implied_points(key, reading, bound)
    height = height_points(key, site, reading.context)
    drag = drag_of(key, n)
    total = key.area + height + (points + implied) / drag
    belief = belief_of(key, total)
    order = sorted(range(key.zones), key=lambda z: (-belief[z], z))
    return Weighed(reading, n, drag, bound, implied, height, total, belief, order)


def drag_of(key: Key, n: int | NDArray[np.int64]) -> float:
    """What n answers that repeat each other are divided by: 1 + rho min(n - 1, cap)."""
    extra = np.clip(np.asarray(n) - 1, 0, key.settings["drag_cap_answers"])
    drag: float = 1 + key.settings["drag"] * extra
    return drag


def belief_of(key: Key, total: Floats) -> Floats:
    """Softmax of centibans (last axis) mixed with a uniform share, rounded to 1e-6."""
    weights = np.exp((total - total.max(axis=-1, keepdims=True)) * NATS_PER_CENTIBAN)
    share = weights / weights.sum(axis=-1, keepdims=True)
    doubt = key.settings["uniform_share"]
    belief: Floats = round6((1.0 - doubt) * share + doubt / key.zones)
    return belief


def _implied_bound(key: Key, site: Site, reading: Reading) -> int:
    if reading.context.disturbed or "implied" in (site.get("struck") or []):
        return -1
    findings = reading.findings
    steps = [step_of(key, findings.plants[p].get("cover")) for p in findings.named]
    lowest = min((step for step in steps if step < 4), default=4)
    return lowest if lowest < 3 else -1


def implied_open(key: Key, reading: Reading) -> NDArray[np.bool_]:
    """Plants about which naming others says something: in season, neither asked nor grouped."""
    free = (reading.context.v == 4) & ~reading.context.sown
    free[list(reading.findings.plants)] = False
    for g in reading.findings.groups:
        free[key.pack["groups"][g]["members"]] = False
    return np.asarray(free, bool)


def _implied_points(key: Key, reading: Reading, bound: int) -> Ints:
    if bound < 0:
        return np.zeros(key.zones, np.int32)
    points = key.implied[implied_open(key, reading), bound].sum(axis=0)
    return round_half_up(points * key.settings["implied_weight"])
