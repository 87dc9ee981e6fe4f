"""Every table as a grid and as forms."""

from __future__ import annotations

from dataclasses import dataclass
from pathlib import Path as File
from typing import Any

from flask import (
    Blueprint,
    abort,
    redirect,
    render_template,
    request,
    url_for,
)
from werkzeug.wrappers import Response as BaseResponse

from builder.desk.fields import Group, form, kind_at, path_of, rows_of, shown
from builder.desk.matrix import matrix
from builder.desk.page import page
from builder.desk.phrases import counted, read_phrases
from builder.desk.saving import saver
from builder.desk.shelf import Look, shelf
from builder.desk.table_rows import CLIMATE, FILES, root_of, row_name
from builder.desk.trouble import problem_view
from builder.desk.wording import label_for
from builder.rows import Items, Node, Row, descend, parse_csv, read_yaml
from builder.tables.regions import YAML_TABLES
from builder.tables.shape import Id, Keyed, Many, Part, Record, Text, columns

COLUMNS_SHOWN = 7

pages = Blueprint("tables", __name__, url_prefix="/r/<region_id>")


@dataclass(frozen=True)
class FileLink:
    """One table in the list at the left, with how many problems stop there."""

    text: str
    href: str
    here: bool
    wrong: str


@dataclass(frozen=True)
class ListView:
    """One collection of a table as a grid of its first simple columns."""

    title: str
    part: str
    said: str
    heads: list[str]
    rows: list[tuple[str, str, list[str]]]
    copies: list[str]


def _frame(look: Look, table: str) -> dict[str, Any]:
    """What every page of a table carries at its sides."""
    wrong = {name: 0 for name in FILES}
    here = []
    for problem in look.problems:
        name = File(problem.file).stem
        if name in wrong and problem in look.errors:
            wrong[name] += 1
        if name == table:
            here.append(problem_view(look, problem))
    last = saver(look.id).last()
    return {
        "page": page("tables", "tablepage", look, title=label_for(table)),
        "files": [
            FileLink(
                name,
                url_for("tables.table", region_id=look.id, table=name),
                name == table,
                str(wrong[name] or ""),
            )
            for name in FILES
        ],
        "problems": here[:12],
        "last_step": last.words if last else "",
        "known": _known(look),
        "region_id": look.id,
        "table_name": table,
        "file": FILES[table],
    }


@dataclass(frozen=True)
class KnownIds:
    """The ids of a table, for inputs that name one."""

    table: str
    ids: tuple[str, ...]


def _known(look: Look) -> list[KnownIds]:
    if look.region is None:
        return []
    groups = tuple(group.id for group in look.region.groups)
    return [
        KnownIds("zones", look.region.zone_ids),
        KnownIds("plants", look.region.plant_ids),
        KnownIds("groups", groups),
    ]


@pages.get("/tables")
def first(region_id: str) -> BaseResponse:
    """The table most edited."""
    return redirect(url_for("tables.table", region_id=region_id, table="occurrence"))


@pages.get("/at")
def at(region_id: str) -> BaseResponse:
    """The form that holds a line of a file: where a problem's "Mend" leads."""
    look = shelf().look(region_id)
    table = File(request.args.get("file", "")).stem
    line = request.args.get("line", type=int) or 1
    if table not in FILES:
        return redirect(url_for("overview.problems", region_id=region_id))
    if table == CLIMATE:
        return redirect(url_for("tables.table", region_id=region_id, table=table) + f"#line-{line}")
    root, _ = read_yaml(look.folder / FILES[table], FILES[table], look.folder)
    if root is not None:
        for part, _ in _collections(YAML_TABLES[table]):
            rows = rows_of(root, part)
            above = [key for key, node in rows if node.at.line <= line]
            if above and line >= (root.keys[part].at.line if part in root.keys else 0):
                if _last_line(rows) >= line:
                    return redirect(
                        url_for(
                            "tables.row", region_id=region_id, table=table, part=part, key=above[-1]
                        )
                        + f"#line-{line}"
                    )
    return redirect(url_for("tables.table", region_id=region_id, table=table) + f"#line-{line}")


def _last_line(rows: list[tuple[str, Node]]) -> int:
    return max((_deepest(node) for _, node in rows), default=0)


def _deepest(node: Node) -> int:
    below = (
        node.nodes.values() if isinstance(node, Row) else node if isinstance(node, Items) else ()
    )
    return max([node.at.line, *(_deepest(each) for each in below)])


