"""The fatigue life turned round: every answer put back in gives the life, against an independent root finder."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq

from lubecheck.physics import fatigue, wanted_life
from lubecheck.physics.fatigue import KINDS, SETTINGS

kinds = st.integers(0, len(KINDS) - 1)
settings = st.integers(0, len(SETTINGS) - 2)
wanted_factors = st.floats(0.12, 40)


def a_iso(kappa, e_c, limit, load, kind):
    return float(fatigue.life_modification_factor.plain(kappa, e_c, fatigue_load_limit=limit, load=load, kind=kind))


@given(wanted_factors, st.floats(100, 3000), st.floats(500, 50_000), st.floats(30, 500), settings, kinds)
def test_the_needed_kappa_is_where_brentq_finds_it(wanted, limit, load, pitch, setting, kind):
    found = float(
        wanted_life.needed_viscosity_ratio.plain(
            wanted, fatigue_load_limit=limit, load=load, pitch_diameter=pitch, setting=setting, kind=kind
        )
    )

    def surplus(kappa):
        e_c = fatigue.contamination_factor.plain(kappa, pitch, setting)
        return a_iso(kappa, e_c, limit, load, kind) - wanted

    if surplus(4.0) < 0:
        assert np.isnan(found)
    elif surplus(0.1) >= 0:
        assert found == pytest.approx(0.1)
    else:
        root = brentq(surplus, 0.1, 4.0, xtol=1e-13)
        # The printed formula steps by under 0.1 % at kappa 0.4: both stand by the step there.
        assert found == pytest.approx(root, rel=1e-8) or root == pytest.approx(0.4, rel=2e-3)


@given(wanted_factors, st.floats(0.15, 4), st.floats(100, 3000), st.floats(500, 50_000), kinds)
def test_the_needed_contamination_factor_is_the_formula_solved_by_hand(wanted, kappa, limit, load, kind):
    """9.3.3 turned round: x = ((1 - (10 a)^(-1/k)) / film^g)^(1/h)."""
    found = float(
        wanted_life.needed_contamination_factor.plain(wanted, kappa, fatigue_load_limit=limit, load=load, kind=kind)
    )
    if a_iso(kappa, 1.0, limit, load, kind) < wanted:
        assert np.isnan(found)
    else:
        assert a_iso(kappa, found, limit, load, kind) == pytest.approx(wanted, rel=1e-6)


@given(st.floats(0.5, 1e4), st.floats(0.15, 4), st.floats(0.05, 1), kinds)
def test_the_allowed_load_put_back_in_gives_the_life(wanted, kappa, e_c, kind):
    exponent = 3.0 if kind % 2 == 0 else 10 / 3
    load = float(
        wanted_life.allowed_load.plain(
            wanted, kappa, e_c, 1.0, exponent, dynamic_rating=50e3, fatigue_load_limit=1500.0, kind=kind
        )
    )
    life = a_iso(kappa, e_c, 1500.0, load, kind) * (50e3 / load) ** exponent
    assert load <= 25e3 * (1 + 1e-12)
    assert life == pytest.approx(wanted, rel=1e-6) or (load == pytest.approx(25e3) and life >= wanted)


@given(st.floats(0.5, 1e4), st.floats(0.15, 4), st.floats(0.05, 1), kinds)
def test_the_needed_rating_and_the_allowed_load_agree(wanted, kappa, e_c, kind):
    exponent = 3.0 if kind % 2 == 0 else 10 / 3
    rating = float(wanted_life.needed_rating.plain(wanted, kappa, e_c, 1.0, exponent, 0.03, load=5e3, kind=kind))
    load = float(
        wanted_life.allowed_load.plain(
            wanted, kappa, e_c, 1.0, exponent, dynamic_rating=rating, fatigue_load_limit=0.03 * rating, kind=kind
        )
    )
    assert load == pytest.approx(5e3, rel=1e-6)


@given(wanted_factors, st.floats(1.0, 2.0))
def test_a_longer_life_never_asks_for_less(wanted, more):
    def kappa(factor):
        return wanted_life.needed_viscosity_ratio.plain(
            factor, fatigue_load_limit=1e3, load=4e3, pitch_diameter=72.5, setting=1, kind=0
        )

    a, b = kappa(wanted), kappa(wanted * more)
    assert np.isnan(b) or b >= a * (1 - 1e-12)


def test_ten_thousand_in_one_call_equal_single_calls():
    rng = np.random.default_rng(7)
    rows = 10_000
    wanted, limit, load = rng.uniform(0.2, 30, rows), rng.uniform(200, 3000, rows), rng.uniform(500, 50_000, rows)
    kind, setting = rng.integers(0, 4, rows), rng.integers(0, len(SETTINGS), rows)
    pitch = rng.uniform(30, 400, rows)
    all_at_once = wanted_life.needed_viscosity_ratio.plain(
        wanted, fatigue_load_limit=limit, load=load, pitch_diameter=pitch, setting=setting, kind=kind
    )
    for i in range(0, rows, 97):
        alone = wanted_life.needed_viscosity_ratio.plain(
            wanted[i], fatigue_load_limit=limit[i], load=load[i], pitch_diameter=pitch[i], setting=setting[i],
            kind=kind[i],
        )  # fmt: skip
        assert float(alone) == pytest.approx(all_at_once[i], rel=1e-12, nan_ok=True)
