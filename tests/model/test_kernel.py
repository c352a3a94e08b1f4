"""The kernel: one pass for one position and for ten thousand, converged, and moving the right way."""

from __future__ import annotations

import dataclasses

import numpy as np
import pytest
from positions import points_of, random_points
from scipy.optimize import brentq

from lubecheck.model import equilibrium, limits
from lubecheck.model.balance import balance_of
from lubecheck.model.kernel import judge
from lubecheck.model.points import Points, join

ROWS = 10_000


@pytest.fixture(scope="module")
def many() -> Points:
    return random_points()


@pytest.fixture(scope="module")
def judged_many(many):
    return judge(many)


ROW_FIELDS = ("reference_viscosity", "kappa", "contamination", "life_factor", "load_ratio", "row_life")
POSITION_FIELDS = ("rating_life", "modified_life", "allowed_interval", "interval", "verdict", "governing")


def test_ten_thousand_in_one_call_equal_ten_thousand_single_calls(many, judged_many):
    for i in range(len(many)):
        one = judge(many.take([i]))
        for name in ROW_FIELDS + POSITION_FIELDS:
            a, b = getattr(one, name)[0], getattr(judged_many, name)[i]
            assert a == b or (np.isnan(a) and np.isnan(b)) or abs(a - b) <= 1e-12 * abs(b), (i, name, a, b)
        a, b = one.state.temperature[0], judged_many.state.temperature[i]
        assert a == b or (np.isnan(a) and np.isnan(b)) or abs(a - b) <= 1e-12 * abs(b), (i, a, b)
        for name, limit in one.judged.items():
            assert limit.state[0] == judged_many.judged[name].state[i], (i, name)


def test_every_balance_is_closed_to_a_millionth_of_the_friction_power(judged_many):
    state = judged_many.state
    assert state.is_found.mean() > 0.9  # the test would be empty otherwise
    closed = np.abs(state.residual) <= 1e-6 * state.friction_power
    assert closed[state.is_found].all()
    assert np.isnan(state.temperature[~state.is_found]).all()


def test_heat_removed_is_friction_and_machine_heat(many, judged_many):
    state = judged_many.state
    found = state.is_found
    assert np.allclose(
        state.heat_removed[found], (state.friction_power + many.machine_heat + many.solar_heat)[found], rtol=1e-6
    )


def test_the_root_is_the_one_that_brentq_finds(many, judged_many):
    found = np.flatnonzero(judged_many.state.is_found)[:200]
    for i in found:
        balance = balance_of(many.take([i]))

        def surplus(rise, balance=balance):
            heat = balance.at(np.array([rise]))
            return float(heat.heat_in[0] - heat.heat_out[0])

        # From the top down to the root that was found, the one sought is the first that is met.
        top = equilibrium.TOP_TEMPERATURE - balance.floor[0]
        least = 1e-3 * (judged_many.state.outer[i] - balance.floor[0])
        root = brentq(surplus, least, top, xtol=1e-12, rtol=1e-12)
        assert abs(balance.floor[0] + root - judged_many.state.outer[i]) < 1e-5


def test_without_a_mixed_film_the_balance_has_one_root_because_it_only_falls(many):
    rises = np.linspace(0.5, 180, 60)
    balance = balance_of(many.changed(mixed_factor=0.0))
    with np.errstate(all="ignore"):
        surplus = np.stack([(lambda h: h.heat_in - h.heat_out)(balance.at(np.full(len(many), r))) for r in rises])
    # Between the coldest sink and the top the surplus of heat only falls, up to rounding.
    steps = np.diff(surplus, axis=0)
    assert (steps <= 1e-9 * np.abs(surplus[:-1]).max(axis=0)).all()


def test_without_an_equilibrium_the_state_is_beyond_even_where_nobody_stated_a_top_temperature():
    hot = points_of("new_motor").changed(conductance=0.01, shaft_conductance=0.0, speed=6000.0, highest=np.nan)
    outcome = judge(hot)
    assert outcome.state.is_too_hot[0]
    assert limits.STATES[outcome.judged["temperature"].state[0]] == "beyond"


def test_what_was_not_solved_is_unknown_and_not_beyond():
    lost = judge(points_of("new_motor").changed(conductance=np.nan, housing_area=np.nan))
    assert not lost.state.is_found[0]
    assert not lost.state.is_too_hot[0]
    for name in ("temperature", "rings", "film", "interval", "fatigue_life"):
        assert limits.STATES[lost.judged[name].state[0]] == "unknown", name


def test_a_little_friction_beside_a_great_heat_is_solved_to_what_its_numbers_hold():
    base = points_of("new_motor")
    watts = np.array([0.0, 1.0, 10.0, 100.0])
    many = base.take(np.zeros(4, dtype=int)).changed(
        case=np.arange(4), speed=0.1, machine_heat=watts, conductance=10.0, ambient=-50.0, shaft_conductance=0.0
    )
    state = equilibrium.solve(many)
    assert state.is_found.all()
    flow = sum(np.abs(path) for path in state.paths.values()) + 10.0 * 323.0
    assert (np.abs(state.residual) <= np.maximum(1e-6 * state.friction_power, 1e-13 * flow)).all()


