"""The check on safe words knows what must not be said, and what may."""

import pytest

from builder.checks.safe_words import NOT_SAID, SAFE


def said(text):
    """Whether the check would stop at a text."""
    return any(not NOT_SAID.search(text[: hit.start()]) for hit in SAFE.finditer(text))


@pytest.mark.parametrize(
    "text",
    [
        "Edible when cooked.",
        "The berries are harmless.",
        "A tasty root.",
        "Leaves taste of lemon.",
        "Safe to eat in autumn.",
        "Not poisonous.",
        "Non-toxic.",
        "May be chewed.",
        "Good eating.",
        "Eaten raw by hunters.",
        "Makes a good tea.",
        "An old medicinal plant.",
        "Safe for dogs.",
        "Chew the stem to tell.",
        "Nuts good to eat.",
        "Frutos comestibles.",
        "No es venenosa.",
        "Se pueden comer.",
        "Inofensiva.",
        "Planta medicinal.",
        "Pruebe la hoja.",
        "Sabe a limón.",
    ],
)
def test_what_must_not_be_said_is_found(text):
    assert said(text)


@pytest.mark.parametrize(
    "text",
    [
        "Never taste soil.",
        "Do not eat any part.",
        "Nothing here is edible.",
        "Pinus edulis",
        "Poisonous to stock.",
        "The seeds are large and wingless.",
        "Wash hands before food.",
        "Inedible spines.",
        "Feel and smell the crushed leaf.",
        "Nunca pruebe la planta.",
        "Cattle eat it late.",
        "Floods bring silt, seed and food.",
        "Rust and grey mottles.",
    ],
)
def test_what_may_be_said_passes(text):
    assert not said(text)
