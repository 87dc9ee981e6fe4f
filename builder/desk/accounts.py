"""Accounts of a desk that is open to a network: names and password hashes in one private file."""

from __future__ import annotations

import json
import os
from pathlib import Path

from flask import (
    Blueprint,
    abort,
    current_app,
    redirect,
    render_template,
    request,
    session,
    url_for,
)
from werkzeug.security import check_password_hash, generate_password_hash
from werkzeug.wrappers import Response

from builder.desk.guards import Patience
from builder.desk.phrases import read_phrases

SHORTEST_PASSWORD = 12
# Compared when the name is unknown, so that the answer takes as long as for a known one.
NOBODY = generate_password_hash("nobody has this account")

pages = Blueprint("account", __name__)


def read_accounts(path: Path) -> dict[str, str]:
    """name → password hash; empty when there is no file."""
    if not path.is_file():
        return {}
    read = json.loads(path.read_text(encoding="utf-8"))
    return {str(name): str(hashed) for name, hashed in read.items()}


def add_account(path: Path, name: str, password: str) -> None:
    """Adds or replaces one account. Raises ValueError when name or password will not do."""
    if not name.strip() or len(name) > 60:
        raise ValueError("an account needs a name of 1 to 60 letters")
    if len(password) < SHORTEST_PASSWORD:
        raise ValueError(f"a password needs {SHORTEST_PASSWORD} letters or more")
    known = read_accounts(path) | {name: generate_password_hash(password)}
    path.parent.mkdir(parents=True, exist_ok=True)
    fresh = path.with_suffix(".new")
    with os.fdopen(os.open(fresh, os.O_CREAT | os.O_TRUNC | os.O_WRONLY, 0o600), "w") as file:
        json.dump(known, file, indent=1, sort_keys=True)
    fresh.replace(path)


@pages.route("/login", methods=["GET", "POST"])
def login() -> str | Response | tuple[str, int]:
    """The login page; on success the person goes to the overview."""
    accounts: dict[str, str] = current_app.config["ACCOUNTS"]
    if not accounts:
        abort(404)
    if request.method == "GET":
        return render_template("login.html", refused=None)
    say = read_phrases()["login"]
    patience: Patience = current_app.extensions["patience"]
    address = request.remote_addr or "unknown"
    if patience.worn_out(address):
        return render_template("login.html", refused=say["wait"]), 429
    name = request.form.get("name", "")
    right = check_password_hash(accounts.get(name, NOBODY), request.form.get("password", ""))
    if not right or name not in accounts:
        patience.failed(address)
        return render_template("login.html", refused=say["wrong"]), 403
    session.clear()
    session["account"] = name
    return redirect(url_for("overview.home"))


@pages.post("/logout")
def logout() -> Response:
    """Ends the session."""
    session.clear()
    return redirect(url_for("account.login"))
