"""docs/checks.md from the docstrings of the checks, and of what is refused while reading."""

from __future__ import annotations

import re

from builder.checks import CHECKS

_HEAD = """\
# Checks

Written by `beltbook docs` from the checks themselves; do not edit by hand.

`beltbook check keydata/REGION` tells every problem at once as
`file:line:column: what is wrong  [check]`, shows the line, and says what to do. Errors stop a
build; cautions are listed. A sample below sets one value of the start region (`beltbook start`):
file, path, value.
"""

WHILE_READING = {
    "readable": "A file is there, is UTF-8 text and is sound YAML or CSV: no anchors, tags, second "
    "documents, or tables in tables without end.",
    "encoding": "Text is UTF-8 with accents on their letters; a CSV of a spreadsheet may differ.",
    "double-key": "No name stands twice in a row, no column twice in a header.",
    "turned-value": "No plain word is one that YAML programs turn into something else.",
    "empty-value": "Something stands behind every colon and dash.",
    "csv-width": "Each line of a CSV has as many cells as the header.",
    "missing-field": "A row has the fields it must have.",
    "unknown-field": "A row has no fields that its table does not know.",
    "value-kind": "A value is of its kind: text, number, flag, list or named values.",
    "known-word": "A word of a closed list, or a class code, is one of the list.",
    "range": "A number lies inside its limits.",
    "id-form": "An id is lower case letters, digits and _, a letter first.",
    "text-length": "A short text is short enough.",
}


def checks_page() -> str:
    """The whole of docs/checks.md."""
    parts = [_HEAD, "## While reading\n", "| check | what must hold |", "|---|---|"]
    parts += [f"| `{name}` | {said} |" for name, said in WHILE_READING.items()]
    parts.append("\n## Over the tables\n")
    for check in CHECKS:
        sentence, _, rest = check.manual.partition("\n\n")
        shown = re.sub(r"\n {4,}", " ", rest).strip()
        parts.append(f"### {check.id}\n\n{' '.join(sentence.split())}\n\n```\n{shown}\n```\n")
    return "\n".join(parts).rstrip() + "\n"
