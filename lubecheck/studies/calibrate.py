"""What measured temperatures say of a position: its cooling, or, where the cooling is stated, its unknown fill.

The one unknown is found anew under every reading of what the case leaves out and under each end of its uncertain
inputs, so that each of these passes through what was measured; that is what narrows the band of a prediction. All of
them, and all measurements, are rows of one kernel call a step.

A reading that lies outside the band which the estimate has there, its own error included, calibrates nothing, nor do
readings that disagree by more than their errors (`agreement`): what would explain it is looked for in `explain`.
"""

from __future__ import annotations

import dataclasses
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data import air
from lubecheck.model import draws
from lubecheck.model.assumptions import admissible_cooling, uncertain
from lubecheck.model.calibration import (
    COOLING,
    FILL,
    MOST,
    NOTHING,
    USUAL,
    VALUE,
    WIDEST_COOLING,
    WORST,
    Calibration,
    MeasuredFigures,
    MeasuredPoint,
)
from lubecheck.model.check import readings
from lubecheck.model.entries import Case
from lubecheck.model.equilibrium import TOP_TEMPERATURE, Air, solve
from lubecheck.model.measured import at_state, finds_fill, heat_of, reading_error
from lubecheck.model.measured_entries import PLACES
from lubecheck.model.points import Points, from_rows, join
from lubecheck.model.rows import OIL_HEAT_CAPACITY, rows_of
from lubecheck.physics import cooling
from lubecheck.studies.agreement import agree
from lubecheck.studies.roots import roots
from lubecheck.units import Array

FILLS = (0.3, 1.0)  # an unknown fill, as it is judged without a measurement
USUAL_FILL = 0.5
NEARLY_ALL = 0.9  # of the range of fills: a reading whose error leaves so much of it cannot tell the fill
NORMAL_95 = 1.959964  # standard deviations to each side that hold 95 % of a normal distribution
FIT_STEPS = 40
STEP = 1e-3  # of the unknown, for the slope
CLOSE = 1e-10  # of the unknown
LEAST_RISE = 0.01  # K of the housing over the air, from which a conductance can be told


def calibrated(case: Case, *, air_properties: Air = air.properties) -> Case:
    """Return a case with what its measured temperatures say; one without any as it is."""
    if not case.measured or case.calibration is not None:
        return case
    return dataclasses.replace(case, calibration=_calibration(case, air_properties))


@dataclass(frozen=True, slots=True)
class Sensors:
    """The measurements of a case: what was read, how well, and where."""

    temperature: Array
    error: Array
    place: tuple[str, ...]
    oil_flow: float  # l/min, of the oil whose outlet was measured

    def read(self, points: Points, air_properties: Air) -> Array:
        """Return what the sensors would read at points that hold the measured states, once or several times over.

        A state without an equilibrium counts as hot as the hottest that has one.
        """
        state = solve(points, air_properties)
        places = np.resize(np.array([PLACES.index(place) for place in self.place]), len(points))
        found = np.where((places == 2) | (places == 3), state.inner, state.outer)
        if (places == 4).any():
            stream = cooling.stream_conductance.plain(self.oil_flow, points.density, OIL_HEAT_CAPACITY)
            outlet = points.oil_inlet + points.oil_conductance / stream * (state.temperature - points.oil_inlet)
            found = np.where(places == 4, outlet, found)
        return np.where(state.is_too_hot, TOP_TEMPERATURE, found).reshape(-1, len(self.place))


@dataclass(frozen=True, slots=True)
class Unknown:
    """What is sought: its column, its range in the variable of the search, and the part of it that can be believed."""

    column: str
    nominal: float
    range: tuple[float, float]
    believed: tuple[float, float]

    def value(self, x: Any) -> Any:
        """Return the value in the column: a factor is searched in its logarithm."""
        return x if self.column == FILL else np.exp(x)

    def put(self, points: Points, x: Array) -> Points:
        """Return points with the unknown in each row."""
        return points.changed(**{self.column: self.value(x)})


