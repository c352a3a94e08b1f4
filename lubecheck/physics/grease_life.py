"""Grease life: how long grease serves before it must be renewed, and what shortens it.

The lines of life stand for different percentiles: the classical interval of open bearings is an L01 (1 % of the
bearings have failed by then), the life of capped bearings an L10, Booser's a median L50. `weibull_scale` converts.
The curve of GfT worksheet 3 against k_f n dm is in `grease_curve`.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import YEAR_H, Choice, DegC, DeltaDegC, Hour, Mm, MPerS, Number, Rpm, Share

L01, L10, L50 = 0.01, 0.10, 0.50  # shares failed
# Handbooks: L10 is then 2.8 times L01, and L50 2.3 times L10; an L50/L10 of 2.7, slope 1.9, is met too.
WEIBULL_SLOPE = 2.3
# Of the speed at which the classical formula is zero. Own estimate: a published motor table agrees with the formula at
# 0.54 and is more than ten times it at 0.95.
CLASSICAL_GREATEST_SHARE = 0.6
HALVING_STEP = 15.0  # K; handbooks 14 to 17 (10 K is the rule for oil, not for grease)
CALENDAR_CEILING = 4 * YEAR_H  # h, 48 months, MIL-HDBK-1164: grease bleeds and ages at rest too

# Interval factor K of the classical formula. Bigger is longer, the opposite sense of the k_f of GfT worksheet 3.
CLASSICAL_FACTOR = {
    "ball": 10.0,  # radial ball
    "cylindrical": 5.0,  # cylindrical and needle roller
    "other": 1.0,  # spherical and tapered roller, all thrust bearings
}
_CLASSICAL_FACTOR = np.array(list(CLASSICAL_FACTOR.values()))

_LAST_LOAD_RATIO = 0.35
_NO_SUBTRACTION = np.array(0.0)
_SLOPE = np.array(WEIBULL_SLOPE)

_BATH_MONTHS_COOL, _BATH_COOL = 12.0, 50.0  # months, degC
_BATH_MONTHS_HOT, _BATH_HOT = 3.0, 100.0


@dataclass(frozen=True, slots=True)
class Answer:
    """A plain answer about a bearing's place, the factor on the interval it stands for, and what it means."""

    word: str
    factor: float
    meaning: str


# From the best to the worst. Reliability handbooks, from memory.
DUST = (
    Answer("clean", 1.0, "little dust, and none that wears"),
    Answer("normal", 0.7, "much dust that does not wear"),
    Answer("dusty", 0.4, "some dust that wears: sand, cement, ore, scale"),
    Answer("very dusty", 0.2, "much dust that wears"),
)
WATER = (
    Answer("dry", 1.0, "air mostly below 80 % humidity"),
    Answer("humid", 0.7, "air mostly at 80 to 90 % humidity"),
    Answer("damp", 0.4, "water condenses now and then"),
    Answer("wet", 0.1, "water reaches the housing: rain, hose, splash"),
)
VIBRATION = (
    Answer("smooth", 1.0, "below 5 mm/s (0.2 in/s) peak"),
    Answer("rough", 0.6, "5 to 10 mm/s (0.2 to 0.4 in/s) peak"),
    Answer("severe", 0.3, "above 10 mm/s (0.4 in/s) peak"),
)
_VIBRATION_ENDS = np.array([0.2 * 0.0254, 0.4 * 0.0254])  # m/s
# Most handbooks say 0.5 for a vertical shaft, some 0.5 to 0.7, one 0.3.
ORIENTATION = (
    Answer("horizontal", 1.0, "shaft level, or nearly"),
    Answer("vertical", 0.5, "shaft upright"),
)


def _words(answers: Sequence[Answer]) -> Choice:
    return Choice(tuple(answer.word for answer in answers))


Family = Annotated[NDArray[np.intp], Choice(tuple(CLASSICAL_FACTOR))]
Dust = Annotated[NDArray[np.intp], _words(DUST)]
Water = Annotated[NDArray[np.intp], _words(WATER)]
Vibration = Annotated[NDArray[np.intp], _words(VIBRATION)]
Orientation = Annotated[NDArray[np.intp], _words(ORIENTATION)]
_DUST, _WATER, _VIBRATION, _ORIENTATION = (
    np.array([answer.factor for answer in answers]) for answers in (DUST, WATER, VIBRATION, ORIENTATION)
)


