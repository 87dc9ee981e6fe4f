"""The printed key: a start table, a few couplets, and a card of points, from the same evidence.

The start table asks which zone's own leading plants cover most; at most two couplets follow, each
"any of up to three plants found". Leaves that are right in fewer than six of ten cases name two
zones. The card adds whole decibans of the commonest plants by hand. Grown on simulated sites
(builder.key.simulate); its hit rate is measured by the proof on sites of another generator.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Any

import numpy as np
from numpy.typing import NDArray

from builder.key import simulate
from builder.key.cards import PointsCard, make_card
from builder.key.compile import Arrays
from builder.key.plots import Plots
from builder.key.prepare import Floats, Pack
from builder.key.usual import mean_cover_pct

Whole = NDArray[np.int64]
Mask = NDArray[np.bool_]
SEED = 20260103
SITES_PER_ZONE = 250
WORLDS = 4
LEADER_SHARE, LEADER_RIGHT = 0.003, 0.6
MOST_COUPLETS, MOST_STEPS, MOST_PLANTS = 14, 2, 3
SMALLEST_BRANCH = 0.004
LEAST_GAIN_NATS = 0.0012
SECOND_PLANT_NATS = 0.004
LIKE_PROFILE = 0.5
NAMES_TWO_BELOW = 0.60
PRICE_NATS = {"short_season": 0.004, "only_green": 0.004, "lookalike": 0.0015, "grass": 0.004}
WEED_NATS = 0.02
SHORT_SEASON_MONTHS = 3


@dataclass(frozen=True)
class Leaf:
    """Where a way through the key ends. share and other_share of the sites that come here."""

    zone: int
    share: float
    other: int
    other_share: float
    n: int

    @property
    def names_two(self) -> bool:
        """Too unsure for one name: print both and send to the card."""
        return self.share < NAMES_TWO_BELOW


@dataclass(frozen=True)
class Couplet:
    """One choice: any of the plants found, or not. yes and no: a couplet's number or a leaf."""

    number: int
    plants: tuple[int, ...]
    yes: int | Leaf
    no: int | Leaf


@dataclass(frozen=True)
class Entry:
    """A line of the start table: a zone's leading plants and where it leads.

    zone -1: none of the leading plants is there; share of all sites that enter here
    """

    zone: int
    plants: tuple[int, ...]
    to: int | Leaf
    share: float


@dataclass(frozen=True)
class PrintedKey:
    """The whole printed key; plants and zones are indexes of the pack."""

    start: tuple[Entry, ...]
    couplets: tuple[Couplet, ...]
    card: PointsCard
    zone_ids: tuple[str, ...]
    plant_ids: tuple[str, ...]


@dataclass(eq=False)
class _Growing:
    """A leaf that may still be split: its sites, how deep, and who points to it."""

    rows: Whole
    depth: int
    best: tuple[float, tuple[int, ...]] | None = None
    number: int = 0
    branches: list[_Growing] = field(default_factory=list)


def printed_key(pack: Pack, arrays: Arrays, seed: int = SEED) -> PrintedKey:
    """The printed key of a region; the same tables give the same key.

    pack  compiled region; arrays: the counts behind it
    """
    rng = np.random.default_rng(seed)
    zone, plots = training_sites(pack, arrays, rng)
    found = plots.steps >= 0
    prices = plant_prices(pack)
    leads = leaders(pack, zone, plots)
    entered = entries_of(leads, plots, len(pack["zones"]))
    roots = {int(e): _Growing(np.flatnonzero(entered == e), 0) for e in np.unique(entered)}
    _grow(list(roots.values()), zone, found, prices, len(pack["zones"]))
    numbers = _number(roots)
    zones = len(pack["zones"])
    start = [
        Entry(
            e,
            tuple(np.flatnonzero(leads == e).tolist()) if e >= 0 else (),
            _target(root, zone, zones),
            len(root.rows) / len(zone),
        )
        for e, root in sorted(roots.items(), key=lambda one: (one[0] < 0, one[0]))
    ]
    couplets = [
        Couplet(node.number, node.best[1], *(_target(one, zone, zones) for one in node.branches))
        for node in numbers
        if node.best is not None
    ]
    return PrintedKey(
        tuple(start),
        tuple(couplets),
        make_card(pack, arrays),
        tuple(one["id"] for one in pack["zones"]),
        tuple(one["id"] for one in pack["plants"]),
    )


