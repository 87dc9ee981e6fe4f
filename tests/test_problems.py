"""Problems: equality, order, the printer, and the nearest name."""

from builder.problems import (
    CAUTION,
    Problem,
    cautions,
    errors,
    in_order,
    line_of_file,
    nearest,
    render,
    render_all,
)


def problem(line, column, check="bands", wrong="upside down", **more):
    return Problem("zones.yaml", line, column, check, wrong, **more)


def test_wording_does_not_count_for_equality():
    assert problem(1, 2, wrong="one way") == problem(1, 2, wrong="another", fix="do it")
    assert problem(1, 2) != problem(1, 3)
    assert problem(1, 2) != problem(1, 2, severity=CAUTION)


def test_problems_are_told_once_and_in_order_of_place():
    late, early, caution = problem(9, 1), problem(2, 7), problem(2, 9, severity=CAUTION)
    assert in_order([late, early, caution, early]) == [early, caution, late]
    assert errors([late, caution]) == [late]
    assert cautions([late, caution]) == [caution]


def test_a_problem_shows_its_line_a_caret_and_what_to_do():
    shown = problem(4, 9, wrong='zone "x" is unknown', fix="Did you mean y?")
    assert render(shown, lambda file, line: "  zone: x") == (
        'zones.yaml:4:9: zone "x" is unknown  [bands]\n'
        "    4 |   zone: x\n"
        "                ^\n"
        "      Did you mean y?"
    )


def test_a_caution_says_so_and_a_line_that_cannot_be_shown_is_left_out():
    shown = render(problem(1, 1, severity=CAUTION), lambda file, line: None)
    assert shown == "zones.yaml:1:1: caution: upside down  [bands]"
    assert "\x00" not in render(problem(1, 1), lambda file, line: "a\x00b")


def test_the_caret_stands_under_its_letter_in_a_long_line():
    text = "x" * 300 + "HERE" + "y" * 300
    _, line, caret = render(problem(1, 301), lambda file, number: text).split("\n")
    assert line[caret.index("^") :].startswith("HERE")


def test_all_problems_end_with_a_count():
    text = render_all([problem(1, 1), problem(2, 1, severity=CAUTION)], lambda file, line: None)
    assert text.endswith("1 error, 1 caution")
    assert render_all([]) == "0 errors, 0 cautions"


def test_the_nearest_name_is_offered():
    assert nearest("uper", ["upper", "lower"]) == 'Did you mean "upper"?'
    assert nearest("qqqq", ["upper", "lower"]) == "Known: lower, upper."
    assert nearest("x", [], "zone") == "No zone is defined yet."


def test_a_line_is_read_from_the_file(tmp_path):
    path = tmp_path / "t.yaml"
    path.write_bytes(b"\xef\xbb\xbffirst\r\nsecond\n")
    assert line_of_file(str(path), 1) == "first"
    assert line_of_file(str(path), 2) == "second"
    assert line_of_file(str(path), 9) is None
    assert line_of_file(str(tmp_path / "none"), 1) is None
