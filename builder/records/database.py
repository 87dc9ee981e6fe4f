"""The tables of the store, and how a database is opened: SQLite, or PostgreSQL by its URL.

Figures that lists, searches and maps need stand beside the record; the record itself is JSON in a
table of its own, so that a list reads little.
"""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from typing import Any

from sqlalchemy import (
    Boolean,
    Column,
    Connection,
    Engine,
    Float,
    Index,
    Integer,
    LargeBinary,
    MetaData,
    String,
    Table,
    Text,
    create_engine,
    event,
    insert,
    inspect,
    select,
    text,
)
from sqlalchemy.exc import ArgumentError

from builder.records.sentences import read_sentences

VERSION = 1
WAIT_S = 10
LOCK = 815_001  # any number of our own: one writer at a time, as SQLite has it

META = MetaData()
ABOUT = Table("about", META, Column("version", Integer, primary_key=True))
SITES = Table(
    "sites",
    META,
    Column("id", String(64), primary_key=True),
    Column("revision", Integer, nullable=False),
    Column("region_id", String(64), nullable=False),
    Column("edition", String(40), nullable=False),
    Column("unit_id", String(64)),
    Column("unit_name", String(200), nullable=False),
    Column("name", String(200), nullable=False),
    Column("observer", String(200), nullable=False),
    Column("role", String(16), nullable=False),
    Column("date", String(10), nullable=False),
    Column("verdict", String(16)),
    Column("zone_id", String(64)),
    Column("belief", Float),
    Column("cell_x", Integer),  # of the map's finest grid; nothing without a position
    Column("cell_y", Integer),
    Column("doubtful", Boolean, nullable=False),
    Column("overruled", Boolean, nullable=False),
    Column("conflicted", Boolean, nullable=False),
    Column("open", Boolean, nullable=False),  # wants a look, and nobody has decided yet
    Column("sides", Integer, nullable=False),  # versions kept beside it
    Column("words", Text, nullable=False),  # what search looks through, in small letters
    Column("received_at", String(32), nullable=False),
)
Index("sites_by_day", SITES.c.region_id, SITES.c.date, SITES.c.id)
Index("sites_to_review", SITES.c.region_id, SITES.c.open, SITES.c.date, SITES.c.id)
Index("sites_by_zone", SITES.c.region_id, SITES.c.zone_id, SITES.c.date, SITES.c.id)
Index("sites_by_unit", SITES.c.unit_id)
Index("sites_by_sides", SITES.c.region_id, SITES.c.sides)
# A search reads this index alone, in the order of the list. Other databases hold no text that long.
Index(
    "sites_searched",
    *(SITES.c[name] for name in ("region_id", "date", "id", "words", "cell_x", "cell_y", "open")),
).ddl_if(dialect="sqlite")
Index("sites_on_map", SITES.c.region_id, SITES.c.cell_x, SITES.c.cell_y)
Index("sites_by_row", SITES.c.region_id, SITES.c.cell_y)
BODIES = Table(
    "bodies",
    META,
    Column("id", String(64), primary_key=True),
    Column("body", Text, nullable=False),
)
SIDES = Table(
    "sides",
    META,
    Column("mark", String(64), primary_key=True),
    Column("site_id", String(64), nullable=False, index=True),
    Column("body", Text, nullable=False),
    Column("received_at", String(32), nullable=False),
)
UNITS = Table(
    "units",
    META,
    Column("id", String(64), primary_key=True),
    Column("body", Text, nullable=False),
)
PHOTOS = Table(
    "photos",
    META,
    Column("id", String(64), primary_key=True),
    Column("site_id", String(64), nullable=False, index=True),
    Column("said", Text, nullable=False),
    Column("bytes", LargeBinary, nullable=False),
)
DECISIONS = Table(
    "decisions",
    META,
    Column("number", Integer, primary_key=True),
    Column("site_id", String(64), nullable=False, index=True),
    Column("revision", Integer, nullable=False),
    Column("kind", String(16), nullable=False),
    Column("zone_id", String(64)),
    Column("person", String(200), nullable=False),
    Column("reason", Text, nullable=False),
    Column("at", String(32), nullable=False),
)
DEVICES = Table(
    "devices",
    META,
    Column("id", String(16), primary_key=True),
    Column("name", String(200), nullable=False),
    Column("key_hash", String(64), nullable=False),
    Column("made_at", String(32), nullable=False),
    Column("seen_at", String(32)),
    Column("revoked_at", String(32)),
)


class StoreRefused(Exception):  # noqa: N818 - told to the person
    """The store cannot be opened or used as asked; the text says why."""


class Database:
    """One database, its tables made when they are not there.

    Raises StoreRefused when there is no such kind of database, no driver for it, or when another
    version of the program wrote it.
    """

    def __init__(self, url: str) -> None:
        try:
            self.engine = _engine(url)
        except (ArgumentError, ImportError) as fault:
            raise StoreRefused(read_sentences()["store"]["no_such"]) from fault
        self._prepare()

    def _prepare(self) -> None:
        with self.writing() as to:
            if inspect(to).has_table(ABOUT.name):
                version = to.scalar(select(ABOUT.c.version))
                if version != VERSION:
                    words = read_sentences()["store"]["newer"]
                    raise StoreRefused(words.format(version=version))
                return
            META.create_all(to)
            to.execute(insert(ABOUT), {"version": VERSION})

    @contextmanager
    def reading(self) -> Iterator[Connection]:
        """One consistent look."""
        with self.engine.connect() as found:
            yield found

    @contextmanager
    def writing(self) -> Iterator[Connection]:
        """One transaction, whole or not at all; another writer waits."""
        with self.engine.execution_options(writes=True).begin() as to:
            if to.dialect.name == "postgresql":
                to.execute(text(f"SELECT pg_advisory_xact_lock({LOCK})"))
            yield to

    def close(self) -> None:
        """Lets go of every connection."""
        self.engine.dispose()


def _engine(url: str) -> Engine:
    if not url.startswith("sqlite"):
        return create_engine(url, pool_pre_ping=True)
    engine = create_engine(url, connect_args={"timeout": WAIT_S})

    # The driver would begin a transaction late, at the first change: two writers that had both
    # read before would then refuse each other.
    @event.listens_for(engine, "connect")
    def _on_connect(connection: Any, _record: Any) -> None:
        connection.isolation_level = None
        for line in ("journal_mode = WAL", "synchronous = FULL", "mmap_size = 268435456"):
            connection.execute(f"PRAGMA {line}")

    @event.listens_for(engine, "begin")
    def _on_begin(connection: Connection) -> None:
        writes = connection.get_execution_options().get("writes")
        connection.exec_driver_sql("BEGIN IMMEDIATE" if writes else "BEGIN")

    return engine
