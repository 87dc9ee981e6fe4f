"""The booklet's type: shipped with the program, and every character checked against it."""

from collections.abc import Iterable
from functools import cache
from pathlib import Path

from fontTools.ttLib import TTFont

import builder

FOLDER = Path(builder.__file__).parent / "app" / "vendor" / "fonts"
FAMILIES = {"Source Sans 3": "source-sans-3", "Source Serif 4": "source-serif-4"}
CUTS = {
    "Source Sans 3": ((400, "normal"), (400, "italic"), (600, "normal"), (700, "normal")),
    "Source Serif 4": ((400, "normal"), (400, "italic"), (600, "normal")),
}
SUBSETS = ("latin", "latin-ext")


class MissingCharactersError(ValueError):
    """The text holds characters that the shipped type does not have."""


def faces() -> str:
    """The style rules that bring in the type, one a cut and subset."""
    rules = []
    for family, cuts in CUTS.items():
        for subset in SUBSETS:
            for weight, style in cuts:
                path = FOLDER / f"{FAMILIES[family]}-{subset}-{weight}-{style}.woff2"
                if not path.is_file():
                    raise FileNotFoundError(
                        f"{path.name} is missing: install the package again; it brings its type"
                    )
                rules.append(
                    f'@font-face{{font-family:"{family}";font-weight:{weight};font-style:{style};'
                    f'src:url("{path.as_uri()}");unicode-range:{_range(path)}}}'
                )
    return "\n".join(rules)


@cache
def covered(family: str) -> frozenset[int]:
    """Every character the shipped cuts of a family all have."""
    found: set[int] | None = None
    for weight, style in CUTS[family]:
        own: set[int] = set()
        for subset in SUBSETS:
            own |= _characters(FOLDER / f"{FAMILIES[family]}-{subset}-{weight}-{style}.woff2")
        found = own if found is None else found & own
    return frozenset(found or ())


def refuse_uncovered(texts: Iterable[str]) -> None:
    """Raise MissingCharactersError when any text has a character the type lacks."""
    known = frozenset.intersection(*(covered(family) for family in CUTS))
    missing: dict[str, str] = {}
    for text in texts:
        for character in text:
            if ord(character) not in known and not character.isspace():
                missing.setdefault(character, text.strip()[:60])
    if missing:
        lines = [f'U+{ord(c):04X} "{c}" in "{where}"' for c, where in sorted(missing.items())]
        raise MissingCharactersError("the booklet's type has no " + "; ".join(lines))


@cache
def _characters(path: Path) -> frozenset[int]:
    with TTFont(path, lazy=True) as font:
        return frozenset(font.getBestCmap())


@cache
def _range(path: Path) -> str:
    """The characters of a file as a style rule's ranges."""
    points = sorted(_characters(path))
    runs: list[list[int]] = []
    for point in points:
        if runs and runs[-1][1] == point - 1:
            runs[-1][1] = point
        else:
            runs.append([point, point])
    return ",".join(f"U+{a:X}" if a == b else f"U+{a:X}-{b:X}" for a, b in runs)
