"""docs/sources.md from the sources of the regions and of the formulas."""

from __future__ import annotations

import importlib
import inspect
import pkgutil
from collections.abc import Iterable, Iterator

import builder.formulas
from builder.formulas.sources import SOURCES
from builder.tables.regions import Region

_HEAD = """\
# Sources

Written by `beltbook docs`; do not edit by hand. What each figure and formula rests on, and how much
of it was read: a source known only from memory says so, and a fact of the trade without a source is
called common practice. Every check value stands in `tests/goldens/` with its source key.
"""


def formula_names() -> Iterator[tuple[str, str]]:
    """("file.function", first words after "Source:") of every public formula."""
    for info in pkgutil.iter_modules(builder.formulas.__path__):
        module = importlib.import_module(f"builder.formulas.{info.name}")
        for name, function in inspect.getmembers(module, inspect.isfunction):
            if function.__module__ != module.__name__ or name.startswith("_"):
                continue
            said = (inspect.getdoc(function) or "").partition("Source:")[2]
            yield f"{info.name}.{name}", said.partition("; golden")[0].replace("\n", " ")


def sources_page(regions: Iterable[Region]) -> str:
    """The whole of docs/sources.md."""
    rests: dict[str, list[str]] = {key: [] for key in SOURCES}
    for name, said in formula_names():
        for key in said.split(","):
            word = key.split("(")[0].strip()
            if word in rests:
                rests[word].append(f"`{name}`")
    parts = [_HEAD, "## Formulas\n"]
    for key, (text, read) in SOURCES.items():
        used = f" Behind {', '.join(rests[key])}." if rests[key] else ""
        parts.append(f"- **{key}**: {text} ({read}).{used}")
    for region in regions:
        parts.append(f"\n## {region.name}\n")
        for key, source in region.sources.items():
            note = f" {source.note}" if source.note else ""
            parts.append(f"- **{key}**: {source.text} ({source.read}).{note}")
    return "\n".join(parts).rstrip() + "\n"
