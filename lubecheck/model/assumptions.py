"""What a fact that was left out may be: a usual reading, and the worst that it may be.

A position is judged at both. Where the verdict of a limit is the same, the missing fact does not matter; where it is
not, the limit is `unknown` and says which fact would settle it. So taking a fact away never improves a verdict, and
nothing is assumed in silence. A decision left out (a fill, an interval) is no fact: it is proposed.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass
from typing import Any

from lubecheck.model.entries import Case
from lubecheck.physics import cleanliness, friction, grease_amount, grease_life, heat_paths, seal_friction

# Multiples of D^2 that the outer area of a housing comes to. Estimates of this program from ordinary proportions of
# such housings, (low, nominal, high); a flange is the smallest.
HOUSING_AREA = {
    "pedestal": (6.0, 9.0, 14.0),
    "split plummer": (7.0, 11.0, 16.0),
    "flange": (4.0, 6.0, 9.0),
    "motor end shield": (7.0, 12.0, 20.0),
    "gearbox wall": (5.0, 10.0, 20.0),
}
SMALLEST_AREA = min(low for low, _, _ in HOUSING_AREA.values())

# mm, where 0.00411 (1 - 3.8974/Dpw^(1/3)) and 0.00617 (1 - 4.06/Dpw^(1/3)) of ISO 281, Annex A, meet
DIRTIEST_CODE_FROM = 84.3
# Time from rest to speed. The rule of the shortest is an estimate: unloaded motors started direct on line need about
# 0.05 s with small bearings and 0.3 s with large ones, since inertia grows faster with size than torque. A case may not
# state less, so that leaving it unsaid is never milder than saying it.
ORDINARY_RUN_UP = 5.0  # s: estimate, a start that nobody calls rapid takes 2 to 20 s
SHORTEST_RUN_UP = 1e-3  # s a mm of mean diameter
WETTEST_OIL = cleanliness.WATER_RANGE[1]  # beyond it the effect on life is not known
WET = tuple(answer.word for answer in grease_life.WATER[-2:])  # surroundings that put water into the oil
PROPOSED_HOUSING_FILL = grease_amount.HOUSING_FILL["horizontal"][1]
LARGEST_ALTITUDE = 5000e3  # mm, the highest that a case may state


@dataclass(frozen=True, slots=True)
class Fact:
    """A fact that may be left out: where it stands, its usual and its worst reading, and the limits it can move."""

    table: str
    key: str
    usual: Any
    worst: Any
    text: str  # how the usual reading is listed
    basis: str
    limits: tuple[str, ...]
    is_missing: Callable[[Case], bool]

    @property
    def name(self) -> str:
        """The key as a user writes it."""
        return f"[[duty]] {self.key}" if self.table == "duty" else f"[{self.table}] {self.key}"


THERMAL = ("film", "temperature", "set_point", "interval", "fatigue_life")


def _missing(table: str, key: str, *, grease: bool | None = None) -> Callable[[Case], bool]:
    def test(case: Case) -> bool:
        return getattr(getattr(case, table), key) is None and (grease is None or case.is_grease == grease)

    return test


def is_bath(case: Case) -> bool:
    """Tell an oil bath, which is also what a supply that nobody named is read as."""
    return not case.is_grease and case.oil.supply in (None, "bath")


def _is_estimated(key: str) -> Callable[[Case], bool]:
    return lambda case: key in case.bearing.estimated


def _no_cooling(case: Case) -> bool:
    return case.housing.kind is None and case.housing.area is None and case.housing.conductance is None


def _no_machine_heat(case: Case) -> bool:
    housing = case.housing
    return housing.machine_heat is None and housing.shaft_temperature is None


def _no_altitude(case: Case) -> bool:
    return case.surroundings.altitude is None and case.housing.conductance is None


def _no_setting(case: Case) -> bool:
    return case.setting is None and not case.is_beyond_settings


def _is_worse_in_a_bath(case: Case) -> bool:
    """Tell whether e_C of the dirtiest oil code is below that of "very severe": from a pitch diameter of 84 mm up."""
    return not case.is_grease and (case.bearing.bore + case.bearing.outside) / 2 > DIRTIEST_CODE_FROM


def _no_grease_hours(case: Case) -> bool:
    return case.is_grease and case.grease.hours_per_day is None


def _plans_running_hours(case: Case) -> bool:
    return case.grease.interval is not None and not case.grease.interval.is_calendar


def _may_be_wet(case: Case) -> bool:
    # What surrounds it and was not said may be wet as well.
    return not case.is_grease and case.water is None and case.surroundings.water in (None, *WET)


FACTS: tuple[Fact, ...] = (
    Fact("surroundings", "draught", 0.0, 0.0, "still air", "common-practice", THERMAL,
         lambda case: case.surroundings.draught is None and case.housing.conductance is None),
    Fact("surroundings", "altitude", 1000e3, LARGEST_ALTITUDE, "up to 1000 m", "iec-60034", THERMAL, _no_altitude),
    Fact("surroundings", "dust", "normal", "very dusty", "normal", "common-practice", ("interval",),
         _missing("surroundings", "dust", grease=True)),
    Fact("surroundings", "water", "dry", "wet", "dry", "common-practice", ("interval",),
         lambda case: case.surroundings.water is None and (case.is_grease or case.oil.supply != "mist")),
    Fact("surroundings", "vibration", "smooth", "severe", "smooth", "common-practice", ("interval", "static_load"),
         _missing("surroundings", "vibration")),
    Fact("surroundings", "orientation", "horizontal", "vertical", "horizontal", "common-practice", ("fill", *THERMAL),
         _missing("surroundings", "orientation")),
    Fact("housing", "kind", "pedestal", "smallest", "pedestal", "own-estimate", THERMAL, _no_cooling),
    # What a machine sends cannot be guessed, nor bounded: not a number, so that what hangs on it is not judged.
    Fact("housing", "machine_heat", 0.0, math.nan, "none", "own-estimate", THERMAL, _no_machine_heat),
    Fact("bearing", "cage", "metal", "polyamide", "metal", "common-practice", ("temperature",),
         lambda case: case.bearing.cage is None),
    *(Fact("bearing", key, "estimate", "low", "estimated", "iso-281", ("fatigue_life", "static_load"),
           _is_estimated(key)) for key in ("dynamic_rating", "static_rating", "fatigue_limit")),
    Fact("housing", "solar", 0.0, 0.0, "none, in the shade", "common-practice", THERMAL,
         lambda case: case.housing.solar is None),
    Fact("housing", "void", None, 0.0, "as much as the bearing's free volume", "own-estimate",
         ("fill", "regrease_amount", *THERMAL), _missing("housing", "void", grease=True)),
    Fact("housing", "relief", "closed", "closed", "closed", "common-practice", ("fill", *THERMAL),
         _missing("housing", "relief", grease=True)),
    Fact("grease", "fill", 0.5, 1.0, "30 to 100 %", "common-practice", ("fill", *THERMAL),
         lambda case: case.is_grease and case.grease.fill == "unknown"),
    Fact("grease", "housing_fill", PROPOSED_HOUSING_FILL, 1.0, "40 % beside an unknown fill", "common-practice",
         ("fill", *THERMAL), lambda case: case.grease.fill == "unknown" and case.grease.housing_fill is None),
    Fact("grease", "hours_per_day", 24.0, 24.0, "24 h", "common-practice", ("interval",),
         lambda case: _no_grease_hours(case) and not _plans_running_hours(case)),
    # Grease ages at rest too: an interval in running hours is worst for a machine that hardly runs.
    Fact("grease", "hours_per_day", 24.0, 0.1, "24 h", "common-practice", ("interval",),
         lambda case: _no_grease_hours(case) and _plans_running_hours(case)),
    Fact("oil", "supply", "bath", "bath", "bath", "common-practice", THERMAL, _missing("oil", "supply", grease=False)),
    Fact("oil", "level", "middle", "flooded", "the middle of the lowest rolling element", "neale",
         ("oil_level", *THERMAL), lambda case: not case.is_grease and case.oil.level is None and is_bath(case)),
    Fact("oil", "hours_per_day", 24.0, 24.0, "24 h", "common-practice", ("interval",),
         _missing("oil", "hours_per_day", grease=False)),
    Fact("duty", "acceleration", "ordinary", "shortest", f"no rapid starts or stops, {ORDINARY_RUN_UP:g} s to speed",
         "own-estimate", ("acceleration",), lambda case: any(duty.acceleration is None for duty in case.duty)),
    Fact("cleanliness", "setting", "normal", "very severe", "normal cleanliness", "iso-281:annex A", ("fatigue_life",),
         lambda case: _no_setting(case) and not _is_worse_in_a_bath(case)),
    Fact("cleanliness", "setting", "normal", "bath -/21/18", "normal cleanliness", "iso-281:annex A", ("fatigue_life",),
         lambda case: _no_setting(case) and _is_worse_in_a_bath(case)),
    Fact("cleanliness", "water", 0.0, WETTEST_OIL, "dry", "cantley", ("fatigue_life",), _may_be_wet),
)  # fmt: skip


def at_worst(reading: Mapping[str, Any]) -> tuple[str, ...]:
    """Return the facts that a reading reads at their worst, where that is not the usual."""
    return tuple(
        dict.fromkeys(
            fact.name for fact in FACTS
            if fact.name in reading and _is(reading[fact.name], fact.worst) and not _is(fact.usual, fact.worst)
        )
    )  # fmt: skip


def _is(value: Any, other: Any) -> bool:
    """Tell the same value; what is not a number is the same as another that is none."""
    return bool(value == other or (value != value and other != other))


def missing(case: Case) -> tuple[Fact, ...]:
    """Return the facts that a case leaves out."""
    return tuple(fact for fact in FACTS if fact.is_missing(case))


# Ends of the factors that the uncertain inputs are multiplied with, taken as 95 % ranges.
# Palmgren's lubricant torque is good to about x 0.7 to 1.5 for one bearing (from memory); the kind of supply has its
# own published range on top for grease.
F0_RANGE = {"grease": (0.6, 1.8), "oil": (0.7, 1.5)}
F1_RANGE = (0.7, 1.5)  # Harris against ISO 15312: the load factor differs by this much between sources
CHURNING_RANGE = (0.5, 2.0)  # yield stress of soap greases of one NLGI grade (Palacios): halved to doubled
SHAFT_RANGE = (0.5, 2.0)  # coefficient and length of the shaft: estimates
AREA_RANGE = (0.8, 1.25)  # a stated area still leaves the coefficient of air, about 20 % (Churchill)
STREAM_RANGE = (0.6, 1.6)  # of the share of its warming that oil takes in the bearing: 0.3 to 0.8, estimate
COOLANT_RANGE = (0.5, 1.5)  # duct and wall of a jacket that nobody described, estimate
CONDUCTANCE_RANGE = (0.9, 1.1)  # a stated conductance: as good as a measurement, estimate


def proposed_housing_fill(case: Case) -> float:
    """Return the share of the space beside the bearing that is proposed to be filled; level where it is not said."""
    return grease_amount.HOUSING_FILL[case.surroundings.orientation or "horizontal"][1]


def uncertain(case: Case) -> Iterator[tuple[str, float, float]]:
    """Return the uncertain inputs of a case: the field of the points, and the factors at its low and high end."""
    yield "cooling_factor", *_cooling_range(case)
    yield "f0_factor", *F0_RANGE[case.lubricant.kind]
    yield "f1_factor", *F1_RANGE
    yield "mixed_factor", friction.MIXED_FILM.low, friction.MIXED_FILM.high
    yield "ring_factor", heat_paths.RING.low, heat_paths.RING.high
    if case.bearing.seal == "contact seals":
        yield "seal_factor", seal_friction.SEAL_RANGE.low, seal_friction.SEAL_RANGE.high
    if case.housing.frame_temperature is not None and case.housing.frame_conductance is None:
        joint = heat_paths.JOINT
        yield "frame_conductance", joint.low / joint.nominal, joint.high / joint.nominal
    if case.oil.flow is not None and case.oil.contact is None:
        yield "oil_conductance", *STREAM_RANGE
    if case.housing.coolant is not None:
        yield "coolant_conductance", *COOLANT_RANGE
    if case.housing.shaft_temperature is not None:
        yield "shaft_conductance", *SHAFT_RANGE
    for key in ("dynamic_rating", "static_rating", "fatigue_limit"):
        if key in case.bearing.estimated:
            yield key, *case.bearing.estimated[key]
    if case.is_grease:
        yield "churning_factor", *CHURNING_RANGE


def _cooling_range(case: Case) -> tuple[float, float]:
    if case.housing.conductance is not None:
        return CONDUCTANCE_RANGE
    if case.housing.area is not None:
        return AREA_RANGE
    low, nominal, high = HOUSING_AREA[case.housing.kind or "pedestal"]
    return low / nominal, high / nominal


def admissible_cooling(case: Case) -> tuple[float, float]:
    """Return the factors on the estimated cooling that a housing can have.

    The range of its area, of any kind where none is stated, and of the coefficient of air; a stated conductance has its
    own range, which holds both.
    """
    if case.housing.conductance is not None or case.housing.area is not None:
        return _cooling_range(case)
    low, high = _cooling_range(case)
    if case.housing.kind is None:
        nominal = HOUSING_AREA["pedestal"][1]
        low, high = (end / nominal for end in (SMALLEST_AREA, max(high for _, _, high in HOUSING_AREA.values())))
    return low * AREA_RANGE[0], high * AREA_RANGE[1]
