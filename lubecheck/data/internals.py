"""The inside of a bearing, estimated from its outside: rolling elements, and from them ratings, f0 and mass."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from lubecheck.data.bearing_series import Series
from lubecheck.data.families import FAMILIES, Family
from lubecheck.physics import grease_amount, ratings

_LEAST_PITCH, _GREATEST_PITCH = 20.0, 300.0  # mm, the sizes that the growth of a shape was fitted to
STEEL = grease_amount.STEEL_DENSITY / 1000  # g/mm^3; brass cages make up a few per cent more


@dataclass(frozen=True, slots=True)
class Internals:
    """What the outside says about the inside: ratings in N, mass in g, and the factor f0 of ISO 76."""

    dynamic_rating: float
    static_rating: float
    f0_load: float
    mass: float
    elements_mass: float  # of all rolling elements together


def estimate(
    series: Series, *, bore: float, outside: float, width: float, contact_angle: float | None, rows: int
) -> Internals:
    """Estimate ratings and mass from the shape of a series, by ISO 281 and ISO 76.

    `rows` may differ from the series', as in a matched pair; the width is that of all rows together.
    """
    family = FAMILIES[series.family]
    pitch = (bore + outside) / 2
    angle = 0.0 if contact_angle is None else contact_angle
    scale = (min(max(pitch, _LEAST_PITCH), _GREATEST_PITCH) / 100) ** series.shape.growth
    diameter = series.shape.diameter * scale * (outside - bore) / 2
    length = series.shape.length * scale * width * series.rows / rows
    count = series.shape.filling * math.pi / math.asin(min(1.0, diameter / pitch))
    dynamic, static = load_ratings(
        family.name,
        diameter=diameter,
        length=length,
        pitch=pitch,
        angle=angle,
        count=count,
        # a ball in four contacts carries like two rows, in either direction: handbook ratings of the family say so
        rows=2 if series.family == "four-point contact ball" else rows,
    )
    volume = math.pi / 4 * diameter**2 * length if family.is_roller else math.pi / 6 * diameter**3
    gamma = diameter * math.cos(math.radians(angle)) / pitch
    return Internals(
        dynamic_rating=dynamic,
        static_rating=static,
        f0_load=float(ratings.static_factor.plain(np.asarray(gamma))),
        mass=STEEL * (1 - family.free_share) * math.pi / 4 * (outside**2 - bore**2) * width,
        elements_mass=STEEL * volume * count * rows,
    )


def load_ratings(
    family: str, *, diameter: float, length: float, pitch: float, angle: float, count: float, rows: int
) -> tuple[float, float]:
    """Return C and C0 of a family from its rolling elements (mm, deg, count of one row), in N."""
    pitch_diameter, contact_angle, number, row_count = (np.asarray(value) for value in (pitch, angle, count, rows))
    element, b_m = np.asarray(diameter), np.asarray(_B_M.get(family, ratings.BM_CYLINDRICAL))
    if family == "thrust ball":
        ball = {"ball_diameter": element, "pitch_diameter": pitch_diameter, "count": number}
        return float(ratings.thrust_ball_dynamic.plain(**ball)), float(ratings.thrust_ball_static.plain(**ball))
    shared = {"pitch_diameter": pitch_diameter, "contact_angle": contact_angle, "count": number}
    if not FAMILIES[family].is_roller:
        balls = {**shared, "ball_diameter": element, "rows": row_count}
        if family == "self-aligning ball":
            return (
                float(ratings.self_aligning_ball_dynamic.plain(**balls)),
                float(ratings.self_aligning_ball_static.plain(**balls)),
            )
        return float(ratings.radial_ball_dynamic.plain(**balls)), float(ratings.radial_ball_static.plain(**balls))
    rollers = {**shared, "roller_diameter": element, "roller_length": np.asarray(length)}
    if FAMILIES[family].is_thrust:
        return (
            float(ratings.thrust_roller_dynamic.plain(**rollers, b_m=b_m)),
            float(ratings.thrust_roller_static.plain(**rollers)),
        )
    rollers["rows"] = row_count
    return (
        float(ratings.radial_roller_dynamic.plain(**rollers, b_m=b_m)),
        float(ratings.radial_roller_static.plain(**rollers)),
    )


def mass_spread(family: Family) -> tuple[float, float]:
    """Return the factors that the mass may lie between, from the range of the free share of the envelope."""
    low, high = family.free_share_range
    return (1 - high) / (1 - family.free_share), (1 - low) / (1 - family.free_share)


_B_M = {
    "spherical roller": ratings.BM_SPHERICAL,
    "thrust spherical roller": ratings.BM_SPHERICAL,
    "thrust cylindrical roller": ratings.BM_THRUST_CYLINDRICAL,
}


@dataclass(frozen=True, slots=True)
class RatingSpreads:
    """The factors between which the true ratings lie, over the estimated ones."""

    dynamic: tuple[float, float]
    static: tuple[float, float]


# Nine in ten published ratings lie within these (tests/reference/test_ratings.py holds them to it). Where recent
# ratings are above the older ones that the shapes were fitted to, the upper factor allows for them.
_USUAL = RatingSpreads((0.85, 1.15), (0.85, 1.15))
SPREADS: Mapping[str, RatingSpreads] = {
    **dict.fromkeys(FAMILIES, _USUAL),
    "self-aligning ball": RatingSpreads((0.85, 1.2), (0.85, 1.15)),
    "cylindrical roller": RatingSpreads((0.88, 1.2), (0.88, 1.12)),
    "tapered roller": RatingSpreads((0.92, 1.15), (0.92, 1.1)),
    "thrust cylindrical roller": RatingSpreads((0.85, 1.2), (0.85, 1.15)),
    "thrust spherical roller": RatingSpreads((0.9, 1.15), (0.9, 1.1)),
}
