"""The plan: grams, strokes, hours and weeks of the line that goes on the maintenance plan."""

from __future__ import annotations

import math

from lubecheck.model import calibration_words
from lubecheck.model.amounts import (
    CONTINUOUS_BELOW_DAYS,
    feed,
    first_fill_use,
    housing_fill,
    purge_run,
    run_words,
    stated_fill,
)
from lubecheck.model.entries import Case
from lubecheck.model.kernel import Outcome
from lubecheck.model.limits import room_for_grease
from lubecheck.model.plan_entries import STREAMS
from lubecheck.model.result import PlanLine
from lubecheck.model.rows import volume_of
from lubecheck.units import YEAR_H


def strokes_of(grams: float | None, grams_per_stroke: float | None) -> int | None:
    """Return whole strokes of the gun that give no more than the grams; none where one stroke is too much.

    >>> strokes_of(12.5, 1.2), strokes_of(1.0, 3.0)
    (10, 0)
    """
    if grams is None or grams_per_stroke is None:
        return None
    # A hair is added before rounding down, so that 12 g at 1.2 g a stroke are 10 strokes and not 9.
    return math.floor(grams / grams_per_stroke + 1e-9)


def weeks_of(hours: float | None, hours_per_day: float) -> float | None:
    """Return running hours as calendar weeks, rounded down to a tenth.

    >>> weeks_of(2000.0, 16.0)
    17.8
    """
    return None if hours is None else math.floor(hours / (7 * hours_per_day) * 10 + 1e-9) / 10


def calendar_days_of(hours: float | None, hours_per_day: float, shutdown: float = 0.0) -> int | None:
    """Return running hours as whole calendar days, rounded down.

    A standstill of the plant (hours in a year) lengthens it only once for each whole year of running that the interval
    spans: so many standstills lie in it wherever it begins.

    >>> calendar_days_of(2000.0, 16.0), calendar_days_of(12000.0, 24.0, 504.0)
    (125, 521)
    """
    if hours is None:
        return None
    running_days = hours / hours_per_day
    whole_years = math.floor(running_days * 24 / (YEAR_H - shutdown) + 1e-9)
    return math.floor(running_days + whole_years * shutdown / 24 + 1e-9)


def plan_line(case: Case, outcome: Outcome) -> PlanLine:
    """Return the plan line of the first position of an outcome.

    What the user planned stands on it where it is not beyond its limit; else the proposal does, and says so.
    """
    points = outcome.points
    hours_per_day = float(points.hours_per_day[0])
    proposed = []

    def chosen(limit: str, planned: float, proposal: float, use: float) -> float | None:
        if math.isnan(planned) or use > 1:
            proposed.append(limit)
            return _finite(proposal)
        return _finite(planned)

    fill = regrease = stroke = interval = None
    if case.is_grease:
        density = float(points.density[0]) / 1000
        grams = points.free_volume[0] * density
        first = first_fill_use(case, outcome)
        fill = chosen("fill", stated_fill(case, outcome) * grams, points.proposed_fill[0] * grams, first)
        dose_use = outcome.judged["regrease_amount"].use[0]
        regrease = chosen("regrease_amount", points.regrease_mass[0], outcome.proposed_regrease[0], dose_use)
        if regrease is not None and room_for_grease(points)[0] < regrease:
            regrease = None  # no dose is right until there is a way out
        if case.grease.stroke is not None:
            stroke = volume_of(case.grease.stroke, 1.0, density) * density
    if outcome.judged["interval"].applies[0]:
        allowed_use = outcome.judged["interval"].use[0]
        interval = chosen("interval", points.interval[0], outcome.proposed_interval[0], allowed_use)
    feeding = None
    if regrease is not None and interval is not None and interval < CONTINUOUS_BELOW_DAYS * hours_per_day:
        feeding = feed(case)[1]
    kept = case.grease if case.is_grease else case.oil
    # An interval that the user plans by the calendar has the standstills in it already.
    is_by_calendar = kept.interval is not None and kept.interval.is_calendar and "interval" not in proposed
    shutdown = 0.0 if is_by_calendar else kept.shutdown or 0.0
    if case.is_grease and points.is_sealed[0]:
        fill = regrease = interval = stroke = feeding = None  # it comes filled and stays so
        proposed = []
    return PlanLine(
        lubricant=case.lubricant.name,
        first_fill_g=fill,
        first_fill_strokes=strokes_of(fill, stroke),
        regrease_g=regrease,
        regrease_strokes=strokes_of(regrease, stroke),
        stroke_g=stroke,
        interval_h=interval,
        interval_weeks=weeks_of(interval, hours_per_day),
        hours_per_day=hours_per_day,
        is_proposed=tuple(proposed),
        steps=_stopped(case, outcome)
        + _steps(case, is_sealed=bool(points.is_sealed[0]), feeding=feeding, has_room=regrease is not None),
        is_as_supplied=case.is_grease and bool(points.is_sealed[0]),
        housing_fill_g=housing_fill(case, outcome)[1],
        feed_g_per_h=feeding,
        oil_change_cm3=None if case.is_grease else case.oil.volume,
        calendar_days=calendar_days_of(interval, hours_per_day, shutdown),
        last_done=kept.last_done,
        hours_run=kept.hours_run,
    )


