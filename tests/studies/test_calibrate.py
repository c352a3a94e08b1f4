"""Calibration: a measured temperature gives the cooling, or the unknown fill, back; and what contradicts it is told."""

from __future__ import annotations

import dataclasses
import functools
import math
import re

import numpy as np
import pytest
from conftest import BASE, EXAMPLES, with_key

import lubecheck
from lubecheck.errors import NotCalibrated
from lubecheck.model.assumptions import uncertain
from lubecheck.model.calibration import LIKELY
from lubecheck.model.check import check as plain_check
from lubecheck.model.check import readings
from lubecheck.model.equilibrium import solve
from lubecheck.model.glance import glances
from lubecheck.model.kernel import MOVED_BY_HEAT
from lubecheck.model.points import from_rows
from lubecheck.model.reader import load_case, read_case
from lubecheck.model.rows import rows_of
from lubecheck.studies.agreement import agree, chance_of
from lubecheck.studies.calibrate import calibrated, states_of
from lubecheck.studies.circuit import study as circuit_study
from lubecheck.studies.plant import plant
from lubecheck.studies.swap import swap
from lubecheck.studies.system import study as system_study
from lubecheck.studies.wanted import study as wanted_study
from lubecheck.studies.warmup import judged as warm_up_judged

PUMP = (EXAMPLES / "oil_bath_pump.toml").read_text()
MOTOR = (EXAMPLES / "new_motor.toml").read_text()
# Cooling is stated, the fill is not known, and surplus grease has no room.
PACKED = BASE
for _table, _key, _value in (
    ("grease", "fill", '"unknown"'),
    ("surroundings", "draught", None),
    ("housing", "kind", None),
    ("housing", "conductance", '"1.0 W/K"'),
    ("housing", "void", '"5 cm^3"'),
):
    PACKED = with_key(PACKED, _table, _key, _value)


def measured(text: str, *tables: dict[str, object]) -> str:
    """Return a case with measured temperatures; numbers are degrees or kelvin."""
    for table in tables:
        head = "[measured]" if len(tables) == 1 else "[[measured]]"
        units = {"temperature": "degC", "ambient": "degC", "shaft_temperature": "degC", "reading_error": "K"}
        lines = [f'{key} = "{value!r} {units[key]}"' if key in units and not isinstance(value, str)
                 else f"{key} = {value!r}" for key, value in table.items()]  # fmt: skip
        text += "\n" + "\n".join([head, *lines]) + "\n"
    return text


def predicted(text: str, states: list[dict[str, object]], place: str = "outer", **columns: float) -> list[float]:
    """Return what a sensor would read at some states of a case in which a column is other than estimated."""
    case = read_case(measured(text, *({"temperature": 20.0, **state} for state in states)))
    points = states_of(case, readings(case)[1][0])
    return getattr(solve(points.changed(**columns)), place).tolist()


def found_of(text: str):
    return calibrated(read_case(text)).calibration


def all_of(found):
    """Return all that would give a reading, the likely and the unlikely."""
    return (*found.explained.likely, *found.explained.unlikely)


@pytest.mark.parametrize("factor", [0.62, 1.0, 1.7])
@pytest.mark.parametrize(
    ("text", "state", "place"),
    [
        (MOTOR, {"ambient": 18.0}, "outer"),
        (MOTOR, {"place": "inner ring", "speed": "900 rpm"}, "inner"),
        (PUMP, {"ambient": 12.0, "duty": 2}, "outer"),
        (PUMP, {"speed": "1480 rpm", "radial_load": "1 kN", "axial_load": "1 kN"}, "outer"),
        (MOTOR, {"draught": "2 m/s", "fill": "60 %"}, "outer"),
    ],
)
def test_a_hidden_cooling_is_found_again(text, state, place, factor):
    (temperature,) = predicted(text, [state], place, cooling_factor=factor)
    found = found_of(measured(text, {"temperature": temperature, **state}))
    assert found.is_explained
    assert found.value == pytest.approx(factor, rel=1e-6)
    assert found.low < factor < found.high
    (point,) = found.points
    assert point.figures.figures["residual"].value == pytest.approx(0.0, abs=1e-6)


@pytest.mark.parametrize("fill", [0.62, 0.8, 0.97])
def test_a_hidden_fill_is_found_again_where_the_cooling_is_known(fill):
    (temperature,) = predicted(PACKED, [{}], fill=fill)
    found = found_of(measured(PACKED, {"temperature": temperature, "reading_error": 0.5}))
    assert (found.column, found.is_explained) == ("fill", True)
    assert found.value == pytest.approx(fill, abs=1e-6)
    assert found.low < fill < found.high
    assert found.conductance == pytest.approx(1.0)


