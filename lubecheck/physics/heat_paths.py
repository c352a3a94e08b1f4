"""Heat paths beside the air: across the bearing, through a joint, into a coolant, from the sun.

Conductances in parallel add; `in_series` joins those that the same heat passes one after the other.
"""

from __future__ import annotations

import math

import numpy as np

from lubecheck.method import method
from lubecheck.physics.friction import Factor
from lubecheck.units import (
    Mm,
    Mm2,
    Mm2PerS,
    MPerS,
    Number,
    Rpm,
    Watt,
    WPerK,
    WPerM2,
    WPerM2K,
    WPerMK,
)

# Between a ring and what rolls on it. The heat flow of ISO 15312 (0.016 W/mm^2 of the seats at the reference speed, n
# dm near 600 000) then leaves the inner ring about 10 K above the outer, as handbooks have it; the root of speed is
# that of laminar stirring (Harris). An estimate all the same.
RING_AT_REST = 200.0  # W/(m^2*K), through standing elements and lubricant
RING_STIRRED = 700.0  # W/(m^2*K), added at n dm = 100 000 mm/min
RING = Factor(1.0, 0.4, 2.5, "own-estimate", "between ring and lubricant: about times or divided by 2.5")
# Bolted, machined, unpainted feet: 1000 to 5000 W/(m^2*K), handbooks, from memory.
JOINT = Factor(2000.0, 700.0, 5000.0, "incropera", "contact of bolted feet or a flange, W/(m^2*K)")
DUCT = 15.0  # mm, hydraulic diameter of a cooling jacket: estimate, 8 to 30
SOLAR_ABSORPTIVITY = 0.8  # painted, rusted or oily; white paint 0.3, bright metal 0.2: handbooks, from memory
_LAMINAR_NUSSELT = 3.66  # long round duct with a wall of one temperature, exact solution
_TURBULENT = 2300.0  # Reynolds number


@method(
    source="own-estimate",
    valid={"speed": (0.0, 1e6), "pitch_diameter": (1.0, 1e4), "width": (0.1, 1e4)},
)
def ring_conductance(speed: Rpm, *, pitch_diameter: Mm, width: Mm) -> WPerK:
    """Conductance between one ring and the lubricant with the rolling elements in it.

    G = (200 + 700 sqrt(n dm / 100000)) pi dm B, about times or divided by 2.5. The two rings stand in series by way of
    the lubricant, where friction makes its heat.

    speed [rpm]: speed n, any shape
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    width [mm]: width B, broadcasts
    returns [W/K]

    >>> ring_conductance("1480 rpm", pitch_diameter="72.5 mm", width="25 mm").round(2)
    <Quantity(5.27, 'watt / kelvin')>
    """
    stirred = RING_STIRRED * np.sqrt(speed * pitch_diameter / 1e5)
    return (RING_AT_REST + stirred) * math.pi * pitch_diameter * width * 1e-6


@method(source="incropera:3.1", valid={"first": (0.0, 1e9), "second": (0.0, 1e9)})
def in_series(*, first: WPerK, second: WPerK) -> WPerK:
    """Conductance of two paths that the same heat passes one after the other: a b / (a + b); 0 where both are.

    first [W/K]: conductance a, any shape
    second [W/K]: conductance b, broadcasts
    returns [W/K]

    >>> in_series(first="2 W/K", second="2 W/K")
    <Quantity(1.0, 'watt / kelvin')>
    """
    whole = np.asarray(first + second)
    return np.where(whole > 0, first * second / np.where(whole > 0, whole, 1.0), 0.0)


