"""The published lines of lubricant life, each where it applies, side by side; the shortest applicable one governs.

Lines stand for different percentiles: the classical interval is an L01, Booser's equation an L50. Both are brought to
the share of failures that the case accepts through the Weibull slope. A duty cycle and the months of a year add up by
linear damage, row by row; for open bearings the hours at rest count as well.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from lubecheck.method import Method
from lubecheck.model.points import Points
from lubecheck.physics import grease_corrections, grease_curve, grease_life, oil_life
from lubecheck.units import DAY_H, Array

OilRule = Method[..., Array]  # calendar time that an oil serves at a temperature


@dataclass(frozen=True, slots=True)
class Lines:
    """Running hours by each line and what governs, one a position; NaN where a line cannot be read for it."""

    classical: Array  # open grease bearings
    booser: Array  # grease that is never renewed; for open bearings a second opinion
    worksheet: Array  # GfT worksheet 3, from memory: beside the others, never governing
    worksheet_parameter: Array  # k_f n dm of the hardest row, where a reader may enter the curve
    bath: Array  # oil baths, handbooks
    oxidation: Array  # baths and circulating oil
    allowed: Array  # the shortest that applies, with rest and calendar ceiling


def of(points: Points, temperature: Array, load_ratio: Array, power: Array) -> Lines:
    """Return the lines of every position at the temperatures, loads and friction heat worked out for its rows."""
    p = points
    first = p.starts
    is_grease, is_sealed = p.is_grease[first] > 0, p.is_sealed[first] > 0
    is_bath, is_circulating = p.is_bath[first] > 0, p.is_circulating[first] > 0
    hours_per_day, failed = p.hours_per_day[first], p.grease_failed[first]

    classical = damage_sum(p, classical_rows(p, temperature, load_ratio))
    classical *= to_share(grease_life.L01, failed)
    booser = damage_sum(p, booser_rows(p, temperature, load_ratio)) * to_share(grease_life.L50, failed)
    bath = damage_sum(p, _oil_rows(p, temperature, power, grease_life.bath_change_interval))
    oxidation = damage_sum(p, _oil_rows(p, temperature, power, oil_life.oxidation_life))
    worksheet = damage_sum(p, worksheet_rows(p, temperature, load_ratio)) * to_share(grease_curve.FAILED, failed)
    parameter = grease_corrections.worksheet_parameter.plain(p.k_f, p.speed, p.pitch_diameter)

    renewed = grease_corrections.with_rest.plain(running_life=classical, hours_per_day=hours_per_day)
    renewed = np.minimum(renewed, p.ceiling[first])
    oil = np.where(is_bath, np.minimum(bath, oxidation), np.where(is_circulating, oxidation, np.nan))
    return Lines(
        classical=np.where(is_grease & ~is_sealed, classical, np.nan),
        booser=np.where(is_grease, booser, np.nan),
        worksheet=np.where(is_grease, worksheet, np.nan),
        worksheet_parameter=np.where(is_grease, np.maximum.reduceat(parameter, first), np.nan),
        bath=np.where(is_bath, bath, np.nan),
        oxidation=np.where(is_bath | is_circulating, oxidation, np.nan),
        # A closed bearing keeps its grease for life: no ceiling of the calendar.
        allowed=np.where(is_grease, np.where(is_sealed, booser, renewed), oil),
    )


def damage_sum(points: Points, hours: Array) -> Array:
    """Return the time in which the shares of damage of a position's rows add up to one."""
    rate: Array = np.add.reduceat(points.share / hours, points.starts)
    whole: Array = np.add.reduceat(points.share, points.starts)
    return whole / rate


def to_share(known: float, wanted: Array) -> Array:
    """Return the factor from a life at one share failed to the life at the wanted one."""
    factor: Array = grease_life.weibull_scale.plain(known=known, wanted=wanted, slope=grease_life.WEIBULL_SLOPE)
    return factor


