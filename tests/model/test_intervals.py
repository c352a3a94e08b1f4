"""The lines of lubricant life: which one governs, what moves them and which way, and damage that adds up."""

from __future__ import annotations

import dataclasses
import math

import numpy as np
import pytest
from conftest import BASE, with_key
from hypothesis import given, settings
from hypothesis import strategies as st

import lubecheck
from lubecheck.model.check import readings
from lubecheck.model.kernel import judge
from lubecheck.model.points import from_rows
from lubecheck.model.reader import read_case
from lubecheck.model.rows import rows_of, seasons
from lubecheck.physics import grease_life


def case_of(**changes):
    """The base case with `table__key` set to a TOML value."""
    text = BASE
    for name, value in changes.items():
        table, _, key = name.partition("__")
        text = with_key(text, table, key, value)
    return read_case(text)


def allowed(case) -> float:
    return float(judge(from_rows(rows_of(case, readings(case)[1][0]))).allowed_interval[0])


def line(case, name):
    return next(item for item in lubecheck.check(case).interval_lines if item.name == name)


@pytest.mark.parametrize(
    ("key", "better", "worse"),
    [
        ("surroundings__ambient", '"45 degC"', '"60 degC"'),
        ("duty__radial_load", '"1.9 kN"', '"9 kN"'),
        ("surroundings__dust", '"clean"', '"dusty"'),
        ("surroundings__water", '"dry"', '"damp"'),
        ("surroundings__vibration", '"2 mm/s"', '"7 mm/s"'),
        ("surroundings__orientation", '"horizontal"', '"vertical"'),
        ("surroundings__turning_ring", '"inner"', '"outer"'),
        ("surroundings__air_flow", '"none"', '"slight"'),
        ("duty__speed", '"1480 rpm"', '"2950 rpm"'),
        ("grease__hours_per_day", '"24 h"', '"8 h"'),
    ],
)
def test_each_worse_answer_shortens_the_interval(key, better, worse):
    # A grease at its reference temperature, so that the ceiling and the cap of the doubling hide nothing.
    hot = {"housing__shaft_temperature": '"110 degC"', "lubricant__name": '"lithium-110-2"'}
    assert allowed(case_of(**hot, **{key: worse})) < allowed(case_of(**hot, **{key: better}))


@settings(max_examples=40, deadline=None)
@given(
    low=st.floats(20, 90), rise=st.floats(0.5, 40), load=st.floats(500, 9000), more=st.floats(1.01, 1.8),
    speed=st.floats(200, 2500), faster=st.floats(1.01, 1.4),
)  # fmt: skip
def test_the_interval_never_rises_with_temperature_load_or_speed(low, rise, load, more, speed, faster):
    def of(ambient, radial, rpm):
        return allowed(case_of(surroundings__ambient=f'"{ambient} degC"', duty__radial_load=f'"{radial} N"',
                               duty__speed=f'"{rpm} rpm"'))  # fmt: skip

    here = of(low, load, speed)
    for worse in (of(low + rise, load, speed), of(low, load * more, speed), of(low, load, speed * faster)):
        assert math.isnan(worse) or worse <= here * (1 + 1e-9)


@pytest.mark.parametrize("shares", [(0.5, 0.5), (0.2, 0.3, 0.5)])
def test_linear_damage_of_equal_states_is_the_constant_case(shares):
    table = BASE[BASE.index("[[duty]]") : BASE.index("[surroundings]")]
    states = "".join(table.rstrip() + f"\nshare = {share}\n\n" for share in shares)
    many = read_case(BASE.replace(table, states))
    assert allowed(many) == pytest.approx(allowed(read_case(BASE)), rel=1e-9)


def test_twelve_equal_months_are_the_constant_case():
    months = "[" + ", ".join(['"40 degC"'] * 12) + "]"
    result, constant = lubecheck.check(case_of(surroundings__months=months)), lubecheck.check(read_case(BASE))
    assert result.limit("interval").allowed == pytest.approx(constant.limit("interval").allowed, rel=1e-9)
    assert result.operating.temperature.m == pytest.approx(constant.operating.temperature.m)
    assert len(result.duty) == 1


