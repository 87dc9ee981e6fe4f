"""The proof of a region: what was last found, and proving as a job."""

from __future__ import annotations

from dataclasses import dataclass, field

from markupsafe import Markup

from builder.desk.shelf import Look


@dataclass(frozen=True)
class Figure:
    """One big figure with its label."""

    value: str
    label: str
    shape: str = ""


@dataclass(frozen=True)
class PairView:
    """Two zones that are taken for one another."""

    first: Markup
    second: Markup
    bar: Markup
    said: str
    names: str


@dataclass(frozen=True)
class ProofView:
    """What the overview shows of a proof."""

    known: bool
    said: str
    href: str
    figures: list[Figure] = field(default_factory=list)
    chart: Markup = field(default_factory=Markup)
    pairs: list[PairView] = field(default_factory=list)


def proof_view(look: Look) -> ProofView:
    """The last proof of a region."""
    return ProofView(False, "", "#")
