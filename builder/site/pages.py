"""Renders the pages. Templates loop and show; they decide nothing."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from jinja2 import Environment, FileSystemLoader, StrictUndefined

from builder.site.app_files import APP

OWN_TEMPLATES = Path(__file__).resolve().parent / "templates"


def environment(app: Path = APP) -> Environment:
    """Templates of the app's first page and of the Book; a missing name is an error."""
    return Environment(
        loader=FileSystemLoader([OWN_TEMPLATES, app]),
        undefined=StrictUndefined,
        autoescape=True,
        trim_blocks=True,
        lstrip_blocks=True,
        keep_trailing_newline=True,
    )


def rendered(env: Environment, template: str, **names: Any) -> bytes:
    """One page as bytes."""
    return env.get_template(template).render(**names).encode()
