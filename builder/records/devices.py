"""Keys of phones that hand records in. A key is shown once; what is kept is its hash.

A key holds 256 random bits, so a plain SHA-256 is enough: there is nothing to guess from.
"""

from __future__ import annotations

import hashlib
import hmac
import secrets
from dataclasses import dataclass

from sqlalchemy import insert, select, update

from builder.records.database import DEVICES, Database
from builder.records.store import now
from builder.records.values import ID, fits, text

NO_HASH = hashlib.sha256(b"no device").hexdigest()


@dataclass(frozen=True)
class Device:
    """A phone that may hand in records, or once might."""

    id: str
    name: str
    made_at: str
    seen_at: str | None
    revoked_at: str | None


def make_device(database: Database, name: str) -> str:
    """Lets a phone in; returns its key, which nothing keeps."""
    device_id, secret = secrets.token_hex(4), secrets.token_urlsafe(32)
    with database.writing() as to:
        to.execute(
            insert(DEVICES),
            {
                "id": device_id,
                "name": text(name.strip(), 200),
                "key_hash": _hash(secret),
                "made_at": now(),
            },
        )
    return f"{device_id}.{secret}"


def devices(database: Database) -> list[Device]:
    """Every phone, the newest first."""
    columns = (getattr(DEVICES.c, name) for name in Device.__dataclass_fields__)
    with database.reading() as found:
        rows = found.execute(select(*columns).order_by(DEVICES.c.made_at.desc(), DEVICES.c.id))
        return [Device(*row) for row in rows]


def revoke(database: Database, device_id: str) -> bool:
    """Shuts a phone out for good; False when there is no such phone or it already is."""
    still = (DEVICES.c.id == device_id) & DEVICES.c.revoked_at.is_(None)
    with database.writing() as to:
        return to.execute(update(DEVICES).where(still).values(revoked_at=now())).rowcount == 1


def device_of(database: Database, key: str) -> str | None:
    """The id of the phone a key belongs to; None for any other key. Takes the same time."""
    device_id, _, secret = key.partition(".")
    device_id = device_id if fits(device_id, ID) else ""
    with database.reading() as found:
        row = found.execute(select(DEVICES).where(DEVICES.c.id == device_id)).one_or_none()
    kept = row.key_hash if row is not None else NO_HASH
    right = hmac.compare_digest(kept, _hash(secret))
    return device_id if right and row is not None and row.revoked_at is None else None


def seen(database: Database, device_id: str) -> None:
    """Notes that a phone handed something in."""
    with database.writing() as to:
        to.execute(update(DEVICES).where(DEVICES.c.id == device_id).values(seen_at=now()))


def _hash(secret: str) -> str:
    return hashlib.sha256(secret.encode("utf-8", "surrogatepass")).hexdigest()
