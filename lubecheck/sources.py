"""The bibliography: every method, constant and limit names one of these keys, and the result carries them.

A key may be followed by a clause after a colon ("iso-281:9.3.3.1"). `certainty` says how the figure came here:
"checked" against an example of the source or a second reference in tests/reference, "seen" in the published text,
"memory" for a figure from memory, "estimate" for a value of our own that stands in for a missing one.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Source:
    """A work that methods, constants or limits come from."""

    title: str
    certainty: str


SOURCES: Mapping[str, Source] = {
    "astm-d341": Source("ASTM D341, viscosity-temperature charts for liquid petroleum products", "checked"),
    "astm-d2270": Source("ASTM D2270 / ISO 2909, viscosity index", "checked"),
    "astm-d2161": Source("ASTM D2161, conversion of kinematic viscosity to Saybolt viscosity", "checked"),
    "astm-d7152": Source("ASTM D7152, viscosity of a blend of petroleum products", "memory"),
    "astm-d1250": Source("ASTM D1250 / API MPMS 11.1, density of lubricating oils with temperature", "memory"),
    "astm-d6022": Source("ASTM D6022, permanent shear stability index", "memory"),
    "so-klaus": Source("So & Klaus 1980, pressure-viscosity coefficient of liquid lubricants", "memory"),
    "base-oil-handbooks": Source("typical properties of base oils, lubrication handbooks", "memory"),
    "grease-selection-handbooks": Source("typical properties of grease kinds, lubrication handbooks", "memory"),
    "sae-j300": Source("SAE J300, engine oil viscosity classification (2021)", "memory"),
    "sae-j306": Source("SAE J306, automotive gear lubricant viscosity classification (2019)", "memory"),
    "agma-9005": Source("ANSI/AGMA 9005-F16, industrial gear lubrication (older AGMA numbers: 9005-D94)", "memory"),
    "iso-3448": Source("ISO 3448, ISO viscosity classification", "seen"),
    "iso-281": Source("ISO 281:2007, dynamic load ratings and rating life", "checked"),
    "iso-tr-1281-2": Source("ISO/TR 1281-2:2008, notes on ISO 281, modified rating life", "memory"),
    "iso-4406": Source("ISO 4406, coding the level of contamination by solid particles", "seen"),
    "cantley": Source("Cantley 1977, the effect of water in lubricating oil on bearing fatigue life", "memory"),
    "bearing-handbooks": Source("rolling bearing handbooks, figures they agree on", "memory"),
    "shigley": Source("Shigley, Mechanical Engineering Design, shafts and tapered roller bearings", "memory"),
    "statics": Source("statics of a beam on two supports, engineering handbooks", "checked"),
    "iso-76": Source("ISO 76:2006, static load ratings", "memory"),
    "iso-15": Source("ISO 15, radial bearings, boundary dimensions", "memory"),
    "iso-355": Source("ISO 355, tapered roller bearings, boundary dimensions", "memory"),
    "iso-104": Source("ISO 104, thrust bearings, boundary dimensions", "memory"),
    "iso-9628": Source("ISO 9628, insert bearings, boundary dimensions", "memory"),
    "din-623": Source("DIN 623-1, rolling bearing designations", "memory"),
    "iso-15312": Source("ISO 15312:2003, thermal speed rating", "memory"),
    "din-732": Source("DIN 732, thermally safe operating speed", "memory"),
    "iso-286": Source("ISO 286-1, tolerances on linear sizes, fits", "memory"),
    "iso-5753": Source("ISO 5753-1, radial internal clearance", "memory"),
    "iso-22324": Source("ISO 22324, colour-coded alerts", "seen"),
    "iec-60034": Source("IEC 60034-1, rotating electrical machines, rating (40 degC, up to 1000 m)", "memory"),
    "din-51502-oils": Source("DIN 51502 / 51517 / 51524, designation of lubricating and hydraulic oils", "memory"),
    "iso-6743-9": Source("ISO 6743-9 / ISO 12924, classification of greases", "seen"),
    "din-51825": Source("DIN 51825 / DIN 51502, designation of greases", "seen"),
    "nlgi": Source("ASTM D217 / DIN 51818, consistency grades of greases (NLGI)", "memory"),
    "palmgren": Source("Palmgren, Ball and Roller Bearing Engineering, friction torque", "memory"),
    "harris": Source("Harris & Kotzalas, Rolling Bearing Analysis", "memory"),
    "eschmann": Source("Eschmann, Hasbargen & Weigand, Ball and Roller Bearings", "memory"),
    "palacios": Source("Palacios & Palacios 1984, rheological properties of greases in bearings", "memory"),
    "churchill-chu": Source("Churchill & Chu 1975, natural convection from a horizontal cylinder", "checked"),
    "churchill-bernstein": Source("Churchill & Bernstein 1977, forced convection across a cylinder", "checked"),
    "incropera": Source("Incropera & DeWitt, Fundamentals of Heat and Mass Transfer", "memory"),
    "us-standard-atmosphere": Source("U.S. Standard Atmosphere 1976, pressure with altitude", "memory"),
    "neale": Source("Neale, The Tribology Handbook, 2nd ed. 1995", "seen"),
    "mil-hdbk-1164": Source("MIL-HDBK-1164, grease life and temperature, 48-month ceiling", "seen"),
    "grease-handbooks": Source(
        "grease interval with bore and speed, reliability handbooks (classical formula)", "seen"
    ),
    "gft-3": Source("GfT worksheet 3, rolling bearing lubrication", "memory"),
    "booser": Source("Booser 1974, grease life forecast", "memory"),
    "hamrock-dowson": Source("Hamrock & Dowson 1977 / Dowson 1968, elastohydrodynamic film thickness", "memory"),
    "wooster": Source("Wooster 1984 in So & Klaus, pressure-viscosity coefficient", "memory"),
    "bath-handbooks": Source(
        "oil change of baths with temperature, handbooks (12 months at 50 degC, 3 at 100 degC)", "seen"
    ),
    "whitby": Source("Whitby, Tribology & Lubrication Technology, November 2009, oil ageing by temperature", "seen"),
    "temperature-notes": Source("field notes on bearing temperature after regreasing, 2016", "seen"),
    "stefan-boltzmann": Source("Stefan-Boltzmann law, constant of CODATA 2018", "checked"),
    "reliability-handbooks": Source(
        "correction factors of the grease interval for dust, moisture, vibration and attitude, reliability handbooks",
        "memory",
    ),
    "fill-handbooks": Source("grease fill and replenishment of bearings, handbooks (they disagree)", "memory"),
    "weibull": Source("Weibull distribution of grease lives, slope 2.3 by handbooks", "seen"),
    "fist-2-4": Source("FIST 2-4, lubrication of powerplant equipment, US Bureau of Reclamation 1990", "seen"),
    "grease-mixing-handbooks": Source(
        "charts of grease compatibility, handbooks (they contradict each other)", "memory"
    ),
    "seal-handbooks": Source("resistance of elastomers to oils, seal handbooks", "memory"),
    "astm-d1478": Source("ASTM D1478 / IP 186, low-temperature torque of ball bearing grease", "memory"),
    "astm-d7155": Source("ASTM D7155, evaluating compatibility of mixtures of turbine lubricating oils", "memory"),
    "astm-d6185": Source("ASTM D6185, evaluating compatibility of mixtures of lubricating greases", "memory"),
    "common-practice": Source("common practice", "seen"),
    "coolprop": Source("CoolProp, open-source thermophysical properties", "checked"),
    "own-estimate": Source("an estimate of this program, with its range", "estimate"),
    "user": Source("stated by the user", "seen"),
}


def cite(key: str) -> str:
    """Return a source as it is printed: its title, its clause, and how sure the figure is.

    Raises KeyError for a key that is not in the bibliography.

    >>> cite("iso-281:9.3.3.1")
    'ISO 281:2007, dynamic load ratings and rating life, 9.3.3.1 (checked)'
    """
    work, _, clause = key.partition(":")
    source = SOURCES[work]
    return f"{source.title}{', ' if clause else ''}{clause} ({source.certainty})"
