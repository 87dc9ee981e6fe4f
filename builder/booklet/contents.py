"""What stands in the booklet, in order, as finished text and drawings."""

from collections.abc import Mapping
from dataclasses import dataclass, replace
from pathlib import Path

from markupsafe import Markup

from builder.booklet.code import address_code
from builder.booklet.keying import Grown, KeyView, grown, key_view
from builder.booklet.style import A6, Trim
from builder.drawings.ink import PRINT, rect, svg
from builder.drawings.rule import cm_rule, inch_rule
from builder.drawings.slope import contours, strata
from builder.views import grounds, plants
from builder.views.look import Look
from builder.views.phrases import FIRST, Phrases, phrases
from builder.views.quick import Table, quick_tables
from builder.views.zones import ZoneView, zone_views

WORDS = Path(__file__).parent / "words"
RULE_STRIP_MM = 7.0
COVER_PAPER = "#f6f1e4"
FORM_PLANTS = 22
FORM_CLIPS = 9
FIRST_LINES, REST_LINES, MOST_LINES = 20, 52, 59
"""Lines that fit a zone's first page and its last two beside their drawings, counted on pages."""
WIDE_NAME = 18
LINE_MM, PLANT_ROW_MM, ZONE_CHARTS_MM = 3.7, 4.45, 77.0
CHART_WIDTH, CHART_HEAD_MM, KITE_MM = 50.0, 21.0, 3.5


@dataclass(frozen=True)
class Entry:
    """One line of the contents."""

    tab: Markup
    name: str
    note: str
    anchor: str
    page: str


@dataclass(frozen=True)
class Cover:
    """The front."""

    art: Markup
    region: str
    sub: str
    edition: str
    note: str


@dataclass(frozen=True)
class Spread:
    """A zone's pages; a page with much to say is set a little closer.

    long  too much for four pages: wildlife takes a fifth, with room for notes
    """

    zone: ZoneView
    first: str
    rest: str
    long: bool


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
    zones: tuple["Spread", ...]
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
        belts=_belts(look, zones, pages),
        rest=_rest(own, pages),
        steps=_steps(own, pages),
        hoops=tuple(grounds.hoops(look, 11.5)),
        signs=_signs(look, own),
        region_warns=tuple(grounds.region_warns(look)),
        people_warns=tuple(grounds.people_warns(look)),
        zones=tuple(spread(_linked(zone, {each.id for each in zones}), trim) for zone in zones),
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
        belts=_belts(look, tuple(each.zone for each in book.zones), pages),
        rest=_rest(own, pages),
        steps=_steps(own, pages),
    )


def _linked(zone: ZoneView, printed: set[str]) -> ZoneView:
    """The zone with links to those neighbours only that are printed too."""
    kin = tuple(each if each.zone_id in printed else replace(each, anchor="") for each in zone.kin)
    return replace(zone, kin=kin)


def spread(zone: ZoneView, trim: Trim) -> Spread:
    """Set a zone's pages; lines are reckoned from the length of the texts."""
    lost = round((A6.text_height - trim.text_height) / LINE_MM)
    rows = int((trim.text_height - ZONE_CHARTS_MM) / PLANT_ROW_MM)
    zone = replace(zone, plants=zone.plants[:rows])
    first = (
        _lines(zone.one_line, 56)
        + _lines(zone.name, 30)
        + _lines(zone.band)
        + sum(_lines(kin.short + kin.tell, 60) for kin in zone.kin)
        + _lines(zone.why_here + zone.limits)
        + _lines(" ".join(zone.soil))
        + sum(_lines(line.head + line.text) for line in zone.after)
    )
    mix = zone.mix
    rest = (
        _lines(zone.cautions)
        + _lines(zone.months_line)
        + sum(_lines(line.head + line.text) for line in zone.work)
        + sum(_lines(each.name + each.do + each.avoid, 62) for each in zone.damage)
        + sum(max(_lines(each.name, WIDE_NAME) for each in pair) for pair in mix.pairs)
        + sum(_lines(each) for each in (mix.other_method, *mix.planted))
        + _lines(zone.weeds)
        + _lines("".join(line.head + line.text for line in zone.wildlife))
        + _lines("".join(line.head + line.text for line in zone.soil_life))
    )
    long = rest > MOST_LINES - 2 * lost
    return Spread(
        zone,
        "tight" if first > FIRST_LINES - lost else "easy",
        "tight" if rest > REST_LINES - 2 * lost and not long else "easy",
        long,
    )


