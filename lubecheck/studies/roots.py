"""Many bracketed searches at once, where each evaluation is one kernel call for all of them."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from lubecheck.model.points import Flags
from lubecheck.units import Array

MOST_STEPS = 80  # halving a bracket to the last digits takes about 50


def roots(surplus: Callable[[Array], Array], low: Array, high: Array, tolerance: float = 1e-12) -> tuple[Array, Flags]:
    """Return where each of many functions of one variable is zero between two bounds, and whether it is there.

    Inverse quadratic steps where they can be trusted, else halving (Chandrupatla 1997). A function that does not
    change its sign gives the bound where it is nearer to zero; one that is no number at a bound gives none.

    tolerance: of the root, absolute

    >>> found, is_there = roots(lambda x: x**3 - np.array([8.0, 1000.0]), np.zeros(2), np.full(2, 5.0))
    >>> found.round(9).tolist(), is_there.tolist()
    ([2.0, 5.0], [True, False])
    """
    a, b = np.array(high, dtype=np.float64), np.array(low, dtype=np.float64)
    with np.errstate(all="ignore"):
        f_a, f_b = surplus(a), surplus(b)
        is_there: Flags = np.sign(f_a) * np.sign(f_b) <= 0  # false for what is not a number
        nearest = np.where(np.abs(f_a) < np.abs(f_b), a, b)
        nearest = np.where(np.isnan(f_a) | np.isnan(f_b), np.nan, nearest)
        c, f_c = a.copy(), f_a.copy()
        t = np.full(a.shape, 0.5)
        best = np.where(np.abs(f_a) < np.abs(f_b), a, b)
        for _ in range(MOST_STEPS):
            x = a + t * (b - a)
            f = surplus(x)
            is_same = np.sign(f) == np.sign(f_a)
            c, f_c = np.where(is_same, a, b), np.where(is_same, f_a, f_b)
            b, f_b = np.where(is_same, b, a), np.where(is_same, f_b, f_a)
            a, f_a = x, f
            best = np.where(np.abs(f_a) < np.abs(f_b), a, b)
            least = tolerance / np.abs(b - a)
            if (~is_there | (f_a == 0) | (f_b == 0) | (least > 0.5) | np.isnan(f_a)).all():
                break
            xi, phi = (a - b) / (c - b), (f_a - f_b) / (f_c - f_b)
            is_curved = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi)
            step = f_a / (f_b - f_a) * f_c / (f_b - f_c) + (c - a) / (b - a) * f_a / (f_c - f_a) * f_b / (f_c - f_b)
            t = np.where(is_curved & np.isfinite(step), step, 0.5)
            t = np.minimum(1 - least, np.maximum(least, t))
            t = np.where(np.isfinite(t), t, 0.5)
    return np.where(is_there, best, nearest), is_there
