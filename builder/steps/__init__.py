"""The sentence as a few functions: rows → tables → problems? → pack → pages.

Each only calls; values are made in the parts. Nothing here prints.
"""

from builder.steps.building import Built, build
from builder.steps.calling import Called, UnknownName, call_file
from builder.steps.checking import Checked, Stopped, check_region, check_regions
from builder.steps.documents import write_docs
from builder.steps.notes import (
    BuilderBusy,
    BuildNote,
    is_current,
    last_build,
    regions_in,
    tables_hash,
)

__all__ = [
    "BuildNote",
    "BuilderBusy",
    "Built",
    "Called",
    "Checked",
    "Stopped",
    "UnknownName",
    "build",
    "call_file",
    "check_region",
    "check_regions",
    "is_current",
    "last_build",
    "regions_in",
    "tables_hash",
    "write_docs",
]
