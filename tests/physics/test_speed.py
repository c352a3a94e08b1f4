"""Speeds: the balance at its bends and ends, trends, rows."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.physics import friction, speed

cases = {
    "f0": st.floats(0.5, 12),
    "f1": st.floats(0, 0.001),
    "nu": st.floats(1, 5000),
    "load": st.floats(0, 1e6),
    "pitch_diameter": st.floats(10, 1000),
    "heat_flow": st.floats(0.1, 1e5),
}


@given(st.fixed_dictionaries(cases))
def test_at_the_safe_speed_friction_makes_just_the_heat_that_leaves(case):
    """The friction is that of friction.py, so the low-speed form and its bend are met as well."""
    safe = speed.thermal_safe_speed.plain(**case)
    torque = friction.no_load_torque.plain(case["f0"], case["nu"], safe, case["pitch_diameter"])
    torque = torque + friction.load_torque.plain(case["f1"], case["load"], case["pitch_diameter"])
    assert friction.power.plain(torque, safe) == pytest.approx(case["heat_flow"], rel=1e-12)


@pytest.mark.parametrize("offset", [-1e-3, -1e-9, -1e-15, 0.0, 1e-15, 1e-9, 1e-3])
def test_the_solve_holds_at_the_bend_of_the_lubricant_part(offset):
    nu, mean = 50.0, 100.0
    bend = 160**1.5 / nu * (1 + offset)
    heat = friction.power.plain(friction.no_load_torque.plain(3.0, nu, bend, mean) + 200.0, bend)
    safe = speed.thermal_safe_speed.plain(3.0, 0.0004, nu=nu, load=5000.0, pitch_diameter=mean, heat_flow=heat)
    assert safe == pytest.approx(bend, rel=1e-12)


@given(st.fixed_dictionaries(cases), st.sampled_from(["f0", "f1", "nu", "load", "pitch_diameter"]), st.floats(1, 3))
def test_more_friction_never_raises_the_safe_speed(case, key, more):
    worse = {**case, key: case[key] * more}
    assert speed.thermal_safe_speed.plain(**worse) <= speed.thermal_safe_speed.plain(**case) * (1 + 1e-12)


def test_rows_do_not_depend_on_each_other():
    rows = {"nu": np.array([5.0, 500.0, 20.0]), "load": np.array([0.0, 1e5, 900.0]), "pitch_diameter": 80.0}
    together = speed.thermal_safe_speed.plain(2.0, 0.0003, **rows, heat_flow=150.0)
    alone = [
        speed.thermal_safe_speed.plain(2.0, 0.0003, nu=nu, load=load, pitch_diameter=80.0, heat_flow=150.0)
        for nu, load in zip(rows["nu"], rows["load"], strict=True)
    ]
    assert together == pytest.approx(alone, rel=1e-14)


def test_the_speed_parameter_is_mean_diameter_times_speed():
    """6210 at 3000 rpm: (50 + 90)/2 x 3000."""
    assert speed.speed_parameter("50 Hz", "7 cm").magnitude == pytest.approx(210_000)


def test_positions_in_one_call_use_their_own_reference():
    areas = speed.heat_area.plain(bore=60.0, outside=85.0, width=17.0, position=np.array([0, 1]))
    assert areas == pytest.approx([np.pi * 17 * 145, np.pi / 2 * (85**2 - 60**2)])
    flows = speed.seat_heat_flow.plain(areas, 50.0, np.array([0, 1]))
    assert flows == pytest.approx([0.016 * areas[0], 0.020 * areas[1]])