@method(source="grease-handbooks", valid={"speed": (1e-3, 1e6), "bore": (1.0, 5000.0)})
def classical_share(speed: Rpm, bore: Mm) -> Share:
    """Speed as a share of the speed at which the classical interval is zero: n d^1.5 / 3.5e6.

    The formula holds up to CLASSICAL_GREATEST_SHARE of it.

    speed [rpm]: speed n, any shape
    bore [mm]: bore diameter d, broadcasts with speed
    returns [1]

    >>> classical_share("3600 rpm", "95 mm").round(3)
    <Quantity(0.952, 'dimensionless')>
    """
    return speed * bore * np.sqrt(bore) / 3.5e6


@method(source="grease-handbooks", valid={"speed": (1e-3, 1e6), "bore": (1.0, 5000.0)})
def classical_interval(speed: Rpm, bore: Mm, family: Family) -> Hour:
    """Regrease interval of an open bearing at up to 70 degC, light load, clean and dry, horizontal shaft: an L01.

    t = K (14e6 / (n sqrt(d)) - 4 d), K = 10 radial ball, 5 cylindrical and needle roller, 1 all others.

    The formula falls to zero at n = 3.5e6 / d^1.5; above 0.6 of that speed it is outside its range and the result is
    NaN (refused by the unit-aware face), as that range is one of two arguments together: see classical_share.
    One motor maker's table (seen) lies within 15 % of it where it holds; another (from memory, for a grease good to 80
    degC) gives up to 2.3 times it.

    speed [rpm]: speed n, any shape
    bore [mm]: bore diameter d, broadcasts with speed
    family: ball, cylindrical or other; the plain face takes its position in CLASSICAL_FACTOR
    returns [h]

    >>> classical_interval("1480 rpm", "45 mm", "ball").round(0)
    <Quantity(12301.0, 'hour')>
    """
    interval = _CLASSICAL_FACTOR[family] * (14e6 / (speed * np.sqrt(bore)) - 4.0 * bore)
    return np.where(classical_share.plain(speed, bore) <= CLASSICAL_GREATEST_SHARE, interval, np.nan)


@method(
    source="mil-hdbk-1164",
    valid={"temperature": (-60.0, 300.0), "reference": (0.0, 250.0), "step": (5.0, 30.0)},
)
def temperature_halving(*, temperature: DegC, reference: DegC, step: DeltaDegC) -> Number:
    """Factor of temperature on grease life: halves each step above the reference, doubles at most below.

    f = min(2, 2^(-(T - T_ref)/step)). Handbooks: 15 K above 70 degC (two of them), 17 K above 80, 14 K above 65. It
    knows no upper limit: the grease's own upper temperature is another check.

    temperature [degC]: temperature T of the grease, any shape
    reference [degC]: temperature T_ref up to which the interval stands, broadcasts; 70 for lithium soap, mineral oil
    step [delta_degC]: rise that halves the life, broadcasts; 15 K
    returns [1]

    >>> temperature_halving(temperature="100 degC", reference="70 degC", step="15 K").round(6)
    <Quantity(0.25, 'dimensionless')>
    """
    return np.minimum(2.0, np.exp((-math.log(2.0)) * (temperature - reference) / step))


@method(source="booser", valid={"temperature": (50.0, 150.0), "subtraction": (0.0, 10.0)})
def booser_median_life(temperature: DegC, subtraction: Number = _NO_SUBTRACTION) -> Hour:
    """Median life L50 of the grease in a bearing that is never regreased.

    log10 L50 = -2.60 + 2450 / (273 + T) - 0.301 S: each unit of S halves it.

    The constant is remembered with L50 by some and with L10 by others (-2.30 then for L50): a factor of 2; this is the
    cautious reading. S sums Booser's corrections for grease, speed and load, which are not given here because they are
    not surely remembered: 0 is a good lithium grease at light load well below the speed limit. Range from memory.

    temperature [degC]: temperature T of the outer ring, any shape
    subtraction [1]: half-life subtractions S, broadcasts with temperature
    returns [h]

    >>> booser_median_life("70 degC").round(-2)
    <Quantity(34900.0, 'hour')>
    """
    exponent = -2.60 + 2450.0 / (273.0 + temperature) - 0.301 * subtraction
    return np.exp(math.log(10.0) * exponent)


