"""Warm-up: what happens after a start, after greasing and in the cold, before the position is in balance.

`courses` follows them; here is what is read off: peaks, times, set-points that are passed, and the torque that a cold
start takes.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Callable, Iterator, Mapping

import numpy as np

from lubecheck.data import air
from lubecheck.model import wording
from lubecheck.model.check import governing
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import Air
from lubecheck.model.glance import state_of_readings
from lubecheck.model.limits import BEYOND, STATES, UNKNOWN
from lubecheck.model.result import ColdTorque, Course, CourseFigures, Crossing, Limit, Result, WarmUp
from lubecheck.model.rows import seasons
from lubecheck.physics import churning, viscosity, warm_up
from lubecheck.studies.calibrate import calibrated
from lubecheck.studies.courses import AFTER_GREASING, COLD_START, FIRST_START, START, Run, runs_of
from lubecheck.units import Array

SETTLED = 1.0  # K: so close to the end counts as steady
KEPT = 0.05  # K: a curve is kept up to where it stays so close to its end
SAMPLES = 60  # points of a curve that are kept
FIELD_HOURS = 24.0  # until a greased bearing is back: field notes of 2016
CONCERN = 28.0  # K of rise after greasing: field notes of 2016
MEANINGS = {
    FIRST_START: "the first fill is fresh and churns until it has found its place; the machine starts cold",
    START: "a start from the ambient, the lubricant run in; the machine starts cold",
    AFTER_GREASING: "one regreasing of a position that runs steadily",
    COLD_START: "a start from the coldest temperature that is stated, in air that stays so cold",
}


def judged(case: Case, result: Result, *, air_properties: Air = air.properties) -> Result:
    """Return a result of the check with the warm-up, its limits among the others and the verdict over all of them.

    `peak_temperature` is the most that bearing and lubricant come to, against what they stand; `set_point` is then of
    the peaks too; `start_torque` stands where the case says what the drive has.
    """
    case = calibrated(case, air_properties=air_properties)
    runs = runs_of(case, air_properties)
    new = {limit.name: limit for limit in _limits(case, runs)}
    limits = tuple(new.pop(limit.name, limit) for limit in result.limits) + tuple(new.values())
    verdict = max((limit.state for limit in limits), key=STATES.index)
    cold = _cold_run(case, runs)
    found = WarmUp(
        courses=tuple(_course(case, run) for run in runs.values()),
        cold=None if cold is None else _cold_torque(case, cold),
        notes=tuple(_notes(case, runs)),
    )
    return dataclasses.replace(
        result, limits=limits, verdict=verdict, governing=governing(limits, verdict), warm_up=found
    )


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
    by_field = "" if shortest <= FIELD_HOURS <= longest else f"; field notes say about {FIELD_HOURS:.0f} h"
    way = ", once the relief is open" if opens else ""
    return (
        f"after the fact{way}: by the warm-up the housing peaks at {peak:.0f} degC "
        f"({low:.0f} to {high:.0f}) and is within 1 K of its steady {run.history.outer[-1, 0]:.0f} degC after "
        f"{hours:.0f} running hours ({shortest:.0f} to {longest:.0f}){by_field}: wait so long, then judge it"
    )


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
    uses = _use(run, run.peaks, set_point)
    use, low, high = (_finite(value) for value in run.band(uses))
    at = float(run.history.time[over[0], 0]) if len(over) else None
    return Crossing(name, set_point, STATES[_state(uses)], at, use, low, high)


def _use(run: Run, peak: Array, top: Array | float) -> Array:
    """Return the rise over the ambient as a share of what a top temperature leaves: the use of a temperature limit.

    Beside a measured temperature that nothing explains it is not known, unless it is beyond.
    """
    room = top - run.ambient
    use: Array = np.where(room > 0, (peak - run.ambient) / room, np.inf)
    is_doubted = (run.points.is_doubted > 0) & ~(use > 1.0)
    return np.where(np.isnan(peak) | np.isnan(room) | is_doubted, np.nan, use)


def _state(use: Array) -> int:
    """Return the state of a use that stands for the usual reading first and the worst one next."""
    return int(state_of_readings(use[:1], use[1:2])[0])


def _limits(case: Case, runs: Mapping[str, Run]) -> Iterator[Limit]:
    yield _hottest("peak_temperature", "common-practice", runs, lambda run: (run.bearing_peaks, run.points.highest))
    if not np.isnan(next(iter(runs.values())).points.set_point[0]):
        yield _hottest("set_point", "user", runs, lambda run: (run.peaks, run.points.set_point))
    if case.limits.start_torque is not None:
        yield _torque(case.limits.start_torque, _cold_run(case, runs))


def _hottest(name: str, basis: str, runs: Mapping[str, Run], of: Callable[[Run], tuple[Array, Array]]) -> Limit:
    """Judge the peak of the course that comes nearest to what is allowed, or past it."""
    uses = {key: _use(run, *of(run)) for key, run in runs.items()}
    worst = max(runs, key=lambda key: (_state(uses[key]), float(np.nan_to_num(uses[key][0], nan=-1.0))))
    run, use, state = runs[worst], uses[worst], _state(uses[worst])
    peak, top = of(run)
    _, low, high = run.band(use)
    return Limit(
        name=name,
        state=STATES[state],
        use=_finite(use[0]),
        demand=_finite(peak[0]),
        allowed=_finite(top[0]),
        unit="degC",
        basis=basis,
        note=wording.join(
            "hangs on what was not said" if state == UNKNOWN and np.isfinite(use[0]) else "",
            "could not be followed" if np.isnan(use[0]) else f"{worst}: {MEANINGS[worst]}",
            wording.band(low, high),
        ),
        use_low=_finite(low),
        use_high=_finite(high),
    )


def _cold_run(case: Case, runs: Mapping[str, Run]) -> Run | None:
    """Return the start in the cold; without a coldest temperature there is none that could be judged."""
    return None if case.surroundings.coldest is None else runs.get(COLD_START, runs[START])


def _breakaway(run: Run) -> Array:
    """Torque at which grease at rest yields, in every row; 0 for oil."""
    p = run.points
    volume = np.minimum(np.nan_to_num(p.fill), churning.CLEAR_SHARE) * p.free_volume * (p.is_grease > 0)
    return warm_up.breakaway_torque.plain(
        volume,
        rate=churning.shear_rate.plain(p.speed, bore=p.bore, outside=p.outside),
        speed=p.speed,
        yield_stress=p.yield_stress * churning.softening.plain(run.ambient),
    )


def _cold_torque(case: Case, run: Run) -> ColdTorque:
    p = run.points
    made: ColdTorque = ColdTorque.of(
        {
            "temperature": float(run.ambient[0]),
            "viscosity": float(
                viscosity.viscosity_from_constants.plain(run.ambient[0], a=p.walther_a[0], b=p.walther_b[0])
            ),
            "running": run.band(run.history.torque[0]),
            "breakaway": float(_breakaway(run)[0]) if case.is_grease else None,
            "drive": case.limits.start_torque,
        }
    )
    return made


def _torque(drive: float, run: Run | None) -> Limit:
    """Judge the torque of a cold start against what the drive has for this bearing."""
    demand = None if run is None else np.maximum(run.history.torque[0], _breakaway(run))
    use = None if demand is None else demand / drive
    note = "[surroundings] coldest is not said" if run is None else "at running speed, before anything has warmed"
    band = (None, None) if run is None or use is None else tuple(_finite(end) for end in run.band(use)[1:])
    return Limit(
        name="start_torque",
        state=STATES[UNKNOWN if use is None else _state(use)],
        use=None if use is None else _finite(use[0]),
        demand=None if demand is None else _finite(demand[0]),
        allowed=drive,
        unit="N*mm",
        basis="palmgren",
        note=note,
        use_low=band[0],
        use_high=band[1],
    )


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
        f"estimates of the way: {grease if case.is_grease else ''}a wall of {wall.nominal:g} mm ({wall.low:g} to "
        f"{wall.high:g}) where the housing's mass is not stated; a machine that warms in {machine.nominal:g} h "
        f"({machine.low:g} to {machine.high:g}), e-folding"
    )


def _finite(value: float | None) -> float | None:
    return None if value is None or not np.isfinite(value) else float(value)
