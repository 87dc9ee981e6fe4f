"""Editing: one value's text changes, everything else stays to the letter."""

import pytest
from helpers import three_zone_files
from hypothesis import given, settings
from hypothesis import strategies as st

from builder.rows import descend, parse_csv, parse_yaml, plain
from builder.tables.cells import add_cells, remove_cells, replace_cell
from builder.tables.edit import (
    EditRefused,
    add_row,
    add_value,
    copy_row,
    remove_value,
    replace_value,
)

TEXT = """\
# head comment
source: demo   # why

zones:
  - id: lower   # the first
    band_m: [1, 2]   # metres
    words: a long sentence that runs
      over two lines
    told:
      upper: 'x: y'

  # about the second
  - id: upper
    band_m: [3, 4]
    tags:
      - one
      - two
mixes:
  lower: {a: 1, b: 2}
  upper:
    c: 3
"""


def value(text, *path):
    return plain(descend(parse_yaml(text, "t")[0], path))


def changed_lines(before, after):
    """(taken out, put in) lines, in order."""
    old, new = before.split("\n"), after.split("\n")
    while old and new and old[0] == new[0]:
        del old[0], new[0]
    while old and new and old[-1] == new[-1]:
        del old[-1], new[-1]
    return old, new


@pytest.mark.parametrize(
    ("path", "new", "old_lines", "new_lines"),
    [
        (
            ("source",),
            "common practice",
            ["source: demo   # why"],
            ["source: common practice   # why"],
        ),
        (
            ("zones", 0, "band_m", 1),
            2.5,
            ["    band_m: [1, 2]   # metres"],
            ["    band_m: [1, 2.5]   # metres"],
        ),
        (("zones", 0, "told", "upper"), "no", ["      upper: 'x: y'"], ["      upper: 'no'"]),
        (("zones", 1, "tags", 1), "a, b", ["      - two"], ["      - a, b"]),
        (
            ("mixes", "lower", "b"),
            "a, b",
            ["  lower: {a: 1, b: 2}"],
            ["  lower: {a: 1, b: 'a, b'}"],
        ),
        (
            ("zones", 0, "band_m"),
            [7, 8, 9],
            ["    band_m: [1, 2]   # metres"],
            ["    band_m: [7, 8, 9]   # metres"],
        ),
        (
            ("zones", 1, "tags"),
            ["three"],
            ["    tags:", "      - one", "      - two"],
            ["    tags: [three]"],
        ),
        (
            ("zones", 0, "words"),
            "short",
            ["    words: a long sentence that runs", "      over two lines"],
            ["    words: short"],
        ),
    ],
)
def test_only_the_value_changes(path, new, old_lines, new_lines):
    after = replace_value(TEXT, path, new)
    assert changed_lines(TEXT, after) == (old_lines, new_lines)
    assert value(after, *path) == new


def test_a_long_text_is_folded_under_its_name():
    long = "word " * 40 + "end"
    after = replace_value(TEXT, ("zones", 1, "id"), long)
    assert value(after, "zones", 1, "id") == long
    assert max(map(len, after.split("\n"))) <= 100


def test_a_value_that_is_not_there_is_added_at_the_end_of_its_row():
    after = replace_value(TEXT, ("zones", 0, "note"), "new")
    assert changed_lines(TEXT, after) == ([], ["    note: new"]) or "note: new" in after
    assert value(after, "zones", 0)["note"] == "new"
    assert value(add_value(TEXT, ("mixes", "lower", "c"), [1, 2]), "mixes", "lower") == {
        "a": 1,
        "b": 2,
        "c": [1, 2],
    }
    assert value(add_value(TEXT, ("mixes", "third"), {"d": 4}), "mixes", "third") == {"d": 4}


def test_values_and_rows_are_taken_out():
    assert changed_lines(TEXT, remove_value(TEXT, ("mixes", "lower", "a"))) == (
        ["  lower: {a: 1, b: 2}"],
        ["  lower: {b: 2}"],
    )
    assert value(remove_value(TEXT, ("mixes", "lower", "b")), "mixes", "lower") == {"a": 1}
    without = remove_value(TEXT, ("zones", 0))
    assert [row["id"] for row in value(without, "zones")] == ["upper"]
    assert "# about the second" in without
    assert value(remove_value(TEXT, ("zones", 1, "tags", 0)), "zones", 1, "tags") == ["two"]
    assert value(remove_value(TEXT, ("zones", 0, "told", "upper")), "zones", 0, "told") == {}


def test_a_row_is_copied_under_a_new_name():
    rows = value(copy_row(TEXT, ("zones", 0), "middle"), "zones")
    assert [row["id"] for row in rows] == ["lower", "middle", "upper"]
    assert rows[1]["told"] == rows[0]["told"]
    assert value(copy_row(TEXT, ("mixes", "upper"), "third"), "mixes", "third") == {"c": 3}
    assert value(copy_row(TEXT, ("mixes", "lower"), "third"), "mixes", "third") == {"a": 1, "b": 2}


