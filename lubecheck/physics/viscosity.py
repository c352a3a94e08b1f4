"""Viscosity and temperature: ASTM D341 in its full form, least squares through points, blends, and derating.

The whole subject is importable from here: viscosity index, Saybolt seconds, density and the pressure coefficient
have files of their own beside this one.
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.physics.density import (
    density,
    density_by_expansion,
    dynamic_viscosity,
    pressure_coefficient,
    pressure_coefficient_by_slope,
)
from lubecheck.physics.saybolt import kinematic_from_saybolt, saybolt_from_kinematic
from lubecheck.physics.viscosity_index import nu_40_from_index, nu_100_from_index, viscosity_index
from lubecheck.units import Array, DegC, Mm2PerS, Number, Share

__all__ = [
    "blend",
    "blend_share",
    "constant_through",
    "density",
    "density_by_expansion",
    "derated_viscosity",
    "dynamic_viscosity",
    "fit",
    "kinematic_from_saybolt",
    "kinematic_viscosity",
    "nu_40_from_index",
    "nu_100_from_index",
    "pressure_coefficient",
    "pressure_coefficient_by_slope",
    "saybolt_from_kinematic",
    "sheared_viscosity",
    "temperature_of_viscosity",
    "viscosity_from_constants",
    "viscosity_index",
    "walther_constants",
    "walther_ordinate",
]

_KELVIN = 273.15
_LN_10 = np.log(10.0)
_LOG_40 = np.log(40 + _KELVIN)
_LOG_100 = np.log(100 + _KELVIN)
_NU = (0.21, 2e7)  # mm^2/s, the range of ASTM D341 with the low-viscosity term
_TEMPERATURE = (-70.0, 370.0)  # degC, the range of the charts of ASTM D341
# Above this Z - 0.7 the low-viscosity term is below 2e-11 of the viscosity, and is not computed on the way back.
_TERM_ENDS = 5.0


def _term(nu: Array) -> Array:
    """Low-viscosity term of Z (ASTM D341); it matters below 2 mm^2/s."""
    return np.exp(-1.47 + nu * (-1.84 - 0.51 * nu))


def _log_log(nu: Array) -> Array:
    """Return ln ln Z, the scale on which ASTM D341 is a straight line in ln T."""
    return np.log(np.log(nu + 0.7 + _term(nu)))


def _without_term(w: Array) -> Array:
    """Return the viscosity whose nu + term(nu) is w, for small w.

    ASTM D341 prints an approximate inverse (0.2 % at worst); one step of Halley's from it makes the way back exact to
    1e-10.
    """
    nu = w - np.exp(-0.7487 + w * (-3.295 + w * (0.6119 - 0.3193 * w)))
    term = _term(nu)
    bend = 1.84 + 1.02 * nu
    miss, slope = nu + term - w, 1 - bend * term
    return nu - miss / (slope - miss * (bend * bend - 1.02) * term / (2 * slope))


def _from_log_z(log_z: Array) -> Array:
    """Return the viscosity from ln Z, an array of the caller's own that is overwritten (memory is what costs)."""
    w = np.exp(log_z, out=log_z)
    w -= 0.7
    low = w < _TERM_ENDS
    if low.any():
        w[low] = _without_term(w[low])
    return w[()]


@method(source="astm-d341", valid={"nu": _NU})
def walther_ordinate(nu: Mm2PerS) -> Number:
    """Ordinate of the charts of ASTM D341, ln ln Z: over ln T[K] an oil is a straight line.

    Z = nu + 0.7 + exp(-1.47 - 1.84 nu - 0.51 nu^2).

    nu [mm^2/s]: kinematic viscosity, any shape
    returns [1]

    >>> walther_ordinate("100 mm^2/s").round(3)
    <Quantity(1.529, 'dimensionless')>
    """
    return _log_log(nu)


