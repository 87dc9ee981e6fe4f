"""Brings the text of a file in, or says why not."""

from __future__ import annotations

from pathlib import Path

from builder.problems import CAUTION, Place, Problem, problem_at

MAX_BYTES = 4_000_000
CHECK = "readable"


def read_text(
    path: Path, shown: str, inside: Path | None = None, legacy: bool = False
) -> tuple[str | None, list[Problem]]:
    """The text of a file, whatever its line ends and byte order mark.

    shown   the file as the person named it, for problems
    inside  folder the file must lie in, links followed
    legacy  take a file that is not UTF-8 as Windows-1252, with a caution (spreadsheets save so)
    """
    start = Place(shown, 1, 1)

    def stop(wrong: str, fix: str) -> tuple[None, list[Problem]]:
        return None, [problem_at(start, CHECK, wrong, fix)]

    try:
        real = path.resolve(strict=True)
        if inside is not None and not real.is_relative_to(inside.resolve()):
            return stop(
                "the file is a link out of the region's folder",
                "Put the file itself into the folder.",
            )
        if not real.is_file():
            return stop("this is not a file", "A table is one plain text file with this name.")
        if real.stat().st_size > MAX_BYTES:
            return stop(
                f"the file is larger than {MAX_BYTES // 1_000_000} MB",
                "Split the table, or check that this is the file you meant.",
            )
        raw = real.read_bytes()
    except FileNotFoundError:
        return stop("the file is missing", "Write the file, or copy one from another region.")
    except (OSError, RuntimeError, ValueError) as error:
        reason = getattr(error, "strerror", None) or "it cannot be opened"
        return stop(
            f"the file cannot be read: {str(reason).lower()}", "Check its name and who may read it."
        )
    return _decoded(raw, shown, legacy)


def _decoded(raw: bytes, shown: str, legacy: bool) -> tuple[str | None, list[Problem]]:
    if raw[:2] in (b"\xff\xfe", b"\xfe\xff"):
        try:
            return _lines(raw.decode("utf-16")), []
        except UnicodeDecodeError:
            return None, [
                problem_at(
                    Place(shown, 1, 1),
                    CHECK,
                    "the file is not text",
                    "Save the table as UTF-8 text.",
                )
            ]
    if b"\0" in raw:
        line = raw[: raw.index(b"\0")].count(b"\n") + 1
        return None, [
            problem_at(
                Place(shown, line, 1),
                CHECK,
                "the file is not text",
                "Export the table from its program as UTF-8 text.",
            )
        ]
    try:
        return _lines(raw.decode("utf-8-sig")), []
    except UnicodeDecodeError as error:
        before = raw[: error.start]
        line = before.count(b"\n") + 1
        tail = before[before.rfind(b"\n") + 1 :].decode("utf-8-sig", errors="replace")
        place = Place(shown, line, len(tail) + 1)
        if legacy:
            caution = problem_at(
                place,
                "encoding",
                "the file is not UTF-8",
                "It was read as Windows-1252; save it as UTF-8.",
                CAUTION,
            )
            return _lines(raw.decode("cp1252", errors="replace")), [caution]
        return None, [
            problem_at(
                place,
                CHECK,
                "the file is not UTF-8 from here on",
                "Save it again with the encoding UTF-8.",
            )
        ]


def _lines(text: str) -> str:
    return text.replace("\r\n", "\n").replace("\r", "\n")
