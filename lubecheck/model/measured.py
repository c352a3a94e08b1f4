"""A measured state: what a reading leaves out, what it may not say, and the case as it stood at the reading."""

from __future__ import annotations

import dataclasses
import math
from collections.abc import Iterator
from typing import Any

from lubecheck.errors import shown
from lubecheck.model.duty_entries import Duty, ShaftForces
from lubecheck.model.entries import Case
from lubecheck.model.entry import entries
from lubecheck.model.measured_entries import Measured
from lubecheck.model.plan_entries import STREAMS
from lubecheck.model.shaft import Problem, loads_of

SETTLED_AFTER_START = 4.0  # h: common practice, the temperature is level 3 to 4 h after a start
SETTLED_AFTER_GREASING = 24.0  # h: common practice, the rise after greasing is gone after about a day
READING_ERROR = 2.0  # K: common practice, 1 to 3 K of a contact thermometer or a resistance sensor at the outer ring
_UNITS = {"mass": "g", "volume": "cm^3", "share": ""}
_AS_WRITTEN = ("running_time", "draught", "shaft_temperature", "fill")  # told back in the user's own unit
_STATE = ("speed", "radial_load", "axial_load")
_FORCES = tuple(key for key, _ in entries(ShaftForces))


def finds_fill(case: Case) -> bool:
    """Tell a case whose unknown is the fill: the cooling is stated, and the fill is not known."""
    return case.is_grease and case.housing.conductance is not None and case.grease.fill == "unknown"


def reading_error(one: Measured) -> float:
    """Return what a reading is good to, K."""
    return READING_ERROR if one.reading_error is None else one.reading_error


def duty_of(case: Case, one: Measured) -> Duty | None:
    """Return the duty point that a measurement stands on; None where it says speed and loads for itself."""
    if one.duty is not None:
        return case.duty[int(one.duty) - 1]
    return case.duty[0] if len(case.duty) == 1 else None


def at_state(case: Case, one: Measured) -> Case:
    """Return the case as it stood at a reading: one duty point, one ambient, the fill of that day."""
    duty = duty_of(case, one) or Duty(speed=one.speed or 0.0, axial_load=one.axial_load or 0.0)
    said = {key: getattr(one, key) for key in (*_STATE, "ambient", "draught", "shaft_temperature")}
    stated = {key: value for key, value in said.items() if value is not None}
    if one.radial_load is not None:
        stated |= dict.fromkeys(_FORCES)
    grease = case.grease
    if one.fill is not None:
        grease = dataclasses.replace(grease, fill=one.fill, given=None, regreasings=None)
    return dataclasses.replace(
        case,
        duty=(dataclasses.replace(duty, share=None, **stated),),
        surroundings=dataclasses.replace(case.surroundings, months=None, ambient_lowest=None, ambient_highest=None),
        grease=grease,
        measured=(),
        calibration=None,
    )


def heat_of(case: Case) -> tuple[Any, ...]:
    """Return all that a case says and that its temperature hangs on: another one is another machine than was read."""
    grease, oil = case.grease, case.oil
    return (
        case.bearing, case.lubricant, case.duty, case.surroundings, case.housing,
        grease.fill, grease.housing_fill, grease.given, grease.regreasings,
        oil.supply, oil.level, oil.flow, oil.inlet, oil.contact,
    )  # fmt: skip


def highest_read(case: Case) -> tuple[float, float]:
    """Return the highest temperature that was read on housing or outer ring, and anywhere; NaN where none was.

    After a change of what heat hangs on, a reading that is explained speaks through its calibration alone. One that
    nothing explains stays until it is read again: its cause may still be there.
    """
    if not case.measured:
        return math.nan, math.nan
    found = case.calibration
    if found is not None and found.is_explained and found.heat_of != heat_of(case):
        return math.nan, math.nan
    outer = [one.temperature for one in case.measured if one.place in (None, "housing", "outer ring")]
    return max(outer, default=math.nan), max((one.temperature for one in case.measured), default=math.nan)


def faults(case: Case, *, is_list: bool) -> Iterator[Problem]:
    """Yield what a measurement lacks, or says beside what excludes it."""
    texts = dict(case.given)
    for i, one in enumerate(case.measured):
        here: tuple[str | int, ...] = ("measured", i) if is_list else ("measured",)
        name = f"measured[{i + 1}]" if is_list else "measured"
        for key, given, expected in _faults(case, one):
            written = texts.get(f"{name}.{key}") if key in _AS_WRITTEN else None
            yield (*here, key), given if written is None else shown(written), expected


def _faults(case: Case, one: Measured) -> Iterator[tuple[str, str, str]]:
    count = len(case.duty)
    is_placed = True
    if one.duty is not None and (one.duty != int(one.duty) or one.duty > count):
        yield "duty", f"{one.duty:g}", f"the number of a duty point, 1 to {count}"
        is_placed = False
    elif one.duty is None and count > 1:
        missing = [key for key in _STATE if getattr(one, key) is None]
        if missing:
            expected = f"duty, or speed, radial_load and axial_load, since there are {count} duty points"
            yield "duty", f"nothing, and no {', '.join(missing)}", expected
            is_placed = False
    if case.opposed is not None and (one.radial_load is not None or (one.duty is None and count > 1)):
        key = "duty" if one.radial_load is None else "radial_load"
        yield key, shown(getattr(one, key)), "no such key beside [shaft] opposed: name the duty point by its number"
        is_placed = False
    around = case.surroundings
    has_seasons = around.months is not None or around.ambient_lowest is not None
    if one.ambient is None and has_seasons and is_placed:
        duty = duty_of(case, one)
        if duty is None or duty.ambient is None:
            expected = "the air temperature at the reading, since the case has one for each month"
            yield "ambient", "nothing", expected
    if one.draught is not None and case.housing.conductance is not None:
        expected = "no such key beside [housing] conductance, which is all heat paths together"
        yield "draught", f"{one.draught:g} m/s", expected
    if one.shaft_temperature is not None and case.housing.machine_heat is not None:
        expected = "either this or [housing] machine_heat: both say what the machine sends"
        yield "shaft_temperature", f"{one.shaft_temperature:g} degC", expected
    yield from _fill_faults(case, one)
    if one.place == "oil outlet" and (
        case.oil.supply not in STREAMS or case.oil.flow is None or case.oil.inlet is None
    ):
        yield "place", shown(one.place), "another place, or an [oil] supply with flow and inlet whose outlet it is"
    if one.running_time is not None and one.running_time < SETTLED_AFTER_START:
        expected = (
            f"at least {SETTLED_AFTER_START:g} h: before that the temperature has not settled, so that it says nothing "
            "of the cooling"
        )
        yield "running_time", f"{one.running_time:g} h", expected
    if is_placed:
        on_bearing = loads_of(*_state_and_duty(case, one))
        if on_bearing.radial == 0 and on_bearing.axial == 0:
            yield "radial_load", "no load at all", "a radial or an axial load above 0 N"


def _state_and_duty(case: Case, one: Measured) -> tuple[Case, Duty]:
    state = at_state(case, one)
    return state, state.duty[0]


def _fill_faults(case: Case, one: Measured) -> Iterator[tuple[str, str, str]]:
    if one.fill is None:
        return
    text = f"{one.fill.value:g} {_UNITS[one.fill.kind]}".rstrip()
    if not case.is_grease:
        yield "fill", text, "no such key: the lubricant is oil"
    elif finds_fill(case):
        yield (
            "fill",
            text,
            'no such key beside [grease] fill = "unknown" and a stated conductance: it is what is sought',
        )
