"""Scripts keep their meaning without comments and indentation."""

import json
import shutil
import subprocess

import pytest

from builder.site.app_files import APP
from builder.site.slim import slim_script, slim_style

NODE = shutil.which("node")


def node_says(script, tmp_path, name):
    """What a module prints, run by Node."""
    path = tmp_path / f"{name}.mjs"
    path.write_text(script, "utf-8")
    done = subprocess.run([NODE, str(path)], capture_output=True, text=True, timeout=30)
    assert done.returncode == 0, done.stderr
    return done.stdout


TRICKY = r"""
/* a block // with both */
const url = 'https://example.org/a'; // a comment with 'a quote
const say = (...parts) => console.log(JSON.stringify(parts));
const tag = (texts, ...values) => texts.raw.join('|') + values.join('|');
const inner = ['x  y', "it's"];
say(url, tag`<p class=${'a'}>  two  spaces // kept ${inner.map((one) => tag`<b>${one} /* kept */ ${{ a: 1 }.a}</b> it's`)} </p>`);
say(`a ${`b ${'c'} d`} e`, `\`${1}\${`);
say('a/b/c'.split(/\//), /[/"'`]+/.exec('x"y')[0], 8 / 2 / 2, [4] / 2);
let i = 1
let j = i
++i
say(i, j, i + +j, i - -j)
const f = () => { return /x  y/.test('x  y') }
say(f(), typeof f)
if (i) say('a'); else say('b')
label: for (const k of [1, 2]) { if (k === 1) continue label; say(k) }
say('\\', "\"", 'a\
b');
"""


@pytest.mark.skipif(NODE is None, reason="Node runs the script before and after")
def test_a_script_prints_the_same_before_and_after(tmp_path):
    before = node_says(TRICKY, tmp_path, "before")
    slim = slim_script(TRICKY)
    assert node_says(slim, tmp_path, "after") == before
    assert len(before.splitlines()) == 8
    assert "a comment" not in slim
    assert "with both" not in slim
    assert "two  spaces // kept" in slim


@pytest.mark.skipif(NODE is None, reason="Node reads the script before and after")
def test_every_script_of_the_app_still_parses(tmp_path):
    paths = [path for path in sorted((APP / "js").rglob("*.js"))]
    assert len(paths) > 30
    for number, path in enumerate(paths):
        (tmp_path / f"{number}.mjs").write_text(slim_script(path.read_text("utf-8")), "utf-8")
    check = (
        "import { execFileSync } from 'node:child_process';"
        "const bad = [];"
        f"for (let i = 0; i < {len(paths)}; i += 1) {{"
        "  try { await import('node:vm').then((vm) => new vm.SourceTextModule("
        f"    (process.getBuiltinModule('node:fs')).readFileSync({json.dumps(str(tmp_path))} + `/${{i}}.mjs`, 'utf8'))); }}"
        "  catch (error) { bad.push([i, String(error)]); }"
        "}"
        "console.log(JSON.stringify(bad));"
    )
    done = subprocess.run(
        [NODE, "--experimental-vm-modules", "--no-warnings", "--input-type=module", "-e", check],
        capture_output=True,
        text=True,
        timeout=60,
    )
    assert done.returncode == 0, done.stderr
    assert [(str(paths[i]), why) for i, why in json.loads(done.stdout)] == []


@pytest.mark.parametrize("broken", ["const a = `open", "}", "{", "`${"])
def test_a_script_with_something_left_open_is_refused(broken):
    with pytest.raises(ValueError, match=r"open"):
        slim_script(broken)


def test_a_style_sheet_keeps_its_strings():
    text = '/* gone */ a::after {\n  content: "/* kept */  x";\n\n  color: red; /* gone */\n}\n'
    slim = slim_style(text)
    assert "gone" not in slim
    assert 'content: "/* kept */  x";' in slim
    assert "\n\n" not in slim
