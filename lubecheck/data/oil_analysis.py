"""Oil in use: what an analysis found, against the fresh oil, and the oil as it is now.

A measured viscosity shifts the fresh oil's line on the D341 scale, keeping its slope, so that it goes through the
measured point. The shift was chosen over keeping the viscosity index because it needs no second point, holds at any
temperature of measurement and for oils too thin to have an index, and errs to the careful side where oxidation has
thickened the oil: at +25 % the viscosity at 100 degC comes out up to 3 % lower. For an oil thinned by 25 % it comes out
up to 4 % higher than by the index, small beside such a change.
"""

from __future__ import annotations

import dataclasses
import math
import re
from dataclasses import dataclass
from typing import Literal

from lubecheck.data.cleanliness import Code, read_code
from lubecheck.data.lubricant import Lubricant
from lubecheck.data.lubricant_viscosity import as_array
from lubecheck.errors import Fault, InputError, shown
from lubecheck.physics import viscosity
from lubecheck.units import KINDS, UnreadableText, read_text

MEASUREMENT_EXPECTED = 'a viscosity at a temperature, such as "98 mm^2/s at 40 degC"'
# Common practice of oil laboratories: a change of viscosity that is watched, and one at which the oil is changed.
WATCH_CHANGE = 0.10
CHANGE_CHANGE = 0.25
# Beyond this factor it is another oil, or another temperature, and no ageing of this one: an estimate.
GREATEST_FACTOR = 3.0
# Common practice for rolling bearings in mineral oil, as shares by mass: 200 ppm is watched, 500 ppm is acted on.
WATCH_WATER = 200e-6
ACT_WATER = 500e-6
# These dissolve several times as much water as mineral oil does, so that its thresholds say nothing of them.
THIRSTY_OILS = ("ester", "PAG")
_TEMPERATURES = (-20.0, 150.0)  # degC, at which a laboratory measures
_MEASUREMENT = re.compile(r"(\S.*?)\s+at\s+(\S.*)", re.IGNORECASE)

Grade = Literal["usual", "watch", "act"]


@dataclass(frozen=True, slots=True)
class OilAnalysis:
    """What an analysis of the oil in use found."""

    fresh: Lubricant
    used: Lubricant
    nu: float | None = None  # mm^2/s, as measured
    temperature: float | None = None  # degC, at which it was measured
    fresh_nu: float | None = None  # mm^2/s, of the fresh oil there
    water: float | None = None  # share by mass
    code: Code | None = None

    @property
    def change(self) -> float | None:
        """By what share the viscosity has moved from that of the fresh oil."""
        return None if self.nu is None or self.fresh_nu is None else self.nu / self.fresh_nu - 1

    @property
    def viscosity_grade(self) -> Grade:
        """How far common practice finds that it has moved."""
        moved = abs(self.change or 0.0)
        return "usual" if moved <= WATCH_CHANGE else "watch" if moved <= CHANGE_CHANGE else "act"

    @property
    def water_grade(self) -> Grade:
        """How wet common practice finds it, for oils that dissolve as little water as mineral oil."""
        water = self.water or 0.0
        return "usual" if water <= WATCH_WATER else "watch" if water <= ACT_WATER else "act"


def read_measurement(text: str) -> tuple[float, float]:
    """Read "98 mm^2/s at 40 degC", or Saybolt seconds likewise, into mm^2/s and degC.

    Raises UnreadableText where it is anything else.

    >>> read_measurement("98 cSt at 104 degF")
    (98.0, 40.0)
    """
    match = _MEASUREMENT.fullmatch(text.strip())
    if match is None:
        raise UnreadableText(MEASUREMENT_EXPECTED)
    try:
        temperature = round(read_text(match[2], KINDS["temperature"]), 9)
    except UnreadableText as refused:
        raise UnreadableText(MEASUREMENT_EXPECTED, refused.near, refused.hint) from None
    try:
        nu = read_text(match[1], KINDS["kinematic viscosity"])
    except UnreadableText as refused:
        try:
            seconds = read_text(match[1], KINDS["Saybolt viscosity"])
        except UnreadableText:
            raise UnreadableText(MEASUREMENT_EXPECTED, refused.near, refused.hint) from None
        if viscosity.kinematic_from_saybolt.outside(seconds=seconds, temperature=temperature):
            hint = viscosity.kinematic_from_saybolt.range_text
            raise UnreadableText(MEASUREMENT_EXPECTED, hint=hint) from None
        nu = float(viscosity.kinematic_from_saybolt.plain(as_array(seconds), as_array(temperature)))
    low, high = _TEMPERATURES
    if not low <= temperature <= high:
        raise UnreadableText(MEASUREMENT_EXPECTED, hint=f"measured from {low:g} to {high:g} degC")
    if not (math.isfinite(nu) and nu > 0):
        raise UnreadableText(MEASUREMENT_EXPECTED, hint="a viscosity above zero")
    return nu, temperature


