"""Rows → tables → problems: reading regions and running every check."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from builder.checks import checked_region
from builder.key.compile import Fitted
from builder.key.fitted import read_fit
from builder.problems import Problem, errors, in_order
from builder.proof.kept import read_proof, with_session
from builder.steps.refusals import Stopped
from builder.tables import Loaded, Region


@dataclass(frozen=True)
class Checked:
    """A region's tables and everything that is wrong with them."""

    loaded: Loaded
    problems: list[Problem]
    fitted: Fitted | None = None
    proof: dict[str, Any] | None = None

    @property
    def region(self) -> Region | None:
        """The region, when all its tables could be read."""
        return self.loaded.region

    @property
    def stops(self) -> bool:
        """Whether a build must not go on."""
        return self.region is None or bool(errors(self.problems))


def check_region(folder: Path) -> Checked:
    """Rows → tables → problems: reads a region and runs every check."""
    loaded = checked_region(folder)
    if loaded.region is None:
        return Checked(loaded, loaded.problems)
    fitted, problems = read_fit(folder, loaded.region)
    kept, more = read_proof(folder)
    return Checked(
        loaded,
        in_order([*loaded.problems, *problems, *more]),
        with_session(loaded.region, fitted, kept),
        kept.figures if kept else None,
    )


def check_regions(folders: Sequence[Path]) -> list[Checked]:
    """Every region, checked. Raises Stopped when one has errors."""
    checked = [check_region(folder) for folder in folders]
    if any(one.stops for one in checked):
        raise Stopped([problem for one in checked for problem in one.problems])
    return checked


def region_of(checked: Checked) -> Region:
    """The region of tables that do not stop a build."""
    assert checked.region is not None
    return checked.region
