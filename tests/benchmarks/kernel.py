"""How fast the kernel is: positions a second, and the solve against general root finders on the same balance.

Run from the root: PYTHONPATH=tests python tests/benchmarks/kernel.py
Times are of the process on one core, the best of several; the ratios come from one run. Goals: 250 000 positions a
second for the full check; the solve 5 times as fast as find_root, 300 times as fast as a loop of brentq over the array
functions, and 90 times as fast as a loop of brentq over a balance written with `math` for one row.

What is compared: the whole of `equilibrium.solve`, from points to paths, against the same with its search taken out
and a general one put in its place: `balance_of`, the search, and the evaluation at what it found. find_root has the
better of all rows at once and chunks of them, picks the open rows anew only when they change, and looks for one root
and not for others beside it. The loops search only, their balance being worked out before.
"""

from __future__ import annotations

import math
import time
from collections.abc import Callable

import numpy as np
from scipy.optimize import brentq, elementwise

from lubecheck.data import air
from lubecheck.model import equilibrium
from lubecheck.model.balance import EMISSIVITY, HOTTEST_LUBRICANT, Balance, balance_of
from lubecheck.model.kernel import judge
from lubecheck.physics import churning, cooling, friction, viscosity

ROWS = 100_000
FEW = 300  # rows of the loops, which are too slow for more
SCALARS = [
    "floor", "ambient", "speed", "watt_a_torque", "walther_a", "walther_b", "viscous_factor",
    "pitch_diameter", "load_torque", "most_mixed", "reference_viscosity", "seal_torque", "held_volume", "free_volume",
    "soap_churning", "oil_churning", "ring", "area", "diameter", "forced", "stated", "cooling_factor",
    "solar_heat", "machine_heat", "free_shaft", "machine_shaft", "frame", "coolant", "oil", "ambient_over",
    "shaft_over", "frame_over", "coolant_over", "steady_out", "steady_in", "pressure",
]  # fmt: skip


def seconds(run: Callable[[], object], times: int = 5) -> float:
    """Return the least time of the process for a run."""
    best = np.inf
    for _ in range(times):
        start = time.process_time()
        run()
        best = min(best, time.process_time() - start)
    return float(best)


def lists_of_air() -> tuple[float, float, float, list[list[float]]]:
    """Return the table that `air.film` reads as plain lists: first temperature, rows a kelvin, last row, columns."""
    first, steps, last, _, columns = air._table()
    return first, steps, last, [[*column.tolist(), float(column[-1] + slope[-1])] for column, slope in columns]


def scalar_viscosity(a: float, b: float, temperature: float) -> float:
    """Return the viscosity by ASTM D341 with `math` alone."""
    ln_10 = math.log(10.0)
    w = math.exp(ln_10 * math.exp(a * ln_10 - b * math.log(temperature + 273.15))) - 0.7
    if w >= viscosity._TERM_ENDS:
        return w
    nu = w - math.exp(-0.7487 + w * (-3.295 + w * (0.6119 - 0.3193 * w)))
    term = math.exp(-1.47 - nu * (1.84 + 0.51 * nu))
    bend = 1.84 + 1.02 * nu
    miss, slope = nu + term - w, 1 - bend * term
    return nu - miss / (slope - miss * (bend * bend - 1.02) * term / (2 * slope))


def scalar_balance(balance: Balance, i: int) -> Callable[[float], float]:
    """Return heat in less heat out of one row over its rise, written with `math` alone: what a plain program has."""
    (floor, ambient, speed, watt, wa, wb, f0, dm, load, most_mixed, nu_1, seal, held, free_volume,
     soap_churning, oil_churning, ring, area, diameter, forced, stated, cooling_factor, solar, machine_heat, free,
     shaft, frame, coolant, oil, ambient_over, shaft_over, frame_over, coolant_over, steady_out, steady_in,
     pressure) = (
        float(getattr(balance, name)[i]) for name in SCALARS)  # fmt: skip
    size = diameter * 1e-3
    inside = shaft + free
    shaft_heat = shaft * shaft_over + free * ambient_over
    first, steps, last, columns = lists_of_air()

    def surplus(rise: float) -> float:
        outer = floor + rise
        if math.isnan(stated):
            place = min(max(((outer + ambient) / 2 - first) * steps, 0.0), last)
            row = int(min(place, last - 1.0))
            part = place - row
            nu, k, rising, blown = (a[row] + (a[row + 1] - a[row]) * part for a in columns)
            nu *= air.TABLE_PRESSURE / pressure
            difference = max(abs(outer - ambient), 1e-6)
            root = 0.60 + rising * (difference * size**3 / nu**2) ** (1 / 6)
            still = root * root * k / size
            reynolds = max(forced * size * 1e6 / nu, 1e-12)
            draught = (0.3 + blown * math.sqrt(reynolds) * (1 + (reynolds / 282000) ** (5 / 8)) ** (4 / 5)) * k / size
            hot, cold = outer + 273.15, ambient + 273.15
            radiation = cooling.STEFAN_BOLTZMANN * EMISSIVITY * (hot * hot + cold * cold) * (hot + cold)
            housing = cooling_factor * ((still**4 + draught**4) ** 0.25 + radiation) * area
        else:
            housing = cooling_factor * stated
        given_off = housing * (rise - ambient_over) + frame * (rise - frame_over)
        given_off += coolant * (rise - coolant_over) - solar
        lubricant = rise + given_off / ring
        inner = (ring * lubricant + shaft_heat + machine_heat) / (ring + inside)
        temperature = min(max(floor + lubricant, floor), HOTTEST_LUBRICANT)
        thick = scalar_viscosity(wa, wb, temperature)
        viscous = 1e-7 * f0 * max((thick * speed) ** (2 / 3), 160.0) * dm**3
        mixed = most_mixed * math.exp(-thick / nu_1 / friction.MIXED_KAPPA)
        churned = 0.0
        if held > 0:
            soft = math.exp((temperature - churning.REFERENCE) * -churning.SOFTENING)
            churned = held * (soft * soap_churning + thick * oil_churning)
            churned = min(
                max(churned, churning.LEAST_CHURNING * held / ((1 - churning.CLEAR_SHARE) * free_volume) * viscous),
                churning.MOST_CHURNING * viscous,
            )
        power = watt * (viscous + load + mixed + seal + churned)
        heat_out = (housing + steady_out) * rise + inside * inner + oil * lubricant
        return power + steady_in + housing * ambient_over - heat_out

    return surplus


