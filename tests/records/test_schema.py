"""The published schema takes every cleaned record and refuses what cleaning would not let pass."""

import json
import re
from pathlib import Path

import pytest

from builder.records.schema import site_check_schema

ROOT = Path(__file__).parents[2]
CASES = json.loads((ROOT / "tests/goldens/cleaning.json").read_text(encoding="utf-8"))["cases"]
CLEANED = [case["out"] for case in CASES if "out" in case]
TYPES = {
    "object": dict, "array": list, "string": str, "boolean": bool, "null": type(None),
    "integer": int, "number": (int, float),
}  # fmt: skip


def is_type(value, name):
    if name in {"integer", "number"} and isinstance(value, bool):
        return False
    return isinstance(value, TYPES[name])


def wrong(value, schema, at="$"):
    """Breaches of a schema, for the keywords ours uses (JSON Schema 2020-12, validation)."""
    known = {
        "$schema", "title", "description", "type", "properties", "required", "enum", "const",
        "additionalProperties", "propertyNames", "maxProperties", "items", "maxItems", "pattern",
        "maxLength", "minimum", "maximum", "exclusiveMaximum", "anyOf",
    }  # fmt: skip
    assert set(schema) <= known
    names = schema.get("type", [])
    names = [names] if isinstance(names, str) else names
    if names and not any(is_type(value, name) for name in names):
        yield f"{at}: not {names}"
        return
    if "enum" in schema and not any(value is one or value == one for one in schema["enum"]):
        yield f"{at}: not one of them"
    if "const" in schema and value != schema["const"]:
        yield f"{at}: not {schema['const']}"
    if "anyOf" in schema and all(list(wrong(value, one, at)) for one in schema["anyOf"]):
        yield f"{at}: none fits"
    if isinstance(value, str):
        if "pattern" in schema and not re.search(schema["pattern"], value):
            yield f"{at}: another form"
        if len(value) > schema.get("maxLength", len(value)):
            yield f"{at}: too long"
    if isinstance(value, (int, float)) and not isinstance(value, bool):
        low, high = schema.get("minimum", value), schema.get("maximum", value)
        if not low <= value <= high or value >= schema.get("exclusiveMaximum", value + 1):
            yield f"{at}: outside"
    if isinstance(value, list):
        if len(value) > schema.get("maxItems", len(value)):
            yield f"{at}: too many"
        for number, one in enumerate(value):
            yield from wrong(one, schema.get("items", {}), f"{at}[{number}]")
    if isinstance(value, dict):
        yield from wrong_object(value, schema, at)


def wrong_object(value, schema, at):
    fields, more = schema.get("properties", {}), schema.get("additionalProperties", {})
    yield from (f"{at}: lacks {name}" for name in schema.get("required", []) if name not in value)
    for name, one in value.items():
        yield from wrong(name, schema.get("propertyNames", {}), f"{at} name")
        if name in fields:
            yield from wrong(one, fields[name], f"{at}.{name}")
        elif more is False:
            yield f"{at}: unknown {name}"
        else:
            yield from wrong(one, more, f"{at}.{name}")


def test_every_cleaned_record_fits():
    assert len(CLEANED) >= 10
    for record in CLEANED:
        assert list(wrong(record, site_check_schema())) == []


@pytest.mark.parametrize(
    "change",
    [
        {"revision": 0}, {"id": "../x"}, {"role": "king"}, {"month": 13}, {"format": 2},
        {"place": {}}, {"findings": [{"plant_id": "artr", "state": "seen"}]}, {"more": 1},
        {"date": "4.7.2026"}, {"notes": "x" * 20_001}, {"questions": {"A": "b"}},
        {"whole_plot_searched": 1}, {"digging": {"cleared": "yes"}}, {"edits": {"p": 0}},
    ],
)  # fmt: skip
def test_what_does_not_fit_is_caught(change):
    assert list(wrong({**CLEANED[0], **change}, site_check_schema()))


def test_the_published_file_is_the_schema():
    path = ROOT / "docs/schemas/site_check.json"
    assert json.loads(path.read_text(encoding="utf-8")) == site_check_schema()
