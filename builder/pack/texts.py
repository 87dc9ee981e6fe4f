"""texts.<language>.json: every word of a region's tables that a screen or page shows.

    language, reviewed_by (null: unreviewed), fallback [kinds of text that stay English here]
    region       name, note, answers_for, edition, cautions [id, who, level, text, when], ...
    zones        by id: name, short, one_line, why_here, told_from {zone: text}, remnant_clues, ...
    plants       by id: common, scientific, codes, synonyms, local, family, marks,
                 lookalike_tell, best_season, cautions [who, level, text], source
    groups, disturbances   by id: {name}; cover: {class code: label}
    questions    by id: ask, why, act, answers {value: label}; rules by id: why, act
    production, soils, seed  by zone: the words beside their figures; seed with its sources
    reclaim      general [id, text]; zones: notes with their sources, and by_disturbance
                 {id: do, avoid, expect, sources}
    sources      by key: text, read

Longer notes fall back to English; `fallback` names them.
"""

from __future__ import annotations

from typing import Any

from builder.pack.canonical import fields_of
from builder.tables import Plant, Region, ZoneNotes

ENGLISH = "en"
ENGLISH_ONLY = ["marks", "lookalike_tell", "told_from", "reclaim", "soils", "seed", "production"]


def compile_texts(region: Region, language: str) -> dict[str, Any]:
    """Texts of a region in a language of its tables; KeyError where there is no such language."""
    texts = _english(region)
    if language == ENGLISH:
        return texts
    words = region.words[language]
    texts |= {"language": language, "reviewed_by": words.reviewed_by, "fallback": ENGLISH_ONLY}
    for zone_id, zone in words.zones.items():
        texts["zones"][zone_id] |= {name: one for name, one in fields_of(zone).items() if one}
    for plant in region.plants:
        name = words.plants.get(plant.id)
        texts["plants"][plant.id]["common"] = name or plant.scientific
    for plant_id, caution in words.plant_cautions.items():
        told = texts["plants"][plant_id]["cautions"]
        # The words file holds one text a plant: beside two cautions it would hide one of them.
        if len(told) == 1:
            told[0]["text"] = caution
    for kind, names in (("disturbances", words.disturbances), ("groups", words.groups)):
        for name_id, name in names.items():
            texts[kind][name_id]["name"] = name
    for question_id, question in words.questions.items():
        texts["questions"][question_id] |= {
            name: one for name, one in fields_of(question).items() if one
        }
    for caution in texts["region"]["cautions"]:
        caution["text"] = words.region_cautions.get(caution["id"] or "", caution["text"])
    texts["cover"] |= words.cover_classes
    return texts


def _english(region: Region) -> dict[str, Any]:
    head = region.head
    return {
        "language": ENGLISH,
        "reviewed_by": head.answers_for,
        "fallback": [],
        "region": {
            "name": head.name,
            "note": head.note,
            "gradient_note": head.gradient_note,
            "answers_for": head.answers_for,
            "edition": head.edition,
            "cautions": [_caution(one) for one in head.cautions],
            "success_rule": head.success_rule.text,
            "success_reading": head.success_rule.reading,
        },
        "zones": {zone.id: _zone(zone) for zone in region.zones},
        "plants": {plant.id: _plant(region, plant) for plant in region.plants},
        "groups": {group.id: {"name": group.name} for group in region.groups},
        "disturbances": {one.id: {"name": one.name} for one in region.disturbances},
        "cover": {one.code: one.label for one in region.cover_scale.classes},
        "questions": {
            one.id: {
                "ask": one.ask,
                "why": one.why,
                "act": one.act,
                "answers": {answer.value: answer.label for answer in one.answers},
            }
            for one in region.questions
        },
        "rules": {one.id: {"why": one.why, "act": one.act} for one in region.rules},
        "production": {
            zone: {"counted": one.counted, "note": one.note}
            for zone, one in region.production.items()
        },
        "soils": {
            zone: {"summary": one.summary, "restriction": one.restriction}
            for zone, one in region.soils.items()
        },
        "seed": {zone: _seed(region, one) for zone, one in region.mixes.items()},
        "reclaim": {
            "general": [{"id": one.id, "text": one.text} for one in region.reclaim.general],
            "zones": {zone: _notes(region, one) for zone, one in region.reclaim.zones.items()},
        },
        "sources": {
            name: {"text": one.text, "read": one.read} for name, one in region.sources.items()
        },
    }


def _caution(one: Any) -> dict[str, Any]:
    made = {"id": one.id, "who": one.who, "level": one.level, "text": one.text}
    if one.when:
        made["when"] = one.when
    if one.zones:
        made["zones"] = list(one.zones)
    return made


def _zone(zone: Any) -> dict[str, Any]:
    names = ("name", "short", "one_line", "why_here", "remnant_clues", "what_absence_means")
    made = {name: getattr(zone, name) for name in names}
    return {**made, "told_from": dict(zone.told_from), "limits": list(zone.limits)}


def _plant(region: Region, plant: Plant) -> dict[str, Any]:
    made: dict[str, Any] = {
        "common": plant.common,
        "scientific": plant.scientific,
        "family": plant.family,
        "marks": plant.marks,
        "best_season": plant.best_season,
        "cautions": [
            {"who": one.who, "level": one.level, "text": one.text} for one in plant.cautions
        ],
    }
    for name in ("codes", "synonyms", "local"):
        if getattr(plant, name):
            made[name] = list(getattr(plant, name))
    if plant.lookalike_tell:
        made["lookalike_tell"] = plant.lookalike_tell
    source = region.source_of(plant)
    if source is not None:
        made["source"] = source.text
    return made


def _seed(region: Region, mix: Any) -> dict[str, Any]:
    rates = [("plants", plant_id) for plant_id in mix.plants]
    return {
        "sources": _sources(region, mix, [("method",), *rates]),
        "other_method": mix.other_method,
        "fertiliser": mix.fertiliser,
        "source_rule": mix.source_rule,
        "live_plants": list(mix.live_plants),
        "propagules": [{"what": one.what, "note": one.note} for one in mix.propagules],
    }


def _sources(region: Region, record: Any, paths: list[tuple[str, ...]]) -> list[str]:
    """Every source that stands behind the paths below a record, each once, in order of paths."""
    found = (region.source_of(record, *path) for path in paths)
    return list(dict.fromkeys(one.text for one in found if one is not None))


def _notes(region: Region, notes: ZoneNotes) -> dict[str, Any]:
    names = (
        "topsoil",
        "seedbed",
        "season",
        "method",
        "protection",
        "cautions",
        "fails",
        "fertiliser",
    )
    return {
        **{name: getattr(notes, name) for name in names},
        "sources": _sources(region, notes, [(name,) for name in names]),
        "wildlife": dict(notes.wildlife),
        "soil_life": dict(notes.soil_life),
        "by_disturbance": {
            name: {
                "do": cell.do,
                "avoid": cell.avoid,
                "expect": cell.expect,
                "sources": _sources(region, cell, [("do",), ("avoid",)]),
            }
            for name, cell in notes.by_disturbance.items()
        },
    }
