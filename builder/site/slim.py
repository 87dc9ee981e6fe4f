"""Takes comments and indentation out of scripts and styles; names and order stay as written.

The phone gets half the bytes and the same program: strings, templates and regular expressions are
copied letter by letter.
"""

from __future__ import annotations

import re

TOKEN = re.compile(
    r"""(?P<comment>//[^\n]*|/\*.*?\*/)
      | (?P<string>'(?:\\.|[^'\\\n])*'|"(?:\\.|[^"\\\n])*")
      | (?P<space>\s+) | (?P<run>[^\s/'"`{}]+) | (?P<tick>`) | (?P<slash>/) | (?P<other>.)""",
    re.VERBOSE | re.DOTALL,
)
TEMPLATE = re.compile(r"(?:\\.|[^`\\$]|\$(?!\{))*(?P<end>`|\$\{)", re.DOTALL)
REGEX = re.compile(r"/(?:\\.|\[(?:\\.|[^\]\\\n])*\]|[^/\\\[\n])+/\w*")
BEFORE_REGEX = re.compile(r"(?:^|[(,=:\[!&|?{};+\-*%<>~^]|\b(?:return|typeof|case|of|in))$")
CSS_PART = re.compile(
    r"""(?P<comment>/\*.*?\*/)|(?P<string>'[^'\n]*'|"[^"\n]*")|(?P<space>\s+)""", re.DOTALL
)


def slim_script(text: str) -> str:
    """The same program without comments and indentation.

    Raises ValueError where a template or bracket is left open.
    """
    kept: list[str] = []
    last = ""  # the last token that is neither space nor comment
    gap = ""  # what stood between it and the next: "", " " or a line end
    open_brackets: list[str] = []
    at = 0
    while at < len(text):
        token = TOKEN.match(text, at)
        assert token is not None  # the last alternative takes any character
        kind, piece = token.lastgroup, token[0]
        if kind in ("space", "comment"):
            gap = "\n" if "\n" in gap + piece else " "
            at = token.end()
            continue
        if kind == "tick" or (piece == "}" and open_brackets and open_brackets[-1] == "${"):
            if piece == "}":
                open_brackets.pop()
            piece = _template(text, at, open_brackets)
        elif kind == "slash" and BEFORE_REGEX.search(last):
            expression = REGEX.match(text, at)
            piece = expression[0] if expression else piece
        elif piece == "{":
            open_brackets.append(piece)
        elif piece == "}":
            if not open_brackets:
                raise ValueError(f"a bracket closes that never opened, at character {at}")
            open_brackets.pop()
        kept.append(_between(last, gap, piece) + piece)
        last, gap = piece, ""
        at += len(piece)
    if open_brackets:
        raise ValueError("a bracket or template is left open")
    return "".join(kept) + "\n"


def _template(text: str, at: int, open_brackets: list[str]) -> str:
    """A template from its tick, or from the brace that ends an inset, to the next inset or end."""
    found = TEMPLATE.match(text, at + 1)
    if found is None:
        raise ValueError(f"a template is left open at character {at}")
    if found["end"] == "${":
        open_brackets.append("${")
    return text[at : found.end()]


def _between(last: str, gap: str, piece: str) -> str:
    """What stays between two tokens: a line end always, a space where words or signs would join."""
    if gap == "\n":
        return "\n" if last else ""
    if not gap or not last:
        return ""
    words = _wordlike(last[-1]) and _wordlike(piece[0])
    signs = last[-1] in "+-" and piece[0] in "+-"
    regex = last[-1] == "/" or piece[0] == "/"
    return " " if words or signs or regex else ""


def _wordlike(letter: str) -> bool:
    return letter.isalnum() or letter in "_$"


def slim_style(text: str) -> str:
    """The same style sheet without comments and indentation."""

    def piece(found: re.Match[str]) -> str:
        if found.lastgroup == "string":
            return found[0]
        if found.lastgroup == "comment":
            return ""
        return "\n" if "\n" in found[0] else " "

    return re.sub(r"\n+", "\n", CSS_PART.sub(piece, text)).strip() + "\n"
