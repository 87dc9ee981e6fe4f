"""Sites with the builder's own answers, which a phone repeats before it trusts a pack."""

from __future__ import annotations

from typing import Any

from builder.key.call import Call, call
from builder.key.prepare import Pack, Site

FIELDS = (
    "verdict",
    "zone_id",
    "next_zone_id",
    "fit",
    "finds_cb",
    "answers",
    "look_again",
    "difference_cb",
)
PROMPTS = 2


def probe_answer(pack: Pack, site: Site) -> dict[str, Any]:
    """What the phone must answer for this site, to the last digit."""
    made: Call = call(pack, site, prompts=PROMPTS)
    return {
        **{name: made[name] for name in FIELDS},
        "belief": [made["belief"][made["zone_id"]], made["belief"][made["next_zone_id"]]],
        "belief_sum": belief_sum(made["belief"]),
        "prompts": [[one["id"], one["gain"]] for one in made["prompts"]],
    }


def belief_sum(belief: dict[str, float]) -> int:
    """One whole number that moves with any zone's belief: sum of place times millionths."""
    return sum(place * round(share * 1e6) for place, share in enumerate(belief.values(), 1))