@method(source="incropera:3.1", valid={"coefficient": (0.0, 1e5), "outside": (1.0, 1e4), "width": (0.1, 1e4)})
def joint_conductance(coefficient: WPerM2K, *, outside: Mm, width: Mm) -> WPerK:
    """Conductance of the joint between a housing and its base or frame: coefficient times a foot of D times B.

    coefficient [W/(m^2*K)]: of the contact, any shape; bolted machined feet 1000 to 5000
    outside [mm]: outside diameter D of the bearing, broadcasts
    width [mm]: width B of the bearing, broadcasts
    returns [W/K]

    >>> joint_conductance("2000 W/(m^2*K)", outside="100 mm", width="25 mm")
    <Quantity(5.0, 'watt / kelvin')>
    """
    return coefficient * outside * width * 1e-6


@method(
    source="incropera:8",
    valid={"velocity": (0.0, 20.0), "diameter": (0.5, 500.0), "prandtl": (0.5, 1e5)},
)
def duct_coefficient(
    velocity: MPerS, *, diameter: Mm, kinematic_viscosity: Mm2PerS, conductivity: WPerMK, prandtl: Number
) -> WPerM2K:
    """Heat transfer coefficient of a liquid in a duct.

    Nu = 3.66 below Re 2300, the exact value of a long round duct; above, Dittus-Boelter 0.023 Re^0.8 Pr^0.4, or 3.66
    where that is more. About 25 % either way when turbulent; short laminar ducts give more.

    velocity [m/s]: mean velocity, any shape
    diameter [mm]: hydraulic diameter, broadcasts as all the others do
    kinematic_viscosity [mm^2/s]: of the liquid
    conductivity [W/(m*K)]: of the liquid
    prandtl [1]: Prandtl number of the liquid
    returns [W/(m^2*K)]

    >>> duct_coefficient("1 m/s", diameter="15 mm", kinematic_viscosity="1 mm^2/s", conductivity="0.6 W/(m*K)",
    ...     prandtl=7).round(-1)
    <Quantity(4390.0, 'watt / meter ** 2 / kelvin')>
    """
    reynolds = np.asarray(velocity * diameter * 1000 / kinematic_viscosity)
    rough = 0.023 * np.exp(0.8 * np.log(np.maximum(reynolds, 1e-12)) + 0.4 * np.log(prandtl))
    nusselt = np.where(reynolds > _TURBULENT, np.maximum(rough, _LAMINAR_NUSSELT), _LAMINAR_NUSSELT)
    return nusselt * conductivity / (diameter * 1e-3)


@method(source="incropera:11.4", valid={"stream": (0.0, 1e9), "wall": (0.0, 1e9)})
def exchanger_conductance(*, stream: WPerK, wall: WPerK) -> WPerK:
    """Conductance from a wall of one temperature to a stream, counted from the inlet: C (1 - exp(-UA/C)).

    The effectiveness of an exchanger whose other side keeps its temperature; 0 without flow.

    stream [W/K]: heat capacity flow C of the stream, any shape
    wall [W/K]: conductance UA from the wall into the stream, broadcasts
    returns [W/K]

    >>> exchanger_conductance(stream="70 W/K", wall="10 W/K").round(2)
    <Quantity(9.32, 'watt / kelvin')>
    """
    flow = np.maximum(np.asarray(stream), 1e-300)
    return -flow * np.expm1(-wall / flow)


@method(source="own-estimate", valid={"irradiance": (0.0, 1500.0), "area": (0.0, 1e9)})
def solar_heat(irradiance: WPerM2, area: Mm2) -> Watt:
    """Heat of the sun on a housing: absorptivity 0.8, irradiance, and a quarter of its outer area.

    A quarter of the surface is the mean shadow of a convex body (Cauchy). Clear sky at noon gives about 1000 W/m^2.

    irradiance [W/m^2]: of the sun square to its rays, any shape
    area [mm^2]: outer area of the housing, broadcasts
    returns [W]

    >>> solar_heat("1000 W/m^2", "0.1 m^2").round(2)
    <Quantity(20.0, 'watt')>
    """
    return SOLAR_ABSORPTIVITY * irradiance * area * 1e-6 / 4
