"""Density with temperature, dynamic viscosity, and what pressure does to viscosity."""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import DegC, KgPerM3, Mm2PerS, MPaS, Number, PerGPa, PerKelvin

_REFERENCE = 15.0  # degC


@method(source="astm-d1250", valid={"temperature": (-50.0, 200.0), "density_15": (800.0, 1164.0)})
def density(temperature: DegC, *, density_15: KgPerM3) -> KgPerM3:
    """Density of a petroleum lubricating oil at a temperature, from its density at 15 degC.

    rho = rho15 exp(-a dT (1 + 0.8 a dT)) with a = 0.6278/rho15 (K0 = 0, K1 = 0.6278 of the lubricating oil group,
    from memory) and dT from 15 degC: about 0.0007 1/K at 880 kg/m^3. Esters, glycols, silicones and PFPE expand
    more: give their expansion to `density_by_expansion`.

    temperature [degC]: temperature, any shape
    density_15 [kg/m^3]: density at 15 degC, broadcasts with temperature
    returns [kg/m^3]

    >>> density("70 degC", density_15="0.88 g/cm^3").round(1)
    <Quantity(845.1, 'kilogram / meter ** 3')>
    """
    return _expanded(temperature, density_15, 0.6278 / density_15)


@method(
    source="astm-d1250",
    valid={"temperature": (-60.0, 300.0), "density_15": (750.0, 2100.0), "expansion": (2e-4, 2e-3)},
)
def density_by_expansion(temperature: DegC, *, density_15: KgPerM3, expansion: PerKelvin) -> KgPerM3:
    """Density at a temperature from that at 15 degC and the oil's own coefficient of thermal expansion.

    The same law as `density`, rho = rho15 exp(-a dT (1 + 0.8 a dT)), with a given.

    temperature [degC]: temperature, any shape
    density_15 [kg/m^3]: density at 15 degC, broadcasts with temperature
    expansion [1/K]: coefficient of cubic expansion a at 15 degC, broadcasts with temperature
    returns [kg/m^3]

    >>> density_by_expansion("100 degC", density_15="1.90 g/cm^3", expansion="0.00095 1/K").round(0)
    <Quantity(1743.0, 'kilogram / meter ** 3')>
    """
    return _expanded(temperature, density_15, expansion)


def _expanded(temperature: DegC, density_15: KgPerM3, expansion: PerKelvin) -> KgPerM3:
    strain = expansion * (temperature - _REFERENCE)
    return density_15 * np.exp(-strain * (1 + 0.8 * strain))


@method(source="common-practice", valid={"nu": (0.1, 1e9), "density": (600.0, 2200.0)})
def dynamic_viscosity(nu: Mm2PerS, *, density: KgPerM3) -> MPaS:
    """Dynamic viscosity: kinematic viscosity times density, both at the same temperature.

    nu [mm^2/s]: kinematic viscosity, any shape
    density [kg/m^3]: density at the same temperature, broadcasts with nu
    returns [mPa*s]

    >>> dynamic_viscosity("100 mm^2/s", density="880 kg/m^3")
    <Quantity(88.0, 'millipascal * second')>
    """
    return nu * density / 1000


@method(source="wooster", valid={"viscosity": (1.0, 1e4)})
def pressure_coefficient(viscosity: MPaS) -> PerGPa:
    """Pressure-viscosity coefficient of a mineral oil from its dynamic viscosity at the same temperature.

    alpha = (0.6 + 0.965 log10 eta[cP]) 10^-8 1/Pa, at ambient pressure and the temperature of the contact. For
    mineral oils of 1 to 10,000 mPa*s within about 20 %; PAO and ester have about 0.6 to 0.8 of it, glycols 0.4 to 0.6,
    PFPE 1 to 1.8 (common ranges, from memory).

    viscosity [mPa*s]: dynamic viscosity at ambient pressure and the temperature of the contact, any shape
    returns [1/GPa]

    >>> pressure_coefficient("44 mPa*s").round(1)
    <Quantity(21.9, '1 / gigapascal')>
    """
    return 6 + 9.65 * np.log10(viscosity)


@method(source="so-klaus", valid={"nu": (2.0, 1000.0), "slope": (2.0, 4.5), "density": (750.0, 1050.0)})
def pressure_coefficient_by_slope(nu: Mm2PerS, *, slope: Number, density: KgPerM3) -> PerGPa:
    """Pressure-viscosity coefficient from viscosity, viscosity-temperature slope and density: a second opinion.

    alpha = (1.216 + 4.143 w^3.0627 + 2.848 10^-4 b^5.1903 w^1.5976 - 3.999 w^3.0975 rho^0.1162) 10^-8 1/Pa with
    w = log10 nu, b the slope B of ASTM D341 and rho in g/cm^3; from memory. Of mineral and many synthetic oils, 0 to
    135 degC. It takes the difference of large terms: keep to the stated range.

    nu [mm^2/s]: kinematic viscosity at ambient pressure and the temperature of the contact, any shape
    slope [1]: slope B of `walther_constants`, broadcasts with nu
    density [kg/m^3]: density at the temperature of the contact, broadcasts with nu
    returns [1/GPa]

    >>> pressure_coefficient_by_slope("50 mm^2/s", slope=3.5, density="870 kg/m^3").round(1)
    <Quantity(23.4, '1 / gigapascal')>
    """
    w = np.log10(nu)
    log_w, log_b, log_rho = np.log(w), np.log(slope), np.log(density / 1000)
    large = 4.143 * np.exp(3.0627 * log_w) - 3.999 * np.exp(3.0975 * log_w + 0.1162 * log_rho)
    return 10 * (1.216 + large + 2.848e-4 * np.exp(5.1903 * log_b + 1.5976 * log_w))
