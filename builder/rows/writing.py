"""Writes values as the YAML a person would write: plain where it may be, quoted where it must."""

from __future__ import annotations

import re
import textwrap
from typing import Any

from builder.rows.yaml_rows import is_turned

WIDTH = 100
_FIRST = frozenset("-?:,[]{}#&*!|>'\"%@`+=<~")


def scalar_text(value: Any, flow: bool = False) -> str:
    """One value on one line.

    flow  inside [ ] or { }, where commas and brackets need quotes too
    """
    if value is None:
        return "null"
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, int):
        return str(value)
    if isinstance(value, float):
        return str(int(value)) if value.is_integer() and abs(value) < 1e15 else _decimal(value)
    text = str(value)
    if text and not _needs_quotes(text, flow):
        return text
    if any(ord(letter) < 32 for letter in text):
        return (
            '"'
            + text.replace("\\", "\\\\")
            .replace('"', '\\"')
            .replace("\n", "\\n")
            .replace("\t", "\\t")
            + '"'
        )
    if "'" in text and '"' not in text and "\\" not in text:
        return f'"{text}"'
    return "'" + text.replace("'", "''") + "'"


def _decimal(value: float) -> str:
    text = repr(value)
    if "e" not in text:
        return text
    return f"{value:.12f}".rstrip("0")


def _needs_quotes(text: str, flow: bool) -> bool:
    if is_turned(text) or text[0] in _FIRST or text != text.strip() or text.endswith(":"):
        return True
    if ": " in text or " #" in text or any(ord(letter) < 32 for letter in text):
        return True
    return flow and bool(re.search(r"[,\[\]{}]|:$", text))


def flow_text(value: Any) -> str:
    """A value, list or table on one line, lists in [ ] and tables in { }."""
    if isinstance(value, dict):
        inner = ", ".join(
            f"{scalar_text(str(name), True)}: {flow_text(below)}" for name, below in value.items()
        )
        return "{" + inner + "}"
    if isinstance(value, list | tuple):
        return "[" + ", ".join(flow_text(below) for below in value) + "]"
    return scalar_text(value, flow=True)


def wrapped(text: str, indent: int, taken: int) -> str:
    """Scalar text over several lines when it is long; later lines stand at `indent`.

    taken  letters already on the first line
    """
    if taken + len(text) <= WIDTH or " " not in text.strip() or "  " in text:
        return text
    if text[0] in "'\"" and "\\n" in text:
        return text
    lines = textwrap.wrap(
        text,
        WIDTH - indent,
        initial_indent=" " * max(0, taken - indent),
        break_long_words=False,
        break_on_hyphens=False,
    )
    lines[0] = lines[0].lstrip()
    if any(line[0] == "#" for line in lines[1:]):
        return text
    return ("\n" + " " * indent).join(lines)


def block_text(value: Any, indent: int = 0) -> list[str]:
    """Lines of a table or list in block style; small lists and flat small tables in one line."""
    pad = " " * indent
    lines: list[str] = []
    if isinstance(value, dict):
        for name, below in value.items():
            lines += _named(pad, scalar_text(str(name)), below, indent)
        return lines
    for below in value:
        if isinstance(below, dict) and below and not _is_small(below, indent + 2):
            inner = block_text(below, indent + 2)
            lines.append(f"{pad}- {inner[0].lstrip()}")
            lines += inner[1:]
        elif isinstance(below, dict | list | tuple):
            lines.append(f"{pad}- {flow_text(below)}")
        else:
            lines.append(f"{pad}- {wrapped(scalar_text(below), indent + 2, indent + 2)}")
    return lines


def _named(pad: str, name: str, below: Any, indent: int) -> list[str]:
    if isinstance(below, dict | list | tuple):
        if not below or _is_small(below, indent + len(name) + 2):
            return [f"{pad}{name}: {flow_text(below)}"]
        return [f"{pad}{name}:", *block_text(below, indent + 2)]
    taken = indent + len(name) + 2
    return [f"{pad}{name}: {wrapped(scalar_text(below), indent + 2, taken)}"]


def _is_small(value: Any, taken: int) -> bool:
    """Whether a list or table reads well on one line: short, and without sentences."""
    inner = value.values() if isinstance(value, dict) else value
    for each in inner:
        if isinstance(each, str) and len(each) > 40:
            return False
        if isinstance(each, dict):
            return False
        if isinstance(each, list | tuple) and any(isinstance(x, dict | list | tuple) for x in each):
            return False
    if isinstance(value, dict) and sum(isinstance(each, str) for each in inner) > 2:
        return False
    return taken + len(flow_text(value)) <= WIDTH
