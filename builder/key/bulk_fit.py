"""Fit of many plots at once; the same figures as builder.key.fit."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk_weigh import Heard
from builder.key.context import Context
from builder.key.prepare import Floats, Key
from builder.key.tables_bulk import CHOICES, AnswerTables


def fit_many(
    key: Key, context: Context, tables: AnswerTables, heard: Heard, zones: NDArray[np.int64]
) -> Floats:
    """How badly each plot's one or two zones [plot, 1 or 2] explain the finds. [sd]"""
    surprise, named, miss, asked = fit_measures(key, context, tables, heard, zones)
    usual = _usual(key, zones, asked)
    scores = np.where(named, (surprise - usual["surprise"]) / usual["surprise_sd"], 0.0)
    scores += np.where(asked > 0, (miss - usual["miss"]) / usual["miss_sd"], 0.0)
    return np.asarray(scores / np.maximum(named.astype(int) + (asked > 0), 1))


def fit_measures(
    key: Key, context: Context, tables: AnswerTables, heard: Heard, zones: NDArray[np.int64]
) -> tuple[Floats, NDArray[np.bool_], Floats, NDArray[np.int64]]:
    """Surprise [plot] and whether any name was heard, miss [plot] and plants asked [plot]."""
    steps = heard.steps
    rows = np.arange(key.plants)[None, :] * CHOICES + np.maximum(steps, -1) + 1
    plain = (steps > -2) & tables.plain[rows]
    found = plain & (steps >= 0)
    presence = key.presence[:, zones].mean(axis=2).T
    seen = np.where(found, 1.0, context.v / 4.0) * plain
    expected = seen * presence
    overlap = 2.0 * (found * expected).sum(axis=1)
    total = found.sum(axis=1) + expected.sum(axis=1)
    miss = 1.0 - overlap / np.where(total > 0, total, 1.0)
    surprise, names = _surprise(key, steps, plain, heard.named, zones)
    return surprise, names > 0, miss, plain.sum(axis=1)


def _surprise(
    key: Key,
    steps: NDArray[np.int8],
    plain: NDArray[np.bool_],
    named: NDArray[np.int64],
    zones: NDArray[np.int64],
) -> tuple[Floats, NDArray[np.int64]]:
    """Mean -ln of the chance of the plants named, [plot], and how many were heard."""
    plots = np.arange(len(steps))
    total, names = np.zeros(len(steps)), np.zeros(len(steps), int)
    whole = np.ones((key.plants, 1, key.zones))
    cover = np.concatenate([key.cover, whole], axis=1)
    for column in range(named.shape[1]):
        p = named[:, column]
        there = (p >= 0) & plain[plots, p] & (steps[plots, p] >= 0)
        step = np.maximum(steps[plots, p], 0)
        chance = key.presence[p[:, None], zones] * cover[p[:, None], step[:, None], zones]
        total -= np.where(there, np.log(chance.mean(axis=1)), 0.0)
        names += there
    return total / np.maximum(names, 1), names


def _usual(key: Key, zones: NDArray[np.int64], asked: NDArray[np.int64]) -> dict[str, Floats]:
    bands = key.settings["fit"]
    limits = np.array([band["asked_to"] for band in bands])
    at = np.minimum(np.searchsorted(limits, asked, side="left"), len(bands) - 1)
    return {
        name: np.array([band[name] for band in bands])[at[:, None], zones].mean(axis=1)
        for name in ("surprise", "surprise_sd", "miss", "miss_sd")
    }
