"""Every formula against its goldens, and every formula has one that stands on its own feet.

tests/goldens/*.json is either {"formula", "cases"} or {"topic", "formulas": [{"formula",
"cases"}]}. A case holds kind (published: the source prints inputs and result; hand: working
shown; oracle: another library; frozen: only guards against change), source, in, and either
out with abs (half a unit of the last printed digit, or by output name) or refused (the key
of the refusal). `out` of a mapping names only what the source gives. The phone's runner,
tests/js/formulas.test.js, reads the same files.
"""

import dataclasses
import importlib
import inspect
import json
import math
import pkgutil
from pathlib import Path

import pytest

import builder.formulas
from builder.formulas.refusal import SENTENCES, RefusedError
from builder.formulas.sources import SOURCES
from builder.formulas.water_balance import Snow
from builder.formulas.year import SeasonRule, SiteYear

GOLDENS = Path(__file__).parent.parent / "goldens"
NO_NUMBERS = {"refusal", "sources"}
KINDS = {"published", "hand", "oracle", "frozen"}


def blocks():
    """(file, formula, cases) of every golden file that tests formulas."""
    for path in sorted(GOLDENS.glob("*.json")):
        content = json.loads(path.read_text(encoding="utf-8"))
        for block in content.get("formulas", [content] if "formula" in content else []):
            yield path.name, block["formula"], block["cases"]


CASES = [
    pytest.param(formula, case, id=f"{formula}-{case['id']}-{number}")
    for _, formula, cases in blocks()
    for number, case in enumerate(cases)
]


def revived(value):
    """JSON has no NaN and no records; the goldens write them as text and mappings."""
    if value in ("NaN", "Infinity"):
        return float(value)
    if isinstance(value, list):
        return [revived(each) for each in value]
    if isinstance(value, dict):
        return {name: revived(each) for name, each in value.items()}
    return value


def arguments(formula, given):
    """The `in` of a case as keyword arguments."""
    kept = {name: revived(value) for name, value in given.items()}
    if formula.startswith("year.") and "rule" in kept:
        kept["rule"] = SeasonRule(**{**kept["rule"], "snow": Snow(**kept["rule"]["snow"])})
    if "snow" in kept:
        kept["snow"] = Snow(**kept["snow"])
    if formula == "year.limits":
        kept["year"] = SiteYear(**kept["year"])
    return kept


def plain(value):
    """A result as JSON would hold it."""
    if dataclasses.is_dataclass(value):
        return {f.name: plain(getattr(value, f.name)) for f in dataclasses.fields(value)}
    if isinstance(value, dict):
        return {name: plain(each) for name, each in value.items()}
    if isinstance(value, (list, tuple)):
        return [plain(each) for each in value]
    return value.tolist() if hasattr(value, "tolist") else value


def differences(got, wanted, slack, at=""):
    """Where a result leaves a golden; outputs the golden does not name are not looked at."""
    if isinstance(wanted, dict):
        for name, each in wanted.items():
            inner = slack.get(name, slack.get("")) if isinstance(slack, dict) else slack
            yield from differences(got[name], each, inner, f"{at}.{name}")
    elif isinstance(wanted, list):
        if len(got) != len(wanted):
            yield f"{at}: {len(got)} entries instead of {len(wanted)}"
        for number, (one, other) in enumerate(zip(got, wanted, strict=False)):
            yield from differences(one, other, slack, f"{at}[{number}]")
    elif isinstance(wanted, bool) or not isinstance(wanted, (int, float)):
        if got != wanted:
            yield f"{at}: {got!r} instead of {wanted!r}"
    elif isinstance(got, bool) or not isinstance(got, (int, float)) or not math.isfinite(got):
        yield f"{at}: {got!r} instead of {wanted!r}"
    elif abs(got - wanted) > (slack or 0) * (1 + 1e-9):
        yield f"{at}: {got!r} instead of {wanted!r} within {slack}"


def call(formula, given):
    module, name = formula.split(".")
    function = getattr(importlib.import_module(f"builder.formulas.{module}"), name)
    return function(**arguments(formula, given))


@pytest.mark.parametrize(("formula", "case"), CASES)
def test_a_formula_gives_what_its_golden_says(formula, case):
    if "refused" in case:
        with pytest.raises(RefusedError) as no:
            call(formula, case["in"])
        assert no.value.key == case["refused"]
        assert str(no.value).endswith(".")
        return
    got = plain(call(formula, case["in"]))
    assert list(differences(got, case["out"], case.get("abs"))) == []
    for name, total in case.get("sums", {}).items():
        assert abs(math.fsum(got[name]) - total) <= case["sums_abs"], name


def test_the_runner_sees_a_wrong_number():
    case = {"a": [1.0, 2.0], "b": "x"}
    assert list(differences({"a": [1.0, 2.2], "b": "x"}, case, 0.1)) != []
    assert list(differences({"a": [1.0, math.nan], "b": "x"}, case, 0.1)) != []
    assert list(differences({"a": [1.0], "b": "x"}, case, 0.1)) != []
    assert list(differences({"a": [1.0, 2.05], "b": "y"}, case, 0.1)) != []
    assert list(differences({"a": [1.0, 2.05], "b": "x"}, case, 0.1)) == []


def public_formulas():
    """Names of all public functions of the formula files, "file.function"."""
    for info in pkgutil.iter_modules(builder.formulas.__path__):
        if info.name in NO_NUMBERS:
            continue
        module = importlib.import_module(f"builder.formulas.{info.name}")
        for name, function in inspect.getmembers(module, inspect.isfunction):
            if function.__module__ == module.__name__ and not name.startswith("_"):
                yield f"{info.name}.{name}"


def test_every_formula_has_a_published_or_hand_worked_case():
    covered = {
        formula
        for _, formula, cases in blocks()
        if any(case["kind"] in ("published", "hand") and "out" in case for case in cases)
    }
    names = set(public_formulas())
    assert len(names) > 100
    assert sorted(names - covered) == []
    tested = {formula for _, formula, _ in blocks() if "." in formula}
    assert sorted(tested - names) == []


def test_every_case_says_its_kind_and_a_known_source():
    seen = 0
    for file, formula, cases in blocks():
        for case in cases:
            seen += 1
            assert case["kind"] in KINDS, (file, formula)
            assert case["source"] in SOURCES, (file, formula, case["source"])
            assert case.get("working") or case.get("provenance"), (file, formula)
    assert seen > 600


def test_every_source_named_in_a_docstring_is_known():
    seen = 0
    for full in public_formulas():
        module, name = full.split(".")
        doc = inspect.getdoc(getattr(importlib.import_module(f"builder.formulas.{module}"), name))
        assert doc, full
        assert "Source:" in doc, full
        if module in ("fidelity", "diversity"):
            continue
        named = doc.split("Source:")[1].split(";")[0]
        for key in named.replace("\n", " ").split(","):
            seen += 1
            assert key.split("(")[0].strip() in SOURCES, (full, key)
    assert seen > 100


def test_every_refusal_of_the_goldens_has_a_sentence():
    keys = {case["refused"] for _, _, cases in blocks() for case in cases if "refused" in case}
    assert len(keys) > 30
    assert keys <= set(SENTENCES)