def unknown_of(case: Case) -> Unknown:
    """Return what the measurements of a case are to find."""
    if finds_fill(case):
        return Unknown(FILL, USUAL_FILL, FILLS, FILLS)
    low, high = np.log(admissible_cooling(case)).tolist()
    widest = float(np.log(WIDEST_COOLING))
    return Unknown(COOLING, 0.0, (-widest, widest), (low, high))


def sensors_of(case: Case) -> Sensors:
    """Return the sensors of a case."""
    return Sensors(
        temperature=np.array([one.temperature for one in case.measured]),
        error=np.array([reading_error(one) for one in case.measured]),
        place=tuple(one.place or PLACES[0] for one in case.measured),
        oil_flow=case.oil.flow or np.nan,
    )


def states_of(case: Case, reading: Mapping[str, Any]) -> Points:
    """Return the measured states of a case under one reading of what it leaves out, a position each."""
    return from_rows([rows_of(at_state(case, one), reading, i)[0] for i, one in enumerate(case.measured)])


@dataclass(frozen=True)
class Fit:
    """One search: blocks of points that each hold all measured states, the unknown of each block to be found."""

    unknown: Unknown
    sensors: Sensors
    air: Air

    def read(self, points: Points, x: Array) -> Array:
        """Return what the sensors would read, [block, state], with the unknown of each block."""
        return self.sensors.read(self.unknown.put(points, np.repeat(x, len(self.sensors.place))), self.air)

    def each(self, points: Points, targets: Array) -> Array:
        """Return the unknown that each single reading asks for, [block, state]; the nearest where none gives it."""

        def surplus(x: Array) -> Array:
            return self.sensors.read(self.unknown.put(points, x), self.air).ravel() - targets.ravel()

        low, high = (np.full(targets.size, end) for end in self.unknown.range)
        return roots(surplus, low, high)[0].reshape(targets.shape)

    def best(self, points: Points, targets: Array) -> Array:
        """Return the unknown of each block that fits all its readings best: least squares of residual over error."""
        alone = self.each(points, targets)
        if alone.shape[1] == 1:
            return alone[:, 0]
        low, high = alone.min(axis=1), alone.max(axis=1)
        weights = 1 / self.sensors.error**2
        x: Array = (alone * weights).sum(axis=1) / weights.sum()
        three = join([points] * 3)
        for _ in range(FIT_STEPS):
            at = self.read(three, np.concatenate([x, x - STEP, x + STEP])).reshape(3, *targets.shape)
            slope = (at[2] - at[1]) / (2 * STEP)
            steep = (weights * slope**2).sum(axis=1)
            with np.errstate(all="ignore"):
                step = -(weights * slope * (at[0] - targets)).sum(axis=1) / steep
            new = np.where(steep > 0, np.clip(x + step, low, high), x)
            is_done = bool(np.nanmax(np.abs(new - x), initial=0.0) < CLOSE)
            x = new
            if is_done:
                break
        return x

    def ends(self, points: Points, x: float, rest: float, rise: float) -> tuple[float, float]:
        """Return where the sum of squares, `rest` at its least, has risen by so much to each side.

        A reading that is coarser than the estimate takes nothing from it: no end lies beyond what could be believed.
        """
        two = join([points] * 2)

        def surplus(at: Array) -> Array:
            residuals = (self.read(two, at) - self.sensors.temperature) / self.sensors.error
            return np.asarray((residuals**2).sum(axis=1) - rest - rise)

        least, most = self.unknown.range
        found, is_there = roots(surplus, np.array([least, x]), np.array([x, most]))
        found = np.where(is_there, found, self.unknown.range)  # all of a side is left where nothing on it is excluded
        low, high = self.unknown.believed
        return max(float(found[0]), min(low, x)), min(float(found[1]), max(high, x))


