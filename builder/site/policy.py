"""The content security policy of each page: own files only, no inline script, no other host."""

from __future__ import annotations

import base64
import hashlib
from collections.abc import Iterable

# Drawings carry positions in style attributes; style sheets stay files.
BASE = {
    "default-src": "'none'",
    "script-src": "'self'",
    "style-src": "'self'",
    "style-src-attr": "'unsafe-inline'",
    "img-src": "'self' data: blob:",
    "font-src": "'self'",
    "connect-src": "'self'",
    "manifest-src": "'self'",
    "worker-src": "'self'",
    "base-uri": "'none'",
    "form-action": "'none'",
    "require-trusted-types-for": "'script'",
    "trusted-types": "beltbook",
}


def app_policy() -> str:
    """For index.html and the Book pages, which lie beside their files."""
    return _text(BASE)


def single_file_policy(scripts: Iterable[str], styles: Iterable[str]) -> str:
    """For field.html: what is written inside is allowed by its hash, and modules as `data:`.

    scripts, styles  the text of each inline script and style element
    """
    allowed = {
        **BASE,
        "script-src": " ".join([*sorted(map(hash_source, scripts)), "data:"]),
        "style-src": " ".join(sorted(map(hash_source, styles))),
        "img-src": "data: blob:",
        "font-src": "data:",
        "connect-src": "'none'",
        "manifest-src": "'none'",
        "worker-src": "'none'",
    }
    return _text(allowed)


def hash_source(text: str) -> str:
    """An inline element's text as a policy source."""
    digest = hashlib.sha256(text.encode()).digest()
    return f"'sha256-{base64.b64encode(digest).decode()}'"


def _text(rules: dict[str, str]) -> str:
    return "; ".join(f"{name} {sources}" for name, sources in rules.items())
