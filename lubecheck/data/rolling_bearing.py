"""What is known of one bearing, and how it is put together from its outside, its series and its family."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from lubecheck.data import internals
from lubecheck.data.bearing_series import Series
from lubecheck.data.families import FAMILIES
from lubecheck.physics import fatigue

CLEARANCES = ("C2", "CN", "C3", "C4", "C5")
SEALS = ("open", "shields", "contact seals")
CAGES = ("steel", "brass", "polyamide", "full complement")
LOAD_TORQUES = ("constant", "load dependent")
ARRANGEMENTS = ("single", "back-to-back", "face-to-face", "tandem")
STABILISED = 120.0  # degC, rings without a suffix, DIN 623-1

Spread = tuple[float, float]

# The contact angles that each family is made with, deg; families not named here have none to give.
CONTACT_ANGLES: Mapping[str, Spread] = {
    "self-aligning ball": (3.0, 25.0),
    "angular contact ball": (10.0, 45.0),
    "double row angular contact ball": (20.0, 45.0),
    "four-point contact ball": (20.0, 45.0),
    "tapered roller": (5.0, 35.0),
    "spherical roller": (3.0, 25.0),
    "thrust ball": (90.0, 90.0),
    "thrust cylindrical roller": (90.0, 90.0),
    "thrust spherical roller": (45.0, 60.0),
}
# How far a contact angle may lie from the one assumed for the family, as factors; where none is named it is fixed.
_ANGLE_SPREADS: Mapping[str, Spread] = {
    "self-aligning ball": (0.8, 1.3),
    "angular contact ball": (0.6, 1.6),
    "double row angular contact ball": (0.83, 1.17),
    "tapered roller": (0.8, 1.2),
    "spherical roller": (0.85, 1.4),
}
# The simplified C_u against the ones that makers print by the full method.
_FATIGUE_SPREAD = (0.8, 1.2)
_FRICTION_SPREAD = (0.7, 1.4)  # a family's f0 or f1 standing in for a series that the standard does not list
_ANGULAR_RULES = (15, 25, 30, 40)


@dataclass(frozen=True, slots=True, kw_only=True)
class Bearing:
    """A bearing, or a matched pair as one, with all its figures in house units.

    `estimated` names each figure that was estimated, with the factors between which the true one may lie; `basis` has
    the source of every figure; `unread` holds the parts of the designation that were not understood.
    """

    designation: str = ""
    family: str
    series: str  # the digits of the designation: "63", "222"; of cylindrical rollers "22" for NU 22
    dimension_series: str  # ISO: width or height series, then diameter series
    bore: float
    outside: float
    width: float  # of tapered roller bearings T, of thrust bearings the height, of a pair both together
    contact_angle: float | None
    rows: int
    arrangement: str = "single"
    dynamic_rating: float
    static_rating: float
    fatigue_limit: float
    mass: float
    elements_mass: float  # of all rolling elements together, g
    clearance: str = "CN"
    seal: str = "open"
    sealed_sides: int = 0
    cage: str | None = None
    stabilised_to: float = STABILISED
    f0: float
    f1: float
    f0_load: float  # factor f0 of ISO 76, for the relative axial load f0 Fa / C0
    load_rule: str
    load_torque: str = "constant"  # form of the load factor of friction: one f1, or "load dependent", z (P0/C0)^y
    estimated: Mapping[str, Spread]
    basis: Mapping[str, str]
    unread: tuple[str, ...] = ()

    @property
    def pitch_diameter(self) -> float:
        """The mean of bore and outside diameter, which stands for the pitch diameter."""
        return (self.bore + self.outside) / 2


def assemble(
    series: Series,
    *,
    bore: float,
    outside: float,
    width: float,
    contact_angle: float | None,
    rows: int,
    arrangement: str = "single",
    dimensions: str,
    angle_basis: str | None = None,
) -> Bearing:
    """Put a bearing together: dimensions as given (`dimensions` is their source), all else estimated.

    `angle_basis` is the source of the contact angle where that is not assumed.
    """
    family = FAMILIES[series.family]
    inside = internals.estimate(series, bore=bore, outside=outside, width=width, contact_angle=contact_angle, rows=rows)
    f0, f1 = family.friction_factors(series.dimension_series)
    spreads = internals.SPREADS[series.family]
    estimated = {
        "dynamic_rating": spreads.dynamic,
        "static_rating": spreads.static,
        "fatigue_limit": fatigue_spread(spreads.static),
        "mass": internals.mass_spread(family),
    }
    basis = {
        **dict.fromkeys(("bore", "outside", "width"), dimensions),
        **dict.fromkeys(("dynamic_rating", "static_rating", "mass", "f0_load", "elements_mass"), "own-estimate"),
        "fatigue_limit": "iso-281",
        **dict.fromkeys(("f0", "f1"), family.friction_source),
        "load_rule": "iso-281",
        **dict.fromkeys(("clearance", "seal", "stabilised_to"), "din-623"),
    }
    if series.dimension_series not in family.friction:
        estimated.update(f0=_FRICTION_SPREAD, f1=_FRICTION_SPREAD)
    if contact_angle is not None:
        basis["contact_angle"] = angle_basis or "common-practice"
        if angle_basis is None and series.family in _ANGLE_SPREADS:
            basis["contact_angle"] = "own-estimate"
            estimated["contact_angle"] = _ANGLE_SPREADS[series.family]
    return Bearing(
        family=series.family,
        series=series.digits,
        dimension_series=series.dimension_series,
        bore=bore,
        outside=outside,
        width=width,
        contact_angle=contact_angle,
        rows=rows,
        arrangement=arrangement,
        dynamic_rating=inside.dynamic_rating,
        static_rating=inside.static_rating,
        fatigue_limit=fatigue_limit(inside.static_rating, (bore + outside) / 2, series.family),
        mass=inside.mass,
        elements_mass=inside.elements_mass,
        f0=f0,
        f1=f1,
        f0_load=inside.f0_load,
        load_rule=load_rule(series.family, contact_angle, arrangement),
        estimated=estimated,
        basis=basis,
    )


def fatigue_limit(static_rating: float, pitch_diameter: float, family: str) -> float:
    """Return C_u by the simplified method of ISO 281, N."""
    kind = np.asarray(FAMILIES[family].kind_code)
    return float(fatigue.fatigue_load_limit.plain(np.asarray(static_rating), np.asarray(pitch_diameter), kind))


def fatigue_spread(static_spread: Spread) -> Spread:
    """Return the spread of a C_u by the simplified method from a C0 with a spread of its own."""
    return static_spread[0] * _FATIGUE_SPREAD[0], static_spread[1] * _FATIGUE_SPREAD[1]


def load_rule(family: str, contact_angle: float | None, arrangement: str) -> str:
    """Return the load rule of a bearing: the family's, of its contact angle, or of a pair.

    A pair that carries axial load both ways counts as one bearing of two rows (ISO 281, matched bearings); for tapered
    roller bearings that is X1 1, Y1 0.45 cot, X2 0.67, Y2 0.67 cot, the rule of spherical roller bearings.

    >>> load_rule("angular contact ball", 25.0, "single"), load_rule("tapered roller", 15.0, "face-to-face")
    ('angular contact 25', 'spherical roller')
    """
    holds_both_ways = arrangement in ("back-to-back", "face-to-face")
    if family == "angular contact ball" and contact_angle is not None:
        if holds_both_ways:
            return "double row angular contact"
        return f"angular contact {min(_ANGULAR_RULES, key=lambda angle: abs(angle - contact_angle))}"
    if family == "tapered roller" and holds_both_ways:
        return "spherical roller"
    return FAMILIES[family].load_rule
