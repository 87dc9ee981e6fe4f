"""Changes one value, row or name in a table's text and leaves every other letter alone.

Comments, order and spacing stay. Each function takes the text of a table and hands back the new
text, parsed again before it is given out; what cannot be done raises EditRefused with a sentence
for the person.
"""

from __future__ import annotations

from functools import lru_cache
from typing import Any

from builder.problems import Problem, errors
from builder.rows import (
    Items,
    Node,
    Row,
    Value,
    block_text,
    descend,
    flow_text,
    parse_yaml,
    plain,
    scalar_text,
    wrapped,
)

Path = tuple[str | int, ...]


class EditRefused(ValueError):  # noqa: N818 - a refusal told to the person, not a fault
    """The change cannot be made; the text says why."""


def replace_value(text: str, path: Path, value: Any) -> str:
    """The text with the value at a path replaced: a scalar, or a list or table of scalars."""
    root = _parsed(text)
    node = descend(root, path)
    if node is None:
        return add_value(text, path, value)
    start, end = node.span[0], end_of(node, text)
    flow = _in_flow(node)
    if isinstance(value, dict | list | tuple):
        new = flow_text(value)
        if isinstance(node, Row | Items) and not node.flow:
            start = _after_name(text, node)
            new = " " + new
    else:
        new = scalar_text(value, flow)
        if not flow and isinstance(node, Value):
            line = text.rfind("\n", 0, start) + 1
            new = wrapped(new, _indent_of(text, line) + 2 + 2 * _in_list(node), start - line)
        if isinstance(node, Value) and text[node.span[0] : node.span[0] + 1] in ("|", ">"):
            new += "\n"
            end = node.span[1]
        if isinstance(node, Value) and node.text == "" and not node.quoted:
            new = " " + new
    return _checked(text[:start] + new + text[end:], path, value)


def add_value(text: str, path: Path, value: Any) -> str:
    """The text with a named value added at the end of the row that the path names."""
    root = _parsed(text)
    name = path[-1]
    row = descend(root, path[:-1])
    if isinstance(row, Items):
        return add_row(text, path[:-1], value)
    if not isinstance(row, Row) or not isinstance(name, str):
        raise EditRefused("There is no row here to add a value to.")
    if name in row:
        raise EditRefused(f'"{name}" stands here already.')
    if row.flow or not row.nodes:
        close = row.span[1] - 1
        comma = ", " if row.nodes else ""
        new = f"{comma}{scalar_text(name, True)}: {flow_text(value)}"
        return _checked(text[:close].rstrip() + new + text[close:], path, value)
    first = next(iter(row.keys.values()))
    pad = " " * (first.at.column - 1)
    at = line_end(text, end_of(row, text))
    lines = [pad + line if line else line for line in block_text({name: value})]
    return _checked(text[:at] + "\n" + "\n".join(lines) + text[at:], path, value)


def remove_value(text: str, path: Path) -> str:
    """The text without the named value, list entry or row at a path."""
    root = _parsed(text)
    node = descend(root, path)
    if node is None:
        raise EditRefused("There is nothing here to remove.")
    above = node.parent
    if above is None:
        raise EditRefused("A whole table is not removed here.")
    if len(above.nodes) == 1:
        if above.parent is None:
            raise EditRefused("This is the last row; a table keeps at least one.")
        empty: Any = [] if isinstance(above, Items) else {}
        return replace_value(text, path[:-1], empty)
    start, end = _extent(node, text)
    if above.flow:
        start, end = _with_comma(text, start, end)
    else:
        start, end = _whole_lines(text, start, end, gap=isinstance(above, Items))
    new = text[:start] + text[end:]
    _parsed(new)
    return new


def copy_row(text: str, path: Path, new_id: str) -> str:
    """The text with a row copied right after itself under a new id or name."""
    root = _parsed(text)
    node = descend(root, path)
    if node is None or node.parent is None:
        raise EditRefused("There is no row here to copy.")
    above = node.parent
    if isinstance(above, Row) and new_id in above:
        raise EditRefused(f'"{new_id}" stands here already.')
    start, end = _extent(node, text)
    if above.flow:
        piece, joint, at = text[start:end], ", ", end
    else:
        start, end = _whole_lines(text, start, end)
        piece, joint, at = text[start:end], "", end
        if not text[:at].endswith("\n"):
            joint = "\n"
    if isinstance(above, Row):
        key = above.keys[str(path[-1])]
        here = key.span[0] - start
        piece = (
            piece[:here] + scalar_text(new_id, above.flow) + piece[here + len(_raw(text, key)) :]
        )
    else:
        written = node.get("id") if isinstance(node, Row) else None
        if written is None:
            raise EditRefused("Only rows with an id can be copied.")
        here = written.span[0] - start
        length = written.span[1] - written.span[0]
        piece = piece[:here] + scalar_text(new_id, node.flow) + piece[here + length :]  # type: ignore[union-attr]
    new = text[:at] + joint + piece + text[at:]
    _parsed(new)
    return new


