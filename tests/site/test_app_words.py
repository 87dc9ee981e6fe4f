"""The words of the screens: every key asked for is there, each language says the same things."""

import re

import pytest

from builder.rows import plain, read_yaml
from builder.site.app_files import APP

LANGUAGES = sorted(path.stem for path in (APP / "words").glob("*.yaml"))
ASKED = re.compile(r"""\bt\(\s*'([a-z_]+(?:\.[a-z_0-9]+)+)'""")
PLURALS = {"zero", "one", "two", "few", "many", "other"}


def flat(table, above=""):
    """Dotted key → sentence; a plural entry is one key with its forms joined."""
    found = {}
    for key, value in table.items():
        name = f"{above}{key}"
        if isinstance(value, dict) and not set(value) <= PLURALS:
            found |= flat(value, f"{name}.")
        else:
            found[name] = " ".join(value.values()) if isinstance(value, dict) else value
    return found


def words(language):
    root, problems = read_yaml(APP / "words" / f"{language}.yaml", language)
    assert problems == []
    return flat(plain(root))


def places(sentence):
    return set(re.findall(r"\{(\w+)\}", sentence or ""))


def test_every_key_that_a_screen_asks_for_is_there():
    there = words("en")
    asked = {
        key: path.name
        for path in (APP / "js").rglob("*.js")
        for key in ASKED.findall(path.read_text("utf-8"))
    }
    assert len(asked) > 300
    assert {key: file for key, file in asked.items() if key not in there} == {}


def test_a_missing_key_would_be_seen():
    assert ASKED.findall("t('sites.no_such_key')") == ["sites.no_such_key"]
    assert "sites.no_such_key" not in words("en")


@pytest.mark.parametrize("language", [one for one in LANGUAGES if one != "en"])
def test_a_language_says_nothing_english_does_not(language):
    english, other = words("en"), words(language)
    assert set(other) - set(english) == set()
    wrong = {key for key, sentence in other.items() if places(sentence) - places(english[key])}
    assert wrong == set()
    assert len(other) > 0.9 * len(english)
