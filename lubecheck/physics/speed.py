"""Speed: the measure n dm, and the speeds at which a bearing makes just the heat that leaves it.

A reference speed (ISO 15312) is for one fixed set of conditions, a thermally safe speed (DIN 732) for those of the
machine; both solve the same balance of friction and heat flow.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import (
    Array,
    Choice,
    DeltaDegC,
    Gram,
    LPerMin,
    Mm,
    Mm2,
    Mm2PerS,
    MPerS,
    Newton,
    Number,
    RadPerS2,
    Rpm,
    Watt,
)


@dataclass(frozen=True, slots=True)
class Reference:
    """Reference conditions of ISO 15312 for one position of the load."""

    heat_flux: float  # W/mm^2 over the reference area, at 50 K over the surroundings
    falling: float  # exponent with which the flux falls with area beyond 50 000 mm^2
    load_share: float  # of C0
    viscosity: float  # mm^2/s at 70 degC


# ISO 15312:2003 (from memory; radial seen): 70 degC, 20 degC around, oil bath to the middle of the lowest element
REFERENCES = {
    "radial": Reference(heat_flux=0.016, falling=0.34, load_share=0.05, viscosity=12.0),
    "thrust": Reference(heat_flux=0.020, falling=0.16, load_share=0.02, viscosity=24.0),  # roller; ball not covered
}
POSITIONS = tuple(REFERENCES)
REFERENCE_RISE = 50.0  # K, bearing over surroundings
_LARGE_AREA = 50_000.0  # mm^2
_OIL_HEAT = 28.6  # W/(l/min K), DIN 732: mineral oil carries 1.7 kJ/(l K) (from memory)
_STEPS = 4  # see _balance_speed
_TINY = 1e-300  # under a logarithm instead of zero

Position = Annotated[NDArray[np.intp], Choice(POSITIONS)]

_FLUX, _FALLING, _LOAD_SHARE, _VISCOSITY = (
    np.array([getattr(reference, name) for reference in REFERENCES.values()])
    for name in ("heat_flux", "falling", "load_share", "viscosity")
)


_STILL = 160.0  # Palmgren: (nu n)^(2/3) is not taken below it


def _balance_speed(f0: Number, f1: Number, *, nu: Mm2PerS, load: Newton, pitch_diameter: Mm, heat: Watt) -> Array:
    """Return the speed at which pi/30000 n (1e-7 f0 max((nu n)^(2/3), 160) dm^3 + f1 P dm) is the heat that leaves.

    Newton's method in x = ln n, on the logarithm of the balance: that is convex and rises with a slope of 1 to 5/3. The
    start is the lower of the speeds that the stirred part alone, and all with the stirred part at its least, would
    reach. Where the least holds, the start is the root. Elsewhere the root is no more than ln 2 below it, so the steps
    come down to it and never pass it, nor the bend at 160; the error e shrinks to 0.06 e^2 a step, and four steps from
    0.69 end below the last digit. The number is fixed, so that no row depends on another.
    """
    target = heat * (30_000 / math.pi)
    stirred = np.maximum(1e-7 * f0 * (pitch_diameter * pitch_diameter * pitch_diameter), _TINY)
    loaded = f1 * load * pitch_diameter
    log_nu = np.log(nu)
    by_stirring = 0.6 * (np.log(target / stirred) - 2 / 3 * log_nu)
    x = np.minimum(by_stirring, np.log(target / (loaded + _STILL * stirred)))
    log_target = np.log(target)
    for _ in range(_STEPS):
        viscous = stirred * np.maximum(np.exp(2 / 3 * (log_nu + x)), _STILL)
        torque = viscous + loaded
        slope = 1 + 2 / 3 * viscous / torque
        x = x - (x + np.log(torque) - log_target) / slope
    speed: Array = np.exp(x)
    return speed


@method(source="common-practice", valid={"speed": (0.0, 1e6), "pitch_diameter": (1.0, 1e4)})
def speed_parameter(speed: Rpm, pitch_diameter: Mm) -> Number:
    """Speed parameter n dm, by which lubricants and cages are rated: a number, in mm times rpm.

    With the mean diameter dm = (d + D)/2, not the bore: n d is about 0.7 of it.

    speed [rpm]: speed n, any shape
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    returns [1]

    >>> speed_parameter("3000 rpm", "72.5 mm").round(6)
    <Quantity(217500.0, 'dimensionless')>
    """
    return speed * pitch_diameter


@method(source="iso-15312", valid={"bore": (1.0, 1e4), "outside": (1.0, 1e4), "width": (0.1, 5e3)})
def heat_area(*, bore: Mm, outside: Mm, width: Mm, position: Position) -> Mm2:
    """Area of the seats through which a bearing's heat leaves: the reference area A_r of ISO 15312.

    Radial: pi B (d + D); thrust, cylindrical roller: pi/2 (D^2 - d^2). For tapered bearings B is the assembled width T.
    The area of a thrust spherical roller bearing needs diameters of its washers and is smaller.

    bore [mm]: bore d, any shape
    outside [mm]: outside diameter D, broadcasts
    width [mm]: width B, broadcasts
    position: one of `POSITIONS`, broadcasts
    returns [mm^2]

    >>> heat_area(bore="50 mm", outside="90 mm", width="20 mm", position="radial").round(1)
    <Quantity(8796.5, 'millimeter ** 2')>
    """
    radial = math.pi * width * (bore + outside)
    thrust = math.pi / 2 * (outside**2 - bore**2)
    return np.where(np.equal(position, POSITIONS.index("radial")), radial, thrust)


@method(source="iso-15312", valid={"area": (1.0, 1e8), "rise": (0.0, 200.0)})
def seat_heat_flow(area: Mm2, rise: DeltaDegC, position: Position) -> Watt:
    """Heat that leaves through the seats, in proportion to the rise over the surroundings.

    At the reference rise of 50 K: 0.016 W/mm^2 radial, 0.020 thrust; beyond 50 000 mm^2 times (A/50000)^-0.34 radial,
    ^-0.16 thrust. DIN 732 uses the same conductance (k_q) at other rises.

    area [mm^2]: seat area, from `heat_area`, any shape
    rise [delta_degC]: temperature of the bearing over the surroundings, broadcasts
    position: one of `POSITIONS`, broadcasts
    returns [W]

    >>> seat_heat_flow("10000 mm^2", "50 delta_degC", "radial").round(6)
    <Quantity(160.0, 'watt')>
    """
    large = np.exp(-_FALLING[position] * np.log(np.maximum(area / _LARGE_AREA, 1.0)))
    flow: Array = _FLUX[position] * area * large * (rise / REFERENCE_RISE)
    return flow


@method(source="din-732", valid={"flow": (0.0, 1e4), "rise": (0.0, 200.0)})
def oil_heat_flow(flow: LPerMin, rise: DeltaDegC) -> Watt:
    """Heat that circulating mineral oil carries away: 28.6 W a litre a minute and kelvin.

    flow [l/min]: oil through the bearing, any shape
    rise [delta_degC]: temperature of the oil out of the bearing over that going in, broadcasts
    returns [W]

    >>> oil_heat_flow("2 l/min", "10 delta_degC").round(6)
    <Quantity(572.0, 'watt')>
    """
    return _OIL_HEAT * flow * rise


_SERIES = {"f0": (1e-3, 100.0), "f1": (0.0, 1.0)}


@method(
    source="iso-15312",
    valid={
        **_SERIES,
        "static_rating": (1e-3, 1e9),
        "bore": (1.0, 1e4),
        "outside": (1.0, 1e4),
        "width": (0.1, 5e3),
    },
)
def thermal_reference_speed(
    f0: Number, f1: Number, *, static_rating: Newton, bore: Mm, outside: Mm, width: Mm, position: Position
) -> Rpm:
    """Thermal reference speed: 70 degC in surroundings of 20 degC under the standard's light load and thin oil.

    Radial: load 0.05 C0r, 12 mm^2/s; thrust roller: 0.02 C0a, 24 mm^2/s. The friction of Palmgren with the factors f0r
    and f1r of the series equals the heat flow through the seats; dm = (d + D)/2. Not for thrust ball bearings. Solved
    to the last digits. The friction factors make it uncertain by about a quarter.

    f0 [1]: f0r of the series, oil bath, any shape
    f1 [1]: f1r of the series, broadcasts
    static_rating [N]: basic static load rating C0, broadcasts
    bore [mm]: bore d, broadcasts
    outside [mm]: outside diameter D, broadcasts
    width [mm]: width B, T for tapered bearings, broadcasts
    position: one of `POSITIONS`, broadcasts
    returns [rpm]

    >>> size = {"bore": "50 mm", "outside": "90 mm", "width": "20 mm"}
    >>> thermal_reference_speed(2.0, 0.0002, static_rating="23.2 kN", **size, position="radial").round(0)
    <Quantity(8246.0, 'revolutions_per_minute')>
    """
    area = heat_area.plain(bore=bore, outside=outside, width=width, position=position)
    heat = seat_heat_flow.plain(area, np.asarray(REFERENCE_RISE), position)
    return _balance_speed(
        f0,
        f1,
        nu=_VISCOSITY[position],
        load=_LOAD_SHARE[position] * static_rating,
        pitch_diameter=(bore + outside) / 2,
        heat=heat,
    )


@method(
    source="din-732",
    valid={
        **_SERIES,
        "nu": (0.1, 1e6),
        "load": (0.0, 1e9),
        "pitch_diameter": (1.0, 1e4),
        "heat_flow": (1e-3, 1e8),
    },
)
def thermal_safe_speed(
    f0: Number, f1: Number, *, nu: Mm2PerS, load: Newton, pitch_diameter: Mm, heat_flow: Watt
) -> Rpm:
    """Thermally safe speed: where friction under the machine's own load and oil makes the heat that can leave.

    DIN 732 writes it as n_ref f_n with K_L f_n^(5/3) + K_P f_n = 1, K_L and K_P being the lubricant's and the load's
    friction at the reference speed over the heat flow; that is this balance, and the reference speed falls out of it.

    f0 [1]: f0 of the series and the lubrication, any shape
    f1 [1]: f1 of the series, broadcasts
    nu [mm^2/s]: viscosity at the permitted bearing temperature, broadcasts
    load [N]: load P1 that governs friction, broadcasts
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    heat_flow [W]: heat that may leave at the permitted temperature (`seat_heat_flow` and `oil_heat_flow`, less what the
        machine brings), broadcasts
    returns [rpm]

    >>> machine = {"nu": "30 mm^2/s", "load": "3 kN", "pitch_diameter": "70 mm", "heat_flow": "100 W"}
    >>> thermal_safe_speed(2.0, 0.0002, **machine).round(0)
    <Quantity(4363.0, 'revolutions_per_minute')>
    """
    return _balance_speed(f0, f1, nu=nu, load=load, pitch_diameter=pitch_diameter, heat=heat_flow)


# Kinematic limit, a rule of the trade. Cages: the oil limit of a family is for a pressed steel cage; machined brass and
# polyamide cages run faster, which is not counted on here; without a cage the elements rub on each other, and handbooks
# give 0.3 to 0.5 of the speed of the same bearing with one.
CAGE_FACTORS = {"steel": 1.0, "brass": 1.0, "polyamide": 1.0, "full complement": 0.4}
# Sliding speed of a bearing's own contact seal of nitrile rubber, m/s. Fitted to the limiting speeds that handbooks
# print for sealed bearings (from memory: 6205 8500, 6309 4500, 6312 3400, 6220 2400 rpm); range 12 to 15.
SEAL_SPEED = 13.5


@method(source="common-practice", valid={"diameter": (1.0, 1e4), "sliding_speed": (0.1, 60.0)})
def seal_speed_limit(diameter: Mm, sliding_speed: MPerS) -> Rpm:
    """Speed at which a contact seal slides as fast as it may.

    diameter [mm]: diameter that the seal rubs on, any shape
    sliding_speed [m/s]: sliding speed that it stands, broadcasts
    returns [rpm]

    >>> seal_speed_limit("56 mm", "13.5 m/s").round(0)
    <Quantity(4604.0, 'revolutions_per_minute')>
    """
    return 60_000 / math.pi * sliding_speed / diameter


# Moment of inertia of a rolling element over m r^2: solid ball, solid roller.
ELEMENTS = {"ball": 0.4, "roller": 0.5}
_INERTIA = np.array(list(ELEMENTS.values()))
Element = Annotated[NDArray[np.intp], Choice(tuple(ELEMENTS))]
# Traction coefficient of a lubricated rolling contact before it slides: 0.02 to 0.06 (Harris, from memory).
TRACTION = 0.03


@method(
    source="own-estimate",
    valid={
        "load": (0.0, 1e9),
        "elements_mass": (1e-3, 1e9),
        "pitch_diameter": (1.0, 1e4),
        "traction": (1e-3, 0.3),
    },
)
def greatest_acceleration(
    *, load: Newton, elements_mass: Gram, pitch_diameter: Mm, traction: Number, element: Element
) -> RadPerS2:
    """Angular acceleration of the shaft up to which the rolling elements follow without sliding.

    Pure rolling with a ring at rest speeds up the orbit of an element by alpha/2 and its spin by alpha dm/(2 Dw). With
    J = k m (Dw/2)^2 the contact with the turning ring has to give the force (1 + k)/8 m dm alpha. An element outside
    the loaded zone is brought along by the cage, so that the lightest one has its share F/Z of the traction of all:
    alpha = 8 mu F/((1 + k) M dm), M being the mass of all elements. The normal forces add up to at least F, so this is
    on the safe side; the drag of stiff grease, which the loaded elements have to overcome too, is left out.

    load [N]: load of the bearing F, the root of Fr^2 + Fa^2, any shape
    elements_mass [g]: mass of all rolling elements, broadcasts
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    traction [1]: traction coefficient mu, broadcasts
    element: one of `ELEMENTS`, broadcasts
    returns [rad/s^2]

    >>> balls = {"elements_mass": "176 g", "pitch_diameter": "72.5 mm", "traction": 0.03}
    >>> greatest_acceleration(load="530 N", **balls, element="ball").round(0)
    <Quantity(7120.0, 'radian / second ** 2')>
    """
    force_per_acceleration = (1 + _INERTIA[element]) / 8 * elements_mass * pitch_diameter * 1e-6  # g mm to kg m
    limit: Array = traction * load / force_per_acceleration
    return limit
