"""Changes of a region's tables: saving values, taking a save back, adding and removing rows."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path as File
from typing import Any

from flask import Blueprint, Response, abort, flash, jsonify, redirect, request, url_for
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.edits import Change, Refusal, edited, edited_csv
from builder.desk.fields import Path, blank_of, kind_at, path_of, rows_of
from builder.desk.phrases import counted, read_phrases
from builder.desk.saving import saver
from builder.desk.shelf import shelf
from builder.desk.table_rows import CLIMATE, FILES, root_of, row_name
from builder.desk.trouble import problem_view
from builder.rows import Items, descend, parse_yaml, plain
from builder.tables.edit import EditRefused, add_row, copy_row, remove_value, replace_value
from builder.tables.reading import ID_FORM
from builder.tables.regions import YAML_TABLES
from builder.tables.shape import Many, Record

pages = Blueprint("changes", __name__, url_prefix="/r/<region_id>")


@pages.post("/save")
def save(region_id: str) -> BaseResponse:
    """Saves the values that differ from what the person saw; with `try` only says what is wrong."""
    table = request.form.get("table", "")
    if table not in FILES:
        abort(404)
    changes = _changes()
    refused: list[Refusal] = []

    def change(text: str) -> str:
        if table == CLIMATE:
            new, found = edited_csv(text, changes)
        else:
            new, found = edited(YAML_TABLES[table], text, changes)
        refused.extend(found)
        return new

    if "try" in request.form:
        look = shelf().look(region_id)
        change((look.folder / FILES[table]).read_text(encoding="utf-8"))
        return jsonify(refused=[_told(refusal) for refusal in refused])
    say = read_phrases()["edit"]
    words = counted(len(changes), say["changed_words"], file=FILES[table])
    try:
        saved = saver(region_id).save(FILES[table], words, change)
    except UnicodeDecodeError:
        abort(409, "not-text")
    made = len(changes) - len(refused) if saved else 0
    if request.headers.get("X-Desk-Token"):
        return _answer(region_id, table, made, refused)
    if refused:
        flash(counted(len(refused), say["refused"]) + " " + " ".join(r.reason for r in refused[:3]))
    flash(counted(made, say["saved"]) if made else say["unchanged"])
    return redirect(_back(region_id, table))


def _lf(text: str) -> str:
    return text.replace("\r\n", "\n").strip()


def _told(refusal: Refusal) -> dict[str, Any]:
    key = "/".join(map(str, refusal.path))
    return {"key": key, "reason": refusal.reason, "fix": refusal.fix, "other": refusal.other}


def _answer(region_id: str, table: str, made: int, refused: list[Refusal]) -> Response:
    look = shelf().look(region_id)
    views = [problem_view(look, p) for p in look.problems if File(p.file).stem == table]
    said = [
        {"wrong": v.wrong, "fix": v.fix, "place": v.place, "stops": v.stops} for v in views[:12]
    ]
    last = saver(region_id).last()
    answer = jsonify(
        saved=made,
        refused=[_told(refusal) for refusal in refused],
        problems=said,
        undo=last.words if last else "",
    )
    answer.status_code = 409 if any(refusal.other for refusal in refused) else 200
    return answer


def _back(region_id: str, table: str) -> str:
    part, key = request.form.get("part"), request.form.get("row")
    if part and key:
        return url_for("tables.row", region_id=region_id, table=table, part=part, key=key)
    return url_for("tables.table", region_id=region_id, table=table)


@pages.post("/undo")
def undo(region_id: str) -> BaseResponse:
    """Takes the last save back."""
    say = read_phrases()["edit"]
    undone = saver(region_id).undo()
    table = request.form.get("table", "occurrence")
    if undone.step is None:
        flash(say["undo_none"])
    elif not undone.done:
        flash(say["undo_changed"].format(file=undone.step.file))
    else:
        flash(say["undone"].format(words=undone.step.words))
        table = File(undone.step.file).stem
    return redirect(
        url_for(
            "tables.table", region_id=region_id, table=table if table in FILES else "occurrence"
        )
    )


@pages.post("/add")
def add(region_id: str) -> BaseResponse:
    """Adds a row as a copy of another under a new id."""
    table, part = request.form.get("table", ""), request.form.get("part", "")
    if table not in YAML_TABLES:
        abort(404)
    say = read_phrases()["edit"]
    new, like = request.form.get("new", "").strip(), request.form.get("like", "")
    if not ID_FORM.fullmatch(new):
        flash(say["id"])
        return redirect(url_for("tables.table", region_id=region_id, table=table))
    words = say["added_words"].format(row=new, file=FILES[table])
    try:
        saver(region_id).save(FILES[table], words, lambda text: _copied(text, part, like, new))
    except EditRefused as refusal:
        flash(str(refusal))
        return redirect(url_for("tables.table", region_id=region_id, table=table))
    flash(say["added"].format(row=new))
    rows = rows_of(root_of(shelf().look(region_id), table), part)
    key = next((key for key, node in rows if row_name(key, node) == new), "0")
    return redirect(url_for("tables.row", region_id=region_id, table=table, part=part, key=key))


def _copied(text: str, part: str, like: str, new: str) -> str:
    root, _ = parse_yaml(text, "table")
    rows = rows_of(root, part) if root is not None else []
    if any(row_name(key, node) == new for key, node in rows):
        raise EditRefused(f'"{new}" stands here already.')
    for key, node in rows:
        if like in (key, row_name(key, node)):
            return copy_row(text, path_of(f"{part}/{key}"), new)
    raise EditRefused("There is no row here to copy.")


@pages.post("/remove")
def remove(region_id: str) -> BaseResponse:
    """Removes a row the person has ticked that they mean it for."""
    table, part, key = (request.form.get(name, "") for name in ("table", "part", "row"))
    if table not in YAML_TABLES:
        abort(404)
    say = read_phrases()["edit"]
    path: Path = path_of(f"{part}/{key}")
    name = request.form.get("name", key)

    def removed(text: str) -> str:
        root, _ = parse_yaml(text, "table")
        node = descend(root, path) if root is not None else None
        if node is None or row_name(key, node) != name:
            raise EditRefused(say["look_again"])
        return remove_value(text, path)

    if not request.form.get("sure"):
        return redirect(url_for("tables.row", region_id=region_id, table=table, part=part, key=key))
    try:
        words = say["removed_words"].format(row=name, file=FILES[table])
        saver(region_id).save(FILES[table], words, removed)
        flash(say["removed"].format(row=name))
    except EditRefused as refusal:
        flash(str(refusal))
    return redirect(url_for("tables.table", region_id=region_id, table=table))


def _changes() -> list[Change]:
    """Values of the sent form that differ from what the person saw."""
    given = zip(
        request.form.getlist("key"),
        request.form.getlist("was"),
        request.form.getlist("text"),
        strict=False,
    )
    return [Change(path_of(key), was, _lf(text)) for key, was, text in given if was != _lf(text)]


@pages.post("/more")
def more(region_id: str) -> BaseResponse:
    """Adds one to a list inside a row, like its last or blank; what was typed is saved with it."""
    return _reshape(region_id, with_one_more)


@pages.post("/less")
def less(region_id: str) -> BaseResponse:
    """Takes one out of a list inside a row; what was typed is saved with it."""
    return _reshape(region_id, lambda text, _record, path: remove_value(text, path))


def _reshape(region_id: str, change: Callable[[str, type[Record], Path], str]) -> BaseResponse:
    table, at = request.form.get("table", ""), path_of(request.form.get("at", ""))
    if table not in YAML_TABLES or not at:
        abort(404)
    say = read_phrases()["edit"]
    record = YAML_TABLES[table]

    def changed(text: str) -> str:
        new, _ = edited(record, text, _changes())
        return change(new, record, at)

    try:
        words = say["list_words"].format(file=FILES[table])
        saver(region_id).save(FILES[table], words, changed)
    except (EditRefused, KeyError, StopIteration) as refusal:
        flash(str(refusal) if isinstance(refusal, EditRefused) else say["no_such_value"])
    return redirect(_back(region_id, table))


def with_one_more(text: str, record: type[Record], path: Path) -> str:
    """The text with one more in a list: a copy of its last, or a blank one."""
    kind = kind_at(record, path)
    if not isinstance(kind, Many):
        raise EditRefused(read_phrases()["edit"]["no_such_value"])
    root, _ = parse_yaml(text, "table")
    node = descend(root, path)
    if isinstance(node, Items) and node.nodes:
        return add_row(text, path, plain(node.nodes[-1]))
    return replace_value(text, path, [blank_of(kind.of)])
