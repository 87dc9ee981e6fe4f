"""Runs the app's own tests, tests/js/*.test.js, on Node: both halves read the same goldens."""

import re
import shutil
import subprocess
from pathlib import Path

HERE = Path(__file__).parent / "js"
COUNT = re.compile(r"^# (tests|pass|fail|skipped|todo) (\d+)$", re.MULTILINE)


def run(files):
    """Exit code, counts by word, and what Node said."""
    node = shutil.which("node")
    assert node, "there is no node; .ci/setup test brings one"
    said = subprocess.run(
        [node, "--test", "--test-reporter=tap", *map(str, files)],
        capture_output=True,
        text=True,
        timeout=300,
        cwd=HERE.parent.parent,
    )
    counts = {word: int(number) for word, number in COUNT.findall(said.stdout)}
    return said.returncode, counts, said.stdout + said.stderr


def test_every_js_test_passes_and_none_is_skipped():
    files = sorted(HERE.glob("*.test.js"))
    assert len(files) == len([path for path in HERE.iterdir() if path.is_file()])
    code, counts, said = run(files)
    assert code == 0, said[-4000:]
    assert counts["tests"] >= 150
    assert (counts["pass"], counts["skipped"], counts["todo"]) == (counts["tests"], 0, 0)


def test_a_failing_js_test_is_caught(tmp_path):
    path = tmp_path / "wrong.test.js"
    path.write_text(
        "import test from 'node:test';\nimport assert from 'node:assert';\n"
        "test('one and one', () => assert.equal(1 + 1, 3));\n"
    )
    code, counts, _ = run([path.rename(tmp_path / "wrong.test.mjs")])
    assert code != 0
    assert counts["fail"] == 1
