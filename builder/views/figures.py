"""Figures and units as finished text, in the region's own units first."""

from collections.abc import Collection
from dataclasses import dataclass

from builder.formulas.rounding import rounded, shown
from builder.formulas.units import converted
from builder.views.phrases import Phrases

NB = "\u00a0"
MINUS = "\u2212"
DASH = "\u2013"


@dataclass(frozen=True)
class Figures:
    """How one region in one language writes its numbers.

    us  True shows feet, inches, Fahrenheit and pounds an acre
    """

    phrases: Phrases
    us: bool = False

    def plain(self, value: float, digits: int = 0) -> str:
        """A number with thousands set apart and a true minus sign."""
        text = shown(abs(value), digits)
        whole, _, part = text.partition(".")
        groups: list[str] = []
        while len(whole) > 3:
            groups.insert(0, whole[-3:])
            whole = whole[:-3]
        text = self.phrases.say("figures.thousands").join([whole, *groups])
        if part:
            text += self.phrases.say("figures.point") + part
        nothing = not any(sign in "123456789" for sign in text)
        return text if value >= 0 or nothing else MINUS + text

    def short(self, value: float, digits: int = 2) -> str:
        """A number without needless noughts at its end."""
        text = self.plain(value, digits)
        point = self.phrases.say("figures.point")
        return text.rstrip("0").removesuffix(point) if point in text else text

    def span(self, low: float, high: float, digits: int = 0) -> str:
        """Two numbers with a dash between, or one where they read alike."""
        first, last = self.plain(low, digits), self.plain(high, digits)
        return first if first == last else f"{first}{DASH}{last}"

    def per_cent(self, share: float, digits: int = 0) -> str:
        """A share as per cent."""
        return f"{self.short(share * 100, digits)}{NB}%"

    def height(self, metres: float) -> str:
        """A height or a difference of heights."""
        value, unit = (converted(metres, "m", "ft"), "ft") if self.us else (metres, "m")
        return f"{self.plain(_to_ten(value, self.us))}{NB}{unit}"

    def heights(self, low_m: float, high_m: float) -> str:
        """A band of heights."""
        if not self.us:
            return f"{self.span(low_m, high_m)}{NB}m"
        feet = [_to_ten(converted(metres, "m", "ft"), True) for metres in (low_m, high_m)]
        return f"{self.span(feet[0], feet[1])}{NB}ft"

    def rain(self, mm: float) -> str:
        """Rain or water held."""
        if self.us:
            return f"{self.plain(converted(mm, 'mm', 'in'), 1)}{NB}in"
        return f"{self.plain(mm)}{NB}mm"

    def rain_scale(self, mm: float) -> float:
        """Rain as the number the diagrams draw. [mm, or in]"""
        return converted(mm, "mm", "in") if self.us else mm

    def warmth(self, degrees_c: float) -> float:
        """Temperature as the number the diagrams draw. [deg C, or F]"""
        return converted(degrees_c, "c", "f") if self.us else degrees_c

    def depth(self, cm: float) -> str:
        """A depth in soil."""
        if self.us:
            return f"{self.short(converted(cm, 'cm', 'in'), 0)}{NB}in"
        return f"{self.short(cm)}{NB}cm"

    @property
    def yield_unit(self) -> str:
        """Unit of production and of seed by weight."""
        return "lb/ac" if self.us else "kg/ha"

    @property
    def rain_unit(self) -> str:
        """Unit of rain."""
        return "in" if self.us else "mm"

    @property
    def seeds_unit(self) -> str:
        """Unit of seeds sown."""
        return self.phrases.say("figures.seeds_ft2" if self.us else "figures.seeds_m2")

    def yield_number(self, kg_ha: float) -> float:
        """Production in the unit shown. [kg/ha or lb/ac]"""
        return converted(kg_ha, "kg_ha", "lb_acre") if self.us else kg_ha

    def yields(self, kg_ha: float) -> str:
        """Production without its unit, rounded to tens from a hundred up."""
        value = self.yield_number(kg_ha)
        return self.plain(10 * rounded(value / 10, 0) if value >= 100 else value)

    def seed_weight(self, kg_ha: float) -> str:
        """Seed by weight without its unit."""
        return self.plain(self.yield_number(kg_ha), 2)

    def seeds(self, per_m2: float) -> str:
        """Seeds to an area without the unit."""
        value = converted(per_m2, "per_m2", "per_ft2") if self.us else per_m2
        return self.short(value, 1 if self.us else 0)

    def month(self, number: int) -> str:
        """A month's short name."""
        return self.phrases.words("months.short")[number - 1]

    def months(self, chosen: Collection[int]) -> str:
        """Months as runs: "Mar-May, Oct". December runs on into January."""
        if len(set(chosen)) == 12:
            return self.phrases.say("months.all_year")
        runs = month_runs(chosen)
        names = []
        for first, last in runs:
            name = self.month(first)
            names.append(name if first == last else f"{name}{DASH}{self.month(last)}")
        return ", ".join(names)


def month_runs(chosen: Collection[int]) -> list[tuple[int, int]]:
    """First and last month of each unbroken run, in order of the year."""
    inside = sorted(set(chosen))
    runs: list[tuple[int, int]] = []
    for month in inside:
        if runs and runs[-1][1] == month - 1:
            runs[-1] = (runs[-1][0], month)
        else:
            runs.append((month, month))
    if len(runs) > 1 and runs[0][0] == 1 and runs[-1][1] == 12:
        runs = [*runs[1:-1], (runs[-1][0], runs[0][1])]
    return runs


def month_span(first: int, last: int) -> list[int]:
    """Months from first to last; past December the year begins again."""
    if first <= last:
        return list(range(first, last + 1))
    return [*range(first, 13), *range(1, last + 1)]


def _to_ten(value: float, rough: bool) -> float:
    return 10 * rounded(value / 10, 0) if rough else value
