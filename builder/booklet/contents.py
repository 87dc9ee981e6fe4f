"""What stands in the booklet, in order, as finished text and drawings."""

from collections.abc import Mapping
from dataclasses import dataclass, replace
from pathlib import Path

from markupsafe import Markup

from builder.booklet.front import Cover, Entry, about, belts, code, cover, rest, signs, steps
from builder.booklet.keying import Grown, KeyView, grown, key_view
from builder.booklet.spreads import Spread, linked, spread
from builder.booklet.style import Trim
from builder.views import grounds, plants
from builder.views.look import Look
from builder.views.phrases import FIRST, Phrases, phrases
from builder.views.quick import Table, quick_tables
from builder.views.zones import zone_views

FORM_PLANTS = 22
FORM_CLIPS = 9
CHART_WIDTH, CHART_HEAD_MM, KITE_MM = 50.0, 21.0, 3.5
WORDS = Path(__file__).parent / "words"


@dataclass(frozen=True)
class ChartPage:
    """One page of the diagonal chart, under its own head of letters."""

    anchor: str
    first: bool
    note: str
    rows: tuple[plants.KiteRow, ...]


@dataclass(frozen=True)
class FormView:
    """The blank site check: the record's fields in the phone's order."""

    fields: tuple[tuple[str, str], ...]
    roles: tuple[str, ...]
    damages: tuple[str, ...]
    codes: str
    verdicts: tuple[str, ...]
    plant_rows: tuple[str, ...]
    clip_rows: tuple[str, ...]


@dataclass(frozen=True)
class BookletView:
    """Everything the templates need."""

    words: "Words"
    language: str
    notes_language: str
    title: str
    cover: Cover
    about: tuple[str, ...]
    code: Markup
    belts: tuple[Entry, ...]
    rest: tuple[Entry, ...]
    steps: tuple[str, ...]
    hoops: tuple[grounds.HoopView, ...]
    signs: tuple[tuple[Markup, str], ...]
    region_warns: tuple[grounds.WarnGroup, ...]
    people_warns: tuple[grounds.WarnGroup, ...]
    zones: tuple[Spread, ...]
    year_note: str
    chart: plants.Chart
    chart_pages: tuple[ChartPage, ...]
    forms: tuple[plants.FormGroup, ...]
    questions: tuple[grounds.QuestionView, ...]
    feel: tuple[grounds.FeelStep, ...]
    quick: tuple[Table, ...]
    form: "FormView"
    sources: tuple[grounds.SourceView, ...]
    cautions_of_build: tuple[str, ...]
    key: KeyView
    grown: Grown
    filler: bool = False


class Words:
    """The booklet's own sentences, asked for by name in the templates."""

    def __init__(self, own: Phrases, prefix: str = "") -> None:
        """Keep the phrases; prefix is the path walked so far."""
        self._own = own
        self._prefix = prefix

    def __getattr__(self, name: str) -> "Words | str":
        """The sentence of a name, or the group of sentences under it."""
        if name.startswith("__"):
            raise AttributeError(name)
        path = f"{self._prefix}{name}"
        if self._own.has(path) and not self._own.is_group(path):
            return self._own.say(path)
        if self._own.has(path):
            return Words(self._own, f"{path}.")
        raise AttributeError(f'words/en.yaml of the booklet has no "{path}"')


def booklet_view(
    look: Look,
    trim: Trim,
    mark: str,
    pages: Mapping[str, int],
    chosen: Mapping[str, object] | None = None,
    build_cautions: tuple[str, ...] = (),
) -> BookletView:
    """The whole booklet.

    mark     hash of the pack the tables make
    pages    page number by anchor, as last laid out
    chosen   zones to print; None for all
    """
    own = phrases(look.phrases.language, WORDS)
    region = look.region
    zones = tuple(zone_views(look, chosen))
    return BookletView(
        words=Words(own),
        language=look.phrases.language,
        notes_language=FIRST,
        title=own.say("title", region=region.name),
        cover=cover(look, trim, own),
        about=about(look, own, mark),
        code=code(look, own),
        belts=belts(look, zones, pages),
        rest=rest(own, pages),
        steps=steps(own, pages),
        hoops=tuple(grounds.hoops(look, 11.5)),
        signs=signs(look, own),
        region_warns=tuple(grounds.region_warns(look)),
        people_warns=tuple(grounds.people_warns(look)),
        zones=tuple(spread(linked(zone, {each.id for each in zones}), trim) for zone in zones),
        year_note=own.say("zone.year_note", unit=look.figures.rain_unit),
        chart=(drawn := plants.chart(look, CHART_WIDTH)),
        chart_pages=chart_pages(drawn, trim, own.say("chart.note")),
        forms=tuple(plants.by_form(look)),
        questions=tuple(grounds.questions(look)),
        feel=tuple(grounds.feel_steps(look)),
        quick=tuple(quick_tables(look)),
        form=form_view(look, own),
        sources=tuple(grounds.sources(look)),
        cautions_of_build=build_cautions,
        key=key_view(look, own, key := grown(region), pages),
        grown=key,
    )


def with_pages(
    book: BookletView, look: Look, pages: Mapping[str, int], filler: bool
) -> BookletView:
    """The same booklet with page numbers where it speaks of pages.

    filler  a page for notes ends the front, so that the first zone opens on the left
    """
    own = phrases(look.phrases.language, WORDS)
    return replace(
        book,
        filler=filler,
        key=key_view(look, own, book.grown, pages),
        belts=belts(look, tuple(each.zone for each in book.zones), pages),
        rest=rest(own, pages),
        steps=steps(own, pages),
    )


def chart_pages(chart: plants.Chart, trim: Trim, note: str) -> tuple[ChartPage, ...]:
    """The chart's rows in pages, evenly filled."""
    most = int((trim.text_height - CHART_HEAD_MM) / KITE_MM)
    pages = -(-len(chart.rows) // most)
    each = -(-len(chart.rows) // max(1, pages))
    return tuple(
        ChartPage(
            f"chart-{number}", number == 0, note, chart.rows[number * each : (number + 1) * each]
        )
        for number in range(pages)
    )


def form_view(look: Look, own: Phrases) -> FormView:
    """The blank site check of a region."""
    fields = (
        "unit", "name", "observer", "date", "latitude", "longitude", "accuracy", "height",
        "slope", "aspect", "photos", "hour",
    )  # fmt: skip
    labels = [own.say(f"form.head.{name}") for name in fields]
    return FormView(
        fields=tuple(zip(labels[::2], labels[1::2], strict=True)),
        roles=tuple(own.words("form.roles")),
        damages=tuple(
            look.disturbance_name(each.id, each.name) for each in look.region.disturbances
        ),
        codes=", ".join(
            f"{each.code} {look.figures.span(each.low_pct, each.high_pct)}"
            for each in look.region.cover_scale.classes
        ),
        verdicts=tuple(own.words("form.verdicts")),
        plant_rows=tuple(str(number) for number in range(1, FORM_PLANTS + 1)),
        clip_rows=tuple(str(number) for number in range(1, FORM_CLIPS + 1)),
    )
