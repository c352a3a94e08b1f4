"""Bearings: from a designation or from dimensions to everything that is asked of a bearing.

Dimensions are the standards'. Ratings, f0, f1 and mass that the user does not give are estimated from the outside and
marked so (`Bearing.estimated`, `Bearing.basis`). What the user gives goes before any estimate (`with_given`).
"""

from __future__ import annotations

import dataclasses
import math
import re
from typing import Any

import numpy as np

from lubecheck.data import bearing_designation as reader
from lubecheck.data.bearing_series import SERIES, Series, of_family
from lubecheck.data.dimensions import Boundary
from lubecheck.data.families import FAMILIES
from lubecheck.data.rolling_bearing import (
    ARRANGEMENTS,
    CAGES,
    CLEARANCES,
    CONTACT_ANGLES,
    LOAD_TORQUES,
    SEALS,
    Bearing,
    assemble,
    fatigue_limit,
    fatigue_spread,
)
from lubecheck.errors import Fault, InputError, nearest, shown
from lubecheck.physics import grease_amount

__all__ = [
    "ARRANGEMENTS",
    "CAGES",
    "CLEARANCES",
    "SEALS",
    "Bearing",
    "designations",
    "find",
    "from_dimensions",
    "with_given",
]

_LEAST_PAIR_ANGLE = 20.0  # deg, where the tables of two-row bearings begin (ISO 281)
_FULL_COMPLEMENT = "full complement cylindrical roller"
# A given figure that is this many times above or below the estimate is a slip of unit or of bearing, not a better one.
_RATING_SLIP, _MASS_SLIP = 4.0, 2.5
_FIGURES = ("dynamic_rating", "static_rating", "fatigue_limit", "mass", "f0", "f1", "contact_angle")
_WORDS = {"clearance": CLEARANCES, "seal": SEALS, "cage": CAGES, "load_torque": LOAD_TORQUES}


def designations(family: str | None = None) -> list[str]:
    """Return the basic designations of the tables, of one family or of all.

    >>> "6309" in designations("deep groove ball")
    True
    """
    return [series.name(bore) for series in SERIES if family in (None, series.family) for bore in series.boundaries()]


def find(designation: str) -> Bearing:
    """Return the bearing that a designation names; spaces, case, dots and hyphens do not matter.

    Raises InputError, with the nearest designations there are, where the basic designation is in none of the tables.

    >>> bearing = find("6309-2Z/C3")
    >>> bearing.bore, bearing.outside, bearing.width, bearing.seal, bearing.clearance
    (45.0, 100.0, 25.0, 'shields', 'C3')
    """
    read = reader.read(designation)
    if read is None:
        expected = 'a basic designation of the tables with its suffixes, such as "6309", "22218 K/C3" or "NU 310"'
        raise InputError([Fault("designation", shown(designation), expected, nearest=_nearest(designation))])
    says: dict[str, Any] = dict(read.says)
    series, unread = read.series, read.unread
    if says.get("cage") == "full complement":
        series = next((other for other in of_family(_FULL_COMPLEMENT) if other.digits == series.digits), series)
    if series.family == _FULL_COMPLEMENT:
        says["cage"] = "full complement"
    if series.standard == "iso-9628":  # insert bearings are sealed as a rule
        says = {"seal": "contact seals", "sealed_sides": 2, **says}
    angle, angle_basis = read.boundary.contact_angle or series.contact_angle, None
    if read.boundary.contact_angle is not None:
        angle_basis = series.standard
    if "contact_angle" in says:
        angle, angle_basis = says.pop("contact_angle"), "din-623"
    arrangement = says.pop("arrangement", "single")
    if (
        arrangement != "single"
        and angle is not None
        and angle < _LEAST_PAIR_ANGLE
        and not FAMILIES[series.family].is_roller
    ):
        # flatter pairs are in no table here: counted as one of the two bearings, which is the cautious side
        arrangement, unread = "single", (*unread, f"{arrangement} pair")
    count = 1 if arrangement == "single" else 2
    made = assemble(
        series,
        bore=read.boundary.bore,
        outside=read.boundary.outside,
        width=count * read.boundary.width,
        contact_angle=angle,
        rows=count * series.rows,
        arrangement=arrangement,
        dimensions=series.standard,
        angle_basis=angle_basis,
    )
    name = read.base + ("" if read.suffix[:1] in ("", "-", "/", ".") else " ") + read.suffix
    basis = {**made.basis, **dict.fromkeys(says, "din-623")}
    return dataclasses.replace(made, designation=name, basis=basis, unread=unread, **says)