def test_a_fill_that_was_found_is_judged_and_its_worst_is_what_the_reading_leaves():
    (temperature,) = predicted(PACKED, [{}], fill=0.95)
    result = lubecheck.check(read_case(measured(PACKED, {"temperature": temperature})))
    limit = result.limit("fill")
    assert limit.state == "beyond"
    assert limit.demand == pytest.approx(0.95, abs=1e-6)
    assert "found by the measured temperature: 95 %" in limit.note
    assert result.calibration.figures.figures["cooling_factor"].value is None
    assert result.calibration.figures.figures["fill"].value == pytest.approx(0.95, abs=1e-6)


def test_an_outlet_of_circulating_oil_is_a_place():
    text = PUMP.replace(
        'supply = "bath"\nlevel = "0 mm"', 'supply = "circulating"\nflow = "0.3 l/min"\ninlet = "45 degC"'
    )
    text = text.replace("bath -/17/14", "circulating -/17/14")
    case = read_case(measured(text, {"temperature": 20.0, "duty": 1}))
    state = solve(states_of(case, readings(case)[1][0]).changed(cooling_factor=1.3))
    # Half of what the oil could take, by the model's own share; so it leaves half way to the bearing's temperature.
    outlet = 45.0 + 0.5 * (float(state.temperature[0]) - 45.0)
    found = found_of(measured(text, {"temperature": outlet, "duty": 1, "place": "oil outlet"}))
    assert found.value == pytest.approx(1.3, rel=1e-6)


def test_several_readings_that_agree_give_the_cooling_and_a_smaller_error():
    states = [{"ambient": 18.0}, {"ambient": 30.0}, {"speed": "900 rpm"}]
    temperatures = predicted(MOTOR, states, cooling_factor=0.8)
    readings_of = [{"temperature": t, **state} for t, state in zip(temperatures, states, strict=True)]
    three, one = found_of(measured(MOTOR, *readings_of)), found_of(measured(MOTOR, readings_of[0]))
    assert three.value == pytest.approx(0.8, rel=1e-6)
    assert three.chi_square == pytest.approx(0.0, abs=1e-9)
    assert three.error_scale == 1.0
    assert one.low < three.low < 0.8 < three.high < one.high


def test_readings_of_one_state_that_differ_leave_their_half_as_residuals_and_weigh_by_their_error():
    (at,) = predicted(MOTOR, [{}], cooling_factor=0.9)
    alike = found_of(measured(MOTOR, {"temperature": at - 1.5}, {"temperature": at + 1.5}))
    assert alike.value == pytest.approx(0.9, rel=1e-5)
    assert [p.figures.figures["residual"].value for p in alike.points] == pytest.approx([-1.5, 1.5], abs=1e-4)
    # 2 K are 95 %, so 1.96 standard errors: (1.5 / 1.0204)^2 twice.
    assert alike.chi_square == pytest.approx(2 * (1.5 / (2 / 1.96)) ** 2, rel=1e-3)
    # The mean of two readings of errors 1 and 2 K weighs them 4 to 1.
    finer = found_of(measured(MOTOR, {"temperature": at - 0.4, "reading_error": 1.0}, {"temperature": at + 1.6}))
    assert finer.value == pytest.approx(0.9, rel=1e-5)


def test_residuals_larger_than_the_reading_errors_are_said_and_widen_the_result():
    (at,) = predicted(MOTOR, [{}], cooling_factor=0.9)
    near = lubecheck.check(read_case(measured(MOTOR, {"temperature": at - 0.5}, {"temperature": at + 0.5})))
    far = lubecheck.check(read_case(measured(MOTOR, {"temperature": at - 2.0}, {"temperature": at + 2.0})))
    assert not any("residuals" in note for note in near.calibration.notes)
    (note,) = [note for note in far.calibration.notes if "residuals are larger" in note]
    assert "chi-square 7.7 for 1 degrees of freedom" in note  # by hand: 2 * 1.96^2; 10.8 is its 99.9 % point
    spans = [one.calibration.figures.figures["cooling_factor"] for one in (near, far)]
    assert spans[1].high - spans[1].low > 2 * (spans[0].high - spans[0].low)


@pytest.mark.parametrize(("degrees", "point"), [(1, 10.828), (2, 13.816), (3, 16.266), (4, 18.467), (10, 29.588)])
def test_the_chance_of_a_chi_square_is_that_of_the_published_tables(degrees, point):
    assert chance_of(point, degrees) == pytest.approx(0.001, rel=1e-3)  # tables of the 99.9 % point, five figures


def test_readings_that_disagree_by_more_than_their_errors_calibrate_nothing():
    (at,) = predicted(MOTOR, [{}], cooling_factor=0.9)
    text = measured(MOTOR, {"temperature": at - 5.0}, {"temperature": at + 4.0}, {"temperature": at + 1.0})
    result = lubecheck.check(read_case(text))
    found = result.calibration
    assert (found.is_explained, result.verdict) == (False, "unknown")
    assert "Reading 1 disagrees most" in found.text
    assert "5.0 K colder" in found.text
    assert "read minus computed" in found.text
    # What fits best is still told: the mean of readings of one state and one error.
    assert [p.figures.figures["residual"].value for p in found.measurements] == pytest.approx([-5, 4, 1], abs=0.02)
    assert found.figures.figures["cooling_factor"].value == pytest.approx(0.9, rel=2e-3)
    assert found.figures.figures["chi_square"].value == pytest.approx(42 * (1.96 / 2) ** 2, rel=1e-3)
    for name in MOVED_BY_HEAT:
        if any(limit.name == name for limit in result.limits):
            assert result.limit(name).state in ("unknown", "beyond")
            assert "contradict one another" in result.limit(name).note


