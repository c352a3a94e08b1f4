"""The warm-up of a case: courses, set-points, the cold start, and what it does to the verdict."""

from __future__ import annotations

import json
import re

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, with_key

from lubecheck.faces.record import to_json
from lubecheck.model.limits import STATES
from lubecheck.model.reader import load_case, read_case
from lubecheck.studies.remedies import check
from lubecheck.studies.warmup import CONCERN, judged

LIMITS = '\n[limits]\nalarm = "{alarm}"\ntrip = "{trip}"\n'


def warmed(text: str):
    case = read_case(text)
    return judged(case, check(case))


def courses(result):
    return {course.name: course for course in result.warm_up.courses}


@pytest.fixture(scope="module")
def usual():
    return warmed(BASE)


def test_a_greased_position_has_four_courses_and_each_ends_in_the_state_of_the_check(usual):
    found = courses(usual)
    assert list(found) == ["first start", "start", "after greasing", "cold start"]
    steady = usual.operating.figures["outer_ring_temperature"].value
    for name in ("first start", "start"):
        assert found[name].figures.figures["end"].value == pytest.approx(steady, abs=0.01)
    assert found["after greasing"].figures.figures["start"].value == pytest.approx(steady, abs=0.01)


def test_fresh_grease_peaks_above_the_run_in_start_and_a_run_in_start_only_rises(usual):
    found = courses(usual)
    first, start = (found[name].figures.figures for name in ("first start", "start"))
    assert first["peak"].value > start["peak"].value + 2
    assert start["time_of_peak"].value is None
    assert first["time_of_peak"].value > 0.3


def test_the_curve_runs_from_the_start_to_the_end_and_holds_the_peak(usual):
    for course in usual.warm_up.courses:
        read = course.figures.figures
        assert course.time_h[0] == 0
        assert all(a < b for a, b in zip(course.time_h, course.time_h[1:], strict=False))
        assert course.sensor[0] == pytest.approx(read["start"].value)
        assert max(course.sensor) == pytest.approx(read["peak"].value, abs=0.1)
        assert course.sensor[-1] == pytest.approx(read["end"].value, abs=0.1)


def test_every_figure_lies_in_its_band(usual):
    for course in usual.warm_up.courses:
        for figure in course.figures.figures.values():
            if figure.value is not None and figure.low is not None:
                assert figure.low - 1e-9 <= figure.value <= figure.high + 1e-9


def test_a_set_point_between_steady_and_peak_is_passed_on_the_way_and_only_there():
    steady = check(read_case(BASE)).operating.figures["outer_ring_temperature"].value
    text = BASE + LIMITS.format(alarm=f"{steady + 3:.1f} degC", trip="110 degC")
    alone = check(read_case(text))
    assert alone.limit("set_point").use < 1
    result = warmed(text)
    alarm, trip = courses(result)["after greasing"].crossings
    assert (alarm.name, alarm.state, trip.state) == ("alarm", "beyond", "within")
    assert 0 < alarm.at_h < 2
    assert trip.at_h is None
    assert courses(result)["start"].crossings[0].at_h is None
    assert result.limit("set_point").use > 1
    assert result.verdict == "beyond"
    assert result.governing == "set_point"


def test_a_steady_state_over_the_trip_is_beyond_without_a_warm_up():
    steady = check(read_case(BASE)).operating.figures["outer_ring_temperature"].value
    result = check(read_case(BASE + LIMITS.format(alarm=f"{steady + 9:.1f} degC", trip=f"{steady - 2:.1f} degC")))
    assert result.limit("set_point").state == "beyond"
    assert result.limit("set_point").allowed == pytest.approx(steady - 2, abs=0.05)


def test_without_the_heat_of_the_machine_no_course_is_called_good():
    text = with_key(BASE, "housing", "shaft_temperature", None) + LIMITS.format(alarm="90 degC", trip="100 degC")
    result = warmed(text)
    assert result.limit("peak_temperature").state == "unknown"
    assert result.limit("set_point").state == "unknown"
    assert all(crossing.state == "unknown" for crossing in courses(result)["start"].crossings)
    json.loads(to_json(result), parse_constant=lambda word: pytest.fail(f"{word} in JSON"))


def test_what_has_no_equilibrium_has_no_course_and_no_number():
    text = BASE.replace('"1480 rpm"', '"12000 rpm"').replace('"1.9 kN"', '"40 kN"')
    text = with_key(with_key(text, "housing", "kind", None), "housing", "conductance", '"0.05 W/K"')
    text = with_key(text, "surroundings", "draught", None)
    result = warmed(text)
    assert result.operating.figures["temperature"].value is None
    assert result.limit("peak_temperature").state in ("unknown", "beyond")
    assert all(not course.time_h for course in result.warm_up.courses)
    assert any("not followed" in note for note in result.warm_up.notes)
    json.loads(to_json(result), parse_constant=lambda word: pytest.fail(f"{word} in JSON"))


def test_a_closed_bearing_is_not_regreased():
    text = with_key(with_key(BASE, "bearing", "seal", '"contact seals"'), "grease", "interval", None)
    text = with_key(with_key(text, "grease", "fill", None), "grease", "housing_fill", None)
    assert "after greasing" not in courses(warmed(text))


