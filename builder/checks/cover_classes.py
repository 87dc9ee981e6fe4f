"""Cover classes run from 0 to 100% without gaps or overlaps, each middle inside its class.

Passes: region.yaml cover_scale/classes/1: {code: '2', label: x, low_pct: 1, high_pct: 5,
    mid_pct: 3}
Fails: region.yaml cover_scale/classes/1: {code: '2', label: x, low_pct: 2, high_pct: 5, mid_pct: 3}
Fails: region.yaml cover_scale/classes/1: {code: '2', label: x, low_pct: 1, high_pct: 5, mid_pct: 5}
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.tables import Loaded

ID = "cover-classes"
NEEDS = ("region",)


def check(loaded: Loaded) -> Iterator[Problem]:
    """Gaps, overlaps, doubles and middles that fall into another class."""
    if loaded.partial is None:
        return
    classes = loaded.partial.cover_scale.classes
    if not classes:
        yield problem_at(
            loaded.partial.cover_scale.place("classes"),
            ID,
            "the cover scale has no classes",
            "Write them from low to high.",
        )
        return
    edge, codes = 0.0, set()
    for each in classes:
        if each.low_pct != edge:
            word = "a gap" if each.low_pct > edge else "an overlap"
            yield problem_at(
                each.place("low_pct"),
                ID,
                f"{word} between {edge:g} and {each.low_pct:g}% below class {each.code}",
                f"The class begins where the one below ends: low_pct: {edge:g}.",
            )
        last = each is classes[-1]
        if not (each.low_pct <= each.mid_pct < each.high_pct or (last and each.mid_pct <= 100)):
            yield problem_at(
                each.place("mid_pct"),
                ID,
                f"the middle {each.mid_pct:g}% of class {each.code} lies outside "
                f"{each.low_pct:g} to {each.high_pct:g}%",
                "The lower limit belongs to the class, the upper one to the next.",
            )
        if each.code in codes:
            yield problem_at(
                each.place("code"),
                ID,
                f'class "{each.code}" stands twice',
                "Give each class its own code.",
            )
        codes.add(each.code)
        edge = max(edge, each.high_pct)
    if edge != 100:
        yield problem_at(
            classes[-1].place("high_pct"),
            ID,
            f"the classes end at {edge:g}%",
            "The last class ends at 100.",
        )
