"""questions.yaml: ground questions, what their answers say, and rules that stand on findings.

Effects and how they join: within one effect the share of a plant's own group replaces the others,
otherwise the lowest share of any trait that fits the plant counts. Where several effects hold
(a disturbance and answers), the lowest share counts; they are not multiplied, since they describe
the same harm.
"""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.plants import FATES, FORM_LAYER, RESPONSES
from builder.tables.shape import (
    COUNT,
    PERCENT,
    SHARE,
    Flag,
    Id,
    Itself,
    Keyed,
    Many,
    Number,
    Part,
    Record,
    Ref,
    Text,
    column,
)

LAYERS = tuple(dict.fromkeys(FORM_LAYER.values()))
KINDS = ("azonal", "shift", "state", "context")
TRAITS = (
    frozenset(FATES)
    | frozenset(RESPONSES)
    | frozenset(FORM_LAYER)
    | frozenset(LAYERS)
    | {
        "any",
        "out_of_season",
        "mix",
    }
)
WEIGHTS = (0, 0.25, 0.5, 0.75, 1)
NATS = Number(-10, 10)
SITE_FACTS = ("height_m", "slope_pct", "aspect_deg", "month")


@dataclass(frozen=True, kw_only=True)
class Effect(Record):
    """What an answer does to other evidence."""

    height_off: bool = column(Flag(), default=False)
    elevation_shift_m: float = column(Number(-1000, 1000), default=0)
    kept: dict[str, float] = column(Keyed(SHARE), default={})
    newcomer: float = column(SHARE, default=0.0)
    sown: bool = column(Flag(), default=False)
    layers_gone: tuple[str, ...] = column(Many(Text(choices=LAYERS)), default=())
    found: dict[str, float] = column(Keyed(SHARE), default={})
    cover: dict[str, float] = column(Keyed(SHARE), default={})
    dead_counts: bool = column(Flag(), default=False)
    azonal_weight: float = column(SHARE, default=1.0)
    question_weight: dict[str, float] = column(Keyed(SHARE, table="questions"), default={})
    second_call: bool = column(Flag(), default=False)
    move_plot: bool = column(Flag(), default=False)


@dataclass(frozen=True, kw_only=True)
class Answer(Record):
    """One answer of a question; "can't tell" is always there and says nothing."""

    value: str = column(Id())
    label: str = column(Text())
    share: float | None = column(SHARE, default=None)
    zone_log_odds: dict[str, float] = column(Keyed(NATS, table="zones"), default={})
    effect: Effect | None = column(Part(Effect), default=None)


@dataclass(frozen=True, kw_only=True)
class Question(Record):
    """One ground question."""

    id: str = column(Id())
    kind: str = column(Text(choices=KINDS))
    ask: str = column(Text())
    asked: bool = column(Flag(), default=True)
    digs_cm: float | None = column(Number(1, 500), default=None)
    answers: tuple[Answer, ...] = column(Many(Part(Answer)))
    why: str = column(Text())
    act: str = column(Text())


@dataclass(frozen=True, kw_only=True)
class Condition(Record):
    """A condition over findings, answers and site facts; what is unknown stays unknown."""

    any: tuple[Condition, ...] = column(Many(Itself()), default=())
    all: tuple[Condition, ...] = column(Many(Itself()), default=())
    no: Condition | None = column(Itself(), default=None, name="not")
    plant: str | None = column(Ref("plants"), default=None)
    group: str | None = column(Ref("groups"), default=None)
    cover_at_least_pct: float | None = column(PERCENT, default=None)
    count_at_least: int | None = column(COUNT, default=None)
    question: str | None = column(Ref("questions"), default=None)
    answer: str | None = column(Text(), default=None)
    site: str | None = column(Text(choices=SITE_FACTS), default=None)
    at_least: float | None = column(Number(), default=None)
    at_most: float | None = column(Number(), default=None)


@dataclass(frozen=True, kw_only=True)
class Rule(Record):
    """A habitat rule: when its condition holds it speaks for zones or changes other evidence."""

    id: str = column(Id())
    when: Condition = column(Part(Condition))
    zone_log_odds: dict[str, float] = column(Keyed(NATS, table="zones"), default={})
    effect: Effect | None = column(Part(Effect), default=None)
    why: str = column(Text())
    act: str = column(Text())


@dataclass(frozen=True, kw_only=True)
class QuestionsFile(Record):
    """questions.yaml as written."""

    questions: tuple[Question, ...] = column(Many(Part(Question)))
    rules: tuple[Rule, ...] = column(Many(Part(Rule)), default=())
