"""Ratings of ISO 281 and ISO 76 as functions: elementwise, broadcasting, continuous where the standard is."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError
from lubecheck.physics import ratings

BALLS = {"ball_diameter": 12.0, "pitch_diameter": 65.0, "contact_angle": 25.0, "count": 10.0, "rows": 1.0}
ROLLERS = {"roller_diameter": 11.0, "roller_length": 13.0, "pitch_diameter": 70.0, "contact_angle": 14.0, "count": 17.0}
CASES = [
    (ratings.radial_ball_dynamic, BALLS),
    (ratings.radial_ball_static, BALLS),
    (ratings.self_aligning_ball_dynamic, BALLS),
    (ratings.self_aligning_ball_static, BALLS),
    (ratings.thrust_ball_dynamic, {key: BALLS[key] for key in ("ball_diameter", "pitch_diameter", "count")}),
    (ratings.thrust_ball_static, {key: BALLS[key] for key in ("ball_diameter", "pitch_diameter", "count")}),
    (ratings.radial_roller_dynamic, {**ROLLERS, "rows": 1.0, "b_m": 1.1}),
    (ratings.radial_roller_static, {**ROLLERS, "rows": 1.0}),
    (ratings.thrust_roller_dynamic, {**ROLLERS, "contact_angle": 50.0, "b_m": 1.15}),
    (ratings.thrust_roller_static, {**ROLLERS, "contact_angle": 50.0}),
]


@pytest.mark.parametrize(("function", "arguments"), CASES)
def test_a_row_of_an_array_is_the_value_of_its_floats(function, arguments):
    factors = np.array([0.7, 1.0, 1.3])
    together = function.plain(**{key: value * factors for key, value in arguments.items() if key != "contact_angle"},
                              **{key: value for key, value in arguments.items() if key == "contact_angle"})  # fmt: skip
    alone = [
        function.plain(**{key: value * (1 if key == "contact_angle" else factor) for key, value in arguments.items()})
        for factor in factors
    ]
    assert together == pytest.approx(alone, rel=1e-13)


@pytest.mark.parametrize(("function", "arguments"), CASES)
def test_more_elements_carry_more(function, arguments):
    assert function.plain(**{**arguments, "count": arguments["count"] + 1}) > function.plain(**arguments)


@pytest.mark.parametrize("function", [ratings.radial_ball_dynamic, ratings.self_aligning_ball_dynamic])
def test_c_is_continuous_at_the_ball_of_one_inch(function):
    small, large = (
        function.plain(**{**BALLS, "ball_diameter": np.asarray(size), "pitch_diameter": np.asarray(140.0)})
        for size in (25.4, np.nextafter(25.4, 26))
    )
    assert large == pytest.approx(small, rel=2e-4)  # the standard's 3.647 is 25.4^0.4 to four figures


@given(st.floats(1.1, 5.0))
def test_a_matched_pair_of_angular_contact_bearings_carries_2_to_the_0_7(times):
    single = ratings.radial_ball_dynamic.plain(**{**BALLS, "ball_diameter": np.asarray(3.0 * times)})
    pair = ratings.radial_ball_dynamic.plain(**{**BALLS, "ball_diameter": np.asarray(3.0 * times), "rows": 2.0})
    assert pair / single == pytest.approx(2**0.7, rel=1e-12)


def test_a_pair_of_roller_bearings_carries_2_to_the_7_9():
    single = ratings.radial_roller_dynamic.plain(**ROLLERS, rows=1.0, b_m=1.1)
    assert ratings.radial_roller_dynamic.plain(**ROLLERS, rows=2.0, b_m=1.1) / single == pytest.approx(2 ** (7 / 9))


def test_the_aware_face_refuses_a_bare_number():
    with pytest.raises(ArgumentError, match="ball_diameter"):
        ratings.thrust_ball_static(ball_diameter=10, pitch_diameter="100 mm", count=20)
