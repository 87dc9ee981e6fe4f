"""Every figure says where it comes from: by its row, its block or its file.

Passes: zones.yaml source: demo
Fails: zones.yaml source: (left out)
"""

from __future__ import annotations

from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.rows import Items, Node, Row, Value
from builder.tables import Loaded

ID = "provenance"
NEEDS = ()


def check(loaded: Loaded) -> Iterator[Problem]:
    """The first figure of each row that no source covers."""
    for name, root in loaded.roots.items():
        if root is not None and name != "sources":
            yield from _uncovered(root, False, frozenset())
    sheet = loaded.climate_sheet
    if sheet is not None and "source" not in sheet.notes:
        yield problem_at(
            sheet.at,
            ID,
            "the figures of climate.csv have no source",
            'Write "# source: demo" above the header.',
        )


def _uncovered(node: Node, covered: bool, names: frozenset[str]) -> Iterator[Problem]:
    """Walks down with what is known of sources above; one problem a row is enough."""
    if isinstance(node, Row):
        stated = node.get("source")
        if isinstance(stated, Value):
            covered = True
        elif isinstance(stated, Row):
            covered = covered or "rest" in stated
            names = names | frozenset(stated.nodes)
        told = False
        for name, below in node.items():
            if name == "source":
                continue
            known = covered or name in names
            if _is_figure(below) or (isinstance(below, Items) and any(map(_is_figure, below))):
                if not known and not told:
                    told = True
                    yield problem_at(
                        below.at,
                        ID,
                        f'the figure under "{name}" has no source',
                        "Add source: demo, common practice or published KEY to the "
                        "row, the block or the file.",
                    )
            else:
                yield from _uncovered(below, known, names)
    elif isinstance(node, Items):
        for below in node:
            yield from _uncovered(below, covered, names)


def _is_figure(node: Node) -> bool:
    return (
        isinstance(node, Value)
        and isinstance(node.value, int | float)
        and not isinstance(node.value, bool)
    )
