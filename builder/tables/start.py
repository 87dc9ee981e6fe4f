"""A start of a new region: a valid one with three zones, to be changed by hand or on the desk."""

from __future__ import annotations

import datetime
from pathlib import Path

from builder.tables.edit import replace_value
from builder.tables.reading import ID_FORM

BLANK = Path(__file__).parent / "blank"


class StartRefused(ValueError):  # noqa: N818 - told to the person
    """The region cannot be started here; the text says why."""


def start_files(region_id: str, name: str, date: str) -> dict[str, str]:
    """File name to text of a new region.

    region_id  stable name, lower case with underscores
    name       name for people
    date       day of the first edition, year-month-day
    """
    if not ID_FORM.fullmatch(region_id):
        raise StartRefused(
            f'"{region_id}" cannot be a region\'s id: lower case letters, digits and _, a letter '
            "first."
        )
    files = {
        path.name: path.read_text(encoding="utf-8")
        for path in sorted(BLANK.iterdir())
        if path.suffix in (".yaml", ".csv")
    }
    head = files["region.yaml"]
    for field, value in (("id", region_id), ("name", name), ("date", date)):
        head = replace_value(head, (field,), value)
    return files | {"region.yaml": head}


def start_region(folder: Path | str, name: str = "", date: str = "") -> Path:
    """Writes a new region into a folder that is not there yet, and hands the folder back.

    The folder's own name becomes the id. Files are written beside it first, so that a stop in
    between leaves no half region. Raises StartRefused.
    """
    folder = Path(folder)
    if folder.exists():
        raise StartRefused(f"{folder} is there already; nothing was written.")
    shown = name or folder.name.replace("_", " ").title()
    files = start_files(folder.name, shown, date or datetime.date.today().isoformat())
    fresh = folder.with_name(f".{folder.name}.new")
    try:
        fresh.mkdir(parents=True)
        for file, text in files.items():
            (fresh / file).write_text(text, encoding="utf-8", newline="\n")
        fresh.rename(folder)
    except OSError as error:
        reason = (error.strerror or "it cannot be written").lower()
        raise StartRefused(f"{folder} cannot be written: {reason}.") from error
    return folder