def _stopped(case: Case, outcome: Outcome) -> tuple[str, ...]:
    """A temperature that was read over a limit comes before everything that a plan asks for."""
    said = calibration_words.stop(case, outcome)
    return (f"{said[0].upper()}{said[1:]}",) if said else ()


def _steps(case: Case, *, is_sealed: bool, feeding: float | None, has_room: bool) -> tuple[str, ...]:
    """Return what to do, in order."""
    if not case.is_grease and case.oil.supply in STREAMS:
        return _circuit_steps(case)
    if not case.is_grease and case.oil.supply == "mist":
        return (
            "Isolate and lock out the machine; shut off the air to the mist generator",
            "Drain and wipe out its reservoir, refill with the same oil, clean strainer and nozzles",
            "Start the mist before the machine; check the pressure and the mist at every bearing's vent",
        )
    if not case.is_grease:
        return (
            "Isolate and lock out the machine; let the oil cool to hand warm",
            "Drain, wipe out the sump, refill with the same oil to the middle of the lowest rolling element at rest",
        )
    if is_sealed:
        return ("Do not regrease: the bearing is closed on both sides; replace it at the end of its grease life",)
    if not has_room:
        return (
            "Do not regrease: nothing can leave. Open a way out and run it clear, or clean bearing and housing out; "
            "then fill anew with the first fill of this line",
        )
    if feeding is not None:
        return (
            f"An interval under {CONTINUOUS_BELOW_DAYS:g} days is no plan for a gun: set an automatic feeder to "
            f"{feeding:.2g} g/h ({feeding * 24:.2g} g in each 24 running hours), or change over to oil",
            "Keep the way out open, wipe off what comes out, and check the feeder's level on every route",
        )
    relief = {
        "open": "Open the relief plug and clear it of hard grease",
        "closed": "There is no open relief: give no more than the stated amount, in several small portions",
        None: "Look for a relief or drain plug and open it; without one give no more than the stated amount",
    }[case.housing.relief]
    return (
        "Wipe the nipple and the gun clean; check that the grease is the one on this line",
        relief,
        "Grease slowly while the shaft turns where that is safe and the site allows it, else at standstill",
        _run_in(case),
    )


def _circuit_steps(case: Case) -> tuple[str, ...]:
    """Return how the oil of a circuit is changed: tank, filter, flush, then flow, return and sight glass."""
    flow = "" if case.oil.flow is None else f" of {case.oil.flow:.3g} l/min"
    return (
        "Isolate and lock out the machine; stop the pump; let the oil cool to hand warm",
        "Drain the tank and the low points of the lines, wipe the tank out, clean the strainer and put in a new filter",
        "Fill a little of the same oil, flush through the filter until it runs clean, and drain it while it is warm",
        "Fill the tank through a filter with the same oil to the mark of its sight glass, and vent pump and filter",
        f"Start the pump before the machine; check the flow{flow} to the bearing, that the return runs free, and the "
        "sight glass and the filter's pressure drop once it is warm",
    )


def _run_in(case: Case) -> str:
    low, _, high = purge_run(case)
    time = f"Run for {run_words(low, high)} at running speed"
    turned = "the temperature has risen, levelled and turned over"
    if case.housing.relief == "closed":
        return f"{time} (common practice), and watch until {turned}; wipe off the surplus"
    return f"{time} with the plug open (common practice), longer until {turned}; then close it and wipe off the surplus"


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