def analyse(
    fresh: Lubricant,
    *,
    measured_viscosity: str | None = None,
    water: float | None = None,
    iso_code: str | None = None,
) -> OilAnalysis | None:
    """Return what an analysis found, in the keys of a case; None where nothing was analysed.

    Raises InputError with every fault.
    """
    given = {"measured_viscosity": measured_viscosity, "water": water, "iso_code": iso_code}
    given = {key: value for key, value in given.items() if value is not None}
    if not given:
        return None
    if fresh.kind != "oil":
        expected = "no such key: it is of oil in use, and the lubricant is grease"
        raise InputError([Fault(key, shown(value), expected) for key, value in given.items()])
    faults = []
    found = OilAnalysis(fresh, fresh, water=water)
    if measured_viscosity is not None:
        try:
            found = _shifted(found, *read_measurement(measured_viscosity))
        except UnreadableText as refused:
            fault = Fault("measured_viscosity", shown(measured_viscosity), refused.expected, nearest=refused.near)
            faults.append(fault)
        except InputError as refused:
            faults += refused.faults
    if iso_code is not None:
        try:
            found = dataclasses.replace(found, code=read_code(iso_code))
        except UnreadableText as refused:
            faults.append(Fault("iso_code", shown(iso_code), refused.expected))
    if faults:
        raise InputError(faults)
    return found


def _shifted(found: OilAnalysis, nu: float, temperature: float) -> OilAnalysis:
    """Return an analysis with a measured viscosity, and the oil whose line goes through it with the fresh slope."""
    fresh = found.fresh
    nu_40, nu_100 = as_array(fresh.nu_40), as_array(fresh.nu_100)
    was = float(viscosity.kinematic_viscosity.plain(as_array(temperature), nu_40=nu_40, nu_100=nu_100))
    if not 1 / GREATEST_FACTOR <= nu / was <= GREATEST_FACTOR:
        expected = f"{was / GREATEST_FACTOR:.3g} to {was * GREATEST_FACTOR:.3g} mm^2/s, for {was:.3g} fresh"
        given = f"{nu:.4g} mm^2/s at {temperature:g} degC"
        raise InputError(
            [Fault("measured_viscosity", given, f"{expected}; beyond that it is another oil: state that one")]
        )
    a, slope = viscosity.walther_constants.plain(nu_40=nu_40, nu_100=nu_100)
    # A line of ln ln Z over ln T is moved in parallel when the temperature is multiplied: the oil in use has at T the
    # viscosity that the fresh oil has at T times this factor.
    kelvin = 273.15
    same = float(viscosity.temperature_of_viscosity.plain(nu=as_array(nu), nu_40=nu_40, nu_100=nu_100))
    factor = (same + kelvin) / (temperature + kelvin)
    a = a - slope * math.log10(factor)
    at_40, at_100 = (
        float(viscosity.viscosity_from_constants.plain(as_array(at), a=a, b=slope)) for at in (40.0, 100.0)
    )
    ranges = {name: span for name, span in fresh.ranges.items() if name not in ("nu_40", "nu_100")}
    used = dataclasses.replace(fresh, nu_40=at_40, nu_100=at_100, iso_vg=None, ranges=ranges)
    return dataclasses.replace(found, used=used, nu=nu, temperature=temperature, fresh_nu=was)
