"""One region made ready for the site: pack, texts and Book pages from the same tables."""

from __future__ import annotations

import hashlib
import json
from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any

from builder.pack import pack_bytes, texts_bytes
from builder.site.book import book_pages
from builder.tables import Region


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
        return hashlib.sha256(self.pack).hexdigest()[:16]

    def files(self) -> dict[str, bytes]:
        """The region's files by path in the site."""
        folder = f"regions/{self.id}"
        files = {f"{folder}/pack.json": self.pack}
        files.update({f"{folder}/texts.{tag}.json": text for tag, text in self.texts.items()})
        files.update({f"{folder}/book/{name}": page for name, page in self.book.items()})
        return files


def site_region(
    region: Region, fitted: Any = None, proof: dict[str, Any] | None = None
) -> SiteRegion:
    """A region's tables as the files of its folder in the site.

    fitted, proof  as builder.pack takes them: what known plots put in place of the tables' counts
    """
    return SiteRegion(
        pack=pack_bytes(region, fitted, proof),
        texts={tag: texts_bytes(region, tag) for tag in region.head.languages},
        book=book_pages(region),
    )
