"""words/<language>.yaml: names and lines of a region in another language."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import Keyed, Part, Record, Text, column


@dataclass(frozen=True, kw_only=True)
class ZoneWords(Record):
    """A zone in another language."""

    name: str = column(Text())
    short: str = column(Text(longest=20), default="")
    one_line: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class QuestionWords(Record):
    """A ground question in another language; answers by value."""

    ask: str = column(Text())
    answers: dict[str, str] = column(Keyed(Text()))
    why: str = column(Text(), default="")
    act: str = column(Text(), default="")


@dataclass(frozen=True, kw_only=True)
class Words(Record):
    """One language of a region. A plant without a name shows its scientific name."""

    language: str = column(Text(longest=8))
    reviewed_by: str | None = column(Text(), default=None)
    note: str = column(Text(), default="")
    zones: dict[str, ZoneWords] = column(Keyed(Part(ZoneWords), table="zones"), default={})
    plants: dict[str, str] = column(Keyed(Text(), table="plants"), default={})
    disturbances: dict[str, str] = column(Keyed(Text(), table="disturbances"), default={})
    groups: dict[str, str] = column(Keyed(Text(), table="groups"), default={})
    questions: dict[str, QuestionWords] = column(
        Keyed(Part(QuestionWords), table="questions"), default={}
    )
    plant_cautions: dict[str, str] = column(Keyed(Text(), table="plants"), default={})
    region_cautions: dict[str, str] = column(Keyed(Text()), default={})
    cover_classes: dict[str, str] = column(Keyed(Text()), default={})
