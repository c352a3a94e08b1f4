"""Grease and oil intervals against published tables, printed rules and calculations by hand."""

import numpy as np
import pytest

from lubecheck.errors import OutOfRange
from lubecheck.physics import grease_life

BALL, CYLINDRICAL, OTHER = range(3)
MONTH = 8766 / 12  # h, a Julian year is 8766 h


@pytest.mark.parametrize(
    ("bore", "speed", "published"),
    # motor maker's manual MN408, regrease interval of motors by their largest bearing: 6307 (bore 35), 6313 (bore 65)
    [
        (35.0, 3600.0, 5500),
        (35.0, 1800.0, 12000),
        (35.0, 1200.0, 18000),
        (35.0, 900.0, 22000),
        (65.0, 3600.0, 2200),
        (65.0, 1800.0, 7400),
        (65.0, 1200.0, 12000),
        (65.0, 900.0, 15000),
    ],
)
def test_the_classical_interval_lies_within_15_percent_of_a_motor_maker_s_table(bore, speed, published):
    assert grease_life.classical_interval.plain(speed, bore, BALL) == pytest.approx(published, rel=0.15)


def test_a_large_fast_bearing_is_refused_where_the_formula_is_near_zero():
    # 6319 at 3600 rpm: MN408 has 2200 h, the formula would print 190 h (arithmetic)
    assert grease_life.classical_share.plain(3600.0, 95.0) > grease_life.CLASSICAL_GREATEST_SHARE
    assert np.isnan(grease_life.classical_interval.plain(3600.0, 95.0, BALL))
    with pytest.raises(OutOfRange):
        grease_life.classical_interval("3600 rpm", "95 mm", "ball")


@pytest.mark.parametrize(
    ("family", "speed", "bore", "by_hand"),
    # K (14e6/(n sqrt d) - 4 d), worked by hand in decimal arithmetic; 12 301 h is also the printed example
    [
        ("ball", 1480.0, 45.0, 12301),
        ("ball", 2950.0, 25.0, 8492),
        ("ball", 980.0, 80.0, 12772),
        ("ball", 3550.0, 35.0, 5266),
        ("cylindrical", 1480.0, 50.0, 5689),
        ("cylindrical", 735.0, 120.0, 6294),
        ("cylindrical", 1180.0, 75.0, 5350),
        ("other", 1480.0, 40.0, 1336),
        ("other", 500.0, 90.0, 2591),
        ("other", 150.0, 200.0, 5800),
        ("other", 60.0, 320.0, 11764),
        ("other", 990.0, 60.0, 1586),
    ],
)
def test_the_classical_interval_is_what_a_hand_calculation_gives(family, speed, bore, by_hand):
    code = list(grease_life.CLASSICAL_FACTOR).index(family)
    assert grease_life.classical_interval.plain(speed, bore, code) == pytest.approx(by_hand, abs=0.51)
    aware = grease_life.classical_interval(f"{speed} rpm", f"{bore} mm", family)
    assert aware.to("h").magnitude == pytest.approx(by_hand, abs=0.51)


@pytest.mark.parametrize(
    ("temperature", "hours"),
    # Booser 1974, -2.60 + 2450/(273 + T), in decimal arithmetic; 34 900 and 9 290 h are quoted at 70 and 100
    [(70.0, 34903), (85.0, 17522), (100.0, 9297), (120.0, 4306)],
)
def test_booser_s_median_life_at_four_temperatures(temperature, hours):
    assert grease_life.booser_median_life.plain(temperature) == pytest.approx(hours, rel=1e-4)


def test_one_half_life_subtraction_halves_booser_s_life():
    whole, halved = grease_life.booser_median_life.plain(80.0, np.array([0.0, 1.0]))
    assert halved / whole == pytest.approx(0.5, rel=1e-3)  # 0.301 stands for log10 2


@pytest.mark.parametrize(
    ("reference", "step", "temperature", "factor"),
    # handbooks: 15 K above 70 degC, 17 K above 80 degC; MIL-HDBK-1164: 14 K above 65 degC
    [
        (70.0, 15.0, 70.0, 1.0),
        (70.0, 15.0, 85.0, 0.5),
        (70.0, 15.0, 100.0, 0.25),
        (80.0, 17.0, 97.0, 0.5),
        (65.0, 14.0, 93.0, 0.25),
        (70.0, 15.0, 55.0, 2.0),
        (70.0, 15.0, 20.0, 2.0),  # at most double
    ],
)
def test_grease_life_halves_each_step_above_the_reference_and_doubles_at_most(reference, step, temperature, factor):
    found = grease_life.temperature_halving.plain(temperature=temperature, reference=reference, step=step)
    assert found == pytest.approx(factor, rel=1e-12)