def add_row(text: str, path: Path, row: Any) -> str:
    """The text with a row added at the end of the list at a path."""
    root = _parsed(text)
    items = descend(root, path)
    if not isinstance(items, Items):
        raise EditRefused("There is no list here to add a row to.")
    if items.flow or not items.nodes:
        close = items.span[1] - 1
        comma = ", " if items.nodes else ""
        if isinstance(row, dict) and not items.nodes:
            start = _after_name(text, items)
            pad = "\n" + " " * (_indent_of(text, text.rfind("\n", 0, start) + 1) + 2)
            new = text[:start] + pad + pad.join(block_text([row])) + text[items.span[1] :]
        else:
            new = text[:close] + comma + flow_text(row) + text[close:]
        _parsed(new)
        return new
    column = text.rfind("\n", 0, items.span[0]) + 1
    pad = " " * (items.span[0] - column)
    at = line_end(text, end_of(items, text))
    gap = "\n\n" if _rows_stand_apart(text, items) else "\n"
    lines = block_text([row])
    if isinstance(row, dict) and row and not _is_flow(items.nodes[-1]):
        inner = block_text(row, 2)
        lines = ["- " + inner[0].lstrip(), *inner[1:]]
    lines = [pad + line if line else line for line in lines]
    new = text[:at] + gap + "\n".join(lines) + text[at:]
    _parsed(new)
    return new


def end_of(node: Node, text: str) -> int:
    """Where a node's own letters end; a block's mark lies after comments that follow it."""
    if isinstance(node, Value):
        return node.span[0] + len(text[node.span[0] : node.span[1]].rstrip("\n"))
    if node.flow or not node.nodes:
        return node.span[1]
    below = node.nodes.values() if isinstance(node, Row) else node.nodes
    return end_of(list(below)[-1], text)


@lru_cache(maxsize=8)
def _parsed(text: str) -> Row:
    """The table's rows; kept, since what one change hands out is what the next one starts from."""
    root, problems = parse_yaml(text, "table")
    stop: list[Problem] = errors(problems)
    if root is None or any(problem.check in ("readable", "double-key") for problem in stop):
        worst = stop[0] if stop else None
        where = f"line {worst.line}: {worst.wrong}" if worst else "it is empty"
        raise EditRefused(f"The table would not be readable any more ({where}).")
    return root


def _checked(new: str, path: Path, value: Any) -> str:
    found = plain(descend(_parsed(new), path))
    wanted = _bare(value)
    if found != wanted:
        raise EditRefused("The value cannot be written here so that it reads back the same.")
    return new


def _bare(value: Any) -> Any:
    if isinstance(value, dict):
        return {str(name): _bare(below) for name, below in value.items()}
    if isinstance(value, list | tuple):
        return [_bare(below) for below in value]
    return value


def _in_flow(node: Node) -> bool:
    above = node.parent
    while above is not None:
        if above.flow:
            return True
        above = above.parent
    return False


def _is_flow(node: Node) -> bool:
    return isinstance(node, Row | Items) and node.flow


def _in_list(node: Node) -> int:
    return int(isinstance(node.parent, Items) and not node.parent.flow)


def _indent_of(text: str, line_start: int) -> int:
    here = line_start
    while here < len(text) and text[here] == " ":
        here += 1
    if text[here : here + 2] == "- " and not text[line_start:here].strip():
        rest = here + 2
        while text[rest : rest + 1] == " ":
            rest += 1
        return rest - line_start if ":" in text[rest : line_end(text, rest)] else here - line_start
    return here - line_start


def _raw(text: str, key: Value) -> str:
    return text[key.span[0] : key.span[1]]


def _after_name(text: str, node: Row | Items) -> int:
    """The place right behind the colon that a block list or table belongs to."""
    above = node.parent
    if not isinstance(above, Row):
        raise EditRefused("This part can only be changed value by value.")
    name = next(name for name, below in above.items() if below is node)
    return text.index(":", above.keys[name].span[1]) + 1


def _extent(node: Node, text: str) -> tuple[int, int]:
    above = node.parent
    if isinstance(above, Row):
        name = next(name for name, below in above.items() if below is node)
        return above.keys[name].span[0], end_of(node, text)
    start = node.span[0]
    if above is not None and not above.flow:
        start = text.rfind("-", 0, start)
    return start, end_of(node, text)


def _with_comma(text: str, start: int, end: int) -> tuple[int, int]:
    after = end
    while text[after : after + 1].isspace():
        after += 1
    if text[after : after + 1] == ",":
        after += 1
        while text[after : after + 1] == " ":
            after += 1
        return start, after
    return text.rfind(",", 0, start), end


def _whole_lines(text: str, start: int, end: int, gap: bool = True) -> tuple[int, int]:
    """From the row's first letter's line to the end of its last line; `gap`: and a blank line."""
    line = text.rfind("\n", 0, start) + 1
    if text[line:start].strip() not in ("", "-"):
        raise EditRefused("This row shares its line with another; change it by hand.")
    if text[line:start].strip() == "-":
        raise EditRefused("The first value of a row names it and stays.")
    after = min(line_end(text, end) + 1, len(text))
    if gap and text[after : after + 1] == "\n":
        after += 1
    return line, after


def line_end(text: str, position: int) -> int:
    """Where the line of a position ends."""
    found = text.find("\n", position)
    return len(text) if found < 0 else found


def _rows_stand_apart(text: str, items: Items) -> bool:
    if len(items.nodes) < 2:
        return False
    return "\n\n" in text[end_of(items.nodes[0], text) : items.nodes[1].span[0]]
