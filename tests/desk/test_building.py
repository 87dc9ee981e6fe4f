"""Building and proving from the desk: as jobs, to the end, and stopped half way."""

import io
import json
import zipfile

from tests.desk.helpers import OCCURRENCE, REGION, save, token


def finished(app, kind):
    """The newest job of a kind, at its end."""
    job = app.extensions["jobs"].last(kind, "willow_breaks")
    assert job is not None
    assert job.finished.wait(120)
    return job


def start(client, what):
    return client.post(f"{REGION}/{what}", data={"token": token(client)})


def test_a_build_is_followed_shown_and_handed_out(app, client, tmp_path):
    start(client, "build")
    number = app.extensions["jobs"].last("build", "willow_breaks").number
    assert client.get(f"/jobs/{number}").json["lines"] is not None
    job = finished(app, "build")
    assert (job.state, job.done) == ("done", job.of), list(job.lines)
    page = client.get(f"{REGION}/").get_data(as_text=True)
    assert "from the tables as they stand" in page
    assert b"Beltbook" in client.get("/field/").data
    assert client.get("/field/regions/willow_breaks/booklet.pdf").data.startswith(b"%PDF-")
    first, second = (client.get("/site.zip").data for _ in range(2))
    assert first == second
    with zipfile.ZipFile(io.BytesIO(first)) as packed:
        names = packed.namelist()
    assert {"index.html", "sw.js", "field.html", "regions/willow_breaks/booklet.pdf"} <= set(names)
    assert not [name for name in names if name.startswith((".", "/")) or ".." in name]
    save(client, "occurrence", ("occurrence/blue_grama/prairie", "90 18", "64 6"))
    page = client.get(f"{REGION}/build").get_data(as_text=True)
    assert "The tables have changed since" in page


def test_a_stopped_build_leaves_what_was_there(app, client, tmp_path):
    out = tmp_path / "site_out"
    (out / "index.html").write_text("old", encoding="utf-8")
    start(client, "build")
    job = app.extensions["jobs"].last("build", "willow_breaks")
    client.post(f"/jobs/{job.number}/stop", data={"token": token(client)})
    assert finished(app, "build").state == "stopped"
    assert [path.name for path in out.iterdir()] == ["index.html"]
    assert (out / "index.html").read_text(encoding="utf-8") == "old"
    start(client, "build")
    assert finished(app, "build").state == "done"


def test_tables_with_a_problem_are_not_built(app, client, tmp_path):
    path = tmp_path / OCCURRENCE
    path.write_text(path.read_text("utf-8").replace("prairie: [90", "prarie: [90"), "utf-8")
    start(client, "build")
    start(client, "prove")
    assert app.extensions["jobs"].kept == {}
    assert b"1 to mend" in client.get(f"{REGION}/build").data


def test_a_proof_is_kept_and_the_next_stands_beside_it(app, client, tmp_path):
    start(client, "prove")
    job = finished(app, "prove")
    assert job.state == "done", list(job.lines)
    page = client.get(f"{REGION}/proof").get_data(as_text=True)
    assert "simulated sites" in page
    assert "both proofs then stand here side by side" in page
    save(client, "occurrence", ("occurrence/ponderosa_pine/prairie", "2 1", "70 20"))
    assert "the tables have changed since" in client.get(f"{REGION}/").get_data(as_text=True)
    start(client, "prove")
    assert finished(app, "prove").state == "done"
    kept = sorted((tmp_path / ".beltbook/proofs/willow_breaks").glob("*.json"))
    before, now = (json.loads(path.read_text("utf-8")) for path in kept)
    assert before["tables"] != now["tables"]
    page = client.get(f"{REGION}/proof").get_data(as_text=True)
    assert f"<b>{now['simulated']['hit_rate']:g}</b>" in page
