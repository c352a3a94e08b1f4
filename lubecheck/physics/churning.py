"""Grease churning: what cannot clear from a filled bearing is sheared between cage and rings, and heats it.

No standard covers it. The physical line below (a volume of grease, a shear rate, a shear stress) is held to the
published range: the viscous torque of an overfilled bearing is 2 to 5 times its run-in value (Eschmann, Hasbargen &
Weigand; Harris).
"""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from lubecheck.method import method
from lubecheck.physics.friction import Factor
from lubecheck.units import Cm3, DegC, Mm, MPaS, NMm, Number, Pa, PerSecond, Rpm, Share, Watt

# The figures of the model, each with its range and its source. The names below are what the functions use.
PARAMETERS: Mapping[str, Factor] = {
    "clear share": Factor(0.33, 0.30, 0.35, "common-practice", "fill that finds its place in the bearing by itself"),
    "gap share": Factor(0.175, 0.15, 0.20, "own-estimate", "gap in which grease is sheared, of the section height"),
    "yield stress": Factor(300.0, 150.0, 600.0, "palacios", "Pa at 25 degC, soap grease of NLGI 2"),
    "consistency": Factor(20.0, 10.0, 40.0, "palacios", "Pa s^0.5, soap grease of NLGI 2; goes with the yield stress"),
    "exponent": Factor(0.5, 0.4, 0.6, "palacios", "of the power-law part"),
    "softening": Factor(0.01, 0.005, 0.015, "palacios", "1/K, by which yield stress and consistency fall"),
    "most churning": Factor(4.0, 1.0, 4.0, "eschmann", "times the run-in viscous torque on top of it: 2 to 5 in all"),
    "least churning": Factor(1.0, 1.0, 1.0, "eschmann", "the same of a bearing packed full: 2 in all, the low end"),
    "fresh grease": Factor(4.25, 2.0, 5.0, "eschmann", "times the run-in viscous torque, where all grease is fresh"),
    "channelling": Factor(
        8e5, 2.5e5, 2.5e6, "own-estimate", "revolutions in which what is still to clear falls to 1/e"
    ),
    "passage, shields": Factor(0.5, 0.2, 0.8, "own-estimate", "share of the surplus that leaves past two shields"),
}

# Yield stress at rest by NLGI grade in Pa: soap greases, halved to doubled within a grade; see greases.csv.
NLGI_YIELD: Mapping[str, float] = {
    "000": 15.0, "00": 40.0, "0": 90.0, "1": 170.0, "2": 300.0, "3": 550.0, "4": 1000.0, "5": 1800.0, "6": 3000.0,
}  # fmt: skip

# Share of the surplus that can leave past what closes one side: an open side all, a shield some, a lip none.
PASSAGE: Mapping[str, float] = {"open": 1.0, "shields": PARAMETERS["passage, shields"].nominal, "contact seals": 0.0}
SOFTENING = PARAMETERS["softening"].nominal
REFERENCE = 25.0  # degC, at which yield stress is stated
FLOODED = 2.0  # added to 1 when a bearing stands in oil to its top: Eschmann, 2 to 3 times in all, from memory

# Share of the free volume above which grease moves on into the housing when there is room. Common practice puts it at
# 0.30 to 0.35.
CLEAR_SHARE = PARAMETERS["clear share"].nominal

# The gap in which held grease is sheared, as a share of the section height (D - d)/2. Estimate, range 0.15 to 0.20.
GAP_SHARE = PARAMETERS["gap share"].nominal

# Exponent of the power-law part of the shear stress of a soap grease (Palacios). From memory, range 0.4 to 0.6.
POWER_EXPONENT = PARAMETERS["exponent"].nominal

# Churning adds at most this many times the run-in viscous torque, and at least so many where a bearing is packed full:
# published range "2 to 5 times", of which 1 is the run-in torque itself (Eschmann; Harris).
MOST_CHURNING = PARAMETERS["most churning"].nominal
LEAST_CHURNING = PARAMETERS["least churning"].nominal


@method(source="own-estimate", valid={"fill": (0.0, 1.0), "housing_fill": (0.0, 1.0)})
def held_volume(
    *, fill: Share, free_volume: Cm3, void: Cm3, housing_fill: Share, is_open: Number, passage: Share
) -> Cm3:
    """Volume of grease that cannot clear and stays to be churned.

    V_held = V - passage min(V, room), V = max(0, fill - 0.33) V_free, room = (1 - housing_fill) V_void, and without end
    where the relief is open.

    fill [1]: grease in the bearing as a share of its free volume
    free_volume [cm^3]: free volume of the bearing
    void [cm^3]: space in the housing beside the bearing
    housing_fill [1]: share of that space already filled
    is_open [1]: 1 where a relief or drain is open, else 0
    passage [1]: share of the surplus that can leave at all: 1 past open sides, 0 past contact seals (`PASSAGE`)
    returns [cm^3]

    >>> held_volume(fill=1, free_volume="50 cm^3", void="0 cm^3", housing_fill=0, is_open=0, passage=1).round(6)
    <Quantity(33.5, 'centimeter ** 3')>
    """
    excess = np.maximum(0.0, fill - CLEAR_SHARE) * free_volume
    room = (1.0 - housing_fill) * void
    leaves = np.where(is_open > 0, excess, np.minimum(excess, room))
    return excess - passage * leaves


