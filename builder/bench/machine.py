"""The machine a run was made on, and whether it had other work to do."""

from __future__ import annotations

import os
import platform
from pathlib import Path
from typing import Any

QUIET_SHARE = 0.3
"""Load by core above which figures are called those of a busy machine."""


def machine() -> dict[str, Any]:
    """Processor, cores, memory [GB], system, Python and load over one minute."""
    cores = len(os.sched_getaffinity(0)) if hasattr(os, "sched_getaffinity") else os.cpu_count()
    load = os.getloadavg()[0]
    return {
        "cpu": _cpu(),
        "cores": cores or 1,
        "memory_gb": round(os.sysconf("SC_PAGE_SIZE") * os.sysconf("SC_PHYS_PAGES") / 1e9, 1),
        "system": f"{platform.system()} {platform.machine()}",
        "python": platform.python_version(),
        "load": round(load, 2),
        "quiet": load <= QUIET_SHARE * (cores or 1),
    }


def _cpu() -> str:
    try:
        lines = Path("/proc/cpuinfo").read_text(encoding="utf-8").splitlines()
    except OSError:
        return platform.processor() or "unknown"
    named = [line.partition(":")[2].strip() for line in lines if line.startswith("model name")]
    return named[0] if named else platform.processor() or "unknown"


def machine_line(known: dict[str, Any]) -> str:
    """The machine in one sentence."""
    quiet = "" if known["quiet"] else "  NOT QUIET: other work took part of it."
    return (
        f"{known['cpu']}, {known['cores']} cores, {known['memory_gb']} GB, {known['system']}, "
        f"Python {known['python']}, load {known['load']} at the start.{quiet}"
    )
