"""Warm-up: what happens after a start, after greasing and in the cold, before the position is in balance.

`courses` follows them; here is what is read off: peaks, times, set-points that are passed, and the torque that a cold
start takes.
"""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Iterator, Mapping
from datetime import date, timedelta

import numpy as np

from lubecheck.data import air
from lubecheck.model import wording
from lubecheck.model.check import governing
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount
from lubecheck.model.equilibrium import Air
from lubecheck.model.limits import BEYOND, NEAR_CODE, STATES, UNKNOWN
from lubecheck.model.result import (
    Course,
    CourseFigures,
    Crossing,
    Limit,
    LimitAfter,
    Remedy,
    Result,
    WarmUp,
)
from lubecheck.model.rows import seasons
from lubecheck.physics import warm_up
from lubecheck.studies.calibrate import calibrated
from lubecheck.studies.changes import Change, apply
from lubecheck.studies.courses import AFTER_GREASING, MEANINGS, Run, runs_of
from lubecheck.studies.warmup_limits import cold_run, cold_torque, finite, limits_of, state_of, use_of
from lubecheck.units import Array

SETTLED = 1.0  # K: so close to the end counts as steady
KEPT = 0.05  # K: a curve is kept up to where it stays so close to its end
SAMPLES = 60  # points of a curve that are kept
FIELD_HOURS = 24.0  # until a greased bearing is back: field notes of 2016
LONGEST_WAIT = 366  # days: beyond it no day is named
DOSE_SHARES = (0.75, 0.5, 0.35, 0.25, 0.15)
_FAILING = (STATES[NEAR_CODE], STATES[BEYOND])
CONCERN = 28.0  # K of rise after greasing: field notes of 2016


def judged(case: Case, result: Result, *, air_properties: Air = air.properties) -> Result:
    """Return a result of the check with the warm-up, its limits among the others and the verdict over all of them.

    `peak_temperature` is the most that bearing and lubricant come to, against what they stand; `set_point` is then of
    the peaks too; `start_torque` stands where the case says what the drive has.
    """
    case = calibrated(case, air_properties=air_properties)
    runs = runs_of(case, air_properties)
    new = {limit.name: limit for limit in limits_of(case, result.limits, runs)}
    is_short = any(limit.state in _FAILING for limit in new.values())
    remedies = tuple(_remedy_on_the_way(case, remedy, new, air_properties) for remedy in result.remedies)
    cold = cold_run(runs)
    found = WarmUp(
        courses=tuple(_course(case, run) for run in runs.values()),
        cold=None if cold is None else cold_torque(case, cold),
        notes=(*_notes(case, runs), *(_smaller_dose(case, runs, air_properties) if is_short else ())),
    )
    limits = tuple(new.pop(limit.name, limit) for limit in result.limits) + tuple(new.values())
    verdict = max((limit.state for limit in limits), key=STATES.index)
    return dataclasses.replace(
        result,
        limits=limits,
        verdict=verdict,
        governing=governing(limits, verdict),
        warm_up=found,
        remedies=tuple(sorted(remedies, key=lambda remedy: STATES.index(remedy.verdict_after)))
        if is_short
        else remedies,
    )


def _remedy_on_the_way(case: Case, remedy: Remedy, before: Mapping[str, Limit], air_properties: Air) -> Remedy:
    """Return a remedy of the steady state with what it does to the limits of the way there."""
    changed = apply(case, Change(remedy.change, "", remedy.effort, remedy.edits))
    after = {limit.name: limit for limit in limits_of(changed, (), runs_of(changed, air_properties))}
    limits = [limit for limit in remedy.limits if limit.name not in after]
    limits += [LimitAfter(name, before[name].state, before[name].use, limit.state, limit.use)
               for name, limit in after.items() if name in before]  # fmt: skip
    verdict = max((remedy.verdict_after, *(limit.state for limit in after.values())), key=STATES.index)
    open_still = [f"{name.replace('_', ' ')} {limit.state} on the way"
                  for name, limit in after.items() if limit.state in _FAILING]  # fmt: skip
    note = wording.join(remedy.note, *open_still)
    return dataclasses.replace(remedy, verdict_after=verdict, note=note, limits=tuple(limits))


