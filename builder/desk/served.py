"""Serves the built field app and booklet as any static host would.

ETags come from the content: one from the clock would hide a rebuild made in the same second.
"""

from __future__ import annotations

import hashlib
from pathlib import Path

from flask import Blueprint, Response, abort, current_app, redirect, request, url_for
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
    content = path.read_bytes()
    kind = TYPES.get(path.suffix.lower(), "application/octet-stream")
    answer = Response(content, content_type=kind)
    answer.set_etag(hashlib.sha256(content).hexdigest()[:32])
    answer.headers["Cache-Control"] = "no-cache"
    answer.make_conditional(request, accept_ranges=True, complete_length=len(content))
    return answer
