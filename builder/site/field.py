"""Writes field.html: the whole app, its tables and fonts in one file that needs no server.

Modules lie in an import map as `data:` addresses, everything else inline; a policy in the page
allows exactly these texts by their hashes.
"""

from __future__ import annotations

import base64
import json
import posixpath
import re
from collections.abc import Mapping
from dataclasses import dataclass

from builder.site.app_files import FONT_URL, MAIN
from builder.site.policy import single_file_policy
from builder.site.specifiers import named_imports

FIRST_SCRIPT = "app/js/before.js"


@dataclass(frozen=True)
class Inline:
    """What field.html carries inside.

    policy   content security policy of the page
    imports  text of the import map
    style    text of the one style sheet
    before   script that runs before first paint
    start    script that starts the app
    inside   path and text of each file the app reads
    icon     address of the icon
    """

    policy: str
    imports: str
    style: str
    before: str
    start: str
    inside: list[tuple[str, str]]
    icon: str


def inline(files: Mapping[str, bytes], sheet: str) -> Inline:
    """Everything of the site that the single file needs.

    files  the site's files
    sheet  path of the app's style sheet
    """
    modules = {
        path: _address("text/javascript", named_imports(content.decode(), path).encode())
        for path, content in sorted(files.items())
        if path.endswith(".js") and path not in (FIRST_SCRIPT, "sw.js")
    }
    imports = json.dumps({"imports": modules}, separators=(",", ":"))
    style = _with_fonts(files[sheet].decode(), sheet, files)
    before = files[FIRST_SCRIPT].decode()
    start = f'import "{MAIN}";'
    return Inline(
        policy=single_file_policy([imports, before, start], [style]),
        imports=imports,
        style=style,
        before=before,
        start=start,
        inside=[
            (path, _inert(content.decode()))
            for path, content in sorted(files.items())
            if path.endswith(".json")
        ],
        icon=_address("image/svg+xml", files["app/icons/icon.svg"]),
    )


def inert_files(files: Mapping[str, bytes]) -> dict[str, bytes]:
    """The JSON files as they will stand inside the page, so that their hashes can be listed."""
    return {
        path: _inert(content.decode()).encode()
        for path, content in files.items()
        if path.endswith(".json")
    }


def _inert(text: str) -> str:
    """JSON that cannot end the element it stands in; the data stay the same."""
    return text.replace("<", "\\u003c")


def _with_fonts(style: str, path: str, files: Mapping[str, bytes]) -> str:
    def inside(found: re.Match[str]) -> str:
        font = posixpath.normpath(posixpath.join(posixpath.dirname(path), found[1]))
        return f'url("{_address("font/woff2", files[font])}")'

    return FONT_URL.sub(inside, style)


def _address(kind: str, content: bytes) -> str:
    return f"data:{kind};base64,{base64.b64encode(content).decode()}"