def from_dimensions(
    family: str,
    *,
    bore: float,
    outside: float,
    width: float,
    series: str | None = None,
    contact_angle: float | None = None,
    rows: int | None = None,
) -> Bearing:
    """Return a bearing of a family by its dimensions in mm, with the estimates of the series it is most like.

    `series` is a bearing series of the family ("63") or its ISO dimension series ("03"); left out, it is found from the
    proportions. Raises InputError, all faults at once.

    >>> from_dimensions("deep groove ball", bore=44.45, outside=101.6, width=25.4).series
    '63'
    """
    faults = _dimension_faults(family, bore, outside, width, rows)
    if not faults:
        chosen = _alike(family, bore, outside, width, series)
        if chosen is None:
            names = [name for one in of_family(family) for name in (one.digits, one.dimension_series)]
            expected = f"a series of the {family} bearings: {', '.join(one.digits for one in of_family(family))}"
            faults.append(Fault("series", shown(series), expected, nearest=nearest(str(series), names)))
        faults += _angle_faults(family, contact_angle)
    if faults or chosen is None:
        raise InputError(faults)
    like, size = chosen
    is_given = contact_angle is not None and family in CONTACT_ANGLES
    return assemble(
        like,
        bore=float(bore),
        outside=float(outside),
        width=float(width),
        contact_angle=contact_angle if is_given else size.contact_angle or like.contact_angle,
        rows=like.rows if rows is None else rows,
        dimensions="user",
        angle_basis="user" if is_given else None,
    )


def with_given(bearing: Bearing, **given: Any) -> Bearing:
    """Return a bearing with the user's own figures (house units) in place of the estimates.

    Takes dynamic_rating, static_rating, fatigue_limit, mass, contact_angle, clearance, seal, cage, f0 and f1; None
    counts as not given. What follows from a given figure is worked out again: C_u from C0, and ratings, f0 of ISO 76
    and the load rule from the contact angle. Raises InputError, all faults at once.

    >>> mine = with_given(find("6309"), static_rating=31500.0)
    >>> round(mine.fatigue_limit), mine.basis["static_rating"], "static_rating" in mine.estimated
    (1432, 'user', False)
    """
    stated = {key: value for key, value in given.items() if value is not None}
    faults = [fault for key, value in stated.items() for fault in _given_faults(bearing, key, value)]
    if not faults and stated.get("fatigue_limit", 0.0) >= stated.get("static_rating", math.inf):
        expected = f"less than the static rating {stated['static_rating']:g} N"
        faults.append(Fault("fatigue_limit", f"{stated['fatigue_limit']:g} N", expected))
    if "mass" in stated and not faults:
        faults = _filled(bearing, float(stated["mass"]))
    if faults:
        raise InputError(faults)
    if "contact_angle" in stated and bearing.family in CONTACT_ANGLES:
        bearing = _at_angle(bearing, float(stated["contact_angle"]))
    stated.pop("contact_angle", None)
    estimated = {key: spread for key, spread in bearing.estimated.items() if key not in stated}
    if "static_rating" in stated and "fatigue_limit" not in stated:
        stated["fatigue_limit"] = fatigue_limit(stated["static_rating"], bearing.pitch_diameter, bearing.family)
        estimated["fatigue_limit"] = fatigue_spread((1.0, 1.0))
        basis = {**bearing.basis, **dict.fromkeys(stated, "user"), "fatigue_limit": "iso-281"}
    else:
        basis = {**bearing.basis, **dict.fromkeys(stated, "user")}
    if "seal" in stated:
        stated["sealed_sides"] = 0 if stated["seal"] == "open" else 2
    return dataclasses.replace(bearing, estimated=estimated, basis=basis, **stated)


def _at_angle(bearing: Bearing, contact_angle: float) -> Bearing:
    """Return a bearing with the user's contact angle; figures that were not estimated stay."""
    series = next(one for one in of_family(bearing.family) if one.digits == bearing.series)
    made = assemble(
        series,
        bore=bearing.bore,
        outside=bearing.outside,
        width=bearing.width,
        contact_angle=contact_angle,
        rows=bearing.rows,
        arrangement=bearing.arrangement,
        dimensions=bearing.basis["bore"],
        angle_basis="user",
    )
    changed = {key: getattr(made, key) for key in _FIGURES if key in bearing.estimated}
    changed.update(contact_angle=contact_angle, f0_load=made.f0_load, load_rule=made.load_rule)
    estimated = {key: spread for key, spread in bearing.estimated.items() if key != "contact_angle"}
    basis = {**bearing.basis, "contact_angle": "user"}
    return dataclasses.replace(bearing, estimated=estimated, basis=basis, **changed)


