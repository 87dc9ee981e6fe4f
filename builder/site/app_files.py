"""Reads the field app's sources and makes of them the files a browser gets."""

from __future__ import annotations

import json
import posixpath
import re
from collections.abc import Iterable, Mapping
from pathlib import Path

from builder.rows import read_shipped
from builder.site.icons import icons
from builder.site.join import joined
from builder.site.slim import slim_script, slim_style
from builder.site.specifiers import imports_of, relative_imports

APP = Path(__file__).resolve().parent.parent / "app"
MAIN = "app/js/main.js"
FONT_URL = re.compile(r"""url\(\s*["']?([^"')]+\.woff2)["']?\s*\)""")


def app_files(app: Path = APP) -> dict[str, bytes]:
    """Path in the site → content, for everything under app/.

    app  the source folder: js, css, words, vendor

    Raises FileNotFoundError where the libraries have not been fetched, KeyError for an import of a
    library that is not among them, ValueError for a words file with problems.
    """
    libraries = _libraries(app)
    scripts = {
        f"app/{path.relative_to(app).as_posix()}": slim_script(path.read_text("utf-8"))
        for path in sorted((app / "js").rglob("*.js"))
    }
    needed = _needed(scripts.values(), app, libraries)
    scripts.update({path: (app / path.removeprefix("app/")).read_text("utf-8") for path in needed})
    scripts = {path: relative_imports(text, path, libraries) for path, text in scripts.items()}
    files = {path: text.encode() for path, text in joined(scripts, MAIN).items()}
    for name, style in _styles(app).items():
        files[f"app/css/{name}"] = style.encode()
        files.update(_fonts(style, app))
    files.update({f"app/words/{name}": text for name, text in _words(app).items()})
    files.update({f"app/icons/{name}": picture for name, picture in icons().items()})
    files["app/vendor/licences.txt"] = (app / "vendor" / "licences.txt").read_bytes()
    return files


def _styles(app: Path) -> dict[str, str]:
    """The style sheets: the app's as one, the Book's apart, the tokens for both."""
    read = {path.stem: path.read_text("utf-8") for path in sorted((app / "css").glob("*.css"))}
    book, tokens = read.pop("book"), read.pop("tokens")
    first, last = read.pop("app", ""), read.pop("shapes", "")
    whole = slim_style("\n".join([tokens, first, *read.values(), last]))
    return {"app.css": whole, "book.css": slim_style(tokens + "\n" + book)}


def _libraries(app: Path) -> dict[str, str]:
    """Library name → its path in the site."""
    listed = app / "vendor" / "imports.json"
    if not listed.is_file():
        raise FileNotFoundError(
            f"the app's libraries are not in {listed.parent}; python hatch_build.py fetches them"
        )
    names: dict[str, str] = json.loads(listed.read_text("utf-8"))
    return {name: f"app/vendor/{file}" for name, file in names.items()}


def _needed(scripts: Iterable[str], app: Path, libraries: Mapping[str, str]) -> list[str]:
    """Paths of the libraries that the scripts import, and that those import in turn."""
    found: list[str] = []
    texts = list(scripts)
    while texts:
        for name in imports_of(texts.pop()):
            path = None if name.startswith(".") else libraries[name]
            if path and path not in found:
                found.append(path)
                texts.append((app / path.removeprefix("app/")).read_text("utf-8"))
    return sorted(found)


def _fonts(style: str, app: Path) -> dict[str, bytes]:
    """The font files a style sheet names."""
    names = {posixpath.basename(url) for url in FONT_URL.findall(style)}
    folder = app / "vendor" / "fonts"
    return {f"app/vendor/fonts/{name}": (folder / name).read_bytes() for name in sorted(names)}


def _words(app: Path) -> dict[str, bytes]:
    """The words of each language as JSON, and the list of languages with their own names."""
    files, languages = {}, {}
    for path in sorted((app / "words").glob("*.yaml")):
        words = read_shipped(path)
        languages[path.stem] = words["language"]
        files[f"{path.stem}.json"] = _json(words)
    files["languages.json"] = _json(languages)
    return files


def _json(data: object) -> bytes:
    return json.dumps(data, ensure_ascii=False, sort_keys=True, separators=(",", ":")).encode()