def classical_rows(points: Points, temperature: Array, load_ratio: Array) -> Array:
    """Return the classical interval of each row with its factors, an L01; NaN outside its range of speed or load."""
    p = points
    hours = grease_life.classical_interval.plain(p.speed, p.bore, p.interval_family)
    heat = grease_life.temperature_halving.plain(temperature=temperature, reference=p.life_reference, step=p.life_step)
    is_outside = grease_life.classical_share.plain(p.speed, p.bore) > grease_life.CLASSICAL_GREATEST_SHARE
    is_outside |= grease_life.load_factor.outside(load_ratio=load_ratio)
    hours = hours * heat * p.interval_factor * grease_life.load_factor.plain(load_ratio)
    return np.where(is_outside, np.nan, hours)


def booser_rows(points: Points, temperature: Array, load_ratio: Array) -> Array:
    """Return Booser's median life of each row; below the range of the equation its cool end stands, above it is NaN.

    The equation is for lithium soap, whose full interval holds up to 70 degC. A grease that ages earlier is read as
    that much hotter (estimate of this program); one that ages later gains nothing, as Booser's constant for it is not
    surely known.
    """
    p = points
    coolest, hottest = grease_life.booser_median_life.valid["temperature"]
    read_at = temperature + np.maximum(LITHIUM_REFERENCE - p.life_reference, 0.0)
    hours = grease_life.booser_median_life.plain(np.maximum(read_at, coolest), 0.0)
    hours = hours * p.inside_factor * grease_life.load_factor.plain(load_ratio)
    is_outside = ~(read_at <= hottest) | grease_life.load_factor.outside(load_ratio=load_ratio)
    return np.where(is_outside, np.nan, hours)


def worksheet_rows(points: Points, temperature: Array, load_ratio: Array) -> Array:
    """Return the life of each row by the worksheet's curve, an L10; NaN beyond its right end and outside its loads.

    Its factors come from the same plain answers as those of the classical line, and the same rule of temperature, so
    that the lines can be compared; a closed bearing counts the answers that reach its grease.
    """
    p = points
    parameter = grease_corrections.worksheet_parameter.plain(p.k_f, p.speed, p.pitch_diameter)
    hours = grease_curve.worksheet_life.plain(parameter)
    hours = hours * grease_life.temperature_halving.plain(
        temperature=temperature, reference=p.life_reference, step=p.life_step
    )
    hours *= np.where(p.is_sealed > 0, p.inside_factor, p.interval_factor) * grease_life.load_factor.plain(load_ratio)
    _, right = grease_curve.worksheet_life.valid["parameter"]
    is_outside = (parameter > right) | grease_life.load_factor.outside(load_ratio=load_ratio)
    return np.where(is_outside, np.nan, hours)


LITHIUM_REFERENCE = 70.0  # degC, of the grease that Booser's equation stands for without corrections


def _oil_rows(points: Points, temperature: Array, power: Array, rule: OilRule) -> Array:
    """Return the running hours of each row by an oil rule, with what the size of the charge does to them."""
    return charge_in_effect(points, temperature, power, rule) * _calendar(points, temperature, rule)


def charge_in_effect(points: Points, temperature: Array, power: Array, rule: OilRule) -> Array:
    """Return the factor by the size of the oil charge that a rule takes at each row's temperature.

    A large charge ages more slowly where it is hot. No charge serves longer than the rule gives a cool one: the 12
    months of a bath and the 4 years of oxidation are the longest that is published, for contamination and additives
    too, so that the factor fades out towards the cool end.
    """
    coolest = _calendar(points, np.zeros(len(points)), rule)
    found: Array = np.minimum(charge_share(points, power), coolest / _calendar(points, temperature, rule))
    return found


def charge_share(points: Points, power: Array) -> Array:
    """Return what the size of a hot oil charge does to its change interval; 1 where it was not stated."""
    p = points
    sump = oil_life.sump_share.plain(p.oil_volume, power)
    circuit = oil_life.circuit_share.plain(oil_life.dwell_time.plain(p.oil_volume, p.oil_flow))
    share = np.where(p.is_bath > 0, sump, np.where(p.is_circulating > 0, circuit, 1.0))
    return np.where(np.isnan(share), 1.0, share)


def _calendar(points: Points, temperature: Array, rule: OilRule) -> Array:
    """Return the running hours in the calendar time that an oil rule allows at each row's temperature."""
    life = rule.plain(temperature) * points.water_share * points.hours_per_day / DAY_H
    return np.where(rule.outside(temperature=temperature), np.nan, life)
