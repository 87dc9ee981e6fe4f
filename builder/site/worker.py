"""Writes the service worker's first line: the version and every file of it with its hash."""

from __future__ import annotations

import hashlib
import json
import re
from collections.abc import Mapping

HASH_DIGITS = 32  # 128 bits tell files apart; whole hashes made the list twice as large
NOT_INSTALLED = re.compile(
    r"sw\.js|field\.html"  # the worker itself; the edition without a server
    r"|regions/[^/]+/(?:booklet\.pdf|book/.*)"  # large, and the app shows the Book itself
)


def worker_script(source: str, files: Mapping[str, bytes]) -> str:
    """sw.js with its list.

    source  sw.js as written by hand, first line a placeholder
    files   the whole site, path → content
    """
    first, rest = source.split("\n", 1)
    if not first.startswith("const BUILD = "):
        raise ValueError("sw.js must start with the line the builder replaces: const BUILD = …")
    hashes = {
        path: hashlib.sha256(content).hexdigest()[:HASH_DIGITS]
        for path, content in sorted(files.items())
        if not NOT_INSTALLED.fullmatch(path)
    }
    # The worker's own text counts: a failed install may then never touch the cache in use.
    version = hashlib.sha256(json.dumps(hashes).encode() + rest.encode()).hexdigest()[:16]
    build = json.dumps({"version": version, "files": hashes}, separators=(",", ":"))
    return f"const BUILD = {build};\n{rest}"
