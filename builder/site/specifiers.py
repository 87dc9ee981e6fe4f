"""Turns the names of libraries in import lines into relative paths.

A strict policy (`script-src 'self'`) blocks an import map; paths need none.
"""

from __future__ import annotations

import posixpath
import re
from collections.abc import Callable, Mapping

IMPORT = re.compile(r"""(\bfrom\s*|\bimport\s*\(\s*|\bimport\s*)(["'])([^"'\n]+)\2""")


def relative_imports(text: str, path: str, libraries: Mapping[str, str]) -> str:
    """The script with every library named by its path.

    path       where the script lies in the site, e.g. "app/js/main.js"
    libraries  name → path in the site, e.g. "preact" → "app/vendor/preact.js"

    Raises KeyError for a library that is not vendored.
    """
    here = posixpath.dirname(path)

    def target(name: str) -> str:
        if name.startswith("."):
            return name
        found = posixpath.relpath(libraries[name], here)
        return found if found.startswith(".") else f"./{found}"

    return _renamed(text, target)


def named_imports(text: str, path: str) -> str:
    """The script with every relative import named by its path in the site.

    For scripts that lie in `data:` addresses, from which no relative path leads anywhere.
    """
    here = posixpath.dirname(path)
    return _renamed(text, lambda name: posixpath.normpath(posixpath.join(here, name)))


def imports_of(text: str) -> list[str]:
    """What a script imports, in order, as written."""
    return [found[3] for found in IMPORT.finditer(text)]


def _renamed(text: str, target: Callable[[str], str]) -> str:
    return IMPORT.sub(lambda found: f"{found[1]}{found[2]}{target(found[3])}{found[2]}", text)
