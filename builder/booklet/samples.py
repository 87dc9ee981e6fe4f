"""Typical pages as pictures, for the guides."""

import subprocess
from collections.abc import Mapping
from pathlib import Path

DPI = 110


class NoPictureError(RuntimeError):
    """Pages cannot be turned into pictures on this machine."""


def typical_pages(anchors: Mapping[str, int]) -> dict[str, int]:
    """Name and number of six pages that show what the booklet is like."""
    zones = sorted(page for name, page in anchors.items() if name.startswith("zone-"))
    middle = zones[len(zones) // 2]
    return {
        "cover": 1,
        "key": anchors["key"],
        "zone-left": middle,
        "zone-right": middle + 1,
        "chart": anchors["chart-0"],
        "plants": anchors["plants"],
    }


def write_samples(pdf: Path, anchors: Mapping[str, int], folder: Path) -> list[Path]:
    """Write six pages of a booklet in reading order as PNG files; returns their paths.

    Needs pdftoppm (package poppler-utils).
    """
    folder.mkdir(parents=True, exist_ok=True)
    written = []
    for name, number in typical_pages(anchors).items():
        stem = folder / f"booklet-{name}"
        page = ["-f", str(number), "-l", str(number), "-singlefile"]
        command = ["pdftoppm", "-png", "-r", str(DPI), *page, str(pdf), str(stem)]
        try:
            subprocess.run(command, check=True, capture_output=True)
        except FileNotFoundError as missing:
            raise NoPictureError("pdftoppm is missing: install poppler-utils") from missing
        written.append(stem.with_suffix(".png"))
    return written
