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

# Endings that are units, longest first, and how they are written.
UNITS = {
    "c_per_km": "°C per km",
    "pct_per_km": "% per km",
    "per_c": "per °C",
    "vol_pct": "% of volume",
    "live_seeds_m2": "live seeds/m²",
    "kg_ha": "kg/ha",
    "t_ha": "t/ha",
    "ds_m": "dS/m",
    "per_g": "per g",
    "m2": "m²",
    "mm": "mm",
    "cm": "cm",
    "deg": "°",
    "pct": "%",
    "m": "m",
    "c": "°C",
    "years": "years",
    "minutes": "minutes",
    "days": "days",
    "months": "months",
}


def unit_of(name: str) -> str:
    """The unit a name ends in, as people write it; empty without one."""
    for ending, unit in UNITS.items():
        if name == ending or name.endswith(f"_{ending}"):
            return unit
    return ""


def label_for(name: str) -> str:
    """A field's name for people, without its unit."""
    known = read_phrases()["fields"].get(name)
    if known:
        return str(known)
    for ending in UNITS:
        if name.endswith(f"_{ending}"):
            name = name.removesuffix(f"_{ending}")
            break
    words = name.replace("_", " ").strip()
    return words[:1].upper() + words[1:]


def help_for(name: str, kind: Kind) -> str:
    """One line below the label: the unit and what may stand here."""
    say = read_phrases()["kinds"]
    unit = unit_of(name)
    said = _said(kind, say)
    return ", ".join(part for part in (unit, said) if part)


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