ADDED = "\n\n  - id: top\n    band_m: [5, 6]"


def test_a_row_is_added_at_the_end():
    after = add_row(TEXT, ("zones",), {"id": "top", "band_m": [5, 6]})
    assert [row["id"] for row in value(after, "zones")] == ["lower", "upper", "top"]
    assert after.replace(ADDED, "") == TEXT
    assert value(add_row("a: []\n", ("a",), {"id": "x"}), "a") == [{"id": "x"}]
    assert value(add_row("a: [1]\n", ("a",), 2), "a") == [1, 2]


@pytest.mark.parametrize(
    "change",
    [
        lambda: replace_value(TEXT, ("zones", 9, "id"), "x"),
        lambda: remove_value(TEXT, ("zones", 0, "nothing")),
        lambda: remove_value(TEXT, ()),
        lambda: remove_value(TEXT, ("zones", 0, "id")),
        lambda: add_value(TEXT, ("source",), "again"),
        lambda: copy_row(TEXT, ("mixes", "lower"), "upper"),
        lambda: copy_row(TEXT, ("zones", 1, "tags", 0), "x"),
        lambda: add_row(TEXT, ("source",), {}),
        lambda: replace_value("a: [1\n", ("a",), 2),
        lambda: remove_value("a: 1\n", ("a",)),
    ],
)
def test_what_cannot_be_done_is_refused(change):
    with pytest.raises(EditRefused):
        change()


SCALARS = (
    st.none()
    | st.booleans()
    | st.integers(-999, 999)
    | st.text(st.characters(codec="utf-8", categories=("L", "N", "P", "S", "Zs")), max_size=120)
)


def leaves(node, path=()):
    """Paths of every scalar in plain data."""
    if isinstance(node, dict):
        for name, below in node.items():
            yield from leaves(below, (*path, name))
    elif isinstance(node, list):
        for place, below in enumerate(node):
            yield from leaves(below, (*path, place))
    else:
        yield path


FILES = {n: t for n, t in three_zone_files().items() if n.endswith(".yaml")}
PLACES = [
    (name, path)
    for name, text in FILES.items()
    for path in leaves(plain(parse_yaml(text, name)[0]))
]


@given(st.sampled_from(PLACES), SCALARS)
@settings(max_examples=400, deadline=None)
def test_any_value_anywhere_changes_that_value_alone(place, new):
    name, path = place
    before = plain(parse_yaml(FILES[name], name)[0])
    after = plain(parse_yaml(replace_value(FILES[name], path, new), name)[0])
    assert [p for p in leaves(after) if at(after, p) != at(before, p)] in ([], [path])
    assert at(after, path) == new


def at(data, path):
    for step in path:
        data = data[step]
    return data


def test_a_csv_cell_changes_alone():
    text = '# source: demo\na,b\n1,x\n2,"y, z"\n'
    assert replace_cell(text, 1, "a", 2.5) == text.replace("2,", "2.5,")
    assert replace_cell(text, 0, "b", "p, q") == text.replace("x", '"p, q"')
    assert replace_cell(text, 0, "b", None) == text.replace("1,x", "1,")
    assert replace_cell(text, 0, "b", "12") == text.replace("x", '"12"')
    assert replace_cell("a;b\n1,5;x\n", 0, "a", 2.25) == "a;b\n2,25;x\n"
    rows = parse_csv(add_cells(text, {"b": "new"}), "t")[0].rows
    assert [plain(row) for row in rows][-1] == {"a": None, "b": "new"}
    assert remove_cells(text, 0) == text.replace("1,x\n", "")
    for wrong in (
        lambda: replace_cell(text, 9, "a", 1),
        lambda: replace_cell(text, 0, "c", 1),
        lambda: remove_cells(text, 5),
        lambda: add_cells("", {}),
    ):
        with pytest.raises(EditRefused):
            wrong()


def test_text_in_block_style_is_replaced_as_a_whole():
    text = "a: |\n  two\n  lines\nb: 1\n"
    assert value(text, "a") == "two\nlines\n"
    after = replace_value(text, ("a",), "one line")
    assert after == "a: one line\nb: 1\n"
    assert replace_value("a:\nb: 1\n", ("a",), 2) == "a: 2\nb: 1\n"
    assert value(replace_value("a: 1\n", ("a",), "x\ty\nz"), "a") == "x\ty\nz"


def test_rows_that_share_a_line_are_left_to_the_hand():
    with pytest.raises(EditRefused):
        remove_value("a:\n  - - 1\n    - 2\n", ("a", 0, 0))
