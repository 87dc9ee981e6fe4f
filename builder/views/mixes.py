"""A zone's seed mix as finished text."""

from dataclasses import dataclass

from builder.formulas.seeding import pls_kg_ha
from builder.views.figures import MINUS
from builder.views.look import Look


@dataclass(frozen=True)
class MixRow:
    """One plant of a mix."""

    name: str
    seeds: str
    weight: str


@dataclass(frozen=True)
class MixView:
    """A zone's seed mix."""

    method: str
    rows: tuple[MixRow, ...]
    total_seeds: str
    total_weight: str
    seeds_head: str
    weight_head: str
    other_method: str
    planted: tuple[str, ...]
    none: bool

    @property
    def pairs(self) -> tuple[tuple[MixRow, ...], ...]:
        """The rows two abreast, read down the first column and then the second."""
        half = (len(self.rows) + 1) // 2
        blank = MixRow("", "", "")
        second = (*self.rows[half:], blank)[:half]
        return tuple(zip(self.rows[:half], second, strict=True))


def mix_view(look: Look, zone_id: str) -> MixView:
    """A zone's mix with live seeds and pure live seed by weight."""
    mix = look.region.mixes[zone_id]
    figures, say = look.figures, look.phrases.say
    rows, weight, seeds = [], 0.0, 0.0
    for plant_id, live in mix.plants.items():
        count = look.plants[plant_id].seeds_per_g
        kg_ha = pls_kg_ha(live, count) if count is not None else None
        seeds += live
        weight += kg_ha or 0.0
        shown = figures.seed_weight(kg_ha) if kg_ha is not None else MINUS
        rows.append(MixRow(look.plant_name(plant_id), figures.seeds(live), shown))
    planted = list(mix.live_plants)
    for each in mix.propagules:
        rate = ""
        if each.rate_low is not None and each.rate_high is not None:
            unit = look.phrases.named("rates", each.rate_unit)
            rate = f", {figures.span(each.rate_low, each.rate_high)} {unit}"
        planted.append(f"{each.what}{rate} ({figures.months(each.months)})")
    return MixView(
        method=look.phrases.named("methods", mix.method),
        rows=tuple(rows),
        total_seeds=figures.seeds(seeds),
        total_weight=figures.seed_weight(weight),
        seeds_head=figures.seeds_unit,
        weight_head=say("mix.weight", unit=figures.yield_unit),
        other_method=mix.other_method,
        planted=tuple(planted),
        none=not rows,
    )