def _lines(text: str, wide: int = 66) -> int:
    """Lines a text takes at so many letters a line."""
    return -(-len(text) // wide)


def cover(look: Look, trim: Trim, own: Phrases) -> Cover:
    """The front: the region's own slope between two rules."""
    region = look.region
    width, height = trim.width, trim.height
    strip = RULE_STRIP_MM
    paper = "#ffffff"
    body = (
        rect(0, 0, width, height, f'fill="{COVER_PAPER}"')
        + contours(width, height)
        + strata(region.zones, region.elevation_m, width, height * 0.315, height * 0.965)
        + rect(0, 0, strip, height, f'fill="{paper}"')
        + rect(width - strip, 0, strip, height, f'fill="{paper}"')
        + f'<path d="M{strip} 0V{height}M{width - strip} 0V{height}" stroke="{PRINT.ink}"'
        ' stroke-width=".35"/>'
        + inch_rule(0, height, 1, own.say("unit_in"))
        + cm_rule(width, height, -1, own.say("unit_cm"))
    )
    return Cover(
        look.show(svg(width, height, own.say("cover_alt", region=region.name), body, PRINT)),
        region.name,
        own.say("subtitle", count=look.phrases.count(len(region.zones))),
        own.say("edition", edition=region.edition),
        own.say("demo_short") if region.invented else region.date,
    )


def about(look: Look, own: Phrases, mark: str) -> tuple[str, ...]:
    """What this copy is: edition, mark, who answers, what is demo."""
    region = look.region
    demo, every = grounds.demo_share(look)
    lines = [
        own.say("about.edition", edition=region.edition, date=region.date),
        own.say("about.answers_for", name=region.head.answers_for),
    ]
    if mark:
        lines.insert(1, own.say("about.same_mark", hash=mark))
    if region.invented:
        lines.append(own.say("about.invented"))
    lines.append(own.say("about.demo", demo=demo, all=every))
    words = region.words.get(look.phrases.language)
    if words is not None and words.reviewed_by is None and own.say("about.unreviewed"):
        lines.append(own.say("about.unreviewed"))
    if region.head.address:
        lines.append(own.say("about.app", address=region.head.address))
    return tuple(lines)


def code(look: Look, own: Phrases) -> Markup:
    """The code that opens the app; nothing where the region has no address."""
    address = look.region.head.address
    if not address:
        return Markup("")
    return look.show(address_code(address, own.say("about.app", address=address)))


def _belts(look: Look, zones: tuple[ZoneView, ...], pages: Mapping[str, int]) -> tuple[Entry, ...]:
    """The belts from the top down, as they lie on the edge."""
    shown = {zone.id: zone for zone in zones}
    return tuple(
        Entry(
            look.tab(zone_id, 5.2),
            shown[zone_id].short,
            look.figures.heights(*look.zones[zone_id].band_m),
            f"zone-{zone_id}",
            _page(pages, f"zone-{zone_id}"),
        )
        for zone_id in reversed(look.stack)
        if zone_id in shown
    )


def _rest(own: Phrases, pages: Mapping[str, int]) -> tuple[Entry, ...]:
    """What follows the belts, by anchor and name."""
    names = {"chart-0": "chart"} | {
        name: name for name in ("plants", "questions", "feel", "quick", "sources", "form")
    }
    return tuple(
        Entry(Markup(""), own.say(f"{name}.title"), "", anchor, _page(pages, anchor))
        for anchor, name in names.items()
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


def _page(pages: Mapping[str, int], anchor: str) -> str:
    """A page number as last laid out; a blank of the same width before the first time."""
    return str(pages.get(anchor, "000"))


def _steps(own: Phrases, pages: Mapping[str, int]) -> tuple[str, ...]:
    fourth = own.say("use.fourth", key=_page(pages, "key"))
    return (
        own.say("use.first"),
        own.say("use.second"),
        own.say("use.third"),
        fourth,
        own.say("use.fifth"),
        own.say("use.sixth"),
    )


def _signs(look: Look, own: Phrases) -> tuple[tuple[Markup, str], ...]:
    """Samples of the booklet's signs, drawn from the region's first zone."""
    first = next(iter(zone_views(look, {look.region.zones[0].id: None})))
    row = first.plants[0]
    return ((row.bar, own.say("use.bar")), (row.hoop, own.say("use.hoop")))


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