@pytest.mark.parametrize("away", [3.0, 6.0, 9.0])
def test_readings_that_disagree_are_never_called_good_though_their_mean_is(away):
    (at,) = predicted(MOTOR, [{}])
    assert lubecheck.check(read_case(measured(MOTOR, {"temperature": at}))).verdict == "within"
    tables = [{"temperature": at + away}, {"temperature": at - away}]
    assert lubecheck.check(read_case(measured(MOTOR, *tables))).verdict == "unknown"


def test_one_bad_reading_does_not_hide_among_many_good_ones():
    residuals, errors = np.zeros(101), np.full(101, 2.0)
    residuals[7] = 6.5  # over three times its error; the sum of squares is 40.6, far below the 149 of 100 degrees
    assert chance_of(float(((residuals * 1.96 / errors) ** 2).sum()), 100) > 0.99
    assert not agree(residuals, errors, 40.6)
    residuals[7] = 5.5
    assert agree(residuals, errors, 29.1)


def with_set_points(text: str) -> str:
    for key, value in (("alarm", '"85 degC"'), ("trip", '"95 degC"')):
        text = with_key(text, "limits", key, value)
    return text


@pytest.mark.parametrize(("read", "passed"), [(110.0, "trip 95 degC"), (95.0, "trip 95 degC"), (85.0, "alarm 85 degC")])
@pytest.mark.parametrize("place", [None, "housing", "outer ring"])
def test_a_reading_at_or_over_a_set_point_is_beyond_whatever_is_computed(read, passed, place):
    table = {"temperature": read} | ({} if place is None else {"place": place})
    case = read_case(measured(with_set_points(MOTOR), table))
    result = lubecheck.check(case)
    limit = result.limit("set_point")
    assert (limit.state, result.verdict, result.governing) == ("beyond", "beyond", "set_point")
    assert (limit.demand, limit.allowed) == (read, 85.0)
    assert f"read {read:g} degC, {passed}" in limit.note
    assert result.calibration.stop == f"read {read:g} degC, {passed}: stop, and find the cause before greasing"
    glanced = glances([calibrated(case)])
    assert glanced.at(0).governing == "set_point"
    assert f"read {read:g} degC, {passed}" in glanced.at(0).reason


@pytest.mark.parametrize(("read", "place"), [(84.9, "housing"), (110.0, "inner ring"), (110.0, "shaft")])
def test_a_reading_elsewhere_or_below_says_nothing_of_the_set_points(read, place):
    result = lubecheck.check(read_case(measured(with_set_points(MOTOR), {"temperature": read, "place": place})))
    assert result.limit("set_point").state != "beyond"
    assert "read" not in result.limit("set_point").note.replace("reading", "")


@pytest.mark.parametrize("place", ["housing", "shaft", "inner ring"])
def test_a_reading_over_what_the_lubricant_or_the_rings_stand_is_beyond(place):
    result = lubecheck.check(read_case(measured(MOTOR, {"temperature": 172.0, "place": place})))
    top = result.limit("temperature")
    assert (top.state, top.demand, result.limit("rings").state) == ("beyond", 172.0, "beyond")
    assert f"read 172 degC, highest allowed {top.allowed:g} degC" in top.note
    assert result.calibration.stop.startswith("read 172 degC, highest allowed")


def test_an_explained_reading_over_the_alarm_speaks_of_the_machine_as_it_was_read():
    (warm,) = predicted(MOTOR, [{"ambient": 38.0}])
    text = with_key(MOTOR, "limits", "alarm", f'"{warm - 1:.1f} degC"')
    case = calibrated(read_case(measured(text, {"temperature": warm, "ambient": 38.0})))
    assert case.calibration.is_explained
    result = lubecheck.check(case)
    assert result.limit("set_point").state == "beyond"
    from lubecheck.studies.changes import Change, apply

    blown = apply(case, Change("", "cooling", 1, (("surroundings.draught", "3 m/s"),)))
    after, told = glances([blown]).at(0), lubecheck.check(blown)
    assert next(limit for limit in after.limits if limit.name == "set_point").state == "within"
    assert (told.limit("set_point").state, told.calibration.stop) == ("within", "")
    # Another interval makes no cooler machine.
    often = apply(case, Change("", "interval", 1, (("grease.interval", "1 month"),)))
    assert lubecheck.check(often).limit("set_point").state == "beyond"


def test_a_change_takes_nothing_back_of_a_reading_that_nothing_explains():
    case = calibrated(read_case(measured(with_set_points(MOTOR), {"temperature": 110.0})))
    from lubecheck.studies.changes import Change, apply

    blown = apply(case, Change("", "cooling", 1, (("surroundings.draught", "3 m/s"),)))
    assert lubecheck.check(blown).limit("set_point").state == "beyond"


