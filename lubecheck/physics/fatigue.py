"""Fatigue: rating life, and how reliability, film and dirt modify it (ISO 281).

The end of the rated life is the first pit of about 6.5 mm^2 on a raceway, and the life is a statistical one: it is
what the stated share of a large group reaches. Kinds and settings come to the plain faces as integer codes, the
positions in `KINDS` and `SETTINGS`, so that mixed bearings run in one call.
"""

from __future__ import annotations

from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import Array, Choice, DegC, Hour, Mm, Newton, Number, Rpm, Share

KINDS = ("radial ball", "radial roller", "thrust ball", "thrust roller")
# ISO 281:2007, Annex A: the coefficients c1 and c2 of a = c1 kappa^0.68 Dpw^0.55, at most 1, e_C = a (1 - c2/Dpw^(1/3))
_CONTAMINATION = {
    # grease, by the words of the annex; "slight" covers slight to typical
    "high": (0.0864, 0.6796),
    "normal": (0.0432, 1.141),
    "slight": (0.0177, 1.887),
    "severe": (0.0115, 2.662),
    "very severe": (0.00617, 4.06),
    # circulating oil, filtered in line before the bearing, by ISO 4406 code
    "circulating -/13/10": (0.0864, 0.5663),
    "circulating -/15/12": (0.0432, 0.9987),
    "circulating -/17/14": (0.0288, 1.6329),
    "circulating -/19/16": (0.0216, 2.3362),
    # oil bath, or circulating oil with an off-line filter, by ISO 4406 code
    "bath -/13/10": (0.0864, 0.6796),
    "bath -/15/12": (0.0288, 1.141),
    "bath -/17/14": (0.0133, 1.670),
    "bath -/19/16": (0.00864, 2.5164),
    "bath -/21/18": (0.00411, 3.8974),
    # dirtier than any figure of the annex: e_C is 0, as in the guide table of the main part
    "off scale": (0.0, 0.0),
}
OFF_SCALE = "off scale"
SETTINGS = tuple(_CONTAMINATION)
ADDITIVES = ("none", "extreme pressure")

Kind = Annotated[NDArray[np.intp], Choice(KINDS)]
Setting = Annotated[NDArray[np.intp], Choice(SETTINGS)]
Additive = Annotated[NDArray[np.intp], Choice(ADDITIVES)]

LEAST_VISCOSITY_RATIO = 0.1  # ISO 281: below it the life modification factor is not defined
GREATEST_VISCOSITY_RATIO = 4.0  # ISO 281: a greater ratio is taken as 4
GREATEST_FACTOR = 50.0  # ISO 281: cap on the life modification factor
GREATEST_FACTOR_ADDITIVE = 3.0  # ISO 281: cap where an additive stands in for the film
GREATEST_LOAD_RATIO = 0.5  # ISO 281: P above 0.5 C deforms the raceways, the life is then not calculated
_TINY = 1e-300  # under a logarithm instead of zero; its cube root is far below the last digit of 1

# ISO 281:2007, table of the life adjustment factor for reliability (from memory; the law below gives each node within
# the rounding of the table)
A1_TABLE = {
    0.90: 1.0,
    0.95: 0.64,
    0.96: 0.55,
    0.97: 0.47,
    0.98: 0.37,
    0.99: 0.25,
    0.992: 0.22,
    0.994: 0.19,
    0.996: 0.16,
    0.998: 0.12,
    0.999: 0.093,
    0.9992: 0.087,
    0.9994: 0.080,
    0.9995: 0.077,
}
# ISO/TR 1281-2: the table follows a Weibull law of three parameters, slope 1.5, least life 0.05 L10 (from memory)
WEIBULL_SLOPE = 1.5
LEAST_LIFE_SHARE = 0.05

# Common practice: the rated end of life is the first pit of about this area, mm^2
PIT_AREA = 6.5

# Handbooks: factor on the dynamic rating of bearings that run hot, degC, for rings stabilised for that temperature
# (from memory; one maker prints 0.90, 0.75, 0.60 at 200, 250, 300 degC, another 0.73 at 200 and 0.48 at 250 for the
# same classes: the range is wide)
_HOT_T = np.array([150.0, 200.0, 250.0, 300.0])
_HOT_FACTOR = np.array([1.0, 0.90, 0.75, 0.60])


def _weibull(reliability: float) -> float:
    """Return (ln(1/R))^(1/slope), in which the law behind the table is a straight line."""
    return float(np.exp(np.log(-np.log(reliability)) / WEIBULL_SLOPE))


_A1_AT_HALF = LEAST_LIFE_SHARE + (1 - LEAST_LIFE_SHARE) * _weibull(0.5) / _weibull(0.9)
_A1_X = np.array([_weibull(r) for r in sorted({0.5, *A1_TABLE}, reverse=True)])
_A1_Y = np.array([{0.5: _A1_AT_HALF, **A1_TABLE}[r] for r in sorted({0.5, *A1_TABLE}, reverse=True)])


