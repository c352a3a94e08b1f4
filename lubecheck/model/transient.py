"""The transient: how the temperatures of a position move from one state towards its balance.

The network and the torques are those of `balance`; here each of its three nodes stores heat. The end of every course
is the equilibrium that `equilibrium.solve` finds.

Each row has its own steps, fixed beforehand, so that its answer does not depend on the rows beside it: they grow
in proportion to the time that has passed, since every part of the course is slower than the one before. One step is
Verwer's two-stage Rosenbrock method: second order for any Jacobian, and stable for the stiff node, the lubricant, which
follows within seconds what the housing does in hours.
"""

from __future__ import annotations

import dataclasses
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model.balance import Air, Balance, Flows, balance_of
from lubecheck.model.points import Points
from lubecheck.physics import warm_up
from lubecheck.units import Array

STEPS = 300
HOUR = 3600.0  # s
_GAMMA = 1 - np.sqrt(0.5)  # of the method: the L-stable choice with the smaller error
_FIRST = 0.2  # of the time in which the lubricant follows the rings: up to it steps are about equal
_TIMES = 12.0  # of the slowest time: what is left is 6e-6
_OIL_SHARE = 0.1  # of the free volume that oil fills while it runs: estimate, 0.05 to 0.3; a small part of the heat
_NUDGE = 0.01  # K, for the slope of friction over temperature


@dataclass(frozen=True, slots=True)
class Course:
    """What a row starts from and what moves while it runs; the points say what it ends in."""

    points: Points
    inner: Array  # degC at the start, as the next two
    lubricant: Array
    outer: Array
    housing_mass: Array  # g
    fresh: Array  # N mm at 25 degC, torque of the fresh grease at the start
    clearing: Array  # cm^3 of grease that is churned at the start and finds its place in time
    channelling: Array  # revolutions
    machine_time: Array  # h in which the machine warms; 0: it is warm already


@dataclass(frozen=True, slots=True)
class History:
    """A course in time: [step, row]."""

    time: Array  # h
    inner: Array  # degC
    lubricant: Array
    outer: Array
    torque: Array  # N mm


def follow(course: Course, air_properties: Air = air.properties, *, steps: int = STEPS) -> History:
    """Return the temperatures of every row from its start until nothing moves."""
    with np.errstate(all="ignore"):
        balance = balance_of(course.points, air_properties)
        capacities = _capacities(course)
        quick = capacities[1] / (2 * balance.ring)
        time = _steps(_FIRST * quick, _TIMES * _slowest(course, balance, capacities).sum(axis=0), steps)
        at = np.stack([course.inner, course.lubricant, course.outer]) - balance.floor
        nodes = np.empty((3, *time.shape))
        torque = np.empty_like(time)
        for step in range(steps + 1):
            flows = _flows(course, balance, time[step], at)
            nodes[:, step], torque[step] = at + balance.floor, flows.torque
            if step < steps:
                at = _advanced(course, balance, capacities, flows, time[step], time[step + 1], at)
    return History(time / HOUR, nodes[0], nodes[1], nodes[2], torque)


def _capacities(course: Course) -> Array:
    """J/K of the three nodes: a ring each with shaft and housing; elements, cage and grease between them."""
    p = course.points
    bearing = warm_up.bearing_mass.plain(bore=p.bore, outside=p.outside, width=p.width, free_volume=p.free_volume)
    between = np.minimum(p.elements_mass, 0.5 * bearing)
    ring = 0.5 * (bearing - between)
    lubricant = np.where(p.is_grease > 0, np.nan_to_num(p.fill), _OIL_SHARE) * p.free_volume * p.density * 1e-3
    inner = warm_up.steel_capacity.plain(ring + warm_up.shaft_mass.plain(p.bore))
    middle = warm_up.steel_capacity.plain(between) + lubricant * (warm_up.GREASE_HEAT / 1000)
    outer = warm_up.steel_capacity.plain(ring + course.housing_mass)
    return np.stack([inner, middle, outer])


