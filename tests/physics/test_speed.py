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


# Limiting speeds that handbooks print for bearings with two rubbing seals (from memory): bore, outside, rpm.
@pytest.mark.parametrize(
    ("bore", "outside", "printed"), [(25, 52, 8500), (45, 100, 4500), (60, 130, 3400), (100, 180, 2400)]
)
def test_the_seal_rule_is_near_the_limiting_speeds_of_handbooks(bore, outside, printed):
    rubbing = bore + 0.2 * (outside - bore)
    assert speed.seal_speed_limit.plain(rubbing, speed.SEAL_SPEED) == pytest.approx(printed, rel=0.1)


@pytest.mark.parametrize(("element", "inertia"), [("ball", 2 / 5), ("roller", 1 / 2)])
def test_the_greatest_acceleration_is_what_the_forces_on_one_element_allow(element, inertia):
    """By hand, for one of 12 elements of 8 g and 12 mm at a pitch diameter of 60 mm, each loaded with 50 N.

    Force: the two contacts push with T1 + T2 = m r alpha/2. Moment: (T1 - T2) Dw/2 = J alpha dm/(2 Dw). T1 is that of
    the driving ring and may be mu Q.
    """
    mass, diameter, pitch, alpha, q, mu = 0.008, 0.012, 0.060, 1000.0, 50.0, 0.03
    total = mass * pitch / 2 * alpha / 2
    difference = 2 / diameter * inertia * mass * (diameter / 2) ** 2 * alpha * pitch / (2 * diameter)
    first = (total + difference) / 2
    by_hand = alpha * mu * q / first
    ours = speed.greatest_acceleration(
        load="600 N", elements_mass="96 g", pitch_diameter="60 mm", traction=mu, element=element
    )
    assert ours.to("rad/s^2").magnitude == pytest.approx(by_hand, rel=1e-12)
