"""Whether several readings agree: what their errors cannot explain, a common cooling or fill must not be made of.

The sum of squares of residuals over standard errors follows a chi-square distribution where the errors are all there
is. Beyond its 99.9 % point, or with one residual over three times its error, something else differed: a state that was
noted wrongly, a bad sensor, a fault that came or went. The two marks are common practice in judging outliers.
"""

from __future__ import annotations

import math

import numpy as np

from lubecheck.units import Array

BY_CHANCE = 1e-3  # of all honest sets of readings are taken for split ones
MOST_ERRORS = 3.0  # times its error (95 %) that one residual may be: a single bad one hides among many good ones


def agree(residuals: Array, errors: Array, chi_square: float | None) -> bool:
    """Tell readings whose residuals their errors explain; one alone has nothing to disagree with."""
    if chi_square is None:
        return True
    is_near = bool((np.abs(residuals) <= MOST_ERRORS * errors).all())
    return is_near and chance_of(chi_square, len(residuals) - 1) >= BY_CHANCE


def chance_of(chi_square: float, degrees: int) -> float:
    """Return the share of a chi-square distribution beyond a value, by its closed sums for whole degrees of freedom.

    >>> round(chance_of(3.841, 1), 3), round(chance_of(9.488, 4), 3)
    (0.05, 0.05)
    """
    half = chi_square / 2
    if degrees % 2:
        tail, term, first = math.erfc(math.sqrt(half)), math.sqrt(2 * chi_square / math.pi) * math.exp(-half), 3
    else:
        tail, term, first = math.exp(-half), half * math.exp(-half), 4
    for divisor in range(first, degrees + 1, 2):
        tail += term
        term *= chi_square / divisor
    return tail
