"""The maintenance plan of one or many positions: what, how much, how often, and when next.

An interval fitted to the rhythm of a route is always rounded down, never up, and what that costs in grease is said. A
due date is only ever moved earlier.
"""

from __future__ import annotations

import dataclasses
import datetime
import math
from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass

from lubecheck.model.amounts import dose, run_words, yearly
from lubecheck.model.plan import calendar_days_of
from lubecheck.model.result import PlanLine, Result
from lubecheck.units import POUND_G

ROUTES = {"weekly": 7, "monthly": 28, "quarterly": 91}  # days; 4 and 13 weeks, so that a round keeps its weekday
NEGLECTED = 2.0  # intervals overdue from which the filling is renewed by purging: estimate of this program
NO_ROOM = "open a way out or clean out"
GRAMS_PER_OUNCE = POUND_G / 16


@dataclass(frozen=True, slots=True, kw_only=True)
class PlanRow:
    """One position of the plan. A field that does not apply is None."""

    position: str
    action: str  # "regrease", "feed continuously", "change the oil", "replace the bearing" and so on
    lubricant: str
    first_fill_g: float | None
    housing_fill_g: float | None
    amount_g: float | None  # what is really given: whole strokes where a stroke was weighed
    amount_oz: float | None
    amount_cm3: float | None
    strokes: int | None
    stroke_g: float | None
    feed_g_per_h: float | None
    interval_h: float | None  # running hours
    interval_days: int | None  # by the calendar, as allowed by the line
    planned_days: int | None  # as planned: fitted to the route, never longer
    last_done: datetime.date | None
    next_due: datetime.date | None
    grease_g_per_year: float | None
    cartridges_per_year: float | None
    rounding_g_per_year: float | None  # what fitting to the route costs
    purge_g: float | None  # where the filling is neglected
    verdict: str
    governing: str
    steps: tuple[str, ...]
    cautions: tuple[str, ...]
    notes: tuple[str, ...]


def schedule(
    results: Sequence[Result], start: datetime.date, route: str | None = None, *, is_staggered: bool = False
) -> tuple[PlanRow, ...]:
    """Return the rows of a plan that begins on a day."""
    rows = tuple(_row(result, start, ROUTES.get(route or ""), route or "") for result in results)
    return _staggered(rows, start, ROUTES.get(route or "", 7)) if is_staggered else rows


def _row(result: Result, start: datetime.date, round_days: int | None, route: str) -> PlanRow:
    plan = result.plan
    notes: list[str] = []
    interval_h, days = plan.interval_h, plan.calendar_days
    action = _action(result)
    if action == "replace the bearing":
        interval_h = next((line.hours for line in result.interval_lines if line.governs), None)
        days = calendar_days_of(interval_h, plan.hours_per_day)
        notes.append("closed bearing: the interval is the life of its grease, counted from when it was fitted")
    if interval_h is None and plan.feed_g_per_h is None:
        action = "settle the verdict"
        notes.append("no interval can be given: see the check of this position")
    planned = days
    cost: float | None = None
    if plan.feed_g_per_h is not None:
        days = planned = None
    elif days is not None and round_days is not None:
        if days >= round_days:
            planned = days // round_days * round_days
            at_own, at_route = yearly(plan, days), yearly(plan, planned)
            cost = None if at_own is None or at_route is None else at_route - at_own
        else:
            notes.append(f"{days} days is shorter than the {route} route: this position needs rounds of its own")
    if planned is not None and planned < 1:
        notes.append("due more often than daily: use an automatic feeder or oil")
    last = None if plan.last_done is None else datetime.date.fromisoformat(plan.last_done)
    due, said = _due(plan, interval_h, days, last, start, round_days)
    if action == NO_ROOM:
        due, said = start, ["to be done before it runs on; the interval counts from the new filling"]
    notes += said
    purge = _purge(result, interval_h, days, last, start)
    if purge is not None:
        notes.append(f"more than {NEGLECTED:g} intervals old: renew it with {purge:.0f} g, in steps, the way out open, "
                     f"{_between(result)}until clean grease comes")  # fmt: skip
    if result.verdict in ("beyond", "unknown"):
        notes.append(f"verdict {result.verdict}: settle {result.governing.replace('_', ' ')} before the plan counts")
    # What stands in the plan after the check's own notes that a fitter needs.
    notes += [note for note in result.notes if note.startswith("after the fact")]
    given = None if math.isnan(dose(plan)) else dose(plan)
    amounts = {} if result.amounts is None else result.amounts.figures
    per_year = yearly(plan, planned)
    yearly_now, cartridges = (amounts[key].value if key in amounts else None
                              for key in ("grease_per_year", "cartridges_per_year"))  # fmt: skip
    scale = None if not yearly_now or per_year is None else per_year / yearly_now
    grams_per_cm3 = _density(result)
    return PlanRow(
        position=result.title or result.bearing,
        action=action,
        lubricant=plan.lubricant,
        first_fill_g=plan.first_fill_g,
        housing_fill_g=plan.housing_fill_g,
        amount_g=given,
        amount_oz=None if given is None else given / GRAMS_PER_OUNCE,
        amount_cm3=plan.oil_change_cm3 if given is None else given / grams_per_cm3,
        strokes=plan.regrease_strokes,
        stroke_g=plan.stroke_g,
        feed_g_per_h=plan.feed_g_per_h,
        interval_h=interval_h,
        interval_days=days,
        planned_days=planned,
        last_done=last,
        next_due=due,
        grease_g_per_year=per_year,
        cartridges_per_year=None if cartridges is None or scale is None else cartridges * scale,
        rounding_g_per_year=cost,
        purge_g=purge,
        verdict=result.verdict,
        governing=result.governing,
        steps=plan.steps,
        cautions=result.cautions,
        notes=tuple(notes),
    )


