"""The limits: the use of each, demand over what is allowed, 1.0 at the limit.

Each function takes the points, the equilibrium and what was derived from it, and returns a `Use` in rows. NaN means
"could not be judged", infinity "beyond, whatever the number". `reduce` brings rows to positions: the worst row governs,
and a row that could not be judged makes the position unknown unless another row is beyond.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from lubecheck.model.equilibrium import Equilibrium
from lubecheck.model.points import Codes, Flags, Points
from lubecheck.physics import churning, clearance, fatigue, grease_amount, loads, speed
from lubecheck.units import Array

NEAR = 0.85  # of a limit: from here on the state is `near`
STATES = ("within", "near", "unknown", "beyond")  # in rising order of gravity
WITHIN, NEAR_CODE, UNKNOWN, BEYOND = range(4)

COLD_REFERENCE = 20.0  # degC from which a lower temperature limit counts down
ELEMENT_SHARE = 0.3  # rolling element diameter over D - d: estimate, 0.25 to 0.33
FLASH_MARGIN = 50.0  # K that oil stays below its flash point: common practice, 30 to 60
JUST_OVER = float(np.nextafter(1.0, 2.0))  # use of what has just reached a set-point: it has switched
REGREASE_RANGE = (0.4, 2.0)  # of the side rule: from the weekly rule of thumb to twice the usual dose, estimate


@dataclass(frozen=True, slots=True)
class Use:
    """A limit in arrays: what is demanded, what is allowed, and the ratio that judges.

    Where something has to be there (film, safety, a least amount) the demand is what is asked for and the allowance
    what there is, so that the use is the demand over the allowance for every ratio.
    """

    demand: Array
    allowed: Array
    use: Array
    applies: Flags  # the limit exists for the row or position


@dataclass(frozen=True, slots=True)
class Judged:
    """A limit brought to positions."""

    demand: Array
    allowed: Array
    use: Array
    applies: Flags
    row: Codes  # the row that governs
    state: Codes  # position in STATES


def state_of(use: Array) -> Codes:
    """Return the state of each use, from positive evidence only: what is not a number is unknown."""
    # The codes count up: above NEAR one, above the limit two more.
    code = (use > NEAR) + 2 * (use > 1.0)
    return np.where(np.isnan(use), UNKNOWN, code).astype(np.intp, copy=False)


def reduce(points: Points, limit: Use) -> Judged:
    """Bring the rows of each position to one: beyond before unknown before the greatest use."""
    if len(limit.use) == points.cases == len(points):
        rows = np.arange(len(points))
        return Judged(limit.demand, limit.allowed, limit.use, limit.applies, rows, state_of(limit.use))
    # Rank: beyond by its use, then unknown just above 1, then the rest by use.
    rank = np.where(np.isnan(limit.use), 1.0 + 1e-9, limit.use)
    order = np.lexsort((-np.arange(len(rank)), rank, points.case))
    last = np.r_[points.starts[1:], len(points)] - 1
    rows = order[last]
    use = limit.use[rows]
    applies = np.logical_or.reduceat(limit.applies, points.starts)
    return Judged(limit.demand[rows], limit.allowed[rows], use, applies, rows, state_of(use))


def film(points: Points, kappa: Array) -> Use:
    """Viscosity ratio that is asked for over the one that is there."""
    return Use(points.least_kappa, kappa, points.least_kappa / kappa, np.ones(len(points), dtype=bool))


def _rise_over(points: Points, state: Equilibrium, hottest: Array, top: Array) -> Array:
    """Rise over the ambient against the rise that a top temperature leaves.

    Where nothing balances below the top of the search it is beyond, whatever the limit, stated or not; where the solve
    did not end nothing is known.
    """
    allowed = top - points.ambient
    use = np.where(allowed > 0, (hottest - points.ambient) / allowed, np.inf)
    use = np.where(np.isnan(top) | ~state.is_found, np.nan, use)
    return np.where(state.is_too_hot, np.inf, use)


def _or_read(points: Points, computed: Use, read: Array, is_over: Flags) -> Use:
    """Return a limit of temperature as a reading leaves it: one that is over is beyond, whatever is computed.

    A reading is evidence of its own and needs no model; one that is not over says nothing of other states.
    """
    if not is_over.any():
        return computed
    room = computed.allowed - points.ambient
    use = np.where(room > 0, np.fmax((read - points.ambient) / room, JUST_OVER), np.inf)
    return Use(
        np.where(is_over, np.fmax(read, computed.demand), computed.demand), computed.allowed,
        np.where(is_over, np.fmax(use, computed.use), computed.use), computed.applies,
    )  # fmt: skip


def temperature(points: Points, state: Equilibrium) -> Use:
    """Rise over the rise to the lowest top temperature of lubricant, cage, seal, rings and the user."""
    use = _rise_over(points, state, state.temperature, points.highest)
    computed = Use(state.temperature, points.highest, use, np.ones(len(points), dtype=bool))
    return _or_read(points, computed, points.read_highest, points.read_highest > points.highest)


def set_point(points: Points, state: Equilibrium) -> Use:
    """Rise of the outer ring, where the sensor is, over the rise to the lower of the alarm and the trip set-point."""
    use = _rise_over(points, state, state.outer, points.set_point)
    computed = Use(state.outer, points.set_point, use, ~np.isnan(points.set_point))
    return _or_read(points, computed, points.read_outer, points.read_outer >= points.set_point)


def cold_start(points: Points) -> Use:
    """Depth below 20 degC over the depth that the lubricant may be used at.

    A start is never warmer than the air that the position stands in.
    """
    coldest = np.minimum(points.coldest, points.ambient)
    depth = COLD_REFERENCE - coldest
    allowed = COLD_REFERENCE - points.lowest
    use = np.where(allowed > 0, np.maximum(0.0, depth) / allowed, np.where(depth <= allowed, 0.0, np.inf))
    use = np.where(np.isnan(depth) | np.isnan(allowed), np.nan, use)
    return Use(coldest, points.lowest, use, np.ones(len(points), dtype=bool))


def fill(points: Points) -> Use:
    """Grease in the bearing against the band that the speed allows; the worse side counts.

    Grease that finds room in the housing, or an open relief, may be more: it clears by itself.
    """
    p = points
    lower, upper = grease_amount.allowed_fill.plain(
        speed=p.speed, speed_limit=p.speed_limit, pitch_diameter=p.pitch_diameter
    )
    room = np.where(p.is_open > 0, 1.0, (1.0 - p.housing_fill) * p.void / p.free_volume)
    upper = np.minimum(1.0, np.maximum(upper, churning.CLEAR_SHARE + room))
    applies = (p.is_grease > 0) & ~((p.is_sealed > 0) & (p.is_proposed_fill > 0))
    return _two_sided(p.fill, lower, upper, applies)


def oil_level(points: Points) -> Use:
    """Oil level at rest, from the centre of the lowest rolling element, against half an element up or down."""
    allowed = ELEMENT_SHARE * (points.outside - points.bore) / 2
    return Use(points.level, np.copysign(allowed, points.level), np.abs(points.level) / allowed, points.is_bath > 0)


def room_for_grease(points: Points) -> Array:
    """Mass of grease in g that bearing and housing can still take before it is held and churned; endless when open."""
    p = points
    bearing = (churning.CLEAR_SHARE - np.minimum(np.nan_to_num(p.fill), 1.0)) * p.free_volume
    room = np.maximum(0.0, bearing + (1.0 - p.housing_fill) * p.void) * p.density / 1000
    return np.where(p.is_open > 0, np.inf, room)


def regrease(points: Points) -> Use:
    """Grease given at each regreasing against a band round the side rule, never more than there is room for.

    Where the fill itself is beyond, the next dose is no question yet: the fill governs and the plan gives none.
    """
    p = points
    dose = grease_amount.regrease_quantity_by_rule.plain(outside=p.outside, width=p.width, rule=p.regrease_rule)
    low, high = REGREASE_RANGE
    upper = np.minimum(high * dose, room_for_grease(p))
    applies = (p.is_grease > 0) & ~np.isnan(p.regrease_mass) & (p.is_sealed == 0) & ~(fill(p).use > 1.0)
    return _two_sided(p.regrease_mass, low * dose, upper, applies)


def _two_sided(amount: Array, lower: Array, upper: Array, applies: Flags) -> Use:
    """Judge an amount that can be too much or too little: the amount over the upper bound, or the lower one over it."""
    too_much, too_little = amount / upper, lower / amount
    is_much = too_much >= too_little
    return Use(
        np.where(is_much, amount, lower), np.where(is_much, upper, amount), np.maximum(too_much, too_little), applies
    )


def rotational_speed(points: Points) -> Use:
    """Speed over what the family takes with this lubricant (n dm), or cage and seals where that is less.

    The thermally safe speed of DIN 732 is told beside it and not judged here: it is the same heat that `temperature`
    judges with the heat paths that the position really has, and not with those that the standard takes for granted.
    """
    allowed = np.minimum(points.speed_limit, points.kinematic_limit)
    return Use(points.speed, allowed, points.speed / allowed, np.ones(len(points), dtype=bool))


_ELEMENT_OF_KIND = np.array([tuple(speed.ELEMENTS).index(kind.split()[1]) for kind in fatigue.KINDS])


def acceleration(points: Points) -> Use:
    """Angular acceleration over the one up to which the rolling elements follow without sliding."""
    allowed = speed.greatest_acceleration.plain(
        load=np.hypot(points.radial_load, points.axial_load), elements_mass=points.elements_mass,
        pitch_diameter=points.pitch_diameter, traction=speed.TRACTION, element=_ELEMENT_OF_KIND[points.kind],
    )  # fmt: skip
    return Use(points.acceleration, allowed, points.acceleration / allowed, np.ones(len(points), dtype=bool))


def internal_clearance(points: Points, state: Equilibrium) -> Use:
    """Clearance that fits and a warm inner ring take over what the class has on the average."""
    p = points
    warmth = clearance.thermal_loss.plain(state.excess, bore=p.bore, outside=p.outside)
    lost = p.fit_loss + warmth
    return Use(lost, p.clearance, np.maximum(lost, 0.0) / p.clearance, ~np.isnan(p.fit_loss))


def flash_point(points: Points, state: Equilibrium) -> Use:
    """Rise of the hottest ring over the rise that stays clear of the oil's flash point by a margin."""
    p = points
    hottest = np.maximum(state.temperature, np.maximum(state.inner, state.outer))
    top = p.flash_point - FLASH_MARGIN
    computed = Use(hottest, top, _rise_over(p, state, hottest, top), (p.is_grease == 0) & ~np.isnan(top))
    return _or_read(p, computed, p.read_highest, p.read_highest > top)