def _smaller_dose(case: Case, runs: Mapping[str, Run], air_properties: Air) -> Iterator[str]:
    """Say which part of the dose, a day apart from the next, stays within on the way; nothing where none does."""
    run = runs.get(AFTER_GREASING)
    others = {name: other for name, other in runs.items() if name != AFTER_GREASING}
    if (
        run is None
        or case.grease.given is not None
        or _is_short(case, others)
        or not _is_short(case, {AFTER_GREASING: run})
    ):
        return
    for share in DOSE_SHARES:
        grams = share * run.dose
        part = dataclasses.replace(case.grease, regrease_amount=Amount(grams, "mass", "g"))
        less = dataclasses.replace(case, grease=part)
        if not _is_short(less, runs_of(less, air_properties, wanted=(AFTER_GREASING,))):
            yield (
                f"after greasing: {grams:.1f} g at a time, a day of running apart, stay within on the way; "
                f"{run.dose:.1f} g at once do not"
            )
            return


def _is_short(case: Case, runs: Mapping[str, Run]) -> bool:
    return bool(runs) and any(
        limit.state in _FAILING for limit in limits_of(case, (), runs) if limit.name != "start_torque"
    )


def waited(case: Case, result: Result, *, air_properties: Air = air.properties) -> Result:
    """Return a result of a case that says what was given, with how long to wait for it among the notes."""
    said = waiting(case, result, air_properties=air_properties) if case.grease.given is not None else ""
    return dataclasses.replace(result, notes=(*result.notes, said)) if said else result


def waiting(case: Case, result: Result, *, air_properties: Air = air.properties) -> str:
    """Say how long what was given takes to find its place, with the way out that the advice asks for."""
    opens = case.housing.relief != "open" and result.limit("fill").state in (STATES[UNKNOWN], STATES[BEYOND])
    if opens:
        case = dataclasses.replace(case, housing=dataclasses.replace(case.housing, relief="open"))
    run = runs_of(case, air_properties, wanted=(AFTER_GREASING,)).get(AFTER_GREASING)
    if run is None or np.isnan(run.known[0]):
        return ""
    hours, shortest, longest = run.band(_settled(run.history.time, run.history.outer, SETTLED))
    peak, low, high = run.band(run.peaks)
    by_field = (
        "" if not (shortest > FIELD_HOURS or longest < FIELD_HOURS) else f"; field notes say about {FIELD_HOURS:.0f} h"
    )
    way = ", once the relief is open" if opens else ""
    per_day = float(run.points.hours_per_day[0])
    days, until = math.ceil(hours / per_day), ""
    if case.grease.given_on is not None and days <= LONGEST_WAIT:
        until = (
            f", about until {date.fromisoformat(case.grease.given_on) + timedelta(days=days)} at {per_day:g} h a day"
        )
    return (
        f"after the fact{way}: by the warm-up the housing peaks at {peak:.0f} degC"
        f"{_between(low, high, ' degC')}and is within 1 K of its steady {run.history.outer[-1, 0]:.0f} degC after "
        f"{hours:.0f} running hours{_between(shortest, longest).rstrip()}{until}{by_field}. Wait so long; if it is "
        "still hotter then, it is not the fresh grease: look for what else it is"
    )


def _between(low: float, high: float, unit: str = "") -> str:
    """Return a band in brackets, a space to either side; a space alone where it has an end that is no number."""
    return f" ({low:.0f} to {high:.0f}{unit}) " if math.isfinite(low) and math.isfinite(high) else " "