def test_two_hot_hours_a_day_count_by_the_hour():
    # 22 h at t1 and 2 h at t2 by hand: t = 24 / (22/t1 + 2/t2), each from a case of its own.
    hot = {"lubricant__name": '"lithium-110-2"', "housing__shaft_temperature": '"95 degC"'}
    text = with_key(BASE, "lubricant", "name", hot["lubricant__name"])
    text = with_key(text, "housing", "shaft_temperature", hot["housing__shaft_temperature"])
    table = text[text.index("[[duty]]") : text.index("[surroundings]")]
    cool_part = table.rstrip() + "\nshare = 0.9166666667\n\n"
    hot_part = table.rstrip() + '\nshare = 0.0833333333\nambient = "110 degC"\n\n'
    both = allowed(read_case(text.replace(table, cool_part + hot_part)))
    t1, t2 = allowed(case_of(**hot)), allowed(case_of(**hot, surroundings__ambient='"110 degC"'))
    assert t2 < 0.2 * t1
    assert both == pytest.approx(24 / (22 / t1 + 2 / t2), rel=1e-6)


def test_lowest_and_highest_month_keep_the_mean_of_the_year():
    case = case_of(surroundings__ambient='"12 degC"', surroundings__ambient_lowest='"-5 degC"',
                   surroundings__ambient_highest='"32 degC"')  # fmt: skip
    months = seasons(case)
    assert len(months) == 12
    assert (min(months), max(months)) == pytest.approx((-5, 32))
    assert np.mean(months) == pytest.approx(12, abs=1e-6)


def test_a_season_is_worse_than_its_mean_and_its_hottest_month_is_judged():
    mean = case_of(housing__shaft_temperature='"110 degC"', lubricant__name='"lithium-110-2"')
    year = case_of(housing__shaft_temperature='"110 degC"', lubricant__name='"lithium-110-2"',
                   surroundings__ambient_lowest='"20 degC"', surroundings__ambient_highest='"60 degC"')  # fmt: skip
    assert allowed(year) < allowed(mean)
    assert lubecheck.check(year).operating.temperature > lubecheck.check(mean).operating.temperature


def test_rest_ages_grease_and_never_past_the_calendar_ceiling():
    for hours in (1, 4, 8, 16, 24):
        calendar = allowed(case_of(grease__hours_per_day=f'"{hours} h"')) * 24 / hours
        assert calendar <= grease_life.CALENDAR_CEILING * (1 + 1e-9)


def test_a_velocity_is_read_as_its_class():
    for velocity, word in (("4.9 mm/s", "smooth"), ("0.3 in/s", "rough"), ("12 mm/s", "severe")):
        measured = lubecheck.check(case_of(surroundings__vibration=f'"{velocity}"'))
        named = lubecheck.check(case_of(surroundings__vibration=f'"{word}"'))
        assert measured.limit("interval").allowed == named.limit("interval").allowed
        assert measured.limit("static_load").demand == named.limit("static_load").demand


def test_the_lines_stand_side_by_side_with_their_percentiles_and_one_governs():
    result = lubecheck.check(read_case(BASE))
    by_name = {item.name: item for item in result.interval_lines}
    assert list(by_name) == ["classical", "Booser", "GfT worksheet 3"]
    assert [item.governs for item in result.interval_lines] == [True, False, False]
    assert by_name["classical"].failed == by_name["Booser"].failed == 0.01
    assert by_name["classical"].hours == pytest.approx(result.limit("interval").allowed)
    raw = float(by_name["classical"].note.split()[0])
    assert raw * math.prod(dict(by_name["classical"].factors).values()) == pytest.approx(
        by_name["classical"].hours, rel=1e-4
    )
    assert "times apart" in result.interval_spread
    # k_f n dm by hand: 1.0 x 1480 x 72.5 = 107 300; the curve is remembered, and only stands beside the others
    curve = by_name["GfT worksheet 3"]
    assert "1.07e+05" in curve.note
    raw = float(curve.note.split(": ")[1].split()[0])
    assert 17_000 < raw < 30_000
    assert raw * math.prod(dict(curve.factors).values()) == pytest.approx(curve.hours, rel=1e-3)
    assert curve.failed == 0.01
    assert "L10 to L01" in dict(curve.factors)
    assert "never governs" in curve.note


