"""A region's tables as files and rows, as the pages and the changes both need them."""

from __future__ import annotations

from flask import abort

from builder.desk.fields import shown
from builder.desk.shelf import Look
from builder.rows import Node, Row, read_yaml
from builder.tables.regions import YAML_TABLES

CLIMATE = "climate"
FILES = {name: f"{name}.yaml" for name in YAML_TABLES} | {CLIMATE: "climate.csv"}


def root_of(look: Look, table: str) -> Row:
    """A YAML table as read; 404 while it cannot be."""
    root, _ = read_yaml(look.folder / FILES[table], FILES[table], look.folder)
    if root is None:
        abort(404, "unreadable")
    return root


def row_name(key: str, node: Node) -> str:
    """What a row is called: its name, or in a list its id."""
    if key.isdigit() and isinstance(node, Row):
        return shown(node.get("id")) or shown(node.get("code")) or key
    return key
