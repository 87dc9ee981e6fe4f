"""Takes the measures that were asked for, one after another, each able to fail on its own."""

from __future__ import annotations

import datetime
import tempfile
import time
from collections.abc import Callable, Iterable, Sequence
from pathlib import Path
from statistics import median
from typing import Any

from builder import __version__
from builder.bench import booklets, building, calling, desks, elsewhere, fitting, phones
from builder.bench.machine import machine
from builder.bench.measure import Goal, Measure, NotHere, Setting, Taken

FAMILIES = (fitting, calling, building, phones, booklets, desks, elsewhere)
MEASURES: tuple[Measure, ...] = tuple(one for family in FAMILIES for one in family.MEASURES)
DIGITS = 4
Tell = Callable[[int, int, str], None]


class UnknownMeasure(ValueError):  # noqa: N818 - told to the person
    """No measure has this name; says which there are."""

    def __init__(self, name: str) -> None:
        names = ", ".join(one.name for one in MEASURES)
        super().__init__(f'there is no measure "{name}"; known: {names}')


def chosen(only: Iterable[str]) -> list[Measure]:
    """Measures by name, or by the first word of their names; all of them when none is named."""
    wanted = list(only)
    for name in wanted:
        if not any(_is(one, name) for one in MEASURES):
            raise UnknownMeasure(name)
    return [one for one in MEASURES if not wanted or any(_is(one, name) for name in wanted)]


def _is(measure: Measure, name: str) -> bool:
    return name in (measure.name, measure.name.partition("-")[0])


def run(keydata: Path, measures: Sequence[Measure], quick: bool, tell: Tell) -> dict[str, Any]:
    """The whole run as plain values: the machine, then one entry a measure."""
    known = machine()
    start = time.perf_counter()
    with tempfile.TemporaryDirectory(prefix="beltbook-bench-") as folder:
        setting = Setting(keydata, Path(folder), quick)
        lines = []
        for done, measure in enumerate(measures):
            tell(done, len(measures), measure.what)
            lines.append(taken_line(measure, setting))
    return {
        "format": 1,
        "version": __version__,
        "date": datetime.date.today().isoformat(),
        "machine": known,
        "quick": quick,
        "seconds": round(time.perf_counter() - start, 1),
        "lines": lines,
    }


def taken_line(measure: Measure, setting: Setting) -> dict[str, Any]:
    """One measure taken, as plain values; why_not holds the reason when it could not be."""
    line: dict[str, Any] = {
        "name": measure.name,
        "what": measure.what,
        "unit": measure.unit,
        "goal": _goal(measure.goal),
        "ratio_goal": _goal(measure.ratio),
        "worst_goal": _goal(measure.worst),
        "why_not": None,
    }
    start = time.perf_counter()
    try:
        taken = measure.take(setting)
    except NotHere as why:
        return line | {"why_not": str(why)}
    return line | _figures(measure, taken) | {"seconds": round(time.perf_counter() - start, 1)}


def _figures(measure: Measure, taken: Taken) -> dict[str, Any]:
    middle = median(taken.values)
    worst = min(taken.values) if measure.goal and measure.goal.least else max(taken.values)
    beside = taken.reference
    reference = None
    ratio = None
    if beside is not None:
        other = median(beside.values)
        ratio = (median(beside.own) if beside.own else middle) / other if other else None
        reference = {
            "name": beside.name,
            "median": _short(other),
            "own": _short(median(beside.own)) if beside.own else None,
            "ratio": None if ratio is None else _short(ratio),
        }
    goals = ((measure.goal, middle), (measure.worst, worst), (measure.ratio, ratio))
    judged = [goal.met(value) for goal, value in goals if goal is not None and value is not None]
    return {
        "values": [_short(value) for value in taken.values],
        "median": _short(middle),
        "low": _short(min(taken.values)),
        "high": _short(max(taken.values)),
        "reference": reference,
        "met": all(judged) if judged else None,
        "note": taken.note,
        "growth": {size: _short(cost) for size, cost in taken.growth.items()},
    }


def _short(value: float) -> float:
    """Four figures that count."""
    return float(f"{value:.{DIGITS}g}")


def _goal(goal: Goal | None) -> dict[str, Any] | None:
    return None if goal is None else {"figure": goal.figure, "least": goal.least}