def test_the_remembered_curve_follows_the_plain_answers_and_never_moves_the_verdict():
    plain, harsh = (lubecheck.check(case_of(**answers)) for answers in (
        {}, {"surroundings__dust": '"dusty"', "surroundings__orientation": '"vertical"'}))  # fmt: skip
    lines = [result.interval_lines[2] for result in (plain, harsh)]
    # dust 0.4, upright 0.5: reliability handbooks; the temperature moves a little with the friction of an upright shaft
    assert lines[1].hours / lines[0].hours == pytest.approx(0.2, rel=0.1)
    for result in (plain, harsh):
        assert result.limit("interval").allowed == pytest.approx(result.interval_lines[0].hours)
    (safer,) = [item for item in lubecheck.check(case_of(limits__grease_reliability='"90 %"')).interval_lines
                if item.name == "GfT worksheet 3"]  # fmt: skip
    # L10 over L01 with the slope 2.3: 2.8 times (handbooks)
    assert safer.hours / lines[0].hours == pytest.approx(2.78, rel=0.01)


def test_beyond_the_right_end_of_the_curve_nothing_is_read():
    text = with_key(BASE, "duty", "speed", '"2900 rpm"').replace('"6309"', '"22222"')
    for key in ("dynamic_rating", "static_rating", "mass"):
        text = with_key(text, "bearing", key, None)
    curve = lubecheck.check(read_case(text)).interval_lines[2]
    assert curve.hours is None  # k_f n dm about 8 x 2900 x 155 = 3.6e6
    assert "the curve ends at 2e+06" in curve.note


def test_a_closed_bearing_is_judged_by_the_life_of_its_grease():
    text = with_key(BASE.replace('"6309"', '"6309-2RS"'), "grease", "interval", None)
    result = lubecheck.check(read_case(text))
    sealed = next(item for item in result.interval_lines if item.governs)
    assert (sealed.name, sealed.failed) == ("Booser", 0.1)
    assert result.limit("interval").allowed == pytest.approx(sealed.hours)
    temperature = result.operating.temperature.m_as("degC")
    # Booser by hand at that temperature: 10^(-2.60 + 2450/(273 + T)) h, L10 by the slope 2.3 is L50/2.268
    assert sealed.hours == pytest.approx(10 ** (-2.60 + 2450 / (273 + temperature)) / 2.268, rel=2e-3)


@pytest.mark.parametrize(("wanted", "factor"), [("99 %", 1.0), ("90 %", 2.78), ("50 %", 6.30)])
def test_the_reliability_asked_for_scales_by_the_weibull_slope(wanted, factor):
    # Slope 2.3: L10 is 2.78 times L01 and L50 6.30 times, by hand: (ln 0.9 / ln 0.99)^(1/2.3), (ln 0.5 / ln 0.99)^...
    hot = {"housing__shaft_temperature": '"150 degC"', "lubricant__name": '"lithium-110-2"'}
    base = line(case_of(**hot), "classical").hours
    case = case_of(**hot, limits__grease_reliability=f'"{wanted}"')
    assert line(case, "classical").hours == pytest.approx(base * factor, rel=2e-3)


def test_a_better_grease_keeps_its_interval_to_a_higher_temperature_and_halves_it_more_slowly():
    common = case_of(housing__shaft_temperature='"150 degC"', lubricant__name='"lithium-110-2"')
    better = case_of(housing__shaft_temperature='"150 degC"', lubricant__name='"polyurea-110-2"')
    assert allowed(better) > 1.5 * allowed(common)


