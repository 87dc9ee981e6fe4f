"""Brings a region's tables in from a folder: records where they can be read, and every problem."""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import cached_property
from pathlib import Path
from typing import Any, NamedTuple

from builder.problems import Place, Problem, errors, in_order, nearest, problem_at
from builder.rows import Items, Node, Row, Sheet, Value, parse_yaml, read_csv, read_text
from builder.tables.climate import Month
from builder.tables.languages import Words
from builder.tables.occurrence import Occurrence, OccurrenceFile
from builder.tables.reading import Reader
from builder.tables.references import Reference, references
from builder.tables.region import RegionHead
from builder.tables.regions import CLIMATE_COLUMNS, YAML_TABLES, Region
from builder.tables.shape import Record


@dataclass
class Loaded:
    """A region as far as it could be read, and every problem met on the way.

    region   the whole region; None while anything in a table could not be read
    partial  what could be read, with empty tables for the rest, for the checks
    read     names of the tables that could be read
    """

    folder: Path
    shown: str
    region: Region | None
    problems: list[Problem]
    roots: dict[str, Row | None] = field(default_factory=dict, repr=False)
    climate_sheet: Sheet | None = field(default=None, repr=False)
    partial: Region | None = field(default=None, repr=False)
    read: frozenset[str] = frozenset()

    @cached_property
    def references(self) -> list[Reference]:
        """Every id that a table says of another one."""
        found: list[Reference] = []
        for name, made in YAML_TABLES.items():
            root = self.roots.get(name)
            if root is not None:
                found += references(made, root)
        for row in self.climate_sheet.rows if self.climate_sheet is not None else ():
            found += references(Month, row)
        for words in self.partial.words.values() if self.partial is not None else ():
            found += references(Words, words.row)
        return found

    def declared(self, table: str) -> set[str]:
        """Ids that stand in a table, read or not, so that one bad row brings no second problem."""
        return set(declared_ids(self.roots, table))


def declared_ids(roots: dict[str, Row | None], table: str) -> dict[str, Place]:
    """Ids of a table as written, with the first place of each."""
    found: dict[str, Place] = {}
    file = "region" if table == "disturbances" else "plants" if table == "groups" else table
    root = roots.get(file)
    node: Node | None = root.get(table) if root is not None else None
    if isinstance(node, Row):
        return {key: value.at for key, value in node.keys.items() if key != "source"}
    for row in node if isinstance(node, Items) else ():
        written = row.get("id") if isinstance(row, Row) else None
        if isinstance(written, Value) and isinstance(written.value, str):
            found.setdefault(written.value, written.at)
    return found


def load_region(folder: Path | str) -> Loaded:
    """Reads a region's folder: records where the tables allow it, and all problems."""
    folder = Path(folder)
    shown = str(folder)
    reader = Reader()
    roots: dict[str, Row | None] = {}
    files: dict[str, Any] = {}
    if not folder.is_dir():
        wrong = "this is not a folder" if folder.exists() else "there is no such folder"
        problem = problem_at(
            Place(shown, 1, 1), "readable", wrong, "A region is a folder of tables under keydata/."
        )
        return Loaded(folder, shown, None, [problem])
    for name, made in YAML_TABLES.items():
        roots[name], files[name], problems = _read_table(folder, f"{name}.yaml", made)
        reader.problems += problems
    path = folder / "climate.csv"
    sheet, problems = read_csv(path, str(path), folder)
    reader.problems += problems
    climate = _climate(sheet, reader) if sheet is not None else {}
    words = _languages(folder, reader)
    read = {name for name, record in files.items() if record is not None}
    partial = _assembled(files, climate, words, reader)
    if sheet is not None:
        read.add("climate")
    whole = len(read) == len(YAML_TABLES) + 1 and not errors(reader.problems)
    return Loaded(
        folder,
        shown,
        partial if whole else None,
        in_order(reader.problems),
        roots,
        sheet,
        partial,
        frozenset(read),
    )