def _filled(bearing: Bearing, mass: float) -> list[Fault]:
    """Refuse a mass that leaves no room for rolling elements to roll in."""
    size = {"bore": bearing.bore, "outside": bearing.outside, "width": bearing.width}
    if np.isfinite(grease_amount.free_volume.plain(**size, mass=mass)):
        return []
    most = float(grease_amount.free_volume.plain(**size, mass=0.0)) * grease_amount.STEEL_DENSITY
    return [Fault("mass", f"{mass:g} g", f"less than {most:.4g} g, at which steel fills the bearing's whole envelope")]


def _nearest(text: str) -> str | None:
    """Return the designations closest to a text: in size where its series is known, in spelling elsewhere."""
    parts = re.match(r"\s*([A-Za-z]*)[\s.-]*(\d[\d ]*)", text)
    if parts is None:
        return nearest(text.strip(), designations(), count=3)
    letters, digits = parts[1].upper(), parts[2].replace(" ", "")
    alike = [series for series in SERIES if letters in series.letters]
    for series in alike:
        if series.digits == digits[:-2]:
            bores = sorted(series.boundaries(), key=lambda bore: abs(bore - reader.bore_of(digits[-2:])))[:3]
            return ", ".join(series.name(bore, letters) for bore in bores)
    names = [series.name(bore, letters) for series in alike for bore in series.boundaries()]
    return nearest(f"{letters} {digits}".strip(), names or designations(), count=3)


def _alike(
    family: str, bore: float, outside: float, width: float, wanted: str | None
) -> tuple[Series, Boundary] | None:
    """Return the series whose size at the nearest bore has the proportions closest to these, and that size."""
    found: list[tuple[float, Series, Boundary]] = []
    for series in of_family(family):
        if wanted is None or wanted in (series.digits, series.dimension_series):
            sizes = series.boundaries()
            size = sizes[min(sizes, key=lambda other: abs(math.log(other / bore)))]
            section = math.log((outside - bore) / bore * size.bore / (size.outside - size.bore))
            slenderness = math.log(width / bore * size.bore / size.width)
            found.append((math.hypot(section, slenderness), series, size))
    if not found:
        return None
    _, series, size = min(found, key=lambda one: one[0])
    return series, size


def _dimension_faults(family: str, bore: float, outside: float, width: float, rows: int | None) -> list[Fault]:
    if family not in FAMILIES:
        return [Fault("family", shown(family), f"one of {', '.join(FAMILIES)}", nearest=nearest(family, FAMILIES))]
    faults = [
        Fault(key, f"{value:g} mm", "a positive, finite length")
        for key, value in (("bore", bore), ("outside", outside), ("width", width))
        if not 0 < value < math.inf
    ]
    if not faults and outside <= bore:
        faults.append(Fault("outside", f"{outside:g} mm", f"more than the bore {bore:g} mm"))
    if rows is not None and not 1 <= rows <= 6:
        faults.append(Fault("rows", shown(rows), "1 to 6 rows"))
    return faults


def _angle_faults(family: str, angle: float | None) -> list[Fault]:
    low, high = CONTACT_ANGLES.get(family, (0.0, 0.0))
    if angle is None or low <= angle <= high:
        return []
    expected = f"{low:g} deg" if low == high else f"{low:g} deg to {high:g} deg"
    return [Fault("contact_angle", f"{angle:g} deg", f"{expected} for {family} bearings")]


def _given_faults(bearing: Bearing, key: str, value: Any) -> list[Fault]:
    """Return what is wrong with one figure of the user's."""
    if key in _WORDS:
        words = _WORDS[key]
        if value in words:
            return []
        return [Fault(key, shown(value), f"one of {', '.join(words)}", nearest=nearest(str(value), words))]
    if key not in _FIGURES:
        known = (*_FIGURES, *_WORDS)
        return [Fault(key, shown(value), f"one of the keys {', '.join(known)}", nearest=nearest(key, known))]
    if isinstance(value, bool) or not isinstance(value, (int, float)) or not math.isfinite(value):
        return [Fault(key, shown(value), "a finite number in the house unit")]
    if key == "contact_angle":
        return _angle_faults(bearing.family, value)
    if value <= 0:
        return [Fault(key, f"{value:g}", "more than 0")]
    slip = {"dynamic_rating": _RATING_SLIP, "static_rating": _RATING_SLIP, "mass": _MASS_SLIP}.get(key)
    estimate = getattr(bearing, key)
    if slip is not None and key in bearing.estimated and not estimate / slip <= value <= estimate * slip:
        unit = "g" if key == "mass" else "N"
        expected = f"about {estimate:.3g} {unit} for these dimensions, and within a factor of {slip:g} of it"
        return [Fault(key, f"{value:g} {unit}", expected)]
    return []
