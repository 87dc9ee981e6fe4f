"""Reads a YAML file that ships with the program, or that it has just checked."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from builder.rows.nodes import plain
from builder.rows.yaml_rows import read_yaml


def read_shipped(path: Path) -> dict[str, Any]:
    """Its plain values. Raises ValueError when the file is wrong, since that is a fault of ours."""
    root, problems = read_yaml(path, path.name)
    if root is None or problems:
        raise ValueError(f"{path}: {problems[0].wrong if problems else 'empty'}")
    values: dict[str, Any] = plain(root)
    return values