@pytest.mark.parametrize("name", ["new_motor", "oil_bath_pump", "measured_fan"])
@pytest.mark.parametrize("read", [20.0, 75.0, 110.0, 172.0])
def test_what_would_have_to_be_absurd_is_counted_and_not_listed(name, read):
    text = (EXAMPLES / f"{name}.toml").read_text().rpartition("\n[measured]")[0] or (
        EXAMPLES / f"{name}.toml"
    ).read_text()
    found = lubecheck.check(read_case(measured(text, {"temperature": read, "duty": 1}))).calibration
    assert all(item.surprise <= LIKELY for item in found.explanations)
    case = read_case(measured(text, {"temperature": read, "duty": 1}))
    explained = calibrated(case).calibration.explained
    (note,) = [note for note in found.notes if "not listed" in note] or [""]
    assert note.startswith(f"{len(explained.unlikely)} cause" if explained.unlikely else "")
    is_hot = not found.is_explained and read > 60
    assert any("bearing damage" in note and "vibration" in note for note in found.notes) is is_hot


def test_causes_that_cannot_give_a_reading_are_ruled_out_in_one_line():
    text = with_key(MOTOR, "housing", "relief", '"open"')
    result = lubecheck.check(read_case(measured(text, {"temperature": 110.0, "running_time": "60 h"})))
    (note,) = [note for note in result.calibration.notes if note.startswith("ruled out")]
    assert "axial preload" in note
    assert not {"axial preload"} & {item.cause for item in result.calibration.explanations}


@pytest.mark.parametrize("name", ["new_motor", "oil_bath_pump", "pinion_shaft", "belt_fan", "overfilled_motor"])
@pytest.mark.parametrize("away", [-3.0, 0.0, 5.0])
def test_the_band_is_that_of_the_reading_where_it_was_read_and_narrower_everywhere(name, away):
    text = (EXAMPLES / f"{name}.toml").read_text()
    state = {"duty": 1}
    (estimate,) = predicted(text, [state])
    result = lubecheck.check(read_case(measured(text, {"temperature": estimate + away, **state})))
    before = lubecheck.check(read_case(text))
    for point, plain in zip(result.duty, before.duty, strict=True):
        for key in ("temperature", "outer_ring_temperature", "inner_ring_temperature"):
            after, wide = point.figures[key], plain.figures[key]
            assert after.high - after.low < wide.high - wide.low, key
    outer = result.duty[0].figures["outer_ring_temperature"]
    assert outer.value == pytest.approx(estimate + away, abs=1e-4)
    # The reading is good to 2 K, 95 times of 100; a band holds 97 of its 100 draws, 2.2 K.
    assert outer.value - outer.low == pytest.approx(2.2, abs=0.1)
    assert outer.high - outer.value == pytest.approx(2.2, abs=0.1)


def test_a_reading_that_is_coarser_than_the_estimate_takes_nothing_from_it():
    text = (EXAMPLES / "slow_roller.toml").read_text()
    (estimate,) = predicted(text, [{}])
    result = lubecheck.check(read_case(measured(text, {"temperature": estimate, "reading_error": 10.0})))
    after, before = (
        result.operating.figures["temperature"],
        lubecheck.check(read_case(text)).operating.figures["temperature"],
    )
    assert after.high - after.low <= 1.05 * (before.high - before.low)


@pytest.mark.parametrize(("name", "away"), [("new_motor", 3.0), ("new_motor", -3.0), ("oil_bath_pump", 4.0),
                                            ("pinion_shaft", 0.0), ("belt_fan", 4.0)])  # fmt: skip
def test_inputs_that_give_the_reading_give_the_prediction_within_the_band(name, away, report):
    """Brute force: inputs drawn from their ranges, kept as far as they give the reading within its error."""
    text = (EXAMPLES / f"{name}.toml").read_text()
    state = {"ambient": 10.0, "duty": 1}
    (estimate,) = predicted(text, [state])
    case = read_case(measured(text, {"temperature": estimate + away, **state}))
    band = lubecheck.check(case).duty[0].figures["temperature"]
    usual = readings(case)[1][0]
    there, here = states_of(case, usual), from_rows(rows_of(dataclasses.replace(case, measured=()), usual)[:1])
    chance, count = np.random.default_rng(5), 20_000
    drawn = {}
    for column, low, high in uncertain(case):  # the ends hold 95 %: 1.96 standard deviations to each side
        z = chance.standard_normal(count) / 1.96
        drawn[column] = np.exp(np.where(z < 0, -z * np.log(low), z * np.log(high)))

    def state_of(points):
        many = points.take(np.zeros(count, dtype=int))
        return solve(many.changed(**{key: getattr(many, key) * value for key, value in drawn.items()}))

    off = (state_of(there).outer - estimate - away) / (2.0 / 1.96)
    kept = chance.random(count) < np.exp(-(off**2) / 2)
    predictions = state_of(here).temperature[kept]
    inside = float(((predictions >= band.low) & (predictions <= band.high)).mean())
    report.append(f"calibrated band of {name}, reading {away:+g} K: holds {inside * 100:.1f} % of {kept.sum()}")
    assert kept.sum() > 1000
    assert inside >= 0.94  # 95 %, less what so few samples leave open


