"""A start from a flat spreadsheet of plots or of constancies."""

import pytest

from builder.checks import checked_region
from builder.problems import errors
from builder.rows import parse_csv, plain
from builder.tables.gather import gathered, guessed_columns, id_from
from builder.tables.sheets import Flat, SheetFault
from builder.tables.start import StartRefused, start_region

PLOTS = """Plot no,Community,Species,Cover %
p1,Dry heath,Calluna vulgaris,40
p1,Dry heath,Erica cinerea,5
p2,Dry heath,Calluna vulgaris,20
p3,Mire,Sphagnum fallax,"60"
p3,Mire,Calluna vulgaris,2
p4,Mire,Sphagnum fallax,80
"""
CONSTANCIES = """zone,taxon,constancy,mean cover
Dry heath,Calluna vulgaris,100,30
Dry heath,Erica cinerea,50,5
Mire,Calluna vulgaris,0,0
Mire,Sphagnum fallax,90,70
"""


def flat(text):
    sheet, problems = parse_csv(text, "t")
    assert problems == []
    return Flat(sheet.columns, [plain(row) for row in sheet.rows])


def test_columns_are_guessed_from_their_names():
    assert guessed_columns(["Plot no", "Community", "Species", "Cover %"]) == {
        "plot": "Plot no",
        "zone": "Community",
        "plant": "Species",
        "cover_pct": "Cover %",
    }
    assert guessed_columns(["zone", "taxon", "constancy", "mean cover"]) == {
        "zone": "zone",
        "plant": "taxon",
        "constancy_pct": "constancy",
        "cover_pct": "mean cover",
    }
    assert guessed_columns(["a", "b"]) == {}


def test_plots_are_counted_by_zone():
    """By hand: heather in 2 of 2 heath plots with (40 + 20) / 2 = 30 %, in 1 of 2 mire plots."""
    table = flat(PLOTS)
    found = gathered(table, guessed_columns(table.columns))
    assert found.zones == {"dry_heath": "Dry heath", "mire": "Mire"}
    assert found.plots == {"dry_heath": 2, "mire": 2}
    assert found.occurrence["calluna_vulgaris"] == {"dry_heath": [100, 30], "mire": [50, 2]}
    assert found.occurrence["sphagnum_fallax"] == {"mire": [100, 70]}


def test_constancies_are_taken_as_they_stand():
    table = flat(CONSTANCIES)
    found = gathered(table, guessed_columns(table.columns))
    assert found.occurrence == {
        "calluna_vulgaris": {"dry_heath": [100, 30]},
        "erica_cinerea": {"dry_heath": [50, 5]},
        "sphagnum_fallax": {"mire": [90, 70]},
    }


@pytest.mark.parametrize("text", [PLOTS, CONSTANCIES])
def test_the_region_that_comes_of_it_has_no_error(tmp_path, text):
    table = flat(text)
    found = gathered(table, guessed_columns(table.columns))
    folder = start_region(tmp_path / "new_hills", date="2026-04-01", found=found)
    loaded = checked_region(folder)
    assert errors(loaded.problems) == []
    assert [zone.name for zone in loaded.region.zones] == ["Dry heath", "Mire"]
    assert loaded.region.occurrence["dry_heath", "calluna_vulgaris"].cover_pct == 30


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("a,b\n1,2\n", "which column holds the plant"),
        ("species,zone\nx,y\n", "holds the plot, or the constancy"),
        (PLOTS.replace("p2,Dry heath", "p1,Mire"), "two zones"),
        (PLOTS.replace("40", "many"), "no percent"),
        (CONSTANCIES.replace("100", "140"), "outside 0 to 100"),
        (CONSTANCIES + "Mire,Sphagnum fallax,10,1\n", "stands twice"),
        ("plot,zone,species\np1,,x\n", "the zone is empty"),
        ("plot,zone,species\np1,Mire,\n", "No plant"),
    ],
)
def test_what_cannot_be_gathered_is_said_with_its_line(text, said):
    table = flat(text)
    with pytest.raises(SheetFault, match=said):
        gathered(table, guessed_columns(table.columns))


def test_names_become_ids():
    assert id_from("Artemisia tridentata ssp. wyomingensis") == "artemisia_tridentata_wyomingensis"
    assert id_from("Álamo (río)") == "alamo_rio"
    assert id_from("12") == "x_12"


def test_more_zones_than_letters_are_refused(tmp_path):
    lines = ["zone,species,constancy"] + [f"z{n},Poa alpina,50" for n in range(30)]
    table = flat("\n".join(lines))
    found = gathered(table, guessed_columns(table.columns))
    with pytest.raises(StartRefused, match="30 zones"):
        start_region(tmp_path / "many", found=found)
