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
PROMPTS = 3


def probe_answer(pack: Pack, site: Site) -> dict[str, Any]:
    """What the phone must answer for this site, to the last digit."""
    made: Call = call(pack, site, prompts=PROMPTS)
    return {
        **{name: made[name] for name in FIELDS},
        "belief": [made["belief"][zone["id"]] for zone in pack["zones"]],
        "prompts": [[one["id"], one["gain"]] for one in made["prompts"]],
    }
