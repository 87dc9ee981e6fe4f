"""What one measure is: a goal, a way to take it, what came of it, or why it cannot be taken."""

from __future__ import annotations

import gc
import math
import time
from collections.abc import Callable
from dataclasses import dataclass, field
from functools import cached_property
from pathlib import Path
from typing import Any

from builder.bench.synthetic import synthetic_region
from builder.pack import compile_pack
from builder.steps.building import compile_region
from builder.steps.checking import Checked, check_region, region_of
from builder.steps.notes import regions_in
from builder.tables import Region

ZONES, PLANTS = 40, 400
"""Size of the made-up region that stands for a large one."""


class NotHere(Exception):  # noqa: N818 - told in the table, not traced
    """The measure cannot be taken on this machine; the text says why."""


@dataclass(frozen=True)
class Goal:
    """A figure to stay at or below; least: to reach or pass."""

    figure: float
    least: bool = False

    def met(self, value: float) -> bool:
        """Whether a measured value is within the goal."""
        return value >= self.figure if self.least else value <= self.figure


@dataclass(frozen=True)
class Reference:
    """The same work, or the nearest there is, done by another program in the same run.

    values  its figures; own: ours for the very same work, where the line itself is larger
    rate    figures are work by time, so that more is better
    """

    name: str
    values: tuple[float, ...]
    own: tuple[float, ...] = ()


@dataclass(frozen=True)
class Taken:
    """What a measure came to.

    values  one figure a run, in the measure's unit
    growth  size → seconds, where the line says how cost grows
    """

    values: tuple[float, ...]
    reference: Reference | None = None
    note: str = ""
    growth: dict[str, float] = field(default_factory=dict)


@dataclass(frozen=True)
class Measure:
    """One line of the table.

    name   for --only; its first word is the topic
    goal   of the median; ratio: of our figure to the reference's
    worst  goal of the worst run
    """

    name: str
    what: str
    unit: str
    take: Callable[[Setting], Taken]
    goal: Goal | None = None
    ratio: Goal | None = None
    worst: Goal | None = None


@dataclass
class Setting:
    """What every measure may use: the demo region, a large made-up one, a folder to write into.

    quick  fewer runs and smaller work, to see that everything runs
    """

    keydata: Path
    folder: Path
    quick: bool = False

    def runs(self, many: int) -> int:
        """How often to repeat; once when quick."""
        return 1 if self.quick else many

    def size(self, whole: int, small: int) -> int:
        """How much work; the small one when quick."""
        return small if self.quick else whole

    @cached_property
    def demo(self) -> Path:
        """Folder of the fullest region."""
        found = regions_in(self.keydata)
        if not found:
            raise NotHere(f"there is no region in {self.keydata}")
        return max(found, key=lambda folder: (folder / "plants.yaml").stat().st_size)

    @cached_property
    def checked(self) -> Checked:
        """The demo region, read and checked."""
        return check_region(self.demo)

    @property
    def region(self) -> Region:
        """The demo region's tables."""
        return region_of(self.checked)

    @cached_property
    def pack(self) -> dict[str, Any]:
        """The demo region's pack."""
        return compile_pack(self.region, self.checked.fitted)

    @cached_property
    def large(self) -> Path:
        """Folder of the made-up region of 40 zones and 400 plants."""
        return synthetic_region(self.demo, self.folder / "keydata" / "large", ZONES, PLANTS)

    @cached_property
    def large_checked(self) -> Checked:
        """The made-up region, read and checked."""
        return check_region(self.large)

    @cached_property
    def large_site(self) -> Any:
        """The made-up region, compiled for a site."""
        return compile_region(self.large_checked)

    @cached_property
    def demo_site(self) -> Any:
        """The demo region, compiled for a site."""
        return compile_region(self.checked)


def seconds(work: Callable[[], object], runs: int, cpu: bool = False) -> tuple[float, ...]:
    """Seconds that each run took, wall or this process's CPU; what the last one left is swept."""
    clock = time.process_time if cpu else time.perf_counter
    taken = []
    for _ in range(runs):
        gc.collect()
        start = clock()
        work()
        taken.append(clock() - start)
    return tuple(taken)


def growth_ratio(by_size: dict[str, float]) -> float:
    """Cost of the largest size by that of the smallest."""
    costs = list(by_size.values())
    return costs[-1] / costs[0] if costs[0] > 0 else math.inf