@method(
    source="iso-281",
    valid={"dynamic_rating": (1e-3, 1e9), "load": (1e-3, 1e9), "exponent": (3.0, 3.34)},
)
def rating_life(*, dynamic_rating: Newton, load: Newton, exponent: Number) -> Number:
    """Basic rating life, in millions of revolutions, that nine of ten bearings reach.

    L10 = (C/P)^p. Not to be used for P above 0.5 C (`GREATEST_LOAD_RATIO`).

    dynamic_rating [N]: basic dynamic load rating C, any shape
    load [N]: dynamic equivalent load P, broadcasts with the rating
    exponent [1]: 3 for ball, 10/3 for roller bearings, broadcasts
    returns [1]

    >>> rating_life(dynamic_rating="53 kN", load="5.3 kN", exponent=3).round(6)
    <Quantity(1000.0, 'dimensionless')>
    """
    life: Array = np.exp(exponent * np.log(dynamic_rating / load))
    return life


@method(source="bearing-handbooks", valid={"temperature": (-100.0, 300.0)})
def hot_rating_factor(temperature: DegC) -> Number:
    """Factor on the dynamic load rating of a hot bearing, whose rings soften: 1 to 150 degC, 0.9 at 200, 0.75 at 250.

    Linear between the nodes. It holds for rings stabilised for the temperature (`Bearing.stabilised_to`, DIN 623-1: 120
    degC without a suffix, S0 150, S1 200, S2 250, S3 300 degC); above that they grow and no life is calculated.
    Handbooks disagree, 0.73 to 0.90 at 200 degC.

    temperature [degC]: temperature of the rings, any shape
    returns [1]

    >>> hot_rating_factor(["120 degC", "175 degC", "250 degC"]).magnitude.round(3).tolist()
    [1.0, 0.95, 0.75]
    """
    factor: Array = np.interp(temperature, _HOT_T, _HOT_FACTOR)
    return factor


@method(source="iso-281", valid={"revolutions": (0.0, 1e30), "speed": (1e-3, 1e6)})
def life_hours(revolutions: Number, speed: Rpm) -> Hour:
    """Life in hours, from a life in millions of revolutions.

    revolutions [1]: life in millions of revolutions, any shape
    speed [rpm]: speed of the turning ring, broadcasts
    returns [h]

    >>> life_hours(900, "1500 rpm").round(6)
    <Quantity(10000.0, 'hour')>
    """
    return revolutions * 1e6 / (60 * speed)


@method(source="iso-281:9.2", valid={"reliability": (0.5, 0.9995)})
def reliability_factor(reliability: Share) -> Number:
    """Life adjustment factor a1: the life at another reliability than 90 %, over L10.

    Exact at the nodes of the standard's table (90 to 99.95 %), and between them linear in (ln(1/R))^(2/3), in which the
    law behind the table (Weibull, slope 1.5, least life 0.05 L10, ISO/TR 1281-2) is a straight line. Below 90 % that
    law is continued: the median life is 3.4 L10. The slopes of Lundberg and Palmgren (10/9 ball, 9/8 roller) would
    give 5.4: the cautious of the two is taken. Outside the range the value at its end is returned.

    reliability [1]: share of bearings that reach the life, 0.5 to 0.9995, any shape
    returns [1]

    >>> reliability_factor("99 %")
    <Quantity(0.25, 'dimensionless')>
    """
    factor: Array = np.interp(np.exp(np.log(-np.log(reliability)) / WEIBULL_SLOPE), _A1_X, _A1_Y)
    return factor


_CU_DIVISOR = np.array([22.0, 8.2, 22.0, 8.2])  # ISO 281:2007, Annex B, simplified method: ball, roller
_CU_EXPONENT = np.array([0.5, 0.3, 0.5, 0.3])


@method(source="iso-281:Annex B", valid={"static_rating": (1e-3, 1e9), "pitch_diameter": (1.0, 1e4)})
def fatigue_load_limit(static_rating: Newton, pitch_diameter: Mm, kind: Kind) -> Newton:
    """Fatigue load limit C_u by the simplified method, for bearings of common quality bearing steel.

    Ball C0/22, above Dpw 100 mm times (100/Dpw)^0.5; roller C0/8.2, above 100 mm times (100/Dpw)^0.3. A value from the
    maker goes before it.

    static_rating [N]: basic static load rating C0, any shape
    pitch_diameter [mm]: pitch diameter Dpw, broadcasts
    kind: one of `KINDS`, broadcasts
    returns [N]

    >>> fatigue_load_limit("22 kN", "70 mm", "radial ball").round(6)
    <Quantity(1000.0, 'newton')>
    """
    size = np.exp(_CU_EXPONENT[kind] * np.log(100 / np.maximum(pitch_diameter, 100.0)))
    limit: Array = static_rating / _CU_DIVISOR[kind] * size
    return limit


