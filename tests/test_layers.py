"""The import law: a part may import what stands left of it, never right, never sideways."""

import ast
import re
from pathlib import Path

ROOT = Path(__file__).parent.parent

# Left to right. Parts in one row may not import each other; a part may import itself.
ORDER = [
    {"problems", "words"},
    {"formulas"},
    {"rows"},
    {"tables"},
    {"checks", "key"},
    {"pack", "proof"},
    {"records"},
    {"drawings"},
    {"views"},
    {"site", "booklet"},
    {"steps"},
    {"desk"},
    {"bench"},
    {"cli"},  # starts the desk, so it stands right of it
]
RANK = {part: rank for rank, parts in enumerate(ORDER) for part in parts}
ENTRY = {"__init__", "__main__"}  # the package's door: version and start, no work

# A library that only one part may know.
HOME = {"flask": "desk", "waitress": "desk", "weasyprint": "booklet", "yaml": "rows"}

JS_ORDER = ["before", "core", "store", "screens", "main"]  # before: runs ahead of the first paint
JS_IMPORT = re.compile(r"""^\s*(?:import|export)\b[^'"]*?['"]([^'"]+)['"]""", re.MULTILINE)
JS_PURE = re.compile(r"\b(document|window|indexedDB|localStorage|navigator|fetch)\b\s*[.(\[]")


def imported(path):
    """(line, dotted name) of every import in a Python file, wherever it stands."""
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            for name in node.names:
                yield node.lineno, name.name
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, f"{path}:{node.lineno}: write the import in full"
            if node.module == "builder":
                for name in node.names:
                    yield node.lineno, f"builder.{name.name}"
            else:
                yield node.lineno, node.module


def part_of(path, package):
    """The part a file belongs to: its first folder under the package, or its own name."""
    return path.relative_to(package).parts[0].removesuffix(".py")


def python_breaches(package):
    """Breaches of the law as text, and how many imports between parts were looked at."""
    breaches, seen = [], 0
    for path in sorted(package.rglob("*.py")):
        if "vendor" in path.parts:
            continue
        part = part_of(path, package)
        if part not in RANK and part not in ENTRY:
            breaches.append(f"{path}: part {part} has no place in ORDER")
            continue
        for line, name in imported(path):
            library, _, rest = name.partition(".")
            if library in HOME and HOME[library] != part:
                breaches.append(f"{path}:{line}: only {HOME[library]} may import {library}")
            if library != "builder" or not rest:
                continue
            other = rest.partition(".")[0]
            if other == part or other.startswith("__"):
                continue
            seen += 1
            if part in ENTRY or RANK.get(other, len(ORDER)) < RANK[part]:
                continue
            breaches.append(f"{path}:{line}: {part} may not import {other}")
    return breaches, seen


def js_breaches(scripts):
    """The same for the app's modules; core is held free of the page, too."""
    breaches, seen = [], 0
    for path in sorted(scripts.rglob("*.js")):
        part = path.relative_to(scripts).parts[0].removesuffix(".js")
        if part not in JS_ORDER:
            breaches.append(f"{path}: part {part} has no place in JS_ORDER")
            continue
        text = path.read_text(encoding="utf-8")
        code = re.sub(r"/\*.*?\*/|//[^\n]*", "", text, flags=re.DOTALL)
        if part == "core" and (hit := JS_PURE.search(code)):
            breaches.append(f"{path}: core touches {hit[1]}")
        for target in JS_IMPORT.findall(code):
            if not target.startswith("."):
                continue
            there = (path.parent / target).resolve()
            if not there.is_relative_to(scripts.resolve()):
                continue
            seen += 1
            other = there.relative_to(scripts.resolve()).parts[0].removesuffix(".js")
            if other != part and JS_ORDER.index(other) >= JS_ORDER.index(part):
                breaches.append(f"{path}: {part} may not import {other}")
    return breaches, seen


def test_the_builder_keeps_the_law():
    breaches, seen = python_breaches(ROOT / "builder")
    assert breaches == []
    assert seen >= 20


def test_the_app_keeps_the_law():
    breaches, seen = js_breaches(ROOT / "builder" / "app" / "js")
    assert breaches == []
    assert seen >= 5


def write(folder, files):
    for name, text in files.items():
        path = folder / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(text, encoding="utf-8")


def test_a_bad_tree_is_caught(tmp_path):
    write(
        tmp_path,
        {
            "formulas/soil.py": "from builder.rows import read\n",
            "checks/names.py": "from builder import key\n",
            "tables/zones.py": "def late():\n    import yaml\n",
            "rows.py": "import yaml\nfrom builder.problems import Problem\n",
            "desk/app.py": "import flask\nfrom builder.steps import build\n",
            "steps.py": "from builder.desk.app import create_app\n",
            "helpful.py": "",
        },
    )
    breaches, seen = python_breaches(tmp_path)
    assert seen == 5
    assert [text.partition(": ")[2] for text in breaches] == [
        "checks may not import key",
        "formulas may not import rows",
        "part helpful has no place in ORDER",
        "steps may not import desk",
        "only rows may import yaml",
    ]


def test_a_bad_app_is_caught(tmp_path):
    write(
        tmp_path,
        {
            "core/belief.js": "import { open } from '../store/db.js';\n",
            "core/page.js": "export const title = () => document.title;\n",
            "store/db.js": "// document.write\nimport { sum } from '../core/sum.js';\n",
            "main.js": "import { open } from './store/db.js';\n",
        },
    )
    breaches, seen = js_breaches(tmp_path)
    assert seen == 3
    assert [text.partition(": ")[2] for text in breaches] == [
        "core may not import store",
        "core touches document",
    ]