@pytest.mark.parametrize("cause", ["degF read as degC", "degC read as degF", "rise read as temperature"])
def test_a_misread_unit_ranks_first_where_it_fits(cause):
    (estimate,) = predicted(BASE, [{"ambient": 25.0}])
    text = {
        "degF read as degC": f"{estimate * 1.8 + 32:.1f} degC",
        "degC read as degF": f"{estimate:.1f} degF",
        "rise read as temperature": f"{estimate - 25.0:.1f} degC",
    }[cause]
    found = found_of(measured(BASE, {"temperature": text, "ambient": 25.0}))
    assert not found.is_explained
    assert found.explained.likely[0].cause == cause
    assert found.explained.likely[0].needed == pytest.approx(estimate, abs=0.1)


def at_explanation(text: str, table: dict[str, object], **changes: float) -> float:
    """Return what the sensor would read were the explanation true."""
    case = read_case(measured(text, table))
    points = states_of(case, readings(case)[1][0])
    return float(solve(points.changed(**changes)).outer[0])


@pytest.mark.parametrize(
    ("cause", "column"),
    [("machine heat", "machine_heat"), ("shaft temperature", "shaft_temperature"), ("ambient", "ambient")],
)
def test_each_explanation_of_a_reading_that_is_too_hot_gives_the_reading(cause, column):
    table = {"temperature": 68.0, "running_time": "48 h"}
    found = found_of(measured(BASE, table))
    assert not found.is_explained
    (one,) = [item for item in all_of(found) if item.cause == cause]
    assert at_explanation(BASE, table, **{column: one.needed}) == pytest.approx(68.0, abs=1e-4)
    assert f"{one.needed:.0f} degC" in one.words or f"{one.needed:.3g} W" in one.words


def test_an_overfill_that_explains_a_reading_is_named_first_with_its_share():
    # Cooling and machine heat are known, the fill is said to be right, and the housing has no room.
    text = PACKED
    for table, key, value in (("grease", "fill", '"35 %"'), ("housing", "shaft_temperature", None),
                              ("housing", "machine_heat", '"0 W"'), ("housing", "conductance", '"1.5 W/K"'),
                              ("duty", "speed", '"3000 rpm"')):  # fmt: skip
        text = with_key(text, table, key, value)
    hot = at_explanation(text, {"temperature": 60.0}, fill=0.97, housing_fill=1.0)
    found = found_of(measured(text, {"temperature": hot, "reading_error": 0.2, "running_time": "48 h"}))
    assert not found.is_explained
    assert found.explained.likely[0].cause == "overfill"
    assert found.explained.likely[0].needed == pytest.approx(0.97, abs=1e-4)
    assert "filled to 97 %" in found.explained.likely[0].words


def test_explanations_are_ranked_by_how_far_outside_its_usual_range_each_would_be():
    for text, table in (
        (BASE, {"temperature": 68.0}),
        (MOTOR, {"temperature": 30.0}),
        (PUMP, {"temperature": 120.0, "duty": 1}),
    ):
        surprises = [item.surprise for item in all_of(found_of(measured(text, table)))]
        assert len(surprises) >= 2
        assert surprises == sorted(surprises)


def test_a_reading_that_is_too_cold_is_explained_by_what_cools_or_by_a_start_just_before():
    found = found_of(measured(MOTOR, {"temperature": 47.0}))
    causes = {item.cause: item for item in all_of(found)}
    assert not found.is_explained
    assert {"ambient", "draught", "shaft temperature", "not settled after a start"} <= set(causes)
    assert causes["ambient"].needed < 40
    assert causes["shaft temperature"].needed < 95
    blown = at_explanation(MOTOR, {"temperature": 47.0}, draught=causes["draught"].needed)
    assert blown == pytest.approx(47.0, abs=1e-4)
    settled = found_of(measured(MOTOR, {"temperature": 47.0, "running_time": "30 h"}))
    assert "not settled after a start" not in {item.cause for item in all_of(settled)}


@pytest.mark.parametrize(("text", "table"), [(MOTOR, {"temperature": 95.0}), (MOTOR, {"temperature": 20.0}),
                                             (PUMP, {"temperature": 30.0, "duty": 1})])  # fmt: skip
def test_what_heat_moves_is_not_judged_beside_a_reading_that_nothing_explains(text, table):
    plain = lubecheck.check(read_case(text))
    result = lubecheck.check(read_case(measured(text, table)))
    assert not result.calibration.is_explained
    assert "Not calibrated" in result.calibration.text
    for limit in result.limits:
        before = plain.limit(limit.name).state
        if limit.name in MOVED_BY_HEAT:
            assert limit.state == ("beyond" if before == "beyond" else "unknown"), limit.name
            assert limit.use is None
            assert "contradicts" in limit.note
        else:
            assert limit.state == before
    assert result.verdict == "unknown"
    assert result.life.figures["modified_life"].value is None


