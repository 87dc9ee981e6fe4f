"""The two curves behind every interval: the normal and Student's t.

Here they come from scipy; the phone has its own small pair and shares the goldens.
"""

from statistics import NormalDist

from scipy import special

from builder.formulas.refusal import need_above_zero, need_number, need_open_share

_NORMAL = NormalDist()


def normal_quantile(share: float) -> float:
    """Value below which a share of the standard normal lies. [-]

    Refused: a share of 0, 1 or beyond.
    Source: normal_table; golden: quantiles.json
    """
    return _NORMAL.inv_cdf(need_open_share("share", share))


def normal_below(z: float) -> float:
    """Share of the standard normal below z. [0..1]

    Source: normal_table; golden: quantiles.json
    """
    return float(special.ndtr(need_number("z", z)))


def t_quantile(share: float, df: float) -> float:
    """Value below which a share of Student's t lies. [-]

    df  degrees of freedom, above zero, fractions allowed (Welch)

    One-sided alpha 0.10 asks for the share 0.90, not 0.95.
    Source: student_t_table; golden: quantiles.json
    """
    below = need_open_share("share", share)
    return float(special.stdtrit(need_above_zero("df", df), below))


def t_above(t: float, df: float) -> float:
    """Share of Student's t above t: the one-sided p of a test. [0..1]

    Source: student_t_table; golden: quantiles.json
    """
    return float(special.stdtr(need_above_zero("df", df), -need_number("t", t)))
