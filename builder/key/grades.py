"""How strong a weight of evidence is, in words of the published scale."""

from __future__ import annotations

import math

GRADES = (
    (5.0, "bare mention"),
    (10.0, "substantial"),
    (15.0, "strong"),
    (20.0, "very strong"),
    (math.inf, "decisive"),
)
"""Upper limit of each grade, above 0. [decibans]

Source: Jeffreys (1961), Theory of Probability, 3rd ed., appendix B: grades change at 10^(1/2),
10, 10^(3/2) and 10^2.
"""


def grade_of(decibans: float) -> str:
    """Grade of evidence for a hypothesis, ten decibans to a factor ten. ValueError below 0."""
    if decibans < 0:
        raise ValueError(f"{decibans} decibans speak against; grade the other side")
    return next(name for limit, name in GRADES if decibans < limit)


def decibans(chance: float, other: float) -> float:
    """Weight of evidence of an answer for one zone over another. [decibans]

    chance, other  how likely the answer is in each, 0..1

    W = 10 log10(chance / other). Source: Good (1950)
    """
    return 10.0 * math.log10(chance / other)
