"""A run as people read it: one table for the terminal, one page for docs/."""

from __future__ import annotations

import json
import textwrap
from pathlib import Path
from typing import Any

from builder.bench.machine import machine_line

HEADS = ("measure", "goal", "median", "spread", "reference", "ratio", "")
SOURCE, PAGE = "performance.json", "performance.md"
WIDTH = 100
SHORT = (
    "Shortened run (--quick): it shows that everything runs; its figures are not for comparison."
)
INTRO = """# Performance

<!-- Written by `beltbook docs` from performance.json. Do not edit. -->

What `beltbook bench` measured. Each line stands beside its goal and, where there is one, beside
another program that did the same work in the same run; the ratio is our figure by its figure.
The spread is the least and the most of the runs. A line that was not measured says why.
"""


def number(value: float) -> str:
    """Three figures that count, without a power of ten."""
    if value == 0 or abs(value) >= 100:
        return f"{value:,.0f}"
    text = f"{value:.3g}"
    return f"{float(text):f}".rstrip("0").rstrip(".") if "e" in text else text


def cells(line: dict[str, Any]) -> tuple[str, ...]:
    """One line of a run as cells, in the order of HEADS."""
    if line["why_not"] is not None:
        return (line["what"], _goal(line), "not measured", "", "", "", "")
    middle = f"{number(line['median'])} {line['unit']}"
    many = len(line["values"])
    spread = (
        f"{number(line['low'])} to {number(line['high'])}, {many} runs" if many > 1 else "1 run"
    )
    beside = line["reference"]
    met = {True: "met", False: "BEYOND", None: ""}[line["met"]]
    if beside is None:
        return (line["what"], _goal(line), middle, spread, "", "", met)
    own = f" (ours {number(beside['own'])})" if beside["own"] is not None else ""
    name = f"{beside['name']}: {number(beside['median'])}{own}"
    ratio = "" if beside["ratio"] is None else number(beside["ratio"])
    return (line["what"], _goal(line), middle, spread, name, ratio, met)


def _goal(line: dict[str, Any]) -> str:
    parts = []
    if line["goal"] is not None:
        parts.append(f"{_way(line['goal'])} {line['unit']}")
    if line["worst_goal"] is not None:
        parts.append(f"worst {_way(line['worst_goal'])}")
    if line["ratio_goal"] is not None:
        parts.append(f"ratio {_way(line['ratio_goal'])}")
    return ", ".join(parts)


def _way(goal: dict[str, Any]) -> str:
    return f"{'≥' if goal['least'] else '≤'} {number(goal['figure'])}"


def notes(line: dict[str, Any]) -> str:
    """What has to be said of a line beyond its cells."""
    if line["why_not"] is not None:
        return str(line["why_not"])
    grown = ", ".join(f"{size} {number(cost)} s" for size, cost in line["growth"].items())
    return " ".join(part for part in (grown + "." if grown else "", line["note"]) if part)


def text_table(run: dict[str, Any]) -> str:
    """The run for a terminal: each measure on one line, what is to be said of it below."""
    rows = [HEADS, *(cells(line) for line in run["lines"])]
    wide = [max(len(row[at]) for row in rows) for at in range(len(HEADS))]
    said = ["", *(notes(line) for line in run["lines"])]
    out = []
    for row, words in zip(rows, said, strict=True):
        padded = (cell.ljust(width) for cell, width in zip(row, wide, strict=True))
        out.append("  ".join(padded).rstrip())
        out += textwrap.wrap(words, WIDTH, initial_indent="    ", subsequent_indent="    ")
    out += ["", machine_line(run["machine"]), f"{run['seconds']:.0f} s in all."]
    if run["quick"]:
        out.append(SHORT)
    return "\n".join(out)


def page(run: dict[str, Any]) -> str:
    """The run as a page of docs/."""
    told = [f"Version {run['version']}, {run['date']}. {machine_line(run['machine'])}"]
    if run["quick"]:
        told.append(SHORT)
    head = "| " + " | ".join(HEADS).rstrip() + " |"
    rows = [head, "|" + "---|" * len(HEADS)]
    rows += ["| " + " | ".join(cells(line)) + " |" for line in run["lines"]]
    rows = [row.replace("  ", " ") for row in rows]
    said = [f"- {line['what']}: {notes(line)}" for line in run["lines"] if notes(line)]
    filled = ["\n".join(textwrap.wrap(line, WIDTH, subsequent_indent="  ")) for line in said]
    parts = (INTRO.strip(), "\n\n".join(told), "\n".join(rows), "## What stands behind them")
    return "\n\n".join((*parts, "\n".join(filled))) + "\n"


def write_page(docs: Path) -> Path | None:
    """performance.md from performance.json beside it. Returns it when written anew."""
    source, path = docs / SOURCE, docs / PAGE
    if not source.is_file():
        return None
    text = page(json.loads(source.read_text(encoding="utf-8")))
    if path.is_file() and path.read_text(encoding="utf-8") == text:
        return None
    path.write_text(text, encoding="utf-8", newline="\n")
    return path
