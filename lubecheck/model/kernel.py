"""The kernel: points in, outcome out, one vectorised pass for a single check and for a million positions alike."""

from __future__ import annotations

import dataclasses
from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model import intervals, limits
from lubecheck.model.equilibrium import TOP_TEMPERATURE, Air, Equilibrium, solve
from lubecheck.model.limits import Judged
from lubecheck.model.points import BEYOND_SETTINGS, Codes, Flags, Points
from lubecheck.physics import cleanliness, fatigue, film, grease_amount
from lubecheck.units import Array

PROPOSED_SHARE = 0.8  # of the allowed interval that is proposed: leaves a fifth for what varies, so that it is `within`
# Limits that the bearing's temperature moves: a measured one that nothing explains leaves them unknown.
MOVED_BY_HEAT = ("film", "temperature", "set_point", "rings", "flash_point", "clearance", "interval", "fatigue_life")
DECIDED_BY_HEAT = ("temperature", "set_point", "rings", "flash_point")
MAY_FAIL_BY_HEAT = ("film", "interval")  # or by the oil, the load or the dirt
HEAT_LIMITS = (*DECIDED_BY_HEAT, *MAY_FAIL_BY_HEAT)


@dataclass(frozen=True, slots=True)
class Outcome:
    """All that the kernel works out: arrays in rows, and arrays in positions."""

    points: Points
    state: Equilibrium
    # rows
    reference_viscosity: Array
    kappa: Array
    contamination: Array
    life_factor: Array
    load_ratio: Array
    row_life: Array  # modified life, were the row all there is
    # positions
    hottest: Codes  # row of the operating point
    rating_life: Array
    modified_life: Array
    lines: intervals.Lines
    allowed_interval: Array  # running hours, before any plan
    interval: Array  # planned, or proposed
    proposed_interval: Array
    proposed_regrease: Array  # g, by the rule of the case
    reliability_factor: Array  # a1
    judged: Mapping[str, Judged]
    verdict: Codes  # position in limits.STATES
    governing: Codes  # position in the order of `judged`

    @property
    def names(self) -> tuple[str, ...]:
        """The limits, in the order they are shown."""
        return tuple(self.judged)


def judge(points: Points, air_properties: Air = air.properties) -> Outcome:
    """Solve the equilibrium of every row and judge every limit of every position."""
    p = points
    state = solve(p, air_properties)
    with np.errstate(all="ignore"):
        nu_1 = film.reference_viscosity.plain(p.speed, p.pitch_diameter)
        kappa = film.viscosity_ratio.plain(nu=state.viscosity, nu_1=nu_1)
        e_c, factor = _life_factor(p, state, kappa)
        # What has no equilibrium counts as hot as the hottest that has one.
        hot = fatigue.hot_rating_factor.plain(np.where(state.is_found, state.temperature, TOP_TEMPERATURE))
        load_ratio = state.equivalent_load / (p.dynamic_rating * hot)
        row_rating, row_life = _lives(p, state, load_ratio, factor)
        rating, modified = intervals.damage_sum(p, row_rating), intervals.damage_sum(p, row_life)
        counted = np.where(limits.takes_loads(p), load_ratio, np.nan)
        lines = intervals.of(p, state.temperature, counted, state.friction_power)
        allowed = lines.allowed
        planned = p.interval[p.starts]
        is_grease = p.is_grease[p.starts] > 0
        is_sealed = is_grease & (p.is_sealed[p.starts] > 0)
        # A sealed bearing's grease has to last as long as the bearing; a plan to regrease it is beyond by itself.
        proposed = _proposed(p, allowed)
        wanted = np.where(is_sealed, p.life_target[p.starts], proposed)
        interval = np.where(np.isnan(planned), wanted, planned)
        allowed_plan = np.where(is_sealed & ~np.isnan(planned), 0.0, allowed)
        is_oil_kept = (p.is_bath[p.starts] > 0) | (p.is_circulating[p.starts] > 0)
        has_interval = is_grease | is_oil_kept | ~np.isnan(planned)
        everywhere = np.ones(p.cases, dtype=bool)
        judged = {
            "film": limits.reduce(p, limits.film(p, kappa)),
            "temperature": limits.reduce(p, limits.temperature(p, state)),
            "rings": limits.reduce(p, limits.ring_temperature(p, state)),
            "set_point": limits.reduce(p, limits.set_point(p, state)),
            "flash_point": limits.reduce(p, limits.flash_point(p, state)),
            "clearance": limits.reduce(p, limits.internal_clearance(p, state)),
            "cold_start": limits.reduce(p, limits.cold_start(p)),
            "fill": limits.reduce(p, limits.fill(p)),
            "oil_level": limits.reduce(p, limits.oil_level(p)),
            "interval": limits.of_positions(p, interval, allowed_plan, has_interval),
            "regrease_amount": limits.reduce(p, limits.regrease(p)),
            "speed": limits.reduce(p, limits.rotational_speed(p)),
            "acceleration": limits.reduce(p, limits.acceleration(p)),
            "minimum_load": limits.reduce(p, limits.minimum_load(p, state)),
            "static_load": limits.reduce(p, limits.static_load(p)),
            "fatigue_life": limits.of_positions(p, p.life_target[p.starts], modified, everywhere),
        }
    is_doubted = np.logical_or.reduceat(p.is_doubted > 0, p.starts)
    if is_doubted.any():
        judged |= {name: _doubted(judged[name], is_doubted) for name in MOVED_BY_HEAT}
        modified, proposed = (np.where(is_doubted, np.nan, hours) for hours in (modified, proposed))
    verdict, governing = _verdict(judged)
    return Outcome(
        points=p,
        state=state,
        reference_viscosity=nu_1,
        kappa=kappa,
        contamination=e_c,
        life_factor=factor,
        load_ratio=load_ratio,
        hottest=_hottest(p, state),
        rating_life=rating,
        row_life=row_life,
        modified_life=modified,
        lines=lines,
        allowed_interval=allowed,
        interval=interval,
        proposed_interval=proposed,
        proposed_regrease=grease_amount.regrease_quantity_by_rule.plain(
            outside=p.outside[p.starts], width=p.width[p.starts], rule=p.regrease_rule[p.starts]
        ),
        reliability_factor=fatigue.reliability_factor.plain(p.reliability[p.starts]),
        judged=judged,
        verdict=verdict,
        governing=governing,
    )