def _calibration(case: Case, air_properties: Air) -> Calibration:
    unknown, sensors = unknown_of(case), sensors_of(case)
    fit = Fit(unknown, sensors, air_properties)
    facts, said = readings(case)
    usual = states_of(case, said[0])
    parts = [usual, *(states_of(case, reading) for reading in said[1:])]
    inputs = [one for one in uncertain(case) if one[0] != unknown.column]
    for name, low, high in inputs:
        parts += [usual.changed(**{name: getattr(usual, name) * factor}) for factor in (low, high)]
    points = join(parts)
    nominal = fit.read(points, np.full(len(parts), unknown.nominal))
    lowest, highest = _band(fit, usual, nominal[[0, *range(len(said), len(parts))]])
    x = fit.best(points, np.tile(sensors.temperature, (len(parts), 1)))
    after = fit.read(usual, x[:1])[0]
    squares = (((after - sensors.temperature) / sensors.error) ** 2).sum()
    count = len(sensors.place)
    chi_square = None if count == 1 else float(squares * NORMAL_95**2)
    scale = 1.0 if chi_square is None else max(1.0, float(np.sqrt(chi_square / (count - 1))))
    is_reached = count > 1 or bool(np.abs(after[0] - sensors.temperature[0]) <= sensors.error[0])
    # Each reading has to lie where the estimate can be, and so has the curve that is fitted through them.
    is_inside = [((at >= lowest) & (at <= highest)).all() for at in (sensors.temperature, after)]
    is_believed = is_reached and all(is_inside) and bool((after < TOP_TEMPERATURE).all())
    residuals = sensors.temperature - after
    # A curve that can be believed, from which readings lie too far away: they contradict one another.
    is_split = (
        is_inside[1] and bool((after < TOP_TEMPERATURE).all()) and not agree(residuals, sensors.error, chi_square)
    )
    is_explained = is_believed and not is_split
    edges = fit.each(join([usual, usual]), np.stack([lowest, highest])).mean(axis=1)
    ends = fit.ends(usual, float(x[0]), squares, scale**2) if is_explained else (x[0], x[0])
    tells = _tells(ends) if is_explained and unknown.column == FILL else VALUE
    if tells != VALUE:
        x[: len(said)] = np.minimum(x[: len(said)], min(USUAL_FILL, ends[1]))
        x[0] = min(USUAL_FILL, ends[1])
        after = fit.read(usual, x[:1])[0]
    values = unknown.value(x)
    made = Calibration(
        column=unknown.column,
        is_explained=is_explained,
        value=float(values[0]),
        low=float(unknown.value(ends[0])),
        high=float(unknown.value(ends[1])),
        admissible=(float(unknown.value(edges.min())), float(unknown.value(edges.max()))),
        conductance=_conductance(unknown.put(usual, x[:1]), air_properties) if is_explained else None,
        values={},
        ends={},
        draws=(),
        points=_measured(sensors, nominal[0], after if is_believed or is_split else nominal[0]),
        chi_square=chi_square,
        error_scale=scale,
        heat_of=heat_of(case),
        is_split=bool(is_split),
        most_split=int(np.abs(residuals / sensors.error).argmax()),
        tells=tells,
    )
    if not is_explained:
        from lubecheck.studies.explain import explanations

        at, band = usual, (lowest, nominal[0], highest)
        if is_split:  # what sets one apart is looked for from where the others put the cooling, or the fill
            at, band = (
                unknown.put(usual, np.repeat(x[:1], count)),
                (after - sensors.error, after, after + sensors.error),
            )
        return dataclasses.replace(made, explained=explanations(case, at, sensors, band, air_properties))
    names = (USUAL, WORST, *(fact.name for fact in facts))
    of_inputs = values[len(said) :].reshape(-1, 2)
    table = {name: (float(pair[0]), float(pair[1])) for (name, _, _), pair in zip(inputs, of_inputs, strict=True)}
    table[unknown.column] = (made.low, made.high)
    by_reading = dict(zip(names, values[: len(said)].tolist(), strict=True))
    if unknown.column == FILL:
        by_reading = _cautious_fill(by_reading, table)
    drawn = _drawn(case, fit, usual, float(x[0]), (float(ends[0]), float(ends[1])))
    return dataclasses.replace(made, values=by_reading, ends=table, draws=drawn)


