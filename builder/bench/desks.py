"""The desk: one save of a large table, with the problems it answers."""

from __future__ import annotations

import re

from builder.bench.measure import Measure, Setting, Taken, seconds
from builder.desk.application import Settings, create_app
from builder.rows import plain, read_yaml

SAVES = 5


def save(setting: Setting) -> Taken:
    """One constancy changed by the desk's form: table written, region checked, problems told."""
    name = setting.large.name
    home = setting.large.parent.parent
    app = create_app(Settings(home, home / "site_out"))
    client = app.test_client()
    page = client.get("/").get_data(as_text=True)
    found = re.search(r'name="(?:desk-)?token" (?:content|value)="([^"]+)"', page)
    assert found, "the desk's page holds no token"
    root, _ = read_yaml(setting.large / "occurrence.yaml", "occurrence.yaml")
    assert root is not None
    plant, row = next(iter(plain(root)["occurrence"].items()))
    zone, (share, cover) = next(iter(row.items()))
    was = [f"{share} {cover}"]
    turn = iter(range(21, 99))
    told: list[int] = []

    def work() -> None:
        new = f"{next(turn)} {cover}"
        given = {
            "table": "occurrence", "key": f"occurrence/{plant}/{zone}", "was": was[0], "text": new,
        }  # fmt: skip
        headers = {"X-Desk-Token": found[1]} if found else {}
        answer = client.post(f"/r/{name}/save", data=given, headers=headers)
        assert answer.status_code == 200, answer.get_data(as_text=True)
        assert answer.get_json()["saved"] == 1, answer.get_json()
        was[0] = new
        told.append(len(answer.get_json()["problems"]))

    taken = seconds(work, setting.runs(SAVES))
    app.extensions["jobs"].stop_all()
    return Taken(tuple(1000 * one for one in taken), None, "40 zones x 400 plants, no browser.")


MEASURES = (Measure("desk-save", "Desk: one save, with the table's problems", "ms", save),)
