"""The sheet of a lubricant: its viscosity over temperature, and where it has a viscosity that is asked for."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Literal

from lubecheck.data.lubricant import Lubricant
from lubecheck.data.lubricant_viscosity import as_array
from lubecheck.errors import Fault, InputError
from lubecheck.physics import viscosity

Place = Literal["within", "below", "above", "unknown"]
STEP = 20.0  # K between the temperatures of a sheet
LEAST, GREATEST = viscosity.kinematic_viscosity.valid["temperature"]
# Where a lubricant does not say in which range it is used, its sheet spans what most bearings see.
_USUAL = (-20.0, 120.0)


@dataclass(frozen=True, slots=True)
class State:
    """A lubricant at one temperature."""

    temperature: float  # degC
    nu: float  # mm^2/s, of a grease its base oil's
    density: float | None  # kg/m^3; None for grease, whose own density is not its base oil's
    dynamic: float | None  # mPa*s
    place: Place  # in the range of use, outside it, or the range is not stated


def state(one: Lubricant, temperature: float) -> State:
    """Return a lubricant at a temperature.

    Raises InputError outside the range of ASTM D341.

    >>> from lubecheck.data import lubricants
    >>> round(state(lubricants.find("mineral-vg-68"), 40.0).nu, 6)
    68.0
    """
    if not LEAST <= temperature <= GREATEST:
        raise InputError([Fault("temperature", f"{temperature:g} degC", f"{LEAST:g} to {GREATEST:g} degC (ASTM D341)")])
    at = as_array(temperature)
    nu = float(viscosity.kinematic_viscosity.plain(at, nu_40=as_array(one.nu_40), nu_100=as_array(one.nu_100)))
    density = dynamic = None
    if one.kind == "oil":
        density = float(
            viscosity.density_by_expansion.plain(
                at, density_15=as_array(one.density_15), expansion=as_array(one.expansion)
            )
        )
        dynamic = float(viscosity.dynamic_viscosity.plain(as_array(nu), density=as_array(density)))
    return State(temperature, nu, density, dynamic, place(one, temperature))


def place(one: Lubricant, temperature: float) -> Place:
    """Return where a temperature lies against a lubricant's range of use."""
    if one.lowest is not None and temperature < one.lowest:
        return "below"
    if one.highest is not None and temperature > one.highest:
        return "above"
    return "unknown" if one.lowest is None or one.highest is None else "within"


def span(lubricants: Iterable[Lubricant]) -> tuple[float, float]:
    """Return the temperatures that a sheet of some lubricants goes over: their range of use, as far as D341 goes."""
    lubricants = tuple(lubricants)
    lows = [_USUAL[0] if one.lowest is None else one.lowest for one in lubricants]
    highs = [_USUAL[1] if one.highest is None else one.highest for one in lubricants]
    return max(LEAST, min(lows)), min(GREATEST, max(highs))


def temperatures(lubricants: Sequence[Lubricant]) -> tuple[float, ...]:
    """Return the temperatures of a sheet: round ones in the range of use, 40 and 100 degC always among them."""
    low, high = span(lubricants)
    first, last = math.ceil(low / STEP), math.floor(high / STEP)
    return tuple(sorted({*(STEP * i for i in range(first, last + 1)), 40.0, 100.0}))


def temperature_of(one: Lubricant, nu: float) -> float | None:
    """Return the temperature at which a lubricant has a viscosity; None outside the range of ASTM D341."""
    pair = {"nu_40": as_array(one.nu_40), "nu_100": as_array(one.nu_100)}
    found = float(viscosity.temperature_of_viscosity.plain(nu=as_array(nu), **pair))
    return found if LEAST <= found <= GREATEST else None


def index_of(one: Lubricant) -> float | None:
    """Return the viscosity index of a lubricant; None where ASTM D2270 defines none.

    >>> from lubecheck.data import lubricants
    >>> round(index_of(lubricants.find("mineral-vg-68")))
    95
    """
    index = float(viscosity.viscosity_index.plain(nu_40=as_array(one.nu_40), nu_100=as_array(one.nu_100)))
    is_defined = not viscosity.viscosity_index.outside(nu_40=one.nu_40, nu_100=one.nu_100) and math.isfinite(index)
    return index if is_defined else None


def saybolt(nu: float, temperature: float) -> float | None:
    """Return a viscosity in Saybolt Universal seconds; None where the scale does not reach."""
    method = viscosity.saybolt_from_kinematic
    if method.outside(nu=nu, temperature=temperature):
        return None
    return float(method.plain(as_array(nu), as_array(temperature)))