@method(source="gft-3:f4", valid={"load_ratio": (0.0, _LAST_LOAD_RATIO)})
def load_factor(load_ratio: Number) -> Number:
    """Factor of load on grease life, by P/C.

    1 up to P/C = 0.1, 0.7 at 0.15, 0.4 at 0.25, 0.1 at 0.35, linear between; heavier loads are outside its range.

    load_ratio [1]: equivalent load over dynamic rating, P/C, any shape
    returns [1]

    >>> load_factor([0.05, 0.2]).round(6)
    <Quantity([1.   0.55], 'dimensionless')>
    """
    return np.interp(load_ratio, (0.10, 0.15, 0.25, _LAST_LOAD_RATIO), (1.0, 0.7, 0.4, 0.1))


@method(source="reliability-handbooks")
def dust_factor(dust: Dust) -> Number:
    """Factor of dust on the interval: 1, 0.7, 0.4, 0.2.

    dust: clean, normal, dusty or very dusty, as DUST says; the plain face takes its position
    returns [1]

    >>> dust_factor("dusty")
    <Quantity(0.4, 'dimensionless')>
    """
    return _DUST[dust]


@method(source="reliability-handbooks")
def water_factor(water: Water) -> Number:
    """Factor of water on the interval: 1, 0.7, 0.4, 0.1.

    water: dry, humid, damp or wet, as WATER says; the plain face takes its position
    returns [1]

    >>> water_factor("wet")
    <Quantity(0.1, 'dimensionless')>
    """
    return _WATER[water]


@method(source="reliability-handbooks")
def vibration_factor(vibration: Vibration) -> Number:
    """Factor of vibration on the interval: 1, 0.6, 0.3.

    vibration: smooth, rough or severe, as VIBRATION says; the plain face takes its position
    returns [1]

    >>> vibration_factor("rough")
    <Quantity(0.6, 'dimensionless')>
    """
    return _VIBRATION[vibration]


@method(source="reliability-handbooks", valid={"velocity": (0.0, 1.0)})
def vibration_velocity_factor(velocity: MPerS) -> Number:
    """Factor of vibration on the interval by its measured velocity: 1 below 0.2 in/s, 0.6 to 0.4 in/s, 0.3 from there.

    velocity [m/s]: vibration velocity on the bearing housing, peak (not rms), any shape
    returns [1]

    >>> vibration_velocity_factor("7 mm/s")
    <Quantity(0.6, 'dimensionless')>
    """
    return _VIBRATION[np.searchsorted(_VIBRATION_ENDS, velocity, side="right")]


@method(source="reliability-handbooks")
def orientation_factor(orientation: Orientation) -> Number:
    """Factor of the shaft's attitude on the interval: 1 horizontal, 0.5 vertical (published 0.3 to 0.7).

    orientation: horizontal or vertical; the plain face takes its position
    returns [1]

    >>> orientation_factor("vertical")
    <Quantity(0.5, 'dimensionless')>
    """
    return _ORIENTATION[orientation]


@method(source="weibull", valid={"known": (1e-6, 0.999), "wanted": (1e-6, 0.999), "slope": (0.5, 10.0)})
def weibull_scale(*, known: Share, wanted: Share, slope: Number = _SLOPE) -> Number:
    """Factor from a life at one share failed to the life at another.

    f = (ln(1 - wanted) / ln(1 - known))^(1/slope): with the slope 2.3, L10 is 2.8 times L01.

    known [1]: share failed at the known life, any shape; 0.01 for L01, 0.10 for L10, 0.50 for L50
    wanted [1]: share failed at the wanted life, broadcasts with known
    slope [1]: Weibull slope, broadcasts with known; WEIBULL_SLOPE for grease lives
    returns [1]

    >>> weibull_scale(known=0.01, wanted=0.10).round(2)
    <Quantity(2.78, 'dimensionless')>
    """
    return np.exp(np.log(np.log1p(-wanted) / np.log1p(-known)) / slope)


@method(source="bath-handbooks", valid={"temperature": (-40.0, _BATH_HOT)})
def bath_change_interval(temperature: DegC) -> Hour:
    """Calendar time after which the oil of a bath is changed.

    12 months up to 50 degC, 3 months at 100 degC, linear in its logarithm between: halved each 25 K. Clean and dry;
    water or dirt in the oil, or an analysis, overrule it. Hotter baths are outside its range.

    temperature [degC]: temperature of the oil, any shape
    returns [h]

    >>> bath_change_interval("75 degC").to("month").round(3)
    <Quantity(6.0, 'month')>
    """
    slope = math.log(_BATH_MONTHS_HOT / _BATH_MONTHS_COOL) / (_BATH_HOT - _BATH_COOL)
    months = _BATH_MONTHS_COOL * np.exp(slope * np.maximum(temperature - _BATH_COOL, 0.0))
    return months * (YEAR_H / 12)
