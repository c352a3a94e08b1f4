"""The means of holding a temperature: each an amount from what there is to an end, as edits of the case file."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass

import numpy as np

from lubecheck.model.entries import TABLES, Case
from lubecheck.model.entry import entries
from lubecheck.model.kernel import Outcome
from lubecheck.model.plan_entries import STREAMS
from lubecheck.physics import grease_amount, oil_life
from lubecheck.studies.changes import LEAST_STREAM, TANK_MINUTES, Edit, usual_inlet
from lubecheck.units import Array

MOST_DRAUGHT = 20.0  # m/s, what a strong fan blows: estimate
MOST_TIMES = 10.0  # of area or conductance; beyond it is another housing: estimate
MOST_FLOW_TIMES = 1000.0  # of the flow that wets a bearing: estimate
COLDEST_INLET = 20.0  # degC, of oil from a cooler with cold water: common practice, 20 to 30
HOTTEST_INLET = 120.0  # degC; mineral oil is not sent into a bearing hotter: estimate
HOTTEST_SHAFT = 200.0  # degC: estimate
LEAST_LEFT = 0.1  # of what there is, where less would do as well

Edits = Callable[[float], tuple[Edit, ...]]


@dataclass(frozen=True, slots=True)
class Means:
    """One thing to change: from what there is to an end that is better, and to one that is worse."""

    name: str
    unit: str
    now: float | None  # None: there is none of it yet
    better: float
    worse: float
    edits: Edits
    least: float = math.nan  # where the search begins, where there is none of it yet
    is_log: bool = False
    note: Callable[[float], str] = lambda _: ""

    def between(self, start: float, end: float, count: int) -> Array:
        """Return amounts from one to another, both with them."""
        places: Array = np.geomspace(start, end, count) if self.is_log else np.linspace(start, end, count)
        places[0], places[-1] = start, end
        return places


def _range(table: str, key: str) -> tuple[float, float]:
    """The range in house units that a case may state."""
    entry = dict(entries(TABLES[table]))[key]
    return entry.low, entry.high


def means_of(case: Case, now: Outcome) -> Iterator[Means]:
    """Return the means that a position has; `now` is its outcome as it stands."""
    yield from _cooling(case, now)
    if case.is_grease:
        yield from _fill(case, now)
    elif case.oil.supply in STREAMS:
        yield from _stream(case, now)
    elif case.oil.supply in (None, "bath") and case.bearing.sealed_sides < 2:
        yield _new_stream(case)
    yield from _heat(case, now)


def _cooling(case: Case, now: Outcome) -> Iterator[Means]:
    housing, points = case.housing, now.points
    if housing.conductance is not None:
        held = housing.conductance
        low, high = _range("housing", "conductance")
        yield Means("housing conductance", "W/K", held, min(MOST_TIMES * held, high), max(LEAST_LEFT * held, low),
                    lambda x: (("housing.conductance", f"{x:.12g} W/K"),), is_log=True,
                    note=lambda x: f"{x / held:.3g} times")  # fmt: skip
        return
    draught = float(points.draught[now.hottest[0]])
    yield Means("draught", "m/s", draught, max(MOST_DRAUGHT, draught), 0.0, lambda x: _draughts(case, draught, x))
    area = float(points.housing_area[0]) / 1e6
    low, high = (end / 1e6 for end in _range("housing", "area"))

    def areas(x: float) -> tuple[Edit, ...]:
        kind: tuple[Edit, ...] = (("housing.kind", None),) if housing.kind is not None else ()
        return (*kind, ("housing.area", f"{x:.12g} m^2"))

    most, least = min(MOST_TIMES * area, high), max(LEAST_LEFT * area, low)
    yield Means("housing area", "m^2", area, most, least, areas, is_log=True,
                note=lambda x: f"{x / area:.3g} times{', with fins or a bigger housing' * (x > area)}")  # fmt: skip


def _draughts(case: Case, now: float, x: float) -> tuple[Edit, ...]:
    """Every duty point with at least that draught, or at most where less is asked about."""
    bound = max if x >= now else min
    own = tuple((f"duty[{i}].draught", f"{bound(duty.draught, x):.12g} m/s")
                for i, duty in enumerate(case.duty, start=1) if duty.draught is not None)  # fmt: skip
    around = bound(case.surroundings.draught or 0.0, x)
    return (("surroundings.draught", f"{around:.12g} m/s"), *own)


def _fill(case: Case, now: Outcome) -> Iterator[Means]:
    points, row = now.points, int(now.hottest[0])
    if points.is_sealed[0] > 0 or not now.state.held_volume[: len(points)].any():
        return  # its maker filled it, or the fill makes no heat: less of it would not help
    least, _ = grease_amount.allowed_fill.plain(
        speed=points.speed[row], speed_limit=points.speed_limit[row], pitch_diameter=points.pitch_diameter[row]
    )
    grams = float(points.free_volume[0]) * float(points.density[0]) / 1000
    plan = case.grease
    # What was given counts on top of the fill: the fill that is asked for is all there may be.
    taken: tuple[Edit, ...] = tuple(
        (f"grease.{key}", None) for key in ("given", "given_on", "regreasings") if getattr(plan, key) is not None
    )
    fill = float(points.fill[row])
    yield Means("fill", "1", fill, min(float(least), fill), max(1.0, fill),
                lambda x: (("grease.fill", f"{100 * x:.12g} %"), *taken),
                note=lambda x: f"{x * grams:.1f} g of the {fill * grams:.1f} g there are")  # fmt: skip


def _flow_range(case: Case) -> tuple[float, float]:
    wetting = float(oil_life.guide_flow.plain(outside=case.bearing.outside, width=case.bearing.width))
    return LEAST_STREAM, MOST_FLOW_TIMES * max(wetting, LEAST_STREAM)


def _stream(case: Case, now: Outcome) -> Iterator[Means]:
    oil = case.oil
    if oil.flow:
        least, most = _flow_range(case)
        yield Means("oil flow", "l/min", oil.flow, max(most, MOST_TIMES * oil.flow), min(least, oil.flow),
                    lambda x: (("oil.flow", f"{x:.12g} l/min"),), is_log=True,
                    note=lambda x: f"{x / (oil.flow or 1):.3g} times, {_inlet_words(oil.inlet)}")  # fmt: skip
    if oil.inlet is not None and oil.flow:
        yield Means("oil inlet", "degC", oil.inlet, min(COLDEST_INLET, oil.inlet), max(HOTTEST_INLET, oil.inlet),
                    lambda x: (("oil.inlet", f"{x:.12g} degC"),))  # fmt: skip


def _inlet_words(inlet: float | None) -> str:
    return "" if inlet is None else f"{inlet:g} degC at the inlet"


def _new_stream(case: Case) -> Means:
    """Oil that circulates through a cooler in place of the bath."""
    inlet = usual_inlet(case)
    least, most = _flow_range(case)

    def edits(x: float) -> tuple[Edit, ...]:
        gone: tuple[Edit, ...] = (("oil.level", None),) if case.oil.level is not None else ()
        tank: tuple[Edit, ...] = (("oil.volume", f"{TANK_MINUTES * x:.12g} l"),) if case.oil.volume is not None else ()
        return (("oil.supply", "circulating"), ("oil.flow", f"{x:.12g} l/min"), ("oil.inlet", f"{inlet:g} degC"),
                *gone, *tank)  # fmt: skip

    return Means("oil flow", "l/min", None, most, least, edits, least=least, is_log=True,
                 note=lambda _: f"circulating in place of the bath, {_inlet_words(inlet)}")  # fmt: skip


def _heat(case: Case, now: Outcome) -> Iterator[Means]:
    housing = case.housing
    if housing.machine_heat:
        watts = housing.machine_heat
        yield Means("machine heat", "W", watts, 0.0, MOST_TIMES * watts,
                    lambda x: (("housing.machine_heat", f"{x:.12g} W"),))  # fmt: skip
    stated = [housing.shaft_temperature, *(duty.shaft_temperature for duty in case.duty)]
    known = [shaft for shaft in stated if shaft is not None]
    if known:
        hottest, coolest = max(known), float(now.points.ambient.min())
        yield Means("shaft temperature", "degC", hottest, min(coolest, hottest), max(HOTTEST_SHAFT, hottest),
                    lambda x: _shafts(case, hottest, x))  # fmt: skip


def _shafts(case: Case, hottest: float, x: float) -> tuple[Edit, ...]:
    """Every stated shaft temperature held to a highest, or the hottest of them raised to it."""
    tables = [("housing", case.housing.shaft_temperature)]
    tables += [(f"duty[{i}]", duty.shaft_temperature) for i, duty in enumerate(case.duty, start=1)]
    return tuple(
        (f"{table}.shaft_temperature", f"{x if shaft == hottest else min(shaft, x):.12g} degC")
        for table, shaft in tables
        if shaft is not None
    )