def test_an_interval_under_a_week_becomes_a_feeder_with_its_rate():
    case = case_of(grease__interval=None, surroundings__water='"wet"', surroundings__dust='"very dusty"',
                   surroundings__vibration='"severe"', housing__shaft_temperature='"120 degC"')  # fmt: skip
    result = lubecheck.check(case)
    assert result.plan.interval_h < 7 * 24
    # 0.4e-4 g/(h mm^2) x 100 mm x 25 mm by hand
    assert result.plan.feed_g_per_h == pytest.approx(0.1)
    assert "automatic feeder" in " ".join(result.plan.steps)
    assert "feed continuously" in result.limit("interval").note


def oil_case(supply="bath", water="dry", ambient="40 degC"):
    text = BASE[: BASE.index("[grease]")].replace("polyurea-110-2", "mineral-vg-46")
    text = with_key(text, "surroundings", "water", f'"{water}"')
    text = with_key(text, "surroundings", "ambient", f'"{ambient}"')
    stream = 'flow = "1 l/min"\ninlet = "50 degC"\n' if supply == "circulating" else ""
    return read_case(text + f'[oil]\nsupply = "{supply}"\nhours_per_day = "24 h"\nvolume = "1.2 l"\n{stream}')


def test_oil_is_judged_by_bath_rule_and_oxidation_and_the_shorter_governs():
    result = lubecheck.check(oil_case())
    bath, oxidation = result.interval_lines
    assert bath.governs
    assert result.limit("interval").allowed == pytest.approx(min(bath.hours, oxidation.hours))
    assert result.plan.oil_change_cm3 == pytest.approx(1200)
    assert result.amounts.oil_change_quantity.m_as("l") == pytest.approx(1.2)


def test_circulating_oil_is_judged_by_oxidation_alone():
    result = lubecheck.check(oil_case("circulating"))
    assert [item.governs for item in result.interval_lines] == [False, True]
    # At most 4 years (Whitby), and the temperature here is below 70 degC.
    assert result.limit("interval").allowed == pytest.approx(4 * 8766)
    assert result.limit("interval").basis == "whitby"


def test_water_in_the_air_shortens_an_oil_change():
    dry, wet = (lubecheck.check(oil_case(water=word)).limit("interval").allowed for word in ("dry", "damp"))
    assert wet == pytest.approx(dry / 2)


def test_a_large_charge_serves_longer_and_a_small_or_unsaid_one_as_the_rule_says():
    def bath(volume):
        charge = None if volume is None else 1000 * volume
        return lubecheck.check(dataclasses.replace(case, oil=dataclasses.replace(case.oil, volume=charge)))

    case = oil_case(ambient="75 degC")

    results = {volume: bath(volume) for volume in (None, 0.05, 0.3, 0.6, 1.2, 9.0)}
    hours = {volume: result.limit("interval").allowed for volume, result in results.items()}
    watts = results[None].operating.friction_power.m_as("W")
    temperature = results[None].operating.temperature.m_as("degC")
    by_hand = 8766 * 0.25 ** (max(temperature - 50, 0) / 50)  # 12 months to 50 degC, 3 at 100: handbooks
    assert by_hand < 8766 / 2
    for volume, allowed in hours.items():
        factor = 1.0 if volume is None else min(2.0, max(1.0, volume * 1000 / watts / 10))  # 5 to 10 l/kW: handbooks
        assert allowed == pytest.approx(factor * by_hand, rel=1e-6), volume
    assert hours[9.0] == pytest.approx(2 * hours[None])
    assert "a small charge" in results[0.05].limit("interval").note
    assert "a large charge" in results[9.0].limit("interval").note
    assert ("volume", 2.0) in results[9.0].interval_lines[0].factors