def _doubted(limit: Judged, is_doubted: Flags) -> Judged:
    """Return a limit with what is doubted unknown; what is beyond stays beyond."""
    is_hidden = is_doubted & ~(limit.use > 1.0)
    use, allowed = (np.where(is_hidden, np.nan, array) for array in (limit.use, limit.allowed))
    return dataclasses.replace(limit, use=use, allowed=allowed, state=limits.state_of(use))


def _life_factor(points: Points, state: Equilibrium, kappa: Array) -> tuple[Array, Array]:
    """Return e_C and a_ISO of every row, NaN outside the range of the standard."""
    p = points
    e_c = fatigue.contamination_factor.plain(kappa, p.pitch_diameter, p.setting)
    with_additive = fatigue.effective_viscosity_ratio.plain(kappa, e_c, p.additive)
    factors = [
        fatigue.life_modification_factor.plain(
            ratio, e_c, fatigue_load_limit=p.fatigue_limit, load=state.equivalent_load, kind=p.kind
        )
        for ratio in (kappa, with_additive)
    ]
    factor = fatigue.factor_with_additive.plain(without=factors[0], with_additive=factors[1])
    factor = np.where(p.additive > 0, factor, factors[0])
    is_valid = ~fatigue.contamination_factor.outside(viscosity_ratio=kappa) & (p.setting != BEYOND_SETTINGS)
    return np.where(is_valid, e_c, np.nan), np.where(is_valid, factor, np.nan)


def _lives(points: Points, state: Equilibrium, load_ratio: Array, factor: Array) -> tuple[Array, Array]:
    """Return the basic and the modified rating life of every row; NaN where ISO 281 does not cover it.

    Rings that run hotter than they are stabilised for, and oil wetter than was ever tested, are not covered either.
    """
    p = points
    revolutions = fatigue.rating_life.plain(dynamic_rating=1.0, load=load_ratio, exponent=p.exponent)
    hours = fatigue.life_hours.plain(revolutions, p.speed)
    a1 = fatigue.reliability_factor.plain(p.reliability)
    modified = fatigue.modified_life.plain(basic_life=hours, reliability_factor=a1, life_modification_factor=factor)
    modified = modified * cleanliness.water_factor.plain(p.water)
    is_valid = (load_ratio <= fatigue.GREATEST_LOAD_RATIO) & limits.takes_loads(p)
    is_valid &= (state.temperature <= p.stabilised_to) & ~cleanliness.water_factor.outside(content=p.water)
    return hours, np.where(is_valid, modified, np.nan)


def _proposed(points: Points, allowed: Array) -> Array:
    """Return a fifth less than the allowed interval, in whole weeks of the calendar where it is as long as one."""
    week = 7 * points.hours_per_day[points.starts]
    hours = np.minimum(PROPOSED_SHARE * allowed, points.rhythm[points.starts])
    return np.where(hours >= week, np.floor(hours / week) * week, hours)


def _hottest(points: Points, state: Equilibrium) -> Codes:
    """Return the row of every position that runs hottest; one without an equilibrium counts as hottest of all."""
    if points.cases == len(points):
        return np.arange(len(points))
    heat = np.where(state.is_found, state.temperature, np.inf)
    order = np.lexsort((-np.arange(len(heat)), heat, points.case))
    hottest: Codes = order[np.r_[points.starts[1:], len(points)] - 1]
    return hottest


def _verdict(judged: Mapping[str, Judged]) -> tuple[Codes, Codes]:
    """Return the worst state of every position and the limit that governs it.

    The governing limit is the one with the greatest use; where the verdict is `unknown`, the first that could not be
    judged.
    """
    some = next(iter(judged.values())).use
    verdict = np.full(some.shape, limits.WITHIN, dtype=np.intp)
    greatest, first_unknown = np.zeros_like(verdict), np.full_like(verdict, -1)
    most = np.full(some.shape, -1.0)
    for place, limit in enumerate(judged.values()):
        state = np.where(limit.applies, limit.state, limits.WITHIN)
        verdict = np.maximum(verdict, state)
        is_greater = limit.applies & (limit.use > most)  # false for NaN
        most = np.where(is_greater, limit.use, most)
        greatest = np.where(is_greater, place, greatest)
        first_unknown = np.where((state == limits.UNKNOWN) & (first_unknown < 0), place, first_unknown)
    return verdict, np.where(verdict == limits.UNKNOWN, first_unknown, greatest)
