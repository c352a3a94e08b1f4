"""How long one million evaluations of ASTM D341 with different constants take, against the numpy calls they need.

Run `python tests/benchmarks/d341_rate.py`. The goal is a ratio of at most 2 to one log and two exp of the same array.
The share of rows below 5 mm^2/s pays for the low-viscosity term as well, so it is printed with the ratio.
"""

from __future__ import annotations

import time
from collections.abc import Callable

import numpy as np

from lubecheck.physics.viscosity import viscosity_from_constants, walther_constants

ROWS = 1_000_000
REPEATS = 15


def best(call: Callable[[], object]) -> float:
    """Shortest time of several runs: the least disturbed one."""
    times = []
    for _ in range(REPEATS):
        start = time.perf_counter()
        call()
        times.append(time.perf_counter() - start)
    return min(times)


def main() -> None:
    """Print one line a mix of oils and a length of the arrays."""
    rng = np.random.default_rng(1)
    for mix, least in (("oils of 32 to 1000 mm^2/s", 32.0), ("oils of 5 to 1000 mm^2/s", 5.0)):
        nu_40 = np.exp(rng.uniform(np.log(least), np.log(1000.0), ROWS))
        nu_100 = nu_40 ** rng.uniform(0.50, 0.58, ROWS)
        a, b = walther_constants.plain(nu_40=nu_40, nu_100=nu_100)
        temperature = rng.uniform(0.0, 120.0, ROWS)
        for rows in (ROWS, 16_000):
            t, row_a, row_b = temperature[:rows], a[:rows], b[:rows]
            kelvin = t + 273.15
            x = row_a - row_b * np.log10(kelvin)
            needed = best(lambda kelvin=kelvin, x=x: (np.log(kelvin), np.exp(x), np.exp(x)))
            taken = best(lambda t=t, row_a=row_a, row_b=row_b: viscosity_from_constants.plain(t, a=row_a, b=row_b))
            thin = (viscosity_from_constants.plain(t, a=row_a, b=row_b) < 5).mean()
            print(
                f"{mix}, {rows:>9,} rows: {taken * 1e3:6.2f} ms, {taken / needed:.2f} times log + exp + exp"
                f" ({thin:.0%} of the rows below 5 mm^2/s)"
            )


if __name__ == "__main__":
    main()