@pytest.mark.parametrize(("litres", "factor"), [(5, 1.0), (10, 1.0), (15, 1.5), (60, 2.0)])
def test_circulating_oil_serves_longer_the_more_seldom_it_turns_over_but_never_over_four_years(litres, factor):
    case = oil_case("circulating", ambient="75 degC")
    hot = dataclasses.replace(case, oil=dataclasses.replace(case.oil, inlet=85.0, volume=1000.0 * litres))
    result = lubecheck.check(hot)
    temperature = result.operating.temperature.m_as("degC")
    assert 80 < temperature < 100
    # Whitby: 4 years up to 70 degC, halved each 10 K; ordinary tanks hold 5 to 10 min of the flow of 1 l/min
    by_hand = 4 * 8766 * 2 ** ((70 - temperature) / 10)
    assert result.limit("interval").allowed == pytest.approx(min(4 * 8766, factor * by_hand), rel=1e-6)
    cool = lubecheck.check(dataclasses.replace(case, oil=dataclasses.replace(case.oil, volume=1000.0 * litres)))
    assert cool.limit("interval").allowed <= 4 * 8766 * (1 + 1e-9)


@pytest.mark.parametrize(("supply", "rule", "longest"), [("bath", 0, 8766), ("circulating", 1, 4 * 8766)])
def test_no_charge_serves_longer_than_a_cool_one_and_the_factor_that_took_effect_is_told(supply, rule, longest):
    def judged(ambient, litres):
        case = oil_case(supply, ambient=f"{ambient} degC")
        inlet = {} if supply == "bath" else {"inlet": float(ambient)}
        oil = dataclasses.replace(case.oil, volume=1000.0 * litres, **inlet)
        return lubecheck.check(dataclasses.replace(case, oil=oil))

    factors = []
    for ambient in (20, 40, 60, 65, 70, 75, 90):
        plain, large = judged(ambient, 5 if supply == "circulating" else 0.05), judged(ambient, 60)
        hours = large.interval_lines[rule].hours
        factor = dict(large.interval_lines[rule].factors).get("volume", 1.0)
        assert hours <= longest * (1 + 1e-9)
        assert hours == pytest.approx(factor * plain.interval_lines[rule].hours, rel=1e-6)
        assert large.limit("interval").allowed == pytest.approx(hours)
        note = large.limit("interval").note
        assert f"x {factor:.2f} (estimate)" in note
        assert ("that a cool oil serves" in note) == (factor < 2)
        factors.append(factor)
    assert factors == sorted(factors)
    assert (factors[0], factors[-1]) == (1.0, 2.0)
    assert any(1 < factor < 2 for factor in factors)


def test_an_oil_hotter_than_the_rules_go_is_unknown():
    result = lubecheck.check(oil_case(ambient="125 degC"))
    assert result.operating.temperature.m_as("degC") > 110
    assert result.limit("interval").state == "unknown"


def test_hours_a_day_left_out_of_a_plan_in_running_hours_are_judged_at_their_worst():
    stated = case_of(grease__interval='"3000 h"')
    silent = case_of(grease__interval='"3000 h"', grease__hours_per_day=None)
    assert lubecheck.check(stated).limit("interval").state == "within"
    limit = lubecheck.check(silent).limit("interval")
    assert limit.state == "unknown"
    assert "[grease] hours_per_day" in limit.note


@pytest.mark.parametrize(
    ("key", "value"),
    [
        ("surroundings__months", '["1 degC", "2 degC"]'),
        ("surroundings__months", "[1,2,3,4,5,6,7,8,9,10,11,12]"),
        ("surroundings__ambient_lowest", '"3 degC"'),
        ("surroundings__vibration", '"7 rpm"'),
        ("surroundings__turning_ring", '"both"'),
        ("grease__last_done", '"2026-13-01"'),
        ("grease__last_done", '"yesterday"'),
        ("grease__last_done", "7"),
        ("grease__given", '"12 strokes"'),  # without a weighed stroke
        ("grease__given", '"-2 strokes"'),
        ("grease__rule", '"daily"'),
        ("limits__grease_reliability", '"100 %"'),
    ],
)
def test_malformed_values_are_refused(key, value):
    with pytest.raises(lubecheck.CaseError) as refused:
        case_of(**{key: value})
    assert all(fault.line for fault in refused.value.faults)