def ring_temperature(points: Points, state: Equilibrium) -> Use:
    """Rise of the hotter ring over the rise to the temperature that the rings are stabilised to."""
    p = points
    hottest = np.maximum(state.inner, state.outer)
    use = _rise_over(p, state, hottest, p.stabilised_to)
    computed = Use(hottest, p.stabilised_to, use, np.ones(len(p), dtype=bool))
    return _or_read(p, computed, p.read_highest, p.read_highest > p.stabilised_to)


def minimum_load(points: Points, state: Equilibrium) -> Use:
    """Least load that makes the elements roll over the load that is there; unknown where a load is not counted."""
    least = points.minimum_load_share * points.dynamic_rating
    use = np.where(takes_loads(points), least / state.equivalent_load, np.nan)
    return Use(least, state.equivalent_load, use, np.ones(len(points), dtype=bool))


def takes_loads(points: Points) -> Flags:
    """Return where the load rule of the family counts every load that there is."""
    p = points
    axial_counts = loads.TAKES_AXIAL[p.rule] | (p.axial_load == 0)
    flags: Flags = axial_counts & (loads.TAKES_RADIAL[p.rule] | (p.radial_load == 0)) & ~parts_rows(p)
    return flags


def parts_rows(points: Points) -> Flags:
    """Return where the radial load on a thrust spherical roller bearing is so great that its washers part."""
    p = points
    share = loads.GREATEST_THRUST_SPHERICAL_RADIAL
    flags: Flags = (p.rule == loads.RULES.index("thrust spherical")) & (p.radial_load > share * np.abs(p.axial_load))
    return flags


def static_load(points: Points) -> Use:
    """Static safety that is asked for over the one that is there; unknown where a load is not counted."""
    load = loads.static_equivalent_load.plain(
        radial_load=points.radial_load, axial_load=points.axial_load, contact_angle=points.contact_angle,
        rule=points.rule,
    )  # fmt: skip
    safety = points.static_rating / load
    use = np.where(takes_loads(points), points.static_safety / safety, np.nan)
    return Use(points.static_safety, safety, use, np.ones(len(points), dtype=bool))


def of_positions(points: Points, demand: Array, allowed: Array, applies: Flags) -> Judged:
    """Return a limit that exists once a position: demand over allowed."""
    with np.errstate(all="ignore"):
        use = demand / allowed
    return Judged(demand, allowed, use, applies, points.starts, state_of(use))
