"""The shaft on two bearings: what the forces on it, and the opposed bearing's thrust, mean for this bearing.

A case states either the radial load of a duty point, or the forces on the shaft and where they act; the reactions then
follow by statics. What the case contradicts or leaves half said is a fault and found by `faults`.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

import numpy as np

from lubecheck.data.bearings import Bearing
from lubecheck.model.assumptions import ORDINARY_RUN_UP, SHORTEST_RUN_UP
from lubecheck.model.duty_entries import Duty, Shaft, ShaftForces
from lubecheck.model.entries import Case
from lubecheck.model.entry import Amount, entries
from lubecheck.model.place_entries import Surroundings
from lubecheck.physics import loads, statics
from lubecheck.units import GRAVITY, HOUR_S

# Each force on the shaft, where it acts, and its direction in degrees from straight down (None: stated).
_FORCES = (
    ("rotor_weight", "rotor_at", 0.0),
    ("coupling_weight", "coupling_at", 0.0),
    ("belt_pull", "belt_at", None),
)
_NO_LOAD = 1e-9  # N, what rounding leaves of forces that cancel
_KEYS = tuple(key for key, _ in entries(ShaftForces))


@dataclass(frozen=True, slots=True)
class OnBearing:
    """What one duty point puts on the bearing, N; the thrusts are those that radial loads set free."""

    radial: float
    axial: float
    other_radial: float | None = None  # of the shaft's other bearing, where it is known
    own_thrust: float = 0.0
    other_thrust: float = 0.0
    down: float | None = None  # parts of the radial load by statics; None where it was stated
    across: float | None = None


def stated(shaft: Shaft, duty: Duty, key: str) -> Any:
    """Return a key of the shaft's forces: the duty point's own goes before that of [shaft]."""
    own = getattr(duty, key)
    return getattr(shaft, key) if own is None else own


def loads_of(case: Case, duty: Duty) -> OnBearing:
    """Return the loads on the bearing in one duty point."""
    down = across = other = None
    radial = duty.radial_load
    if radial is None:
        (down, across), other_parts = (_reaction(case.shaft, duty, of_other=of_other) for of_other in (False, True))
        radial = float(statics.resultant.plain(down=down, across=across))
        other = float(statics.resultant.plain(down=other_parts[0], across=other_parts[1]))
    elif case.opposed is not None:
        other = duty.opposed_radial_load
    own_thrust = _thrust(case.bearing, radial)
    if case.opposed is None or other is None:
        # The stated axial load is this bearing's own; a bearing that sets thrust free carries no less than that.
        axial = math.copysign(max(abs(duty.axial_load), own_thrust), duty.axial_load)
        return OnBearing(radial, axial, other, own_thrust, 0.0, down, across)
    other_thrust = _thrust(case.opposed, other)
    axial = float(
        loads.opposed_axial_load.plain(external=duty.axial_load, own_thrust=own_thrust, other_thrust=other_thrust)
    )
    return OnBearing(radial, axial, other, own_thrust, other_thrust, down, across)


def _reaction(shaft: Shaft, duty: Duty, *, of_other: bool) -> tuple[float, float]:
    """Return the reaction of this bearing, or of the other, down and across."""
    span = stated(shaft, duty, "span")
    down = across = 0.0
    for key, place, direction in _FORCES:
        force = stated(shaft, duty, key)
        if force is None:
            continue
        angle = stated(shaft, duty, "belt_direction") or 0.0 if direction is None else direction
        position = stated(shaft, duty, place)
        parts = statics.bearing_load.plain(
            newtons(force), angle, position=span - position if of_other else position, span=span
        )
        down, across = down + float(parts[0]), across + float(parts[1])
    return down, across


def newtons(force: Amount | float) -> float:
    """Return a weight, stated as force or as mass, in N."""
    if isinstance(force, Amount):
        return force.value * GRAVITY / 1000 if force.kind == "mass" else force.value
    return force


def induces_thrust(bearing: Bearing) -> bool:
    """Tell a bearing in which a radial load sets an axial force free."""
    return _thrust(bearing, 1.0) > 0


def _thrust(bearing: Bearing, radial: float) -> float:
    rule = np.intp(loads.RULES.index(bearing.load_rule))
    return float(loads.induced_thrust.plain(radial, bearing.contact_angle or 0.0, rule))


def acceleration_of(duty: Duty, bearing: Bearing, reading: str) -> float:
    """Return the angular acceleration of starts and stops, rad/s^2, as stated or by the reading of what is not."""
    speed = duty.speed * math.pi / 30
    if duty.acceleration is None:
        return speed / (ORDINARY_RUN_UP if reading == "ordinary" else SHORTEST_RUN_UP * bearing.pitch_diameter)
    if duty.acceleration.kind == "time":
        return speed / (duty.acceleration.value * HOUR_S)
    return duty.acceleration.value


Problem = tuple[tuple[str | int, ...], str, str]  # key, what was given, what is expected


def faults(shaft: Shaft, duties: tuple[Duty, ...], surroundings: Surroundings | None) -> Iterator[Problem]:
    """Yield what is half said or said twice about the forces on the shaft."""
    for i, duty in enumerate(duties):
        here: tuple[str | int, ...] = ("duty", i)
        said = [key for key in _KEYS if stated(shaft, duty, key) is not None]
        if duty.radial_load is not None:
            if said:
                expected = f"either radial_load or the forces on the shaft ({', '.join(said)}): both say the load"
                yield (*here, "radial_load"), f"{duty.radial_load:g} N", expected
            continue
        if not said:
            known = dict(entries(Duty))["radial_load"].expected
            yield (*here, "radial_load"), "nothing", f"{known}, or [shaft] with the forces and their places"
            continue
        yield from _half_said(shaft, duty, here, said, surroundings)


def _half_said(
    shaft: Shaft, duty: Duty, here: tuple[str | int, ...], said: list[str], surroundings: Surroundings | None
) -> Iterator[Problem]:
    partners = [(force, place) for force, place, _ in _FORCES]
    for force, place in (*partners, ("belt_pull", "belt_direction")):
        is_direction_idle = place == "belt_direction" and not {"rotor_weight", "coupling_weight"} & set(said)
        for key, other in ((force, place), (place, force)):
            if key in said and other not in said and not (key == "belt_pull" and is_direction_idle):
                yield ("shaft", other), "nothing", f"{other}, since {key} is given"
    if "span" not in said:
        yield ("shaft", "span"), "nothing", dict(entries(Shaft))["span"].expected
    if not any(force in said for force, _ in partners):
        yield ("shaft", "rotor_weight"), "nothing", "a force on the shaft: rotor_weight, belt_pull or coupling_weight"
    if surroundings is not None and surroundings.orientation == "vertical":
        for key in ("rotor_weight", "coupling_weight"):
            if key in said:
                place_of = here if getattr(duty, key) is not None else ("shaft",)
                yield (*place_of, key), "a weight on a vertical shaft", "it in axial_load, where it acts"


def opposed_faults(
    shaft: Shaft, duties: tuple[Duty, ...], bearing: Bearing, opposed: Bearing | None
) -> Iterator[Problem]:
    """Yield what does not fit together about the opposed bearing."""
    if opposed is None:
        if shaft.opposed is None:
            for i, duty in enumerate(duties):
                if duty.opposed_radial_load is not None:
                    yield ("shaft", "opposed"), "nothing", "the opposed bearing, since opposed_radial_load is given"
                elif duty.radial_load is None and induces_thrust(bearing):
                    expected = f'its designation or "same": the other {bearing.family} bearing, whose thrust counts'
                    yield ("shaft", "opposed"), f"nothing for duty point {i + 1}", expected
        return
    if not induces_thrust(bearing) or not induces_thrust(opposed):
        which = bearing if not induces_thrust(bearing) else opposed
        expected = "no such key: only single row tapered and angular contact bearings hold each other's thrust"
        yield ("shaft", "opposed"), f"a {which.family} bearing{_paired(which)}", expected
        return
    for i, duty in enumerate(duties):
        if duty.radial_load is None and duty.opposed_radial_load is not None:
            expected = "no such key beside the forces on the shaft, from which it follows"
            yield ("duty", i, "opposed_radial_load"), f"{duty.opposed_radial_load:g} N", expected
        elif duty.radial_load is not None and duty.opposed_radial_load is None:
            expected = dict(entries(Duty))["opposed_radial_load"].expected
            yield ("duty", i, "opposed_radial_load"), "nothing", f"{expected}, since [shaft] opposed is given"


def _paired(bearing: Bearing) -> str:
    return "" if bearing.arrangement == "single" else f", {bearing.arrangement} pair"


def duty_faults(case: Case) -> Iterator[Problem]:
    """Yield what only the loads that were worked out show: none at all, or a start faster than the rule goes."""
    shortest = SHORTEST_RUN_UP * case.bearing.pitch_diameter
    for i, duty in enumerate(case.duty):
        on_bearing = loads_of(case, duty)
        if abs(on_bearing.radial) < _NO_LOAD and abs(on_bearing.axial) < _NO_LOAD:
            expected = "a radial or an axial load above 0 N"
            yield ("duty", i, "radial_load"), "no load at all", expected
        fastest = duty.speed * math.pi / 30 / shortest
        if duty.acceleration is not None and acceleration_of(duty, case.bearing, "") > fastest * (1 + 1e-9):
            expected = (
                f"at most {fastest:.4g} rad/s^2, {shortest:.3g} s to speed, for a bearing of this size: faster is a "
                "shock and not a start"
            )
            yield ("duty", i, "acceleration"), f"{duty.acceleration.value:g}", expected
