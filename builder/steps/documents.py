"""The pages of docs/ that are written from the program and the tables."""

from __future__ import annotations

import json
from pathlib import Path

from builder.checks.manual import checks_page
from builder.records.schema import site_check_schema
from builder.steps.checking import check_regions
from builder.steps.notes import regions_in
from builder.tables.manual import tables_page
from builder.tables.schemas import json_schemas
from builder.tables.sources_manual import sources_page


def write_docs(keydata: Path, docs: Path) -> list[Path]:
    """Writes the generated pages anew. Raises Stopped when a region has errors."""
    checked = check_regions(regions_in(keydata))
    pages = {
        "tables.md": tables_page(),
        "checks.md": checks_page(),
        "sources.md": sources_page([one.region for one in checked if one.region is not None]),
    }
    for name, schema in {**json_schemas(), "site_check": site_check_schema()}.items():
        pages[f"schemas/{name}.json"] = json.dumps(schema, indent=1, ensure_ascii=False) + "\n"
    written = []
    for name, text in pages.items():
        path = docs / name
        if not path.is_file() or path.read_text(encoding="utf-8") != text:
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_text(text, encoding="utf-8", newline="\n")
            written.append(path)
    return written
