"""Ground questions, soil by feel, cover hoops, cautions and sources as finished text."""

from dataclasses import dataclass

from markupsafe import Markup

from builder.drawings.hoops import hoop
from builder.formulas.soil_by_feel import FEEL_PATH, feel_water
from builder.formulas.soil_water import layer_water_mm
from builder.tables import Question
from builder.tables.plants import LEVELS
from builder.tables.sources import stated_sources
from builder.views.look import Look

ORGANIC_PCT = 2.5
"""Organic matter assumed for water held by a hand texture; the source's own middle value."""


@dataclass(frozen=True)
class AnswerView:
    """One answer and the belts it speaks for and against, strongest first."""

    label: str
    speaks_for: str
    speaks_against: str


@dataclass(frozen=True)
class QuestionView:
    """One ground question."""

    id: str
    short: str
    ask: str
    digs: str
    why: str
    act: str
    answers: tuple[AnswerView, ...]

    @property
    def telling(self) -> tuple[AnswerView, ...]:
        """Answers that speak for or against belts."""
        return tuple(each for each in self.answers if each.speaks_for or each.speaks_against)

    @property
    def silent(self) -> str:
        """The other answers, which only change what else counts."""
        return ", ".join(
            each.label for each in self.answers if not (each.speaks_for or each.speaks_against)
        )


@dataclass(frozen=True)
class FeelStep:
    """One question of the hand test and where its answers lead."""

    number: str
    ask: str
    ways: tuple["FeelWay", ...]


@dataclass(frozen=True)
class FeelWay:
    """One answer of the hand test: the next step's number, or a texture."""

    answer: str
    goal: str
    ends: bool


@dataclass(frozen=True)
class TextureRow:
    """A texture class and the water it holds."""

    name: str
    held: str


@dataclass(frozen=True)
class HoopView:
    """One cover class and its hoop."""

    code: str
    label: str
    hoop: Markup


@dataclass(frozen=True)
class PlantWarn:
    """A plant with a caution for people."""

    name: str
    latin: str
    text: str


@dataclass(frozen=True)
class WarnGroup:
    """Cautions of one level: who it can hurt and how badly, then each."""

    head: str
    plants: tuple[PlantWarn, ...]
    texts: tuple[str, ...]


@dataclass(frozen=True)
class SourceView:
    """One source and how it was read."""

    text: str
    read: str


def question_view(look: Look, question: Question) -> QuestionView:
    """A ground question's view."""
    words = look.region.words.get(look.phrases.language)
    own = words.questions.get(question.id) if words is not None else None
    labels = own.answers if own is not None else {}
    return QuestionView(
        id=question.id,
        short=look.phrases.named("question_names", question.id),
        ask=own.ask if own is not None else question.ask,
        digs=(
            look.phrases.say("questions.digs", depth=look.figures.depth(question.digs_cm))
            if question.digs_cm
            else ""
        ),
        why=(own.why if own is not None else "") or question.why,
        act=(own.act if own is not None else "") or question.act,
        answers=tuple(
            AnswerView(
                labels.get(answer.value, answer.label),
                _letters(look, answer.zone_log_odds, 1),
                _letters(look, answer.zone_log_odds, -1),
            )
            for answer in question.answers
        ),
    )


def _letters(look: Look, log_odds: dict[str, float], sign: int) -> str:
    """Letters of the zones an answer speaks for (sign 1) or against, strongest first."""
    order = {zone.id: place for place, zone in enumerate(look.region.zones)}
    chosen = [(zone, nats) for zone, nats in log_odds.items() if nats * sign > 0]
    chosen.sort(key=lambda each: (-abs(each[1]), order[each[0]]))
    return " ".join(look.zones[zone].letter for zone, _ in chosen)


def questions(look: Look) -> list[QuestionView]:
    """All ground questions that are asked, in table order."""
    return [question_view(look, each) for each in look.region.questions if each.asked]


def feel_steps(look: Look) -> list[FeelStep]:
    """The hand test as numbered steps; an answer leads to a step or to a texture."""
    numbers = {name: str(place) for place, name in enumerate(FEEL_PATH, start=1)}
    steps = []
    for name, ways in FEEL_PATH.items():
        rows = []
        for answer, there in ways.items():
            label = look.phrases.say(f"feel.{name}.{answer}")
            ends = there.startswith("=")
            goal = (
                look.phrases.named("texture", there[1:].replace(" ", "_"))
                if ends
                else numbers[there]
            )
            rows.append(FeelWay(label, goal, ends))
        steps.append(FeelStep(numbers[name], look.phrases.say(f"feel.{name}.ask"), tuple(rows)))
    return steps


def texture_rows(look: Look) -> list[TextureRow]:
    """Water that 10 cm of each texture holds for plants, without stones."""
    classes = [
        there[1:] for ways in FEEL_PATH.values() for there in ways.values() if there[0] == "="
    ]
    rows = []
    for name in classes:
        held = layer_water_mm(10, feel_water(name, ORGANIC_PCT).available)
        rows.append(
            TextureRow(
                look.phrases.named("texture", name.replace(" ", "_")), look.figures.rain(held)
            )
        )
    return rows


def hoops(look: Look, size: float = 12) -> list[HoopView]:
    """The region's cover classes with a hoop of the middle of each."""
    words = look.region.words.get(look.phrases.language)
    labels = words.cover_classes if words is not None else {}
    return [
        HoopView(
            each.code,
            labels.get(each.code, each.label),
            look.show(hoop(each.mid_pct / 100, each.label, look.palette, size)),
        )
        for each in look.region.cover_scale.classes
    ]


def people_warns(look: Look) -> list[WarnGroup]:
    """Plants that can hurt people, grouped from deadly down; table order within."""
    words = look.region.words.get(look.phrases.language)
    own = words.plant_cautions if words is not None else {}
    groups = []
    for level in LEVELS:
        rows = [
            PlantWarn(
                look.plant_name(plant.id),
                plant.scientific,
                (own.get(plant.id, "") if len(plant.cautions) == 1 else "") or each.text,
            )
            for plant in look.region.plants
            for each in plant.cautions
            if each.who == "people" and each.level == level
        ]
        if rows:
            head = look.phrases.say(f"cautions.people_{level}")
            groups.append(WarnGroup(head, tuple(rows), ()))
    return groups


def region_warns(look: Look) -> list[WarnGroup]:
    """The region's own cautions, grouped from deadly down."""
    words = look.region.words.get(look.phrases.language)
    own = words.region_cautions if words is not None else {}
    groups: dict[str, list[str]] = {}
    for level in LEVELS:
        for each in look.region.cautions:
            if each.level == level:
                head = look.phrases.say(f"cautions.{each.who}_{level}")
                groups.setdefault(head, []).append(own.get(each.id or "", "") or each.text)
    return [WarnGroup(head, (), tuple(texts)) for head, texts in groups.items()]


def sources(look: Look) -> list[SourceView]:
    """Every source the tables name, by key."""
    return [
        SourceView(each.text, look.phrases.named("read", each.read.replace(" ", "_")))
        for _, each in sorted(look.region.sources.items())
    ]


def demo_share(look: Look) -> tuple[int, int]:
    """How many statements of source say demo, and how many there are in all."""
    stated = [
        str(value.value)
        for record in look.region.files.values()
        for value in stated_sources(record.row)
    ]
    return sum(text == "demo" for text in stated), len(stated)
