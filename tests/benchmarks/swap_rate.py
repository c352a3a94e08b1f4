"""CPU time of a whole `swap` process over the full table of greases against one `check`; and the fewest of a plant.

Run on purpose: python tests/benchmarks/swap_rate.py
Goal: at most 1.3 to 1.
"""

from __future__ import annotations

import os
import resource
import statistics
import subprocess
import sys
import time
from pathlib import Path

import numpy as np

ROOT = Path(__file__).parents[2]
RUNS = 15
CHECK = [sys.executable, "-m", "lubecheck", "check", "examples/new_motor.toml"]
SWAP = [sys.executable, "-m", "lubecheck", "swap", "examples/new_motor.toml", "--all", "--kind", "grease"]


def cpu_seconds(command: list[str]) -> float:
    """Return user and system time of one run."""
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    subprocess.run(command, cwd=ROOT, stdout=subprocess.DEVNULL, check=True, env={**os.environ, "COLUMNS": "100"})
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    return after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime


def main() -> None:
    """Measure in turn, so that a drift of the machine touches both alike."""
    for name, options in (("terminal", []), ("json", ["--json"])):
        pairs = [(cpu_seconds(SWAP + options), cpu_seconds(CHECK + options)) for _ in range(RUNS + 1)][1:]
        swap, check = (statistics.median(pair[i] for pair in pairs) for i in (0, 1))
        ratio = statistics.median(a / b for a, b in pairs)
        print(f"{name}: swap {swap:.3f} s, check {check:.3f} s CPU, ratio {ratio:.2f}  (goal: at most 1.3)")
    from lubecheck.studies.plant import fewest

    # As lubricants and positions are: each position takes a span of viscosities, heat up to a limit, cold to another.
    chance = np.random.default_rng(1)
    thick, hot, cold = (chance.random((60, 1)) for _ in range(3))
    least, span, heat, frost = (chance.random((1, 5000)) for _ in range(4))
    is_good = (
        (thick >= 0.8 * least) & (thick <= 0.8 * least + 0.1 + 0.4 * span) & (hot >= 0.8 * heat) & (cold >= 0.7 * frost)
    )
    start = time.process_time()
    chosen = fewest(is_good)
    print(f"fewest of 60 lubricants for 5000 positions: {len(chosen)} in {time.process_time() - start:.1f} s CPU")


if __name__ == "__main__":
    main()
