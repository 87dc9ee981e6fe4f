"""The JSON Schema of a site check, made from the bounds that cleaning holds records to."""

from __future__ import annotations

import re
from typing import Any

from builder.records.clean import CLEARED, FORMAT, MOST_DEVICES, PLACE, ROLES, STATES
from builder.records.sentences import read_sentences
from builder.records.values import (
    COVER,
    DAY,
    ID,
    LONGEST_TEXT,
    MOMENT,
    MOST_REVISIONS,
    MOST_ROWS,
    WORD,
)

DRAFT = "https://json-schema.org/draft/2020-12/schema"
Schema = dict[str, Any]
OPTIONAL = {"edits", "stand", "patches", "spots"}


def site_check_schema() -> Schema:
    """The schema; every description comes from the words file."""
    words = read_sentences()["schema"]
    fields = _described(_fields(), words)
    return {
        "$schema": DRAFT,
        "title": words["title"],
        "description": words["what"],
        "type": "object",
        "properties": fields,
        "required": [name for name in fields if name not in OPTIONAL],
        "additionalProperties": False,
    }


def _described(fields: dict[str, Schema], words: dict[str, str]) -> dict[str, Schema]:
    return {name: {"description": words[name], **field} for name, field in fields.items()}


def _fields() -> dict[str, Schema]:
    words = read_sentences()["schema"]
    place = {name: _or_null(_number(*limits)) for name, limits in PLACE.items()}
    return {
        "format": {"const": FORMAT},
        "id": _form(ID),
        "revision": {"type": "integer", "minimum": 1, "exclusiveMaximum": MOST_REVISIONS},
        "edits": {
            "type": "object",
            "propertyNames": _form(ID),
            "additionalProperties": {"type": "integer", "minimum": 1},
            "maxProperties": MOST_DEVICES,
        },
        "region_id": _form(WORD),
        "edition": _text(40),
        "pack_hash": _form(ID),
        "unit_id": _or_null(_form(ID)),
        "unit_name": _text(200),
        "role": {"enum": list(ROLES)},
        "name": _text(200),
        "observer": _text(200),
        "created_at": _form(MOMENT),
        "changed_at": _form(MOMENT),
        "date": _form(DAY),
        "month": {"type": "integer", "minimum": 1, "maximum": 12},
        "place": _object(_described(place, words)),
        "disturbance": _or_null(_form(WORD)),
        "questions": {
            "type": "object",
            "propertyNames": _form(WORD),
            "additionalProperties": _form(WORD),
            "maxProperties": MOST_ROWS,
        },
        "findings": {
            "type": "array",
            "items": {"anyOf": [_finding("plant_id", words), _finding("group_id", words)]},
            "maxItems": MOST_ROWS,
        },
        "whole_plot_searched": {"type": "boolean"},
        "digging": _digging(words),
        "struck": {"type": "array", "items": _form(WORD), "maxItems": MOST_ROWS},
        "call": {"type": ["object", "null"]},
        "overruled": {"type": ["object", "null"]},
        "notes": _text(LONGEST_TEXT),
        "photos": {"type": "array", "items": _form(ID), "maxItems": MOST_ROWS},
        "production": {"type": "object"},
        "reclaim": {"type": "object"},
        "stand": {},
        "patches": {},
        "spots": {},
    }


def _finding(subject: str, words: dict[str, str]) -> Schema:
    fields: dict[str, Schema] = {
        subject: _form(WORD),
        "state": {"enum": list(STATES)},
        "cover": _or_null(_form(COVER)),
        "named": {"enum": [1, 2, 3, None]},
    }
    return _object(_described(fields, words))


def _digging(words: dict[str, str]) -> Schema:
    return _object(
        {
            "cleared": {"description": words["cleared"], "enum": [*CLEARED, None]},
            "by": {"description": words["by"], **_text(200)},
            "number": {"description": words["number"], **_text(200)},
            "date": {"description": words["digging_date"], **_or_null(_form(DAY))},
        }
    )


def _object(fields: dict[str, Schema]) -> Schema:
    return {
        "type": "object",
        "properties": fields,
        "required": list(fields),
        "additionalProperties": False,
    }


def _form(form: re.Pattern[str]) -> Schema:
    return {"type": "string", "pattern": f"^{form.pattern}$"}


def _text(longest: int) -> Schema:
    return {"type": "string", "maxLength": longest}


def _number(low: float, high: float) -> Schema:
    return {"type": "number", "minimum": low, "maximum": high}


def _or_null(schema: Schema) -> Schema:
    return {"anyOf": [schema, {"type": "null"}]}
