"""Warm-up: what a bearing position stores of its heat, and how fresh grease finds its place.

After a start and after greasing a position is not in balance: steel warms, grease is pushed aside and channels form.
Capacities and revolutions here say how long that takes.
"""

from __future__ import annotations

import math

import numpy as np

from lubecheck.method import method
from lubecheck.physics.churning import PARAMETERS
from lubecheck.physics.friction import Factor
from lubecheck.physics.grease_amount import STEEL_DENSITY
from lubecheck.units import Array, Cm3, DegC, Gram, JPerK, Mm, Mm2, NMm, Number, Pa, PerSecond, Rpm, Share

STEEL_HEAT = 470.0  # J/(kg*K), steel and cast iron at 20 to 100 degC: 450 to 540, handbooks, from memory
GREASE_HEAT = 2000.0  # J/(kg*K), of grease and oil at 50 degC: 1700 to 2200, handbooks, from memory
IRON_DENSITY = 7.2e-3  # g/mm^3, grey cast iron
# A housing weighs its outer area times a wall. 10 mm with feet and ribs: estimate from ordinary castings, 6 to 18 mm;
# a motor's end shield is bolted to a frame that warms with it.
WALL = Factor(10.0, 6.0, 18.0, "own-estimate", "mm of cast iron on the outer area of a housing")
SHAFT_SECTION = 4.0  # bores of shaft that warm with the inner ring: estimate, 2 to 6
# A machine takes this long to come to the temperatures that are stated of its shaft, frame and oil, e-folding.
# Motors of 10 to 100 kW settle in 2 to 4 h, three to four such times: common practice.
MACHINE_TIME = Factor(0.8, 0.3, 1.5, "common-practice", "h in which a machine warms, e-folding")

LOW_TORQUE = 1000.0  # N mm, and
LOW_TORQUE_SIZE = 33.5  # mm, of the 6204 that ASTM D1478 / IP 186 starts at the lower temperature limit; from memory
ROOM = 25.0  # degC, at which yield stress is stated

FRESH = PARAMETERS["fresh grease"]
CHANNELLING = PARAMETERS["channelling"]


@method(source="incropera", valid={"mass": (0.0, 1e9)})
def steel_capacity(mass: Gram) -> JPerK:
    """Heat that a mass of steel or iron takes up a kelvin: m c with c = 470 J/(kg K).

    mass [g]: mass m, any shape
    returns [J/K]

    >>> steel_capacity("2 kg")
    <Quantity(940.0, 'joule / kelvin')>
    """
    return mass * (STEEL_HEAT / 1000)


@method(source="own-estimate", valid={"area": (0.0, 1e9)})
def housing_mass(area: Mm2) -> Gram:
    """Mass of a housing from its outer area: a wall of 10 mm cast iron over it, with feet and ribs.

    An estimate for a housing whose mass nobody stated; `WALL` has the range.

    area [mm^2]: outer area, any shape
    returns [g]

    >>> housing_mass("0.1 m^2").to("kg").round(2)
    <Quantity(7.2, 'kilogram')>
    """
    return area * (WALL.nominal * IRON_DENSITY)


@method(source="own-estimate", valid={"bore": (1.0, 1e4)})
def shaft_mass(bore: Mm) -> Gram:
    """Mass of the shaft that warms with the inner ring: a section four bores long.

    An estimate, 2 to 6 bores; the rest of the shaft is a path for heat and not a store.

    bore [mm]: bore d, any shape
    returns [g]

    >>> shaft_mass("45 mm").to("kg").round(2)
    <Quantity(2.25, 'kilogram')>
    """
    return math.pi / 4 * SHAFT_SECTION * STEEL_DENSITY / 1000 * bore**3


@method(source="own-estimate", valid={"bore": (1.0, 1e4), "outside": (1.0, 1e4), "width": (0.1, 1e4)})
def bearing_mass(*, bore: Mm, outside: Mm, width: Mm, free_volume: Cm3) -> Gram:
    """Mass of a bearing: its envelope less its free volume, of steel.

    bore [mm]: bore d, any shape
    outside [mm]: outside diameter D, broadcasts
    width [mm]: width B, broadcasts
    free_volume [cm^3]: free volume, broadcasts
    returns [g]

    >>> bearing_mass(bore="45 mm", outside="100 mm", width="25 mm", free_volume="50 cm^3").round(0)
    <Quantity(837.0, 'gram')>
    """
    envelope = math.pi / 4 * (outside**2 - bore**2) * width
    return np.maximum(envelope / 1000 - free_volume, 0.0) * STEEL_DENSITY


