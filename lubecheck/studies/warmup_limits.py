"""The limits of the way: peaks of the courses, set-points on the way, and the torque that a cold start takes."""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Callable, Iterator, Mapping, Sequence

import numpy as np

from lubecheck.model import calibration_words, wording
from lubecheck.model.balance import balance_of
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import TOP_TEMPERATURE
from lubecheck.model.glance import state_of_readings
from lubecheck.model.limits import BEYOND, NEAR_CODE, STATES, UNKNOWN
from lubecheck.model.result import ColdTorque, Limit
from lubecheck.physics import churning, viscosity, warm_up
from lubecheck.studies.courses import COLD_START, MEANINGS, START, Run
from lubecheck.units import Array

WARMEST_START = 40.0  # degC up to which a start is tried


def use_of(run: Run, peak: Array, top: Array | float) -> Array:
    """Return the rise over the ambient as a share of what a top temperature leaves: the use of a temperature limit.

    Beside a measured temperature that nothing explains it is not known, unless it is beyond.
    """
    room = top - run.ambient
    use: Array = np.where(room > 0, (peak - run.ambient) / room, np.inf)
    is_doubted = (run.points.is_doubted > 0) & ~(use > 1.0)
    use = np.where(np.isnan(peak) | np.isnan(room) | is_doubted, np.nan, use)
    return np.where(run.is_too_hot, np.inf, use)


def state_of(use: Array) -> int:
    """Return the state of a use that stands for the usual reading first and the worst one next."""
    return int(state_of_readings(use[:1], use[1:2])[0])


def limits_of(case: Case, steady: Sequence[Limit], runs: Mapping[str, Run]) -> Iterator[Limit]:
    """Judge the way: `steady` are the limits of the check, of which the set-point's is not forgotten."""
    inside = "inside the bearing, not what a sensor on the housing shows"
    yield _hottest("peak_temperature", "common-practice", runs, lambda run: run.bearing_peaks,
                   lambda run: run.points.highest, inside, case)  # fmt: skip
    at_points = [limit for limit in steady if limit.name == "set_point"]
    for name, point in (("alarm", case.limits.alarm), ("trip", case.limits.trip)):
        if point is not None:
            peak = _hottest("set_point", "user", runs, lambda run: run.peaks, _constant(point), f"the {name}", case)
            at_points.append(peak if name == "trip" else _no_worse_than_near(peak))
    if at_points:
        yield max(at_points, key=lambda limit: (STATES.index(limit.state), limit.use or 0.0))
    if case.limits.start_torque is not None and START in runs:
        yield _torque(case.limits.start_torque, cold_run(runs))


def _constant(point: float) -> Callable[[Run], Array]:
    return lambda run: np.full(len(run.points), point)


def _no_worse_than_near(limit: Limit) -> Limit:
    """An alarm that sounds on the way is to be watched, and no limit of the bearing: that is the trip, or the peak."""
    if limit.state != STATES[BEYOND]:
        return limit
    return dataclasses.replace(
        limit,
        state=STATES[NEAR_CODE],
        note=wording.join("the alarm sounds on the way and not in the steady state", limit.note),
    )


def _hottest(
    name: str,
    basis: str,
    runs: Mapping[str, Run],
    peak_of: Callable[[Run], Array],
    top_of: Callable[[Run], Array],
    what: str,
    case: Case,
) -> Limit:
    """Judge the peak of the course that comes nearest to what is allowed, or past it."""
    uses = {key: use_of(run, peak_of(run), top_of(run)) for key, run in runs.items()}

    def gravity(key: str) -> tuple[int, float]:
        """Rank by the state, then by the kelvins that are left, since the air of the courses differs."""
        room = float(top_of(runs[key])[0] - peak_of(runs[key])[0])
        return state_of(uses[key]), -room if math.isfinite(room) else -math.inf

    worst = max(runs, key=gravity)
    run, use, state = runs[worst], uses[worst], state_of(uses[worst])
    peak, top = peak_of(run), top_of(run)
    _, low, high = run.band(use)
    return Limit(
        name=name,
        state=STATES[state],
        use=finite(use[0]),
        demand=finite(peak[0]),
        allowed=finite(top[0]),
        unit="degC",
        basis=basis,
        note=wording.join(
            "hangs on what was not said" if state == UNKNOWN and np.isfinite(use[0]) else "",
            _followed(run, name, f"{what}, {worst}: {MEANINGS[worst]}", case),
            wording.band(low, high),
        ),
        use_low=finite(low),
        use_high=finite(high),
    )


