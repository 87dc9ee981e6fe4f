"""From plain arrays to weights of evidence in whole centibans.

Fitted regions and hand-written tables come in through the same door: how many plots of
each zone held each plant, how many plots each zone had, and how much the plant covered.

Sources: weights of evidence, Good (1950); shrinking and noise floor as docs/method.md sets out.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray

from builder.key.cover import cover_shares_from_counts, cover_shares_from_means
from builder.key.rounding import NATS_PER_CENTIBAN, round_half_up

Floats = NDArray[np.float64]
Ints = NDArray[np.int32]

CENTIBANS_PER_NAT = 1.0 / NATS_PER_CENTIBAN
STEPS = 4
"""Coarse cover classes that carry evidence: under 1 %, 1-5 %, 5-25 %, 25 % and more."""
V_STEPS = (0.25, 0.5, 0.75, 1.0)
"""Shares of a plant that can still be missed; at 0 its absence says nothing and is not stored."""


@dataclass(frozen=True)
class Weights:
    """Figures that turn counts into evidence; the defaults are those of a hand-written region.

    plots_assumed   plots that stand behind a constancy typed by hand [-]
    shrink_plots    m, plots' worth of pull towards the plant's mean over all zones [-]
    overlooked      e1, chance that a plant on the plot is missed, 0..1 [-]
    wrongly_named   e2, chance that an absent plant is reported, 0..1 [-]
    cover_base, cover_per_mean   precision of cover, phi = base + per_mean / mean cover share [-]
    cover_shrink_plots   plots' worth of pull of cover shares towards the plant's own [-]
    temper          T, multiplies every weight of evidence [-]
    answer_error    chance that a ground answer is given at random, 0..1 [-]
    tau             multiplies evidence from counts before fitted corrections are added [-]
    """

    plots_assumed: float = 20.0
    shrink_plots: float = 1.0
    overlooked: float = 0.10
    wrongly_named: float = 0.005
    cover_base: float = 1.5
    cover_per_mean: float = 0.6
    cover_shrink_plots: float = 4.0
    temper: float = 1.3
    answer_error: float = 0.07
    tau: float = 1.0


@dataclass(frozen=True)
class Evidence:
    """What every plant's answers say about every zone.

    found     [plant, 5, zone] centibans of "found": steps 0..3 of cover, then cover not given
    absent    [plant, 4, zone] centibans of "searched, not found" at v = 1/4, 1/2, 3/4, 1
    implied   [plant, 3, zone] centibans of "covers no more than step 0, 1, 2", absence included
    presence  [plant, zone] p', the chance that the plant is reported, 0..1
    cover     [plant, 4, zone] shares of the cover steps where it is reported; they add to 1
    prior     [zone] the zones' shares that evidence was centred on; they add to 1
    """

    found: Ints
    absent: Ints
    implied: Ints
    presence: Floats
    cover: Floats
    prior: Floats


def evidence(
    present: ArrayLike,
    plots: ArrayLike,
    weights: Weights = Weights(),
    *,
    cover_counts: ArrayLike | None = None,
    cover_mean_pct: ArrayLike | None = None,
    prior: ArrayLike | None = None,
    overlooked: ArrayLike | None = None,
    wrongly_named: ArrayLike | None = None,
    found_correction: ArrayLike | None = None,
    absent_correction: ArrayLike | None = None,
) -> Evidence:
    """Evidence of all plants' answers for all zones.

    present   [plant, zone] plots of the zone that hold the plant; for a table typed by hand
              constancy share times weights.plots_assumed (need not be whole) [plots]
    plots     [zone] plots of the zone [plots]
    cover_counts    [plant, 4, zone] plots by cover step (under 1, 1-5, 5-25, 25 % and more), or
    cover_mean_pct  [plant, zone] mean cover where present, not-a-number where never; give one
                    of the two, or neither: then cover carries nothing
    prior     [zone] shares that centre the evidence; equal if not given
    overlooked, wrongly_named   [plant] in place of weights' figures where not not-a-number
    found_correction   [plant, 5, zone] nats added to tau * G of "found" (fitted regions)
    absent_correction  [plant, zone] nats added to "not found" at v = 1; at v it counts v times

    G(answer | zone) = ln P(answer | zone) - ln sum of prior * P(answer | zone)
    stored = round(100 log10(e) * T * (tau * G + correction))

    Raises ValueError where shapes differ or a zone has no plot.
    """
    present = np.asarray(present, float)
    plots = np.asarray(plots, float)
    _refuse(present, plots)
    share = _prior(prior, plots.size)
    e1 = _by_plant(overlooked, weights.overlooked, len(present))
    e2 = _by_plant(wrongly_named, weights.wrongly_named, len(present))
    presence = noise_floor(presence_shares(present, plots, weights.shrink_plots), e1, e2)
    cover = _cover(present, cover_counts, cover_mean_pct, weights)
    scale = weights.temper * CENTIBANS_PER_NAT

    chance = np.concatenate([presence[:, None, :] * cover, presence[:, None, :]], axis=1)
    found = weights.tau * centred_nats(chance, share)
    if found_correction is not None:
        found = found + np.asarray(found_correction, float)
    v = np.array(V_STEPS)[None, :, None]
    absent = weights.tau * centred_nats(1.0 - presence[:, None, :] * v, share)
    if absent_correction is not None:
        absent = absent + v * np.asarray(absent_correction, float)[:, None, :]
    above = np.cumsum(cover[:, ::-1], axis=1)[:, ::-1][:, 1:]
    implied = weights.tau * centred_nats(1.0 - presence[:, None, :] * above, share)
    return Evidence(
        round_half_up(scale * found),
        round_half_up(scale * absent),
        round_half_up(scale * implied),
        presence,
        cover,
        share,
    )


def presence_shares(present: ArrayLike, plots: ArrayLike, shrink_plots: float) -> Floats:
    """Constancy drawn towards the plant's mean, so that 0 or 100 % never vetoes. [0..1]

    present  [plant, zone] plots that hold the plant; plots [zone]; shrink_plots m [plots]

    p = (n_zs + m * mean_s) / (n_z + m), mean_s = (N_s + 1/2) / (N + 1)
    """
    present = np.asarray(present, float)
    plots = np.asarray(plots, float)
    mean = (present.sum(axis=1) + 0.5) / (plots.sum() + 1.0)
    return np.asarray((present + shrink_plots * mean[:, None]) / (plots + shrink_plots))


def noise_floor(presence: Floats, overlooked: ArrayLike, wrongly_named: ArrayLike) -> Floats:
    """Chance that a plant is reported: there and seen, or wrongly named. [0..1]

    presence [plant, zone]; overlooked e1 and wrongly_named e2: one number or [plant]

    p' = p (1 - e1) + (1 - p) e2
    """
    e1 = np.asarray(overlooked, float).reshape(-1, 1)
    e2 = np.asarray(wrongly_named, float).reshape(-1, 1)
    return np.asarray(presence * (1.0 - e1) + (1.0 - presence) * e2)


def newcomer_presence(presence: Floats, arrival: Floats, v: float) -> Floats:
    """Chance of a report on disturbed ground: the old plant kept, or come since. [0..1]

    presence p' and arrival a: [plant, zone], 0..1; v share of old plants still to be seen

    p'' = 1 - (1 - p' v)(1 - a)
    """
    return np.asarray(1.0 - (1.0 - presence * v) * (1.0 - arrival))


def newcomer_evidence(
    presence: Floats, arrival: Floats, weights: Weights, prior: ArrayLike | None = None
) -> tuple[Ints, Ints]:
    """Evidence of plants that may have come since a disturbance.

    presence  [plant, zone] p', arrival [plant, zone] a (already times what can be seen), 0..1

    Returns found [plant, 5, zone] and absent [plant, 5, zone] at v = 0, 1/4, 1/2, 3/4, 1 in
    centibans. Cover is left out: a newcomer's cover tells of the disturbance.
    """
    share = _prior(prior, presence.shape[1])
    scale = weights.temper * weights.tau * CENTIBANS_PER_NAT
    chance = np.stack([newcomer_presence(presence, arrival, v) for v in (0.0, *V_STEPS)], axis=1)
    found = round_half_up(scale * centred_nats(chance, share))
    return found, round_half_up(scale * centred_nats(1.0 - chance, share))


def centred_nats(chance: Floats, prior: Floats) -> Floats:
    """ln P(answer | zone) minus ln of its mean over zones. [nats]

    chance [..., zone] in (0, 1]; prior [zone] adds to 1
    """
    return np.asarray(np.log(chance) - np.log(chance @ prior)[..., None])


def _cover(
    present: Floats,
    counts: ArrayLike | None,
    means: ArrayLike | None,
    weights: Weights,
) -> Floats:
    if counts is not None and means is not None:
        raise ValueError("give cover_counts or cover_mean_pct, not both")
    if counts is not None:
        return cover_shares_from_counts(np.asarray(counts, float), weights.cover_shrink_plots)
    if means is not None:
        return cover_shares_from_means(
            np.asarray(means, float),
            present,
            (weights.cover_base, weights.cover_per_mean),
            weights.cover_shrink_plots,
        )
    return np.full((present.shape[0], STEPS, present.shape[1]), 1.0 / STEPS)


def _refuse(present: Floats, plots: Floats) -> None:
    if present.ndim != 2 or plots.shape != (present.shape[1],):
        raise ValueError(f"present {present.shape} must be [plant, zone], plots {plots.shape}")
    if (plots <= 0).any():
        raise ValueError("every zone needs at least one plot")
    if (present < 0).any() or (present > plots + 1e-9).any():
        raise ValueError("a plant cannot stand in more plots than its zone has")


def _prior(prior: ArrayLike | None, zones: int) -> Floats:
    share = np.full(zones, 1.0) if prior is None else np.asarray(prior, float)
    return np.asarray(share / share.sum())


def _by_plant(values: ArrayLike | None, default: float, plants: int) -> Floats:
    if values is None:
        return np.full(plants, default)
    given = np.asarray(values, float)
    return np.where(np.isnan(given), default, given)
