"""A shared oil circuit: what the debris of one damaged bearing does to all the others, and what a filter is worth.

All positions, in every state of the oil and at the usual and the worst reading of what their cases leave out, are rows
of one kernel call.
"""

from __future__ import annotations

import dataclasses
import functools
import math
from dataclasses import dataclass

import numpy as np

from lubecheck.data import air
from lubecheck.model import calibration_words, limits, wording
from lubecheck.model.check import readings
from lubecheck.model.circuit import Circuit
from lubecheck.model.cleanliness import numbers_of
from lubecheck.model.equilibrium import Air
from lubecheck.model.kernel import Outcome, judge
from lubecheck.model.points import BEYOND_SETTINGS, Points, from_rows, join
from lubecheck.model.rows import rows_of
from lubecheck.physics import cleanliness, fatigue
from lubecheck.studies.calibrate import calibrated

CAUTIONS = (
    "Life is statistical: of many such circuits the stated share runs longer without a pit; one may fail sooner",
    f"The end is the first pit of about {fatigue.PIT_AREA:g} mm^2: replace then, seizure or break-up can follow",
    "Debris dents raceways for good: filtering or an oil change brings back the film, not the raceways that ran in "
    "debris; the filtered life holds for bearings that are sound",
)


@dataclass(frozen=True, slots=True)
class OilState:
    """One state of the oil and the class of ISO 281 that it falls in."""

    name: str
    code: str
    filter: str
    setting: str


@dataclass(frozen=True, slots=True)
class MemberLife:
    """One position in one state of the oil."""

    life_h: float | None
    state: str
    contamination_factor: float | None
    life_modification_factor: float | None


@dataclass(frozen=True, slots=True)
class MemberResult:
    """One position of the circuit."""

    name: str
    title: str
    bearing: str
    is_damaged: bool
    wanted_life_h: float
    temperature: float | None  # degC, of the duty point that runs hottest
    viscosity_ratio: float | None
    lives: tuple[MemberLife, ...]  # in the order of the states
    unsaid: tuple[str, ...]  # what the case leaves out that could move this


@dataclass(frozen=True, slots=True)
class CircuitResult:
    """The lives of all positions of a circuit, and of the whole of it."""

    title: str
    verdict: str  # of the oil as it is
    lubricant: str
    oil_temperature: float | None  # degC
    states: tuple[OilState, ...]
    members: tuple[MemberResult, ...]
    system_life_h: tuple[float | None, ...]  # of all positions together, in the order of the states
    others_life_h: tuple[float | None, ...]  # of all but the damaged one
    debris_costs_h: float | None  # of the others' life together
    filter_is_worth_h: float | None
    debris_uses: float | None  # share of the others' life that the stated hours with debris use up
    notes: tuple[str, ...]
    cautions: tuple[str, ...]


def study(circuit: Circuit, *, air_properties: Air = air.properties) -> CircuitResult:
    """Return what the circuit does to the life of its positions, in each state of its oil."""
    circuit = dataclasses.replace(
        circuit,
        members=tuple(
            dataclasses.replace(member, case=calibrated(member.case, air_properties=air_properties))
            for member in circuit.members
        ),
    )
    states = oil_states(circuit)
    said = [readings(member.case) for member in circuit.members]
    # Positions in the order member, reading (usual, worst).
    points = join(
        from_rows(rows_of(member.case, reading))
        for member, (_, of_case) in zip(circuit.members, said, strict=True)
        for reading in of_case[:2]
    )
    water = circuit.table.water
    points = points if water is None else points.changed(water=water)
    temperature, notes = _shared_temperature(circuit, points, air_properties)
    # A bearing that stands in the oil has its temperature; one that a stream of known flow cools is solved for.
    is_held = points.oil_conductance == 0
    points = points.changed(
        held_temperature=np.where(is_held, temperature, np.nan),
        oil_inlet=np.where(is_held, points.oil_inlet, temperature),
    )
    codes = [_code_of(state.setting) for state in states]
    outcome = judge(join(points.changed(setting=code) for code in codes), air_properties)
    lives = outcome.modified_life.reshape(len(states), len(circuit.members), 2)
    judged = outcome.judged["fatigue_life"].state.reshape(lives.shape)
    members = tuple(
        _member(circuit, i, outcome, lives[:, i], judged[:, i], [fact.name for fact in said[i][0]
                                                                 if "fatigue_life" in fact.limits])
        for i in range(len(circuit.members))
    )  # fmt: skip
    others = [i for i, member in enumerate(members) if not member.is_damaged]
    system = tuple(_together(lives[s, :, 0]) for s in range(len(states)))
    rest = tuple(_together(lives[s, others, 0]) for s in range(len(states)))
    worst = max((member.lives[0].state for member in members), key=limits.STATES.index)
    return CircuitResult(
        title=circuit.title,
        verdict=worst,
        lubricant=wording.lubricant(circuit.members[0].case.lubricant),
        oil_temperature=_finite(temperature),
        states=states,
        members=members,
        system_life_h=system,
        others_life_h=rest,
        debris_costs_h=_difference(rest, 0, 1),
        filter_is_worth_h=_difference(rest, 2, 1),
        debris_uses=_used(circuit, rest),
        notes=(*notes, *_measured(circuit)),
        cautions=CAUTIONS + wording.SAFETY,
    )


