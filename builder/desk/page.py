"""What every page of the desk carries: title, links, region, patterns, notes."""

from __future__ import annotations

from dataclasses import dataclass, field, replace

from flask import get_flashed_messages, session, url_for
from markupsafe import Markup

from builder.desk import charts
from builder.desk.phrases import read_phrases
from builder.desk.shelf import Look

PARTS = ("overview", "tables", "proof", "build", "editions", "sheets", "records")
ENDPOINTS = {
    "overview": "overview.region",
    "tables": "tables.first",
    "proof": "proof.show",
    "build": "build.show",
    "editions": "editions.show",
    "sheets": "sheets.show",
    "records": "records.show",
}


@dataclass(frozen=True)
class Link:
    """One entry of the masthead."""

    text: str
    href: str
    here: bool


@dataclass(frozen=True)
class Page:
    """The frame of a page; shape is the class of its main part."""

    title: str
    shape: str
    nav: list[Link] = field(default_factory=list)
    who: str = ""
    edition: str = ""
    patterns: Markup = field(default_factory=Markup)
    mark: Markup = field(default_factory=Markup)
    account: str = ""
    notes: list[str] = field(default_factory=list)

    def with_drawings(self, patterns: Markup, mark: Markup) -> Page:
        """The same frame with other patterns and mark."""
        return replace(self, patterns=patterns, mark=mark)


def page(part: str, shape: str, look: Look | None = None, title: str = "") -> Page:
    """The frame for a part of the desk, with the region's links when there is a region."""
    say = read_phrases()["base"]
    nav, who, edition, patterns, mark = [], "", "", Markup(), Markup()
    if look is not None:
        nav = [
            Link(say[name], url_for(ENDPOINTS[name], region_id=look.id), name == part)
            for name in PARTS
        ]
        who = look.id
        if look.region is not None:
            who, edition = f"{look.region.name},", f"{say['edition']} {look.region.edition}"
            patterns, mark = charts.patterns(look.region.zones), charts.mark(look.region.zones)
    return Page(
        title=title or say.get(part, say["desk"]),
        shape=shape,
        nav=nav,
        who=who,
        edition=edition,
        patterns=patterns,
        mark=mark,
        account=str(session.get("account", "")),
        notes=[str(note) for note in get_flashed_messages()],
    )
