"""Points per plant and zone learned from known plots on top of what the counts say.

Penalised multinomial logistic regression of the zone on the plants answered, with tau times the
evidence from the counts as an offset. Sessions of several lengths are learned from together, so
that the points serve after four answers as well as after all. What comes out is still points per
plant and answer: one column of zones for each cover threshold a find reaches.

Source: penalised likelihood, le Cessie & van Houwelingen 1992 (from memory).
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import minimize

from builder.key.fitted import THRESHOLDS, correction_nats
from builder.key.plots import NO_COVER
from builder.key.prepare import Floats

MOST_TURNS = 60


@dataclass(frozen=True)
class Corrections:
    """tau scales evidence from counts; learned [plant, threshold, zone] nats for reaching a cover
    threshold; usual [plant, threshold] share of plots that reach it, which centres the answer."""

    tau: float
    learned: Floats
    usual: Floats

    def nats(self) -> tuple[Floats, Floats]:
        """Nats added to "found" [plant, 5, zone] and to "not found" [plant, zone]."""
        return correction_nats(self.learned, self.usual)


@dataclass(frozen=True)
class Lessons:
    """Sessions to learn from; one row a plot and session length.

    offset, points [row, zone] nats: prior, and evidence of what was answered
    answers  [row, plant * threshold] centred answers, 0 where not asked
    drag     [row] what the sum is divided by; weight [row]; zone [row] the known zone; fold [row]
    """

    offset: Floats
    points: Floats
    answers: Floats
    drag: Floats
    weight: Floats
    zone: NDArray[np.int64]
    fold: NDArray[np.int64]

    def take(self, rows: NDArray[np.bool_]) -> Lessons:
        """Some of the rows."""
        return Lessons(*(getattr(self, name)[rows] for name in self.__dataclass_fields__))


def reached(steps: NDArray[np.int8]) -> Floats:
    """Which cover thresholds each plant reaches, [plot, plant, threshold], 0 or 1.

    Thresholds: found at all, at cover step 1 and above, at step 2 and above.
    """
    covered = steps < NO_COVER
    levels = [steps >= 0, *((steps >= level) & covered for level in range(1, THRESHOLDS))]
    return np.stack(levels, axis=-1).astype(float)


def learn(lessons: Lessons, usual: Floats, penalty: float) -> Corrections:
    """Corrections at the penalised likelihood's top; started at none, so that none is the rest.

    usual    [plant, threshold]
    penalty  weight of half the summed squares of the learned nats, against one plot's log loss
    """
    zones = lessons.points.shape[1]
    width = lessons.answers.shape[1]
    truth = np.eye(zones)[lessons.zone]

    def loss(free: Floats) -> tuple[float, Floats]:
        tau, learned = np.exp(free[0]), free[1:].reshape(width, zones)
        said = (tau * lessons.points + lessons.answers @ learned) / lessons.drag[:, None]
        score = lessons.offset + said
        score -= score.max(axis=1, keepdims=True)
        weights = np.exp(score)
        total = weights.sum(axis=1, keepdims=True)
        likely = ((score - np.log(total)) * truth).sum(axis=1)
        over = (weights / total - truth) * (lessons.weight / lessons.drag)[:, None]
        slope = lessons.answers.T @ over + penalty * learned
        by_tau = float((over * lessons.points).sum() * tau)
        value = -(lessons.weight * likely).sum() + 0.5 * penalty * (learned**2).sum()
        return float(value), np.concatenate([[by_tau], slope.ravel()])

    start = np.zeros(1 + width * zones)
    end = minimize(loss, start, jac=True, method="L-BFGS-B", options={"maxiter": MOST_TURNS}).x
    learned = end[1:].reshape(-1, THRESHOLDS, zones)
    learned = learned - learned.mean(axis=2, keepdims=True)
    return Corrections(float(np.exp(end[0])), learned, usual)
