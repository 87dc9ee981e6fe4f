"""One region as the site takes it: pack, texts and Book pages from the same tables."""

from __future__ import annotations

import json
from collections.abc import Mapping
from dataclasses import dataclass, field

from builder.pack import pack_hash


@dataclass(frozen=True)
class SiteRegion:
    """One region, compiled and ready to be written.

    pack   bytes of pack.json
    texts  language → bytes of texts.<language>.json
    book   name → bytes of each Book page, e.g. "index.html"
    """

    pack: bytes
    texts: Mapping[str, bytes]
    book: Mapping[str, bytes] = field(default_factory=dict)

    @property
    def id(self) -> str:
        """The region's id, as in its pack."""
        return str(json.loads(self.pack)["region"]["id"])

    @property
    def hash(self) -> str:
        """What records name as pack_hash."""
        return pack_hash(self.pack)

    def files(self) -> dict[str, bytes]:
        """The region's files by path in the site."""
        folder = f"regions/{self.id}"
        files = {f"{folder}/pack.json": self.pack}
        files.update({f"{folder}/texts.{tag}.json": text for tag, text in self.texts.items()})
        files.update({f"{folder}/book/{name}": page for name, page in self.book.items()})
        return files
