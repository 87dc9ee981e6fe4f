"""Paper, inks and the few strokes every drawing is made of."""

from dataclasses import dataclass
from html import escape
from urllib.parse import quote

SANS = "Source Sans 3"
SERIF = "Source Serif 4"


@dataclass(frozen=True)
class Palette:
    """The colours a drawing uses, and whether it carries its own patterns.

    inline  True on paper, where each drawing stands alone; False on a screen,
            where one hidden sheet per page holds the patterns and the page's
            own style decides each colour
    """

    paper: str
    sheet: str
    well: str
    ink: str
    ink_2: str
    contour: str
    line: str
    hair: str
    pen: str
    pen_wash: str
    warn: str
    inline: bool


PRINT = Palette(
    paper="#ffffff",
    sheet="#ffffff",
    well="#ebe3d0",
    ink="#211c15",
    ink_2="#564b3c",
    contour="#754a1f",
    line="#94703f",
    hair="#d9ccb0",
    pen="#2a3c9e",
    pen_wash="#e2e4f3",
    warn="#9c1f0c",
    inline=True,
)

SCREEN = Palette(
    paper="var(--paper)",
    sheet="var(--sheet)",
    well="var(--well)",
    ink="var(--ink)",
    ink_2="var(--ink-2)",
    contour="var(--contour)",
    line="var(--line)",
    hair="var(--hair)",
    pen="var(--pen)",
    pen_wash="var(--pen-wash)",
    warn="var(--warn)",
    inline=False,
)


def num(value: float, places: int = 2) -> str:
    """A coordinate as short text: no exponent, no trailing noughts, never "-0"."""
    text = f"{value:.{places}f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".")
    return "0" if text in ("-0", "") else text


def svg(
    width: float, height: float, title: str, body: str, palette: Palette, name: str = ""
) -> str:
    """One drawing. On paper it has its size in millimetres, on a screen it is fluid.

    width, height  the drawing's own units; millimetres on paper
    title          what the drawing says, for those who cannot see it
    name           class of the drawing in the style sheet
    """
    size = f' width="{num(width)}mm" height="{num(height)}mm"' if palette.inline else ""
    label = f' class="{name}"' if name else ""
    return (
        f'<svg{label} viewBox="0 0 {num(width)} {num(height)}"{size} role="img"'
        f' xmlns="http://www.w3.org/2000/svg"><title>{escape(title)}</title>{body}</svg>'
    )


def rect(x: float, y: float, width: float, height: float, more: str = "") -> str:
    """A rectangle; more holds further attributes."""
    return (
        f'<rect x="{num(x)}" y="{num(y)}" width="{num(width)}" height="{num(height)}"'
        f"{' ' + more if more else ''}/>"
    )


def path(d: str, stroke: str, width: float, more: str = "") -> str:
    """An open line with round ends."""
    return (
        f'<path d="{d}" fill="none" stroke="{stroke}" stroke-width="{num(width, 3)}"'
        f"{' ' + more if more else ''}/>"
    )


def text(
    x: float,
    y: float,
    words: str,
    size: float,
    fill: str,
    anchor: str = "start",
    weight: int = 400,
    family: str = SANS,
    more: str = "",
) -> str:
    """One line of words; y is the base line."""
    return (
        f'<text x="{num(x)}" y="{num(y)}" font-size="{num(size)}" fill="{fill}"'
        f' text-anchor="{anchor}" font-weight="{weight}" font-family="{family}"'
        f"{' ' + more if more else ''}>{escape(words, quote=False)}</text>"
    )


def polyline(points: list[tuple[float, float]], close: bool = False) -> str:
    """Path data through the points, in order."""
    return "M" + "L".join(f"{num(x)} {num(y)}" for x, y in points) + ("z" if close else "")


def uri(drawing: str) -> str:
    """A drawing as an address that style sheets and pictures can hold."""
    return "data:image/svg+xml," + quote(drawing, safe="/:=,; ()")


def picture(drawing: str) -> str:
    """A drawing as a picture of its own, its title as the words for it.

    On paper many drawings share names of patterns, which one document must not hold twice.
    """
    title = drawing.partition("<title>")[2].partition("</title>")[0]
    name = drawing.partition(' class="')[2].partition('"')[0]
    label = f' class="{name}"' if drawing.startswith("<svg class=") else ""
    return f'<img{label} alt="{title}" src="{escape(uri(drawing))}">'