@method(source="astm-d341", valid={"nu_40": _NU, "nu_100": _NU})
def walther_constants(*, nu_40: Mm2PerS, nu_100: Mm2PerS) -> tuple[Number, Number]:
    """Constants A and B of log10 log10 Z = A - B log10 T[K] through the viscosities at 40 and 100 degC.

    Z = nu + 0.7 + exp(-1.47 - 1.84 nu - 0.51 nu^2). Not a number where nu_100 is not below nu_40: such a pair is
    swapped or misread, and no liquid of this chart.

    nu_40 [mm^2/s]: kinematic viscosity at 40 degC, any shape
    nu_100 [mm^2/s]: kinematic viscosity at 100 degC, broadcasts with nu_40
    returns [1, 1]

    >>> a, b = walther_constants(nu_40="100 mm^2/s", nu_100="11.1 mm^2/s")
    >>> a.round(3), b.round(3)
    (<Quantity(9.203, 'dimensionless')>, <Quantity(3.567, 'dimensionless')>)
    """
    at_40 = _log_log(nu_40)
    slope = (at_40 - _log_log(nu_100)) / (_LOG_100 - _LOG_40)
    slope = np.where(slope > 0, slope, np.nan)
    # log10 log10 Z = (ln ln Z - ln ln 10)/ln 10, and log10 T = ln T/ln 10
    return (at_40 - np.log(_LN_10) + slope * _LOG_40) / _LN_10, slope


@method(source="astm-d341", valid={"temperature": _TEMPERATURE})
def viscosity_from_constants(temperature: DegC, *, a: Number, b: Number) -> Mm2PerS:
    """Kinematic viscosity at a temperature from the constants of ASTM D341.

    nu + term(nu) = 10^10^(A - B log10 T) - 0.7, the low-viscosity term taken off exactly (see `_without_term`).

    temperature [degC]: temperature, any shape
    a [1]: constant A, broadcasts with temperature
    b [1]: slope B, broadcasts with temperature
    returns [mm^2/s]

    >>> viscosity_from_constants("70 degC", a=9.2034, b=3.5668).round(1)
    <Quantity(27.2, 'millimeter ** 2 / second')>
    """
    kelvin = np.asarray(temperature + _KELVIN)
    x = np.asarray(a * _LN_10 - b * np.log(kelvin, out=kelvin))
    np.exp(x, out=x)
    x *= _LN_10
    return _from_log_z(x)


@method(source="astm-d341", valid={"temperature": _TEMPERATURE, "nu_40": _NU, "nu_100": _NU})
def kinematic_viscosity(temperature: DegC, *, nu_40: Mm2PerS, nu_100: Mm2PerS) -> Mm2PerS:
    """Kinematic viscosity at a temperature from those at 40 and 100 degC (ASTM D341, full form).

    A straight line of ln ln Z over ln T. Mineral and most synthetic oils follow it within a few per cent between
    -10 and 150 degC; below the cloud point, or above boiling, no chart holds. Not a number where nu_100 is not
    below nu_40.

    temperature [degC]: temperature, any shape
    nu_40 [mm^2/s]: kinematic viscosity at 40 degC, broadcasts with temperature
    nu_100 [mm^2/s]: kinematic viscosity at 100 degC, broadcasts with temperature
    returns [mm^2/s]

    >>> kinematic_viscosity("70 degC", nu_40="100 mm^2/s", nu_100="11.1 mm^2/s").round(1)
    <Quantity(27.2, 'millimeter ** 2 / second')>
    """
    a, b = walther_constants.plain(nu_40=nu_40, nu_100=nu_100)
    return viscosity_from_constants.plain(temperature, a=a, b=b)