def test_the_calendar_ceiling_is_48_months():
    months = grease_life.CALENDAR_CEILING / MONTH
    assert months == pytest.approx(48)  # MIL-HDBK-1164


@pytest.mark.parametrize(
    ("load_ratio", "factor"),
    # GfT worksheet 3, f4 (memory): P/C 0.1 to 0.15: 0.7 to 1, to 0.25: 0.4 to 0.7, to 0.35: 0.1 to 0.4
    [(0.0, 1.0), (0.1, 1.0), (0.125, 0.85), (0.15, 0.7), (0.25, 0.4), (0.3, 0.25), (0.35, 0.1)],
)
def test_the_load_factor_is_the_worksheet_s(load_ratio, factor):
    assert grease_life.load_factor.plain(load_ratio) == pytest.approx(factor, abs=1e-12)


def test_loads_beyond_the_worksheet_are_refused():
    assert grease_life.load_factor.outside(load_ratio=np.array([0.35, 0.36])).tolist() == [False, True]
    with pytest.raises(OutOfRange):
        grease_life.load_factor(0.4)


def test_percentiles_convert_by_the_weibull_slope():
    # slope 2.3: L10 is about 2.8 times L01 (handbooks); L50/L10 and L50/L01 by hand 2.268 and 6.301
    scale = grease_life.weibull_scale.plain
    assert scale(known=grease_life.L01, wanted=grease_life.L10) == pytest.approx(2.8, abs=0.05)
    assert scale(known=grease_life.L10, wanted=grease_life.L50) == pytest.approx(2.2684, abs=1e-4)
    assert scale(known=grease_life.L01, wanted=grease_life.L50) == pytest.approx(6.3010, abs=1e-4)
    assert scale(known=grease_life.L50, wanted=grease_life.L10) == pytest.approx(1 / 2.2684, abs=1e-4)
    # the ratio 2.7 of L50 to L10 that some handbooks print belongs to a slope near 1.9
    assert scale(known=0.10, wanted=0.50, slope=1.9) == pytest.approx(2.7, abs=0.01)


@pytest.mark.parametrize(
    ("aware", "words", "factors"),
    # reliability handbooks (memory): contamination, moisture, vibration, attitude
    [
        (grease_life.dust_factor, ("clean", "normal", "dusty", "very dusty"), (1, 0.7, 0.4, 0.2)),
        (grease_life.water_factor, ("dry", "humid", "damp", "wet"), (1, 0.7, 0.4, 0.1)),
        (grease_life.vibration_factor, ("smooth", "rough", "severe"), (1, 0.6, 0.3)),
        (grease_life.orientation_factor, ("horizontal", "vertical"), (1, 0.5)),
    ],
)
def test_the_factors_of_the_place_are_the_handbooks(aware, words, factors):
    assert [aware(word).magnitude for word in words] == list(factors)
    assert aware.plain(np.arange(len(words))).tolist() == list(factors)


@pytest.mark.parametrize(
    ("velocity", "factor"),
    [("0.1 in/s", 1.0), ("0.2 in/s", 0.6), ("7 mm/s", 0.6), ("0.4 in/s", 0.3), ("20 mm/s", 0.3)],
)
def test_vibration_may_be_measured(velocity, factor):
    assert grease_life.vibration_velocity_factor(velocity).magnitude == factor


@pytest.mark.parametrize(
    ("temperature", "months"),
    [(20.0, 12.0), (50.0, 12.0), (75.0, 6.0), (100.0, 3.0)],  # handbooks: 12 months to 50 degC, 3 near 100 degC
)
def test_a_bath_is_changed_yearly_when_cool_and_each_quarter_when_hot(temperature, months):
    assert grease_life.bath_change_interval.plain(temperature) == pytest.approx(months * MONTH, rel=1e-9)


def test_a_bath_above_100_degrees_is_refused():
    with pytest.raises(OutOfRange):
        grease_life.bath_change_interval("110 degC")