@pytest.mark.parametrize(("drive", "state"), [("100 N*m", "within"), ("0.5 N*m", "beyond")])
def test_the_torque_of_a_cold_start_is_held_against_the_drive(drive, state):
    result = warmed(BASE + f'\n[limits]\nstart_torque = "{drive}"\n')
    limit = result.limit("start_torque")
    assert limit.state == state
    cold = result.warm_up.cold.figures
    assert limit.demand == pytest.approx(max(cold["running"].value, cold["breakaway"].value))
    assert cold["temperature"].value == -10


def test_a_colder_start_asks_for_more_torque_as_palmgren_has_it():
    """M0 goes with (nu n)^(2/3): the ratio of two starts from their viscosities by D341.

    Coldest -10 and 0 degC; the viscous torque is what is left after load torque and seals, which do not change.
    """
    from lubecheck.physics import viscosity

    cold, mild = (warmed(with_key(BASE, "surroundings", "coldest", f'"{t} degC"')).warm_up.cold.figures
                  for t in (-10, 0))  # fmt: skip
    load = check(read_case(BASE)).operating.figures["load_torque"].value
    nu = [float(viscosity.kinematic_viscosity.plain(t, nu_40=110.0, nu_100=n)) for t, n in ((-10, 12.0), (0, 12.0))]
    assert cold["viscosity"].value / mild["viscosity"].value == pytest.approx(nu[0] / nu[1], rel=0.05)
    ratio = (cold["running"].value - load) / (mild["running"].value - load)
    assert ratio == pytest.approx((cold["viscosity"].value / mild["viscosity"].value) ** (2 / 3), rel=0.01)


def test_without_a_coldest_temperature_the_start_torque_is_unknown():
    text = with_key(BASE, "surroundings", "coldest", None) + '\n[limits]\nstart_torque = "1 kN*m"\n'
    result = warmed(text)
    assert result.limit("start_torque").state == "unknown"
    assert result.warm_up.cold is None
    assert "cold start" not in courses(result)


def test_a_stated_housing_mass_sets_how_fast_it_warms():
    hours = [courses(warmed(with_key(BASE, "housing", "mass", f'"{mass} kg"')))["start"]
             .figures.figures["time_to_steady"].value for mass in (3, 30)]  # fmt: skip
    assert hours[1] > 1.5 * hours[0]


def test_circulating_oil_comes_in_cold_and_warms_with_its_circuit():
    text = (EXAMPLES / "oil_bath_pump.toml").read_text(encoding="utf-8")
    case = read_case(text)
    assert not case.is_grease
    text = with_key(with_key(text, "oil", "supply", '"circulating"'), "oil", "flow", '"0.5 l/min"')
    text = with_key(text, "oil", "inlet", '"45 degC"')
    for key in ("level", "volume"):
        if f"\n{key} = " in text:
            text = with_key(text, "oil", key, None)
    found = courses(warmed(text))
    start = found["start"]
    assert start.sensor[0] == pytest.approx(case.surroundings.ambient)
    # No colder than the air and no hotter than its end: the inlet does not jump to 45 degC.
    assert start.figures.figures["peak"].value <= start.figures.figures["end"].value + 0.5
    assert np.interp(0.1, start.time_h, start.sensor) < 40


@pytest.mark.parametrize("name", sorted(path.name for path in EXAMPLES.glob("*.toml")))
def test_every_example_can_be_followed(name):
    case = load_case(EXAMPLES / name)
    result = judged(case, check(case))
    assert result.verdict in STATES
    assert len(result.warm_up.courses) >= 1
    json.loads(to_json(result), parse_constant=lambda word: pytest.fail(f"{word} in JSON"))


def test_a_rise_that_is_a_concern_is_said():
    text = with_key(BASE, "grease", "regrease_amount", '"2000 g"').replace('"1480 rpm"', '"3560 rpm"')
    text = with_key(with_key(text, "housing", "shaft_temperature", '"60 degC"'), "surroundings", "draught", '"0 m/s"')
    text = with_key(with_key(text, "grease", "housing_fill", '"100 %"'), "surroundings", "ambient", '"20 degC"')
    result = warmed(
        text.replace('"6309"', '"6313"').replace(
            'dynamic_rating = "53 kN"\nstatic_rating = "31.5 kN"\nmass = "0.83 kg"\n', ""
        )
    )
    rise = courses(result)["after greasing"].figures.figures["rise"].value
    assert rise > CONCERN
    assert any("concern" in note for note in result.warm_up.notes)


def test_what_was_given_after_the_fact_is_waited_for_by_the_warm_up():
    case = load_case(EXAMPLES / "regreased_fan.toml")
    result = check(case)
    (said,) = (note for note in result.notes if "by the warm-up" in note)
    assert "once the relief is open" in said  # it is closed, and too much was given
    hours = float(re.search(r"after (\d+) running hours", said)[1])
    opened = read_case(with_key((EXAMPLES / "regreased_fan.toml").read_text(encoding="utf-8"),
                                "housing", "relief", '"open"'))  # fmt: skip
    greased = courses(judged(opened, check(opened)))["after greasing"].figures.figures
    assert hours == pytest.approx(greased["time_to_steady"].value, abs=0.6)
    assert not any("by the warm-up" in note for note in check(load_case(EXAMPLES / "new_motor.toml")).notes)