def _measured(circuit: Circuit) -> list[str]:
    """Say which positions stand on measured temperatures."""
    return [
        f"{member.name}: {calibration_words.said(member.case.calibration)}"
        for member in circuit.members
        if member.case.calibration is not None
    ]


def oil_states(circuit: Circuit) -> tuple[OilState, ...]:
    """Return the states of the oil that a circuit asks for: as it is, with debris, filtered."""
    table = circuit.table
    now = table.filter or "none"
    asked = [("as it is", table.code, now), ("with debris", table.debris_code, now)]
    asked.append(("filtered", table.filtered_code, table.filtered_by or now))
    states = []
    for name, code, placed in asked:
        numbers = None if code is None else numbers_of(code)
        if code is not None and numbers is not None:
            setting = cleanliness.setting_named(numbers, is_in_line=placed == "in line")
            states.append(OilState(name, code, placed, setting))
    return tuple(states)


def _code_of(setting: str) -> int:
    """Return the code of a setting; oil dirtier than ISO 281 has one for leaves the lives unknown."""
    return BEYOND_SETTINGS if setting == fatigue.OFF_SCALE else fatigue.SETTINGS.index(setting)


def _shared_temperature(circuit: Circuit, points: Points, air_properties: Air) -> tuple[float, list[str]]:
    """Return the temperature of the oil: as stated, or the hottest that a position finds for itself."""
    stated = circuit.table.oil_temperature
    if stated is not None:
        return stated, []
    state = judge(points, air_properties).state
    hottest = float(state.temperature.max())  # one position without an equilibrium leaves it unknown
    found = f"the hottest position's, {hottest:.0f} degC" if math.isfinite(hottest) else "not found"
    return hottest, [f"oil temperature not said: {found}; state [circuit] oil_temperature where it is measured"]


def _member(
    circuit: Circuit, i: int, outcome: Outcome, lives: np.ndarray, judged: np.ndarray, unsaid: list[str]
) -> MemberResult:
    member = circuit.members[i]
    count = len(circuit.members)
    of_states = []
    for s in range(len(lives)):
        position = s * 2 * count + 2 * i
        rows = outcome.points.case == position
        usual, worst = int(judged[s, 0]), int(judged[s, 1])
        if worst > usual:
            usual = worst if worst == limits.NEAR_CODE else max(usual, limits.UNKNOWN)
        of_states.append(
            MemberLife(
                life_h=_finite(lives[s, 0]),
                state=limits.STATES[usual],
                contamination_factor=_finite(outcome.contamination[rows].min()),
                life_modification_factor=_finite(outcome.life_factor[rows].min()),
            )
        )
    hottest = int(outcome.hottest[2 * i])
    return MemberResult(
        name=member.name,
        title=member.case.title,
        bearing=wording.bearing(member.case.bearing),
        is_damaged=member.name == circuit.table.damaged,
        wanted_life_h=float(outcome.points.life_target[hottest]),
        temperature=_finite(outcome.state.temperature[hottest]),
        viscosity_ratio=_finite(outcome.kappa[hottest]),
        lives=tuple(of_states),
        unsaid=tuple(unsaid),
    )


def _together(lives: np.ndarray) -> float | None:
    """Return the life of several positions together; None where one of them is not known."""
    if not len(lives) or not np.isfinite(lives).all():
        return None
    return float(functools.reduce(lambda a, b: fatigue.joint_life.plain(first=a, second=b), lives))


def _used(circuit: Circuit, lives: tuple[float | None, ...]) -> float | None:
    """Return the damage of the hours with debris, by the linear sum of damage."""
    hours = circuit.table.hours_with_debris
    life = lives[1] if len(lives) > 1 else None
    return None if hours is None or life is None else hours / life


def _difference(lives: tuple[float | None, ...], more: int, less: int) -> float | None:
    if max(more, less) >= len(lives):
        return None
    first, second = lives[more], lives[less]
    return None if first is None or second is None else first - second


def _finite(value: float) -> float | None:
    return float(value) if math.isfinite(value) else None