def _drawn(case: Case, fit: Fit, usual: Points, x: float, ends: tuple[float, float]) -> tuple[float, ...]:
    """Return the value under each draw of the uncertain inputs, as the band of every figure draws them.

    What the readings leave open takes the scores of the unknown itself: about its fit of each draw, as about the usual.
    """
    inputs = tuple(uncertain(case))
    names = [name for name, _, _ in inputs]
    place = names.index(fit.unknown.column) if fit.unknown.column in names else len(names)
    targets = np.tile(fit.sensors.temperature, (draws.DRAWS, 1))
    found = fit.best(draws.drawn(usual, inputs), targets)
    score = draws.scores(place) / draws.END
    found = found + score * np.where(score > 0, ends[1] - x, x - ends[0])
    made: list[float] = fit.unknown.value(np.clip(found, *fit.unknown.range)).tolist()
    return tuple(made)


def _band(fit: Fit, usual: Points, nominal: Array) -> tuple[Array, Array]:
    """Return the band in which readings can be believed: the uncertain inputs, the unknown and the reading's error.

    nominal: what the sensors would read without the measurements, [usual and each end of the inputs, state]
    """
    own = fit.read(join([usual, usual]), np.array(fit.unknown.believed))
    change = np.concatenate([nominal[1:], own]).reshape(-1, 2, nominal.shape[1]) - nominal[0]
    up = (np.maximum(change.max(axis=1), 0.0) ** 2).sum(axis=0) + fit.sensors.error**2
    down = (np.minimum(change.min(axis=1), 0.0) ** 2).sum(axis=0) + fit.sensors.error**2
    return nominal[0] - np.sqrt(down), nominal[0] + np.sqrt(up)


def _tells(ends: tuple[float, float]) -> str:
    """Return what is told of a fill by the ends that the reading errors leave.

    Grease that clears makes no heat, so that the temperature is flat over the fill from the emptiest up to where it
    clears no more: a hundredth of a kelvin moves the fit from one end of that stretch to the other. So where the
    emptiest is not excluded only the upper end is told, and the fill in service is taken as one that nobody knows.
    """
    if ends[1] - ends[0] >= NEARLY_ALL * (FILLS[1] - FILLS[0]):
        return NOTHING
    return MOST if ends[0] <= FILLS[0] else VALUE


def _cautious_fill(values: Mapping[str, float], ends: Mapping[str, tuple[float, float]]) -> dict[str, float]:
    """Return the fills by reading: where the fill itself is read at its worst, the most that what was measured leaves.

    That is never less than at any other reading: too much is worse for the fill than too little.
    """
    usual, most = values[USUAL], max(values.values())
    more = float(np.sqrt(sum(max(0.0, *(end - usual for end in pair)) ** 2 for pair in ends.values())))
    at_worst = (WORST, "[grease] fill")
    return {name: min(1.0, most + more) if name in at_worst else value for name, value in values.items()}


def _conductance(points: Points, air_properties: Air) -> float | None:
    """Return what the housing gives off to the air a kelvin at the first measured state."""
    state = solve(points.take([0]), air_properties)
    rise = float(state.outer[0] - points.ambient[0])
    watts = sum(float(state.paths[name][0]) for name in ("air", "radiation", "stated"))
    return watts / rise if abs(rise) >= LEAST_RISE else None


def _measured(sensors: Sensors, before: Array, after: Array) -> tuple[MeasuredPoint, ...]:
    # A state without an equilibrium has no temperature to be shown.
    before, after = (np.where(at >= TOP_TEMPERATURE, np.nan, at) for at in (before, after))
    return tuple(
        MeasuredPoint(
            place,
            MeasuredFigures.of(
                {
                    "measured": float(sensors.temperature[i]),
                    "reading_error": float(sensors.error[i]),
                    "before": float(before[i]),
                    "after": float(after[i]),
                    "residual": float(sensors.temperature[i] - after[i]),
                }
            ),
        )
        for i, place in enumerate(sensors.place)
    )
