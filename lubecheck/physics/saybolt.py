"""Saybolt Universal seconds and kinematic viscosity, both ways (ASTM D2161)."""

from __future__ import annotations

from lubecheck.method import method
from lubecheck.units import Array, DegC, Mm2PerS, SayboltS

_LINEAR = 4.6324  # s per mm^2/s at 100 degF
_LEAST_NU = 1.81  # mm^2/s; the scale begins at 32 s
_LEAST_SECONDS = 31.9  # what 1.81 mm^2/s gives at 100 degF, rounded down


def _at_100_degf(nu: Array) -> Array:
    """Saybolt Universal seconds at 100 degF (D2161, equation 1)."""
    return _LINEAR * nu + (1 + 0.03264 * nu) / _polynomial(nu)


def _polynomial(nu: Array) -> Array:
    return (3930.2 + nu * (262.7 + nu * (23.97 + nu * 1.646))) * 1e-5


def _temperature_factor(temperature: Array) -> Array:
    """Seconds at a temperature over seconds at 100 degF for the same kinematic viscosity (D2161, equation 2).

    The standard writes 1 + 0.000061 (t - 100) with t in degF.
    """
    return 1 + 0.000061 * (1.8 * temperature + 32 - 100)


@method(source="astm-d2161", valid={"nu": (_LEAST_NU, 1e6), "temperature": (-20.0, 180.0)})
def saybolt_from_kinematic(nu: Mm2PerS, temperature: DegC) -> SayboltS:
    """Saybolt Universal seconds from the kinematic viscosity at the same temperature.

    U = (1 + 0.000061 (t[degF] - 100)) (4.6324 nu + (1 + 0.03264 nu)/((3930.2 + 262.7 nu + 23.97 nu^2 + 1.646 nu^3)
    10^-5)). Above 75 mm^2/s this is the standard's straight line to 0.1 %.

    nu [mm^2/s]: kinematic viscosity at the temperature, any shape
    temperature [degC]: temperature of the measurement (100 degF and 210 degF are usual), broadcasts with nu
    returns [s]

    >>> saybolt_from_kinematic("32 mm^2/s", "100 degF").round(1)
    <Quantity(150.5, 'second')>
    """
    return _temperature_factor(temperature) * _at_100_degf(nu)


@method(source="astm-d2161", valid={"seconds": (_LEAST_SECONDS, 5e6), "temperature": (-20.0, 180.0)})
def kinematic_from_saybolt(seconds: SayboltS, temperature: DegC) -> Mm2PerS:
    """Kinematic viscosity from Saybolt Universal seconds at the same temperature: the inverse of D2161.

    Newton steps from the straight line: the curve is convex and lies above it, so they fall to the root from the
    right; 7 reach rounding from 32 s on.

    seconds [s]: Saybolt Universal seconds (write "150 SUS"), any shape
    temperature [degC]: temperature of the measurement, broadcasts with seconds
    returns [mm^2/s]

    >>> kinematic_from_saybolt("150 SUS", "100 degF").round(2)
    <Quantity(31.89, 'millimeter ** 2 / second')>
    """
    base = seconds / _temperature_factor(temperature)
    nu = base / _LINEAR
    for _ in range(7):
        below = _polynomial(nu)
        rise = (262.7 + nu * (2 * 23.97 + nu * 3 * 1.646)) * 1e-5
        slope = _LINEAR + 0.03264 / below - (1 + 0.03264 * nu) * rise / (below * below)
        nu = nu - (_LINEAR * nu + (1 + 0.03264 * nu) / below - base) / slope
    return nu
