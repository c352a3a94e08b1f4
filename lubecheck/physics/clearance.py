"""Internal clearance: what a bearing has from the maker, what fits take, and what a warm inner ring takes."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import Array, Choice, DeltaDegC, Mm

EXPANSION = 12e-6  # 1/K, bearing steel, 11 to 12.5: handbooks
FIT_LOSS = 0.8  # of an interference on a solid steel shaft that the raceway grows by; 0.7 to 0.9, handbooks
SMOOTHING = 0.9  # of an interference that is left after pressing on, ground seats: handbooks, 0.8 to 0.95

CLASSES = ("C2", "CN", "C3", "C4", "C5")
KINDS = ("deep groove ball", "cylindrical roller", "spherical roller", "self-aligning ball")
# ISO 5753-1, radial internal clearance in um, from memory: (bore over, bore up to), then low and high of each class.
_TABLES: Mapping[str, tuple[tuple[float, ...], ...]] = {
    "deep groove ball": (
        (10, 18, 0, 9, 3, 18, 11, 25, 18, 33, 25, 45),
        (18, 24, 0, 10, 5, 20, 13, 28, 20, 36, 28, 48),
        (24, 30, 1, 11, 5, 20, 13, 28, 23, 41, 30, 53),
        (30, 40, 1, 11, 6, 20, 15, 33, 28, 46, 40, 64),
        (40, 50, 1, 11, 6, 23, 18, 36, 30, 51, 45, 73),
        (50, 65, 1, 15, 8, 28, 23, 43, 38, 61, 55, 90),
        (65, 80, 1, 15, 10, 30, 25, 51, 46, 71, 65, 105),
        (80, 100, 1, 18, 12, 36, 30, 58, 53, 84, 75, 120),
        (100, 120, 2, 20, 15, 41, 36, 66, 61, 97, 90, 140),
        (120, 140, 2, 23, 18, 48, 41, 81, 71, 114, 105, 160),
        (140, 160, 2, 23, 18, 53, 46, 91, 81, 130, 120, 180),
        (160, 180, 2, 25, 20, 61, 53, 102, 91, 147, 135, 200),
        (180, 200, 2, 30, 25, 71, 63, 117, 107, 163, 150, 230),
    ),
    "cylindrical roller": (
        (10, 24, 0, 25, 20, 45, 35, 60, 50, 75, 65, 90),
        (24, 30, 0, 25, 20, 45, 35, 60, 50, 75, 70, 95),
        (30, 40, 5, 30, 25, 50, 45, 70, 60, 85, 80, 105),
        (40, 50, 5, 35, 30, 60, 50, 80, 70, 100, 95, 125),
        (50, 65, 10, 40, 40, 70, 60, 90, 80, 110, 110, 140),
        (65, 80, 10, 45, 40, 75, 65, 100, 90, 125, 130, 165),
        (80, 100, 15, 50, 50, 85, 75, 110, 105, 140, 155, 190),
        (100, 120, 15, 55, 50, 90, 85, 125, 125, 165, 180, 220),
        (120, 140, 15, 60, 60, 105, 100, 145, 145, 190, 200, 245),
        (140, 160, 20, 70, 70, 120, 115, 165, 165, 215, 225, 275),
        (160, 180, 25, 75, 75, 125, 120, 170, 170, 220, 250, 300),
        (180, 200, 35, 90, 90, 145, 140, 195, 195, 250, 275, 330),
    ),
    "spherical roller": (
        (14, 18, 10, 20, 20, 35, 35, 45, 45, 60, 60, 75),
        (18, 24, 10, 20, 20, 35, 35, 45, 45, 60, 60, 75),
        (24, 30, 15, 25, 25, 40, 40, 55, 55, 75, 75, 95),
        (30, 40, 15, 30, 30, 45, 45, 60, 60, 80, 80, 100),
        (40, 50, 20, 35, 35, 55, 55, 75, 75, 100, 100, 125),
        (50, 65, 20, 40, 40, 65, 65, 90, 90, 120, 120, 150),
        (65, 80, 30, 50, 50, 80, 80, 110, 110, 145, 145, 180),
        (80, 100, 35, 60, 60, 100, 100, 135, 135, 180, 180, 225),
        (100, 120, 40, 75, 75, 120, 120, 160, 160, 210, 210, 260),
        (120, 140, 50, 95, 95, 145, 145, 190, 190, 240, 240, 300),
        (140, 160, 60, 110, 110, 170, 170, 220, 220, 280, 280, 350),
        (160, 180, 65, 120, 120, 180, 180, 240, 240, 310, 310, 390),
        (180, 200, 70, 130, 130, 200, 200, 260, 260, 340, 340, 430),
    ),
    "self-aligning ball": (
        (10, 14, 2, 10, 6, 19, 13, 26, 21, 35, 30, 48),
        (14, 18, 3, 12, 8, 21, 15, 28, 23, 37, 32, 50),
        (18, 24, 4, 14, 10, 23, 17, 30, 25, 39, 34, 52),
        (24, 30, 5, 16, 11, 24, 19, 35, 29, 46, 40, 58),
        (30, 40, 6, 18, 13, 29, 23, 40, 34, 53, 46, 66),
        (40, 50, 6, 19, 14, 31, 25, 44, 37, 57, 50, 71),
        (50, 65, 7, 21, 16, 36, 30, 50, 45, 69, 62, 88),
        (65, 80, 8, 24, 18, 40, 35, 60, 54, 83, 76, 108),
        (80, 100, 9, 27, 22, 48, 42, 70, 64, 96, 89, 124),
        (100, 120, 10, 31, 25, 56, 50, 83, 75, 114, 105, 145),
    ),
}  # fmt: skip

SHAFT_FITS = ("g6", "h6", "j6", "k5", "k6", "m5", "m6", "n6", "p6")
HOUSING_FITS = ("H7", "J7", "K7", "M7", "N7", "P7")

Fit = Annotated[NDArray[np.intp], Choice(SHAFT_FITS)]


def initial(kind: str, bore: float, clearance: str) -> tuple[float, float] | None:
    """Return the least and greatest radial clearance in mm of a class, None where the table does not reach.

    >>> initial("deep groove ball", 45.0, "C3")
    (0.018, 0.036)
    """
    place = 2 + 2 * CLASSES.index(clearance)
    for row in _TABLES.get(kind, ()):
        if row[0] < bore <= row[1]:
            return row[place] / 1000, row[place + 1] / 1000
    return None


# Shafts that turn against their load, by bore up to: common practice of handbooks for normal loads, from memory.
_USUAL_SHAFTS = {
    True: ((18.0, "j6"), (100.0, "k5"), (140.0, "m5"), (200.0, "m6"), (math.inf, "n6")),  # ball
    False: ((40.0, "k5"), (100.0, "m5"), (140.0, "m6"), (200.0, "n6"), (math.inf, "p6")),  # roller
}


def usual_shaft_fit(bore: float, *, is_ball: bool) -> str:
    """Return the tolerance class of a shaft that turns against its load, by common practice.

    >>> usual_shaft_fit(45.0, is_ball=True), usual_shaft_fit(65.0, is_ball=False)
    ('k5', 'm5')
    """
    return next(fit for largest, fit in _USUAL_SHAFTS[is_ball] if bore <= largest)


def _tolerance_unit(bore: Array) -> Array:
    """Tolerance unit i of ISO 286 in um: 0.45 D^(1/3) + 0.001 D. IT5, 6 and 7 are 7, 10 and 16 of it."""
    return 0.45 * np.cbrt(bore) + 0.001 * bore


@method(source="iso-286", valid={"bore": (10.0, 500.0)})
def shaft_interference(bore: Mm, fit: Fit) -> Mm:
    """Mean interference of a Normal class bearing on a shaft of a tolerance class; below zero: it is loose.

    The middle of the shaft's field plus half the bore's own minus tolerance, about 12 um at 40 mm. Field positions by
    the formulas of ISO 286-1 at the diameter itself, from memory: k 0.6 D^(1/3), m IT7 - IT6, n 5 D^0.34, p IT7 + 2,
    g -2.5 D^0.34; the printed steps differ by up to 3 um.

    bore [mm]: bore d, any shape
    fit: one of `SHAFT_FITS`, broadcasts
    returns [mm]

    >>> shaft_interference("45 mm", "k5").round(3)
    <Quantity(0.014, 'millimeter')>
    """
    size = np.asarray(bore, dtype=np.float64)
    unit = _tolerance_unit(size)
    it5, it6, it7 = 7 * unit, 10 * unit, 16 * unit
    far = np.exp(0.34 * np.log(size))
    k = 0.6 * np.cbrt(size)
    middles = [
        -2.5 * far - it6 / 2,
        -it6 / 2,
        it6 * 0.19,  # j6 reaches from about -0.3 to 0.7 of its width
        k + it5 / 2,
        k + it6 / 2,
        it7 - it6 + it5 / 2,
        it7 - it6 + it6 / 2,
        5 * far + it6 / 2,
        it7 + 2 + it6 / 2,
    ]
    middle = np.choose(fit, middles)
    own = 6 * np.sqrt(size / 40)  # half of the bearing's bore tolerance: 0/-8 at 10 mm, 0/-12 at 40, 0/-20 at 110
    mean: Array = (middle + own) / 1000
    return mean


@method(source="iso-286", valid={"outside": (10.0, 800.0)})
def housing_interference(outside: Mm, fit: Annotated[NDArray[np.intp], Choice(HOUSING_FITS)]) -> Mm:
    """Mean interference of a Normal class bearing in a housing bore of a tolerance class; below zero: it is loose.

    Middle of the field of the bore: H7 +IT7/2, J7 +0.1 IT7, K7 -0.2 IT7, M7 -IT7/2, N7 -0.85 IT7, P7 -1.3 IT7 (from
    memory, within 4 um), less half the bearing's own minus tolerance.

    outside [mm]: outside diameter D, any shape
    fit: one of `HOUSING_FITS`, broadcasts
    returns [mm]

    >>> housing_interference("100 mm", "H7").round(3)
    <Quantity(-0.025, 'millimeter')>
    """
    size = np.asarray(outside, dtype=np.float64)
    it7 = 16 * _tolerance_unit(size)
    middle = np.choose(fit, [0.5 * it7, 0.1 * it7, -0.2 * it7, -0.5 * it7, -0.85 * it7, -1.3 * it7])
    own = 7.5 * np.sqrt(size / 100)  # half of the outside diameter's tolerance: 0/-15 at 100 mm
    return -(middle + own) / 1000


@method(source="bearing-handbooks", valid={"shaft": (-1.0, 1.0), "housing": (-1.0, 1.0)})
def fit_loss(*, shaft: Mm, housing: Mm) -> Mm:
    """Radial clearance that the fits take: 0.8 of what is left of each interference; a loose seat takes none.

    shaft [mm]: interference on the shaft, any shape
    housing [mm]: interference in the housing, broadcasts
    returns [mm]

    >>> fit_loss(shaft="0.014 mm", housing="-0.02 mm").round(4)
    <Quantity(0.0101, 'millimeter')>
    """
    loss: Array = FIT_LOSS * SMOOTHING * (np.maximum(shaft, 0.0) + np.maximum(housing, 0.0))
    return loss


@method(source="bearing-handbooks", valid={"excess": (-500.0, 500.0), "bore": (1.0, 2000.0), "outside": (2.0, 3000.0)})
def thermal_loss(excess: DeltaDegC, *, bore: Mm, outside: Mm) -> Mm:
    """Radial clearance that an inner ring warmer than the outer takes: 12e-6 dT over the pitch diameter.

    An outer ring that is the warmer one gives clearance.

    excess [delta_degC]: inner ring above outer ring, any shape
    bore [mm]: bore d, broadcasts
    outside [mm]: outside diameter D, broadcasts
    returns [mm]

    >>> thermal_loss("10 K", bore="45 mm", outside="100 mm")
    <Quantity(0.0087, 'millimeter')>
    """
    return EXPANSION * excess * (bore + outside) / 2
