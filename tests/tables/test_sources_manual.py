"""docs/sources.md names every source of the regions and formulas, and is current."""

from pathlib import Path

from builder.formulas.sources import SOURCES
from builder.tables import load_region
from builder.tables.sources_manual import formula_names, sources_page

ROOT = Path(__file__).parent.parent.parent


def regions():
    folders = sorted((ROOT / "keydata").iterdir())
    return [load_region(each).region for each in folders if (each / "region.yaml").is_file()]


def test_the_page_is_current():
    page = (ROOT / "docs" / "sources.md").read_text(encoding="utf-8")
    assert page == sources_page(regions()), "run `beltbook docs`"


def test_every_source_stands_on_the_page():
    page = sources_page(regions())
    for key in SOURCES:
        assert f"**{key}**" in page
    seen = 0
    for region in regions():
        for key in region.sources:
            seen += 1
            assert f"**{key}**" in page
    assert seen > 10
    assert len(list(formula_names())) > 100
