"""A region's drawings for the app: one hidden sheet of patterns, and the shapes by name."""

from typing import Any, Protocol

from builder.drawings.belts import ZoneLike, belts_of, in_stack_order
from builder.drawings.forms import FORMS, GROUND
from builder.drawings.hoops import RADIUS, hoop_path
from builder.drawings.ink import SCREEN
from builder.drawings.slope import heights


class ClassLike(Protocol):
    """What a drawing must know of a cover class."""

    @property
    def code(self) -> str: ...
    @property
    def mid_pct(self) -> float: ...


class ScaleLike(Protocol):
    """What a drawing must know of a cover scale."""

    @property
    def classes(self) -> tuple[ClassLike, ...]: ...


class RegionLike(Protocol):
    """What a drawing must know of a region."""

    @property
    def name(self) -> str: ...
    @property
    def zones(self) -> tuple[ZoneLike, ...]: ...
    @property
    def elevation_m(self) -> tuple[float, float]: ...
    @property
    def cover_scale(self) -> ScaleLike: ...


def patterns(zones: tuple[ZoneLike, ...]) -> str:
    """The hidden sheet of a page: every belt's pattern, to be filled by url(#p-LETTER)."""
    found = "".join(belt.pattern(SCREEN) for belt in belts_of(zones).values())
    return (
        '<svg class="defs" width="0" height="0" aria-hidden="true" focusable="false"'
        f' xmlns="http://www.w3.org/2000/svg"><defs>{found}</defs></svg>'
    )


def sprite(region: RegionLike) -> dict[str, Any]:
    """Everything the app draws of a region, as plain data.

    patterns     the hidden sheet
    belts        by zone id: letter, pattern id, colour on paper, lens or not
    stack        zone ids from the foot of the edge up
    hoops        by cover class code: path data in a box of 100 for the even-odd rule
    hoop_radius  radius of the visible ground in that box
    forms        by growth form: path data in a box of 32
    slope        the belts at their true heights, all in colour
    """
    belts = belts_of(region.zones)
    return {
        "patterns": patterns(region.zones),
        "belts": {
            zone_id: {
                "letter": belt.letter,
                "pattern": belt.pattern_id,
                "colour": belt.on_screen_colour(),
                "lens": belt.lens,
            }
            for zone_id, belt in belts.items()
        },
        "stack": [zone.id for zone in in_stack_order(region.zones)],
        "hoops": {each.code: hoop_path(each.mid_pct / 100) for each in region.cover_scale.classes},
        "hoop_radius": RADIUS,
        "forms": {name: shape + GROUND for name, shape in FORMS.items()},
        "slope": heights(region.zones, region.elevation_m, region.name, None, SCREEN),
    }
