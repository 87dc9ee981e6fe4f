"""The app's icon as PNG in the sizes that home screens ask for, painted from its drawing.

The drawing uses few shapes (paths of M, C, S, V, H and z, a rectangle, a turned ellipse), so they
are painted here, and no rasteriser is needed where the app is built.
"""

from __future__ import annotations

import io
import math
import re
from functools import cache
from xml.etree import ElementTree

from PIL import Image, ImageDraw

from builder.drawings.icon import icon

SVG = "{http://www.w3.org/2000/svg}"
BOX = 512  # units of the drawing
SIDE = 1536  # painted so large, then averaged down [px]
STEPS = 24  # straight pieces per curve

Point = tuple[float, float]


def icons() -> dict[str, bytes]:
    """The icon's files by name."""
    return {
        "icon.svg": icon(rounded=True).encode(),
        "icon-180.png": png(180, rounded=False),
        "icon-192.png": png(192, rounded=True),
        "icon-512.png": png(512, rounded=True),
        "icon-maskable-512.png": png(512, rounded=False),
    }


def png(size_px: int, rounded: bool) -> bytes:
    """The icon as PNG.

    size_px  width and height [px]
    rounded  False fills the corners, for systems that cut their own shape
    """
    canvas = _painted().copy()
    if rounded:
        mask = Image.new("L", canvas.size, 0)
        box = (0, 0, SIDE - 1, SIDE - 1)
        ImageDraw.Draw(mask).rounded_rectangle(box, _corner() * SIDE / BOX, fill=255)
        canvas.putalpha(mask)
    file = io.BytesIO()
    canvas.resize((size_px, size_px), Image.Resampling.BOX).save(file, "PNG", compress_level=9)
    return file.getvalue()


@cache
def _painted() -> Image.Image:
    """All shapes on one large square."""
    group = ElementTree.fromstring(icon(rounded=False)).find(f"{SVG}g")
    assert group is not None, "the icon's shapes stand in one clipped group"
    canvas = Image.new("RGB", (SIDE, SIDE))
    pen = ImageDraw.Draw(canvas)
    for shape in group:
        outline = [(x * SIDE / BOX, y * SIDE / BOX) for x, y in outline_of(shape)]
        pen.polygon(outline, fill=shape.get("fill"))
        width = round(float(shape.get("stroke-width", "0")) * SIDE / BOX)
        if width:
            pen.line([*outline, outline[0]], fill=shape.get("stroke"), width=width, joint="curve")
    return canvas


def _corner() -> float:
    """Radius of the icon's rounded corners, in units of the drawing."""
    cut = ElementTree.fromstring(icon(rounded=True)).find(f"{SVG}defs/{SVG}clipPath/{SVG}rect")
    assert cut is not None, "the icon is cut by one rectangle"
    return float(cut.get("rx", "0"))


def outline_of(shape: ElementTree.Element) -> list[Point]:
    """The outline of one shape as points, in units of the drawing."""
    number = {name: float(value) for name, value in shape.items() if _is_number(value)}
    if shape.tag == f"{SVG}rect":
        w, h = number["width"], number["height"]
        return [(0, 0), (w, 0), (w, h), (0, h)]
    if shape.tag == f"{SVG}ellipse":
        turn = re.match(r"rotate\(([-\d.]+)", shape.get("transform", ""))
        return _ellipse(number, math.radians(float(turn[1]) if turn else 0.0))
    if shape.tag == f"{SVG}path":
        return _path(shape.get("d", ""))
    raise ValueError(f"the icon holds a shape that is not painted: {shape.tag}")


def _ellipse(number: dict[str, float], angle: float) -> list[Point]:
    points = []
    for step in range(4 * STEPS):
        t = 2 * math.pi * step / (4 * STEPS)
        x, y = number["rx"] * math.cos(t), number["ry"] * math.sin(t)
        turned_x = x * math.cos(angle) - y * math.sin(angle)
        turned_y = x * math.sin(angle) + y * math.cos(angle)
        points.append((number["cx"] + turned_x, number["cy"] + turned_y))
    return points


def _path(d: str) -> list[Point]:
    points: list[Point] = []
    lead = (0.0, 0.0)  # second control point of the curve before
    for letter, rest in re.findall(r"([A-Za-z])([^A-Za-z]*)", d):
        numbers = [float(n) for n in re.findall(r"-?\d+(?:\.\d+)?", rest)]
        if letter == "M":
            points.append((numbers[0], numbers[1]))
        elif letter == "H":
            points.append((numbers[0], points[-1][1]))
        elif letter == "V":
            points.append((points[-1][0], numbers[0]))
        elif letter in "CS":
            start = points[-1]
            if letter == "S":
                numbers = [2 * start[0] - lead[0], 2 * start[1] - lead[1], *numbers]
            first, lead, end = (
                (numbers[0], numbers[1]),
                (numbers[2], numbers[3]),
                (numbers[4], numbers[5]),
            )
            points += [
                _bezier(start, first, lead, end, step / STEPS) for step in range(1, STEPS + 1)
            ]
        elif letter != "z":
            raise ValueError(f"the icon's path uses {letter}, which is not painted")
    return points


def _bezier(a: Point, b: Point, c: Point, d: Point, t: float) -> Point:
    u = 1 - t
    weights = (u * u * u, 3 * u * u * t, 3 * u * t * t, t * t * t)
    x, y = (sum(w * p[i] for w, p in zip(weights, (a, b, c, d), strict=True)) for i in (0, 1))
    return (x, y)


def _is_number(text: str) -> bool:
    return re.fullmatch(r"-?\d+(?:\.\d+)?", text) is not None
