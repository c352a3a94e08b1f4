"""The coupled solve: the temperatures at which friction, churning and the machine's heat equal what leaves.

Everything that depends on temperature is evaluated together at each step: viscosity, viscous torque, mixed film,
churning, air properties, convection, radiation (`balance`). The one unknown a row is the rise of the outer ring above
the coldest sink. ln(heat in / heat out) over ln(rise) is nearly a straight line, so that secant steps converge in a
few, and a bracket guards every step. A row stops moving when it has converged, so a row's answer does not depend on
the rows beside it.

How many roots: heat out rises at least in proportion to the rise; viscous torque and churning fall with temperature.
Only the mixed film makes heat rise with temperature, by at most 1/e of `most_mixed` times the steepness of viscosity
over ln(rise), and by less where the film is thin already. Where that bound is below the heat that flows, the root is
the only one that is as hot or hotter. The other rows, few of them, are looked over from the root up to the top, and the
hottest root is taken: the cautious one.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data import air
from lubecheck.model.balance import Air, Balance, Heat, balance_of, join
from lubecheck.model.points import Codes, Flags, Points
from lubecheck.physics import friction
from lubecheck.units import Array

__all__ = ["Air", "Equilibrium", "solve"]

TOP_TEMPERATURE = 250.0  # degC: no lubricant of the tables is used hotter; above it the answer is "no equilibrium"
TOLERANCE = 1e-9  # of the friction power, residual of the balance
ROUNDING = 1e-14  # of the heat that flows: what float64 leaves of it
SEARCH_STEPS = 30  # from here on the bracket is halved
MOST_STEPS = 100  # halving needs about 50
NARROWEST = 4 * np.finfo(np.float64).eps  # of a bracket of ln(rise), relative: two or three numbers lie between
LEAST_RISE = 1e-9  # K above the coldest sink: the lower end of the bracket
FIRST_SLOPE = -1.5  # of ln(in/out) over ln(rise): 1.2 from heat out, the rest from viscosity
CHUNK = 8_192  # rows that stay in the cache together
FIRST_STEPS = 4  # steps that all rows take, open or not: picking rows costs as much as an evaluation
MORE_STEPS = 2  # steps between two pickings of what is open, from the sixth on
LOOK_DOWN = 4.0  # of ln(rise), below a root: to a fiftieth of the rise
LOOKS = 48  # places between root and top where a row with a mixed film is looked at


@dataclass(frozen=True, slots=True)
class Equilibrium:
    """The state of every row; NaN temperatures where `is_found` is false."""

    temperature: Array  # degC, of the lubricant and of the bearing as a whole
    inner: Array  # degC, of inner ring and shaft
    outer: Array  # degC, of outer ring and housing
    is_found: Flags  # an equilibrium below TOP_TEMPERATURE exists and the solve converged to it
    is_too_hot: Flags  # there is none below TOP_TEMPERATURE; where neither holds the solve did not end
    is_only: Flags  # false where a thin film lets other temperatures balance as well and the hottest was taken
    residual: Array  # W, heat in less heat out
    steps: int
    equivalent_load: Array  # N
    viscosity: Array  # mm^2/s
    viscous_torque: Array  # N mm
    load_torque: Array  # N mm, of a full film
    mixed_torque: Array  # N mm, what the load torque grows by where the surfaces touch
    seal_torque: Array  # N mm, of rubbing seals
    churning_torque: Array  # N mm
    friction_power: Array  # W, of all torques together
    churning_power: Array  # W, the part of it from churning
    heat_removed: Array  # W
    held_volume: Array  # cm^3 of grease that cannot clear
    paths: Mapping[str, Array]  # W, what leaves by each path; below zero: comes in

    @property
    def friction_torque(self) -> Array:
        """All torques together, N mm."""
        return self.viscous_torque + self.load_torque + self.mixed_torque + self.seal_torque + self.churning_torque

    @property
    def excess(self) -> Array:
        """What the inner ring is warmer than the outer, K."""
        return self.inner - self.outer


def solve(points: Points, air_properties: Air = air.properties) -> Equilibrium:
    """Find the equilibrium of every row."""
    with np.errstate(all="ignore"):
        balance = balance_of(points, air_properties)
        heat, has_root, is_lost, is_only, steps = _roots(balance)
        is_found = has_root & (heat.lubricant <= TOP_TEMPERATURE)
        is_too_hot = is_lost | (has_root & ~is_found)
        # A bearing whose temperature is stated needs no balance: its residual is the heat that holds it there.
        is_held = ~np.isnan(points.held_temperature)
        held = np.flatnonzero(is_held)
        if len(held):
            _put(heat, held, balance.take(held).at(points.held_temperature[held] - balance.floor[held]))
            is_found |= is_held
            is_too_hot &= ~is_held
        lost = np.where(is_found, 1.0, np.nan)
        paths = {name: path * lost for name, path in balance.paths(heat).items()}
    residual = (heat.heat_in - heat.heat_out) * lost
    return Equilibrium(
        temperature=np.where(is_held, points.held_temperature, heat.lubricant * lost),
        inner=heat.inner * lost,
        outer=heat.outer * lost,
        is_found=is_found,
        is_too_hot=is_too_hot,
        is_only=is_only,
        residual=residual,
        steps=steps,
        equivalent_load=balance.equivalent_load,
        viscosity=heat.viscosity * lost,
        viscous_torque=heat.viscous_torque * lost,
        load_torque=balance.load_torque,
        mixed_torque=heat.mixed_torque * lost,
        seal_torque=balance.seal_torque,
        churning_torque=heat.churning_torque * lost,
        friction_power=heat.friction_power * lost,
        churning_power=heat.churning_torque * balance.watt_a_torque * lost,
        heat_removed=sum(paths.values(), np.zeros(len(points))),
        held_volume=balance.held_volume,
        paths=paths,
    )


def _roots(balance: Balance) -> tuple[Heat, Flags, Flags, Flags, int]:
    """Return the balance of every row at its root; if that was found, is too hot, is the only one; and the steps."""
    low, high = np.full(len(balance), np.log(LEAST_RISE)), np.log(TOP_TEMPERATURE - balance.floor)
    heat, is_found, is_lost, steps = _root(balance, low, high)
    is_only = np.ones(len(balance), dtype=bool)
    doubtful = np.flatnonzero(is_found & ~_is_certain(balance, heat))
    for start in range(0, len(doubtful), CHUNK // LOOKS):
        few = doubtful[start : start + CHUNK // LOOKS]
        others, hotter, is_other = _others(balance.take(few), np.log(heat.outer_rise[few]), high[few])
        is_only[few] = ~is_other
        if hotter is not None:
            _put(heat, few[others], hotter)
    return heat, is_found, is_lost, is_only, steps


def _surplus(heat: Heat) -> Array:
    """ln(in/out): above zero the row is too cool, also where heat would have to come out of the floor."""
    # What is not a number stays none: it must not pass for heat that cannot leave.
    return np.where(heat.heat_out <= 0, np.inf, np.log(heat.heat_in / heat.heat_out))


def _put(whole: Heat, rows: Any, part: Heat) -> None:
    """Set some rows of an evaluation from another one."""
    for item in dataclasses.fields(Heat):
        getattr(whole, item.name)[rows] = getattr(part, item.name)


@dataclass(slots=True)
class _Search:
    """Rows on the way to their roots, in ln(rise): the bracket, where to look next, and what was seen last."""

    balance: Balance
    rows: Codes  # of the whole
    low: Array
    high: Array
    top: Array  # the untried upper end
    x: Array
    x_old: Array
    y_old: Array
    slope_old: Array  # dx/dy between the last two points
    y_older: Array

    def part(self, rows: Any) -> _Search:
        """Return some of the rows."""
        taken = {f.name: getattr(self, f.name)[rows] for f in dataclasses.fields(self) if f.name != "balance"}
        return _Search(self.balance.take(rows), **taken)


def _together(parts: Sequence[_Search]) -> _Search:
    """Return the rows of several searches as one."""
    if len(parts) == 1:
        return parts[0]
    columns = {f.name: np.concatenate([getattr(part, f.name) for part in parts])
               for f in dataclasses.fields(_Search) if f.name != "balance"}  # fmt: skip
    return _Search(join([part.balance for part in parts]), **columns)


def _root(balance: Balance, low: Array, high: Array) -> tuple[Heat, Flags, Flags, int]:
    """Return the balance where heat in equals heat out, between two bounds of ln(rise); if it was found; and steps.

    The third is true where more heat comes in than leaves even at the upper bound, so that there is none below. The
    rows go through the first steps chunk by chunk, all of them; what is still open then is set together and goes on.
    """
    whole = Heat(**{f.name: np.empty(len(balance)) for f in dataclasses.fields(Heat)})
    found, lost = np.zeros(len(balance), dtype=bool), np.zeros(len(balance), dtype=bool)
    none = np.full(len(balance), np.nan)
    search = _Search(balance, np.arange(len(balance)), low, high, high, none, none, none, none, none)
    steps = last = 0
    while len(search.x) and steps < MOST_STEPS:
        more = FIRST_STEPS if steps == 0 else 1 if steps == FIRST_STEPS else MORE_STEPS
        open_parts = []
        for start in range(0, len(search.x), CHUNK):
            part = search.part(slice(start, start + CHUNK)) if len(search.x) > CHUNK else search
            is_open, taken = _advance(part, steps, more, whole, found, lost)
            last = max(last, taken)
            if is_open.any():
                open_parts.append(part.part(np.flatnonzero(is_open)))
        steps += more
        if not open_parts:
            break
        search = _together(open_parts)
    return whole, found, lost, last


def _advance(search: _Search, before: int, more: int, whole: Heat, found: Flags, lost: Flags) -> tuple[Flags, int]:
    """Take some steps with every row of a search, note what was found or lost; return which are open, and the steps."""
    s, balance = search, search.balance
    is_open = np.ones(len(s.x), dtype=bool)
    if before == 0:
        guess = np.log(np.maximum(balance.guess(), LEAST_RISE))
        s.x = np.where((guess > s.low) & (guess < s.high), guess, (s.low + 3 * s.high) / 4)
    for step in range(before + 1, before + more + 1):
        heat = balance.at(np.exp(s.x))
        y = _surplus(heat)
        surplus = np.abs(heat.heat_in - heat.heat_out)
        is_done = surplus <= TOLERANCE * heat.friction_power + ROUNDING * heat.heat_in
        if step > FIRST_STEPS:
            # Where great flows pass by a little friction, the balance is closed when no number lies between.
            is_done |= (s.high - s.low <= NARROWEST * np.maximum(np.abs(s.low), np.abs(s.high))) & (
                surplus <= TOLERANCE * heat.heat_in
            )
        is_lost = (s.x == s.top) & (y > 0) & ~is_done  # too cool even at the top: there is no root below
        ended = (is_done | is_lost) & is_open
        found[s.rows[ended & is_done]] = True
        lost[s.rows[ended & is_lost]] = True
        is_open &= ~ended
        if step == before + more or not is_open.any():
            # What ended before stays where it is, so that this evaluation is its own too.
            _put(whole, _side_by_side(s.rows), heat)
        if not is_open.any():
            return is_open, step
        s.low, s.high = np.where(y > 0, s.x, s.low), np.where(y > 0, s.high, s.x)
        if step == 1:
            slope = 1 / balance.slope(heat)
            target = s.x - y * np.where(slope < 0, slope, 1 / FIRST_SLOPE)  # false for NaN too
            s.y_old = y  # the slope at one point is that between two which coincide
        else:
            target, slope = _step(s.x, y, s.x_old, s.y_old, s.slope_old, s.y_older)
        # A step over the untried top goes to the top itself; any other that leaves the bracket halves it.
        middle = np.where((target >= s.high) & (s.high == s.top), s.top, (s.low + s.high) / 2)
        new = np.where((target > s.low) & (target < s.high) & (step < SEARCH_STEPS), target, middle)
        s.x_old, s.y_older, s.y_old, s.slope_old = s.x, s.y_old, y, slope
        s.x = np.where(is_open, new, s.x)
    return is_open, before + more


def _side_by_side(rows: Codes) -> Any:
    """Return rows in rising order as a slice where there is none between them: much faster to set."""
    return slice(rows[0], rows[-1] + 1) if rows[-1] - rows[0] == len(rows) - 1 else rows


def _step(x: Array, y: Array, x_old: Array, y_old: Array, slope_old: Array, y_older: Array) -> tuple[Array, Array]:
    """Return where the curve through the last three points meets zero, or through two, or through one with a slope.

    x as a parabola over y, since y over x is nearly straight; and the slope dx/dy between the last two points, of
    which the next step makes its parabola.
    """
    slope = (x - x_old) / (y - y_old)
    usable = np.where(slope < 0, slope, 1 / FIRST_SLOPE)  # false for NaN too
    secant = x - y * usable
    bend = (usable - slope_old) / (y - y_older)
    bent = secant + bend * y * y_old
    # A bend that moves the step by more than half of its length is none of this curve's.
    return np.where(np.abs(bent - secant) <= 0.5 * np.abs(secant - x), bent, secant), slope


def _is_certain(balance: Balance, heat: Heat) -> Flags:
    """Return where no hotter root can be: the mixed film's heat cannot grow as fast as what leaves.

    Over ln(rise) its torque grows by most_mixed s exp(-s), s = kappa / MIXED_KAPPA, times -d ln(nu) / d ln(rise). The
    first is at most 1/e, and where s is below 1 already it only falls on the way up. The second is
    B ln(Z) Z / (Z - 0.7) rise / T with the constants of ASTM D341: ln(Z) is greatest at the root itself, rise / T at
    the top.
    """
    s = np.minimum(heat.viscosity / (balance.reference_viscosity * friction.MIXED_KAPPA), 1.0)
    growth = balance.most_mixed * s * np.exp(-s)
    z = heat.viscosity + 0.7
    top = (TOP_TEMPERATURE - balance.floor) / (TOP_TEMPERATURE + 273.15)
    steepness = balance.walther_b * np.log(z) * z / heat.viscosity * top
    certain: Flags = balance.watt_a_torque * growth * steepness < heat.heat_out
    return certain


def _others(balance: Balance, root: Array, high: Array) -> tuple[Codes, Heat | None, Flags]:
    """Look round a root, given as ln(rise): rows with a hotter one, the balance there, and rows with any other."""
    up, down = np.linspace(1e-6, 1.0, LOOKS), np.linspace(-LOOK_DOWN, -1e-6, LOOKS)
    places = np.concatenate([root + up[:, None] * (high - root), root + down[:, None]])
    every = balance.take(np.tile(np.arange(len(balance)), len(places)))
    is_short = (_surplus(every.at(np.exp(places.ravel()))) > 0).reshape(places.shape)
    above, below = is_short[: LOOKS - 1], is_short[LOOKS:]
    rows = np.flatnonzero(above.any(axis=0))
    is_other: Flags = np.logical_or(above.any(axis=0), ~below.all(axis=0))
    if not len(rows):
        return rows, None, is_other
    last = LOOKS - 2 - above[::-1, rows].argmax(axis=0)
    heat, _, _, _ = _root(balance.take(rows), places[last, rows], places[last + 1, rows])
    return rows, heat, is_other
