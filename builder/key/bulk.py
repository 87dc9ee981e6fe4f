"""Whole files of plots called at once: the same calls as builder.key.call, by matrix products."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key.bulk_fit import fit_many
from builder.key.bulk_ground import add_rule, ground_of
from builder.key.bulk_rules import Shared, contexts_of
from builder.key.bulk_session import hear_all, hear_session
from builder.key.bulk_weigh import Heard, Weighing, weigh_many
from builder.key.context import Context
from builder.key.plots import Plots
from builder.key.prepare import Floats, Key, Pack, prepare
from builder.key.rounding import round6
from builder.key.session import ask
from builder.key.tables_bulk import AnswerTables, answer_tables

BATCH = 4096
VERDICTS = ("zone", "edge", "mosaic", "misfit", "thin")
Mask = NDArray[np.bool_]


def call_plots(
    pack: Pack,
    plots: Plots,
    *,
    answers: int | None = None,
    month: int | None = None,
    disturbance: str | None = None,
    progress: Callable[[int, int], None] | None = None,
) -> dict[str, list[Any]]:
    """Calls of many plots, as columns in the order of the plots.

    answers      None: every searched plant counts; else a person names up to three plants of most
                 cover, then follows the prompts, this many answers at most, stopping when sure
    month, disturbance  of plots that state none of their own
    progress     called with plots done and plots in all

    Columns: plot_id, verdict, zone_id, belief, next_zone_id, next_belief, answers, fit, pair,
    finds_cb, zone_share.
    """
    key = prepare(pack)
    made: dict[str, NDArray[Any]] = {}
    done = 0
    for shared in contexts_of(key, plots, month, disturbance):
        tables = answer_tables(key, shared.context)
        for start in range(0, len(shared.rows), BATCH):
            part = shared.rows[start : start + BATCH]
            columns = _call_batch(key, shared, tables, plots.take(part), answers)
            for name, values in columns.items():
                if name not in made:
                    made[name] = np.zeros((len(plots), *values.shape[1:]), values.dtype)
                made[name][part] = values
            done += len(part)
            if progress:
                progress(done, len(plots))
    return _named_columns(key, plots, made)


def _call_batch(
    key: Key, shared: Shared, tables: AnswerTables, plots: Plots, answers: int | None
) -> dict[str, NDArray[Any]]:
    context = shared.context
    ground = ground_of(key, context, plots)
    if answers is None:
        heard = hear_all(key, context, plots, ground)
        for rule in shared.rules:
            add_rule(key, context, heard.ground, rule)
    elif shared.stepwise:
        return _one_by_one(key, shared, plots, answers)
    else:
        heard = hear_session(key, context, tables, plots, ground, answers)
    weighing = weigh_many(key, context, tables, heard)
    return judge_many(key, context, tables, heard, weighing)


def _one_by_one(key: Key, shared: Shared, plots: Plots, answers: int) -> dict[str, NDArray[Any]]:
    """Sessions in which a rule may come to hold half way: asked as a person would be."""
    index = {name: at for at, name in enumerate(VERDICTS)}
    first, second, _ = key.pairs
    pair_at = {(int(i), int(j)): at for at, (i, j) in enumerate(zip(first, second, strict=True))}
    rows = []
    for at in range(len(plots)):
        site = {
            **plots.site(at, None, None),
            **{k: shared.site[k] for k in ("month", "disturbance")},
        }
        made, asked = ask(key, site, plots.steps[at], plots.cover[at], answers)
        pair = sorted(key.zone_at[one] for one in made["pair"] or [])
        rows.append(
            {
                "verdict": index[made["verdict"]],
                "leader": key.zone_at[made["zone_id"]],
                "rival": key.zone_at[made["next_zone_id"]],
                "belief": list(made["belief"].values()),
                "answers": asked,
                "n": made["answers"],
                "fit": made["fit"],
                "pair": pair_at[pair[0], pair[1]] if pair else -1,
                "finds_cb": made["finds_cb"],
                "zone_share": made["zone_share"],
                "scores": list(made["scores"].values()),
            }
        )
    return {name: np.array([row[name] for row in rows]) for name in rows[0]}


def judge_many(
    key: Key, context: Context, tables: AnswerTables, heard: Heard, weighing: Weighing
) -> dict[str, NDArray[Any]]:
    """Verdict columns of a batch, with zones as indexes."""
    settings, belief = key.settings, weighing.belief
    order = np.argsort(-belief, axis=1, kind="stable")
    rows = np.arange(len(belief))
    leader, rival = order[:, 0], order[:, min(1, key.zones - 1)]
    scale = settings["temper"] / weighing.drag
    single = weighing.summed.alone + heard.ground.alone
    mixed = weighing.summed.mixed + heard.ground.mixed
    gain = round6(scale[:, None] * (mixed - single.max(axis=1)[:, None]))
    nothing = (weighing.summed.heard + heard.ground.heard) == 0
    scores = np.zeros((len(rows), 4))
    pairs = np.full((len(rows), 2), -1)
    for column, name, mask in ((1, "edge", key.pairs[2]), (2, "mosaic", ~key.pairs[2])):
        best, at = _best_pair(key, gain, mask)
        best = np.where(nothing, 0.0, best)
        scores[:, column] = round6(settings[name]["times"] * best + settings[name]["plus"])
        pairs[:, column - 1] = np.where(nothing, -1, at)
    fit = round6(fit_many(key, context, tables, heard, leader[:, None]))
    top = scores[:, :3].argmax(axis=1)
    pair = np.where(top > 0, pairs[rows, np.maximum(top - 1, 0)], -1)
    other = fit
    if (pair >= 0).any():
        both = np.stack([key.pairs[0][pair], key.pairs[1][pair]], axis=1)
        other = np.where(pair >= 0, fit_many(key, context, tables, heard, both), fit)
    misfit = settings["misfit"]
    scores[:, 3] = round6(misfit["times"] * ((fit + other) / 2.0) + misfit["plus"])
    finds = weighing.summed.best
    confident = belief[rows, leader] >= settings["thin"]["belief"]
    thin = (finds < settings["thin"]["finds_cb"]) & ~confident
    verdict = np.where(thin, 4, scores.argmax(axis=1))
    told = np.where((verdict == 1) | (verdict == 2), pairs[rows, np.clip(verdict - 1, 0, 1)], -1)
    weights = np.exp(scores)
    return {
        "verdict": verdict,
        "leader": leader,
        "rival": rival,
        "belief": belief,
        "answers": heard.asked,
        "n": weighing.n,
        "fit": fit,
        "pair": told,
        "finds_cb": finds,
        "zone_share": round6(weights[:, 0] / weights.sum(axis=1)),
        "scores": scores,
    }


def _best_pair(key: Key, gain: Floats, mask: Mask) -> tuple[Floats, NDArray[np.int64]]:
    if not mask.any():
        return np.full(len(gain), key.settings["no_pair_gain"]), np.full(len(gain), -1)
    inside = np.where(mask, gain, -np.inf)
    at = inside.argmax(axis=1)
    return inside[np.arange(len(gain)), at], at


def _named_columns(key: Key, plots: Plots, made: dict[str, NDArray[Any]]) -> dict[str, list[Any]]:
    zones = np.array([zone["id"] for zone in key.pack["zones"]], object)
    rows = np.arange(len(plots))
    if not len(plots):
        names = "plot_id verdict zone_id belief next_zone_id next_belief answers fit pair"
        return {name: [] for name in f"{names} finds_cb zone_share n".split()}
    belief = made["belief"]
    pairs = [_pair_ids(key, zones, int(at), belief[row]) for row, at in enumerate(made["pair"])]
    return {
        "plot_id": list(plots.ids),
        "verdict": [VERDICTS[one] for one in made["verdict"]],
        "zone_id": zones[made["leader"]].tolist(),
        "belief": belief[rows, made["leader"]].tolist(),
        "next_zone_id": zones[made["rival"]].tolist(),
        "next_belief": belief[rows, made["rival"]].tolist(),
        "answers": made["answers"].tolist(),
        "fit": made["fit"].tolist(),
        "pair": pairs,
        "finds_cb": made["finds_cb"].tolist(),
        "zone_share": made["zone_share"].tolist(),
        "n": made["n"].tolist(),
    }


def _pair_ids(key: Key, zones: NDArray[Any], at: int, belief: Floats) -> list[str] | None:
    if at < 0:
        return None
    i, j = int(key.pairs[0][at]), int(key.pairs[1][at])
    return [zones[j], zones[i]] if belief[j] > belief[i] else [zones[i], zones[j]]