def _action(result: Result) -> str:
    plan = result.plan
    if result.grease is None:
        return "change the oil"
    if plan.feed_g_per_h is not None:
        return "feed continuously"
    if plan.regrease_g is not None:
        return "regrease"
    is_closed = result.amounts is None or result.amounts.figures["regrease_quantity"].value is None
    return "replace the bearing" if is_closed else NO_ROOM


def _density(result: Result) -> float:
    """Grams a cm^3 of the grease, as the result's own fill has it."""
    grease = result.grease
    figures = {} if grease is None else grease.figures
    fill, share, volume = (figures[key].value if key in figures else None
                           for key in ("first_fill", "fill_share", "free_volume"))  # fmt: skip
    return fill / (share * volume) if fill and share and volume else math.nan


def _due(
    plan: PlanLine,
    interval_h: float | None,
    days: int | None,
    last: datetime.date | None,
    start: datetime.date,
    round_days: int | None,
) -> tuple[datetime.date | None, list[str]]:
    """Return when the position is due next, the earlier of calendar and hour meter, and what is to be said of it.

    A route comes every so many days from the start: due on its last round that the position's own interval reaches.
    """
    if days is None or days < 1 or interval_h is None:
        return None, []
    left: list[int] = []
    if last is not None:
        left.append((last - start).days + days)
    if plan.hours_run is not None:
        left.append(min(days, math.floor((interval_h - plan.hours_run) / plan.hours_per_day)))
    if not left:
        return start, ["not known when it was last done, so due at once: state last_done or hours_run"]
    soonest = min(left)
    if soonest < 0:
        return start, [f"overdue by {-soonest} days"]
    if round_days is not None and days >= round_days:
        soonest = soonest // round_days * round_days  # the round before, never the one after
    return start + datetime.timedelta(days=soonest), []


def _purge(
    result: Result, interval_h: float | None, days: int | None, last: datetime.date | None, start: datetime.date
) -> float | None:
    """Return the purge quantity where the filling is far past its interval."""
    plan, amounts = result.plan, result.amounts
    if plan.regrease_g is None or not interval_h or not days or amounts is None:
        return None
    is_old = (last is not None and (start - last).days > NEGLECTED * days) or (
        plan.hours_run is not None and plan.hours_run > NEGLECTED * interval_h
    )
    return amounts.figures["purge_quantity"].value if is_old else None


def _between(result: Result) -> str:
    """Say how long to run between the steps of a purge."""
    run = None if result.amounts is None else result.amounts.figures["purge_run"]
    if run is None or run.low is None or run.high is None:
        return ""
    return f"running {run_words(run.low, run.high)} between the steps (common practice), "


def _staggered(rows: Sequence[PlanRow], start: datetime.date, slot: int) -> tuple[PlanRow, ...]:
    """Spread the first due dates of positions with one rhythm over it, by moving some earlier."""
    seen: Counter[int] = Counter()
    moved = []
    for row in rows:
        days, due = row.planned_days, row.next_due
        if days is None or due is None or days < 2 * slot:
            moved.append(row)
            continue
        wanted = seen[days] % (days // slot) * slot
        seen[days] += 1
        room = (due - start).days // slot * slot
        shift = min(wanted, room)
        note = (f"first due moved {shift} days earlier to spread the work",) if shift else ()
        moved.append(dataclasses.replace(row, next_due=due - datetime.timedelta(days=shift), notes=(*row.notes, *note)))
    return tuple(moved)