def _course(case: Case, run: Run) -> Course:
    time, outer, bearing = run.history.time, run.history.outer, run.history.lubricant
    figures = {
        "start": outer[0],
        "peak": run.peaks,
        "rise": run.peaks - outer[0],
        # A course that only rises has no peak before its end.
        "time_of_peak": np.where(
            run.peaks - outer[-1] > KEPT, time[outer.argmax(axis=0), np.arange(outer.shape[1])], np.nan
        ),
        "end": outer[-1],
        "time_to_steady": run.known * _settled(time, outer, SETTLED),
        "bearing_peak": bearing.max(axis=0),
        "start_torque": run.history.torque[0],
    }
    made: CourseFigures = CourseFigures.of({name: run.band(values) for name, values in figures.items()})
    kept = _kept(run)
    set_points = {"alarm": case.limits.alarm, "trip": case.limits.trip}
    return Course(
        name=run.name,
        meaning=MEANINGS[run.name],
        figures=made,
        time_h=tuple(time[kept, 0].tolist()),
        sensor=tuple(outer[kept, 0].tolist()),
        bearing=tuple(bearing[kept, 0].tolist()),
        crossings=tuple(_crossing(name, point, run) for name, point in set_points.items() if point is not None),
    )


def _settled(time: Array, outer: Array, within: float) -> Array:
    """Return from when on each row stays within so many kelvin of its end, h."""
    is_off = np.abs(outer - outer[-1]) > within
    after = np.where(is_off.any(axis=0), len(time) - np.argmax(is_off[::-1], axis=0), 0)
    settled: Array = time[np.minimum(after, len(time) - 1), np.arange(time.shape[1])]
    return settled


def _kept(run: Run) -> list[int]:
    """Return the steps of the usual reading that make its curve: even in time as far as the steps are."""
    if np.isnan(run.known[0]):
        return []
    time, outer = run.history.time[:, 0], run.history.outer[:, 0]
    until = float(_settled(run.history.time[:, :1], run.history.outer[:, :1], KEPT)[0])
    places = np.searchsorted(time, np.linspace(0.0, until, SAMPLES))
    return sorted({*places.tolist(), int(outer.argmax())})


def _crossing(name: str, set_point: float, run: Run) -> Crossing:
    over = np.flatnonzero(run.history.outer[:, 0] >= set_point)
    uses = use_of(run, run.peaks, set_point)
    use, low, high = (finite(value) for value in run.band(uses))
    time = run.history.time[:, 0]
    at = float(time[over[0]]) if len(over) else None
    # Over it at the end: for good.
    lasts = float(time[over[-1] + 1] - time[over[0]]) if len(over) and over[-1] + 1 < len(time) else None
    return Crossing(name, set_point, STATES[state_of(uses)], at, lasts, use, low, high)


def _notes(case: Case, runs: Mapping[str, Run]) -> Iterator[str]:
    if len(case.duty) > 1 or len(seasons(case)) > 1:
        yield "the courses are of the duty point and the season that run hottest"
    for run in runs.values():
        if np.isnan(run.known[0]):
            yield f"{run.name}: not followed, as there is no state that it would end in"
    greased = runs.get(AFTER_GREASING)
    if greased is not None and not np.isnan(greased.known[0]):
        rise = float(greased.peaks[0] - greased.history.outer[0, 0])
        if rise > CONCERN:
            yield (
                f"after greasing a rise of {rise:.0f} K: more than {CONCERN:.0f} K is a concern (field notes); give it "
                "in portions, a day apart"
            )
    fresh, turns, wall, machine = warm_up.FRESH, warm_up.CHANNELLING, warm_up.WALL, warm_up.MACHINE_TIME
    grease = (
        f"fresh grease {fresh.nominal:g} times the run-in viscous torque ({fresh.low:g} to {fresh.high:g}); channels "
        f"in {turns.nominal:.0f} revolutions ({turns.low:.0f} to {turns.high:.0f}); "
    )
    yield (
        f"estimates of the way: {grease if case.is_grease else ''}a wall of {wall.low:g} to {wall.high:g} mm, usually "
        f"{wall.nominal:g} mm, where the housing's mass is not stated; a machine that warms in {machine.nominal:g} h "
        f"({machine.low:g} to {machine.high:g}), e-folding"
    )
