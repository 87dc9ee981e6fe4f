"""Builds the whole site of one or more regions and swaps it in."""

from __future__ import annotations

import gzip
import hashlib
import json
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from markupsafe import Markup

from builder.site.app_files import APP, app_files
from builder.site.field import inert_files, inline
from builder.site.pages import environment, rendered
from builder.site.policy import app_policy
from builder.site.region import SiteRegion
from builder.site.swap import put_in_place
from builder.site.worker import worker_script

STYLE = "app/css/app.css"
BOOKLET = "booklet.pdf"


@dataclass(frozen=True)
class SiteReport:
    """What a build wrote.

    changed  paths written or removed; empty when the site was already right
    sizes    path → (bytes, bytes compressed) of every file
    """

    changed: list[str]
    sizes: dict[str, tuple[int, int]]


def build_site(regions: Sequence[SiteRegion], out: Path, app: Path = APP) -> SiteReport:
    """Write the site of these regions into `out`, whole or not at all.

    regions  in the order the chooser shows them
    out      folder of the site; README.md and the regions' PDFs in it are left alone

    Same packs and sources, same bytes; files that are already right are not written again.
    """
    files = site_files(regions, app)
    folders = {f"regions/{region.id}" for region in regions}

    def keeps(path: str) -> bool:
        folder, _, name = path.rpartition("/")
        return path == "README.md" or (folder in folders and name.endswith(".pdf"))

    changed = put_in_place(out, files, keeps)
    return SiteReport(changed=changed, sizes={path: _sizes(files[path]) for path in sorted(files)})


def site_files(regions: Sequence[SiteRegion], app: Path = APP) -> dict[str, bytes]:
    """Every file of the site: path → content."""
    env = environment(app)
    files = app_files(app)
    for region in regions:
        files.update(region.files())
    files["regions.json"] = region_list(regions, files)
    files["manifest.webmanifest"] = manifest(files)
    names: dict[str, Any] = {
        "words": json.loads(files["app/words/en.json"]),
        "regions": json.loads(files["regions.json"])["regions"],
    }
    files["index.html"] = rendered(
        env,
        "index.html",
        policy=app_policy(),
        style=STYLE,
        **names,
    )
    files["field.html"] = _field_page(env, regions, files, names)
    files["sw.js"] = worker_script((app / "sw.js").read_text("utf-8"), files).encode()
    return files


def region_list(regions: Sequence[SiteRegion], files: Mapping[str, bytes]) -> bytes:
    """regions.json: what the chooser shows and what the phone checks what it fetched against."""
    listed = []
    for region in regions:
        folder = f"regions/{region.id}"
        own = json.loads(region.pack)["region"]
        first = "en" if "en" in region.texts else min(region.texts)
        said = json.loads(region.texts[first])["region"]
        listed.append(
            {
                "id": region.id,
                "name": said["name"],
                "edition": own["edition"],
                "date": own["date"],
                "invented": own["invented"],
                "book": f"{folder}/book/index.html" if "index.html" in region.book else None,
                "booklet": f"{folder}/{BOOKLET}",
                "pack": {"hash": region.hash, **_named(f"{folder}/pack.json", files)},
                "texts": {
                    tag: _named(f"{folder}/texts.{tag}.json", files) for tag in sorted(region.texts)
                },
            }
        )
    return _json({"format": 1, "regions": listed})


def manifest(files: Mapping[str, bytes]) -> bytes:
    """The web app manifest, so that a phone can keep the app on its home screen."""
    said = json.loads(files["app/words/en.json"])["app"]
    icon = "app/icons/icon"
    return _json(
        {
            "id": "./",
            "name": said["name"],
            "short_name": said["name"],
            "description": said["description"],
            "lang": "en",
            "start_url": "./",
            "scope": "./",
            "display": "standalone",
            "background_color": "#f6f1e4",
            "theme_color": "#f6f1e4",
            "icons": [
                {"src": f"{icon}.svg", "sizes": "any", "type": "image/svg+xml"},
                {"src": f"{icon}-192.png", "sizes": "192x192", "type": "image/png"},
                {"src": f"{icon}-512.png", "sizes": "512x512", "type": "image/png"},
                {
                    "src": f"{icon}-maskable-512.png",
                    "sizes": "512x512",
                    "type": "image/png",
                    "purpose": "maskable",
                },
            ],
        }
    )


def _field_page(
    env: Any, regions: Sequence[SiteRegion], files: Mapping[str, bytes], names: dict[str, Any]
) -> bytes:
    """field.html. Inside a page JSON is written a little differently, so its hashes are its own."""
    inside = {**files, **inert_files(files)}
    inside["regions.json"] = region_list(regions, inside)
    part = inline(inside, STYLE)
    safe = {
        "imports": Markup(part.imports),
        "style": Markup(part.style),
        "before": Markup(part.before),
        "start": Markup(part.start),
        "inside": [(path, Markup(text)) for path, text in part.inside],
    }
    return rendered(env, "field.html", policy=part.policy, icon=part.icon, **safe, **names)


def _named(path: str, files: Mapping[str, bytes]) -> dict[str, str]:
    return {"path": path, "sha256": hashlib.sha256(files[path]).hexdigest()}


def _json(data: object) -> bytes:
    return json.dumps(data, ensure_ascii=False, separators=(",", ":")).encode()


def _sizes(content: bytes) -> tuple[int, int]:
    return len(content), len(gzip.compress(content, 6, mtime=0))
