"""The printed key as finished text: start table, couplets, points card, and their hit rates."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass

import numpy as np
from markupsafe import Markup
from numpy.typing import NDArray

from builder.key.compile import Arrays, arrays_of, compile_key
from builder.key.couplets import Couplet, Leaf, PrintedKey, follow, printed_key
from builder.key.plots import Plots
from builder.proof import simulator
from builder.tables import Region
from builder.views.look import Look
from builder.views.phrases import Phrases

LEAST_POINTS_DB = 2
"""Smaller points are left off the card, and so are plants past CARD_ROWS, the least telling first;
the hit rate beside it is that of the card as printed."""
CARD_ROWS = 84
LOOKED_UP = 8
WORLDS, SITES_A_WORLD = 4, 500
SEED = 20260207


@dataclass(frozen=True)
class Goal:
    """Where a way leads: a couplet, or one or two belts with their pages."""

    step: str
    tabs: tuple[Markup, ...]
    pages: str
    share: str
    two: bool


@dataclass(frozen=True)
class StartRow:
    """A group of leading plants and where it leads."""

    plants: str
    goal: Goal


@dataclass(frozen=True)
class Choice:
    """One couplet."""

    number: str
    plants: str
    yes: Goal
    no: Goal


@dataclass(frozen=True)
class CardRow:
    """A plant on the card and its points by letter."""

    plant: str
    points: str


@dataclass(frozen=True)
class KeyView:
    """The key's pages."""

    start: tuple[StartRow, ...]
    choices: tuple[Choice, ...]
    card: tuple[CardRow, ...]
    rate: str
    card_rate: str


@dataclass(frozen=True)
class Tested:
    """Hit rates on simulated sites that the key was not grown on. [0..1]"""

    key: float
    card: float
    sites: int


@dataclass(frozen=True)
class Grown:
    """A region's printed key with its measure."""

    printed: PrintedKey
    points_db: NDArray[np.int32]
    tested: Tested


def grown(region: Region) -> Grown:
    """Grow the printed key from the tables' evidence and test it; same tables, same key."""
    arrays = arrays_of(region)
    key = printed_key(compile_key(region), arrays)
    points = np.where(key.card.points_db >= LEAST_POINTS_DB, key.card.points_db, 0)
    least_telling = np.argsort(-points.max(axis=1), kind="stable")[CARD_ROWS:]
    points[least_telling] = 0
    return Grown(key, points, _tested(region, arrays, key, points))


def _tested(region: Region, arrays: Arrays, key: PrintedKey, points: NDArray[np.int32]) -> Tested:
    rng = np.random.default_rng(SEED)
    layers = [plant.layer for plant in region.plants]
    responses = [plant.response for plant in region.plants]
    key_right, card_right = [], []
    for _ in range(WORLDS):
        world = simulator.world_of(arrays, layers, responses, rng)
        zones = rng.integers(len(region.zones), size=SITES_A_WORLD)
        plots = simulator.observe(*simulator.pure(world, zones, rng), simulator.FORGETFUL, rng)
        ends, _ = follow(key, plots)
        key_right += [end.zone == zone for end, zone in zip(ends, zones, strict=True)]
        card_right += list(_by_card(key, points, plots) == zones)
    return Tested(float(np.mean(key_right)), float(np.mean(card_right)), WORLDS * SITES_A_WORLD)


def _by_card(key: PrintedKey, points: NDArray[np.int32], plots: Plots) -> NDArray[np.int64]:
    """Zone with most points over the plants of most cover that stand on the card."""
    rows = list(key.card.plants)
    cover = np.where(plots.steps[:, rows] >= 0, np.maximum(plots.cover[:, rows], 1e-6), 0.0)
    order = np.argsort(-cover, axis=1, kind="stable")[:, :LOOKED_UP]
    used = np.take_along_axis(cover, order, axis=1) > 0
    total = np.where(used[:, :, None], points[order], 0).sum(axis=1)
    return np.asarray(np.where(used.any(axis=1), total.argmax(axis=1), -1))


def key_view(look: Look, own: Phrases, key: Grown, pages: Mapping[str, int]) -> KeyView:
    """The key's view, with the pages of its belts."""
    printed = key.printed

    def plants(which: tuple[int, ...], joined: str) -> str:
        return joined.join(look.plant_name(printed.plant_ids[each]) for each in which)

    def goal(to: int | Leaf) -> Goal:
        return _goal(look, printed, to, pages)

    tested = key.tested
    return KeyView(
        start=tuple(
            StartRow(plants(each.plants, ", ") or own.say("key.none"), goal(each.to))
            for each in printed.start
        ),
        choices=tuple(
            _choice(each, plants(each.plants, own.say("key.or")), goal) for each in printed.couplets
        ),
        card=_card(look, key),
        rate=own.say(
            "key.rate",
            right=look.figures.plain(tested.key * 100),
            sites=look.figures.plain(tested.sites),
        ),
        card_rate=own.say("key.card_rate", right=look.figures.plain(tested.card * 100)),
    )  # fmt: skip


def _choice(each: Couplet, plants: str, goal: Callable[[int | Leaf], Goal]) -> Choice:
    return Choice(str(each.number), plants, goal(each.yes), goal(each.no))


def _goal(look: Look, key: PrintedKey, to: int | Leaf, pages: Mapping[str, int]) -> Goal:
    if isinstance(to, int):
        return Goal(str(to), (), "", "", False)
    zones = [key.zone_ids[to.zone]]
    if to.names_two:
        zones.append(key.zone_ids[to.other])
    numbers = [str(pages.get(f"zone-{zone_id}", "")) for zone_id in zones]
    return Goal(
        "",
        tuple(look.tab(zone_id, 5.2) for zone_id in zones),
        "/".join(number for number in numbers if number),
        look.figures.plain(to.share * 100),
        to.names_two,
    )


def _card(look: Look, key: Grown) -> tuple[CardRow, ...]:
    """The card's rows by name."""
    letters = [look.zones[zone_id].letter for zone_id in key.printed.zone_ids]
    rows = []
    for plant, points in zip(key.printed.card.plants, key.points_db, strict=True):
        ranked = sorted(
            ((-int(each), place) for place, each in enumerate(points) if each > 0),
        )
        said = " ".join(f"{letters[place]}{-minus}" for minus, place in ranked)
        if said:
            rows.append(CardRow(look.plant_name(key.printed.plant_ids[plant]), said))
    return tuple(sorted(rows, key=lambda row: row.plant))
