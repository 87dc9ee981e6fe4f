"""A made-up region of any size, for measures: a region's own tables, copied and dealt anew.

Copies of a plant keep its traits but get their own constancies, and their sentences are the same
words in another order, so that neither shrinks as a repeat when compressed. Letters for zones end
at 25; beyond that they repeat, which the check of letters says.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from pathlib import Path
from typing import Any

import numpy as np

from builder.rows import block_text, flow_text, read_shipped, scalar_text
from builder.tables.regions import YAML_TABLES

ZONAL, AZONAL = "ABCDEFGHJKLMNOPQRSTUV", "WXYZ"
TEXTS = ("marks", "lookalike_tell", "note", "one_line", "why_here")
RISE_M = 30
Table = dict[str, Any]


def synthetic_region(source: Path, out: Path, zones: int, plants: int, seed: int = 0) -> Path:
    """Writes a region of so many zones and plants, made from another's tables. Returns `out`.

    source         folder of a region; its own zones and plants come first
    zones, plants  how many; ValueError for fewer than the source has
    """
    tables = {name: read_shipped(source / f"{name}.yaml") for name in YAML_TABLES}
    rng = np.random.default_rng(seed)
    base_zones, base_plants = tables["zones"]["zones"], tables["plants"]["plants"]
    if zones < len(base_zones) or plants < len(base_plants):
        raise ValueError(f"{source.name} has {len(base_zones)} zones, {len(base_plants)} plants")
    zone_names = _names([one["id"] for one in base_zones], zones)
    plant_names = _names([one["id"] for one in base_plants], plants)
    tables["zones"]["zones"] = _zones(base_zones, zone_names, rng)
    tables["plants"]["plants"] = _plants(base_plants, plant_names, rng)
    _more_members(tables["plants"].get("groups", []), plant_names)
    occurrence = _occurrence(tables["occurrence"]["occurrence"], zone_names, plant_names, rng)
    tables["occurrence"]["occurrence"] = occurrence
    _more_odds(tables["questions"], zone_names, rng)
    for name, below in (
        ("production", "production"),
        ("soils", "soils"),
        ("reclaim", "zones"),
        ("seed", "mixes"),
    ):
        table = tables[name][below]
        tables[name][below] = {new: table[old] for new, old, _ in zone_names if old in table}
    tables["region"] |= {"id": out.name, "name": f"Made up, {zones} by {plants}"}
    tables["region"]["languages"] = ["en"]
    low, high = tables["region"]["elevation_m"]
    tables["region"]["elevation_m"] = [low, high + RISE_M * zone_names[-1][2]]
    out.mkdir(parents=True)
    for name, table in tables.items():
        text = _occurrence_text(table) if name == "occurrence" else "\n".join(block_text(table))
        (out / f"{name}.yaml").write_text(text + "\n", encoding="utf-8")
    climate = (source / "climate.csv").read_text(encoding="utf-8")
    (out / "climate.csv").write_text(_climate(climate, zone_names), encoding="utf-8")
    return out


def _names(ids: list[str], wanted: int) -> list[tuple[str, str, int]]:
    """(new id, id it is copied from, which copy), the originals first."""
    made = []
    for at in range(wanted):
        copy, old = divmod(at, len(ids))
        made.append((ids[old] if copy == 0 else f"{ids[old]}_{copy + 1}", ids[old], copy))
    return made


def _dealt(text: str, rng: np.random.Generator) -> str:
    """The same words in another order."""
    words = text.replace(",", "").replace(";", "").split()
    return " ".join(words[at] for at in rng.permutation(len(words)))


def _reworded(row: Table, rng: np.random.Generator) -> Table:
    return {
        name: _dealt(value, rng) if name in TEXTS and isinstance(value, str) else value
        for name, value in row.items()
    }


def _zones(
    rows: list[Table], names: list[tuple[str, str, int]], rng: np.random.Generator
) -> list[Table]:
    old = {row["id"]: row for row in rows}
    there = {new for new, _, _ in names}
    made = []
    for new, source, copy in names:
        row = _reworded(old[source], rng) if copy else dict(old[source])
        row["id"] = new
        if copy:
            suffix = f" {copy + 1}"
            row["short"] = row["short"][: 20 - len(suffix)] + suffix
            row["name"] += suffix
            rise = RISE_M * copy
            row["band_m"] = [height + rise for height in row["band_m"]]
            row["centre_m"] += rise
            own = {one: f"{one}_{copy + 1}" for one in old}
            row["neighbours"] = [own[one] if own[one] in there else one
                                 for one in row["neighbours"]]  # fmt: skip
        made.append(row)
    made.sort(key=lambda row: (row["kind"] == "azonal", row["centre_m"]))
    counted = {"zonal": 0, "azonal": 0}
    for row in made:
        letters = ZONAL if row["kind"] == "zonal" else AZONAL
        row["letter"] = letters[counted[row["kind"]] % len(letters)]
        counted[row["kind"]] += 1
    _mutual(made)
    return made


def _mutual(rows: list[Table]) -> None:
    """Neighbours name each other."""
    known = {row["id"]: row for row in rows}
    for row in rows:
        for other in row["neighbours"]:
            back = known[other]["neighbours"]
            if row["id"] not in back:
                known[other]["neighbours"] = [*back, row["id"]]


def _plants(
    rows: list[Table], names: list[tuple[str, str, int]], rng: np.random.Generator
) -> list[Table]:
    old = {row["id"]: row for row in rows}
    made = []
    for new, source, copy in names:
        row = dict(old[source])
        if copy:
            row = _reworded(row, rng)
            for name in ("codes", "synonyms", "local"):
                row.pop(name, None)
            genus = row["scientific"].split()[0]
            row |= {"id": new, "scientific": f"{genus} {_word(rng)}"}
            row["common"] = f"{_word(rng)} {row['common']}"
        made.append(row)
    return made


def _word(rng: np.random.Generator) -> str:
    """A made-up word of four syllables."""
    return "".join(rng.choice(list("bdfglmnprstv")) + rng.choice(list("aeiou")) for _ in range(4))


def _more_members(groups: Iterable[Table], names: list[tuple[str, str, int]]) -> None:
    for group in groups:
        own = set(group["members"])
        group["members"] = [new for new, source, _ in names if source in own]


def _occurrence(
    table: Table,
    zones: list[tuple[str, str, int]],
    plants: list[tuple[str, str, int]],
    rng: np.random.Generator,
) -> Table:
    """Each copy stands in other zones than its pattern, as often and as much, give or take."""
    ids = list(dict.fromkeys(source for _, source, _ in zones))
    made: Table = {}
    for new, source, copy in plants:
        row: Table = {}
        for zone, zone_source, zone_copy in zones:
            at = (ids.index(zone_source) + 3 * copy) % len(ids)
            found = table.get(source, {}).get(ids[at])
            if found is None:
                continue
            if copy or zone_copy:
                share, cover = found
                share = int(np.clip(round(share * rng.uniform(0.6, 1.2)), 1, 100))
                cover = float(np.clip(cover * rng.lognormal(0, 0.4), 0.1, 95))
                cover = round(cover) if cover >= 1 else round(cover, 1)
                found = [share, cover]
            row[zone] = found
        if row:
            made[new] = row
    return made


def _odds(value: Any) -> Iterator[Table]:
    """Every table of log odds by zone below a value."""
    if isinstance(value, dict):
        for name, below in value.items():
            if name == "zone_log_odds":
                yield below
            else:
                yield from _odds(below)
    elif isinstance(value, list):
        for below in value:
            yield from _odds(below)


def _more_odds(table: Table, zones: list[tuple[str, str, int]], rng: np.random.Generator) -> None:
    for odds in _odds(table):
        for new, source, copy in zones:
            if copy and source in odds:
                odds[new] = round(float(odds[source] * rng.uniform(0.7, 1.2)), 2)


def _occurrence_text(table: Table) -> str:
    lines = [f"source: {flow_text(table['source'])}", "occurrence:"]
    rows = table["occurrence"].items()
    lines += [f"  {scalar_text(plant)}: {flow_text(row)}" for plant, row in rows]
    return "\n".join(lines)


def _climate(text: str, zones: list[tuple[str, str, int]]) -> str:
    lines = text.splitlines()
    at = next(n for n, line in enumerate(lines) if line.startswith("zone_id"))
    by_zone: dict[str, list[str]] = {}
    for line in lines[at + 1 :]:
        zone, _, rest = line.partition(",")
        by_zone.setdefault(zone, []).append(rest)
    made = [f"{new},{rest}" for new, source, _ in zones for rest in by_zone.get(source, [])]
    return "\n".join([*lines[: at + 1], *made]) + "\n"
