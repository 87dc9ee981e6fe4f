"""Changes one cell or row of a CSV table's text and leaves every other letter alone."""

from __future__ import annotations

from typing import Any

from builder.problems import errors
from builder.rows import is_turned, parse_csv, plain, scalar_text
from builder.tables.edit import EditRefused, line_end


def replace_cell(text: str, row: int, column: str, value: Any) -> str:
    """The CSV text with one cell replaced; `row` counts the rows below the header from 0."""
    sheet, problems = parse_csv(text, "table")
    if sheet is None or errors(problems):
        raise EditRefused("The table cannot be read; mend it by hand first.")
    if not 0 <= row < len(sheet.rows) or column not in sheet.columns:
        raise EditRefused("There is no such cell.")
    cell = sheet.rows[row].nodes[column]
    new = _cell_text(value, sheet.separator)
    changed = text[: cell.span[0]] + new + text[cell.span[1] :]
    again, _ = parse_csv(changed, "table")
    if again is None or plain(again.rows[row].nodes[column]) != value:
        raise EditRefused("The value cannot be written here so that it reads back the same.")
    return changed


def add_cells(text: str, cells: dict[str, Any]) -> str:
    """The CSV text with a row added at the end; columns that are not named stay empty."""
    sheet, problems = parse_csv(text, "table")
    if sheet is None or errors(problems):
        raise EditRefused("The table cannot be read; mend it by hand first.")
    row = sheet.separator.join(
        _cell_text(cells.get(name), sheet.separator) for name in sheet.columns
    )
    return text.rstrip("\n") + "\n" + row + "\n"


def remove_cells(text: str, row: int) -> str:
    """The CSV text without a row."""
    sheet, problems = parse_csv(text, "table")
    if sheet is None or errors(problems) or not 0 <= row < len(sheet.rows):
        raise EditRefused("There is no such row.")
    cells = list(sheet.rows[row].nodes.values())
    start, end = cells[0].span[0], line_end(text, cells[-1].span[1])
    return text[:start] + text[end + 1 :]


def _cell_text(value: Any, separator: str) -> str:
    if value is None:
        return ""
    text = scalar_text(value) if not isinstance(value, str) else value
    if isinstance(value, float | int) and separator == ";":
        return text.replace(".", ",")
    looks_like_number = isinstance(value, str) and is_turned(text)
    if looks_like_number or any(letter in text for letter in (separator, '"', "\n")):
        return '"' + text.replace('"', '""') + '"'
    return text