def _collections(record: type[Record]) -> list[tuple[str, Many | Keyed]]:
    """Fields of a table that are lists of rows or named rows."""
    return [
        (name, kind)
        for name, kind, _ in columns(record)
        if (isinstance(kind, Many) and isinstance(kind.of, Part))
        or (isinstance(kind, Keyed) and not isinstance(kind.of, Text))
    ]


@pages.get("/tables/<table>")
def table(region_id: str, table: str) -> str:
    """One table: the matrix, the months, or its lists and what stands beside them."""
    if table not in FILES:
        abort(404)
    look = shelf().look(region_id)
    frame = _frame(look, table)
    if table == CLIMATE:
        return render_template("climate.html", **frame, **_climate(look))
    root = root_of(look, table)
    if table == "occurrence" and look.region is not None:
        grid = matrix(look, root)
        said = read_phrases()["tables"]["plants_low_to_high"].format(n=len(grid.rows))
        return render_template("matrix.html", **frame, matrix=grid, plants_said=said)
    record = YAML_TABLES[table]
    lists = [_list(look, table, root, part, kind) for part, kind in _collections(record)]
    listed = {part for part, _ in _collections(record)}
    whole = form(label_for(table), Part(record), root, ())
    own = Group(
        (),
        read_phrases()["tables"]["whole"],
        [entry for entry in whole.entries if entry.path[0] not in listed],
        [group for group in whole.parts if group.path[0] not in listed],
    )
    return render_template(
        "table.html", **frame, lists=lists, group=own, has_own=bool(own.entries or own.parts)
    )


def _list(look: Look, table: str, root: Row, part: str, kind: Many | Keyed) -> ListView:
    below = kind.of
    fields = []
    if isinstance(below, Part):
        fields = [
            name
            for name, field, _ in columns(below.record)
            if not isinstance(field, Many | Keyed | Part | Id)
        ][:COLUMNS_SHOWN]
    rows = []
    for key, node in rows_of(root, part):
        href = url_for("tables.row", region_id=look.id, table=table, part=part, key=key)
        cells = [shown(node.get(name)) if isinstance(node, Row) else "" for name in fields]
        if not fields:
            cells = [shown(node) or ", ".join(node.nodes) if isinstance(node, Row) else shown(node)]
        rows.append((row_name(key, node), href, [_short(cell) for cell in cells]))
    say = read_phrases()["tables"]
    of = below.record.__name__ if isinstance(below, Part) else ""
    heads = [label_for(name, of) for name in fields] or [read_phrases()["tables"]["value"]]
    names = [key if not key.isdigit() else row_name(key, node) for key, node in rows_of(root, part)]
    return ListView(label_for(part), part, counted(len(rows), say["rows_n"]), heads, rows, names)


def _short(text: str) -> str:
    return text if len(text) <= 60 else text[:58].rsplit(" ", 1)[0] + " …"


@pages.get("/tables/<table>/<part>/<key>")
def row(region_id: str, table: str, part: str, key: str) -> str:
    """One row as a form."""
    if table not in YAML_TABLES:
        abort(404)
    look = shelf().look(region_id)
    root = root_of(look, table)
    path = path_of(f"{part}/{key}")
    node = descend(root, path)
    if node is None:
        abort(404)
    kind = kind_at(YAML_TABLES[table], path)
    group = form(_title(look, table, row_name(key, node)), kind, node, path)
    return render_template(
        "row.html",
        **_frame(look, table),
        group=group,
        part=part,
        key=key,
        row_name=row_name(key, node),
        lines=_lines(look, table, node),
    )


def _title(look: Look, table: str, name: str) -> str:
    if look.region is not None:
        for plant in look.region.plants:
            if plant.id == name:
                return f"{plant.common}, {label_for(table).lower()}"
        for zone in look.region.zones:
            if zone.id == name:
                return f"{zone.name}, {label_for(table).lower()}"
    return name


def _lines(look: Look, table: str, node: Node) -> str:
    """The row as it stands in the file."""
    text = (look.folder / FILES[table]).read_text(encoding="utf-8").split("\n")
    return "\n".join(text[node.at.line - 1 : _deepest(node)][:40])


def _climate(look: Look) -> dict[str, Any]:
    text = (look.folder / FILES[CLIMATE]).read_text(encoding="utf-8-sig")
    sheet, _ = parse_csv(text, FILES[CLIMATE])
    if sheet is None:
        return {"heads": [], "rows": []}
    rows = [
        (each.at.line, [(f"{place}/{name}", shown(each.get(name))) for name in sheet.columns])
        for place, each in enumerate(sheet.rows)
    ]
    return {"heads": [label_for(name) for name in sheet.columns], "rows": rows}
