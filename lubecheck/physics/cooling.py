"""Cooling: how heat leaves a bearing position, by air, by radiation, along the shaft and with a stream of oil.

The bodies work in SI inside; their faces keep the house units. The properties of air are arguments, taken at the film
temperature (the mean of surface and air), so that no file is read here; `data.air` has them.
"""

from __future__ import annotations

import math

import numpy as np

from lubecheck.method import method
from lubecheck.units import (
    GRAVITY,
    Array,
    DegC,
    JPerKgK,
    KgPerM3,
    LPerMin,
    Mm,
    Mm2PerS,
    MPa,
    MPerS,
    Number,
    PerKelvin,
    WPerK,
    WPerM2K,
    WPerMK,
)

KELVIN = 273.15  # 0 degC, exact
STEFAN_BOLTZMANN = 5.670374419e-8  # W/(m^2*K^4), CODATA 2018
SEA_LEVEL = 0.101325  # MPa, U.S. Standard Atmosphere 1976
STEEL_CONDUCTIVITY = 48.0  # W/(m*K), unalloyed shaft steel; 40 to 52, alloyed 25 to 45; from memory

# U.S. Standard Atmosphere 1976, lowest layer: T = 288.15 K - 6.5 K/km.
_EARTH_RADIUS = 6356766.0  # m
_LAPSE_SHARE = 0.0065 / 288.15  # 1/m
_PRESSURE_EXPONENT = GRAVITY * 0.0289644 / (8.31432 * 0.0065)  # 5.2559; the standard's own gas constant

_LEAST_DIFFERENCE = 1e-6  # K, and
_LEAST_REYNOLDS = 1e-12  # : so far below any case that they only keep log(0) away


@method(source="us-standard-atmosphere", valid={"altitude": (-5e6, 11e6)})
def pressure_at(altitude: Mm) -> MPa:
    """Air pressure of the standard atmosphere at a height above sea level.

    p = 0.101325 (1 - 0.0065 H / 288.15)^5.2559 MPa, H = r z / (r + z) the geopotential height in m, r = 6356766 m.
    Weather moves the pressure of a place by about 3 %.

    altitude [mm]: height z above sea level, any shape; -5 to 11 km
    returns [MPa]

    >>> pressure_at("1000 m").round(6)
    <Quantity(0.089876, 'megapascal')>
    """
    height = altitude * 1e-3
    geopotential = _EARTH_RADIUS * height / (_EARTH_RADIUS + height)
    return SEA_LEVEL * np.exp(_PRESSURE_EXPONENT * np.log(1.0 - _LAPSE_SHARE * geopotential))


@method(
    source="churchill-chu",
    valid={"surface": (-100.0, 500.0), "ambient": (-100.0, 500.0), "diameter": (1.0, 5000.0), "prandtl": (1e-2, 1e4)},
)
def natural_convection(
    *,
    surface: DegC,
    ambient: DegC,
    diameter: Mm,
    kinematic_viscosity: Mm2PerS,
    conductivity: WPerMK,
    prandtl: Number,
    expansion: PerKelvin,
) -> WPerM2K:
    """Heat transfer coefficient of still air round a horizontal cylinder.

    Nu = (0.60 + 0.387 Ra^(1/6) / (1 + (0.559/Pr)^(9/16))^(8/27))^2, Ra = g beta |Ts - Ta| D^3 Pr / nu^2.

    Published for Ra from 1e-5 to 1e12, which every bearing housing meets. A housing is no cylinder: take the diameter
    of the same height, and about 20 % either way.

    surface [degC]: temperature Ts of the surface, any shape
    ambient [degC]: temperature Ta of the air, broadcasts with surface as all the others do
    diameter [mm]: diameter D of the cylinder
    kinematic_viscosity [mm^2/s]: nu of the air at film temperature
    conductivity [W/(m*K)]: conductivity of the air at film temperature
    prandtl [1]: Prandtl number Pr of the air at film temperature
    expansion [1/K]: thermal expansion beta of the air at film temperature
    returns [W/(m^2*K)]

    >>> natural_convection(surface="60 degC", ambient="20 degC", diameter="150 mm", kinematic_viscosity="16.97 mm^2/s",
    ...     conductivity="0.02735 W/(m*K)", prandtl=0.705, expansion="0.0032 1/K").round(2)
    <Quantity(5.2, 'watt / meter ** 2 / kelvin')>
    """
    return rising_air(
        surface=surface,
        ambient=ambient,
        diameter=diameter,
        kinematic_viscosity=kinematic_viscosity,
        conductivity=conductivity,
        rising=rising_group(prandtl, expansion),
    )


def rising_group(prandtl: Array, expansion: Array) -> Array:
    """What Churchill and Chu ask of a fluid beside viscosity and conductivity; nearly one figure for all air.

    0.387 (g beta Pr)^(1/6) / (1 + (0.559/Pr)^(9/16))^(8/27), for nu in mm^2/s and all else in SI units.
    """
    damping = 1.0 + np.exp((9 / 16) * np.log(0.559 / prandtl))
    # mm^2/s squared is 1e-12 m^4/s^2
    return 0.387 * np.exp(np.log(GRAVITY * 1e12 * expansion * prandtl) * (1 / 6) - np.log(damping) * (8 / 27))


