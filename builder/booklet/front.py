"""The front matter: cover, what this copy is, the belts with their pages, and how to use it."""

from collections.abc import Mapping
from dataclasses import dataclass

from markupsafe import Markup

from builder.booklet.code import address_code
from builder.booklet.style import Trim
from builder.drawings.ink import PRINT, rect, svg
from builder.drawings.rule import cm_rule, inch_rule
from builder.drawings.slope import contours, strata
from builder.views import grounds
from builder.views.look import Look
from builder.views.phrases import Phrases
from builder.views.zones import ZoneView, zone_views

RULE_STRIP_MM = 7.0
COVER_PAPER = "#f6f1e4"


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


def belts(look: Look, zones: tuple[ZoneView, ...], pages: Mapping[str, int]) -> tuple[Entry, ...]:
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


def rest(own: Phrases, pages: Mapping[str, int]) -> tuple[Entry, ...]:
    """What follows the belts, by anchor and name."""
    names = {"chart-0": "chart"} | {
        name: name for name in ("plants", "questions", "feel", "quick", "sources", "form")
    }
    return tuple(
        Entry(Markup(""), own.say(f"{name}.title"), "", anchor, _page(pages, anchor))
        for anchor, name in names.items()
    )


def _page(pages: Mapping[str, int], anchor: str) -> str:
    """A page number as last laid out; a blank of the same width before the first time."""
    return str(pages.get(anchor, "000"))


def steps(own: Phrases, pages: Mapping[str, int]) -> tuple[str, ...]:
    fourth = own.say("use.fourth", key=_page(pages, "key"))
    return (
        own.say("use.first"),
        own.say("use.second"),
        own.say("use.third"),
        fourth,
        own.say("use.fifth"),
        own.say("use.sixth"),
    )


def signs(look: Look, own: Phrases) -> tuple[tuple[Markup, str], ...]:
    """Samples of the booklet's signs, drawn from the region's first zone."""
    first = next(iter(zone_views(look, {look.region.zones[0].id: None})))
    row = first.plants[0]
    return ((row.bar, own.say("use.bar")), (row.hoop, own.say("use.hoop")))
