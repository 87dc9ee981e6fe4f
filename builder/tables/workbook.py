"""A whole region in one XLSX workbook, or in a folder of CSV files, and back without loss.

The sheets are those of builder.tables.sheets. On the way back only values that differ are changed
in the YAML, so comments, order and spacing of all else stay. Text is written as text, so that a
spreadsheet neither runs it as a formula nor turns a code into a number.
"""

from __future__ import annotations

import io
import zipfile
from pathlib import Path
from typing import Any

from openpyxl import Workbook, load_workbook  # type: ignore[import-untyped]
from openpyxl.styles import Alignment, Font  # type: ignore[import-untyped]
from openpyxl.utils import get_column_letter  # type: ignore[import-untyped]
from openpyxl.utils.exceptions import InvalidFileException  # type: ignore[import-untyped]

from builder.rows import (
    csv_text,
    parse_csv,
    parse_yaml,
    plain,
    read_text,
)
from builder.tables.languages import Words
from builder.tables.merge import merged_text
from builder.tables.regions import CLIMATE_COLUMNS, YAML_TABLES
from builder.tables.shape import Record
from builder.tables.sheets import Cell, Flat, SheetFault, sheet_names
from builder.tables.sheets_in import from_sheets
from builder.tables.sheets_out import to_sheets

MAX_BYTES = 20_000_000
MAX_UNPACKED = 200_000_000
_RUN = ("=", "+", "-", "@", "\t", "\r", "'")


def region_sheets(folder: Path) -> dict[str, Flat]:
    """All sheets of a region's folder. Raises SheetFault where a table cannot be read."""
    sheets: dict[str, Flat] = {}
    for file, (table, record) in _tables(folder).items():
        text, problems = read_text(folder / file, file, folder)
        root, more = parse_yaml(text, file) if text is not None else (None, [])
        if root is None:
            first = (problems + more)[0]
            raise SheetFault(f"{first.file}:{first.line}: {first.wrong}. Mend it first.")
        sheets |= to_sheets(table, record, plain(root))
    text, problems = read_text(folder / "climate.csv", "climate.csv", folder, legacy=True)
    sheet, more = parse_csv(text, "climate.csv") if text is not None else (None, [])
    if sheet is None:
        first = (problems + more)[0]
        raise SheetFault(f"{first.file}:{first.line}: {first.wrong}. Mend it first.")
    rows: list[dict[str, Cell]] = [
        {"field": name, "value": str(value.value)} for name, value in sheet.notes.items()
    ]
    sheets["climate.head"] = Flat(["field", "value"], rows)
    sheets["climate"] = Flat(sheet.columns, [plain(row) for row in sheet.rows])
    return sheets


def changed_texts(folder: Path, sheets: dict[str, Flat]) -> dict[str, str]:
    """File name to new text of every table that the sheets change. Raises SheetFault.

    A table without any sheet stays as it is; a folder that is empty gets all tables anew.
    """
    changed = {}
    for file, (table, record) in _tables(folder, sheets).items():
        named = {name: sheets[name] for name in sheet_names(table, list(sheets))}
        if not named:
            continue
        data = from_sheets(table, record, named)
        before, _ = read_text(folder / file, file, folder)
        after = merged_text(before or "", data)
        if after != before:
            changed[file] = after
    if "climate" in sheets:
        after = _climate_text(sheets)
        before, _ = read_text(folder / "climate.csv", "climate.csv", folder, legacy=True)
        if before is None or _climate_data(before) != _climate_data(after):
            changed["climate.csv"] = after
    return changed


def _tables(
    folder: Path, sheets: dict[str, Flat] | None = None
) -> dict[str, tuple[str, type[Record]]]:
    """File name to (table name, record), languages too."""
    found = {f"{name}.yaml": (name, made) for name, made in YAML_TABLES.items()}
    languages = {path.stem for path in (folder / "words").glob("*.yaml")}
    for name in sheets or ():
        if name.startswith("words."):
            languages.add(name.split(".")[1])
    for language in sorted(languages):
        found[f"words/{language}.yaml"] = (f"words.{language}", Words)
    return found


def _climate_text(sheets: dict[str, Flat]) -> str:
    notes = {
        str(row["field"]): str(row["value"]) for row in sheets.get("climate.head", Flat()).rows
    }
    flat = sheets["climate"]
    names = list(flat.columns) or list(CLIMATE_COLUMNS)
    rows = [
        [row.get(name) for name in names]
        for row in flat.rows
        if any(cell is not None for cell in row.values())
    ]
    return csv_text(names, rows, notes)


