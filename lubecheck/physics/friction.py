"""Friction: the torque of a running bearing, without churning of surplus grease.

Palmgren's two parts, one from the lubricant and one from the load, with the factors f0 and f1 of the bearing's series,
and what the kind of supply does to f0. The rub of contact seals is in `seal_friction`.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import Array, Choice, Mm, Mm2PerS, Newton, NMm, Number, Rpm, Watt

_TINY = 1e-300  # under a logarithm instead of zero


@dataclass(frozen=True, slots=True)
class Factor:
    """A factor on f0 of oil bath, its published range, and where both come from."""

    nominal: float
    low: float
    high: float
    source: str
    note: str


# Ratios to the oil bath column of Harris, Rolling Bearing Analysis, table of f0 by bearing type and lubrication (from
# memory); low and high are the least and the greatest ratio over the bearing types.
_OIL_BATH = Factor(1.0, 1.0, 1.0, "harris", "the state that f0 is stated for: oil to the middle of the lowest element")
_FLOODED = Factor(2.0, 1.0, 2.0, "harris", "vertical shaft in oil bath, or oil jet; cylindrical roller less")
LUBRICATION: dict[tuple[str, str], Factor] = {
    ("grease", "horizontal"): Factor(
        0.5, 0.3, 1.0, "harris", "run in, with the base oil's viscosity; ISO 15312 agrees"
    ),
    ("grease", "vertical"): Factor(0.5, 0.3, 1.0, "harris", "run in; the shaft's position changes nothing"),
    ("mist", "horizontal"): Factor(0.5, 0.5, 0.7, "harris", "oil mist or oil and air: hardly any oil to churn"),
    ("mist", "vertical"): Factor(0.5, 0.5, 0.7, "harris", "oil mist or oil and air: hardly any oil to churn"),
    ("bath", "horizontal"): _OIL_BATH,
    ("bath", "vertical"): _FLOODED,
    ("circulating", "horizontal"): Factor(1.0, 0.7, 2.0, "harris", "2 where the flow floods the bearing"),
    ("circulating", "vertical"): Factor(1.0, 0.7, 2.0, "harris", "2 where the flow floods the bearing"),
    ("jet", "horizontal"): _FLOODED,
    ("jet", "vertical"): _FLOODED,
}
SUPPLIES = tuple(dict.fromkeys(supply for supply, _ in LUBRICATION))
SHAFTS = ("horizontal", "vertical")

Supply = Annotated[NDArray[np.intp], Choice(SUPPLIES)]
Shaft = Annotated[NDArray[np.intp], Choice(SHAFTS)]

_LUBRICATION = np.array([[LUBRICATION[supply, shaft].nominal for shaft in SHAFTS] for supply in SUPPLIES])

# Boundary friction of steel in oil (0.08 to 0.12) is about twice the traction of a full film (0.03 to 0.06): the load
# torque at most about doubles. Estimate.
MIXED_KAPPA = 0.4
MIXED_FILM = Factor(1.0, 0.4, 2.0, "own-estimate", "times the share of mixed_film_share")

# z and y of f1 = z (P0/C0)^y by family, Harris, from memory; families that are not named have a constant f1.
LOAD_FORM: dict[str, tuple[float, float]] = {
    "deep groove ball": (0.0005, 0.55),
    "angular contact ball": (0.0012, 0.33),
    "double row angular contact ball": (0.001, 0.33),
    "self-aligning ball": (0.0003, 0.40),
    "thrust ball": (0.0008, 0.33),
}


@method(
    source="palmgren",
    valid={"f0": (0.0, 100.0), "nu": (0.0, 1e7), "speed": (0.0, 1e6), "pitch_diameter": (1.0, 1e4)},
)
def no_load_torque(f0: Number, nu: Mm2PerS, speed: Rpm, pitch_diameter: Mm) -> NMm:
    """Lubricant part of the friction torque, M0.

    1e-7 f0 (nu n)^(2/3) dm^3 for nu n >= 2000 (mm^2/s, rpm, mm), 160e-7 f0 dm^3 below. As printed the two differ by
    0.8 % at 2000; here the greater of the two holds, which joins them at nu n = 2024, so that a heat balance has no
    step to stumble over. About times or divided by 2 for one bearing.

    f0 [1]: factor of the bearing's series and of the lubrication, any shape
    nu [mm^2/s]: kinematic viscosity of the oil, or of the grease's base oil, at the operating temperature, broadcasts
    speed [rpm]: speed n, broadcasts
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    returns [N*mm]

    >>> no_load_torque(2.0, "20 mm^2/s", "1350 rpm", "100 mm").round(6)
    <Quantity(180.0, 'newton * millimeter')>
    """
    stirred = np.exp(np.log(np.maximum(nu * speed, _TINY)) * (2 / 3))
    # written out: x**3 costs ten times as much
    torque: Array = 1e-7 * f0 * np.maximum(stirred, 160.0) * (pitch_diameter * pitch_diameter * pitch_diameter)
    return torque


@method(source="palmgren", valid={"f1": (0.0, 1.0), "load": (0.0, 1e9), "pitch_diameter": (1.0, 1e4)})
def load_torque(f1: Number, load: Newton, pitch_diameter: Mm) -> NMm:
    """Load part of the friction torque, M1 = f1 P1 dm.

    f1 [1]: factor of the bearing's series and relative load, any shape
    load [N]: load P1 that governs friction (the equivalent load may stand for it), broadcasts
    pitch_diameter [mm]: pitch diameter dm, broadcasts
    returns [N*mm]

    >>> load_torque(0.0002, "5 kN", "100 mm").round(6)
    <Quantity(100.0, 'newton * millimeter')>
    """
    return f1 * load * pitch_diameter


@method(
    source="harris",
    valid={"z": (0.0, 0.01), "y": (0.0, 1.0), "static_load": (0.0, 1e9), "static_rating": (1e-3, 1e9)},
)
def load_coefficient(z: Number, y: Number, *, static_load: Newton, static_rating: Newton) -> Number:
    """Load factor f1 = z (P0/C0)^y.

    From memory: deep groove ball z 0.0004 to 0.0006 and y 0.55, angular contact 30 degrees 0.001 and 0.33, 40 degrees
    0.0013 and 0.33, self-aligning ball 0.0003 and 0.40, thrust ball 0.0008 and 0.33; rollers have y = 0.

    z [1]: coefficient of the family, any shape
    y [1]: exponent of the family, broadcasts
    static_load [N]: static equivalent load P0, broadcasts
    static_rating [N]: basic static load rating C0, broadcasts
    returns [1]

    >>> load_coefficient(0.0005, 0.5, static_load="1 kN", static_rating="25 kN").round(9)
    <Quantity(0.0001, 'dimensionless')>
    """
    coefficient: Array = z * np.exp(y * np.log(np.maximum(static_load / static_rating, _TINY)))
    return coefficient


@method(source="harris")
def lubrication_factor(supply: Supply, shaft: Shaft) -> Number:
    """Factor on the f0 of oil bath for the kind of supply and the position of the shaft, from `LUBRICATION`.

    supply: one of `SUPPLIES`, any shape
    shaft: one of `SHAFTS`, broadcasts
    returns [1]

    >>> lubrication_factor(["grease", "bath"], "vertical")
    <Quantity([0.5 2. ], 'dimensionless')>
    """
    factor: Array = _LUBRICATION[supply, shaft]
    return factor


@method(source="own-estimate", valid={"viscosity_ratio": (0.0, 1e9)})
def mixed_film_share(viscosity_ratio: Number) -> Number:
    """Share of its load torque that a bearing loses on top where the surfaces touch.

    exp(-kappa / 0.4): the load torque doubles with no film at all, is a third more at kappa 0.4, where handbooks begin
    to ask for EP additives, and is what it was from kappa 2 on. `MIXED_FILM` has the range.

    viscosity_ratio [1]: kappa, any shape
    returns [1]

    >>> mixed_film_share(0.4).round(3)
    <Quantity(0.368, 'dimensionless')>
    """
    return np.exp(viscosity_ratio * (-1 / MIXED_KAPPA))


@method(source="common-practice", valid={"torque": (0.0, 1e12), "speed": (0.0, 1e6)})
def power(torque: NMm, speed: Rpm) -> Watt:
    """Heat that a friction torque makes, M omega: pi/30 /1000 M n, in W for N mm and rpm. Exact.

    torque [N*mm]: friction torque, any shape
    speed [rpm]: speed, broadcasts
    returns [W]

    >>> power("1000 N*mm", "3000 rpm").round(2)
    <Quantity(314.16, 'watt')>
    """
    return torque * speed * (math.pi / 30 / 1000)
