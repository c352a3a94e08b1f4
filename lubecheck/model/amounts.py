"""Every amount that a plan may ask for: first fill of bearing and housing, dose, purge, feed, a year's grease, oil."""

from __future__ import annotations

import math

import numpy as np

from lubecheck.model import limits
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount
from lubecheck.model.kernel import Outcome
from lubecheck.model.result import Amounts, PlanLine
from lubecheck.model.rows import REGREASE_RULES, volume_of
from lubecheck.physics import grease_amount
from lubecheck.units import DAY_H, YEAR_H

CONTINUOUS_BELOW_DAYS = 7.0  # running days under which a gun is no answer: common practice, a week
CARTRIDGE_G = 400.0  # what an ordinary cartridge holds: common practice, 380 to 420 g (14 oz)

Triple = tuple[float, float, float]
_NONE: tuple[None, None, None] = (None, None, None)


def feed(case: Case) -> Triple:
    """Return the rate of continuous feeding in g/h: low, nominal, high."""
    bearing = case.bearing
    low, nominal, high = grease_amount.continuous_feed.plain(outside=bearing.outside, width=bearing.width)
    return float(low), float(nominal), float(high)


def lies(case: Case) -> int:
    """Return how the shaft lies, as the position in HOUSING_FILL; level where it is not said."""
    return tuple(grease_amount.HOUSING_FILL).index(case.surroundings.orientation or "horizontal")


def housing_fill(case: Case, outcome: Outcome) -> Triple | tuple[None, None, None]:
    """Return the first fill of the space beside the bearing in g: low, nominal or planned, high."""
    if not case.is_grease or outcome.points.is_sealed[0]:
        return _NONE
    full = float(outcome.points.void[0]) * float(outcome.points.density[0]) / 1000
    low, nominal, high = (
        float(share)
        for share in grease_amount.housing_fill.plain(
            max(duty.speed for duty in case.duty), outcome.points.pitch_diameter[0], lies(case)
        )
    )
    # A fill that is beyond is not repeated on the plan, neither in the bearing nor beside it.
    planned = case.grease.housing_fill if first_fill_use(case, outcome) <= 1 else None
    nominal = nominal if planned is None else planned
    return min(low, nominal) * full, nominal * full, max(high, nominal) * full


def stated_fill(case: Case, outcome: Outcome) -> float:
    """Return the fill that a case states, as a share of the free volume, without what was given on top; else NaN."""
    stated, points = case.grease.fill, outcome.points
    if not isinstance(stated, Amount):
        return math.nan
    volume = float(points.free_volume[0])
    return volume_of(stated, volume, float(points.density[0]) / 1000) / volume


def first_fill_use(case: Case, outcome: Outcome) -> float:
    """Return the use of the fill limit at the fill a position begins with: what was given later is no plan."""
    if case.grease.given is None or isinstance(case.grease.fill, str):
        return float(outcome.judged["fill"].use[0])
    points = outcome.points.take(slice(0, int(np.count_nonzero(outcome.points.case == 0))))
    begun, beside = stated_fill(case, outcome), case.grease.housing_fill
    begun = float(points.proposed_fill[0]) if math.isnan(begun) else begun
    beside = tuple(grease_amount.HOUSING_FILL.values())[lies(case)][1] if beside is None else beside
    first = points.changed(fill=begun, housing_fill=beside)
    return float(limits.reduce(first, limits.fill(first)).use[0])


def purge_run(case: Case) -> Triple:
    """Return the hours to run with the way out open, at the slowest duty point: low, nominal, high."""
    slowest = min(duty.speed for duty in case.duty)
    low, nominal, high = grease_amount.purge_run.plain(np.asarray(slowest))
    return float(low), float(nominal), float(high)