@method(source="own-estimate", valid={"revolutions": (0.0, 1e15), "channelling": (1.0, 1e12)})
def still_to_clear(revolutions: Number, channelling: Number) -> Share:
    """Share of fresh grease that has not found its place after a number of revolutions: exp(-N/Nc).

    Fresh grease churns until channels have formed and the surplus has left the elements' way. That it takes revolutions
    and not hours alone is common practice in running in; that it takes about 800 000 of them (250 000 to 2 500 000) is
    an estimate by which motors are back to their usual temperature within about a day, as field notes have it.

    revolutions [1]: revolutions N since greasing, any shape
    channelling [1]: revolutions Nc in which what is left falls to 1/e, broadcasts; `CHANNELLING`
    returns [1]

    >>> still_to_clear(8e5, 8e5).round(3)
    <Quantity(0.368, 'dimensionless')>
    """
    left: Array = np.exp(-revolutions / channelling)
    return left


@method(source="eschmann", valid={"torque": (0.0, 1e12), "fresh": (0.0, 1.0), "factor": (1.0, 5.0)})
def fresh_torque(torque: NMm, *, fresh: Share, factor: Number) -> NMm:
    """Torque that fresh grease adds to the viscous torque of a run-in bearing: (factor - 1) M0 by its share.

    Published: 2 to 5 times the run-in value for a fresh or overfilled bearing. Within that range 4.25 is taken where
    all grease is fresh: one regreasing then starts at 2.8 to 4 times, and the housings of motors rise by 10 to 20 K,
    14 to 17 K in the middle, as field notes have it, since a bearing thins its oil and cools better as it warms. (With
    a fixed cooling of 1 W/K and no such answer, 2 to 2.5 times would do the same.)

    torque [N*mm]: viscous torque M0 of the run-in bearing at its run-in temperature, any shape
    fresh [1]: share of the working grease that is fresh and has not channelled, broadcasts
    factor [1]: times the run-in torque where all of it is fresh, broadcasts; `FRESH`
    returns [N*mm]

    >>> fresh_torque("100 N*mm", fresh=0.5, factor=4).round(6)
    <Quantity(150.0, 'newton * millimeter')>
    """
    return (factor - 1.0) * fresh * torque


@method(source="palacios", valid={"volume": (0.0, 1e9), "yield_stress": (0.0, 1e6)})
def yield_torque(volume: Cm3, *, rate: PerSecond, speed: Rpm, yield_stress: Pa) -> NMm:
    """Torque that makes grease at rest yield at room temperature: V tau_y (rate / omega).

    The shear of `churning.shear_rate` over the turning it comes with, at vanishing speed.

    volume [cm^3]: grease between the rings, any shape
    rate [1/s]: shear rate at the speed, broadcasts
    speed [rpm]: speed that the rate is for, broadcasts
    yield_stress [Pa]: yield stress at 25 degC, broadcasts
    returns [N*mm]

    >>> yield_torque("16 cm^3", rate="584 1/s", speed="1480 rpm", yield_stress="400 Pa").round(1)
    <Quantity(24.1, 'newton * millimeter')>
    """
    return volume * 1e-6 * yield_stress * rate / (speed * (math.pi / 30)) * 1000


@method(source="astm-d1478", valid={"temperature": (-80.0, 100.0), "lowest": (-100.0, 20.0)})
def breakaway_torque(*, temperature: DegC, lowest: DegC, pitch_diameter: Mm, at_room: NMm) -> NMm:
    """Most torque that a grease at rest may take to break away in the cold, of one that just meets its lower limit.

    The lower temperature limit of a grease is where a 6204 bearing, 33.5 mm mean diameter, starts with at most
    1000 N mm (from memory); another size takes it by the cube of its mean diameter. Between that and the torque at
    25 degC the logarithm runs straight. Greases in use mostly stay below, by up to a third: an upper bound.

    temperature [degC]: of the start, any shape; above 25 degC the torque at 25 degC holds
    lowest [degC]: lower temperature limit of the grease, broadcasts
    pitch_diameter [mm]: mean diameter dm, broadcasts
    at_room [N*mm]: torque at 25 degC, broadcasts; `yield_torque`
    returns [N*mm]

    >>> breakaway_torque(
    ...     temperature="-30 degC", lowest="-30 degC", pitch_diameter="33.5 mm", at_room="10 N*mm"
    ... ).round(0)
    <Quantity(1000.0, 'newton * millimeter')>
    """
    least = np.maximum(at_room, 1e-9)
    most = np.maximum(LOW_TORQUE * (pitch_diameter / LOW_TORQUE_SIZE) ** 3, least)
    share = np.maximum(ROOM - temperature, 0.0) / (ROOM - lowest)
    torque: Array = least * np.exp(np.log(most / least) * share)
    return torque
