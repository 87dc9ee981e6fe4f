"""Joins the scripts the app needs at once: a phone asks for one file, not a hundred.

Each module keeps its own scope: it becomes a function that gives its exports, run in the order in
which modules need each other. Scripts loaded later stay files of their own and take what they
share with the first from it.
"""

from __future__ import annotations

import json
import posixpath
import re
from collections.abc import Mapping
from dataclasses import dataclass, field

REGISTRY = "$m"
START = r"(?:^|(?<=[;}\n]))"
IMPORT = re.compile(
    START + r"import(?P<clause>[\s{*\w$,}]*?)\s*(?:\bfrom|(?<=\})from|(?=[\"']))\s*"
    r"([\"'])(?P<path>[^\"'\n]+)\2;?"
)
EXPORT_FROM = re.compile(
    START + r"export\s*(?P<clause>\*|\{[^}]*\})\s*from\s*([\"'])(?P<path>[^\"'\n]+)\2;?"
)
EXPORT_LIST = re.compile(START + r"export\s*\{(?P<names>[^}]*)\};?")
EXPORT_DEFAULT = re.compile(START + r"export\s+default\s+")
EXPORT_NAMED = re.compile(
    START + r"export\s+(?P<what>const|class|function\*?|async function\*?)\s+(?P<name>[\w$]+)"
)
EXPORT_ANY = re.compile(START + r"export\b(?!\s*[:=.])")
LATER = re.compile(r"\bimport\(\s*([\"'])([^\"'\n]+)\1\s*\)")


@dataclass
class Module:
    """One script taken apart: what it imports at once, its text, and what it exports."""

    path: str
    text: str
    needs: list[str] = field(default_factory=list)
    exports: list[str] = field(default_factory=list)


def joined(scripts: Mapping[str, str], first: str) -> dict[str, str]:
    """The scripts with everything `first` needs at once joined into it.

    scripts  path in the site → text, imports relative
    first    path of the script the page starts

    Raises ValueError for modules that need each other in a ring and for exports of a form that is
    not joined (`export let`, which may change after it was read).
    """
    order = in_order(scripts, first)
    numbers = {path: str(number) for number, path in enumerate(order)}
    parts = [f"const {REGISTRY}={{}};"]
    for path in order:
        module = taken_apart(path, scripts[path], numbers)
        text = _later_from(module.text, path, first)
        parts.append(
            f"{REGISTRY}[{numbers[path]}]=(()=>{{\n{text}\nreturn{{{','.join(module.exports)}}}}})();"
        )
    parts.append(f"export{{{REGISTRY}}};\n")
    result = {first: "\n".join(parts)}
    for path, text in scripts.items():
        if path not in numbers:
            result[path] = _shared_from_first(path, text, first, numbers)
    return result


def in_order(scripts: Mapping[str, str], first: str) -> list[str]:
    """Paths of `first` and all it needs at once, each after what it needs itself."""
    done: list[str] = []
    open_now: list[str] = []

    def visit(path: str) -> None:
        if path in done:
            return
        if path in open_now:
            ring = " → ".join([*open_now[open_now.index(path) :], path])
            raise ValueError(f"modules need each other in a ring: {ring}")
        open_now.append(path)
        for needed in needs_of(path, scripts[path]):
            visit(needed)
        open_now.pop()
        done.append(path)

    visit(first)
    return done


def needs_of(path: str, text: str) -> list[str]:
    """Paths of the scripts that one imports at once."""
    found = [*IMPORT.finditer(text), *EXPORT_FROM.finditer(text)]
    return [_absolute(path, one["path"]) for one in sorted(found, key=lambda one: one.start())]


def taken_apart(path: str, text: str, numbers: Mapping[str, str]) -> Module:
    """One module as the body of a function, and the entries of the object it gives."""
    module = Module(path, text)

    def imported(found: re.Match[str]) -> str:
        source = f"{REGISTRY}[{numbers[_absolute(path, found['path'])]}]"
        return _bindings(found["clause"], source)

    def passed_on(found: re.Match[str]) -> str:
        source = f"{REGISTRY}[{numbers[_absolute(path, found['path'])]}]"
        if found["clause"] == "*":
            module.exports.append(f"...{source}")
        else:
            pairs = _pairs(found["clause"].strip("{}"))
            module.exports += [f"{name}:{source}.{inner}" for inner, name in pairs]
        return ""

    def listed(found: re.Match[str]) -> str:
        module.exports += [
            inner if inner == name else f"{name}:{inner}" for inner, name in _pairs(found["names"])
        ]
        return ""

    def named(found: re.Match[str]) -> str:
        module.exports.append(found["name"])
        return f"{found['what']} {found['name']}"

    text = IMPORT.sub(imported, text)
    text = EXPORT_FROM.sub(passed_on, text)
    text = EXPORT_LIST.sub(listed, text)
    if EXPORT_DEFAULT.search(text):
        module.exports.append("default:$default")
        text = EXPORT_DEFAULT.sub("const $default=", text)
    module.text = EXPORT_NAMED.sub(named, text).strip()
    left = EXPORT_ANY.search(module.text)
    if left:
        raise ValueError(f"{path}: this export is not joined: {module.text[left.start() :][:60]}")
    return module


def _shared_from_first(path: str, text: str, first: str, numbers: Mapping[str, str]) -> str:
    """A script that is loaded later, taking shared modules from the first script."""
    shared: list[str] = []

    def imported(found: re.Match[str]) -> str:
        number = numbers.get(_absolute(path, found["path"]))
        if number is None:
            return found[0]
        shared.append(number)
        return _bindings(found["clause"], f"{REGISTRY}[{number}]")

    text = IMPORT.sub(imported, text)
    if any(_absolute(path, one["path"]) in numbers for one in EXPORT_FROM.finditer(text)):
        raise ValueError(f"{path} passes on a module that is joined into {first}")
    if not shared:
        return text
    return f"import{{{REGISTRY}}}from{json.dumps(_relative(path, first))};\n{text}"


def _later_from(text: str, path: str, first: str) -> str:
    """Addresses of scripts loaded later, as seen from the joined script."""
    return LATER.sub(
        lambda found: f"import({json.dumps(_relative(first, _absolute(path, found[2])))})", text
    )


def _bindings(clause: str, source: str) -> str:
    """An import clause as declarations: `x,{a as b}` → const{default:x,a:b}=…;"""
    clause = clause.strip()
    if not clause:
        return ""
    star = re.fullmatch(r"\*\s*as\s+([\w$]+)", clause)
    if star:
        return f"const {star[1]}={source};"
    default, _, names = clause.partition("{")
    entries = [f"default:{default.strip(' ,')}"] if default.strip(" ,") else []
    entries += [a if a == b else f"{a}:{b}" for a, b in _pairs(names.rstrip("} \n"))]
    return f"const{{{','.join(entries)}}}={source};"


def _pairs(names: str) -> list[tuple[str, str]]:
    """`a as b, c` → [(a, b), (c, c)]."""
    pairs = []
    for name in filter(None, (part.strip() for part in names.split(","))):
        inner, _, outer = name.partition(" as ")
        pairs.append((inner.strip(), (outer or inner).strip()))
    return pairs


def _absolute(path: str, name: str) -> str:
    return posixpath.normpath(posixpath.join(posixpath.dirname(path), name))


def _relative(path: str, target: str) -> str:
    found = posixpath.relpath(target, posixpath.dirname(path))
    return found if found.startswith(".") else f"./{found}"
