"""Starts a desk as the command line asks: where, for whom, and what must be there first."""

from __future__ import annotations

import getpass
import os
from argparse import Namespace
from collections.abc import Callable
from pathlib import Path

from builder.desk.accounts import add_account, read_accounts
from builder.desk.application import Settings
from builder.desk.guards import LOOPBACK_HOSTS
from builder.desk.phrases import read_phrases
from builder.desk.server import LOOPBACK, CannotServe, serve

RECORDS = "BELTBOOK_RECORDS"
"""Names the database of records by its URL, which may hold a password and so is no option."""


class CannotOpen(Exception):  # noqa: N818 - told to the person
    """The desk cannot be opened as asked; the text says why and what to do."""


def open_desk(
    given: Namespace, say: Callable[[str], None], set_booklets: list[Path] | None = None
) -> None:
    """Serves until Ctrl-C. Raises CannotOpen with a sentence.

    set_booklets  folders of regions whose booklets are still to be made, while serving
    """
    home = Path.cwd()
    database = os.environ.get(RECORDS, "")
    settings = Settings(home=home, out=given.out.resolve(), records=database)
    words = read_phrases()["opening"]
    if given.account:
        _keep_account(settings, given.account)
        say(words["kept"].format(name=given.account))
        return
    address = LOOPBACK
    if given.open:
        accounts = read_accounts(settings.state / "accounts.json")
        if not accounts:
            raise CannotOpen(words["no_account"])
        hosts = [*LOOPBACK_HOSTS, given.open, *given.host]
        settings = Settings(home, settings.out, hosts, accounts, database)
        address = given.open
        say(words["tls"])
    try:
        serve(settings, given.port, address, say, set_booklets)
    except CannotServe as refusal:
        raise CannotOpen(str(refusal)) from None


def _keep_account(settings: Settings, name: str) -> None:
    words = read_phrases()["opening"]
    try:
        password = getpass.getpass(words["password"])
        if getpass.getpass(words["again"]) != password:
            raise CannotOpen(words["differ"])
        add_account(settings.state / "accounts.json", name, password)
    except (EOFError, ValueError) as error:
        raise CannotOpen(str(error) or words["no_password"]) from None