@method(source="palacios", valid={"temperature": (-50.0, 250.0)})
def softening(temperature: DegC) -> Number:
    """Yield stress of a grease over that at 25 degC: exp(-0.01 (T - 25)), halved in 70 K.

    From memory, 0.005 to 0.015 a kelvin; above the dropping point a grease is an oil, which this does not show.

    temperature [degC]: temperature T, any shape
    returns [1]

    >>> softening("75 degC").round(3)
    <Quantity(0.607, 'dimensionless')>
    """
    return np.exp((temperature - REFERENCE) * -SOFTENING)


@method(source="eschmann", valid={"level": (-5000.0, 5000.0), "outside": (1.0, 1e4)})
def bath_factor(*, level: Mm, outside: Mm) -> Number:
    """Viscous friction over that of an oil bath to the centre of the lowest rolling element.

    1 up to that level; above it linear up to 3 where the bearing stands in oil to its top (published 2 to 3).

    level [mm]: oil level above (+) or below (-) the centre of the lowest element, any shape
    outside [mm]: outside diameter D, broadcasts
    returns [1]

    >>> bath_factor(level="50 mm", outside="100 mm")
    <Quantity(2.0, 'dimensionless')>
    """
    return 1.0 + FLOODED * np.clip(level / outside, 0.0, 1.0)


@method(source="own-estimate")
def shear_rate(speed: Rpm, *, bore: Mm, outside: Mm) -> PerSecond:
    """Mean shear rate of held grease between the cage and the rings.

    rate = (omega r_m / 2) / gap, r_m = (d + D)/4, gap = 0.175 (D - d)/2: the cage runs at about half the speed of the
    turning ring.

    speed [rpm]: speed of the turning ring
    bore [mm]: bore d
    outside [mm]: outside diameter D
    returns [1/s]

    >>> shear_rate("1480 rpm", bore="45 mm", outside="100 mm").round(1)
    <Quantity(583.7, '1 / second')>
    """
    surface = speed * (np.pi / 30) * (bore + outside) / 4
    return surface / 2 / (GAP_SHARE * (outside - bore) / 2)


@method(source="palacios")
def shear_stress(rate: PerSecond, *, yield_stress: Pa, consistency: Number, base_viscosity: MPaS) -> Pa:
    """Shear stress of a grease at a shear rate.

    tau = tau_y + K rate^0.5 + eta_b rate (Palacios).

    rate [1/s]: shear rate
    yield_stress [Pa]: yield stress tau_y; a soap grease of NLGI 2 has about 300 Pa (150 to 600)
    consistency [1]: factor K in Pa s^0.5; a soap grease of NLGI 2 has about 20 (10 to 40)
    base_viscosity [mPa*s]: dynamic viscosity eta_b of the base oil at the temperature
    returns [Pa]

    >>> shear_stress("100 1/s", yield_stress="300 Pa", consistency=20, base_viscosity="40 mPa*s").round(6)
    <Quantity(504.0, 'pascal')>
    """
    return yield_stress + consistency * np.sqrt(rate) + base_viscosity / 1000 * rate


@method(source="palacios")
def shear_power(volume: Cm3, rate: PerSecond, stress: Pa) -> Watt:
    """Power to shear a volume of grease: volume times stress times rate.

    volume [cm^3]: volume of grease that is sheared
    rate [1/s]: shear rate
    stress [Pa]: shear stress
    returns [W]

    >>> shear_power("10 cm^3", "100 1/s", "500 Pa").round(6)
    <Quantity(0.5, 'watt')>
    """
    return volume * 1e-6 * stress * rate


@method(source="own-estimate", valid={"held": (0.0, 1e9), "free_volume": (1e-9, 1e9)})
def packed_share(*, held: Cm3, free_volume: Cm3) -> Share:
    """Held grease as a share of what a bearing packed full with no way out holds: V_held / (0.67 V_free).

    held [cm^3]: volume that cannot clear
    free_volume [cm^3]: free volume of the bearing
    returns [1]

    >>> packed_share(held="33.5 cm^3", free_volume="50 cm^3").round(6)
    <Quantity(1.0, 'dimensionless')>
    """
    return held / ((1.0 - CLEAR_SHARE) * free_volume)


@method(source="eschmann", valid={"packed": (0.0, 1.0)})
def held_to_range(*, churning_torque: NMm, run_in_torque: NMm, packed: Share) -> NMm:
    """Churning torque, held to the published range of 1 to 4 times the run-in viscous torque on top of it.

    The low end is that of a bearing packed full; of one that holds less it is as much less.

    churning_torque [N*mm]: churning torque by the physical line
    run_in_torque [N*mm]: viscous torque of the run-in bearing at the same temperature
    packed [1]: held grease as a share of what a bearing packed full holds
    returns [N*mm]

    >>> held_to_range(churning_torque="900 N*mm", run_in_torque="100 N*mm", packed=1).round(6)
    <Quantity(400.0, 'newton * millimeter')>
    """
    least = (LEAST_CHURNING * packed) * run_in_torque
    return np.minimum(np.maximum(churning_torque, least), MOST_CHURNING * run_in_torque)