def test_what_is_beyond_stays_beyond_beside_a_reading_that_nothing_explains():
    text = with_key(MOTOR, "lubricant", "name", '"lithium-15-2"') if "lithium-15-2" in MOTOR else MOTOR
    text = text.replace('speed = "1480 rpm"', 'speed = "60 rpm"')
    plain = lubecheck.check(read_case(text))
    assert plain.limit("film").state == "beyond"
    result = lubecheck.check(read_case(measured(text, {"temperature": 95.0})))
    assert not result.calibration.is_explained
    assert result.limit("film").state == "beyond"
    assert result.limit("film").use == pytest.approx(plain.limit("film").use)
    assert result.verdict == "beyond"


def test_a_case_with_a_measurement_is_never_judged_without_it():
    case = read_case(measured(MOTOR, {"temperature": 60.0}))
    with pytest.raises(NotCalibrated):
        plain_check(case)
    with pytest.raises(NotCalibrated):
        rows_of(case, readings(case)[1][0])
    assert calibrated(calibrated(case)) == calibrated(case)


HOT = {"temperature": 64.0}  # the motor of the example is estimated at 60 degC on its outer ring


def test_every_study_sees_the_measurement():
    plain, hot = read_case(MOTOR), read_case(measured(MOTOR, HOT))
    lubricant = "lithium-complex-220-2-ep"
    assert lubecheck.check(hot).limit("interval").use > lubecheck.check(plain).limit("interval").use
    sides = [swap(case, lubricant) for case in (plain, hot)]
    for side in ("before", "after"):
        temperatures = [getattr(one, side).figures.figures["temperature"].value for one in sides]
        assert temperatures[1] > temperatures[0] + 2
    assert system_study([hot]).life_h < system_study([plain]).life_h
    assert wanted_study(hot).life_h < wanted_study(plain).life_h
    assert any("Calibrated" in note for note in (*system_study([hot]).notes, *wanted_study(hot).notes))
    uses = [plant({"a": case, "b": case}, [lubricant]).counts[0] for case in (plain, hot)]
    assert uses[0].judged == uses[1].judged == 2


def test_a_warm_up_ends_at_what_was_calibrated_and_is_not_judged_beside_what_nothing_explains():
    case = read_case(measured(MOTOR, HOT))
    result = warm_up_judged(case, lubecheck.check(case))
    (start,) = [course for course in result.warm_up.courses if course.name == "start"]
    steady = result.operating.figures["outer_ring_temperature"].value
    assert steady == pytest.approx(64.0, abs=1e-4)
    assert start.figures.figures["end"].value == pytest.approx(steady, abs=0.1)
    case = read_case(measured(MOTOR, {"temperature": 95.0}))
    result = warm_up_judged(case, lubecheck.check(case))
    assert result.limit("peak_temperature").state == "unknown"


def test_a_circuit_sees_the_measurements_of_its_positions(tmp_path):
    for name, table in (("a", ()), ("b", ({"temperature": 80.0, "duty": 1},))):
        (tmp_path / f"{name}.toml").write_text(measured(PUMP, *table))
    (tmp_path / "circuit.toml").write_text('[circuit]\ncases = ["a.toml", "b.toml"]\ncode = "-/17/14"\n')
    from lubecheck.model.circuit import load_circuit

    result = circuit_study(load_circuit(tmp_path / "circuit.toml"))
    assert any(note.startswith("b: Calibrated") for note in result.notes)


def test_a_change_of_the_cooling_multiplies_what_was_found():
    case = calibrated(read_case(measured(MOTOR, HOT)))
    from lubecheck.studies.changes import Change, apply

    blown = apply(case, Change("", "cooling", 1, (("surroundings.draught", "3 m/s"),)))
    row, there = (rows_of(one, readings(one)[1][0])[0] for one in (case, blown))
    assert row["cooling_factor"] == there["cooling_factor"] == pytest.approx(case.calibration.value)
    assert solve(from_rows([there])).outer[0] < solve(from_rows([row])).outer[0] - 3


def test_a_measured_temperature_makes_the_kind_of_the_housing_matter_little():
    text = with_key(measured(MOTOR, HOT), "housing", "kind", None)
    limit = lubecheck.check(read_case(text)).limit("temperature")
    assert limit.state == "within"
    temperatures = [lubecheck.check(read_case(one)).operating.figures["temperature"].value
                    for one in (text, measured(MOTOR, HOT))]  # fmt: skip
    assert temperatures[0] == pytest.approx(temperatures[1], abs=0.2)


