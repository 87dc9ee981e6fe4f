"""Pages onto sheets, at true size: each page once as a form, marks and a note drawn over."""

import io
from collections.abc import Callable, Sequence
from dataclasses import dataclass

import pikepdf

from builder.booklet.orders import Four, Sheet
from builder.booklet.style import Trim

PT_PER_MM = 72 / 25.4
MARK_MM = 8.0


@dataclass(frozen=True)
class Paper:
    """A sheet of paper. [mm]"""

    width: float
    height: float


A4 = Paper(210, 297)
LETTER = Paper(215.9, 279.4)


@dataclass(frozen=True)
class Marks:
    """Lines drawn over a sheet: fold or cut down the middle, cut across, or none."""

    down: str
    across: str


FOLD = Marks("fold", "cut")
CUT = Marks("cut", "cut")
KEEP = Marks("", "")


def imposed(
    pdf: bytes,
    sheets: Sequence[Sheet],
    trim: Trim,
    paper: Paper,
    overlays: bytes,
    title: str,
    language: str,
    tell: Callable[[int, int], None],
) -> bytes:
    """The sheets as PDF.

    pdf       pages in reading order
    overlays  two pages of the paper's size: marks and note of fronts, and of backs
    """
    done = pikepdf.new()
    with pikepdf.open(io.BytesIO(pdf)) as pages, pikepdf.open(io.BytesIO(overlays)) as over:
        forms: dict[int, pikepdf.Object] = {}
        marks = [done.copy_foreign(page.as_form_xobject()) for page in over.pages]
        sides: list[tuple[Four, int]] = []
        for sheet in sheets:
            sides.append((sheet.front, 0))
            if sheet.back is not None:
                sides.append((sheet.back, 1))
        for number, (four, side) in enumerate(sides, start=1):
            for page in four:
                if page is not None and page not in forms:
                    forms[page] = _form(done, pages.pages[page - 1])
            _add(done, four, forms, marks[side], trim, paper)
            tell(number, len(sides))
    done.Root.Lang = pikepdf.String(language)
    done.docinfo["/Title"] = title
    out = io.BytesIO()
    done.save(out, deterministic_id=True, object_stream_mode=pikepdf.ObjectStreamMode.generate)
    return out.getvalue()


def _form(done: pikepdf.Pdf, page: pikepdf.Page) -> pikepdf.Object:
    """A page as a form. Its resources stay shared: a copy of their list in each form would
    make the file more than twice as large."""
    form = page.as_form_xobject()
    form["/Resources"] = page.obj["/Resources"]
    return done.copy_foreign(form)


def _add(
    done: pikepdf.Pdf,
    four: Four,
    forms: dict[int, pikepdf.Object],
    marks: pikepdf.Object,
    trim: Trim,
    paper: Paper,
) -> None:
    """One side of a sheet: four pages about the middle, marks over them."""
    width, height = paper.width * PT_PER_MM, paper.height * PT_PER_MM
    done.add_blank_page(page_size=(width, height))
    sheet = done.pages[-1]
    found = pikepdf.Dictionary(Marks=marks)
    lines = []
    for place, page in enumerate(four):
        if page is None:
            continue
        x, y = corner(place, trim, paper)
        found[f"/Page{page}"] = forms[page]
        lines.append(f"q 1 0 0 1 {x * PT_PER_MM:.4f} {y * PT_PER_MM:.4f} cm /Page{page} Do Q")
    lines.append("q /Marks Do Q")
    sheet.Resources = pikepdf.Dictionary(XObject=found)
    sheet.Contents = done.make_stream("\n".join(lines).encode())


def corner(place: int, trim: Trim, paper: Paper) -> tuple[float, float]:
    """Lower left corner of a page on the sheet, from the sheet's lower left corner. [mm]"""
    x = paper.width / 2 - (trim.width if place % 2 == 0 else 0.0)
    y = paper.height / 2 - (trim.height if place >= 2 else 0.0)
    return x, y


def marks_drawing(paper: Paper, marks: Marks) -> str:
    """The lines of a sheet: at its edges and in its middle, solid to cut, dashed to fold."""
    middle_x, middle_y = paper.width / 2, paper.height / 2
    lines = []
    for way, kind in (("down", marks.down), ("across", marks.across)):
        if not kind:
            continue
        dash = ' stroke-dasharray="1.2 .8"' if kind == "fold" else ""
        far = paper.height if way == "down" else paper.width
        for start in (0.0, far / 2 - MARK_MM / 2, far - MARK_MM):
            line = (
                f"M{middle_x} {start}v{MARK_MM}"
                if way == "down"
                else f"M{start} {middle_y}h{MARK_MM}"
            )
            lines.append(f'<path d="{line}" stroke="#211c15" stroke-width=".2"{dash}/>')
    return (
        f'<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 {paper.width} {paper.height}"'
        f' width="{paper.width}mm" height="{paper.height}mm"><title>marks</title>'
        f"{''.join(lines)}</svg>"
    )
