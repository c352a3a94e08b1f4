"""Churning: what is held, and that the defaults fall inside the published range."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.physics import churning, friction

shares = st.floats(0.0, 1.0)
volumes = st.floats(0.1, 1e4)


def held(fill, free=50.0, void=0.0, housing_fill=0.0, is_open=0.0):
    return float(
        churning.held_volume.plain(
            fill=fill, free_volume=free, void=void, housing_fill=housing_fill, is_open=is_open, passage=1.0
        )
    )


def test_a_usual_fill_holds_nothing():
    assert held(0.30) == 0.0


def test_a_full_bearing_without_room_holds_all_above_the_clearing_share():
    assert held(1.0) == pytest.approx(0.67 * 50)


def test_room_in_the_housing_takes_the_excess_and_an_open_relief_takes_all():
    assert held(1.0, void=100.0) == 0.0
    assert held(1.0, void=100.0, housing_fill=0.9) == pytest.approx(23.5)
    assert held(1.0, void=0.0, is_open=1.0) == 0.0


@given(shares, shares, volumes, volumes, shares)
def test_more_fill_never_holds_less(a, b, free, void, housing_fill):
    low, high = sorted((a, b))
    assert held(low, free, void, housing_fill) <= held(high, free, void, housing_fill) + 1e-12


@given(shares, volumes, volumes, volumes, shares)
def test_more_room_never_holds_more(fill, free, void, more, housing_fill):
    assert held(fill, free, void + more, housing_fill) <= held(fill, free, void, housing_fill) + 1e-12


def full_flood_multiple(bore, outside, width, speed, nu, f0):
    """How many times the run-in viscous torque a bearing packed full has, without the cap."""
    free = 0.33 * np.pi / 4 * (outside**2 - bore**2) * width / 1000
    rate = churning.shear_rate.plain(speed, bore=bore, outside=outside)
    stress = churning.shear_stress.plain(rate, yield_stress=300.0, consistency=20.0, base_viscosity=nu * 0.9)
    watts = churning.shear_power.plain(held(1.0, free), rate, stress)
    run_in = friction.no_load_torque.plain(0.5 * f0, nu, speed, (bore + outside) / 2)
    return 1 + float(watts / friction.power.plain(run_in, speed))


# Published range: the viscous torque of an overfilled bearing is 2 to 5 times its run-in value (Eschmann, Hasbargen &
# Weigand; Harris, from memory). Base oil 110 mm^2/s at 40 degC; f0 of ISO 15312.
@pytest.mark.parametrize("nu", [110.0, 65.0, 32.0, 18.0])  # 40, 52, 70, 88 degC
@pytest.mark.parametrize(
    ("bore", "outside", "width", "f0", "speeds"),
    [
        (25, 52, 15, 2.0, (1000, 1500, 3000, 6000)),
        (45, 100, 25, 2.3, (750, 1480, 3000)),
        (90, 190, 43, 2.3, (500, 1000, 1480)),
    ],
)
def test_a_full_flood_falls_into_the_published_range(bore, outside, width, f0, speeds, nu):
    for speed in speeds:
        multiple = full_flood_multiple(bore, outside, width, speed, nu, f0)
        assert 2 <= round(multiple) <= 5, (speed, multiple)  # the source's accuracy: whole numbers


def test_churning_is_held_to_four_times_the_run_in_torque():
    assert churning.held_to_range.plain(churning_torque=900.0, run_in_torque=100.0, packed=0.5) == 400.0
    assert churning.held_to_range.plain(churning_torque=90.0, run_in_torque=100.0, packed=0.5) == 90.0


def test_a_bearing_packed_full_churns_no_less_than_its_run_in_torque_and_one_that_holds_less_by_as_much_less():
    assert churning.held_to_range.plain(churning_torque=30.0, run_in_torque=100.0, packed=1.0) == 100.0
    assert churning.held_to_range.plain(churning_torque=30.0, run_in_torque=100.0, packed=0.4) == 40.0
    assert churning.held_to_range.plain(churning_torque=0.0, run_in_torque=100.0, packed=0.0) == 0.0
    assert churning.packed_share.plain(held=held(1.0), free_volume=50.0) == pytest.approx(1.0)
