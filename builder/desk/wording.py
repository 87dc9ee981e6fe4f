"""What a field is called on the desk, its unit, and what may stand in it."""

from __future__ import annotations

from builder.desk.phrases import read_phrases
from builder.tables.shape import (
    Figures,
    Flag,
    Id,
    Keyed,
    Kind,
    Many,
    Number,
    Presence,
    Provenance,
    Ref,
    Series,
    Text,
)
from builder.words import Word, word

# How units are written where letters allow it.
PRETTY = {"m2": "m²", "degrees C": "°C", "degrees": "°"}


def known_word(name: str, record: str = "") -> Word | None:
    """The glossary's words of a field; None for ids of rows, which are names themselves."""
    try:
        return word(name, record)
    except KeyError:
        return None


def unit_of(name: str, record: str = "") -> str:
    """The unit of a field, as people write it; empty without one."""
    found = known_word(name, record)
    unit = found.unit if found is not None else ""
    for plain, pretty in PRETTY.items():
        unit = unit.replace(plain, pretty)
    return unit


def label_for(name: str, record: str = "") -> str:
    """A field's name for people, without its unit."""
    found = known_word(name, record)
    words = found.label if found is not None else name.replace("_", " ").strip()
    return words[:1].upper() + words[1:]


def help_for(name: str, kind: Kind, record: str = "") -> str:
    """Below the label: the unit, what may stand here, and the glossary's sentence."""
    found = known_word(name, record)
    said = _said(kind, read_phrases()["kinds"])
    first = ", ".join(part for part in (unit_of(name, record), said) if part)
    sentence = found.sentence if found is not None else ""
    return ". ".join(part for part in (first, sentence) if part)


def _said(kind: Kind, say: dict[str, str]) -> str:
    match kind:
        case Number():
            return _limits(kind, say)
        case Text() if kind.longest:
            return say["longest"].format(n=kind.longest)
        case Flag():
            return say["flag"]
        case Id():
            return say["id"]
        case Ref():
            return say["ref"].format(table=kind.table)
        case Many() if isinstance(kind.of, Ref):
            return say["refs"].format(table=kind.of.table)
        case Many() | Keyed():
            return say["list"]
        case Series():
            return say["series"].format(names=", ".join(kind.names))
        case Presence():
            return say["presence"]
        case Provenance():
            return say["source"]
        case Figures():
            return say["figures"]
    return ""


def _limits(kind: Number, say: dict[str, str]) -> str:
    what = say["whole"] if kind.whole else say["number"]
    low, high = kind.low != float("-inf"), kind.high != float("inf")
    if low and high:
        return say["between"].format(what=what, low=f"{kind.low:g}", high=f"{kind.high:g}")
    if low:
        return say["from"].format(what=what, low=f"{kind.low:g}")
    if high:
        return say["up_to"].format(what=what, high=f"{kind.high:g}")
    return what
