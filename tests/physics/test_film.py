"""Film: trends and scaling that hold whatever the constants."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import OutOfRange
from lubecheck.physics import film

BALL = {
    "entrainment": 3.0,
    "dynamic_viscosity": 20.0,
    "pressure_coefficient": 20.0,
    "radius": 6.0,
    "reduced_modulus": 226e3,
    "load": 500.0,
    "ellipticity": 7.0,
}
ROLLER = {key: value for key, value in BALL.items() if key != "ellipticity"} | {"load": 2000.0, "length": 12.0}


@pytest.mark.parametrize(
    ("key", "power_least", "power_central"),
    [
        ("entrainment", 0.68, 0.67),
        ("dynamic_viscosity", 0.68, 0.67),
        ("pressure_coefficient", 0.49, 0.53),
        ("load", -0.073, -0.067),
    ],
)
def test_the_ball_film_grows_with_the_published_powers(key, power_least, power_central):
    before, after = (film.film_thickness_point.plain(**{**BALL, key: BALL[key] * k}) for k in (1, 2))
    assert after[0] / before[0] == pytest.approx(2**power_least, rel=1e-12)
    assert after[1] / before[1] == pytest.approx(2**power_central, rel=1e-12)


@pytest.mark.parametrize(
    ("key", "power"), [("entrainment", 0.7), ("pressure_coefficient", 0.54), ("load", -0.13), ("length", 0.13)]
)
def test_the_roller_film_grows_with_the_published_powers(key, power):
    before, after = (film.film_thickness_line.plain(**{**ROLLER, key: ROLLER[key] * k}) for k in (1, 2))
    assert after / before == pytest.approx(2**power, rel=1e-12)


@given(st.floats(1, 50))
def test_the_least_film_is_below_the_central_one(ellipticity):
    least, central = film.film_thickness_point.plain(**{**BALL, "ellipticity": ellipticity})
    assert 0 < least < central


def test_a_size_change_at_equal_speed_and_pressure_keeps_the_powers_together():
    """Twice the radius, four times the load: U halves, W stays, so h = R H grows with 2^(1 - 0.68)."""
    before, after = (
        film.film_thickness_point.plain(**{**BALL, "radius": 6.0 * k, "load": 500.0 * k**2})[0] for k in (1, 2)
    )
    assert after / before == pytest.approx(2 ** (1 - 0.68), rel=1e-12)


def test_lambda_is_one_where_kappa_is_one_and_rises_slower():
    assert film.film_parameter.plain(np.array([1.0, 2.0**1.3, 0.5**1.3])) == pytest.approx([1.0, 2.0, 0.5])


def test_steel_on_steel_has_the_reduced_modulus_of_handbooks():
    """Handbooks: 226 to 228 GPa (memory)."""
    assert 225e3 < film.STEEL_REDUCED_MODULUS < 229e3


def test_grease_starvation_lies_in_its_range():
    low, high = film.GREASE_STARVATION_RANGE
    assert low <= film.GREASE_STARVATION <= high


def test_the_reference_viscosity_steps_by_no_more_than_the_printed_two_per_cent():
    below, above = (film.reference_viscosity.plain(n, 60.0) for n in (999.999999, 1000.0))
    assert below / above == pytest.approx(1.023, abs=0.002)


@given(st.floats(1, 30000), st.floats(1.01, 3), st.floats(10, 1000))
def test_a_faster_or_a_greater_bearing_needs_a_thinner_oil(speed, more, pitch_diameter):
    base = film.reference_viscosity.plain(speed, pitch_diameter)
    assert film.reference_viscosity.plain(speed * more, pitch_diameter) < base
    assert film.reference_viscosity.plain(speed, pitch_diameter * more) < base


def test_a_contact_narrower_than_long_is_outside_the_range():
    with pytest.raises(OutOfRange, match="ellipticity"):
        film.film_thickness_point(
            entrainment="3 m/s",
            dynamic_viscosity="20 mPa*s",
            pressure_coefficient="20 1/GPa",
            radius="6 mm",
            reduced_modulus="226 GPa",
            load="500 N",
            ellipticity=0.5,
        )
