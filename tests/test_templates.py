"""Templates loop, include and test a ready yes or no; they never reckon."""

from pathlib import Path

import pytest
from jinja2 import Environment, nodes

BUILDER = Path(__file__).parent.parent / "builder"
REFUSED = {
    nodes.BinExpr: "arithmetic or and/or",
    nodes.UnaryExpr: "a sign",
    nodes.Compare: "a comparison",
    nodes.Concat: "joining",
    nodes.CondExpr: "an inline if",
    nodes.Assign: "assignment",
    nodes.AssignBlock: "assignment",
    nodes.Getitem: "a subscript",
}
ENDINGS = {".html", ".jinja", ".xml"}
SHIPPED_APART = "vendor"


def breaches(text):
    """What a template does that it must not, as (line, what)."""
    tree = Environment().parse(text)
    found = []
    for kind, what in REFUSED.items():
        for node in tree.find_all(kind):
            if isinstance(node, nodes.Not):  # {% if not x %} tests a ready yes or no
                continue
            found.append((node.lineno, what))
    return found


def templates():
    return [
        path
        for path in sorted(BUILDER.rglob("*"))
        if path.suffix in ENDINGS and SHIPPED_APART not in path.parts
    ]


def test_no_template_reckons():
    seen, found = 0, []
    for path in templates():
        text = path.read_text("utf-8")
        seen += 1
        found += [f"{path.relative_to(BUILDER)}:{line}: {what}" for line, what in breaches(text)]
    assert seen >= 10
    assert found == []


@pytest.mark.parametrize(
    "sample",
    [
        "{{ a + b }}",
        "{{ -a }}",
        "{% if a > 3 %}x{% endif %}",
        "{{ a ~ b }}",
        "{{ 'x' if a else 'y' }}",
        "{% set a = 3 %}",
        "{% set a %}x{% endset %}",
        "{{ rows[0] }}",
        "{% for row in rows if row.a == 3 %}x{% endfor %}",
        "{% if a and b %}x{% endif %}",
    ],
)
def test_a_template_that_reckons_is_caught(sample):
    assert breaches(sample)


def test_a_plain_template_passes():
    assert (
        breaches("{% for row in rows %}{% if row.any %}{{ row.name }}{% endif %}{% endfor %}") == []
    )