def _climate_data(text: str) -> Any:
    sheet, _ = parse_csv(text, "climate.csv")
    if sheet is None:
        return None
    return [plain(row) for row in sheet.rows], {n: v.value for n, v in sheet.notes.items()}


# --- XLSX ----------------------------------------------------------------------------------


def workbook_bytes(folder: Path) -> bytes:
    """The region as one XLSX workbook."""
    book = Workbook()
    book.remove(book.active)
    for name, flat in region_sheets(folder).items():
        sheet = book.create_sheet(name)
        sheet.append(flat.columns)
        for row in flat.rows:
            sheet.append([row.get(column) for column in flat.columns])
        for cells in sheet.iter_rows():
            for cell in cells:
                if isinstance(cell.value, str):
                    cell.data_type = "s"
                    cell.number_format = "@"
        _dress(sheet, flat)
    out = io.BytesIO()
    book.save(out)
    return out.getvalue()


def _dress(sheet: Any, flat: Flat) -> None:
    """Bold heads that stay in sight, columns as wide as their words allow."""
    for number, name in enumerate(flat.columns, start=1):
        head = sheet.cell(row=1, column=number)
        head.font = Font(bold=True)
        head.alignment = Alignment(vertical="top", wrap_text=True)
        longest = max([len(name), *(len(str(row.get(name) or "")) for row in flat.rows)])
        sheet.column_dimensions[get_column_letter(number)].width = min(max(8, longest + 2), 60)
    sheet.freeze_panes = "B2"


def sheets_of_workbook(raw: bytes) -> dict[str, Flat]:
    """The sheets of an XLSX workbook. Raises SheetFault for what is no workbook."""
    if len(raw) > MAX_BYTES:
        raise SheetFault(f"The workbook is larger than {MAX_BYTES // 1_000_000} MB.")
    try:
        with zipfile.ZipFile(io.BytesIO(raw)) as parts:
            if sum(part.file_size for part in parts.infolist()) > MAX_UNPACKED:
                raise SheetFault("The workbook unpacks to more than any region holds.")
        book = load_workbook(io.BytesIO(raw), read_only=True, data_only=False)
        return {sheet.title: _flat(sheet.iter_rows(values_only=True)) for sheet in book.worksheets}
    except (zipfile.BadZipFile, InvalidFileException, KeyError, ValueError, OSError) as error:
        if isinstance(error, SheetFault):
            raise
        raise SheetFault("This is no XLSX workbook; save it as .xlsx and try again.") from error


def _flat(rows: Any) -> Flat:
    flat = Flat()
    for number, row in enumerate(rows):
        if number == 0:
            flat.columns = [str(name).strip() if name is not None else "" for name in row]
            continue
        cells = {name: _cell(cell) for name, cell in zip(flat.columns, row, strict=False) if name}
        if any(cell is not None for cell in cells.values()):
            flat.rows.append(cells)
    flat.columns = [name for name in flat.columns if name]
    return flat


def _cell(value: Any) -> Cell:
    if value is None or isinstance(value, str | bool | int):
        return value if value != "" else None
    if isinstance(value, float):
        return int(value) if value.is_integer() else value
    return str(value)


# --- CSV -----------------------------------------------------------------------------------


def csv_texts(folder: Path) -> dict[str, str]:
    """Sheet name to CSV text; text that a spreadsheet would run gets an apostrophe in front."""
    return {
        name: csv_text(
            flat.columns, [[_harmless(row.get(c)) for c in flat.columns] for row in flat.rows], {}
        )
        for name, flat in region_sheets(folder).items()
    }


def sheets_of_csv(texts: dict[str, str]) -> dict[str, Flat]:
    """The sheets of CSV texts by sheet name. Raises SheetFault."""
    sheets = {}
    for name, text in texts.items():
        sheet, problems = parse_csv(text, f"{name}.csv")
        if sheet is None or problems:
            first = problems[0]
            raise SheetFault(f"{first.file}:{first.line}: {first.wrong}. {first.fix}")
        rows = [
            {column: _restored(plain(cell)) for column, cell in row.items()} for row in sheet.rows
        ]
        sheets[name] = Flat(sheet.columns, rows)
    return sheets


def _harmless(cell: Cell) -> Cell:
    if isinstance(cell, bool):
        return "true" if cell else "false"
    return f"'{cell}" if isinstance(cell, str) and cell.startswith(_RUN) else cell


def _restored(cell: Any) -> Cell:
    if isinstance(cell, str):
        return cell[1:] if cell.startswith("'") else cell or None
    return cell  # type: ignore[no-any-return]
