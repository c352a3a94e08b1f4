"""Grease churning: what cannot clear from a filled bearing is sheared between cage and rings, and heats it.

No standard covers it. The physical line below (a volume of grease, a shear rate, a shear stress) is held to the
published range: the viscous torque of an overfilled bearing is 2 to 5 times its run-in value (Eschmann, Hasbargen &
Weigand; Harris).
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Cm3, Mm, MPaS, NMm, Number, Pa, PerSecond, Rpm, Share, Watt

# Share of the free volume above which grease moves on into the housing when there is room. Common practice puts it at
# 0.30 to 0.35.
CLEAR_SHARE = 0.33

# The gap in which held grease is sheared, as a share of the section height (D - d)/2. Estimate, range 0.15 to 0.20.
GAP_SHARE = 0.175

# Exponent of the power-law part of the shear stress of a soap grease (Palacios). From memory, range 0.4 to 0.6.
POWER_EXPONENT = 0.5

# Churning adds at most this many times the run-in viscous torque: published range "2 to 5 times", of which 1 is the
# run-in torque itself (Eschmann; Harris).
MOST_CHURNING = 4.0


@method(source="own-estimate", valid={"fill": (0.0, 1.0), "housing_fill": (0.0, 1.0)})
def held_volume(*, fill: Share, free_volume: Cm3, void: Cm3, housing_fill: Share, is_open: Number) -> Cm3:
    """Volume of grease that cannot clear and stays to be churned.

    V_held = max(0, max(0, fill - 0.33) V_free - room), room = (1 - housing_fill) V_void; none with the relief open.

    fill [1]: grease in the bearing as a share of its free volume
    free_volume [cm^3]: free volume of the bearing
    void [cm^3]: space in the housing beside the bearing
    housing_fill [1]: share of that space already filled
    is_open [1]: 1 where a relief or drain is open, else 0
    returns [cm^3]

    >>> held_volume(fill=1, free_volume="50 cm^3", void="0 cm^3", housing_fill=0, is_open=0).round(6)
    <Quantity(33.5, 'centimeter ** 3')>
    """
    excess = np.maximum(0.0, fill - CLEAR_SHARE) * free_volume
    room = (1.0 - housing_fill) * void
    return np.where(is_open > 0, 0.0, np.maximum(0.0, excess - room))


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


@method(source="eschmann")
def held_to_range(*, churning_torque: NMm, run_in_torque: NMm) -> NMm:
    """Churning torque, held to the published range of 4 times the run-in viscous torque on top of it.

    churning_torque [N*mm]: churning torque by the physical line
    run_in_torque [N*mm]: viscous torque of the run-in bearing at the same temperature
    returns [N*mm]

    >>> held_to_range(churning_torque="900 N*mm", run_in_torque="100 N*mm").round(6)
    <Quantity(400.0, 'newton * millimeter')>
    """
    return np.minimum(churning_torque, MOST_CHURNING * run_in_torque)
