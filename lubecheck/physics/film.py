"""Film: the viscosity that a bearing needs, and the ratio of what it has to what it needs."""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Mm, Mm2PerS, Number, Rpm


@method(source="iso-281:9.3.3.1", valid={"speed": (1e-3, 1e6), "pitch_diameter": (1.0, 1e4)})
def reference_viscosity(speed: Rpm, pitch_diameter: Mm) -> Mm2PerS:
    """Reference kinematic viscosity: the least that separates the surfaces adequately.

    nu_1 = 45000 n^-0.83 Dpw^-0.5 for n < 1000 rpm, 4500 n^-0.5 Dpw^-0.5 from 1000 rpm. The two do not quite meet at
    1000 rpm (they differ by 2 %): the standard prints them so.

    speed [rpm]: speed n of the turning ring, any shape
    pitch_diameter [mm]: pitch diameter Dpw, the mean diameter (d + D)/2 may stand for it, broadcasts with speed
    returns [mm^2/s]

    >>> reference_viscosity("1480 rpm", "72.5 mm").round(2)
    <Quantity(13.74, 'millimeter ** 2 / second')>
    """
    slow = 45000 * np.exp(-0.83 * np.log(speed))
    fast = 4500 * np.exp(-0.5 * np.log(speed))
    return np.where(speed < 1000, slow, fast) / np.sqrt(pitch_diameter)


@method(source="iso-281:9.3.3", valid={"nu": (1e-6, 1e9), "nu_1": (1e-6, 1e9)})
def viscosity_ratio(*, nu: Mm2PerS, nu_1: Mm2PerS) -> Number:
    """Viscosity ratio kappa = nu / nu_1.

    nu [mm^2/s]: kinematic viscosity at the operating temperature, any shape
    nu_1 [mm^2/s]: reference kinematic viscosity, broadcasts with nu
    returns [1]

    >>> viscosity_ratio(nu="27.48 mm^2/s", nu_1="13.74 mm^2/s").round(6)
    <Quantity(2.0, 'dimensionless')>
    """
    return nu / nu_1