@method(source="astm-d341", valid={"nu": _NU, "nu_40": _NU, "nu_100": _NU})
def temperature_of_viscosity(*, nu: Mm2PerS, nu_40: Mm2PerS, nu_100: Mm2PerS) -> DegC:
    """Temperature at which an oil has a viscosity: the inverse of `kinematic_viscosity` (ASTM D341, full form).

    T[K] = 10^((A - log10 log10 Z)/B). A result outside -70 to 370 degC is outside the charts of the standard. Not a
    number where nu_100 is not below nu_40.

    nu [mm^2/s]: kinematic viscosity, any shape
    nu_40 [mm^2/s]: kinematic viscosity at 40 degC, broadcasts with nu
    nu_100 [mm^2/s]: kinematic viscosity at 100 degC, broadcasts with nu
    returns [degC]

    >>> temperature_of_viscosity(nu="27.2 mm^2/s", nu_40="100 mm^2/s", nu_100="11.1 mm^2/s").round(0)
    <Quantity(70.0, 'degree_Celsius')>
    """
    at_40 = _log_log(nu_40)
    slope = (at_40 - _log_log(nu_100)) / (_LOG_100 - _LOG_40)
    slope = np.where(slope > 0, slope, np.nan)
    kelvin: Array = np.exp(_LOG_40 + (at_40 - _log_log(nu)) / slope)
    return kelvin - _KELVIN


@method(source="astm-d341", valid={"temperature": _TEMPERATURE, "nu": _NU})
def constant_through(temperature: DegC, *, nu: Mm2PerS, b: Number) -> Number:
    """Constant A of ASTM D341 of the oil that has a viscosity at a temperature, with a given slope.

    temperature [degC]: temperature, any shape
    nu [mm^2/s]: kinematic viscosity there, broadcasts
    b [1]: slope B, broadcasts
    returns [1]

    >>> constant_through("40 degC", nu="100 mm^2/s", b=3.567).round(2)
    <Quantity(9.2, 'dimensionless')>
    """
    constant: Array = (_log_log(nu) - np.log(_LN_10) + b * np.log(np.asarray(temperature) + _KELVIN)) / _LN_10
    return constant


@method(source="astm-d341", valid={"temperature": _TEMPERATURE, "nu": _NU})
def fit(temperature: DegC, nu: Mm2PerS) -> tuple[Number, Number, Share]:
    """Constants A and B of ASTM D341 by least squares through two or more points, and how badly they fit.

    The squares are those of log10 log10 Z. The residual is the greatest |fitted/given - 1| of the viscosity: zero for
    two points, below about 0.02 for clean data of one oil. Points run along the last axis; leading axes are separate
    oils. Not a number with fewer than two different temperatures, or where viscosity does not fall with temperature.

    temperature [degC]: temperatures of the points, shape (..., points)
    nu [mm^2/s]: kinematic viscosities at them, broadcasts with temperature
    returns [1, 1, 1]

    >>> a, b, residual = fit(["40 degC", "70 degC", "100 degC"], ["100 mm^2/s", "27.4 mm^2/s", "11.1 mm^2/s"])
    >>> b.round(2), residual.to("percent").round(1)
    (<Quantity(3.57, 'dimensionless')>, <Quantity(0.5, 'percent')>)
    """
    x, y = np.broadcast_arrays(np.log(np.asarray(temperature) + _KELVIN), _log_log(np.asarray(nu)))
    mean_x, mean_y = x.mean(axis=-1, keepdims=True), y.mean(axis=-1, keepdims=True)
    spread = ((x - mean_x) ** 2).sum(axis=-1, keepdims=True)
    is_line = spread > 1e-12  # two temperatures less than 1 mK apart are one
    slope = -((x - mean_x) * (y - mean_y)).sum(axis=-1, keepdims=True) / np.where(is_line, spread, 1.0)
    slope = np.where(is_line & (slope > 0), slope, np.nan)
    a = (mean_y - np.log(_LN_10) + slope * mean_x) / _LN_10
    fitted = viscosity_from_constants.plain(np.asarray(temperature), a=a, b=slope)
    return a[..., 0], slope[..., 0], np.abs(fitted / nu - 1).max(axis=-1)