FACTS_OF_MOTOR = [("housing", "relief"), ("surroundings", "orientation"), ("bearing", "cage"),
                  ("surroundings", "altitude"), ("surroundings", "dust"), ("cleanliness", "setting"),
                  ("housing", "void"), ("surroundings", "draught"), ("grease", "hours_per_day")]  # fmt: skip


@pytest.mark.parametrize("temperature", [47.0, 54.0, 60.0])
@pytest.mark.parametrize(("table", "key"), FACTS_OF_MOTOR)
def test_taking_a_fact_away_beside_an_explained_measurement_never_improves_a_limit(table, key, temperature):
    """Beside one that is not, the fact that contradicts it may go: then what temperature moves is judged again."""
    gravity = {"within": 0, "near": 1, "unknown": 2, "beyond": 2}
    text = measured(BASE, {"temperature": temperature})
    before = lubecheck.check(read_case(text))
    assert before.calibration.is_explained
    after = lubecheck.check(read_case(with_key(text, table, key, None)))
    for limit in before.limits:
        assert gravity[after.limit(limit.name).state] >= gravity[limit.state], limit.name


@functools.cache
def uses_without_measurement() -> dict[str, float]:
    return {limit.name: limit.use for limit in lubecheck.check(read_case(MOTOR)).limits}


@pytest.mark.parametrize("temperature", [57.0, 58.5, 60.0, 62.0, 64.0])
def test_a_measurement_says_what_is_so_better_or_worse(temperature):
    """A reading hotter than computed worsens every limit of heat, a cooler one betters it: it is evidence."""
    plain = uses_without_measurement()
    (estimate,) = predicted(MOTOR, [{}])
    result = lubecheck.check(read_case(measured(MOTOR, {"temperature": temperature})))
    for name in ("temperature", "rings", "interval", "film", "fatigue_life"):
        change = result.limit(name).use - plain[name]
        assert math.copysign(1, change) == math.copysign(1, temperature - estimate), name


def test_a_hotter_reading_never_gives_a_cooler_bearing():
    cooling = [found_of(measured(MOTOR, {"temperature": float(t)})).value for t in np.linspace(52, 72, 11)]
    assert (np.diff(cooling) < 0).all()


def test_what_a_measurement_leaves_out_is_listed_as_assumed():
    listed = {item.name for item in lubecheck.check(read_case(measured(MOTOR, HOT))).assumed}
    assert {"[measured] reading_error", "[measured] running_time", "[measured] place"} <= listed
    full = {**HOT, "reading_error": 1.0, "running_time": "30 h", "place": "housing"}
    listed = {item.name for item in lubecheck.check(read_case(measured(MOTOR, full))).assumed}
    assert not any(name.startswith("[measured]") for name in listed)


def test_a_reading_some_hours_after_greasing_is_said_not_to_be_steady():
    soon, late = (
        lubecheck.check(read_case(measured(MOTOR, {**HOT, "running_time": time}))) for time in ("6 h", "25 h")
    )
    assert any("not steady" in note for note in soon.calibration.notes)
    assert not any("not steady" in note for note in late.calibration.notes)


def test_the_example_tells_its_story():
    result = lubecheck.check(load_case(EXAMPLES / "measured_fan.toml"))
    figures = result.calibration.figures.figures
    assert figures["cooling_factor"].value < 1
    assert figures["after"].high - figures["after"].low < 0.65 * (figures["before"].high - figures["before"].low)
    assert (result.verdict, result.governing) == ("near", "interval")
    assert lubecheck.check(load_case(EXAMPLES / "new_motor.toml")).verdict == "within"


# The cooling is stated, the fill is not known; void and relief are not said, so that grease clears up to 93 %.
FAN = (EXAMPLES / "measured_fan.toml").read_text()
FLAT = FAN
for _table, _key, _value in (
    ("grease", "fill", '"unknown"'),
    ("grease", "housing_fill", None),
    ("surroundings", "draught", None),
    ("housing", "kind", None),
    ("housing", "conductance", '"1.3 W/K"'),
    ("housing", "void", None),
    ("housing", "relief", None),
):
    FLAT = with_key(FLAT, _table, _key, _value)


def read_at(text: str, temperature: float, error: str = "2 K") -> str:
    """Return the case with the reading and its error instead of its own."""
    return with_key(with_key(text, "measured", "temperature", f'"{temperature:.3f} degC"'),
                    "measured", "reading_error", f'"{error}"')  # fmt: skip


@pytest.mark.parametrize(("void", "error"), [(None, "2 K"), (None, "0.3 K"), ('"25 cm^3"', "0.5 K")])
def test_on_a_flat_stretch_a_hundredth_of_a_kelvin_never_turns_unknown_into_beyond(void, error):
    text = FLAT if void is None else with_key(FLAT, "housing", "void", void)
    case = read_case(text)
    points = states_of(case, readings(case)[1][0])
    flat, end = (float(solve(points.changed(fill=fill)).outer[0]) for fill in (0.3, 0.6))
    assert end == pytest.approx(flat, abs=1e-6)
    for away in np.arange(-0.05, 0.055, 0.01):
        result = lubecheck.check(read_case(read_at(text, flat + away, error)))
        assert result.calibration.is_explained
        assert result.limit("fill").state == "unknown", away
        assert result.limit("fill").demand == pytest.approx(0.5), away


