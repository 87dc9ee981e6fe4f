"""What stands between the desk and the rest of the network.

Host check (Flask's TRUSTED_HOSTS), origin check and form token on every write, size limits, a login
when the desk is opened beyond this computer, and the headers each answer carries.
"""

from __future__ import annotations

import hmac
import secrets
import time
from urllib.parse import urlsplit

from flask import Flask, Request, Response, abort, redirect, request, session, url_for
from werkzeug.wrappers import Response as BaseResponse

from builder.site.policy import app_policy

LOOPBACK_HOSTS = ["127.0.0.1", "localhost"]
READS = {"GET", "HEAD", "OPTIONS"}
KEYED = {"upload.receive"}  # phones have neither session nor form; each has a key of its own
OPEN_ENDPOINTS = {"account.login", "static", None, *KEYED}

MEGABYTE = 1_000_000
LIMITS = {
    "MAX_CONTENT_LENGTH": 2 * MEGABYTE,  # the largest table typed by hand so far is 0.1 MB
    "MAX_FORM_MEMORY_SIZE": 2 * MEGABYTE,
    "MAX_FORM_PARTS": 5_000,
}
UPLOAD_LIMIT = 32 * MEGABYTE  # a season of plots as a spreadsheet is about 5 MB
UPLOADS = {"sheets.receive", "flat.receive", "records.receive", *KEYED}

DESK_POLICY = (
    "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; "
    "font-src 'self'; connect-src 'self'; frame-src 'self'; object-src 'self'; "
    "form-action 'self'; frame-ancestors 'self'; base-uri 'none'"
)
FRAME = "frame-ancestors 'self'"
SINGLE_FILE = "/field/field.html"  # holds its own policy, with the hashes of what is inside it
HEADERS = {
    "X-Content-Type-Options": "nosniff",
    "X-Frame-Options": "SAMEORIGIN",
    "Referrer-Policy": "same-origin",
    "Cross-Origin-Opener-Policy": "same-origin",
    "Cross-Origin-Resource-Policy": "same-origin",
}
NOTHING_ALLOWED = "camera=(), geolocation=(), microphone=()"
FIELD_ALLOWED = "camera=(self), geolocation=(self), microphone=()"


def form_token() -> str:
    """The token of this browser's session, made on first use."""
    if "token" not in session:
        session["token"] = secrets.token_urlsafe(32)
    return str(session["token"])


def same_origin(asked: Request) -> bool:
    """Whether a write comes from a page of this very desk, as far as the browser says.

    Browsers send Sec-Fetch-Site and, on writes, Origin; a program that sends neither still needs
    the form token.
    """
    if asked.headers.get("Sec-Fetch-Site", "same-origin") != "same-origin":
        return False
    origin = asked.headers.get("Origin")
    if origin is None:
        return True
    there = urlsplit(origin)
    return (there.scheme, there.netloc.lower()) == (asked.scheme, asked.host.lower())


def refuse_foreign_writes() -> None:
    """Stops a write that does not come from one of the desk's own forms."""
    if request.method in READS:
        return
    if request.endpoint in UPLOADS:
        request.max_content_length = UPLOAD_LIMIT
    if request.endpoint in KEYED:
        return
    if not same_origin(request):
        abort(403, "foreign-origin")
    given = request.headers.get("X-Desk-Token") or request.form.get("token", "")
    known = session.get("token", "")
    if not known or not hmac.compare_digest(str(given).encode(), str(known).encode()):
        abort(403, "old-form")


def ask_for_login(app: Flask) -> BaseResponse | None:
    """Sends a stranger to the login page when the desk is open to a network."""
    if not app.config["ACCOUNTS"] or request.endpoint in OPEN_ENDPOINTS:
        return None
    if session.get("account") in app.config["ACCOUNTS"]:
        return None
    if request.method in READS:
        return redirect(url_for("account.login"))
    abort(401)


def policy(path: str) -> str:
    """The content policy of an address: the app's own for the app, the desk's for all else."""
    if path == SINGLE_FILE or path.endswith(".pdf"):  # browsers show a PDF with parts of their own
        return FRAME
    if path.startswith("/field/"):
        return f"{app_policy()}; {FRAME}"
    return DESK_POLICY


def add_headers(answer: Response) -> Response:
    """Policy headers on every answer; the field app may use camera and position, the desk not."""
    field = request.path.startswith("/field/")
    answer.headers.update(HEADERS)
    answer.headers["Content-Security-Policy"] = policy(request.path)
    answer.headers["Permissions-Policy"] = FIELD_ALLOWED if field else NOTHING_ALLOWED
    if not field and request.endpoint != "static":
        answer.headers["Cache-Control"] = "no-store"
    return answer


class Patience:
    """Counts failed logins per address; too many, and the address waits.

    tries      failures allowed in a window
    window_s   how long a failure counts [s]
    """

    def __init__(self, tries: int = 5, window_s: float = 300.0) -> None:
        self.tries, self.window_s = tries, window_s
        self.failures: dict[str, list[float]] = {}

    def worn_out(self, address: str) -> bool:
        """Whether this address has to wait."""
        since = time.monotonic() - self.window_s
        recent = [at for at in self.failures.get(address, []) if at > since]
        self.failures[address] = recent
        return len(recent) >= self.tries

    def failed(self, address: str) -> None:
        """Notes one failure; forgets the oldest address when very many have tried."""
        if len(self.failures) > 10_000:
            self.failures.pop(next(iter(self.failures)))
        self.failures.setdefault(address, []).append(time.monotonic())


def guard(app: Flask, hosts: list[str]) -> None:
    """Puts every guard on an application. hosts: the names it may be called by."""
    app.config.update(LIMITS, TRUSTED_HOSTS=hosts)
    app.config.update(
        SECRET_KEY=secrets.token_bytes(32),  # lives as long as the process, so none is stored
        SESSION_COOKIE_NAME="beltbook_desk",
        SESSION_COOKIE_HTTPONLY=True,
        SESSION_COOKIE_SAMESITE="Strict",
    )
    app.before_request(refuse_foreign_writes)
    app.before_request(lambda: ask_for_login(app))
    app.after_request(add_headers)
    app.jinja_env.globals["form_token"] = form_token
