"""What is generated from the declarations is up to date, and the glossary knows every field."""

import json
from pathlib import Path

from helpers import all_records

from builder.checks.manual import WHILE_READING, checks_page
from builder.rows import plain, read_yaml
from builder.tables.manual import table_records, tables_page
from builder.tables.schemas import json_schemas
from builder.tables.shape import columns
from builder.words import WORDS, word

ROOT = Path(__file__).parent.parent.parent
AGAIN = "run `beltbook docs`"


def test_the_pages_of_tables_and_checks_are_current():
    assert (ROOT / "docs" / "tables.md").read_text(encoding="utf-8") == tables_page(), AGAIN
    assert (ROOT / "docs" / "checks.md").read_text(encoding="utf-8") == checks_page(), AGAIN


def test_the_schemas_are_current():
    for name, schema in json_schemas().items():
        written = (ROOT / "docs" / "schemas" / f"{name}.json").read_text(encoding="utf-8")
        assert json.loads(written) == schema, AGAIN


def test_the_glossary_has_every_field_and_no_other():
    used = {"source"}
    for made in table_records().values():
        for record in all_records(made):
            for name, _, _ in columns(record):
                assert word(name, record.__name__).sentence.endswith(".")
                own = f"{record.__name__}.{name}"
                used.add(own if own in WORDS else name)
    assert set(WORDS) == used


def test_every_check_that_reading_tells_is_described():
    told = set()
    for path in (ROOT / "builder" / "rows").glob("*.py"):
        told |= checks_named_in(path)
    told |= checks_named_in(ROOT / "builder" / "tables" / "reading.py")
    assert told
    assert told <= set(WHILE_READING)


def checks_named_in(path):
    """Check names written as text in a module."""
    text = path.read_text(encoding="utf-8")
    return {name for name in WHILE_READING if f'"{name}"' in text}


def valid(schema, value, defs):
    """Whether a value fits the part of JSON Schema that the tables use."""
    if "$ref" in schema:
        return valid(defs[schema["$ref"].split("/")[-1]], value, defs)
    if "anyOf" in schema:
        return any(valid(each, value, defs) for each in schema["anyOf"])
    kind = schema["type"]
    if kind == "object":
        if not isinstance(value, dict) or any(n not in value for n in schema.get("required", ())):
            return False
        known = schema.get("properties", {})
        rest = schema["additionalProperties"]
        return all(
            valid(known[name], below, defs)
            if name in known
            else rest is not False and valid(rest, below, defs)
            for name, below in value.items()
        )
    if kind == "array":
        if not isinstance(value, list):
            return False
        fits = schema.get("minItems", 0) <= len(value) <= schema.get("maxItems", 10**6)
        return fits and all(valid(schema["items"], below, defs) for below in value)
    if kind == "string":
        return isinstance(value, str) and (value in schema["enum"] if "enum" in schema else True)
    if kind in ("number", "integer"):
        number = isinstance(value, int | float) and not isinstance(value, bool)
        return number and schema.get("minimum", value) <= value <= schema.get("maximum", value)
    return {"boolean": isinstance(value, bool), "null": value is None}[kind]


def test_the_demo_tables_fit_their_schemas_and_a_wrong_one_does_not():
    schemas = json_schemas()
    looked = 0
    for region in ("sorrel_plateau", "ravenmoss_upland"):
        for name, schema in schemas.items():
            path = (
                ROOT / "keydata" / region / ("words/es.yaml" if name == "words" else f"{name}.yaml")
            )
            value = plain(read_yaml(path)[0])
            assert valid(schema, value, schema["$defs"]), path
            looked += 1
            assert not valid(schema, {**value, "no_such_field": 1}, schema["$defs"])
    assert looked == 22