_EC_C1, _EC_C2 = (np.array(column) for column in zip(*_CONTAMINATION.values(), strict=True))
_EC_C2_LARGE = np.where(np.arange(len(SETTINGS)) == SETTINGS.index("slight"), 1.677, _EC_C2)  # from Dpw 500 mm


@method(
    source="iso-281:Annex A",
    valid={"viscosity_ratio": (LEAST_VISCOSITY_RATIO, 1e9), "pitch_diameter": (1.0, 2000.0)},
)
def contamination_factor(viscosity_ratio: Number, pitch_diameter: Mm, setting: Setting) -> Share:
    """Contamination factor e_C by the equations of ISO 281, Annex A.

    a (1 - c2/Dpw^(1/3)) with a = c1 kappa^0.68 Dpw^0.55, at most 1. Clamped to 0 where the equation is negative (very
    severe below Dpw 67 mm); kappa above 4 is taken as 4, as the figures of the annex end there. The "slight" setting
    covers slight to typical contamination, and steps up at Dpw 500 mm as printed. The figures are drawn for Dpw 25 to
    2000 mm; below 25 mm the equations fall on, to the cautious side. For small bearings the equations give less than
    the guide table of the standard's main part.

    viscosity_ratio [1]: kappa at the operating temperature, any shape
    pitch_diameter [mm]: pitch diameter Dpw, broadcasts
    setting: one of `SETTINGS`, broadcasts
    returns [1]

    >>> contamination_factor(1.0, "80 mm", "normal").round(3)
    <Quantity(0.354, 'dimensionless')>
    """
    log_diameter = np.log(pitch_diameter)
    capped = np.minimum(viscosity_ratio, GREATEST_VISCOSITY_RATIO)
    film = np.minimum(_EC_C1[setting] * np.exp(0.68 * np.log(capped) + 0.55 * log_diameter), 1.0)
    c2 = np.where(np.less(pitch_diameter, 500), _EC_C2[setting], _EC_C2_LARGE[setting])
    factor: Array = np.maximum(film * (1 - c2 * np.exp(log_diameter / -3)), 0.0)
    return factor


# ISO 281:2007, 9.3.3, a_ISO = 0.1 [1 - (top - c)^inner (e_C C_u/(divisor P))^outer]^-last, in the order of KINDS, with
# c = thin/kappa^0.054381 for kappa < 0.4, thick/kappa^0.19087 below 1, thick/kappa^0.071739 from 1 to 4
_TOP = np.array([2.5671, 1.5859, 2.5671, 1.5859])
_THIN = np.array([2.2649, 1.3993, 2.2649, 1.3993])
_THICK = np.array([1.9987, 1.2348, 1.9987, 1.2348])
_INNER = np.array([0.83, 1.0, 0.83, 1.0])
_OUTER = np.array([1 / 3, 0.4, 1 / 3, 0.4])
_DIVISOR = np.array([1.0, 1.0, 3.0, 2.5])
_LAST = np.array([9.3, 9.185, 9.3, 9.185])
_LEAST_BRACKET = 0.5  # 0.1 x 0.5^-9.185 is 58: anything smaller is beyond the cap of 50


@method(
    source="iso-281:9.3.3",
    valid={
        "viscosity_ratio": (LEAST_VISCOSITY_RATIO, 1e9),
        "contamination_factor": (0.0, 1.0),
        "fatigue_load_limit": (0.0, 1e9),
        "load": (1e-3, 1e9),
    },
)
def life_modification_factor(
    viscosity_ratio: Number,
    contamination_factor: Share,
    *,
    fatigue_load_limit: Newton,
    load: Newton,
    kind: Kind,
) -> Number:
    """Life modification factor a_ISO: what film, dirt and load, together, do to the rating life.

    0.1 [1 - (A - c/kappa^m)^g (e_C C_u/(b P))^h]^-k, with the constants of the kind and of the range of kappa (below
    0.4, below 1, to 4). kappa above 4 is taken as 4, the factor is at most 50, and where the bracket falls to zero or
    below it is 50 too. Below kappa 0.1 it is not defined (the plain face returns the 0.1 of kappa = 0.1). At kappa 0.4
    the printed branches differ by less than 0.1 %.

    viscosity_ratio [1]: kappa at the operating temperature, any shape
    contamination_factor [1]: e_C, 0 to 1, broadcasts
    fatigue_load_limit [N]: fatigue load limit C_u, broadcasts
    load [N]: dynamic equivalent load P, broadcasts
    kind: one of `KINDS`, broadcasts
    returns [1]

    >>> life_modification_factor(2.0, 0.6, fatigue_load_limit="1 kN", load="4 kN", kind="radial ball").round(2)
    <Quantity(8.38, 'dimensionless')>
    """
    kappa = np.clip(viscosity_ratio, LEAST_VISCOSITY_RATIO, GREATEST_VISCOSITY_RATIO)
    power = np.where(kappa < 0.4, 0.054381, np.where(kappa < 1, 0.19087, 0.071739))
    numerator = np.where(kappa < 0.4, _THIN[kind], _THICK[kind])
    film = np.maximum(_TOP[kind] - numerator * np.exp(-power * np.log(kappa)), _TINY)
    relief = np.maximum(contamination_factor * fatigue_load_limit / (_DIVISOR[kind] * load), _TINY)
    bracket = 1 - np.exp(_INNER[kind] * np.log(film) + _OUTER[kind] * np.log(relief))
    factor: Array = 0.1 * np.exp(-_LAST[kind] * np.log(np.maximum(bracket, _LEAST_BRACKET)))
    return np.minimum(factor, GREATEST_FACTOR)


