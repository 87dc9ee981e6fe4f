"""The Book of one region as pages that need no script: zones, plants, chart, ground, help."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

from jinja2 import Environment
from markupsafe import Markup

from builder.drawings.ink import SCREEN
from builder.site.pages import environment, rendered
from builder.site.policy import app_policy
from builder.tables import Region
from builder.views import grounds, plants
from builder.views.look import Look, look
from builder.views.phrases import FIRST, Phrases, languages, phrases
from builder.views.zones import zone_view

WORDS = Path(__file__).resolve().parent / "words"
VERDICTS = ("zone", "edge", "mosaic", "misfit", "thin")


@dataclass(frozen=True)
class Frame:
    """What every Book page has round it.

    root      the way up to the site's first page, e.g. "../../../"
    language  of the page
    patterns  the belts' patterns, drawn once a page
    """

    root: str
    language: str
    region: str
    edition: str
    invented: str
    policy: str
    patterns: Markup
    parts: tuple[tuple[str, str], ...]


def book_pages(region: Region) -> dict[str, bytes]:
    """Name → page, in every language the region and the views have words for.

    The first language lies at the top, others in a folder of their name, e.g. "es/index.html".
    """
    spoken = [
        tag for tag in region.head.languages if tag in languages() and tag in languages(WORDS)
    ]
    env = environment()
    pages: dict[str, bytes] = {}
    for tag in spoken or [FIRST]:
        folder = "" if tag == FIRST else f"{tag}/"
        for name, page in _pages(env, look(region, tag, SCREEN), phrases(tag, WORDS), folder):
            pages[folder + name] = page
    return pages


def _pages(env: Environment, seen: Look, say: Phrases, folder: str) -> Iterator[tuple[str, bytes]]:
    region = seen.region
    frame = _frame(seen, say, folder)

    def page(name: str, template: str, title: str, **names: object) -> tuple[str, bytes]:
        head = say.say("book.title", page=title, region=frame.region)
        content = rendered(
            env, f"book/{template}", frame=frame, title=title, head=head, say=say.say, **names
        )
        return name, content

    zones = [zone_view(seen, zone.id) for zone in region.zones]
    by_kind = [
        (say.say(f"zones.{place}"), [view for view in zones if (seen.belts[view.id].lens) == lens])
        for place, lens in (("slope", False), ("beside", True))
    ]
    groups = plants.by_form(seen)
    yield page("index.html", "index.html", frame.region, kinds=by_kind,
               warns=grounds.region_warns(seen), answers_for=region.head.answers_for)  # fmt: skip
    for view in zones:
        yield page(f"zone-{view.id}.html", "zone.html", view.name, zone=view)
    counts = [
        (group, say.say(f"plants.count.{'one' if len(group.plants) == 1 else 'other'}",
                        n=len(group.plants)))
        for group in groups
    ]  # fmt: skip
    yield page("plants.html", "plants.html", say.say("plants.title"), groups=counts)
    for group in groups:
        yield page(f"plants-{group.form}.html", "form.html", group.title, group=group)
    yield page("chart.html", "chart.html", say.say("chart.title"), chart=plants.chart(seen))
    yield page("ground.html", "ground.html", say.say("ground.title"),
               questions=grounds.questions(seen))  # fmt: skip
    yield page(
        "help.html",
        "help.html",
        say.say("help.title"),
        hoops=grounds.hoops(seen),
        steps=grounds.feel_steps(seen),
        textures=grounds.texture_rows(seen),
        verdicts=[(say.say(f"verdict_names.{v}"), say.say(f"verdicts.{v}")) for v in VERDICTS],
    )
    yield page("cautions.html", "cautions.html", say.say("cautions.title"),
               plants=grounds.people_warns(seen), warns=grounds.region_warns(seen))  # fmt: skip
    yield page("sources.html", "sources.html", say.say("sources.title"),
               sources=grounds.sources(seen))  # fmt: skip


def _frame(seen: Look, say: Phrases, folder: str) -> Frame:
    region = seen.region
    return Frame(
        root="../../../" + "../" * folder.count("/"),
        language=say.language,
        region=region.name,
        edition=say.say("book.edition", edition=region.edition, date=region.date),
        invented=say.say("book.invented") if region.invented else "",
        policy=app_policy(),
        patterns=Markup("".join(belt.pattern(SCREEN) for belt in seen.belts.values())),
        parts=tuple(
            (f"{name}.html", say.say(f"{part}.title"))
            for name, part in (
                ("index", "zones"), ("plants", "plants"), ("chart", "chart"), ("ground", "ground"),
                ("help", "help"), ("cautions", "cautions"), ("sources", "sources"),
            )
        ),
    )  # fmt: skip
