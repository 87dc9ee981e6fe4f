"""seed.yaml: what is sown, planted and spread in each zone."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    MONTHS,
    Id,
    Keyed,
    Many,
    Number,
    Part,
    Record,
    Text,
    column,
)

METHODS = ("drilled", "broadcast", "none")


@dataclass(frozen=True, kw_only=True)
class Propagule(Record):
    """Turf, hay, brash, plugs, stakes: how much of what, and when."""

    kind: str = column(Id())
    what: str = column(Text())
    rate_low: float | None = column(Number(0), default=None)
    rate_high: float | None = column(Number(0), default=None)
    rate_unit: str = column(Id())
    months: tuple[int, ...] = column(MONTHS)
    note: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class Mix(Record):
    """The seed mix of a zone: live seeds a square metre by plant, and how they are sown.

    The rates already hold for `method`; another method takes the region's seeding_methods.
    """

    method: str = column(Text(choices=METHODS))
    other_method: str = column(Text())
    plants: dict[str, float] = column(Keyed(Number(0.01, 100_000), table="plants"), default={})
    live_plants: tuple[str, ...] = column(Many(Text()), default=())
    propagules: tuple[Propagule, ...] = column(Many(Part(Propagule)), default=())
    fertiliser: str = column(Text(), default="")
    source_rule: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class SeedFile(Record):
    """seed.yaml as written."""

    mixes: dict[str, Mix] = column(Keyed(Part(Mix), table="zones"))