def _followed(run: Run, name: str, course: str, case: Case) -> str:
    if run.is_too_hot[0]:
        return f"no equilibrium below {TOP_TEMPERATURE:g} degC: the heat cannot be carried off"
    if np.isnan(run.known[0]):
        return "could not be followed: what it would end in is not known"
    # A peak is in doubt as the temperature that it ends in.
    kind = "temperature" if name == "peak_temperature" else name
    return wording.join(calibration_words.doubt(case, kind) if run.points.is_doubted[0] else "", course)


def cold_run(runs: Mapping[str, Run]) -> Run | None:
    """Return the start in the cold; without a coldest temperature there is none that could be judged."""
    return runs.get(COLD_START)


def _start_torques(run: Run, temperature: Array) -> tuple[Array, Array]:
    """Torque at running speed, and the most that grease at rest may take to break away, N mm; 0 for oil.

    temperature [degC]: of the start, one a row
    """
    p = run.points
    with np.errstate(all="ignore"):
        balance = balance_of(p)
        at = temperature - balance.floor
        running = balance.flows(at, at, at, np.zeros(len(p)), np.zeros(len(p))).torque
    volume = np.minimum(np.nan_to_num(p.fill), churning.CLEAR_SHARE) * p.free_volume
    at_room = warm_up.yield_torque.plain(
        volume,
        rate=churning.shear_rate.plain(p.speed, bore=p.bore, outside=p.outside),
        speed=p.speed,
        yield_stress=p.yield_stress,
    )
    with np.errstate(all="ignore"):
        breakaway = warm_up.breakaway_torque.plain(
            temperature=temperature, lowest=p.lowest, pitch_diameter=p.pitch_diameter, at_room=at_room
        )
    return running, np.where(p.is_grease > 0, breakaway, 0.0)


def cold_torque(case: Case, run: Run) -> ColdTorque:
    """Return what a start in the cold takes of the drive."""
    p, drive = run.points, case.limits.start_torque
    running, breakaway = _start_torques(run, run.ambient)
    made: ColdTorque = ColdTorque.of(
        {
            "temperature": float(run.ambient[0]),
            "viscosity": float(
                viscosity.viscosity_from_constants.plain(run.ambient[0], a=p.walther_a[0], b=p.walther_b[0])
            ),
            "running": run.band(running),
            "breakaway": float(breakaway[0]) if case.is_grease else None,
            "starts_from": None if drive is None else _starts_from(run, drive),
            "drive": drive,
        }
    )
    return made


def _starts_from(run: Run, drive: float) -> float | None:
    """Return the temperature from which on the drive has enough, in whole kelvins above the coldest."""
    cold = float(run.ambient[0])
    warmer = np.arange(math.ceil(cold), max(WARMEST_START, cold) + 1.0)
    one = dataclasses.replace(run, points=run.points.take(np.zeros(len(warmer), dtype=np.intp)))
    is_enough = np.maximum(*_start_torques(one, warmer)) <= drive
    if is_enough.all() or not is_enough[-1]:
        return None
    return float(warmer[len(warmer) - int(np.argmin(is_enough[::-1]))])


def _torque(drive: float, run: Run | None) -> Limit:
    """Judge the torque of a cold start against what the drive has for this bearing."""
    demand = None if run is None else np.maximum(*_start_torques(run, run.ambient))
    use = None if demand is None else demand / drive
    notes = ["[surroundings] coldest is not said"]
    if run is not None and use is not None:
        notes = ["before anything has warmed: the greater of running and breaking away"]
        if np.isnan(use[0]):
            notes.append("the grease's lowest temperature is not known")
        elif use[0] > 1:
            least = _starts_from(run, drive)
            warm = f"warm it to {least:.0f} degC, or take" if least is not None else "too much when warm, too: take"
            notes.append(f"{warm} a thinner lubricant")
    band = (None, None) if run is None or use is None else tuple(finite(end) for end in run.band(use)[1:])
    return Limit(
        name="start_torque",
        state=STATES[UNKNOWN if use is None else state_of(use)],
        use=None if use is None else finite(use[0]),
        demand=None if demand is None else finite(demand[0]),
        allowed=drive,
        unit="N*mm",
        basis="palmgren",
        note=wording.join(*notes),
        use_low=band[0],
        use_high=band[1],
    )


def finite(value: float | None) -> float | None:
    """Return a number, or None for what is none."""
    return None if value is None or not np.isfinite(value) else float(value)