@method(source="astm-d7152", valid={"nu_a": _NU, "nu_b": _NU, "share_b": (0.0, 1.0)})
def blend(*, nu_a: Mm2PerS, nu_b: Mm2PerS, share_b: Share) -> Mm2PerS:
    """Kinematic viscosity of a blend of two oils, all at one temperature (ASTM D7152, log-log scale).

    log10 log10 Z of the blend is the mean of the two by volume share. Base oils of one kind within about 5 %; oils far
    apart in viscosity, and ones with polymer, depart more.

    nu_a [mm^2/s]: kinematic viscosity of oil a, any shape
    nu_b [mm^2/s]: kinematic viscosity of oil b at the same temperature, broadcasts with nu_a
    share_b [1]: volume share of oil b, broadcasts with nu_a
    returns [mm^2/s]

    >>> blend(nu_a="32 mm^2/s", nu_b="460 mm^2/s", share_b="50 %").round(0)
    <Quantity(101.0, 'millimeter ** 2 / second')>
    """
    at_a = _log_log(nu_a)
    return _from_log_z(np.asarray(np.exp(at_a + share_b * (_log_log(nu_b) - at_a))))


@method(source="astm-d7152", valid={"nu": _NU, "nu_a": _NU, "nu_b": _NU})
def blend_share(*, nu: Mm2PerS, nu_a: Mm2PerS, nu_b: Mm2PerS) -> Share:
    """Volume share of oil b that gives a blend of oils a and b a viscosity: the inverse of `blend`.

    Not a number where no share from 0 to 1 does, which includes oils a and b of one viscosity.

    nu [mm^2/s]: kinematic viscosity wanted, any shape
    nu_a [mm^2/s]: kinematic viscosity of oil a at the same temperature, broadcasts with nu
    nu_b [mm^2/s]: kinematic viscosity of oil b at the same temperature, broadcasts with nu
    returns [1]

    >>> blend_share(nu="100 mm^2/s", nu_a="32 mm^2/s", nu_b="460 mm^2/s").round(2)
    <Quantity(0.5, 'dimensionless')>
    """
    at_a = _log_log(nu_a)
    reach = _log_log(nu_b) - at_a
    share = (_log_log(nu) - at_a) / np.where(reach == 0, np.nan, reach)
    rounding = 1e-9  # so that the viscosity of a pure oil gives exactly 0 or 1
    is_share = (share >= -rounding) & (share <= 1 + rounding)
    return np.where(is_share, np.clip(share, 0.0, 1.0), np.nan)


@method(source="astm-d6022", valid={"nu": _NU, "nu_base": _NU, "stability_index": (0.0, 100.0)})
def sheared_viscosity(*, nu: Mm2PerS, nu_base: Mm2PerS, stability_index: Number) -> Mm2PerS:
    """Viscosity of an oil whose viscosity-index improver has been sheared in service.

    nu - (index/100)(nu - nu_base): the permanent shear stability index is the share of the thickening by polymer that
    is lost in the test it was measured by; hard gears and rolling bearings can shear more.

    nu [mm^2/s]: kinematic viscosity of the fresh oil, any shape
    nu_base [mm^2/s]: that of the oil without its improver at the same temperature, broadcasts with nu
    stability_index [1]: permanent shear stability index, 0 (stable) to 100 (all lost), broadcasts with nu
    returns [mm^2/s]

    >>> sheared_viscosity(nu="14 mm^2/s", nu_base="8 mm^2/s", stability_index=25)
    <Quantity(12.5, 'millimeter ** 2 / second')>
    """
    return nu - stability_index / 100 * (nu - nu_base)


@method(source="user", valid={"nu": _NU, "loss": (0.0, 0.9)})
def derated_viscosity(nu: Mm2PerS, loss: Share) -> Mm2PerS:
    """Viscosity less a stated share, for thinning under shear or in service that the data sheet does not show.

    A stated derating and nothing more: the share is the user's. Typical of multigrade oils at the shear rates of
    rolling contacts: 10 to 40 % (common range, from memory); of oils without polymer: none.

    nu [mm^2/s]: kinematic viscosity by the data sheet, any shape
    loss [1]: share of it that is lost, broadcasts with nu
    returns [mm^2/s]

    >>> derated_viscosity("100 mm^2/s", "15 %")
    <Quantity(85.0, 'millimeter ** 2 / second')>
    """
    return nu * (1 - loss)
