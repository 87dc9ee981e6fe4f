"""What cannot be true is refused with a sentence: no NaN, no infinity, no silent clamp."""

import json
import math
import re
from pathlib import Path

import pytest

from builder.formulas import cover, production, seeding, terrain, texture
from builder.formulas.refusal import SENTENCES, RefusedError
from tests.formulas.test_goldens import blocks, call, plain

ARRAY_TOPICS = {"diversity", "fidelity"}
"""They take whole tables of plots from the builder's own reader, never a person's typing."""


def poisoned(given):
    """Every way to put NaN or infinity in place of one number of the arguments."""
    for name, value in given.items():
        if isinstance(value, bool) or name == "digits":
            continue
        if isinstance(value, (int, float)):
            yield name, {**given, name: "NaN"}
            yield name, {**given, name: "Infinity"}
        if isinstance(value, list) and value and isinstance(value[0], (int, float)):
            yield name, {**given, name: [*value[:-1], "NaN"]}


def finite(value):
    if isinstance(value, dict):
        return all(finite(each) for each in value.values())
    if isinstance(value, list):
        return all(finite(each) for each in value)
    return not isinstance(value, float) or math.isfinite(value)


def test_no_formula_lets_a_nan_or_infinity_through():
    tried, through = 0, []
    for _, formula, cases in blocks():
        if formula.split(".")[0] in ARRAY_TOPICS:
            continue
        for case in cases[:3]:
            if "out" not in case:
                continue
            for name, given in poisoned(case["in"]):
                tried += 1
                try:
                    call(formula, given)
                except RefusedError:
                    continue
                through.append((formula, name))
    assert tried > 300
    assert sorted(set(through)) == []


def test_no_golden_answer_holds_a_nan():
    seen = 0
    for _, formula, cases in blocks():
        if formula.split(".")[0] in ARRAY_TOPICS:
            continue
        for case in cases:
            if "out" in case:
                seen += 1
                assert finite(plain(call(formula, case["in"]))), formula
    assert seen > 500


@pytest.mark.parametrize(
    ("wrong", "word"),
    [
        (lambda: seeding.viable_share(85), "0.85"),
        (lambda: seeding.pls_share(1.2, 0.8), "at most 1"),
        (lambda: terrain.heat_load(40, 10, 400), "360"),
        (lambda: terrain.heat_load(40, 0, 120), "no aspect"),
        (lambda: terrain.heat_load(91, 10, 120), "-90 and 90"),
        (lambda: texture.texture_class(40, 30, 20), "add up to 90"),
        (lambda: cover.wilson_interval(0, 0, 0.9), "no plots"),
        (lambda: production.year_share(-0.1, 1.1), "below zero"),
    ],
)
def test_the_sentence_says_what_is_wrong(wrong, word):
    with pytest.raises(RefusedError, match=re.escape(word)) as no:
        wrong()
    assert isinstance(no.value, ValueError)


def test_sentences_are_sentences():
    for key, text in SENTENCES.items():
        assert re.fullmatch(r"[a-z_0-9]+", key)
        assert text[0].isupper() or text.startswith("{"), key
        assert text.endswith("."), key


def test_the_phone_knows_only_keys_that_have_a_sentence():
    core = Path(__file__).parents[2] / "builder" / "app" / "js" / "core"
    used = set()
    for path in core.glob("*.js"):
        used |= set(re.findall(r"refuse\(\s*'([a-z_]+)'", path.read_text(encoding="utf-8")))
    assert len(used) > 30
    assert used <= set(SENTENCES)


def test_goldens_are_strict_json():
    folder = Path(__file__).parents[1] / "goldens"
    for path in folder.glob("*.json"):
        json.loads(path.read_text(encoding="utf-8"), parse_constant=pytest.fail)
