"""CPU time of a whole `check` process against importing the libraries it may use; both in one run.

Run on purpose: python tests/benchmarks/start_up.py
Goal: at most 1.6 to 1.
"""

from __future__ import annotations

import os
import resource
import statistics
import subprocess
import sys
from pathlib import Path

ROOT = Path(__file__).parents[2]
RUNS = 15
CHECK = [sys.executable, "-m", "lubecheck", "check", "examples/new_motor.toml"]
IMPORTS = [sys.executable, "-c", "import numpy, pint, typer, rich.console"]


def cpu_seconds(command: list[str]) -> float:
    """Return user and system time of one run."""
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    subprocess.run(command, cwd=ROOT, stdout=subprocess.DEVNULL, check=True, env={**os.environ, "COLUMNS": "100"})
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    return after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime


def main() -> None:
    """Measure in turn, so that a drift of the machine touches both alike."""
    pairs = [(cpu_seconds(CHECK), cpu_seconds(IMPORTS)) for _ in range(RUNS + 1)][1:]
    check = statistics.median(a for a, _ in pairs)
    imports = statistics.median(b for _, b in pairs)
    ratio = statistics.median(a / b for a, b in pairs)
    print(f"check    {check:.3f} s CPU\nimports  {imports:.3f} s CPU\nratio    {ratio:.2f}  (goal: at most 1.6)")


if __name__ == "__main__":
    main()
