"""The plan of many positions: rounding never lengthens, due dates only move earlier, and what it costs is said."""

from __future__ import annotations

import datetime
import math

import pytest
from conftest import BASE, EXAMPLES, with_key
from hypothesis import given, settings
from hypothesis import strategies as st

import lubecheck
from lubecheck.model.plan import calendar_days_of
from lubecheck.model.reader import read_case
from lubecheck.model.schedule import ROUTES, schedule

START = datetime.date(2026, 12, 1)


def result_of(**changes):
    text = BASE
    for name, value in changes.items():
        table, _, key = name.partition("__")
        text = with_key(text, table, key, value)
    return lubecheck.check(read_case(text))


@settings(max_examples=60, deadline=None)
@given(
    hours=st.floats(30, 12000),
    per_day=st.floats(1, 24),
    route=st.sampled_from([None, *ROUTES]),
    ran=st.floats(0, 20000),
    ago=st.integers(0, 900),
    is_staggered=st.booleans(),
)
def test_rounding_never_lengthens_and_no_date_is_later_than_allowed(hours, per_day, route, ran, ago, is_staggered):
    last = START - datetime.timedelta(days=ago)
    result = result_of(grease__interval=f'"{hours} h"', grease__hours_per_day=f'"{per_day} h"',
                       grease__hours_run=f'"{ran} h"', grease__last_done=f'"{last}"')  # fmt: skip
    for row in schedule([result] * 3, START, route, is_staggered=is_staggered):
        if row.planned_days is None:
            continue
        assert row.planned_days <= row.interval_days
        assert row.planned_days * per_day <= row.interval_h + 1e-6
        if row.next_due is None:
            continue
        assert row.next_due >= START
        left = max(0.0, (row.interval_h - ran) / per_day)
        assert (row.next_due - START).days <= left
        assert (row.next_due - last).days <= row.interval_days or row.next_due == START
        if not is_staggered:  # nor needlessly early: the next round would be too late
            rhythm = ROUTES[route] if route and row.interval_days >= ROUTES[route] else 1
            later = row.next_due + datetime.timedelta(days=rhythm)
            assert (later - last).days > row.interval_days or (later - START).days > left


@settings(max_examples=200, deadline=None)
@given(hours=st.floats(1, 60000), per_day=st.floats(0.5, 24), shutdown=st.floats(0, 2000), begins=st.floats(0, 8766))
def test_standstills_never_stretch_the_running_hours_wherever_the_interval_begins(hours, per_day, shutdown, begins):
    days = calendar_days_of(hours, per_day, shutdown)
    # A standstill at the end of each year of 365.25 days: the running time between begin and begin + days.
    year = 8766.0

    def running(t):
        years, rest = divmod(t, year)
        return years * (year - shutdown) + min(rest, year - shutdown)

    ran = (running(begins + days * 24.0) - running(begins)) * per_day / 24
    assert ran <= hours + 1e-6


def test_fitting_to_a_route_says_what_it_costs_in_grease():
    result = result_of(grease__interval='"100 d"', grease__stroke='"1.2 g"')
    (row,) = schedule([result], START, "quarterly")
    assert (row.interval_days, row.planned_days) == (100, 91)
    # 12 g x (365.25/91 - 365.25/100), by hand 4.335 g
    assert row.rounding_g_per_year == pytest.approx(4.335, abs=0.01)
    assert row.grease_g_per_year == pytest.approx(12 * 365.25 / 91)


def test_a_position_shorter_than_the_route_keeps_its_own_rounds():
    (row,) = schedule([result_of(grease__interval='"3 week"')], START, "monthly")
    assert row.planned_days == 21
    assert any("rounds of its own" in note for note in row.notes)


def test_next_due_from_the_last_date_or_the_hour_meter_whichever_is_sooner():
    by_date = result_of(grease__last_done='"2026-10-01"')
    assert schedule([by_date], START)[0].next_due == datetime.date(2026, 10, 1) + datetime.timedelta(weeks=16)
    both = result_of(grease__last_done='"2026-10-01"', grease__hours_run='"2640 h"')
    # 16 weeks of 24 h are 2688 h; 48 h are left: two days
    assert schedule([both], START)[0].next_due == datetime.date(2026, 12, 3)


def test_overdue_and_unknown_dates_are_due_at_once_and_said():
    late = schedule([result_of(grease__last_done='"2026-07-01"')], START)[0]
    assert late.next_due == START
    assert any("overdue by 41 days" in note for note in late.notes)
    unknown = schedule([result_of()], START)[0]
    assert unknown.next_due == START
    assert any("last_done or hours_run" in note for note in unknown.notes)


def test_a_neglected_filling_is_purged():
    row = schedule([result_of(grease__last_done='"2024-01-01"')], START)[0]
    assert row.purge_g == pytest.approx(25.0)
    (note,) = [note for note in row.notes if "clean grease comes" in note]
    assert "running 10 to 30 min between the steps (common practice)" in note  # 1480 rpm