def rising_air(
    *, surface: Array, ambient: Array, diameter: Array, kinematic_viscosity: Array, conductivity: Array, rising: Array
) -> Array:
    """`natural_convection` with its `rising_group` worked out already."""
    size = diameter * 1e-3
    difference = np.maximum(np.abs(surface - ambient), _LEAST_DIFFERENCE)
    pull = np.log(difference * (size * size * size) / (kinematic_viscosity * kinematic_viscosity))
    root = 0.60 + rising * np.exp(pull * (1 / 6))
    return root * root * conductivity / size


@method(
    source="churchill-bernstein",
    valid={"velocity": (0.0, 100.0), "diameter": (1.0, 5000.0), "prandtl": (1e-2, 1e4)},
)
def forced_convection(
    *,
    velocity: MPerS,
    diameter: Mm,
    kinematic_viscosity: Mm2PerS,
    conductivity: WPerMK,
    prandtl: Number,
) -> WPerM2K:
    """Heat transfer coefficient of a draught across a cylinder.

    Nu = 0.3 + 0.62 Re^(1/2) Pr^(1/3) / (1 + (0.4/Pr)^(2/3))^(1/4) (1 + (Re/282000)^(5/8))^(4/5), Re = v D / nu.

    Published for Re Pr above 0.2 and Re to 1e7, within about 20 %, and as a lower bound. In calm air use natural
    convection, or both by mixed_convection.

    velocity [m/s]: velocity v of the air, any shape; 0 gives the conduction that remains, Nu = 0.3
    diameter [mm]: diameter D of the cylinder, broadcasts with velocity as all the others do
    kinematic_viscosity [mm^2/s]: nu of the air at film temperature
    conductivity [W/(m*K)]: conductivity of the air at film temperature
    prandtl [1]: Prandtl number Pr of the air at film temperature
    returns [W/(m^2*K)]

    >>> forced_convection(velocity="3 m/s", diameter="150 mm", kinematic_viscosity="16.97 mm^2/s",
    ...     conductivity="0.02735 W/(m*K)", prandtl=0.705).round(1)
    <Quantity(17.0, 'watt / meter ** 2 / kelvin')>
    """
    return blown_air(
        velocity=velocity,
        diameter=diameter,
        kinematic_viscosity=kinematic_viscosity,
        conductivity=conductivity,
        blown=blown_group(prandtl),
    )


def blown_group(prandtl: Array) -> Array:
    """What Churchill and Bernstein ask of a fluid beside viscosity and conductivity; nearly one figure for all air.

    0.62 Pr^(1/3) / (1 + (0.4/Pr)^(2/3))^(1/4).
    """
    log_prandtl = np.log(prandtl)
    damping = 1.0 + np.exp((2 / 3) * (math.log(0.4) - log_prandtl))
    return 0.62 * np.exp(log_prandtl * (1 / 3) - np.log(damping) * 0.25)


def blown_air(
    *, velocity: Array, diameter: Array, kinematic_viscosity: Array, conductivity: Array, blown: Array
) -> Array:
    """`forced_convection` with its `blown_group` worked out already."""
    size = diameter * 1e-3
    reynolds = np.maximum(velocity * size * 1e6 / kinematic_viscosity, _LEAST_REYNOLDS)
    # Roots are a fourth of the time of powers: (Re/282000)^(5/8) = root * root^(1/4).
    root = np.sqrt(reynolds * (1 / 282000))
    turbulence = np.log(1.0 + root * np.sqrt(np.sqrt(root)))
    return (0.3 + (math.sqrt(282000) * blown) * root * np.exp(0.8 * turbulence)) * conductivity / size


@method(source="incropera:9.9", valid={"natural": (0.0, 1e6), "forced": (0.0, 1e6)})
def mixed_convection(*, natural: WPerM2K, forced: WPerM2K) -> WPerM2K:
    """Heat transfer coefficient where still-air convection and a draught act together.

    h^4 = h_natural^4 + h_forced^4: the exponent 4 for flow across a cylinder; 3 is the usual one for flow along a
    surface and would give up to 6 % more. A draught against the rising air gives less: it is not counted here.

    natural [W/(m^2*K)]: coefficient of natural convection alone, any shape
    forced [W/(m^2*K)]: coefficient of forced convection alone, broadcasts with natural
    returns [W/(m^2*K)]

    >>> mixed_convection(natural="5 W/(m^2*K)", forced="5 W/(m^2*K)").round(3)
    <Quantity(5.946, 'watt / meter ** 2 / kelvin')>
    """
    still = natural * natural
    blown = forced * forced
    return np.sqrt(np.sqrt(still * still + blown * blown))


