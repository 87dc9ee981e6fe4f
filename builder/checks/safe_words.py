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
    \b(?:edible|eatable|harmless|non-?toxic|non-?poisonous|not\ (?:poisonous|toxic|deadly)
      | palatable\ to\ (?:people|man) | tasty | delicious | (?:good|nice|safe|sweet|pleasant)\ to\
      (?:eat|taste|chew|drink|touch|handle) | can\ be\ (?:eaten|chewed|tasted|drunk)
      | may\ be\ (?:eaten|chewed|tasted) | (?:eat|chew|taste|nibble|lick)\ (?:the|a|its|some|it)\b
      | (?:tastes?|tasting)\ (?:of|like|sweet|good|bitter|salty|sour)
      | comestibles? | inofensiv[oa]s? | no\ (?:es\ )?(?:venenos|tóxic)[oa]s?
      | sabros[oa]s? | se\ (?:puede|pueden)\ comer | bueno?s?\ para\ comer | sabor\ agradable
      | sabe\ a\b | prueb[ae]\ (?:la|el|un|una)\b
    )""",
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
