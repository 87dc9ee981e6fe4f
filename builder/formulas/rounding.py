"""The one rounding rule: halves up, on the shortest decimal of the number.

`:.1f` sends exact ties to the even digit and looks at the binary value (2.675 ->
2.67); `toFixed` treats ties differently again. Whoever checks with pencil and
paper rounds the decimal that stands on the screen, so both languages do.
"""

from decimal import ROUND_FLOOR, Decimal

from builder.formulas.refusal import need_number


def shown(value: float, digits: int) -> str:
    """`value` as text with `digits` decimals, 0 or more.

    Halves go up (2.675 -> 2.68, -2.5 -> -2); minus zero is written as zero.
    Source: beltbook_rule; golden: rounding.json
    """
    decimal = Decimal(repr(need_number("value", value)))
    unit = Decimal(1).scaleb(-digits)
    cut = (decimal + unit / 2).quantize(unit, rounding=ROUND_FLOOR)
    text = f"{cut:f}"
    return text if cut else text.removeprefix("-")


def rounded(value: float, digits: int) -> float:
    """`value` as the number nearest to its `shown` text.

    Source: beltbook_rule; golden: rounding.json
    """
    return float(shown(value, digits))
