"""Draws: all uncertain inputs of a case at once, as positions of the same kernel call that judges it.

An input is lognormal about its usual value, with its declared ends as the 2.5 and 97.5 % quantiles; where the ends do
not lie evenly, each side has its own spread and half of the draws. Inputs are independent. The draws are the same ones
in every run and for every case: evenly spread, not random, so that a thousand do the work of several.
"""

from __future__ import annotations

import functools
import math
from collections.abc import Sequence

import numpy as np

from lubecheck.model.points import Points
from lubecheck.units import Array

# A lattice of Korobov: input j of draw i stands at the share i a^j / DRAWS, without the whole. This multiplier is the
# best of all at DRAWS points in twelve dimensions, by the shares of 400 normal projections that lie in their 96 %
# ranges: at worst 94.5 %.
DRAWS = 1021
MULTIPLIER = 775
HELD = 0.97  # share of the draws that a band holds: 95 %, and what so few draws leave open
END = 1.959964  # standard deviations either side that hold 95 % of a normal distribution
_GRID = np.linspace(-4.5, 4.5, 901)  # standard deviations: the distribution is straight enough between


def drawn(usual: Points, inputs: Sequence[tuple[str, float, float]]) -> Points:
    """Return the positions of the usual points with the inputs drawn.

    An input is a field of the points and the factors at its low and its high end.
    """
    rows = len(usual)
    many = usual.take(np.tile(np.arange(rows), DRAWS))
    ends = _scores(len(inputs)) / END
    values = {}
    for score, (name, low, high) in zip(ends, inputs, strict=True):
        factor = np.exp(score * np.where(score > 0, math.log(high), -math.log(low)))
        values[name] = getattr(many, name) * np.repeat(factor, rows)
    return many.changed(case=np.repeat(np.arange(DRAWS), rows), **values)


def band(value: float, draws: Array) -> tuple[float, float]:
    """Return the ends between which the draws of a figure lie, and its usual value with them.

    A draw that has no value counts as outside on either side; where too many have none, the ends have none either.
    """
    known = np.sort(draws[~np.isnan(draws)])
    outside = int(len(draws) * (1 - HELD) / 2) - (len(draws) - len(known))
    if outside < 0 or math.isnan(value):
        return math.nan, math.nan
    return min(value, float(known[outside])), max(value, float(known[-1 - outside]))


def scores(place: int) -> Array:
    """Return the standard normal scores of the draws for one input, by its place among them."""
    one: Array = _scores(place + 1)[place]
    return one


@functools.cache
def _scores(inputs: int) -> Array:
    """Return standard normal scores, [input, draw]: each input takes every one of as many even shares once."""
    steps = [pow(MULTIPLIER, power, DRAWS) for power in range(inputs)]
    share = (np.outer(steps, np.arange(DRAWS)) % DRAWS + 0.5) / DRAWS
    grid = np.array([0.5 * (1 + math.erf(score / math.sqrt(2))) for score in _GRID])
    scores: Array = np.interp(share, grid, _GRID)
    return scores
