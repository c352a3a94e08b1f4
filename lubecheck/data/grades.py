"""Grades of viscosity and consistency, with the body and year of each table.

A grade is a range: what it states is its limits, and a value in the middle is a stand-in for one.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

# The body and the edition that each table of grades below is of.
EDITIONS = {
    "ISO VG": "ISO 3448:1992",
    "SAE engine": "SAE J300 of 2021",
    "SAE gear": "SAE J306 of 2019",
    "AGMA": "AGMA 9005-D94 of 1994",
    "NLGI": "DIN 51818 of 1981, as ASTM D217",
}

# ISO 3448:1992, seen: middle of each grade in mm^2/s at 40 degC; limits are 10 % either side.
ISO_VG = (2.2, 3.2, 4.6, 6.8, 10, 15, 22, 32, 46, 68, 100, 150, 220, 320, 460, 680, 1000, 1500, 2200, 3200)
ISO_VG_TOLERANCE = 0.10

# SAE J300 (2021), from memory: kinematic viscosity at 100 degC in mm^2/s, "at least" and "less than". Before 2013
# grade 20 began at 5.6.
SAE_ENGINE = {
    "8": (4.0, 6.1),
    "12": (5.0, 7.1),
    "16": (6.1, 8.2),
    "20": (6.9, 9.3),
    "30": (9.3, 12.5),
    "40": (12.5, 16.3),
    "50": (16.3, 21.9),
    "60": (21.9, 26.1),
}
# Winter grades: least viscosity at 100 degC, and the temperature at which the oil must still be pumped (60,000 mPa*s).
SAE_ENGINE_WINTER = {
    "0W": (3.8, -40.0),
    "5W": (3.8, -35.0),
    "10W": (4.1, -30.0),
    "15W": (5.6, -25.0),
    "20W": (5.6, -20.0),
    "25W": (9.3, -15.0),
}

# SAE J306 (2019), from memory. Before 2005 grade 90 ran from 13.5 to 24.0 and grade 140 from 24.0 to 41.0.
SAE_GEAR = {
    "65": (3.8, 5.0),
    "70": (5.0, 6.5),
    "75": (6.5, 8.5),
    "80": (8.5, 11.0),
    "85": (11.0, 13.5),
    "90": (13.5, 18.5),
    "110": (18.5, 24.0),
    "140": (24.0, 32.5),
    "190": (32.5, 41.0),
    "250": (41.0, math.inf),
}
# Winter grades: least viscosity at 100 degC, and the temperature of 150,000 mPa*s.
SAE_GEAR_WINTER = {"70W": (4.1, -55.0), "75W": (4.1, -40.0), "80W": (7.0, -26.0), "85W": (11.0, -12.0)}

# AGMA 9005-D94 (1994), seen for 1 to 8, the others from memory: lubricant number and its ISO viscosity grade.
AGMA = {
    "0": 32,
    "1": 46,
    "2": 68,
    "3": 100,
    "4": 150,
    "5": 220,
    "6": 320,
    "7": 460,
    "8": 680,
    "8A": 1000,
    "9": 1500,
    "10": 2200,
    "11": 3200,
}

# DIN 51818 / ASTM D217, from memory: worked penetration at 25 degC in 0.1 mm.
NLGI_PENETRATION = {
    "000": (445, 475),
    "00": (400, 430),
    "0": (355, 385),
    "1": (310, 340),
    "2": (265, 295),
    "3": (220, 250),
    "4": (175, 205),
    "5": (130, 160),
    "6": (85, 115),
}


@dataclass(frozen=True, slots=True)
class Limits:
    """The limits of a grade, and a middle that may stand for it."""

    low: float
    high: float

    @property
    def middle(self) -> float:
        """The geometric middle; the low limit where the grade has no upper one."""
        return math.sqrt(self.low * self.high) if math.isfinite(self.high) else self.low


def iso_vg_limits(grade: float) -> Limits:
    """Return the limits of an ISO 3448 grade in mm^2/s at 40 degC.

    >>> iso_vg_limits(68)
    Limits(low=61.2, high=74.8)
    """
    return Limits(round(grade * (1 - ISO_VG_TOLERANCE), 6), round(grade * (1 + ISO_VG_TOLERANCE), 6))


def iso_vg_of(nu_40: float) -> float | None:
    """Return the ISO 3448 grade whose limits hold a viscosity at 40 degC; between two grades there is none.

    >>> iso_vg_of(64.0), iso_vg_of(80.0)
    (68, None)
    """
    for grade in ISO_VG:
        limits = iso_vg_limits(grade)
        if limits.low <= nu_40 <= limits.high:
            return grade
    return None


def nearest_iso_vg(number: float) -> tuple[float, ...]:
    """Return the two ISO 3448 grades nearest to a number on the scale of ratios."""
    return tuple(sorted(ISO_VG, key=lambda grade: abs(math.log(grade / number)))[:2])


def sae_engine_of(nu_100: float) -> str | None:
    """Return the SAE J300 grade, from 20 up, whose limits hold a viscosity at 100 degC.

    >>> sae_engine_of(11.1)
    '30'
    """
    return next((grade for grade in ("20", "30", "40", "50", "60") if _holds(SAE_ENGINE[grade], nu_100)), None)


def sae_gear_of(nu_100: float) -> str | None:
    """Return the SAE J306 grade whose limits hold a viscosity at 100 degC.

    >>> sae_gear_of(14.5)
    '90'
    """
    return next((grade for grade, limits in SAE_GEAR.items() if _holds(limits, nu_100)), None)


def agma_of(iso_vg: float) -> str | None:
    """Return the AGMA lubricant number of an ISO viscosity grade.

    >>> agma_of(220)
    '5'
    """
    return next((number for number, grade in AGMA.items() if grade == iso_vg), None)


def equivalents(nu_40: float, nu_100: float) -> dict[str, str]:
    """Return the grades that an oil has by its viscosity alone, by the names of `EDITIONS`.

    An SAE grade goes by the viscosity at 100 degC only: nothing is said of winter, service class or additives.

    >>> equivalents(100.0, 11.1)
    {'ISO VG': 'ISO VG 100', 'SAE engine': 'SAE 30', 'SAE gear': 'SAE 85', 'AGMA': 'AGMA 3'}
    """
    grade = iso_vg_of(nu_40)
    engine, gear = sae_engine_of(nu_100), sae_gear_of(nu_100)
    number = None if grade is None else agma_of(grade)
    found = {
        "ISO VG": None if grade is None else f"ISO VG {grade:g}",
        "SAE engine": None if engine is None else f"SAE {engine}",
        "SAE gear": None if gear is None else f"SAE {gear}",
        "AGMA": None if number is None else f"AGMA {number}",
    }
    return {name: text for name, text in found.items() if text is not None}


def _holds(limits: tuple[float, float], nu: float) -> bool:
    return limits[0] <= nu < limits[1]
