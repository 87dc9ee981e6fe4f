"""Rows: strict YAML and CSV whose values know their place, and files that are wrong."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from builder.rows import (
    Row,
    block_text,
    csv_text,
    descend,
    flow_text,
    parse_csv,
    parse_yaml,
    plain,
    read_csv,
    read_yaml,
    scalar_text,
)


def yaml_problems(text):
    _, problems = parse_yaml(text, "t.yaml")
    return [(each.line, each.column, each.check) for each in problems]


def test_values_know_their_line_and_column():
    root, problems = parse_yaml("a: 1\nb:\n  - {c: x, d: 2.5}\n", "t.yaml")
    assert problems == []
    assert plain(root) == {"a": 1, "b": [{"c": "x", "d": 2.5}]}
    assert descend(root, ("b", 0, "d")).at == ("t.yaml", 3, 15)
    assert root.keys["b"].at == ("t.yaml", 2, 1)
    assert descend(root, ("b", 7)) is None


def test_only_plain_digits_true_false_and_null_are_more_than_text():
    root, _ = parse_yaml("[a, '1', 1, -2.5, 1.5e3, true, null, 'no', \"x\"]", "t")
    assert root is None
    root, _ = parse_yaml("v: [a, '1', 1, -2.5, 1.5e3, true, null, 'no', \"x\"]", "t")
    assert plain(root)["v"] == ["a", "1", 1, -2.5, 1500.0, True, None, "no", "x"]


@pytest.mark.parametrize(
    "word",
    [
        "no",
        "Yes",
        "ON",
        "off",
        "y",
        "N",
        "012",
        "0x1F",
        "0o7",
        "1_000",
        "30_100",
        "1:30",
        "12:30:00",
        "2026-05-01",
        "~",
        "True",
        "NULL",
        ".5",
        "5.",
        "+5",
        "1e5",
        ".inf",
        "-.NaN",
    ],
)
def test_words_that_yaml_turns_are_refused(word):
    assert yaml_problems(f"a: {word}\n") == [(1, 4, "turned-value")]
    assert yaml_problems(f"a: '{word}'\n") == []
    assert yaml_problems(f"{word}: a\n") in ([(1, 1, "turned-value")], [])


@pytest.mark.parametrize(
    ("text", "found"),
    [
        ("a: 1\nb: 2\na: 3\n", [(3, 1, "double-key")]),
        ("a: &x 1\nb: *x\n", [(1, 4, "readable")]),
        ("a: *x\n", [(1, 4, "readable")]),
        ("a: {<<: {b: 1}}\n", [(1, 5, "turned-value")]),
        ("a: !!python/name:os.system x\n", [(1, 4, "readable")]),
        ("a: !!int '3'\n", [(1, 4, "readable")]),
        ("a:\n", [(1, 3, "empty-value")]),
        ("a: 1\n---\nb: 2\n", [(2, 1, "readable")]),
        ("? [a, b]\n: 1\n", [(1, 3, "readable")]),
        ("- 1\n", [(1, 1, "readable")]),
        ("word\n", [(1, 1, "readable")]),
        ("", [(1, 1, "readable")]),
        ("# only a comment\n", [(1, 1, "readable")]),
        ("a: [1, 2\n", [(2, 1, "readable")]),
        ("a: b: c\n", [(1, 5, "readable")]),
        ("a: 'open\n", [(2, 1, "readable")]),
        ("a: x\x01y\n", [(1, 5, "readable")]),
        ("a: " + "[" * 40 + "]" * 40, [(1, 19, "readable")]),
        ("a: cafe\u0301\n", [(1, 8, "encoding")]),
    ],
)
def test_what_is_refused_is_told_at_its_place(text, found):
    assert yaml_problems(text) == found


def test_a_merge_bomb_is_refused_before_it_grows():
    bomb = "a: &a {k: v}\n" + "".join(f"b{n}: &b{n} [*a, *a]\n" for n in range(50))
    assert yaml_problems(bomb) == [(1, 4, "readable")]


def test_a_file_with_too_many_values_is_refused():
    many = "a: [" + "1," * 400_001 + "1]"
    assert [check for *_, check in yaml_problems(many)] == ["readable"]


@given(st.text(max_size=80))
@settings(max_examples=400, deadline=None)
def test_no_text_ends_in_a_raised_error(text):
    root, problems = parse_yaml(text, "t.yaml")
    assert isinstance(root, Row) or problems
    sheet, problems = parse_csv(text, "t.csv")
    assert sheet is not None or problems


@pytest.mark.parametrize("reader", [read_yaml, read_csv])
@pytest.mark.parametrize("kind", ["missing", "folder", "binary", "empty", "link out", "huge"])
def test_a_wrong_file_is_a_problem_at_its_first_line(tmp_path, reader, kind):
    region = tmp_path / "region"
    region.mkdir()
    path = region / "zones.yaml"
    if kind == "folder":
        path.mkdir()
    elif kind == "binary":
        path.write_bytes(b"PK\x03\x04\x00\x00zip")
    elif kind == "empty":
        path.write_bytes(b"")
    elif kind == "link out":
        outside = tmp_path / "outside.yaml"
        outside.write_text("a: 1\n")
        path.symlink_to(outside)
    elif kind == "huge":
        path.write_bytes(b"a: 1\n" * 900_000)
    read, problems = reader(path, "zones.yaml", region)
    assert read is None
    assert [(each.file, each.line, each.check) for each in problems] == [
        ("zones.yaml", 1, "readable")
    ]


def test_a_link_that_stays_in_the_folder_and_a_loop(tmp_path):
    (tmp_path / "real.yaml").write_text("a: 1\n")
    (tmp_path / "link.yaml").symlink_to(tmp_path / "real.yaml")
    (tmp_path / "loop.yaml").symlink_to(tmp_path / "loop.yaml")
    assert plain(read_yaml(tmp_path / "link.yaml", inside=tmp_path)[0]) == {"a": 1}
    assert read_yaml(tmp_path / "loop.yaml", inside=tmp_path)[1][0].check == "readable"


def test_yaml_with_a_byte_order_mark_windows_lines_or_utf_16_reads_alike(tmp_path):
    for number, raw in enumerate(
        [
            b"a: \xc3\xa9\r\nb: 2\r\n",
            b"\xef\xbb\xbfa: \xc3\xa9\nb: 2\n",
            "a: é\nb: 2\n".encode("utf-16"),
        ]
    ):
        path = tmp_path / f"{number}.yaml"
        path.write_bytes(raw)
        root, problems = read_yaml(path)
        assert plain(root) == {"a": "é", "b": 2}
        assert problems == []


def test_yaml_in_another_encoding_is_told_where_it_breaks(tmp_path):
    path = tmp_path / "t.yaml"
    path.write_bytes("a: 1\nb: caf\xe9\n".encode("latin-1"))
    root, problems = read_yaml(path, "t.yaml")
    assert root is None
    assert [(each.line, each.column, each.check) for each in problems] == [(2, 7, "readable")]


def test_csv_with_commas_semicolons_or_tabs():
    for text in (
        "a,b\n1.5,x\n",
        "a;b\n1,5;x\n",
        "a\tb\n1.5\tx\n",
        "a;b\r\n1,5;x".replace("\r", ""),
    ):
        sheet, problems = parse_csv(text, "t.csv")
        assert problems == []
        assert [plain(row) for row in sheet.rows] == [{"a": 1.5, "b": "x"}]


def test_csv_cells_know_their_place_behind_notes_and_quoted_line_ends():
    sheet, problems = parse_csv('# source: demo\n\na,b\n"x, ""y""\nz",2\n,4\n', "t.csv")
    assert problems == []
    assert sheet.notes["source"].value == "demo"
    assert [plain(row) for row in sheet.rows] == [{"a": 'x, "y"\nz', "b": 2}, {"a": None, "b": 4}]
    assert sheet.rows[1].nodes["b"].at == ("t.csv", 6, 2)


@pytest.mark.parametrize(
    ("text", "found"),
    [
        ("a,b\n1\n", [(2, 1, "csv-width")]),
        ("a,a\n1,2\n", [(1, 3, "double-key")]),
        ('a,b\n"x,2\n', [(2, 1, "readable")]),
        ('a,b\n"x"y,2\n', [(2, 1, "readable")]),
        ("# source: demo\n", [(1, 1, "readable")]),
    ],
)
def test_csv_faults_are_told_at_their_place(text, found):
    _, problems = parse_csv(text, "t.csv")
    assert [(each.line, each.column, each.check) for each in problems] == found


def test_csv_saved_by_a_spreadsheet_in_windows_letters_is_read_with_a_caution(tmp_path):
    path = tmp_path / "t.csv"
    path.write_bytes("name,n\ncaf\xe9,1\n".encode("cp1252"))
    sheet, problems = read_csv(path, "t.csv")
    assert plain(sheet.rows[0]) == {"name": "café", "n": 1}
    assert [(each.line, each.column, each.severity) for each in problems] == [(2, 4, "caution")]


def test_csv_text_reads_back():
    text = csv_text(["a", "b"], [["x, y", 1.5], [None, 2]], {"source": "demo"})
    sheet, _ = parse_csv(text, "t.csv")
    assert [plain(row) for row in sheet.rows] == [{"a": "x, y", "b": 1.5}, {"a": None, "b": 2}]


WRITABLE = st.recursive(
    st.none()
    | st.booleans()
    | st.integers(-(10**9), 10**9)
    | st.floats(allow_nan=False, allow_infinity=False, min_value=-1e9, max_value=1e9).map(
        lambda number: round(number, 6) + 0.0
    )
    | st.text(st.characters(codec="utf-8", categories=("L", "N", "P", "S", "Zs")), max_size=40),
    lambda inner: (
        st.lists(inner, max_size=3)
        | st.dictionaries(st.from_regex(r"[a-z_]{2,8}", fullmatch=True), inner, max_size=3)
    ),
    max_leaves=8,
)


@given(
    st.dictionaries(
        st.from_regex(r"[a-z]{2}_[a-z]{1,6}", fullmatch=True), WRITABLE, min_size=1, max_size=4
    )
)
@settings(max_examples=300, deadline=None)
def test_what_is_written_reads_back_the_same(value):
    expected = _composed(value)
    for text in (
        "\n".join(block_text(value)),
        "\n".join(f"{k}: {flow_text(v)}" for k, v in value.items()),
    ):
        root, problems = parse_yaml(text, "t")
        assert [each for each in problems if each.severity == "error"] == []
        assert _composed(plain(root)) == expected


def _composed(value):
    if isinstance(value, dict):
        return {name: _composed(below) for name, below in value.items()}
    if isinstance(value, list):
        return [_composed(below) for below in value]
    if isinstance(value, float) and value.is_integer():
        return int(value)
    return value


def test_numbers_are_written_short_and_text_is_quoted_where_it_must_be():
    assert [scalar_text(each) for each in (12.0, 0.05, 1e-7, True, None)] == [
        "12",
        "0.05",
        "0.0000001",
        "true",
        "null",
    ]
    assert [scalar_text(each) for each in ("no", "12", "a: b", "it's", "plain words")] == [
        "'no'",
        "'12'",
        "'a: b'",
        "it's",
        "plain words",
    ]
