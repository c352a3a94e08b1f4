"""What contradicts, or lacks, another thing that a case says of its place and its oil.

Each problem is the path of a key, what was given there, and what is expected.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from lubecheck.data.lubricants import Lubricant
from lubecheck.errors import shown
from lubecheck.model.duty_entries import Duty
from lubecheck.model.entries import Requirements
from lubecheck.model.entry import entries
from lubecheck.model.place_entries import Housing, Surroundings
from lubecheck.model.plan_entries import STREAMS, OilPlan
from lubecheck.model.shaft import Problem

JACKET = ("coolant", "coolant_flow", "coolant_inlet")  # a cooling jacket needs all three
_ALL_PATHS = "which is all heat paths together"


def of_place(housing: Housing, duty: Sequence[Duty], around: Surroundings | None) -> Iterator[Problem]:
    """Return what is wrong with the ways heat takes, between the tables that say them."""
    if housing.conductance is not None:
        for key in ("kind", "area"):
            if getattr(housing, key) is not None:
                yield ("housing", key), shown(getattr(housing, key)), f"no such key beside conductance, {_ALL_PATHS}"
    if housing.kind is not None and housing.area is not None:
        yield ("housing", "kind"), shown(housing.kind), "either kind or area: both say how large the housing is"
    if housing.machine_heat is not None and housing.shaft_temperature is not None:
        expected = "either machine_heat or shaft_temperature: both say what the machine sends"
        yield ("housing", "machine_heat"), f"{housing.machine_heat:g} W", expected
    stated = [key for key in JACKET if getattr(housing, key) is not None]
    for key in JACKET:
        if key not in stated and (stated or housing.jacket_area is not None):
            yield ("housing", key), "nothing", "a jacket's coolant, coolant_flow and coolant_inlet"
    if housing.frame_conductance is not None and housing.frame_temperature is None:
        yield ("housing", "frame_temperature"), "nothing", "the frame's temperature"
    if housing.conductance is not None:
        draughts: list[tuple[tuple[str | int, ...], float | None]] = [
            (("duty", i, "draught"), point.draught) for i, point in enumerate(duty)
        ]
        if around is not None:
            draughts.append((("surroundings", "draught"), around.draught))
        for path, draught in draughts:
            if draught is not None:
                yield path, f"{draught:g} m/s", f"no such key beside [housing] conductance, {_ALL_PATHS}"
    for i, point in enumerate(duty):
        if housing.machine_heat is not None and point.shaft_temperature is not None:
            expected = "either this or [housing] machine_heat: both say what the machine sends"
            yield ("duty", i, "shaft_temperature"), f"{point.shaft_temperature:g} degC", expected
    if around is not None:
        yield from _of_seasons(around)


def _of_seasons(around: Surroundings) -> Iterator[Problem]:
    low, high = around.ambient_lowest, around.ambient_highest
    if around.months is not None and (low, high) != (None, None):
        yield ("surroundings", "months"), shown("months and ambient ends"), "one of the two"
    if (low is None) != (high is None):
        missing = "ambient_lowest" if low is None else "ambient_highest"
        yield ("surroundings", missing), "nothing", "both ambient_lowest and ambient_highest, or neither"
    elif low is not None and high is not None and not low <= around.ambient <= high:
        given = f"{around.ambient:g} degC"
        yield ("surroundings", "ambient"), given, f"the mean of the year, between {low:g} and {high:g} degC"


def of_set_points(limits: Requirements, around: Surroundings | None) -> Iterator[Problem]:
    """Return set-points of the sensor that would never warn, or always."""
    alarm, trip = limits.alarm, limits.trip
    if alarm is not None and trip is not None and alarm > trip:
        expected = f"at most [limits] trip, {trip:g} degC: an alarm has to come before the machine is stopped"
        yield ("limits", "alarm"), f"{alarm:g} degC", expected
    for key, point in (("alarm", alarm), ("trip", trip)):
        if around is not None and point is not None and point <= around.ambient:
            expected = f"above [surroundings] ambient, {around.ambient:g} degC: a machine at rest is as warm as that"
            yield ("limits", key), f"{point:g} degC", expected


def of_stream(oil: OilPlan) -> Iterator[Problem]:
    """Return what a stream of oil lacks: it cools by its flow and its inlet temperature, and neither can be guessed."""
    if oil.supply == "circulating":
        for key, entry in entries(OilPlan):
            if key in ("flow", "inlet") and getattr(oil, key) is None:
                yield ("oil", key), "nothing", f"{entry.expected}, since the oil circulates"


def of_still_oil(oil: OilPlan) -> Iterator[Problem]:
    """Return the facts of a stream of oil where no oil flows."""
    for key, unit in (("flow", "l/min"), ("inlet", "degC"), ("contact", "of its warming")):
        value = getattr(oil, key)
        if value is not None and oil.supply not in STREAMS:
            supply = "no supply" if oil.supply is None else f'supply "{oil.supply}"'
            expected = "no such key, or a [oil] supply whose oil flows through the bearing: circulating or jet"
            yield ("oil", key), f"{value:g} {unit} beside {supply}", expected


def of_setting(setting: str, lubricant: Lubricant, oil: OilPlan) -> Iterator[Problem]:
    """Return a setting of ISO 281, Annex A, that is not for this kind of supply.

    The codes of a bath hold for circulating oil that is filtered off-line as well.
    """
    supply = "grease" if lubricant.kind == "grease" else (oil.supply or "bath")
    circuit = setting.partition(" -/")[0]
    if " -/" in setting and circuit != supply and (circuit, supply) != ("bath", "circulating"):
        expected = f"a setting without an oil code, or one for {supply}"
        if supply == "grease":
            expected = "a setting for grease, without an oil code"
        yield ("cleanliness", "setting"), shown(setting), expected
