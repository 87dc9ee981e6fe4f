"""Reads YAML and CSV into rows that know their file, line and column, strictly.

Nothing here raises on a wrong file: every function hands back what could be read and a list of
problems. Refused are double keys, anchors and aliases, tags, deep or huge files, and plain words
that YAML turns into something else (yes, no, on, off, dates, 012, 1:30, 1_000, 0x1F, ~).
"""

from builder.rows.csv_rows import Sheet, csv_text, parse_csv, read_csv
from builder.rows.files import read_text
from builder.rows.nodes import Items, Node, Row, Scalar, Value, descend, plain
from builder.rows.shipped import read_shipped
from builder.rows.writing import block_text, flow_text, scalar_text, wrapped
from builder.rows.yaml_rows import is_turned, parse_yaml, read_yaml

__all__ = [
    "Items",
    "Node",
    "Row",
    "Scalar",
    "Sheet",
    "Value",
    "block_text",
    "csv_text",
    "descend",
    "flow_text",
    "is_turned",
    "parse_csv",
    "parse_yaml",
    "plain",
    "read_csv",
    "read_shipped",
    "read_text",
    "read_yaml",
    "scalar_text",
    "wrapped",
]
