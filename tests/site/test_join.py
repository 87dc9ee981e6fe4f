"""Joined scripts do what the separate ones did."""

import json
import shutil
import subprocess

import pytest

from builder.site.join import joined

NODE = shutil.which("node")

MODULES = {
    "app/main.js": """
import { twice, named as other } from './parts/twice.js';
import * as all from './parts/all.js';
import shout, { LOUD } from './parts/shout.js';
import './parts/effect.js';
const later = await_later();
function await_later() { return import('./parts/later.js'); }
later.then((found) => console.log(JSON.stringify([twice(4), other, all.twice(5), all.extra, shout('a'), LOUD, globalThis.ran, found.own, found.count()])));
""",
    "app/parts/twice.js": """
import{count as c}from"./shout.js";
let uses = 0;
export function twice(n) { uses += 1; return 2 * n; }
export const used = () => uses;
const inner = 'named';
export { inner as named };
""",
    "app/parts/all.js": "export * from './twice.js';export { LOUD as extra } from './shout.js';",
    "app/parts/shout.js": """
export default function shout(text) { return text + LOUD; }
export const LOUD = '!';
export class Counter { static n = 0 }
export async function count() { return Counter.n; }
""",
    "app/parts/effect.js": "globalThis.ran = true;",
    "app/parts/later.js": """
import { used } from './twice.js';
import { own as mine } from './deep.js';
export const own = mine;
export const count = () => used();
""",
    "app/parts/deep.js": "export const own = 'own';",
}


def run(scripts, folder):
    """What the first script prints."""
    for path, text in scripts.items():
        file = folder / path
        file.parent.mkdir(parents=True, exist_ok=True)
        file.write_text(text, "utf-8")
    (folder / "package.json").write_text('{"type": "module"}')
    done = subprocess.run(
        [NODE, str(folder / "app" / "main.js")], capture_output=True, text=True, timeout=30
    )
    assert done.returncode == 0, done.stderr
    return done.stdout


@pytest.mark.skipif(NODE is None, reason="Node runs the scripts before and after")
def test_joined_scripts_say_the_same(tmp_path):
    before = run(MODULES, tmp_path / "before")
    after = joined(MODULES, "app/main.js")
    assert run(after, tmp_path / "after") == before
    assert json.loads(before)[:3] == [8, "named", 10]
    assert json.loads(before)[-1] == 2, "a script loaded later shares the module, not a copy of it"
    assert sorted(after) == ["app/main.js", "app/parts/deep.js", "app/parts/later.js"]


def test_a_ring_is_refused():
    ring = {"a.js": "import'./b.js';", "b.js": "import'./a.js';"}
    with pytest.raises(ValueError, match=r"a\.js → b\.js → a\.js"):
        joined(ring, "a.js")


def test_an_export_that_may_change_is_refused():
    with pytest.raises(ValueError, match="not joined"):
        joined({"a.js": "export let n = 1;"}, "a.js")