@pytest.mark.parametrize("temperature", [43.0, 44.55, 44.58, 45.5, 47.0])
def test_a_reading_that_goes_with_any_fill_tells_none_and_is_judged_as_none(temperature):
    plain = FLAT[: FLAT.index("\n[measured]")] + FLAT[FLAT.index("\n[cleanliness]") :]
    without, result = (lubecheck.check(read_case(one)) for one in (plain, read_at(FLAT, temperature)))
    assert "cannot tell the fill: any from 30 to" in result.calibration.text
    assert result.calibration.figures.figures["fill"].value is None
    assert "judged from 30 to 100 %" in result.limit("fill").note
    for limit in without.limits:
        assert result.limit(limit.name) == limit


def test_a_reading_that_excludes_the_emptiest_fill_tells_the_fill_and_one_that_does_not_its_most():
    text = with_key(FLAT, "housing", "void", '"25 cm^3"')
    fine, coarse = (lubecheck.check(read_case(read_at(text, 45.1, error))) for error in ("0.2 K", "1.5 K"))
    found = fine.calibration.figures.figures["fill"]
    assert 0.3 < found.low < found.value < found.high < 0.75
    assert fine.limit("fill").state == "beyond"
    assert coarse.limit("fill").state == "unknown"
    assert "no more than" in coarse.calibration.text
    assert "taken as 50 %" in coarse.limit("fill").note


@pytest.mark.parametrize("temperature", [44.8, 45.1, 45.4])
def test_the_worst_of_a_found_fill_is_never_less_than_what_was_found(temperature):
    result = lubecheck.check(read_case(read_at(FLAT, temperature, "0.2 K")))
    found = result.calibration.figures.figures["fill"]
    assert result.limit("fill").state == "beyond"
    worst = float(re.search(r"at worst (\d+) %", result.limit("fill").note)[1]) / 100
    assert worst >= found.high - 0.005


def test_no_heat_of_surplus_grease_leaves_all_fills_open():
    result = lubecheck.check(read_case(read_at(with_key(FLAT, "housing", "relief", '"open"'), 44.5)))
    assert "any from 30 to 100 %" in result.calibration.text


def test_a_rise_written_in_fahrenheit_is_found_as_one_in_celsius_is():
    # 43 degC over air of 18 degC is a rise of 25 K, which a thermometer in degF shows as 45.
    found = [found_of(with_key(FAN, "measured", "temperature", f'"{written}"'))
             for written in ("25 degC", "45 degF")]  # fmt: skip
    for one in found:
        (rise,) = [item for item in one.explained.likely if item.cause == "rise read as temperature"]
        assert rise.needed == pytest.approx(43.0)
        assert rise.words.startswith("a rise of 25 K over the air")


def test_readings_that_contradict_one_another_are_not_said_to_take_a_cooling_that_can_be_believed():
    text = FAN[: FAN.index("\n[measured]")] + FAN[FAN.index("\n[cleanliness]") :]
    state = {"ambient": 18.0, "shaft_temperature": 73.0}
    two = lubecheck.check(read_case(measured(text, {"temperature": 48.0, **state}, {"temperature": 62.0, **state})))
    assert not two.calibration.is_explained
    assert "can be believed" not in two.calibration.text
    assert "the 2 readings disagree by more than their errors" in two.calibration.text
    assert "62.0 degC was read where the best fit of all has 55.0 degC, 7.0 K hotter" in two.calibration.text


def test_one_reading_just_outside_is_not_said_to_take_a_cooling_that_can_be_believed():
    (estimate,) = predicted(MOTOR, [{}])
    for hotter in np.arange(4.0, 30.0, 0.5).tolist():
        text = measured(MOTOR, {"temperature": estimate + hotter - 1.0}, {"temperature": estimate + hotter})
        found = lubecheck.check(read_case(text)).calibration
        if not found.is_explained:
            break
    assert "that reading alone lies outside of what can be believed" in found.text
    factor = float(re.search(r"all readings together give ([\d.]+) times", found.text)[1])
    admissible = found.figures.figures["admissible_factor"]
    assert admissible.low - 0.01 <= factor <= admissible.high


@pytest.mark.parametrize(("lies", "share"), [("horizontal", "40 %"), ("vertical", "50 %")])
def test_the_housing_at_the_reading_is_listed_as_it_is_proposed_for_the_shaft(lies, share):
    text = with_key(with_key(MOTOR, "surroundings", "orientation", f'"{lies}"'), "grease", "fill", None)
    text = with_key(text, "grease", "housing_fill", None)
    result = lubecheck.check(read_case(measured(text, {"temperature": 60.0})))
    listed = {item.name: item.value for item in result.assumed}
    assert listed["[measured] fill"] == f"as proposed, with the housing at {share}"
    assert listed["[grease] housing_fill"].startswith(share)
