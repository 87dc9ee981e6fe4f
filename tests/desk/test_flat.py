"""A region from a flat sheet of plots, its columns named by the person."""

import io
import random

import pytest

from builder.desk.flat import guess_of, read_flat
from builder.tables.sheets import SheetFault
from tests.desk.helpers import token


def sheet(plots=40):
    """A sheet of two kinds of ground with plants of their own, columns under a person's names."""
    draw = random.Random(3)
    lines = ["Releve;Species;Cover;Community;Elevation"]
    for number in range(plots):
        high = number % 2
        own = ["Pinus", "Carex"] if high else ["Festuca", "Bromus"]
        for plant in [*own, "Poa"]:
            if draw.random() < 0.85:
                community = "forest" if high else "meadow"
                lines.append(
                    f"r{number};{plant};{draw.randint(1, 40)};{community};{900 + 500 * high}"
                )
    return "\n".join(lines).encode()


def bring(client, content, name="plots.csv"):
    form = {"token": token(client), "sheet": (io.BytesIO(content), name)}
    return client.post("/start/plots", data=form).headers["Location"]


def test_a_sheet_becomes_a_region(app, client, tmp_path):
    there = bring(client, sheet())
    page = client.get(there).get_data(as_text=True)
    assert "<option selected>Releve</option>" in page
    form = {
        "token": token(client),
        "plot": "Releve",
        "plant": "Species",
        "cover": "Cover",
        "zone": "Community",
        "height_m": "Elevation",
        "id": "from_plots",
    }
    for wrong in ({"plot": ""}, {"zone": "no such"}, {"id": "../x"}, {"id": "willow_breaks"}):
        assert client.post(there, data=form | wrong).headers["Location"] == there
    client.post(there, data=form)
    job = app.extensions["jobs"].last("fit", "from_plots")
    assert job.finished.wait(200)
    assert job.state == "done", list(job.lines)
    page = client.get("/r/from_plots/").get_data(as_text=True)
    assert "Nothing to mend." in page or "0 to mend" not in page
    assert (tmp_path / "keydata/from_plots/occurrence.yaml").is_file()
    assert client.get("/start/plots/at-work/from_plots").status_code == 200


@pytest.mark.parametrize(
    ("name", "content"),
    [
        ("a.csv", b""),
        ("a.csv", b"one;two\n1;2\n"),
        ("a.csv", b"a;b;c\n"),
        ("a.csv", b"a;b;c\n1;2\n"),
        ("a.csv", b"\x00\x01\x02"),
        ("a.xlsx", b"no workbook"),
        ("a.xlsx", b"PK\x03\x04"),
    ],
)
def test_what_is_no_sheet_of_plots_is_told(client, name, content):
    assert bring(client, content, name) == "/start/plots"
    with pytest.raises(SheetFault):
        read_flat(name, content)


@pytest.mark.parametrize("key", ["0" * 16, "../../keydata", "zz", "%2e%2e"])
def test_only_what_was_brought_is_found(client, key):
    assert client.get(f"/start/plots/{key}").status_code == 404


def test_columns_are_guessed_by_their_names():
    columns = ["Plot ID", "Species", "altitude", "remarks"]
    assert [guess_of(name, columns) for name in ("plot", "plant", "height_m", "zone")] == [
        "Plot ID",
        "Species",
        "altitude",
        "",
    ]
