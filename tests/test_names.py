"""Names: every test file is collected, nothing tracked names the machine it was written on."""

import re
import subprocess
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent
COLLECTED = re.compile(r"test_\w+\.py|conftest\.py|helpers\.py|__init__\.py")

# Each is written so that this file does not hold the word it looks for.
FORBIDDEN = {
    "a path of one machine": r"/(?:home|Users|opt|work|root)/[a-z]\w*/|/tmp/\w",
    "unfinished work": r"\b(?:TO" r"DO|FIX" r"ME|XX" r"X|NotImplemented" r"Error)\b",
    "a merge left open": r"^(?:<{7}|>{7}) ",
}
TEXT = {".py", ".js", ".css", ".html", ".md", ".yaml", ".yml", ".toml", ".csv", ".json", ".jinja"}


def uncollected(paths):
    """Python files under tests/ that no runner would pick up."""
    return [path for path in paths if path.suffix == ".py" and not COLLECTED.fullmatch(path.name)]


def forbidden(path, text):
    """What a file says that it must not, as `path:line: why`."""
    for why, pattern in FORBIDDEN.items():
        for hit in re.finditer(pattern, text, re.MULTILINE):
            line = text.count("\n", 0, hit.start()) + 1
            yield f"{path}:{line}: {why}: {hit[0]}"


def tracked():
    """Every file git follows; without git, every file of the source folders."""
    try:
        said = subprocess.run(["git", "ls-files", "-z"], cwd=ROOT, capture_output=True, check=True)
        names = said.stdout.decode().split("\0")
        return [ROOT / name for name in names if name]
    except (OSError, subprocess.CalledProcessError):
        return [path for top in ("builder", "tests", "docs") for path in (ROOT / top).rglob("*.*")]


def test_every_test_file_is_collected():
    paths = sorted((ROOT / "tests").rglob("*.py"))
    assert len(paths) >= 5
    assert uncollected(paths) == []


def test_a_file_nobody_runs_is_caught():
    assert uncollected([Path("tests/testfao.py"), Path("tests/test_soil.py")]) == [
        Path("tests/testfao.py")
    ]


def test_nothing_tracked_says_what_it_must_not():
    found, looked = [], 0
    for path in tracked():
        if path.suffix not in TEXT or not path.is_file() or path.name == "package-lock.json":
            continue
        looked += 1
        found += forbidden(path.relative_to(ROOT), path.read_text(encoding="utf-8"))
    assert looked >= 30
    assert found == []


@pytest.mark.parametrize(
    "text",
    [
        "see /" + "home/ruth/beltbook",
        "# TO" + "DO: later",
        "<" * 7 + " HEAD",
        "raise NotImplemented" + "Error",
    ],
)
def test_a_bad_line_is_caught(text):
    assert len(list(forbidden("somewhere.py", text))) == 1


def test_no_file_is_named_for_having_two_jobs():
    names = [path for path in (ROOT / "builder").rglob("*") if "vendor" not in path.parts]
    assert len(names) >= 20
    assert [path for path in names if path.stem in {"utils", "helpers", "common", "manager"}] == []