@method(source="iso-281:9.3.3", valid={"viscosity_ratio": (0.0, 1e9), "contamination_factor": (0.0, 1.0)})
def effective_viscosity_ratio(viscosity_ratio: Number, contamination_factor: Share, additive: Additive) -> Number:
    """Viscosity ratio that may be used for a_ISO with a lubricant that carries a proven extreme pressure additive.

    kappa below 1 may be taken as 1 where e_C is at least 0.2 and the additive is proven effective; else it stays. e_C
    itself is found with the kappa as it is. Take the life modification factor through `factor_with_additive`.

    viscosity_ratio [1]: kappa as it is, any shape
    contamination_factor [1]: e_C at that kappa, broadcasts
    additive: one of `ADDITIVES`, broadcasts
    returns [1]

    >>> effective_viscosity_ratio(0.5, 0.3, "extreme pressure")
    <Quantity(1.0, 'dimensionless')>
    """
    is_helped = np.equal(additive, ADDITIVES.index("extreme pressure")) & np.greater_equal(contamination_factor, 0.2)
    return np.where(is_helped, np.maximum(viscosity_ratio, 1.0), viscosity_ratio)


@method(source="iso-281:9.3.3", valid={"without": (0.0, GREATEST_FACTOR), "with_additive": (0.0, GREATEST_FACTOR)})
def factor_with_additive(*, without: Number, with_additive: Number) -> Number:
    """Life modification factor where an additive stands in for the film: at most 3, and no less than without it.

    without [1]: a_ISO at the kappa as it is, any shape
    with_additive [1]: a_ISO at the `effective_viscosity_ratio`, broadcasts
    returns [1]

    >>> factor_with_additive(without=0.4, with_additive=5.2)
    <Quantity(3.0, 'dimensionless')>
    """
    return np.maximum(without, np.minimum(with_additive, GREATEST_FACTOR_ADDITIVE))


@method(
    source="iso-281:9.1",
    valid={
        "basic_life": (0.0, 1e30),
        "reliability_factor": (0.0, 10.0),
        "life_modification_factor": (0.0, GREATEST_FACTOR),
    },
)
def modified_life(*, basic_life: Hour, reliability_factor: Number, life_modification_factor: Number) -> Hour:
    """Modified rating life L_nm = a1 a_ISO L10.

    basic_life [h]: basic rating life L10, any shape
    reliability_factor [1]: a1, broadcasts
    life_modification_factor [1]: a_ISO, broadcasts
    returns [h]

    >>> modified_life(basic_life="10000 h", reliability_factor=0.25, life_modification_factor=8)
    <Quantity(20000.0, 'hour')>
    """
    return basic_life * reliability_factor * life_modification_factor


@method(source="iso-tr-1281-2", valid={"first": (1e-9, 1e30), "second": (1e-9, 1e30)})
def joint_life(*, first: Hour, second: Hour) -> Hour:
    """Life of two bearings together, at the reliability that each alone has it at: neither may have failed.

    The product of two reliabilities that each follow ln(1/R) ~ L^e: L = (L1^-e + L2^-e)^(-1/e), with the slope e = 1.5
    of ISO/TR 1281-2. More bearings follow by repetition, in any order. Slopes of 10/9 (ball) and 9/8 (roller) by
    Lundberg and Palmgren give up to a fifth less for a pair.

    first [h]: life of one bearing, or of those joined before, any shape
    second [h]: life of the other, broadcasts
    returns [h]

    >>> joint_life(first="10000 h", second="10000 h").round(0)
    <Quantity(6300.0, 'hour')>
    """
    log_short, log_long = np.log(np.minimum(first, second)), np.log(np.maximum(first, second))
    life: Array = np.exp(log_short - np.log1p(np.exp(WEIBULL_SLOPE * (log_short - log_long))) / WEIBULL_SLOPE)
    return life
