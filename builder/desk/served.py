"""Serves the built field app and booklet as any static host would.

ETags come from the content: one from the clock would hide a rebuild made in the same second.
"""

from __future__ import annotations

import hashlib
from pathlib import Path

from flask import Blueprint, Response, abort, current_app, redirect, request, send_file, url_for
from werkzeug.security import safe_join
from werkzeug.wrappers import Response as BaseResponse

TYPES = {
    ".html": "text/html; charset=utf-8",
    ".js": "text/javascript; charset=utf-8",
    ".mjs": "text/javascript; charset=utf-8",
    ".css": "text/css; charset=utf-8",
    ".json": "application/json",
    ".webmanifest": "application/manifest+json",
    ".svg": "image/svg+xml",
    ".png": "image/png",
    ".ico": "image/x-icon",
    ".woff2": "font/woff2",
    ".pdf": "application/pdf",
    ".txt": "text/plain; charset=utf-8",
    ".xml": "application/xml",
}

pages = Blueprint("field", __name__, url_prefix="/field")
_hashes: dict[tuple[str, int, int, int], str] = {}


def content_hash(path: Path) -> str:
    """First 32 hex digits of the file's SHA-256, remembered while the file is untouched.

    The change time is part of the memory: a reproducible build may set the modification time.
    """
    stat = path.stat()
    key = (str(path), stat.st_ino, stat.st_ctime_ns, stat.st_size)
    if key not in _hashes:
        if len(_hashes) > 5_000:
            _hashes.clear()
        with path.open("rb") as file:
            _hashes[key] = hashlib.file_digest(file, "sha256").hexdigest()[:32]
    return _hashes[key]


def confined(folder: Path, name: str) -> Path:
    """The file under a folder, or 404: no way up, no way out through a link."""
    joined = safe_join(str(folder), name)
    if joined is None:
        abort(404)
    path = Path(joined)
    if path.is_dir():
        path = path / "index.html"
    if not path.is_file() or not path.resolve().is_relative_to(folder.resolve()):
        abort(404)
    return path


@pages.get("")
def bare() -> BaseResponse:
    """The app's links are relative, so its address ends in a slash."""
    return redirect(url_for("field.send", name=""))


@pages.get("/", defaults={"name": ""})
@pages.get("/<path:name>")
def send(name: str) -> Response:
    """One file of the built site."""
    folder: Path = current_app.config["OUT"]
    if any(part.startswith(".") for part in name.split("/")):
        abort(404)
    path = confined(folder, name)
    kind = TYPES.get(path.suffix.lower(), "application/octet-stream")
    answer = send_file(path.resolve(), mimetype=kind, etag=False, conditional=False)
    answer.last_modified = None
    answer.set_etag(content_hash(path))
    answer.headers["Cache-Control"] = "no-cache"
    answer.make_conditional(request, accept_ranges=True, complete_length=path.stat().st_size)
    return answer