def test_without_an_equilibrium_the_state_is_beyond_and_nothing_is_a_number():
    hot = points_of("new_motor").changed(conductance=0.01, shaft_conductance=0.0, speed=6000.0)
    outcome = judge(hot)
    assert not outcome.state.is_found[0]
    assert np.isnan(outcome.state.temperature[0])
    assert limits.STATES[outcome.judged["temperature"].state[0]] == "beyond"
    assert limits.STATES[outcome.judged["film"].state[0]] == "unknown"
    assert limits.STATES[outcome.verdict[0]] == "beyond"


# Physics that must hold: change one thing in every position and look which way the answer went.


def temperatures(points):
    return equilibrium.solve(points).temperature


def test_more_fill_above_the_clearing_share_never_lowers_the_temperature(many):
    low = dataclasses.replace(many, fill=np.where(np.isnan(many.fill), np.nan, 0.4))
    high = dataclasses.replace(many, fill=np.where(np.isnan(many.fill), np.nan, 0.9))
    a, b = temperatures(low), temperatures(high)
    assert not (b < a - 1e-6).any()
    assert (b > a + 0.1).any()


@pytest.mark.parametrize(
    "change",
    [
        {"cooling_factor": 1.5},
        {"draught": 12.0},
    ],
)
def test_more_cooling_never_raises_the_temperature(many, change):
    # A shaft colder than the air turns "cooling" round: the air then heats.
    sinks = ("shaft_temperature", "frame_temperature", "coolant_inlet", "oil_inlet")
    warm = dataclasses.replace(many, **{sink: np.maximum(getattr(many, sink), many.ambient) for sink in sinks})
    a, b = temperatures(warm), temperatures(warm.changed(**change))
    is_hotter = b > a + 1e-6
    assert not is_hotter[~np.isnan(a)].any()
    assert (b < a - 0.1).any()


def test_a_warmer_ambient_never_cools(many):
    a = temperatures(many)
    b = temperatures(dataclasses.replace(many, ambient=many.ambient + 5))
    assert not (b < a - 1e-6).any()


def test_a_thicker_oil_never_lowers_kappa_at_a_fixed_temperature():
    from lubecheck.physics import film, viscosity

    nu_40 = np.linspace(10, 1000, 200)
    constants = [viscosity.walther_constants.plain(nu_40=nu, nu_100=0.1 * nu + 1) for nu in nu_40]
    a, b = np.array(constants).T
    nu = viscosity.viscosity_from_constants.plain(np.full(200, 60.0), a=a, b=b)
    kappa = film.viscosity_ratio.plain(nu=nu, nu_1=film.reference_viscosity.plain(1480.0, 72.5))
    assert (np.diff(kappa) > 0).all()


def test_more_load_never_lengthens_life(many):
    heavier = dataclasses.replace(many, radial_load=many.radial_load * 1.3, axial_load=many.axial_load * 1.3)
    a, b = judge(many), judge(heavier)
    for name in ("rating_life", "modified_life"):
        longer = getattr(b, name) > getattr(a, name) * (1 + 1e-9)
        assert not longer.any(), name


def test_a_hotter_bearing_never_lengthens_the_interval(many):
    grease = many.take(np.flatnonzero(many.is_grease > 0)[:4000])
    a = judge(grease)
    b = judge(dataclasses.replace(grease, machine_heat=grease.machine_heat + 20))
    assert (b.state.temperature[a.state.is_found & b.state.is_found] > 0).any()
    assert not (b.allowed_interval > a.allowed_interval * (1 + 1e-9)).any()


def test_wetter_oil_never_lengthens_life_and_untested_oil_has_none(many):
    a, b = judge(many.changed(water=100e-6)), judge(many.changed(water=350e-6))
    known = np.isfinite(a.modified_life)
    assert known.any()
    assert np.allclose(b.modified_life[known] / a.modified_life[known], (100 / 350) ** 0.6)
    assert np.isnan(judge(many.changed(water=500e-6)).modified_life).all()


def test_a_held_temperature_is_the_one_that_everything_follows(many):
    held = judge(many.changed(held_temperature=55.0))
    assert (held.state.temperature == 55.0).all()
    free = judge(many)
    again = judge(dataclasses.replace(many, held_temperature=free.state.temperature))
    found = free.state.is_found
    assert np.allclose(again.kappa[found], free.kappa[found], rtol=1e-12)


def test_equal_duty_points_equal_one_point():
    one = points_of("new_motor")
    parts = [one.changed(share=share) for share in (0.2, 0.5, 0.3)]
    three = join(parts).changed(case=0)
    a, b = judge(one), judge(three)
    for name in ("rating_life", "modified_life", "allowed_interval"):
        assert np.allclose(getattr(a, name), getattr(b, name), rtol=1e-12)


def test_no_state_comes_from_what_is_not_a_number():
    uses = np.array([0.0, 0.85, 0.8500001, 1.0, 1.0000001, np.inf, np.nan, -0.5])
    states = [limits.STATES[code] for code in limits.state_of(uses)]
    assert states == ["within", "within", "near", "near", "beyond", "beyond", "unknown", "within"]


def test_more_load_case_has_an_example_of_every_state(judged_many):
    assert set(np.unique(judged_many.verdict)) >= {limits.WITHIN, limits.NEAR_CODE, limits.BEYOND}
