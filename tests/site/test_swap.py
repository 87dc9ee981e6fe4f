"""A new site takes the old one's place as a whole, and only what changed is written."""

import pytest

from builder.site import swap
from builder.site.swap import put_in_place

OLD = {"index.html": b"old", "app/a.js": b"same", "gone.txt": b"gone"}
NEW = {"index.html": b"new", "app/a.js": b"same", "more/b.js": b"b"}


def never(path):
    return False


def held(folder):
    """What a folder holds, hidden neighbours left out."""
    return {
        path.relative_to(folder).as_posix(): path.read_bytes()
        for path in folder.rglob("*")
        if path.is_file()
    }


def test_only_what_changed_is_written(tmp_path):
    out = tmp_path / "out"
    put_in_place(out, OLD, never)
    before = (out / "app" / "a.js").stat()
    changed = put_in_place(out, NEW, never)
    after = (out / "app" / "a.js").stat()
    assert changed == ["gone.txt", "index.html", "more/b.js"]
    assert held(out) == NEW
    assert (after.st_ino, after.st_mtime_ns) == (before.st_ino, before.st_mtime_ns)
    assert [path.name for path in tmp_path.iterdir()] == ["out"]


def test_nothing_is_touched_when_nothing_changed(tmp_path):
    out = tmp_path / "out"
    put_in_place(out, OLD, never)
    before = out.stat().st_ino
    assert put_in_place(out, OLD, never) == []
    assert out.stat().st_ino == before


def test_named_old_files_stay(tmp_path):
    out = tmp_path / "out"
    put_in_place(out, {**OLD, "README.md": b"about"}, never)
    changed = put_in_place(out, NEW, lambda path: path == "README.md")
    assert held(out) == {**NEW, "README.md": b"about"}
    assert "README.md" not in changed


@pytest.mark.parametrize("step", range(4))
def test_stopped_anywhere_the_old_site_stands(tmp_path, monkeypatch, step):
    """The disk fails at one step after another: two writes, either rename."""
    out = tmp_path / "out"
    put_in_place(out, OLD, never)
    calls = {"n": 0}

    def failing(real):
        def act(self, *args, **more):
            calls["n"] += 1
            if calls["n"] == step + 1:
                raise OSError("the disk is gone")
            return real(self, *args, **more)

        return act

    with monkeypatch.context() as patch:
        for name in ("write_bytes", "rename"):
            patch.setattr(swap.Path, name, failing(getattr(swap.Path, name)))
        with pytest.raises(OSError, match="the disk is gone"):
            put_in_place(out, NEW, never)
    assert held(out) == OLD
    put_in_place(out, NEW, never)
    assert held(out) == NEW


def test_a_site_left_between_two_renames_is_brought_back(tmp_path):
    out = tmp_path / "out"
    put_in_place(out, OLD, never)
    out.rename(tmp_path / ".out.old")
    assert put_in_place(out, OLD, never) == []
    assert held(out) == OLD
