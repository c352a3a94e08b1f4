"""The warm-up of a case: courses, set-points, the cold start, and what it does to the verdict."""

from __future__ import annotations

import json
import math
import re

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, edited, with_key

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
    # An alarm on the way is to be watched; what may not be passed is the trip.
    assert result.limit("set_point").use > 1
    assert result.limit("set_point").state == "near"
    assert (result.verdict, result.governing) == ("near", "set_point")
    assert alarm.for_h > 0.5


def test_a_trip_that_is_passed_on_the_way_is_beyond():
    steady = check(read_case(BASE)).operating.figures["outer_ring_temperature"].value
    result = warmed(BASE + LIMITS.format(alarm=f"{steady + 1:.1f} degC", trip=f"{steady + 3:.1f} degC"))
    assert result.limit("set_point").allowed == pytest.approx(steady + 3, abs=0.06)
    assert (result.verdict, result.governing) == ("beyond", "set_point")


def test_a_steady_state_over_the_trip_is_beyond_without_a_warm_up():
    steady = check(read_case(BASE)).operating.figures["outer_ring_temperature"].value
    result = check(read_case(BASE + LIMITS.format(alarm=f"{steady - 2:.1f} degC", trip=f"{steady - 2:.1f} degC")))
    assert result.limit("set_point").state == "beyond"
    assert result.limit("set_point").allowed == pytest.approx(steady - 2, abs=0.05)


def test_without_the_heat_of_the_machine_no_course_is_called_good():
    text = with_key(BASE, "housing", "shaft_temperature", None) + LIMITS.format(alarm="90 degC", trip="100 degC")
    result = warmed(text)
    assert result.limit("peak_temperature").state == "unknown"
    assert result.limit("set_point").state == "unknown"
    assert all(crossing.state == "unknown" for crossing in courses(result)["start"].crossings)
    json.loads(to_json(result), parse_constant=lambda word: pytest.fail(f"{word} in JSON"))


def test_what_has_no_equilibrium_has_no_course_and_no_number_and_stays_beyond():
    text = BASE.replace('"1480 rpm"', '"12000 rpm"').replace('"1.9 kN"', '"40 kN"')
    text = with_key(with_key(text, "housing", "kind", None), "housing", "conductance", '"0.05 W/K"')
    text = with_key(text, "surroundings", "draught", None) + LIMITS.format(alarm="90 degC", trip="100 degC")
    text = text.replace("[limits]\n", '[limits]\nstart_torque = "800 N*m"\n')
    result = warmed(text)
    assert result.operating.figures["temperature"].value is None
    assert check(read_case(text)).limit("set_point").state == "beyond"
    assert result.limit("set_point").state == "beyond"
    assert result.limit("peak_temperature").state == "beyond"
    assert result.limit("start_torque").state == "within"  # a start needs no end
    assert all(not course.time_h for course in result.warm_up.courses)
    assert any("not followed" in note for note in result.warm_up.notes)
    json.loads(to_json(result), parse_constant=lambda word: pytest.fail(f"{word} in JSON"))


def test_a_closed_bearing_is_not_regreased():
    text = with_key(with_key(BASE, "bearing", "seal", '"contact seals"'), "grease", "interval", None)
    text = with_key(with_key(text, "grease", "fill", None), "grease", "housing_fill", None)
    assert "after greasing" not in courses(warmed(text))


def by_hand(nu: float) -> float:
    """Palmgren for the 6309 of the base case, by hand: f0 2.3 halved for grease, f1 0.0002, dm 72.5 mm, P 1900 N.

    In the cold the film is full, so nothing is added for a mixed one; factors by ISO 15312, table of series 63.
    """
    return 1e-7 * 1.15 * (nu * 1480) ** (2 / 3) * 72.5**3 + 0.0002 * 1900 * 72.5


def walther(temperature: float, nu_40: float, nu_100: float) -> float:
    """ASTM D341 above 2 mm2/s: log log (nu + 0.7) over log T, typed anew."""
    ends = [(math.log10(t + 273.15), math.log10(math.log10(nu + 0.7))) for t, nu in ((40, nu_40), (100, nu_100))]
    slope = (ends[1][1] - ends[0][1]) / (ends[1][0] - ends[0][0])
    return 10**10 ** (ends[0][1] + slope * (math.log10(temperature + 273.15) - ends[0][0])) - 0.7


@pytest.mark.parametrize(
    ("changes", "start"),
    [
        ({}, -10.0),
        ({("surroundings", "coldest"): '"15 degC"', ("duty", "ambient"): '"-20 degC"'}, -20.0),
        ({("surroundings", "coldest"): '"20 degC"', ("surroundings", "ambient_lowest"): '"-4 degC"',
          ("surroundings", "ambient_highest"): '"60 degC"'}, -4.0),
        ({("surroundings", "coldest"): '"40 degC"', ("duty", "ambient"): '"60 degC"'}, 40.0),
    ],
)  # fmt: skip
def test_the_torque_of_a_cold_start_is_that_of_the_coldest_air_that_is_said(changes, start):
    text = BASE + '\n[limits]\nstart_torque = "100 N*m"\n'
    for (table, key), value in changes.items():
        text = with_key(text, table, key, value)
    case = read_case(text)
    result = judged(case, check(case))
    cold = result.warm_up.cold.figures
    assert cold["temperature"].value == start
    nu = walther(start, case.lubricant.nu_40, case.lubricant.nu_100)
    assert cold["viscosity"].value == pytest.approx(nu, rel=1e-3)
    assert cold["running"].value == pytest.approx(by_hand(nu), rel=2e-3)
    assert result.limit("start_torque").demand >= cold["running"].value - 1e-6
    assert result.limit("cold_start").demand == start


