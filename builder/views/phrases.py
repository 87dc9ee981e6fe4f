"""Sentences for people, kept in one words file a language; English fills what is missing."""

from functools import cache
from pathlib import Path
from typing import Any

from builder.rows import read_shipped

FOLDER = Path(__file__).parent / "words"
FIRST = "en"


class Phrases:
    """The sentences of one language, asked for by dotted name."""

    def __init__(self, language: str, own: dict[str, Any], first: dict[str, Any]) -> None:
        """Keep both trees; own goes before first."""
        self.language = language
        self._own = own
        self._first = first

    def say(self, key: str, /, **figures: object) -> str:
        """One sentence with its figures set in. An unknown name is a fault of ours: KeyError."""
        found = self._find(key)
        if not isinstance(found, str):
            raise KeyError(f'words/{FIRST}.yaml has no sentence "{key}"')
        return found.format(**figures) if figures else found

    def words(self, name: str) -> list[str]:
        """A list of words, such as the months."""
        found = self._find(name)
        if not isinstance(found, list):
            raise KeyError(f'words/{FIRST}.yaml has no list "{name}"')
        return [str(word) for word in found]

    def has(self, name: str) -> bool:
        """Whether a sentence of this name exists."""
        return self._find(name) is not None

    def is_group(self, name: str) -> bool:
        """Whether the name stands for a group of sentences."""
        return isinstance(self._find(name), dict)

    def count(self, number: int) -> str:
        """A small number in words at the head of a sentence, else in figures."""
        words = self.words("numbers")
        return words[number] if number < len(words) else str(number)

    def named(self, group: str, word: str) -> str:
        """The text for one of a table's set words; the word itself where the file has none."""
        name = f"{group}.{word}"
        return self.say(name) if self.has(name) else word.replace("_", " ")

    def _find(self, name: str) -> Any:
        for tree in (self._own, self._first):
            found: Any = tree
            for part in name.split("."):
                found = found.get(part) if isinstance(found, dict) else None
            if found is not None:
                return found
        return None


@cache
def phrases(language: str = FIRST, folder: Path = FOLDER) -> Phrases:
    """The sentences of a language. A language without a file: ValueError."""
    if language not in languages(folder):
        known = ", ".join(languages(folder))
        raise ValueError(f'there are no words for "{language}"; known: {known}')
    own, first = (read_shipped(folder / f"{name}.yaml") for name in (language, FIRST))
    return Phrases(language, own, first)


def languages(folder: Path = FOLDER) -> list[str]:
    """Languages that have a words file."""
    return sorted(path.stem for path in folder.glob("*.yaml"))
