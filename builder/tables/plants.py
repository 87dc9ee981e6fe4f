"""plants.yaml: every plant a crew may name, and the groups they may stop at."""

from __future__ import annotations

from dataclasses import dataclass

from builder.tables.shape import (
    MONTH,
    SHARE,
    Flag,
    Id,
    Many,
    Number,
    Part,
    Record,
    Ref,
    Series,
    Text,
    column,
)

FORM_LAYER = {
    "tree": "tree",
    "shrub": "shrub",
    "dwarf_shrub": "dwarf_shrub",
    "subshrub": "shrub",
    "succulent": "shrub",
    "vine": "shrub",
    "grass_bunch": "grass",
    "grass_sod": "grass",
    "grass_annual": "grass",
    "sedge_rush": "grass",
    "forb_perennial": "forb",
    "forb_biennial": "forb",
    "forb_annual": "forb",
    "fern": "fern",
    "moss": "moss",
    "lichen": "lichen",
}
ORIGINS = ("native", "introduced")
WEEDS = ("none", "ruderal", "invasive", "seeded")
RESPONSES = ("decreaser", "increaser", "neutral", "invader", "pioneer", "seeded")
FATES = (
    "killed",
    "resprouts",
    "rhizome",
    "regrows_slowly",
    "seedbank",
    "wind_seed",
    "fragments",
    "spores",
)
REMNANTS = ("high", "medium", "low", "none")
AMPLITUDES = ("narrow", "moderate", "broad", "azonal", "split", "wet_split")
DIFFICULTIES = ("easy", "fair", "hard", "expert")
WHO = ("people", "stock", "site")
LEVELS = ("deadly", "harm", "care")


@dataclass(frozen=True, kw_only=True)
class Caution(Record):
    """Whom it can hurt, how badly, and what to do; `when` and `zones` for the region's own."""

    who: str = column(Text(choices=WHO))
    level: str = column(Text(choices=LEVELS))
    text: str = column(Text())
    id: str | None = column(Id(), default=None)
    when: str = column(Text(), default="")
    zones: tuple[str, ...] = column(Many(Ref("zones")), default=())


@dataclass(frozen=True, kw_only=True)
class Plant(Record):
    """A species or subspecies; the id never changes."""

    id: str = column(Id())
    scientific: str = column(Text())
    common: str = column(Text())
    local: tuple[str, ...] = column(Many(Text()), default=())
    codes: tuple[str, ...] = column(Many(Text(longest=12)), default=())
    synonyms: tuple[str, ...] = column(Many(Text()), default=())
    family: str = column(Text())
    form: str = column(Text(choices=tuple(FORM_LAYER)))
    origin: str = column(Text(choices=ORIGINS))
    weed: str = column(Text(choices=WEEDS))
    months: tuple[int, int] = column(Series(("from", "to"), MONTH))
    best_season: str = column(Text())
    known_when_dry: bool = column(Flag())
    response: str = column(Text(choices=RESPONSES))
    fate: str = column(Text(choices=FATES))
    remnant: str = column(Text(choices=REMNANTS))
    amplitude: str | None = column(Text(choices=AMPLITUDES), default=None)
    seeds_per_g: float | None = column(Number(0.01, 100_000), default=None)
    planning_pls: float | None = column(SHARE, default=None)
    subspecies_matters: bool = column(Flag(), default=False)
    difficulty: str | None = column(Text(choices=DIFFICULTIES), default=None)
    overlooked: float | None = column(SHARE, default=None)
    misnamed: float | None = column(SHARE, default=None)
    sensitive: bool = column(Flag(), default=False)
    marks: str = column(Text())
    lookalikes: tuple[str, ...] = column(Many(Ref("plants")), default=())
    lookalike_tell: str = column(Text(), default="")
    cautions: tuple[Caution, ...] = column(Many(Part(Caution)), default=())
    note: str = column(Text(), default="")

    @property
    def layer(self) -> str:
        """The layer of the stand the plant belongs to; sedges and rushes count as grass."""
        return FORM_LAYER[self.form]

    def has_trait(self, trait: str) -> bool:
        """Whether a trait word of an effect speaks of this plant (groups aside).

        A trait is a fate, a response, a form, the first word of a form (grass, forb), a layer,
        a weed word, or "any".
        """
        return trait in (self.fate, self.response, self.form, self.layer, "any") or (
            self.form.startswith(trait + "_")
        )


@dataclass(frozen=True, kw_only=True)
class Group(Record):
    """Plants that go together: an answer of some kind, a measure of success, weeds, a caution."""

    id: str = column(Id())
    name: str = column(Text())
    use: str = column(Text(choices=("answer", "success", "weeds", "caution", "evidence")))
    members: tuple[str, ...] = column(Many(Ref("plants")))


@dataclass(frozen=True, kw_only=True)
class PlantsFile(Record):
    """plants.yaml as written."""

    plants: tuple[Plant, ...] = column(Many(Part(Plant)))
    groups: tuple[Group, ...] = column(Many(Part(Group)), default=())
