"""The page box of each format, thumb tabs, running feet: the part of the style that is computed."""

from dataclasses import dataclass

from builder.drawings.belts import edge, thumb
from builder.drawings.ink import uri
from builder.views.look import Look

TAB_MM = 7.0
EDGE_MM = 2.4


@dataclass(frozen=True)
class Trim:
    """The finished page. All in millimetres."""

    width: float
    height: float
    top: float = 7.0
    bottom: float = 9.5
    outer: float = 9.5
    inner: float = 10.5

    @property
    def text_width(self) -> float:
        """Width of the text block. [mm]"""
        return self.width - self.outer - self.inner

    @property
    def text_height(self) -> float:
        """Height of the text block. [mm]"""
        return self.height - self.top - self.bottom


A6 = Trim(105, 148)
POCKET_US = Trim(107.95, 139.7, top=6.0, bottom=8.5)


def tab_box(look: Look, zone_id: str, trim: Trim) -> tuple[float, float]:
    """Where a zone's thumb tab stands on the fore-edge: top and height. [mm]"""
    step = trim.height / len(look.stack)
    place = look.stack.index(zone_id)
    return trim.height - (place + 1) * step, step


def page_rules(look: Look, trim: Trim, foot: str, zone_ids: list[str]) -> str:
    """Style of the pages: size, margins, feet, and a tab at each zone's place on the slope."""
    font = '7.6pt "Source Sans 3"'
    number = f"content: counter(page); font: 700 {font}; color: #211c15; width: 9mm"
    name = f'content: "{_quoted(foot)}"; font: {font}; color: #564b3c'
    size = f"size: {trim.width}mm {trim.height}mm"
    rules = [
        f"@page {{ {size}; margin: {trim.top}mm 0 {trim.bottom}mm; }}",
        f"@page :left {{ margin-left: {trim.outer}mm; margin-right: {trim.inner}mm;"
        f" @bottom-left {{ {number}; text-align: left; }}"
        f" @bottom-center {{ {name}; text-align: left; width: 60mm; }}"
        " @bottom-right { content: none; } }",
        f"@page :right {{ margin-left: {trim.inner}mm; margin-right: {trim.outer}mm;"
        f" @bottom-right {{ {number}; text-align: right; }}"
        f" @bottom-center {{ {name}; text-align: right; width: 60mm; }}"
        " @bottom-left { content: none; } }",
        f".cover {{ height: {trim.height}mm; }}",
        "@page cover { margin: 0; @bottom-left { content: none } @bottom-center { content: none }"
        " @bottom-right { content: none } }",
        "@page :blank { @bottom-left { content: none } @bottom-center { content: none }"
        " @bottom-right { content: none } }",
    ]
    for zone_id in zone_ids:
        top, height = tab_box(look, zone_id, trim)
        drawing = uri(thumb(look.belts[zone_id], height, TAB_MM))
        rules.append(_beside(f"zone-{zone_id}", drawing, top, TAB_MM, trim))
        rules.append(f".zone-{zone_id} {{ page: zone-{zone_id}; }}")
    stack = [look.belts[zone_id] for zone_id in look.stack]
    rules.append(_beside("edge", uri(edge(stack, trim.height, EDGE_MM)), 0, EDGE_MM, trim))
    rules.append(".edge { page: edge; }")
    return "\n".join(rules)


def overlay_rules(width: float, height: float) -> str:
    """Style of the marks and notes laid over a sheet; the note runs up beside the middle line."""
    return (
        f"@page {{ size: {width}mm {height}mm; margin: 0 }}"
        " body, p { margin: 0 } .over { break-after: page; position: relative }"
        f" .over {{ height: {height}mm }} .over:last-child {{ break-after: auto }}"
        " .over img { position: absolute; left: 0; top: 0 }"
        f" .over p {{ position: absolute; left: {width / 2 + 0.9}mm; top: {height - 10}mm;"
        f" margin: 0; width: {height / 2 - 20}mm; font: 5pt/1.1 'Source Sans 3'; color: #564b3c;"
        " transform-origin: 0 0; transform: rotate(-90deg) }"
    )


def _beside(page: str, drawing: str, top: float, width: float, trim: Trim) -> str:
    """A drawing at the fore-edge of a named page; offsets count from the page's text block."""
    y = top - trim.top
    left, right = -trim.outer, trim.width - trim.inner - width
    image = f'background: url("{drawing}") no-repeat'
    return (
        f"@page {page}:left {{ {image} {left:.3f}mm {y:.3f}mm; }}\n"
        f"@page {page}:right {{ {image} {right:.3f}mm {y:.3f}mm; }}"
    )


def _quoted(words: str) -> str:
    return words.replace("\\", "\\\\").replace('"', '\\"')
