"""Lists, searches and the map of stored records; each answer takes a few indexed reads."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from sqlalchemy import Boolean, ColumnElement, Select, UnaryExpression, and_, func, literal, select
from sqlalchemy.ext.compiler import compiles
from sqlalchemy.sql.functions import FunctionElement

from builder.records.database import SITES, Database
from builder.records.store import CELLS_PER_DEGREE

PER_PAGE = 50
ACROSS = 48
"""Cells of the map from west to east, at most; as many from south to north."""

SHOWN = ("open", "sides")


class holds(FunctionElement[bool]):  # noqa: N801 - stands in queries like a function
    """Whether the first text holds the second, letter for letter; much faster than LIKE."""

    type = Boolean()
    inherit_cache = True


@compiles(holds)
def _holds(element: Any, compiler: Any, **more: Any) -> str:
    return f"instr({compiler.process(element.clauses, **more)}) > 0"


@compiles(holds, "postgresql")
def _holds_postgresql(element: Any, compiler: Any, **more: Any) -> str:
    return f"strpos({compiler.process(element.clauses, **more)}) > 0"


@dataclass(frozen=True)
class Wanted:
    """Which records.

    words   each must stand in the name, unit, observer, notes, day, id or plants found
    only    "" for all, or one of SHOWN: open is the review queue, sides two versions
    cell    (column, row, cells of the finest grid a side) of the map
    """

    region_id: str
    words: str = ""
    only: str = ""
    zone_id: str = ""
    cell: tuple[int, int, int] | None = None


@dataclass(frozen=True)
class Found:
    """One page of records, newest day first, and how many there are in all."""

    rows: list[Any]
    total: int


@dataclass(frozen=True)
class Cells:
    """Records on the map, in cells of the finest grid times `step`.

    counts  (column, row) → records, columns from 180 degrees west, rows from the south pole
    """

    step: int
    counts: dict[tuple[int, int], int]


def conditions(wanted: Wanted) -> ColumnElement[bool]:
    """The conditions as one."""
    parts: list[ColumnElement[bool]] = [SITES.c.region_id == wanted.region_id]
    for word in wanted.words.lower().split()[:8]:
        parts.append(holds(SITES.c.words, literal(word)))
    if wanted.only == "sides":
        parts.append(SITES.c.sides > 0)
    elif wanted.only == "open":
        parts.append(SITES.c.open.is_(True))
    if wanted.zone_id:
        parts.append(SITES.c.zone_id == wanted.zone_id)
    if wanted.cell is not None:
        column, row, step = wanted.cell
        parts.append(SITES.c.cell_x.between(column * step, column * step + step - 1))
        parts.append(SITES.c.cell_y.between(row * step, row * step + step - 1))
    return and_(*parts)


def find(database: Database, wanted: Wanted, page: int = 0) -> Found:
    """One page of the records that are wanted. page: from 0"""
    where = conditions(wanted)
    day, name = SITES.c.date.desc(), SITES.c.id.desc()
    ids = select(SITES.c.id).where(where).order_by(day, name)
    ids = ids.limit(PER_PAGE).offset(page * PER_PAGE)
    with database.reading() as found:
        shown = found.scalars(ids).all()
        rows = found.execute(select(SITES).where(SITES.c.id.in_(shown)).order_by(day, name)).all()
        total = page * PER_PAGE + len(rows)
        if len(rows) == PER_PAGE or (page and not rows):
            total = found.scalar(select(func.count()).select_from(SITES).where(where)) or 0
    return Found(list(rows), total)


def cells(database: Database, wanted: Wanted) -> Cells:
    """How many of the wanted records lie in each cell of a map that holds the whole region."""
    where = and_(conditions(wanted), SITES.c.cell_x.is_not(None))
    x, y = SITES.c.cell_x, SITES.c.cell_y
    ends = [_end(wanted.region_id, column) for column in (x, x.desc(), y, y.desc())]
    with database.reading() as found:
        reach = [found.scalar(one) for one in ends]
        if reach[0] is None:
            return Cells(1, {})
        spans = (reach[1] - reach[0], reach[3] - reach[2])
        step = max(1, -(-(max(spans) + 1) // ACROSS))
        placed = select((x // step).label("column"), (y // step).label("row")).where(where)
        inside = placed.subquery()
        column, row = inside.c.column, inside.c.row
        grouped = select(column, row, func.count()).group_by(column, row)
        counts = {(int(one[0]), int(one[1])): one[2] for one in found.execute(grouped)}
    return Cells(step, counts)


def _end(region_id: str, order: Any) -> Select[Any]:
    """The first of a region's cells in an order: one step into an index."""
    ours = and_(SITES.c.region_id == region_id, SITES.c.cell_x.is_not(None))
    column = order.element if isinstance(order, UnaryExpression) else order
    return select(column).where(ours, column.is_not(None)).order_by(order).limit(1)


def degrees(cell: tuple[float, float], step: int) -> tuple[float, float]:
    """(longitude, latitude) of a place on the grid, in cells of `step`. [degrees]"""
    return cell[0] * step / CELLS_PER_DEGREE - 180, cell[1] * step / CELLS_PER_DEGREE - 90