def run_words(low_h: float, high_h: float) -> str:
    """Return a span of time as a fitter reads it, in steps of five minutes or half an hour.

    >>> run_words(10 / 60, 0.5), run_words(17 / 60, 50 / 60), run_words(0.83, 2.5), run_words(8.0, 8.0)
    ('10 to 30 min', '15 to 50 min', '1 to 2.5 h', 'a shift of 8 h')
    """
    if low_h == high_h:
        return f"a shift of {high_h:g} h"
    per_h, unit, step = (60, "min", 5.0) if high_h <= 2 else (1, "h", 0.5)
    low, high = (max(step, round(time * per_h / step) * step) for time in (low_h, high_h))
    return f"{low:g} to {high:g} {unit}"


def amounts(case: Case, outcome: Outcome, plan: PlanLine) -> Amounts:
    """Return the amounts of the first position of an outcome, beside its plan line."""
    points = outcome.points
    none: dict[str, float | tuple[float, float, float] | None] = dict.fromkeys(Amounts.declared())
    if not case.is_grease:
        if points.is_bath[0]:
            none["oil_level_from_outside"] = float(points.outside[0] - points.pitch_diameter[0]) / 2
        none["oil_change_quantity"] = case.oil.volume
        made: Amounts = Amounts.of(none)
        return made
    sizes = {"outside": float(points.outside[0]), "width": float(points.width[0])}
    speeds = {
        "speed": points.speed[0],
        "speed_limit": points.speed_limit[0],
        "pitch_diameter": points.pitch_diameter[0],
    }
    full = float(points.free_volume[0]) * float(points.density[0]) / 1000
    sealing = grease_amount.SEALINGS.index("closed" if points.is_sealed[0] else "open")
    low, nominal, high = (float(share) * full for share in grease_amount.first_fill.plain(**speeds, sealing=sealing))
    least, most = (float(share) * full for share in grease_amount.allowed_fill.plain(**speeds))
    is_open = not points.is_sealed[0]
    rule = REGREASE_RULES.index(case.grease.rule or "side")
    year = yearly(plan)
    housing = housing_fill(case, outcome)
    found: dict[str, float | tuple[float, float, float] | None] = {
        "bearing_fill": (nominal, low, high),
        "allowed_least": least,
        "allowed_most": most,
    }
    if is_open:
        found |= {
            "regrease_quantity": float(grease_amount.regrease_quantity_by_rule.plain(**sizes, rule=rule)),
            "purge_quantity": float(grease_amount.purge_quantity.plain(**sizes)),
            "purge_run": (purge_run(case)[1], purge_run(case)[0], purge_run(case)[2]),
            "continuous_feed": (feed(case)[1], feed(case)[0], feed(case)[2]),
            "grease_per_year": year,
            "cartridges_per_year": None if year is None else year / cartridge(case),
        }
        if housing[1] is not None:
            found["housing_fill"] = (housing[1], housing[0], housing[2])
    whole: Amounts = Amounts.of(none | found)
    return whole


def yearly(plan: PlanLine, calendar_days: int | None = None) -> float | None:
    """Return the grease that a plan line gives in a year, in g; at another interval where one is given."""
    if plan.feed_g_per_h is not None:
        return plan.feed_g_per_h * plan.hours_per_day / DAY_H * YEAR_H
    days = plan.calendar_days if calendar_days is None else calendar_days
    if plan.regrease_g is None or not days:
        return None
    return dose(plan) * YEAR_H / DAY_H / days


def dose(plan: PlanLine) -> float:
    """Return what is really given at once: whole strokes where a stroke was weighed."""
    if plan.regrease_strokes is not None and plan.stroke_g is not None:
        return plan.regrease_strokes * plan.stroke_g
    return plan.regrease_g if plan.regrease_g is not None else math.nan


def cartridge(case: Case) -> float:
    """Return what a cartridge holds, in g."""
    given = case.grease.cartridge
    if given is None:
        return CARTRIDGE_G
    per_cm3 = case.lubricant.density_15 / 1000
    return volume_of(given, 1.0, per_cm3) * per_cm3
