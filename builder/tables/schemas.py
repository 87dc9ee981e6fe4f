"""JSON Schemas of the tables, for editors that complete and underline while a person types."""

from __future__ import annotations

from typing import Any

from builder.tables.manual import table_records
from builder.tables.reading import ID_FORM
from builder.tables.shape import (
    Figures,
    Flag,
    Id,
    Itself,
    Keyed,
    Kind,
    Many,
    Number,
    Part,
    Presence,
    Provenance,
    Record,
    Ref,
    Series,
    Text,
    columns,
    is_required,
)
from builder.words import word

DRAFT = "https://json-schema.org/draft/2020-12/schema"
SOURCE = {
    "description": word("source").sentence,
    "anyOf": [
        {"type": "string", "pattern": "^(demo|common practice|published [a-z][a-z0-9_]*)$"},
        {"type": "object", "additionalProperties": {"type": "string"}},
    ],
}


def json_schemas() -> dict[str, dict[str, Any]]:
    """Schema by table name; climate, being CSV, has none."""
    made = {}
    for file, record in table_records().items():
        if file.endswith(".yaml"):
            name = "words" if file.startswith("words/") else file.removesuffix(".yaml")
            made[name] = table_schema(name, record)
    return made


def table_schema(name: str, record: type[Record]) -> dict[str, Any]:
    """The schema of one table; records stand once under $defs."""
    defs: dict[str, Any] = {}
    _define(record, defs)
    return {"$schema": DRAFT, "title": name, "$ref": f"#/$defs/{record.__name__}", "$defs": defs}


def _define(record: type[Record], defs: dict[str, Any]) -> None:
    if record.__name__ in defs:
        return
    made: dict[str, Any] = {"type": "object", "additionalProperties": False}
    defs[record.__name__] = made
    properties: dict[str, Any] = {"source": SOURCE}
    required = []
    for name, kind, item in columns(record):
        said = word(name, record.__name__)
        value = _kind_schema(kind, record, defs)
        if is_required(item):
            required.append(name)
        else:
            value = {"anyOf": [value, {"type": "null"}]}
        unit = f" [{said.unit}]" if said.unit else ""
        properties[name] = {**value, "description": said.sentence + unit}
    made["properties"] = properties
    if required:
        made["required"] = required


def _kind_schema(kind: Kind, record: type[Record], defs: dict[str, Any]) -> dict[str, Any]:
    match kind:
        case Text(choices, longest):
            made: dict[str, Any] = {"type": "string", "minLength": 1}
            if choices:
                made["enum"] = list(choices)
            if longest:
                made["maxLength"] = longest
            return made
        case Id() | Ref():
            return {"type": "string", "pattern": "^" + ID_FORM.pattern}
        case Number():
            return _number_schema(kind)
        case Flag():
            return {"type": "boolean"}
        case Series(names, of):
            count = len(names)
            return {
                "type": "array",
                "items": _number_schema(of),
                "minItems": count,
                "maxItems": count,
            }
        case Many(of):
            return {"type": "array", "items": _kind_schema(of, record, defs)}
        case Keyed(of, _, names):
            below = _kind_schema(of, record, defs)
            if names:
                return {
                    "type": "object",
                    "additionalProperties": False,
                    "properties": {"source": SOURCE} | {name: below for name in names},
                }
            return {
                "type": "object",
                "properties": {"source": SOURCE},
                "additionalProperties": below,
            }
        case Part(inner):
            _define(inner, defs)
            return {"$ref": f"#/$defs/{inner.__name__}"}
        case Itself():
            return {"$ref": f"#/$defs/{record.__name__}"}
        case Figures():
            return {
                "type": "object",
                "properties": {"source": SOURCE},
                "additionalProperties": {
                    "anyOf": [{"type": "number"}, {"type": "array", "items": {"type": "number"}}]
                },
            }
        case Provenance():
            return dict(SOURCE)
        case Presence():
            each = {"anyOf": [{"type": "number", "minimum": 0, "maximum": 100}, {"type": "string"}]}
            return {"type": "array", "items": each, "minItems": 2, "maxItems": 2}


def _number_schema(kind: Number) -> dict[str, Any]:
    made: dict[str, Any] = {"type": "integer" if kind.whole else "number"}
    if kind.low > float("-inf"):
        made["minimum"] = kind.low
    if kind.high < float("inf"):
        made["maximum"] = kind.high
    return {"anyOf": [made, {"type": "null"}]} if kind.nullable else made
