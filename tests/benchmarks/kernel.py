"""How fast the kernel is: positions a second, and the solve against general root finders on the same balance.

Run from the root: PYTHONPATH=tests python tests/benchmarks/kernel.py
Times are of the process on one core, the best of several; the ratios come from one run. Goals: 250 000 positions a
second for the full check, the solve 5 times as fast as find_root and 300 times as fast as a loop of brentq.
"""

from __future__ import annotations

import time
from collections.abc import Callable

import numpy as np
from scipy.optimize import brentq, elementwise

from lubecheck.model import equilibrium
from lubecheck.model.balance import balance_of
from lubecheck.model.kernel import judge

ROWS = 100_000
FEW = 300  # rows of the loop, which is too slow for more


def seconds(run: Callable[[], object], times: int = 5) -> float:
    """Return the least time of the process for a run."""
    best = np.inf
    for _ in range(times):
        start = time.process_time()
        run()
        best = min(best, time.process_time() - start)
    return float(best)


def main() -> None:
    """Print the rates."""
    from positions import random_points, random_rows

    points = random_points(ROWS)
    solve = seconds(lambda: equilibrium.solve(points))
    print(f"judge: {ROWS / seconds(lambda: judge(points)):,.0f} positions/s")
    wide = random_rows(ROWS)
    print(f"solve: {ROWS / solve:,.0f} rows/s; rows wider than any machine, with every path: "
          f"{ROWS / seconds(lambda: equilibrium.solve(wide), 2):,.0f} rows/s")  # fmt: skip
    rows = points.take(np.flatnonzero(equilibrium.solve(points).is_found))
    balance = balance_of(rows)
    ends = np.full(len(rows), 1e-3), equilibrium.TOP_TEMPERATURE - balance.floor

    def surplus(rise: np.ndarray, row: np.ndarray) -> np.ndarray:
        heat = balance.take(row.astype(np.intp)).at(rise)
        return heat.heat_in - heat.heat_out

    with np.errstate(all="ignore"):
        general = seconds(
            lambda: elementwise.find_root(
                surplus, ends, args=(np.arange(len(rows)),), tolerances={"xrtol": 1e-10, "fatol": 0, "frtol": 0}
            ),
            2,
        )
    print(f"find_root takes {general / len(rows) / (solve / ROWS):.1f} times as long a row")

    def loop() -> None:
        for i in range(FEW):
            one = balance_of(rows.take([i]))

            def rest(rise: float, one=one) -> float:
                heat = one.at(np.array([rise]))
                return float(heat.heat_in[0] - heat.heat_out[0])

            brentq(rest, 1e-3, equilibrium.TOP_TEMPERATURE - one.floor[0], rtol=1e-10)

    with np.errstate(all="ignore"):
        print(f"a loop of brentq takes {seconds(loop, 2) / FEW / (solve / ROWS):,.0f} times as long a row")


if __name__ == "__main__":
    main()
