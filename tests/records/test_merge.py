"""Which version stands is decided here as on the phone: tests/js/records.test.js reads the same."""

import json
from pathlib import Path

import pytest

from builder.records.exchange import Records, merged
from builder.records.merge import canonical, settled, standing

GOLDEN = json.loads(
    (Path(__file__).parents[1] / "goldens" / "merge.json").read_text(encoding="utf-8")
)


@pytest.mark.parametrize("case", GOLDEN["standing"], ids=lambda case: case["id"])
def test_which_version_stands(case):
    assert standing(case["mine"], case["theirs"]) == case["out"]


@pytest.mark.parametrize("case", GOLDEN["settled"], ids=lambda case: case["id"])
def test_a_settled_conflict_stands_over_both(case):
    made = settled(case["chosen"], case["other"], case["device"])
    assert made == case["out"]
    for side in (case["chosen"], case["other"]):
        assert standing(side, made) == "theirs"


def test_one_text_per_content():
    assert canonical({"b": 1.0, "a": [True, None]}) == '{"a":[true,null],"b":1}'


def version(revision, **edits):
    return {"id": "a", "revision": revision, "edits": edits}


def test_files_are_merged_and_repeats_do_nothing():
    one, later, aside = version(1, p=1), version(2, p=2), version(2, p=1, q=1)
    files = [Records(sites=[one]), Records(sites=[later, one]), Records(sites=[aside, aside])]
    whole = merged([*files, *files])
    assert whole.sites == [later]
    assert whole.sides == [("a", aside)]
