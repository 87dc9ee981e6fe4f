"""Reading and checking tables, building the site, building it again after one edit, sizes."""

from __future__ import annotations

import gzip
import shutil
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from statistics import median
from typing import Any
from unittest.mock import patch

from jinja2 import Template

from builder.bench.measure import (
    Goal,
    Measure,
    Reference,
    Setting,
    Taken,
    growth_ratio,
    seconds,
)
from builder.site import SiteRegion, build_site
from builder.site.build import site_files
from builder.steps.building import build, compile_region
from builder.steps.checking import check_region

FIRST = (
    "index.html", "manifest.webmanifest", "regions.json", "app/js/before.js", "app/js/main.js",
    "app/css/app.css", "app/icons/icon.svg", "app/words/languages.json", "app/words/en.json",
)  # fmt: skip
"""What a first visit loads before the first page stands, fonts and a region apart."""
FONTS = ".woff2"


def read_and_check(setting: Setting) -> Taken:
    """Tables read, typed and checked."""
    return Taken(seconds(lambda: check_region(setting.demo), setting.runs(5)))


def read_and_check_large(setting: Setting) -> Taken:
    """The same for 40 zones and 400 plants."""
    folder = setting.large
    return Taken(seconds(lambda: check_region(folder), setting.runs(3)))


def site_cpu(setting: Setting) -> Taken:
    """beltbook build without the booklet, into a new folder; the same templates filled bare."""
    turn = iter(range(99))

    def work() -> None:
        out = setting.folder / f"site_{next(turn)}" / "site"
        build([setting.demo], out, _silent, booklets=False)

    taken = seconds(work, setting.runs(3), cpu=True)
    with _rendered() as filled:
        build_site([compile_region(setting.checked)], setting.folder / "jinja" / "site")
    pages = list(filled)

    def bare() -> None:
        for template, names in pages:
            template.render(**names)

    beside = seconds(bare, setting.runs(3), cpu=True)
    name = f"bare Jinja, the same {len(pages)} pages"
    return Taken(taken, Reference(name, beside), "CPU, this process.")


@contextmanager
def _rendered() -> Iterator[list[tuple[Template, dict[str, Any]]]]:
    """Hears which templates are filled with what."""
    heard: list[tuple[Template, dict[str, Any]]] = []
    fill = Template.render

    def render(self: Template, *given: Any, **names: Any) -> str:
        heard.append((self, {**dict(*given), **names}))
        return fill(self, *given, **names)

    with patch.object(Template, "render", render):
        yield heard


def _silent(done: int, of: int, words: str) -> None:
    """Progress that nobody reads."""


def rebuild(setting: Setting) -> Taken:
    """beltbook build --no-booklet after one constancy was edited."""
    folder = setting.folder / "keydata" / setting.demo.name
    shutil.copytree(setting.demo, folder)
    out = setting.folder / "rebuilt" / "site"
    build([folder], out, _silent, booklets=False)
    table = folder / "occurrence.yaml"
    whole = table.read_text(encoding="utf-8")
    first = whole.index(": [", whole.index("occurrence:")) + 3
    comma = whole.index(",", first)
    shares = iter(range(31, 60))
    written: list[int] = []

    def work() -> None:
        table.write_text(f"{whole[:first]}{next(shares)}{whole[comma:]}", encoding="utf-8")
        written.append(len(build([folder], out, _silent, booklets=False).site.changed))

    taken = seconds(work, setting.runs(3))
    again = len(build([folder], out, _silent, booklets=False).site.changed)
    note = f"{written[-1]} files written; {again} when built again with nothing changed."
    return Taken(taken, None, note)


def growth(setting: Setting) -> Taken:
    """Sites of 1, 3 and 10 regions."""
    by_size = {}
    for times in (1, 3, 10):
        folders = [_copy(setting, f"{setting.demo.name}_{at}") for at in range(times)]
        out = setting.folder / f"grown_{times}" / "site"
        run = seconds(lambda f=folders, o=out: build(f, o, _silent, False), 1, cpu=True)  # type: ignore[misc]
        by_size["1 region" if times == 1 else f"{times} regions"] = median(run)
        if setting.quick and times == 3:
            break
    what = "cost of 3 regions, shortened." if setting.quick else ""
    return Taken((growth_ratio(by_size),), None, what, by_size)


def _copy(setting: Setting, name: str) -> Path:
    folder = setting.folder / "keydata" / name
    if not folder.is_dir():
        shutil.copytree(setting.demo, folder)
        head = folder / "region.yaml"
        text = head.read_text(encoding="utf-8")
        changed = text.replace(f"id: {setting.demo.name}\n", f"id: {name}\n", 1)
        head.write_text(changed, encoding="utf-8")
    return folder


def _packed(content: bytes) -> float:
    return len(gzip.compress(content, 9, mtime=0)) / 1000


def shell(setting: Setting) -> Taken:
    """What a first visit loads of the app itself: page, scripts, style and English words."""
    files = site_files([setting.demo_site])
    sizes = {name: _packed(files[name]) for name in FIRST}
    later = [
        content
        for name, content in files.items()
        if name not in FIRST and name.startswith("app/") and not name.endswith(FONTS)
    ]
    fonts = sum(len(content) for name, content in files.items() if name.endswith(FONTS)) / 1000
    most = sorted(FIRST, key=lambda name: -sizes[name])[:3]
    listed = ", ".join(f"{name} {sizes[name]:.1f}" for name in most)
    note = (
        f"{len(FIRST)} files; largest: {listed} kB. Apart: fonts {fonts:.0f} kB, and "
        f"{sum(map(_packed, later)):.0f} kB in {len(later)} files stored for later pages."
    )
    raw = sum(len(files[name]) for name in FIRST) / 1000
    return Taken((sum(sizes.values()),), Reference("raw files", (raw,)), note)


def _size(content: bytes) -> Taken:
    return Taken((_packed(content),), Reference("raw file", (len(content) / 1000,)))


def _texts(site: SiteRegion) -> Taken:
    return _size(site.texts["en"])


MEASURES = (
    Measure("build-check", "Demo region read and checked", "s", read_and_check),
    Measure("build-check-large", "40 zones x 400 plants read and checked", "s",
            read_and_check_large),
    Measure("build-site", "Site of the demo region, booklet apart", "s CPU", site_cpu, Goal(2)),
    Measure("build-growth", "Site: cost of 10 regions", "times", growth, Goal(10)),
    Measure("build-edit", "Rebuild after one edited cell, booklet apart", "s", rebuild, Goal(1)),
    Measure("size-shell", "App shell, compressed, fonts apart", "kB", shell, Goal(30)),
    Measure("size-key", "Key of the demo region, compressed", "kB",
            lambda setting: _size(setting.demo_site.pack), Goal(40)),
    Measure("size-texts", "Texts of the demo region in English, compressed", "kB",
            lambda setting: _texts(setting.demo_site), Goal(60)),
    Measure("size-key-large", "Key of 40 zones x 400 plants, compressed", "kB",
            lambda setting: _size(setting.large_site.pack), Goal(90)),
    Measure("size-texts-large", "Texts of 40 zones x 400 plants in English, compressed", "kB",
            lambda setting: _texts(setting.large_site)),
)  # fmt: skip
