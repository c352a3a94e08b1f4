"""Friction torque: the printed forms, their joint, the ends, and what stands outside this file."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError, OutOfRange
from lubecheck.physics import friction


@pytest.mark.parametrize(
    ("nu", "speed", "expected"),
    [
        (27.0, 1000.0, 900.0),  # 27000^(2/3)
        (20.0, 400.0, 400.0),  # 8000^(2/3)
        (10.0, 100.0, 160.0),  # below 2000
        (10.0, 0.0, 160.0),  # at rest too: the form has no other
        (125.0, 1000.0, 2500.0),
    ],
)
def test_the_lubricant_part_has_its_two_printed_forms(nu, speed, expected):
    torque = friction.no_load_torque.plain(1.5, nu, speed, 200.0)
    assert torque == pytest.approx(1e-7 * 1.5 * expected * 8e6, rel=1e-12)


def test_the_two_forms_join_without_a_step_and_within_one_per_cent_of_the_printed():
    product = np.linspace(1900, 2100, 2001)
    torque = friction.no_load_torque.plain(1.0, product, 1.0, 100.0)
    printed = 1e-7 * np.where(product >= 2000, product ** (2 / 3), 160) * 1e6
    assert np.all(np.diff(torque) >= 0)
    assert np.max(np.diff(torque)) < 1e-4 * torque[0]
    assert np.max(np.abs(torque / printed - 1)) < 0.008


@given(st.floats(0.5, 12), st.floats(0.1, 5000), st.floats(0, 30000), st.floats(10, 500))
def test_a_thicker_oil_never_lowers_the_torque(f0, nu, speed, pitch_diameter):
    thin, thick = (friction.no_load_torque.plain(f0, nu * k, speed, pitch_diameter) for k in (1, 1.2))
    assert thick >= thin > 0


def test_the_load_part_is_the_product():
    assert friction.load_torque(0.0003, "10 kN", "3 in").to("N*mm").magnitude == pytest.approx(0.0003 * 1e4 * 76.2)


def test_power_is_torque_times_angular_speed():
    """1 N m at 1 rad/s is 1 W; trade form 1.05e-4 M n in N mm and rpm."""
    assert friction.power("1 N*m", "1 rad/s").to("W").magnitude == pytest.approx(1.0, rel=1e-12)
    assert friction.power.plain(500.0, 1480.0) == pytest.approx(1.05e-4 * 500 * 1480, rel=3e-3)


def test_the_load_coefficient_of_rollers_does_not_depend_on_load():
    assert friction.load_coefficient.plain(0.0003, 0.0, static_load=np.array([0.0, 5.0]), static_rating=10.0) == (
        pytest.approx([0.0003, 0.0003], rel=1e-12)
    )


def test_the_load_coefficient_of_balls_vanishes_without_load():
    assert friction.load_coefficient.plain(0.0005, 0.55, static_load=0.0, static_rating=10.0) < 1e-100


def test_run_in_grease_and_mist_halve_the_bath_and_a_flooded_bearing_doubles_it():
    table = {key: factor.nominal for key, factor in friction.LUBRICATION.items()}
    assert table["grease", "horizontal"] == table["mist", "vertical"] == 0.5
    assert table["bath", "horizontal"] == table["circulating", "horizontal"] == 1.0
    assert table["bath", "vertical"] == table["jet", "horizontal"] == 2.0


@pytest.mark.parametrize("supply", friction.SUPPLIES)
@pytest.mark.parametrize("shaft", friction.SHAFTS)
def test_each_supply_and_shaft_gives_the_factor_of_its_row(supply, shaft):
    factor = friction.LUBRICATION[supply, shaft]
    assert friction.lubrication_factor(supply, shaft).magnitude == factor.nominal
    assert factor.low <= factor.nominal <= factor.high
    assert factor.source
    assert factor.note


def test_an_unknown_supply_is_refused():
    with pytest.raises(ArgumentError, match="circulating"):
        friction.lubrication_factor("circulated", "vertical")


def test_a_negative_speed_is_outside_the_range():
    with pytest.raises(OutOfRange):
        friction.no_load_torque(2.0, "20 mm^2/s", "-10 rpm", "60 mm")


def test_arguments_broadcast():
    torque = friction.no_load_torque.plain(
        np.array([[1.0], [2.0]]), np.array([20.0, 30.0, 40.0]), 1500.0, np.full((2, 3), 60.0)
    )
    assert torque.shape == (2, 3)
    assert torque[1] == pytest.approx(2 * torque[0], rel=1e-14)
    assert math.isfinite(torque.sum())