@pytest.mark.parametrize(("drive", "state"), [("100 N*m", "within"), ("0.5 N*m", "beyond")])
def test_the_drive_decides_the_state_of_a_cold_start(drive, state):
    assert warmed(BASE + f'\n[limits]\nstart_torque = "{drive}"\n').limit("start_torque").state == state


def test_a_grease_at_its_lower_limit_breaks_away_with_what_the_standard_test_allows():
    """1000 N mm for a 6204 (33.5 mm mean diameter) at the lower limit, by the cube of the diameter: from memory."""
    case = read_case(BASE)
    text = with_key(BASE, "surroundings", "coldest", f'"{case.lubricant.lowest} degC"')
    cold = warmed(text).warm_up.cold.figures
    assert cold["breakaway"].value == pytest.approx(1000 * (72.5 / 33.5) ** 3, rel=1e-6)


def test_the_temperature_from_which_the_drive_has_enough_is_the_least_that_has():
    result = warmed(BASE + '\n[limits]\nstart_torque = "1 N*m"\n')
    least = result.warm_up.cold.figures["starts_from"].value
    for at, is_enough in ((least, True), (least - 1, False)):
        text = with_key(BASE, "surroundings", "coldest", f'"{at} degC"') + '\n[limits]\nstart_torque = "1 N*m"\n'
        assert (warmed(text).limit("start_torque").use <= 1) is is_enough


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


def test_a_planned_dose_and_the_same_dose_given_end_alike():
    """What the bearing has no room for goes beside it, and what finds none there stays to be churned."""
    for grams in (12, 60, 500):
        planned = warmed(with_key(BASE, "grease", "regrease_amount", f'"{grams} g"'))
        given = warmed(with_key(BASE, "grease", "given", f'"{grams} g"'))
        ends = [courses(one)["after greasing"].figures.figures["end"].value for one in (planned, given)]
        assert ends[0] == pytest.approx(ends[1], abs=0.01), grams
    assert ends[0] > courses(warmed(BASE))["after greasing"].figures.figures["end"].value + 1


def test_what_was_given_starts_from_the_state_before_it():
    text = with_key(with_key(BASE, "grease", "fill", '"80 %"'), "grease", "housing_fill", '"100 %"')
    before = check(read_case(text)).operating.figures["outer_ring_temperature"].value
    start = (
        courses(warmed(with_key(text, "grease", "given", '"60 g"')))["after greasing"].figures.figures["start"].value
    )
    assert start == pytest.approx(before, abs=1e-6)


def test_a_set_point_below_the_air_of_a_state_has_no_band_and_warns_nobody():
    text = with_key(BASE, "duty", "ambient", '"95 degC"') + LIMITS.format(alarm="92 degC", trip="120 degC")
    result = warmed(text)
    assert result.limit("set_point").state == "beyond"


def test_the_hottest_peak_is_told_and_not_that_of_the_coldest_air():
    found = warmed(with_key(BASE, "surroundings", "coldest", '"-50 degC"'))
    hottest = max(course.figures.figures["bearing_peak"].value for course in found.warm_up.courses)
    assert found.limit("peak_temperature").demand == pytest.approx(hottest)


def test_remedies_are_told_with_what_they_do_on_the_way():
    text = with_key(BASE, "grease", "interval", '"150 week"')
    steady = check(read_case(text))
    peak = courses(warmed(text))["first start"].figures.figures["peak"].value
    text += LIMITS.format(alarm=f"{peak - 0.8:.1f} degC", trip=f"{peak - 0.5:.1f} degC")
    result = check(read_case(text), warm_up=True)
    assert steady.remedies
    assert result.limit("set_point").state == "beyond"
    assert any(remedy.verdict_after == "beyond" for remedy in result.remedies)
    for remedy in result.remedies[:3] + result.remedies[-2:]:
        after = check(read_case(edited(text, remedy.edits)), warm_up=True)
        assert after.verdict == remedy.verdict_after, remedy.change


def test_a_smaller_dose_is_named_where_only_regreasing_is_too_hot():
    found = courses(warmed(BASE))
    others = max(found[name].figures.figures["peak"].value for name in ("first start", "start"))
    text = with_key(BASE, "grease", "regrease_amount", '"60 g"')
    peak = courses(warmed(text))["after greasing"].figures.figures["peak"].value
    assert peak > others + 2
    trip = 40 + (others + 0.3 - 40) / 0.85
    text += LIMITS.format(alarm=f"{trip:.2f} degC", trip=f"{trip:.2f} degC")
    (said,) = (note for note in warmed(text).warm_up.notes if "at a time" in note)
    grams = re.search(r"after greasing: ([0-9.]+) g at a time", said)[1]
    assert float(grams) < 60
    assert warmed(with_key(text, "grease", "regrease_amount", f'"{grams} g"')).limit("set_point").state == "within"


def test_no_wait_is_told_with_a_number_that_is_none():
    """A band with an end that has no equilibrium has no ends in the text."""
    text = with_key(with_key(BASE, "grease", "given", '"20 g"'), "grease", "given_on", '"2026-11-27"')
    hot = with_key(with_key(text, "housing", "kind", None), "housing", "conductance", '"0.12 W/K"')
    hot = with_key(hot, "surroundings", "draught", None).replace('"1480 rpm"', '"2900 rpm"')
    hot = hot.replace('"1.9 kN"', '"12 kN"')
    for conductance in ("0.15", "0.3"):
        notes = check(read_case(hot.replace('"0.12 W/K"', f'"{conductance} W/K"'))).notes
        (said,) = (note for note in notes if "by the warm-up" in note)
        assert not re.search(r"\b(nan|inf)\b", said), said
