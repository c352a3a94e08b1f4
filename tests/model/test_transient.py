"""The transient against the steady solve, smaller steps, and a general solver of differential equations."""

from __future__ import annotations

import dataclasses

import numpy as np
import pytest
from positions import random_points
from scipy.integrate import solve_ivp

from lubecheck.model.balance import balance_of
from lubecheck.model.equilibrium import solve
from lubecheck.model.transient import HOUR, Course, _capacities, follow
from lubecheck.physics import churning

ROWS = 400


def course(rows: int = ROWS, seed: int = 7) -> Course:
    """Starts of random machines whose end is one state only, with fresh grease in every second one."""
    points = random_points(4 * rows)
    steady = solve(points)
    good = np.flatnonzero(steady.is_found & steady.is_only & np.isnan(points.held_temperature))[:rows]
    points = points.take(good)
    rng = np.random.default_rng(seed)
    n = len(points)
    grease = points.is_grease > 0
    start = points.ambient + rng.choice([0.0, 30.0], n)
    return Course(
        points=points,
        inner=start,
        lubricant=start,
        outer=start,
        housing_mass=rng.uniform(1, 40, n) * 1000,
        fresh=np.where(grease, rng.choice([0.0, 3.0], n) * steady.viscous_torque[good], 0.0),
        clearing=np.where(grease, rng.uniform(0, 0.4, n) * points.free_volume, 0.0),
        channelling=np.full(n, 6e5),
        machine_time=rng.choice([0.0, 0.8], n),
    )


@pytest.fixture(scope="module")
def way() -> Course:
    return course()


@pytest.fixture(scope="module")
def history(way):
    return follow(way)


def test_the_end_is_the_steady_state_to_a_hundredth_of_a_kelvin(way, history):
    steady = solve(way.points)
    assert len(way.points) > 300
    for end, whole in ((history.outer, steady.outer), (history.inner, steady.inner),
                       (history.lubricant, steady.temperature)):  # fmt: skip
        assert np.abs(end[-1] - whole).max() < 0.01


def test_half_the_step_moves_no_peak_by_a_twentieth_of_a_kelvin(way, history):
    finer = follow(way, steps=600)
    for name in ("outer", "lubricant", "inner"):
        assert np.abs(getattr(history, name).max(axis=0) - getattr(finer, name).max(axis=0)).max() < 0.05


def test_a_row_does_not_depend_on_the_rows_beside_it(way, history):
    for i in (0, 5, 100):
        alone = {f.name: getattr(way, f.name)[[i]] for f in dataclasses.fields(Course) if f.name != "points"}
        one = follow(Course(points=way.points.take([i]), **alone))
        assert one.outer[:, 0] == pytest.approx(history.outer[:, i], rel=1e-12)


def test_a_position_in_balance_stays_where_it_is(way):
    steady = solve(way.points)
    zero = np.zeros(len(way.points))
    rests = dataclasses.replace(way, inner=steady.inner, lubricant=steady.temperature, outer=steady.outer,
                                fresh=zero, clearing=zero, machine_time=zero)  # fmt: skip
    assert np.abs(follow(rests).outer - steady.outer).max() < 1e-5


def test_a_general_solver_goes_the_same_way(way, history):
    """scipy's Radau on the same network, coded anew here: the way and not only its ends."""
    for i in range(0, 40, 4):
        one = Course(points=way.points.take([i]), **{
            f.name: getattr(way, f.name)[[i]] for f in dataclasses.fields(Course) if f.name != "points"
        })  # fmt: skip
        balance, heat = balance_of(one.points), _capacities(one)

        def rates(seconds: float, at: np.ndarray, one=one, balance=balance, heat=heat) -> np.ndarray:
            left = np.exp(-one.points.speed / 60 * seconds / one.channelling)
            warm = 1 - np.exp(-seconds / (one.machine_time * HOUR)) if one.machine_time[0] else np.ones(1)
            held = dataclasses.replace(balance, held_volume=balance.held_volume + left * one.clearing)
            flows = held.flows(at[:1], at[1:2], at[2:], warm, left * one.fresh)
            return np.concatenate([flows.inner, flows.lubricant, flows.outer]) / heat[:, 0]

        start = np.concatenate([one.inner, one.lubricant, one.outer]) - balance.floor[0]
        until = min(history.time[-1, i], 30.0)
        times = np.linspace(0, until, 40)
        exact = solve_ivp(rates, (0, until * HOUR), start, method="Radau", t_eval=times * HOUR, rtol=1e-8, atol=1e-7)
        ours = np.interp(times, history.time[:, i], history.outer[:, i]) - balance.floor[0]
        assert np.abs(ours - exact.y[2]).max() < 0.05


def test_the_lumped_position_cools_as_newton_says():
    """One capacity and one conductance, no friction to speak of: exp(-t/tau), tau = C/G; from the textbook, exact."""
    points = course(40).points
    n = len(points)
    gone = np.zeros(n)
    points = points.changed(
        speed=0.1, radial_load=1.0, axial_load=0.0, f0=1e-6, fill=0.1, conductance=2.0, machine_heat=0.0,
        solar_heat=0.0, shaft_conductance=0.0, frame_conductance=0.0, coolant_conductance=0.0, oil_conductance=0.0,
        seal_torque=0.0,
    )  # fmt: skip
    hot = points.ambient + 40
    lump = Course(points=points, inner=hot, lubricant=hot, outer=hot, housing_mass=np.full(n, 3e6), fresh=gone,
                  clearing=gone, channelling=np.full(n, 6e5), machine_time=gone)  # fmt: skip
    heat = _capacities(lump).sum(axis=0)
    history = follow(lump)
    tau = heat / 2.0 / HOUR
    for times in (0.5, 1.0, 2.0):
        at = np.array([np.interp(times * tau[i], history.time[:, i], history.outer[:, i]) for i in range(n)])
        # The rings' conductance lags a little behind so heavy a housing: 1 % of the drop.
        assert at - points.ambient == pytest.approx(40 * np.exp(-times), rel=0.015)


def test_more_fresh_grease_never_runs_cooler(way, history):
    more = follow(dataclasses.replace(way, fresh=1.3 * way.fresh))
    assert (more.outer.max(axis=0) >= history.outer.max(axis=0) - 1e-6).all()


def test_a_heavier_housing_never_comes_to_a_higher_peak(way, history):
    heavier = follow(dataclasses.replace(way, housing_mass=2 * way.housing_mass))
    rows = way.outer <= way.points.ambient  # one that starts warmer falls less
    assert (heavier.outer.max(axis=0) <= history.outer.max(axis=0) + 0.02)[rows].all()


def test_fresh_grease_softens_as_the_yield_stress_does():
    one = course(1)
    balance = balance_of(one.points)
    nodes = [np.array([30.0])] * 3
    none, some = (balance.flows(*nodes, np.ones(1), np.array([x])).torque for x in (0.0, 100.0))
    assert some - none == pytest.approx(100.0 * churning.softening.plain(balance.floor + 30.0))