def main() -> None:
    """Print the rates."""
    from positions import random_points, random_rows

    points = random_points(ROWS)
    print(f"judge: {ROWS / seconds(lambda: judge(points)):,.0f} positions/s")
    wide = random_rows(ROWS)
    rows = points.take(np.flatnonzero(equilibrium.solve(points).is_found))
    count = len(rows)
    solve = seconds(lambda: equilibrium.solve(rows)) / count
    print(f"solve: {1 / solve:,.0f} rows/s; rows wider than any machine, with every path: "
          f"{ROWS / seconds(lambda: equilibrium.solve(wide), 2):,.0f} rows/s")  # fmt: skip
    with np.errstate(all="ignore"):
        balance = balance_of(rows)
        search = seconds(lambda: equilibrium._root(*bounds(balance))) / count
        whole = {chunk: seconds(lambda chunk=chunk: by_find_root(rows, chunk), 2) / count for chunk in (count, 8192)}
        general = min(whole.values())
        alone = min(seconds(lambda chunk=chunk: searched_by_find_root(balance, chunk), 2) / count for chunk in whole)
        print(f"find_root in its place takes {general / solve:.1f} times as long a row; the search alone, without the "
              f"look for other roots, {alone / search:.1f} times")  # fmt: skip
        check_agreement(balance)
        tops = equilibrium.TOP_TEMPERATURE - balance.floor
        singles = [balance.take([i]) for i in range(FEW)]

        def loop_of_arrays() -> None:
            for i, one in enumerate(singles):
                brentq(lambda rise, one=one: float(rest(one, np.array([rise]))[0]), 1e-3, tops[i], rtol=1e-10)

        scalars = [scalar_balance(balance, i) for i in range(FEW)]

        def loop_of_scalars() -> None:
            for i, one in enumerate(scalars):
                brentq(one, 1e-3, tops[i], rtol=1e-10)

        arrays, plain = seconds(loop_of_arrays, 2) / FEW, seconds(loop_of_scalars) / FEW
        print(f"a loop of brentq over the array functions takes {arrays / solve:,.0f} times as long a row; over a "
              f"balance written with math {plain / solve:,.0f} times")  # fmt: skip


def bounds(balance: Balance) -> tuple[Balance, np.ndarray, np.ndarray]:
    """Return what the kernel's own search takes."""
    low = np.full(len(balance), np.log(equilibrium.LEAST_RISE))
    return balance, low, np.log(equilibrium.TOP_TEMPERATURE - balance.floor)


def rest(balance: Balance, rise: np.ndarray) -> np.ndarray:
    """Return heat in less heat out."""
    heat = balance.at(rise)
    return heat.heat_in - heat.heat_out


def searched_by_find_root(balance: Balance, chunk: int) -> np.ndarray:
    """Return the rises that scipy's elementwise root finder finds, so many rows at a time."""
    found = []
    for start in range(0, len(balance), chunk):
        some = balance.take(slice(start, start + chunk))
        last_rows, picked = np.arange(len(some)), some

        def surplus(rise: np.ndarray, row: np.ndarray, some: Balance = some) -> np.ndarray:
            nonlocal last_rows, picked
            if not np.array_equal(row, last_rows):
                last_rows, picked = row, some.take(row)
            return rest(picked, rise)

        ends = np.full(len(some), 1e-3), equilibrium.TOP_TEMPERATURE - some.floor
        tolerances = {"xrtol": 1e-10, "fatol": 0, "frtol": 0}
        found.append(elementwise.find_root(surplus, ends, args=(last_rows,), tolerances=tolerances).x)
    return np.concatenate(found)


def by_find_root(points, chunk: int) -> None:
    """Do what `solve` does, with the general search in place of its own."""
    balance = balance_of(points)
    balance.paths(balance.at(searched_by_find_root(balance, chunk)))


def check_agreement(balance: Balance) -> None:
    """Stop where the balance written with `math` is not that of the kernel, to 1e-9 of the heat that flows."""
    rng = np.random.default_rng(1)
    for i in rng.integers(0, len(balance), 2000):
        one = balance.take([i])
        rise = float(rng.uniform(1.0, equilibrium.TOP_TEMPERATURE - one.floor[0]))
        heat = one.at(np.array([rise]))
        whole = abs(heat.heat_in[0]) + abs(heat.heat_out[0])
        difference = abs(scalar_balance(balance, i)(rise) - (heat.heat_in[0] - heat.heat_out[0]))
        if not difference <= 1e-9 * whole:
            raise SystemExit(f"row {i}: the balance written with math is {difference:.3g} W beside the kernel's")


if __name__ == "__main__":
    main()