def _assembled(
    files: dict[str, Any],
    climate: dict[str, tuple[Month, ...]],
    words: dict[str, Words],
    reader: Reader,
) -> Region:
    def of(table: str, name: str, empty: Any) -> Any:
        return empty if files[table] is None else getattr(files[table], name)

    occurrence = {}
    if files["occurrence"] is not None and files["region"] is not None:
        occurrence = _occurrences(files["occurrence"], files["region"], reader)
    return Region(
        head=files["region"],
        zones=of("zones", "zones", ()),
        plants=of("plants", "plants", ()),
        groups=of("plants", "groups", ()),
        occurrence=occurrence,
        questions=of("questions", "questions", ()),
        rules=of("questions", "rules", ()),
        production=of("production", "production", {}),
        soils=of("soils", "soils", {}),
        climate=climate,
        reclaim=files["reclaim"],
        mixes=of("seed", "mixes", {}),
        sources=of("sources", "sources", {}),
        words=words,
        files=files,
    )


def _climate(sheet: Sheet, reader: Reader) -> dict[str, tuple[Month, ...]]:
    missing = [name for name in CLIMATE_COLUMNS if name not in sheet.columns]
    if missing:
        reader.problems.append(
            problem_at(
                sheet.at,
                "missing-field",
                f"climate.csv has no column {', '.join(missing)}",
                "The columns are " + ",".join(CLIMATE_COLUMNS) + ".",
            )
        )
        return {}
    notes = Row(dict(sheet.notes), {}, sheet.at)
    months: dict[str, list[Month]] = {}
    for row in sheet.rows:
        row.parent = notes
        month = reader.record(Month, row, "climate.csv")
        if month is not None:
            months.setdefault(month.zone_id, []).append(month)
    return {zone: tuple(sorted(rows, key=lambda each: each.month)) for zone, rows in months.items()}


class _Read(NamedTuple):
    """A table as it was read from a text."""

    text: str
    root: Row | None
    record: Any
    problems: list[Problem]


# A file whose text has not changed is not read again: on the desk one save changes one table of
# eleven, and reading them all takes most of a second with 40 zones and 400 plants.
_READ: dict[str, _Read] = {}
_KEPT = 200


def _read_table(
    folder: Path, file: str, made: type[Record]
) -> tuple[Row | None, Any, list[Problem]]:
    path = folder / file
    shown = str(path)
    text, problems = read_text(path, shown, folder)
    if text is None:
        return None, None, problems
    kept = _READ.get(shown)
    if kept is None or kept.text != text:
        reader = Reader()
        root, found = parse_yaml(text, shown)
        record = reader.record(made, root, file) if root is not None else None
        kept = _Read(text, root, record, found + reader.problems)
        if len(_READ) >= _KEPT:
            _READ.clear()
        _READ[shown] = kept
    return kept.root, kept.record, problems + kept.problems


def _languages(folder: Path, reader: Reader) -> dict[str, Words]:
    found: dict[str, Words] = {}
    for path in sorted((folder / "words").glob("*.yaml")):
        _, words, problems = _read_table(folder, f"words/{path.name}", Words)
        reader.problems += problems
        if words is not None:
            found[path.stem] = words
    return found


def _occurrences(
    table: OccurrenceFile, head: RegionHead, reader: Reader
) -> dict[tuple[str, str], Occurrence]:
    """Percent pairs, or class codes turned into the middle of their class."""
    constancy = {each.code: (each.low_pct + each.high_pct) / 2 for each in head.constancy_classes}
    cover = {each.code: each.mid_pct for each in head.cover_scale.classes}
    found = {}
    for plant_id, zones in table.occurrence.items():
        for zone_id, pair in zones.items():
            path = ("occurrence", plant_id, zone_id)
            numbers = [
                _number(written, codes, table.place(*path, position), what, reader)
                for position, (written, codes, what) in enumerate(
                    zip(pair, (constancy, cover), ("constancy", "cover"), strict=True)
                )
            ]
            if numbers[0] is not None and numbers[1] is not None:
                found[zone_id, plant_id] = Occurrence(
                    zone_id, plant_id, numbers[0] / 100, numbers[1], table.place(*path)
                )
    return found


def _number(
    written: float | str, codes: dict[str, float], place: Place, what: str, reader: Reader
) -> float | None:
    if not isinstance(written, str):
        return written
    if written in codes:
        return codes[written]
    reader.problems.append(
        problem_at(
            place,
            "known-word",
            f'"{written}" is no {what} class of this region',
            nearest(written, codes),
        )
    )
    return None