def training_sites(pack: Pack, arrays: Arrays, rng: np.random.Generator) -> tuple[Whole, Plots]:
    """Simulated sites of all zones, alike in number, as people write them down."""
    layer = [plant["layer"] for plant in pack["plants"]]
    field_ = simulate.Field(table_plots=float(np.median(arrays.plots)))
    zones, steps, cover = [], [], []
    mean = np.asarray(mean_cover_pct(arrays), float)
    filled = np.where(np.isnan(mean), 2.0, mean)
    for _ in range(WORLDS):
        truth = simulate.erring_truth(arrays.present / arrays.plots, filled, layer, field_, rng)
        zone = np.repeat(np.arange(len(pack["zones"])), SITES_PER_ZONE // WORLDS)
        drawn = simulate.observe(*simulate.draw(truth, zone, field_, rng), field_, rng)
        zones.append(zone)
        steps.append(drawn.steps)
        cover.append(drawn.cover)
    return np.concatenate(zones), Plots([], np.concatenate(steps), np.concatenate(cover))


def leaders(pack: Pack, zone: Whole, plots: Plots) -> Whole:
    """Zone each plant leads, -1 for none, [plant].

    A leader covers most on 0.3 % of the sites or more, and on six of ten of those the zone is its
    own. Weeds lead nothing.
    """
    weed = np.array([plant["weed"] != "none" for plant in pack["plants"]])
    cover = np.where(weed, 0.0, plots.cover)
    top = np.where(cover.max(axis=1) > 0, cover.argmax(axis=1), -1)
    counts = np.zeros((len(weed), len(pack["zones"])))
    np.add.at(counts, (top[top >= 0], zone[top >= 0]), 1.0)
    often = counts.sum(axis=1) >= LEADER_SHARE * len(zone)
    right = counts.max(axis=1) >= LEADER_RIGHT * np.maximum(counts.sum(axis=1), 1.0)
    return np.where(often & right, counts.argmax(axis=1), -1)


def entries_of(leads: Whole, plots: Plots, zones: int) -> Whole:
    """Line of the start table each site enters by, -1 for none of the leading plants."""
    member = (leads[:, None] == np.arange(zones)).astype(float)
    summed = plots.cover @ member
    return np.where(summed.max(axis=1) > 0, summed.argmax(axis=1), -1)


def plant_prices(pack: Pack) -> Floats:
    """What a plant costs in a couplet. [nats]"""
    made = []
    for plant in pack["plants"]:
        first, last = plant["months"] or (1, 12)
        months = last - first + 1 if last >= first else last + 13 - first
        price = PRICE_NATS["short_season"] if months <= SHORT_SEASON_MONTHS else 0.0
        price += 0.0 if plant["known_when_dry"] else PRICE_NATS["only_green"]
        price += PRICE_NATS["lookalike"] * len(plant["lookalikes"])
        price += PRICE_NATS["grass"] if plant["layer"] == "grass" else 0.0
        price += WEED_NATS if plant["weed"] != "none" else 0.0
        made.append(price)
    return np.array(made)


def _grow(roots: list[_Growing], zone: Whole, found: Mask, prices: Floats, zones: int) -> None:
    """Splits the leaf that gains most, again and again, until the couplets are used up."""
    open_leaves = list(roots)
    for leaf in open_leaves:
        leaf.best = _best_split(leaf, zone, found, prices, zones)
    for _ in range(MOST_COUPLETS):
        able = [leaf for leaf in open_leaves if leaf.best is not None]
        if not able:
            break
        leaf = max(able, key=lambda one: one.best[0] if one.best else 0.0)
        assert leaf.best is not None
        said = found[leaf.rows][:, list(leaf.best[1])].any(axis=1)
        leaf.branches = [
            _Growing(leaf.rows[said], leaf.depth + 1),
            _Growing(leaf.rows[~said], leaf.depth + 1),
        ]
        open_leaves.remove(leaf)
        for branch in leaf.branches:
            branch.best = _best_split(branch, zone, found, prices, zones)
            open_leaves.append(branch)
    for leaf in open_leaves:
        leaf.best = None


def _best_split(
    leaf: _Growing, zone: Whole, found: Mask, prices: Floats, zones: int
) -> tuple[float, tuple[int, ...]] | None:
    """The plants whose being found lowers doubt most, and by how much over all sites. [nats]"""
    if leaf.depth >= MOST_STEPS or len(leaf.rows) < 2 * SMALLEST_BRANCH * len(zone):
        return None
    here, truth = found[leaf.rows].astype(float), np.eye(zones)[zone[leaf.rows]]
    weight = len(leaf.rows) / len(zone)
    fewest = SMALLEST_BRANCH * len(zone)
    yes = here.T @ truth
    gain = weight * (_gain(yes, truth.sum(axis=0), fewest) - prices)
    chosen = [int(gain.argmax())]
    best = float(gain[chosen[0]])
    profile = yes / np.maximum(truth.sum(axis=0), 1.0)
    for _ in range(MOST_PLANTS - 1):
        any_of = here[:, chosen].max(axis=1)
        joined = np.maximum(here, any_of[:, None]).T @ truth
        cost = prices + prices[chosen].max() + SECOND_PLANT_NATS * len(chosen)
        gains = weight * (_gain(joined, truth.sum(axis=0), fewest) - cost)
        gains[chosen] = -np.inf
        gains[_alike(profile, chosen[0]) < LIKE_PROFILE] = -np.inf
        if gains.max() <= best:
            break
        best = float(gains.max())
        chosen.append(int(gains.argmax()))
    return (best, tuple(chosen)) if best > LEAST_GAIN_NATS else None


def _alike(profile: Floats, first: int) -> Floats:
    """Likeness of plants' profiles over zones to one plant's, as a cosine. [0..1]"""
    length = np.linalg.norm(profile, axis=1)
    return np.asarray(profile @ profile[first] / np.maximum(length * length[first], 1e-12))


def _gain(yes: Floats, total: Floats, fewest: float) -> Floats:
    """Fall in entropy of the zone from knowing the answer, [plant]. yes [plant, zone] sites"""
    no = total - yes
    sizes = yes.sum(axis=1), no.sum(axis=1)
    after = sum(size * _entropy(part) for size, part in zip(sizes, (yes, no), strict=True))
    gain = _entropy(total[None])[0] - after / total.sum()
    return np.where(np.minimum(*sizes) >= fewest, gain, -np.inf)


def _entropy(counts: Floats) -> Floats:
    share = counts / np.maximum(counts.sum(axis=1, keepdims=True), 1e-12)
    return np.asarray(-(share * np.log(np.maximum(share, 1e-300))).sum(axis=1))


def _number(roots: dict[int, _Growing]) -> list[_Growing]:
    """Numbers couplets in the order of the start table, level by level."""
    level = [root for _, root in sorted(roots.items(), key=lambda one: (one[0] < 0, one[0]))]
    numbered: list[_Growing] = []
    while level:
        following = []
        for node in level:
            if node.best is not None:
                node.number = len(numbered) + 1
                numbered.append(node)
                following += node.branches
        level = following
    return numbered


def _target(node: _Growing, zone: Whole, zones: int) -> int | Leaf:
    if node.best is not None:
        return node.number
    counts = np.bincount(zone[node.rows], minlength=zones) + 0.5 / zones
    order = np.argsort(-counts, kind="stable")
    share = counts / counts.sum()
    first, second = int(order[0]), int(order[1])
    return Leaf(first, float(share[first]), second, float(share[second]), len(node.rows))


def follow(key: PrintedKey, plots: Plots) -> tuple[list[Leaf], Whole]:
    """Where each site ends, and how many couplets it took."""
    leads = np.full(len(key.plant_ids), -1)
    for entry in key.start:
        leads[list(entry.plants)] = entry.zone if entry.zone >= 0 else -1
    entered = entries_of(leads, plots, len(key.zone_ids))
    by_zone = {entry.zone: entry for entry in key.start}
    couplets = {one.number: one for one in key.couplets}
    ends, steps = [], []
    for at, zone in enumerate(entered):
        entry = by_zone.get(int(zone)) or by_zone.get(-1) or key.start[-1]
        here, taken = entry.to, 0
        while isinstance(here, int):
            one = couplets[here]
            here = one.yes if (plots.steps[at, list(one.plants)] >= 0).any() else one.no
            taken += 1
        ends.append(here)
        steps.append(taken)
    return ends, np.array(steps)


def key_lines(key: PrintedKey, plant_names: dict[str, str], letters: dict[str, str]) -> list[str]:
    """The key as text: start table, couplets, leaves with their share and page letter.

    plant_names  by plant id; letters: by zone id, as on the page tabs
    """

    def plants(which: tuple[int, ...]) -> str:
        return ", ".join(plant_names[key.plant_ids[p]] for p in which)

    def end(to: int | Leaf) -> str:
        if isinstance(to, int):
            return f"go to {to}"
        first = key.zone_ids[to.zone]
        text = f"{letters[first]} {first} {100 * to.share:.0f} %"
        if to.names_two:
            second = key.zone_ids[to.other]
            text += f" or {letters[second]} {second} {100 * to.other_share:.0f} %: use the card"
        return text

    lines = ["Which of these groups covers most ground, all its plants together?"]
    for entry in key.start:
        who = plants(entry.plants) if entry.plants else "none of these"
        lines.append(f"{who}: {end(entry.to)}")
    for one in key.couplets:
        any_of = plants(one.plants).replace(", ", " or ")
        lines.append(f"{one.number}a {any_of} found: {end(one.yes)}")
        lines.append(f"{one.number}b not so: {end(one.no)}")
    return lines


def as_values(key: PrintedKey) -> dict[str, Any]:
    """The key with ids in place of indexes, for pages and files."""

    def end(to: int | Leaf) -> dict[str, Any]:
        if isinstance(to, int):
            return {"couplet": to}
        made: dict[str, Any] = {"zone_id": key.zone_ids[to.zone], "share": round(to.share, 4)}
        if to.names_two:
            made["other_zone_id"] = key.zone_ids[to.other]
            made["other_share"] = round(to.other_share, 4)
        return made

    def ids(which: tuple[int, ...]) -> list[str]:
        return [key.plant_ids[p] for p in which]

    return {
        "start": [
            {
                "zone_id": key.zone_ids[one.zone] if one.zone >= 0 else None,
                "plants": ids(one.plants),
                "to": end(one.to),
                "share": round(one.share, 4),
            }
            for one in key.start
        ],
        "couplets": [
            {
                "number": one.number,
                "plants": ids(one.plants),
                "yes": end(one.yes),
                "no": end(one.no),
            }
            for one in key.couplets
        ],
        "card": {
            "plants": ids(key.card.plants),
            "zones": list(key.zone_ids),
            "points_db": key.card.points_db.tolist(),
        },
    }