@pytest.mark.parametrize(
    ("speed", "said"), [("1480 rpm", "10 to 30 min"), ("2960 rpm", "10 to 30 min"), ("500 rpm", "30 to 90 min"),
                        ("100 rpm", "2.5 to 7.5 h"), ("5 rpm", "a shift of 8 h")]
)  # fmt: skip
def test_the_steps_say_how_long_to_run_with_the_plug_open(speed, said):
    text = with_key(with_key(BASE, "housing", "relief", '"open"'), "duty", "speed", f'"{speed}"')
    steps = lubecheck.check(read_case(text)).plan.steps
    assert any(f"Run for {said} at running speed with the plug open" in step for step in steps)
    closed = lubecheck.check(read_case(with_key(text, "housing", "relief", '"closed"'))).plan.steps
    assert not any("plug open" in step for step in closed)


def test_staggering_spreads_positions_of_one_rhythm_earlier():
    result = result_of(grease__interval='"16 week"', grease__last_done='"2026-11-30"')
    rows = schedule([result] * 4, START, "monthly", is_staggered=True)
    plain = schedule([result] * 4, START, "monthly")
    assert len({row.next_due for row in rows}) > 1
    assert all(a.next_due <= b.next_due for a, b in zip(rows, plain, strict=True))


def test_a_closed_bearing_is_replaced_at_the_end_of_its_grease_life():
    text = with_key(BASE.replace('"6309"', '"6309-2RS"'), "grease", "interval", None)
    result = lubecheck.check(read_case(text))
    row = schedule([result], START)[0]
    assert row.action == "replace the bearing"
    assert row.interval_h == pytest.approx(result.limit("interval").allowed)
    assert row.amount_g is None


def test_a_standstill_counts_only_for_an_interval_in_running_hours():
    by_calendar = result_of(grease__interval='"60 week"', grease__shutdown='"3 week"')
    by_hours = result_of(grease__interval='"10080 h"', grease__shutdown='"3 week"')
    assert schedule([by_calendar], START)[0].planned_days == 420
    assert schedule([by_hours], START)[0].planned_days == 420 + 21  # 420 days of running hold one whole year of it


def test_a_position_without_room_is_not_taken_for_a_closed_bearing():
    result = lubecheck.check(lubecheck.load_case(EXAMPLES / "overfilled_motor.toml"))
    row = schedule([result], START)[0]
    assert row.action == "open a way out or clean out"
    assert row.next_due == START
    assert row.amount_g is None
    assert row.feed_g_per_h is None


def test_strokes_grams_ounces_and_volume_agree():
    row = schedule([lubecheck.check(lubecheck.load_case(EXAMPLES / "new_motor.toml"))], START)[0]
    assert row.amount_g == pytest.approx(row.strokes * row.stroke_g)
    assert row.amount_oz == pytest.approx(row.amount_g / 28.349523125)
    assert row.amount_cm3 == pytest.approx(row.amount_g / 0.9, rel=0.03)
    assert not math.isnan(row.amount_cm3)


def test_a_route_comes_back_on_its_last_round_that_the_position_s_own_interval_reaches():
    result = result_of(grease__interval='"7 week"', grease__last_done='"2026-11-27"')
    (row,) = schedule([result], START, "monthly")
    # Rounds on 1 and 29 December and 26 January; 49 days after 27 November is 15 January.
    assert (row.next_due, row.planned_days) == (datetime.date(2026, 12, 29), 28)
    ran = result_of(grease__interval='"7 week"', grease__hours_run='"96 h"')
    assert schedule([ran], START, "monthly")[0].next_due == datetime.date(2026, 12, 29)


@pytest.mark.parametrize(
    ("oil", "there", "absent"),
    [
        ({"supply": "circulating", "flow": "0.1 l/min", "inlet": "48 degC"},
         ("tank", "new filter", "flush", "flow of 0.1 l/min", "return", "sight glass"), "lowest rolling element"),
        ({"supply": "mist"}, ("mist generator",), "lowest rolling element"),
        ({"supply": "bath", "level": "0 mm"}, ("lowest rolling element",), "filter"),
    ],
)  # fmt: skip
def test_the_oil_is_changed_as_its_supply_needs(oil, there, absent):
    text = (EXAMPLES / "oil_bath_pump.toml").read_text(encoding="utf-8")
    text = with_key(with_key(text, "oil", "level", None), "cleanliness", "setting", '"normal"')
    for key, value in oil.items():
        text = with_key(text, "oil", key, f'"{value}"')
    steps = " ".join(lubecheck.check(read_case(text)).plan.steps)
    assert all(word in steps for word in there)
    assert absent not in steps


def test_a_closed_bearing_with_a_planned_interval_is_told_the_life_of_its_grease():
    result = lubecheck.check(read_case(BASE.replace('"6309"', '"6309-2RS"')))
    (booser,) = [line for line in result.interval_lines if line.governs]
    limit = result.limit("interval")
    assert (limit.state, limit.use, limit.allowed) == ("beyond", None, None)
    assert "take [grease] interval out" in limit.note
    hours = f"{booser.hours:,.0f}".replace(",", " ")
    assert f"the grease sealed in it lasts {hours} h (L10): replace the bearing by then" in limit.note
    row = schedule([result], START)[0]
    assert row.interval_h == pytest.approx(booser.hours)
    assert row.planned_days == math.floor(booser.hours / 24)
