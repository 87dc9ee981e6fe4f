"""The proof kept beside a region's tables: proof.yaml, read when a pack is made.

It names the tables it was made from by a hash. After an edit its figures no longer hold and the
pack says untested; the verdict lines it brought stay in use, since they are only lines.
"""

from __future__ import annotations

import hashlib
import os
from dataclasses import dataclass, replace
from pathlib import Path
from typing import Any

from builder.key.compile import Fitted, arrays_of
from builder.key.weigh import Weights
from builder.problems import Problem
from builder.rows import block_text, plain, read_yaml
from builder.tables import Region

PROOF_YAML = "proof.yaml"
# What the key is made of; texts, soils, yields, notes and mixes change no call.
TABLES = ("region", "zones", "plants", "occurrence", "questions", "fit")


@dataclass(frozen=True)
class Kept:
    """figures: what stands where belief is shown, None once the tables have changed since."""

    session: dict[str, Any]
    figures: dict[str, Any] | None


def proved_tables(folder: Path) -> str:
    """Hash of the tables a proof is made from: those that the key reads."""
    digest = hashlib.sha256()
    for path in sorted(folder.iterdir()):
        if path.stem in TABLES and path.suffix in {".yaml", ".csv"} and path.is_file():
            digest.update(path.name.encode() + b"\0" + path.read_bytes() + b"\0")
    return digest.hexdigest()[:16]


def keep_proof(folder: Path, proof: dict[str, Any]) -> Path:
    """Writes proof.yaml beside the tables, whole or not at all."""
    values = {
        "source": "common practice",
        "tables": proved_tables(folder),
        "session": proof["session"],
        "figures": {name: one for name, one in proof["summary"].items() if one is not None},
    }
    path = folder / PROOF_YAML
    part = path.with_name(f".{PROOF_YAML}.part")
    head = "# Written by the proof; the figures are measured, those of simulated sites say so.\n"
    part.write_text(head + "\n".join(block_text(values)) + "\n", encoding="utf-8", newline="\n")
    os.replace(part, path)
    return path


def read_proof(folder: Path) -> tuple[Kept | None, list[Problem]]:
    """The proof beside the tables; None where nobody has run one."""
    path = folder / PROOF_YAML
    if not path.is_file():
        return None, []
    root, problems = read_yaml(path, str(path), folder)
    said = plain(root) if root is not None else None
    if not isinstance(said, dict) or not isinstance(said.get("session"), dict):
        return None, problems
    current = str(said.get("tables")) == proved_tables(folder)
    figures = said.get("figures") if current else None
    return Kept(said["session"], figures), problems


def with_session(region: Region, fitted: Fitted | None, kept: Kept | None) -> Fitted | None:
    """What a pack is made with: the fit, or the tables' own counts with the proof's lines."""
    if kept is None or not kept.session:
        return fitted
    if fitted is not None:
        return replace(fitted, session={**kept.session, **fitted.session})
    weights = Weights(plots_assumed=float(region.head.plots_behind.assumed_n))
    return Fitted(arrays_of(region, weights), weights, dict(kept.session))
