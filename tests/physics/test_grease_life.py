"""What must hold for grease and oil intervals whatever the position."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError
from lubecheck.physics import grease_life

ANSWERS = (grease_life.DUST, grease_life.WATER, grease_life.VIBRATION, grease_life.ORIENTATION)


def within(bore):
    """Speeds from standstill to the greatest at which the classical formula holds."""
    return np.linspace(1.0, 0.6 * 3.5e6 / bore**1.5, 200)[:-1]


@given(st.floats(5.0, 500.0), st.integers(0, 2))
def test_the_classical_interval_is_positive_and_falls_with_speed(bore, family):
    intervals = grease_life.classical_interval.plain(within(bore), bore, family)
    assert np.all(intervals > 0)
    assert np.all(np.diff(intervals) < 0)


@given(st.floats(5.0, 490.0), st.integers(0, 2), st.floats(0.01, 0.59))
def test_the_classical_interval_falls_with_bore(bore, family, share):
    speed = share * 3.5e6 / (bore * 1.01) ** 1.5
    larger = grease_life.classical_interval.plain(speed, bore * 1.01, family)
    assert larger < grease_life.classical_interval.plain(speed, bore, family)


def test_a_ball_bearing_goes_longer_than_a_roller_bearing():
    intervals = grease_life.classical_interval.plain(1000.0, 50.0, np.array([0, 1, 2]))
    assert np.all(np.diff(intervals) < 0)


@given(st.floats(40.0, 160.0), st.floats(5.0, 30.0))
def test_heat_never_lengthens_grease_life(reference, step):
    temperatures = np.linspace(-40.0, 250.0, 400)
    factors = grease_life.temperature_halving.plain(temperature=temperatures, reference=reference, step=step)
    assert np.all(np.diff(factors) <= 0)
    assert np.all((factors > 0) & (factors <= 2))


def test_heat_shortens_booser_s_life_and_never_lengthens_the_life_of_a_bath():
    assert np.all(np.diff(grease_life.booser_median_life.plain(np.linspace(50.0, 150.0, 200))) < 0)
    hours = grease_life.bath_change_interval.plain(np.linspace(-40.0, 100.0, 300))
    assert np.all(np.diff(hours) <= 0)
    assert hours[-1] < hours[0]


def test_load_never_lengthens_grease_life():
    factors = grease_life.load_factor.plain(np.linspace(0.0, 0.35, 500))
    assert np.all(np.diff(factors) <= 0)
    assert np.max(np.abs(np.diff(factors))) < 0.01  # and has no step


@pytest.mark.parametrize("answers", ANSWERS)
def test_a_worse_answer_has_a_smaller_factor_and_all_say_what_they_mean(answers):
    assert np.all(np.diff([answer.factor for answer in answers]) < 0)
    assert answers[0].factor == 1
    assert len({answer.meaning for answer in answers}) == len(answers)


def test_stronger_vibration_never_lengthens_grease_life():
    factors = grease_life.vibration_velocity_factor.plain(np.linspace(0.0, 0.02, 201))
    assert np.all(np.diff(factors) <= 0)
    assert set(factors.tolist()) == {answer.factor for answer in grease_life.VIBRATION}


@given(st.floats(0.001, 0.9), st.floats(0.001, 0.9), st.floats(0.001, 0.9), st.floats(1.0, 5.0))
def test_percentiles_convert_through_a_third_as_they_do_directly(first, second, third, slope):
    def scale(known, wanted):
        return grease_life.weibull_scale.plain(known=known, wanted=wanted, slope=slope)

    assert scale(first, second) * scale(second, third) == pytest.approx(scale(first, third), rel=1e-9)
    assert scale(first, first) == pytest.approx(1.0, rel=1e-12)
    assert (scale(first, second) > 1) == (second > first) or second == pytest.approx(first)


def test_each_row_depends_on_itself_only():
    speeds, bores, families = np.array([1480.0, 3600.0, 500.0]), np.array([45.0, 95.0, 90.0]), np.array([0, 0, 2])
    together = grease_life.classical_interval.plain(speeds, bores, families)
    alone = [float(grease_life.classical_interval.plain(*row)) for row in zip(speeds, bores, families, strict=True)]
    assert together == pytest.approx(alone, nan_ok=True)
    assert np.isnan(together).tolist() == [False, True, False]  # the one out of range stays its own trouble


def test_unknown_words_are_answered_with_the_nearest():
    with pytest.raises(ArgumentError, match="dusty"):
        grease_life.dust_factor("dutsy")
    with pytest.raises(ArgumentError, match="ball, cylindrical, other"):
        grease_life.classical_interval("1480 rpm", "45 mm", "wheel")


def test_a_temperature_is_no_difference():
    with pytest.raises(ArgumentError, match="step"):
        grease_life.temperature_halving(temperature="80 degC", reference="70 degC", step="15 degC")
