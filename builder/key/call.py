"""One call from one look, and the verdict of three looks: the reference the phone repeats."""

from __future__ import annotations

import math
from typing import Any

import numpy as np

from builder.key.belief import Weighed, weigh_site
from builder.key.prepare import Floats, Key, Pack, Site, prepare
from builder.key.prompt import prompts_of
from builder.key.reasons import reasons_of
from builder.key.rounding import round6
from builder.key.verdict import judge, largest, zone_share

Call = dict[str, Any]


def call(pack: Pack, site: Site, prompts: int = 8) -> Call:
    """The call of a site check; its fields are listed in core/index.js.

    pack     the compiled region as builder.pack makes it
    site     a site check record; fields that are missing count as not answered
    prompts  how many prompts to list
    """
    key = prepare(pack)
    weighed = weigh_site(key, site)
    asked = prompts_of(key, site, weighed, prompts)
    context = weighed.context
    return {
        **_summary(key, weighed),
        **reasons_of(key, weighed, *weighed.best_two),
        "prompts": asked,
        "nothing_helps": not asked,
        "rules_fired": [rule["id"] for rule in weighed.reading.rules],
        "notes": {
            "height_off": context.height_off,
            "dead_counts": context.dead_counts,
            "second_call": context.second_call,
            "move_plot": context.move_plot,
            "disturbed": context.disturbed,
        },
    }


def verdict_of(pack: Pack, site: Site) -> Call:
    """The verdict part of a call alone, without prompts and reasons."""
    key = prepare(pack)
    return _summary(key, weigh_site(key, site))


def _summary(key: Key, weighed: Weighed) -> Call:
    leader, rival = weighed.best_two
    named = len(weighed.findings.named)
    wanted = 0 if weighed.context.disturbed else key.settings["named_first"]
    return {
        "zone_id": key.pack["zones"][leader]["id"],
        "next_zone_id": key.pack["zones"][rival]["id"],
        "belief": _by_zone(key, weighed.belief),
        "answers": weighed.n,
        "named": named,
        "name_more": max(wanted - named, 0),
        "sure": bool(weighed.belief[leader] >= key.settings["sure"]),
        **judge(key, weighed),
    }


def call_three(
    pack: Pack, site: Site, spot_a: Site, spot_b: Site, stand: str | None = None
) -> Call:
    """Verdict of a plot and two spots, each a site check.

    stand  what the person says: one_kind, changes_near (within 50 m), patches; None not asked
    """
    key = prepare(pack)
    looks = [weigh_site(key, one) for one in (site, spot_a, spot_b)]
    judged = [judge(key, one) for one in looks]
    product = looks[0].belief * looks[1].belief * looks[2].belief
    fit = round6(sum(one["fit"] for one in judged) / 3.0)
    finds = sum(one["finds_cb"] for one in judged) / 3.0
    scores, pairs = _three_scores(key, [one.belief for one in looks], fit, stand)
    thin = finds < key.settings["three"]["thin_mean_finds_cb"]
    verdict = "thin" if thin else largest(scores)
    belief = round6(product / product.sum())
    order = sorted(range(key.zones), key=lambda z: (-belief[z], z))
    zones = key.pack["zones"]
    pair = pairs.get(verdict)
    return {
        "verdict": verdict,
        "zone_id": zones[order[0]]["id"],
        "next_zone_id": zones[order[min(1, len(order) - 1)]]["id"],
        "pair": [zones[z]["id"] for z in pair] if pair else None,
        "belief": _by_zone(key, belief),
        "scores": scores,
        "zone_share": zone_share(scores),
        "fit": fit,
    }


def _three_scores(
    key: Key, beliefs: list[Floats], fit: float, stand: str | None
) -> tuple[dict[str, float], dict[str, list[int] | None]]:
    b0, b_a, b_b = beliefs
    first, second, edge = key.pairs
    count = key.zones
    zone = math.log(count * count * float((b0 * b_a * b_b).sum()))
    crossed = b_a[first] * b_b[second] + b_a[second] * b_b[first]
    weight = (count**3 / 2.0) * crossed * (b0[first] + b0[second]) / 2.0
    settings = key.settings["three"]
    scores: dict[str, float] = {"zone": round6(_said(key, "zone", stand))}
    pairs: dict[str, list[int] | None] = {}
    for name, mask in (("edge", edge), ("mosaic", ~edge)):
        gain = math.log(weight[mask].mean()) - zone if mask.any() else key.settings["no_pair_gain"]
        line = settings[name]
        scores[name] = round6(line["times"] * gain + line["plus"] + _said(key, name, stand))
        pairs[name] = None
        if mask.any():
            at = int(np.argmax(np.where(mask, round6(weight), -1.0)))
            pairs[name] = [int(first[at]), int(second[at])]
    line = settings["misfit"]
    scores["misfit"] = round6(line["times"] * fit + line["plus"] + _said(key, "misfit", stand))
    return scores, pairs


def _said(key: Key, verdict: str, stand: str | None) -> float:
    return math.log(key.settings["stand"][verdict][stand]) if stand else 0.0


def _by_zone(key: Key, belief: Floats) -> dict[str, float]:
    return {zone["id"]: float(share) for zone, share in zip(key.pack["zones"], belief, strict=True)}
