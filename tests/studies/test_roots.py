"""Bracketed searches side by side: the roots of a scalar search, and a row that does not see its neighbours."""

from __future__ import annotations

import numpy as np
import pytest
from scipy.optimize import brentq

from lubecheck.studies.roots import roots

SHAPES = {
    "steep": lambda x, a: np.exp(6 * x) - np.exp(6 * a),
    "flat, then steep": lambda x, a: np.maximum(x - 0.3, 0.0) ** 3 - max(a - 0.3, 0.01) ** 3,
    "falling": lambda x, a: np.tanh(20 * (a - x)),
    "power": lambda x, a: x**9 - a**9,
}


@pytest.mark.parametrize("name", SHAPES)
def test_the_root_is_that_of_a_scalar_search(name):
    shape, places = SHAPES[name], np.linspace(0.05, 0.95, 19)

    def surplus(x):
        return np.array([shape(one, place) for one, place in zip(x, places, strict=True)])

    found, is_there = roots(surplus, np.zeros(19), np.ones(19))
    assert is_there.all()
    wanted = [brentq(lambda x, a=place: float(shape(x, a)), 0.0, 1.0, xtol=1e-14) for place in places]
    assert found == pytest.approx(wanted, abs=1e-9)


def test_a_root_does_not_depend_on_those_beside_it():
    places = np.array([0.2, 0.5, 0.9])

    def of(some):
        return roots(lambda x: x**5 - some**5, np.zeros(len(some)), np.ones(len(some)))[0]

    assert of(places)[1] == pytest.approx(of(places[1:2])[0], abs=1e-11)


def test_where_there_is_no_root_the_nearer_bound_is_given_and_nothing_where_there_is_no_number():
    found, is_there = roots(lambda x: np.array([x[0] + 1, x[1] - 5, np.nan]), np.zeros(3), np.ones(3))
    assert found[:2].tolist() == [0.0, 1.0]
    assert np.isnan(found[2])
    assert not is_there.any()
