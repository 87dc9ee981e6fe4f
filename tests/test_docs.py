"""Every command in the docs exists, and every command that exists is in the docs."""

import argparse
import re
import shlex
from pathlib import Path

import pytest

from builder.cli import parser

ROOT = Path(__file__).parent.parent
PAGES = [ROOT / "README.md", ROOT / "DEVELOPERS.md", *sorted((ROOT / "docs").glob("*.md"))]
FENCE = re.compile(r"^```sh\n(.*?)^```", re.MULTILINE | re.DOTALL)
INLINE = re.compile(r"`((?:beltbook|make) [^`\n]+)`")
LINK = re.compile(r"\]\(([^)#:]+)\)")


def commands_in(text):
    """Command lines of fenced sh blocks and of inline code."""
    for block in FENCE.findall(text):
        for line in block.splitlines():
            if line.strip() and not line.startswith("#"):
                yield line
    yield from INLINE.findall(text)


def command_names():
    """Every registered command."""
    (commands,) = [
        action for action in parser()._actions if isinstance(action, argparse._SubParsersAction)
    ]
    return list(commands.choices)


def wrong_with(line):
    """Why a documented command line could not be run; None when it could."""
    words = shlex.split(line, comments=True)
    if words[:1] == ["beltbook"]:
        if "COMMAND" in words or (len(words) == 2 and words[1] in command_names()):
            return None  # the command is spoken of, not run
        try:
            parser().parse_args(words[1:])
        except SystemExit as stop:
            return None if stop.code == 0 else f"beltbook does not understand: {line}"
    elif words[:1] == ["make"]:
        targets = re.findall(r"^(\w+):", (ROOT / "Makefile").read_text(), re.MULTILINE)
        if words[1] not in targets:
            return f"make has no target {words[1]}"
    return None


def test_every_command_in_the_docs_exists():
    seen, wrong = 0, []
    for page in PAGES:
        for line in commands_in(page.read_text(encoding="utf-8")):
            seen += 1
            if said := wrong_with(line):
                wrong.append(f"{page.name}: {said}")
    assert seen >= 20
    assert wrong == []


@pytest.mark.parametrize(
    "line", ["beltbook biuld keydata/x", "beltbook check --loudly x", "make tset"]
)
def test_a_wrong_command_is_caught(line, capsys):
    assert wrong_with(line)
    capsys.readouterr()


def test_every_command_is_in_the_docs():
    text = "\n".join(page.read_text(encoding="utf-8") for page in PAGES)
    assert len(command_names()) >= 5
    assert [name for name in command_names() if f"beltbook {name}" not in text] == []


def test_links_between_pages_lead_somewhere():
    seen = 0
    for page in PAGES:
        for link in LINK.findall(page.read_text(encoding="utf-8")):
            seen += 1
            assert (page.parent / link).exists(), f"{page.name}: {link}"
    assert seen >= 10
