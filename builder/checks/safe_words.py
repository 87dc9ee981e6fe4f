"""No text calls a plant edible, harmless or good to taste, in English or Spanish.

Passes: plants.yaml plants/0/marks: Leaf edge rough; never put any part in the mouth.
Fails: plants.yaml plants/0/marks: The young leaves are edible.
Fails: plants.yaml plants/0/note: Frutos comestibles.
Fails: questions.yaml questions/0/act: Taste the soil.
"""

from __future__ import annotations

import re
from collections.abc import Iterator

from builder.problems import Problem, problem_at
from builder.rows import Items, Node, Row, Value
from builder.tables import Loaded

ID = "safe-words"
NEEDS = ()
SAFE = re.compile(
    r"""(?xi)
      \b(?:edible | eatable | harmless | non-?toxic | non-?poisonous | medicinal(?:es)?)\b
    | \bnot\s(?:poisonous|toxic|deadly)\b
    | \b(?:tasty|delicious|palatable\sto\s(?:people|man)|good\seating)\b
    | \b(?:good|nice|safe|sweet|pleasant|fine)\sto\s(?:eat|taste|chew|drink|touch|handle)\b
    | \b(?:can|may)\sbe\s(?:eaten|chewed|tasted|drunk)\b
    | (?:^|[.;:!?]\s)(?:eat|chew|taste|nibble|lick)\s(?:the|a|its|some|it|this)\b
    | \b(?:tastes?|tasting)\s(?:of|like|sweet|good|bitter|salty|sour)\b
    | \beaten\s(?:raw|cooked|by\speople)\b
    | \b(?:used\s)?as\s(?:food|tea|a\sremedy)\b
    | \bmakes?\s(?:a\s)?(?:good|fine|nice)\s(?:tea|jam|jelly|food|salad)\b
    | \bsafe\sfor\s(?:people|children|dogs)\b
    | \b(?:comestibles?|inofensiv[oa]s?|sabros[oa]s?|sabor\sagradable)\b
    | \bno\s(?:(?:es|son)\s)?(?:venenos|tóxic)[oa]s?\b
    | \bse\s(?:puede|pueden)\scomer\b
    | \b(?:buen[oa]s?\spara\scomer|apt[oa]s?\spara\s(?:el\s)?consumo)\b
    | \b(?:sabe\sa|prueb[ae]\s(?:la|el|un|una))\b
    """,
)
NOT_SAID = re.compile(r"(?i)\b(never|do not|don't|nothing|no|nunca)\W+(?:\w+\W+){0,2}$")
SKIPPED = {"id", "scientific", "synonyms", "codes", "members", "lookalikes"}


def check(loaded: Loaded) -> Iterator[Problem]:
    """Sentences that would let a hand go to the mouth; "never taste" is fine."""
    roots: list[Node] = [root for root in loaded.roots.values() if root is not None]
    if loaded.partial is not None:
        roots += [words.row for words in loaded.partial.words.values()]
    for root in roots:
        for value in _texts(root):
            text = str(value.value)
            for hit in SAFE.finditer(text):
                if not NOT_SAID.search(text[: hit.start()]):
                    yield problem_at(
                        value.at,
                        ID,
                        f'the text says "{hit[0]}"',
                        "Say how the plant looks; never that it is safe or tastes.",
                    )
                    break


def _texts(node: Node) -> Iterator[Value]:
    if isinstance(node, Value):
        if isinstance(node.value, str):
            yield node
    elif isinstance(node, Items):
        for below in node:
            yield from _texts(below)
    elif isinstance(node, Row):
        for name, below in node.items():
            if name not in SKIPPED:
                yield from _texts(below)