@method(
    source="stefan-boltzmann",
    valid={"surface": (-100.0, 1000.0), "surroundings": (-100.0, 1000.0), "emissivity": (0.0, 1.0)},
)
def radiation(*, surface: DegC, surroundings: DegC, emissivity: Number) -> WPerM2K:
    """Heat transfer coefficient of radiation to surroundings that enclose the surface.

    h = eps sigma (Ts^4 - Tu^4) / (Ts - Tu) = eps sigma (Ts^2 + Tu^2) (Ts + Tu), exact, with T in K.

    surface [degC]: temperature Ts of the surface, any shape
    surroundings [degC]: temperature Tu of the walls around, broadcasts with surface
    emissivity [1]: emissivity eps of the surface, broadcasts; painted, rusted or oily about 0.9, bright 0.1 to 0.3
    returns [W/(m^2*K)]

    >>> radiation(surface="60 degC", surroundings="20 degC", emissivity=0.9).round(2)
    <Quantity(6.29, 'watt / meter ** 2 / kelvin')>
    """
    hot = surface + KELVIN
    cold = surroundings + KELVIN
    return STEFAN_BOLTZMANN * emissivity * (hot * hot + cold * cold) * (hot + cold)


@method(
    source="incropera:3.6",
    valid={
        "diameter": (0.5, 2000.0),
        "length": (0.0, 1e7),
        "coefficient": (1e-6, 1e4),
        "conductivity": (1e-3, 1e3),
    },
)
def fin_conductance(*, diameter: Mm, length: Mm, coefficient: WPerM2K, conductivity: WPerMK) -> WPerK:
    """Conductance of a bare shaft end as a round fin: its root at the bearing, its air at ambient.

    G = sqrt(h P k A) tanh(m (L + d/4)), m = sqrt(h P/(k A)), P = pi d, A = pi d^2/4; the quarter diameter stands for
    the tip's own face. tanh is 1 within 1 % from m L = 2.65 on: from there a shaft counts as infinite.
    One-dimensional: good while h d/k is below about 0.2, as it is for steel in air. A turning shaft gives off more;
    its coefficient is the caller's.

    diameter [mm]: diameter d of the shaft, any shape
    length [mm]: length L that stands in the air, on one side, broadcasts with diameter as all the others do
    coefficient [W/(m^2*K)]: heat transfer coefficient h from the shaft, convection and radiation together
    conductivity [W/(m*K)]: conductivity k of the shaft
    returns [W/K]

    >>> fin_conductance(diameter="50 mm", length="200 mm", coefficient="12 W/(m^2*K)",
    ...     conductivity="48 W/(m*K)").round(3)
    <Quantity(0.312, 'watt / kelvin')>
    """
    thickness = diameter * 1e-3
    reach = length * 1e-3 + thickness / 4
    product = coefficient * conductivity * thickness
    slope = 2 * np.sqrt(coefficient / (conductivity * thickness))
    return (math.pi / 2) * thickness * np.sqrt(product) * np.tanh(slope * reach)


@method(
    source="incropera:3.6",
    valid={"diameter": (0.5, 2000.0), "coefficient": (1e-6, 1e4), "conductivity": (1e-3, 1e3)},
)
def long_fin_conductance(*, diameter: Mm, coefficient: WPerM2K, conductivity: WPerMK) -> WPerK:
    """Conductance of a shaft so long that its end is at ambient: the limit of fin_conductance, and its ceiling.

    G = sqrt(h P k A) = (pi/2) sqrt(h k d^3).

    diameter [mm]: diameter d of the shaft, any shape
    coefficient [W/(m^2*K)]: heat transfer coefficient h from the shaft, broadcasts with diameter
    conductivity [W/(m*K)]: conductivity k of the shaft, broadcasts with diameter
    returns [W/K]

    >>> long_fin_conductance(diameter="50 mm", coefficient="12 W/(m^2*K)", conductivity="48 W/(m*K)").round(3)
    <Quantity(0.421, 'watt / kelvin')>
    """
    thickness = diameter * 1e-3
    return (math.pi / 2) * thickness * np.sqrt(coefficient * conductivity * thickness)


@method(
    source="common-practice",
    valid={"flow": (0.0, 1e5), "density": (1.0, 2e4), "heat_capacity": (1.0, 2e4)},
)
def stream_conductance(flow: LPerMin, density: KgPerM3, heat_capacity: JPerKgK) -> WPerK:
    """Conductance of a stream that enters at one temperature and leaves at the bearing's: rho c Q.

    All the heat it can take, counted from its inlet temperature: oil that leaves cooler than the bearing takes less.
    Mineral oil holds about 1.7 to 2.1 kJ/(kg*K) between 20 and 100 degC, so 1 l/min is about 27 W/K.

    flow [l/min]: volume flow Q, any shape
    density [kg/m^3]: density rho of the stream, broadcasts with flow
    heat_capacity [J/(kg*K)]: heat capacity c of the stream, broadcasts with flow
    returns [W/K]

    >>> stream_conductance("1 l/min", "870 kg/m^3", "1.9 kJ/(kg*K)").round(2)
    <Quantity(27.55, 'watt / kelvin')>
    """
    return flow * density * heat_capacity / 60000.0  # l/min to m^3/s
