"""The sheet of a bearing: everything that follows from its designation, each figure with where it comes from."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from lubecheck.data import bearings
from lubecheck.data.bearing_series import SERIES
from lubecheck.data.bearings import Bearing
from lubecheck.data.families import FAMILIES, SOURCES
from lubecheck.errors import Fault, InputError, nearest, shown
from lubecheck.model.reader import STANDARD_INPUT, load_case
from lubecheck.model.rows import NITRILE_LIMIT, POLYAMIDE_LIMIT, kinematic_limit
from lubecheck.model.side_figures import reference_speed
from lubecheck.physics import grease_amount, loads

STANDARD, HANDBOOK, ESTIMATED, USER = "standard", "handbook", "estimated", "user"  # where a figure comes from
_STANDARDS = ("iso-", "din-")


@dataclass(frozen=True, slots=True)
class SheetFigure:
    """One figure of a bearing in its house unit; low and high where it is an estimate with a spread or a range."""

    name: str
    value: float
    unit: str
    status: str
    basis: str
    low: float | None = None
    high: float | None = None


@dataclass(frozen=True, slots=True)
class BearingSheet:
    """A bearing in figures and words."""

    designation: str
    family: str
    series: str
    figures: tuple[SheetFigure, ...]
    words: tuple[tuple[str, str], ...]
    notes: tuple[str, ...]
    unread: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Listed:
    """One line of the list of a family: its designation, the standard of its size, and the size in mm."""

    designation: str
    standard: str
    bore: float
    outside: float
    width: float


@dataclass(frozen=True, slots=True)
class ListedFamily:
    """One line of the list of families."""

    family: str
    series: tuple[str, ...]
    sizes: int


def families() -> tuple[ListedFamily, ...]:
    """Return every family with its series and how many sizes the tables hold."""
    made = []
    for name in FAMILIES:
        own = [series for series in SERIES if series.family == name]
        words = tuple(f"{series.letters[0]} {series.digits}".strip() for series in own)
        made.append(ListedFamily(name, words, sum(len(series.boundaries()) for series in own)))
    return tuple(made)


def listing(family: str) -> tuple[Listed, ...]:
    """Return every size of a family.

    Raises InputError, with the nearest name, where there is no such family.
    """
    if family not in FAMILIES:
        expected = f"one of {', '.join(FAMILIES)}"
        raise InputError([Fault("family", shown(family), expected, nearest=nearest(family, FAMILIES))])
    return tuple(
        Listed(series.name(size.bore), series.standard, size.bore, size.outside, size.width)
        for series in SERIES
        if series.family == family
        for size in series.boundaries().values()
    )


def named(text: str) -> BearingSheet:
    """Return the sheet of a designation, or of the bearing of a case file (".toml", "-").

    Raises InputError.
    """
    is_case = text == STANDARD_INPUT or text.casefold().endswith(".toml")
    return sheet(load_case(text).bearing if is_case else bearings.find(text))


def sheet(bearing: Bearing) -> BearingSheet:
    """Return the sheet of a bearing."""
    return BearingSheet(
        designation=bearing.designation,
        family=bearing.family,
        series=bearing.series,
        figures=(*_own(bearing), *_following(bearing)),
        words=_words(bearing),
        notes=tuple(_notes(bearing)),
        unread=bearing.unread,
    )


def status(bearing: Bearing, key: str) -> str:
    """Return where a figure of a bearing comes from: the user, a standard, a handbook, or an estimate.

    >>> status(bearings.find("6309"), "bore"), status(bearings.find("6309"), "dynamic_rating")
    ('standard', 'estimated')
    """
    basis = bearing.basis.get(key, "own-estimate")
    if basis == "user":
        return USER
    if key in bearing.estimated or basis == "own-estimate":
        return ESTIMATED
    return STANDARD if basis.startswith(_STANDARDS) else HANDBOOK


_OWN = (
    ("bore", "mm"), ("outside", "mm"), ("width", "mm"), ("contact_angle", "deg"), ("dynamic_rating", "N"),
    ("static_rating", "N"), ("fatigue_limit", "N"), ("mass", "g"), ("f0", "1"), ("f1", "1"),
)  # fmt: skip


def _own(bearing: Bearing) -> Iterator[SheetFigure]:
    """Yield the figures that a bearing carries itself."""
    for key, unit in _OWN:
        value = getattr(bearing, key)
        if value is None:
            continue
        low, high = bearing.estimated.get(key, (None, None))
        yield SheetFigure(
            key, value, unit, status(bearing, key), bearing.basis.get(key, "own-estimate"),
            None if low is None else low * value, None if high is None else high * value,
        )  # fmt: skip


def _following(bearing: Bearing) -> Iterator[SheetFigure]:
    """Yield the figures that follow from them; one that rests on an estimate is an estimate."""
    family = FAMILIES[bearing.family]
    pitch = bearing.pitch_diameter
    of_rating = ESTIMATED if status(bearing, "dynamic_rating") == ESTIMATED else HANDBOOK
    least = family.minimum_load_share * bearing.dynamic_rating
    yield SheetFigure("minimum_load", least, "N", of_rating, SOURCES["minimum_load_share"])
    for kind in ("grease", "oil"):
        low, high = (limit / pitch for limit in getattr(family, f"{kind}_speed_range"))
        value, source = getattr(family, f"{kind}_speed_limit") / pitch, SOURCES[f"{kind}_speed_limit"]
        yield SheetFigure(f"speed_limit_{kind}", value, "rpm", HANDBOOK, source, low, high)
    yield SheetFigure("kinematic_limit", kinematic_limit(bearing), "rpm", HANDBOOK, "common-practice")
    reference = reference_speed(
        f0=bearing.f0, f1=bearing.f1, static_rating=bearing.static_rating, bore=bearing.bore,
        outside=bearing.outside, width=bearing.width, rule=loads.RULES.index(bearing.load_rule),
    )  # fmt: skip
    if math.isfinite(reference):
        is_estimate = ESTIMATED in (status(bearing, key) for key in ("static_rating", "f0", "f1"))
        yield SheetFigure(
            "thermal_reference_speed", reference, "rpm", ESTIMATED if is_estimate else STANDARD, "iso-15312"
        )
    top, source = top_temperature(bearing)
    yield SheetFigure("top_temperature", top, "degC", HANDBOOK, source)
    of_mass = ESTIMATED if status(bearing, "mass") == ESTIMATED else HANDBOOK
    volume = float(
        grease_amount.free_volume.plain(
            bore=bearing.bore, outside=bearing.outside, width=bearing.width, mass=bearing.mass
        )
    )
    yield SheetFigure("free_volume", volume, "cm^3", of_mass, grease_amount.free_volume.source)
    speed = 0.5 * family.grease_speed_limit / pitch
    low, usual, high = (
        float(share) * volume * grease_amount.GREASE_DENSITY / 1000
        for share in grease_amount.first_fill.plain(
            speed=np.asarray(speed),
            speed_limit=np.asarray(family.grease_speed_limit / pitch),
            pitch_diameter=np.asarray(pitch),
            sealing=np.asarray(grease_amount.SEALINGS.index("closed" if bearing.sealed_sides == 2 else "open")),
        )
    )
    yield SheetFigure("usual_fill", usual, "g", of_mass, "fill-handbooks", low, high)
    if bearing.sealed_sides < 2:
        regrease = float(grease_amount.regrease_quantity.plain(outside=bearing.outside, width=bearing.width))
        yield SheetFigure("regrease_quantity", regrease, "g", HANDBOOK, "neale:A20.5")


def top_temperature(bearing: Bearing) -> tuple[float, str]:
    """Return the highest temperature of rings, cage and seals, degC, and its source."""
    parts = [(float(bearing.stabilised_to), "din-623")]
    if bearing.cage == "polyamide":
        parts.append((POLYAMIDE_LIMIT, "common-practice"))
    if bearing.seal == "contact seals":
        parts.append((NITRILE_LIMIT, "common-practice"))
    return min(parts)


def _words(bearing: Bearing) -> tuple[tuple[str, str], ...]:
    sides = {0: "", 1: ", one side", 2: ", both sides"}[bearing.sealed_sides]
    return (
        ("arrangement", bearing.arrangement),
        ("clearance", bearing.clearance),
        ("seal", bearing.seal + sides),
        ("cage", bearing.cage or "not said (metal)"),
        ("load rule", bearing.load_rule),
    )


def _notes(bearing: Bearing) -> Iterator[str]:
    if bearing.sealed_sides == 2:
        yield "closed on both sides: cannot be regreased"
    if bearing.cage == "polyamide":
        yield f"cage of polyamide: up to {POLYAMIDE_LIMIT:g} degC"
    if bearing.seal == "contact seals":
        yield f"contact seals of nitrile rubber: up to {NITRILE_LIMIT:g} degC"
    if bearing.unread:
        yield f"not understood in the designation: {', '.join(bearing.unread)}"
