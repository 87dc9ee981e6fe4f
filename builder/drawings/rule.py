"""A ruler true to scale, for page edges. Everything here is in millimetres."""

from builder.drawings.ink import PRINT, Palette, num, path, text

START = 2.0
"""Where nought lies below the page's top edge, so that trimming cannot eat it. [mm]"""
MM_PER_INCH = 25.4


def whole_cm(height: float) -> int:
    """How many whole centimetres the edge of a page can show. [cm]"""
    return int((height - 2 * START) // 10)


def whole_quarters(height: float) -> int:
    """How many quarter inches the edge of a page can show. [1/4 in]"""
    return int((height - 2 * START) // (MM_PER_INCH / 4))


def cm_rule(x: float, height: float, side: int, unit: str, palette: Palette = PRINT) -> str:
    """Centimetres along the edge at x; side is -1 where ticks point left, 1 right. [mm]"""
    ticks, words = [], [text(x + side * 3.9, START + 3.6, unit, 2.4, palette.ink, "middle", 600)]
    for mm in range(whole_cm(height) * 10 + 1):
        y = START + mm
        long = 3.4 if mm % 10 == 0 else 2.4 if mm % 5 == 0 else 1.5
        ticks.append(f"M{num(x)} {num(y)}h{num(side * long)}")
        if mm % 10 == 0 and mm:
            words.append(
                text(x + side * 5.2, y + 0.9, str(mm // 10), 2.5, palette.ink, "middle", 600)
            )
    return path("".join(ticks), palette.ink, 0.2, 'class="cm"') + "".join(words)


def inch_rule(x: float, height: float, side: int, unit: str, palette: Palette = PRINT) -> str:
    """Inches and sixteenths along the edge at x. [mm]"""
    ticks, words = [], [text(x + side * 4.4, START + 3.6, unit, 2.4, palette.ink, "middle", 600)]
    for sixteenth in range(whole_quarters(height) * 4 + 1):
        y = START + sixteenth * MM_PER_INCH / 16
        long = (
            4.0 if sixteenth % 16 == 0
            else 3.1 if sixteenth % 8 == 0
            else 2.3 if sixteenth % 4 == 0
            else 1.3
        )  # fmt: skip
        ticks.append(f"M{num(x)} {num(y, 4)}h{num(side * long)}")
        if sixteenth % 16 == 0 and sixteenth:
            words.append(
                text(x + side * 5.4, y + 0.9, str(sixteenth // 16), 2.6, palette.ink, "middle", 600)
            )
    return path("".join(ticks), palette.ink, 0.2, 'class="inch"') + "".join(words)