def _slowest(course: Course, balance: Balance, capacities: Array) -> Array:
    """Return the times that bound the course, s: of heat, of channels, of the machine.

    Heat by the sum of all capacities over all that leaves, on top of what it takes to cross the rings.
    """
    inner, lubricant, outer = (start - balance.floor for start in (course.inner, course.lubricant, course.outer))
    flows = balance.flows(inner, lubricant, outer, np.ones(len(balance)), np.zeros(len(balance)))
    leaves = flows.housing + balance.frame + balance.coolant + balance.free_shaft + balance.machine_shaft + balance.oil
    thermal = capacities.sum(axis=0) * (1 / leaves + 2 / balance.ring)
    turning = course.channelling / balance.speed * 60
    moves = (course.fresh > 0) | (course.clearing > 0)
    return np.stack([thermal, np.where(moves, turning, 0.0), course.machine_time * HOUR])


def _steps(first: Array, end: Array, steps: int) -> Array:
    """Return the times of all steps, s, [step, row]: even at first, then in proportion to the time that has passed."""
    growth = np.log1p(end / first) / steps
    times: Array = first * np.expm1(growth * np.arange(steps + 1)[:, None])
    return times


def _flows(course: Course, balance: Balance, time: Array, at: Array) -> Flows:
    """Return what the nodes take up at a time."""
    turned = balance.speed / 60 * time
    left = warm_up.still_to_clear.plain(turned, course.channelling)
    now = dataclasses.replace(balance, held_volume=balance.held_volume + left * course.clearing)
    machine = course.machine_time * HOUR
    warmth = np.where(machine > 0, -np.expm1(-time / np.where(machine > 0, machine, 1.0)), 1.0)
    return now.flows(at[0], at[1], at[2], warmth, left * course.fresh)


def _advanced(
    course: Course, balance: Balance, capacities: Array, flows: Flows, now: Array, then: Array, at: Array
) -> Array:
    """Return the state one step later."""
    step = then - now
    slope = _slopes(course, balance, capacities, flows, now, at)
    first = _solved(slope, step, _rates(flows, capacities))
    ahead = _flows(course, balance, then, at + step * first)
    second = _solved(slope, step, _rates(ahead, capacities) - 2 * first)
    return at + step * (1.5 * first + 0.5 * second)


def _rates(flows: Flows, capacities: Array) -> Array:
    return np.stack([flows.inner, flows.lubricant, flows.outer]) / capacities


def _slopes(
    course: Course, balance: Balance, capacities: Array, flows: Flows, now: Array, at: Array
) -> tuple[Array, Array, Array, Array]:
    """Return how fast each node comes back by itself, 1/s, and the ring's conductance: what the Jacobian is made of."""
    nudged = _flows(course, balance, now, at + np.array([0.0, _NUDGE, 0.0])[:, None])
    inner = -(balance.ring + balance.machine_shaft + balance.free_shaft)
    middle = (nudged.lubricant - flows.lubricant) / _NUDGE
    outer = -(balance.ring + flows.housing + balance.frame + balance.coolant)
    return inner / capacities[0], middle / capacities[1], outer / capacities[2], balance.ring / capacities


def _solved(slope: tuple[Array, Array, Array, Array], step: Array, right: Array) -> Array:
    """Solve (I - gamma step J) k = right, J an arrow: the lubricant touches both rings, and they do not touch."""
    inner, middle, outer, ring = slope
    scale = _GAMMA * step
    a, b, c = 1 - scale * inner, 1 - scale * middle, 1 - scale * outer
    from_inner, between, from_outer = scale * ring[0], scale * ring[1], scale * ring[2]
    diagonal = b - between * (from_inner / a + from_outer / c)
    k = (right[1] + between * (right[0] / a + right[2] / c)) / diagonal
    return np.stack([(right[0] + from_inner * k) / a, k, (right[2] + from_outer * k) / c])
