"""The fatigue life turned round: which film, cleanliness, load or rating reaches the life that is wanted.

Every answer is the root of a function that only rises or only falls, bracketed in logarithms and halved until it is as
sharp as a float; NaN where no value within the range of ISO 281 reaches the wanted life. Lives are as of one state: the
temperature is held. `studies.wanted` asks the same of a whole position, where temperature follows.
"""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from lubecheck.method import method
from lubecheck.physics import fatigue
from lubecheck.physics.fatigue import Kind, Setting
from lubecheck.units import Array, Mm, Newton, Number, Share

_HALVINGS = 60  # of a bracket of at most e^60, to the last digit of a float
_LIGHTEST = 1e-4  # of the rating: the lightest load that is looked at; below it nobody asks for fatigue


def bracketed_root(function: Callable[[Array], Array], low: Array, high: Array) -> Array:
    """Return where a rising function of positive numbers crosses zero, element by element; NaN where it does not.

    At `low` itself where the function is above zero from the start.
    """
    left, right = np.log(low), np.log(high)
    left, right = (np.array(end, dtype=np.float64) for end in np.broadcast_arrays(left, right))
    at_low, at_high = function(np.exp(left)), function(np.exp(right))
    left, right, at_low, at_high = (np.array(one) for one in np.broadcast_arrays(left, right, at_low, at_high))
    first = np.exp(left)
    for _ in range(_HALVINGS):
        middle = (left + right) / 2
        is_above = function(np.exp(middle)) >= 0
        right = np.where(is_above, middle, right)
        left = np.where(is_above, left, middle)
    found: Array = np.where(at_low >= 0, first, np.where(at_high >= 0, np.exp(right), np.nan))
    return found


@method(
    source="iso-281:9.3.3",
    valid={"wanted_factor": (0.1, fatigue.GREATEST_FACTOR), "fatigue_load_limit": (0.0, 1e9), "load": (1e-3, 1e9)},
)
def needed_viscosity_ratio(
    wanted_factor: Number, *, fatigue_load_limit: Newton, load: Newton, pitch_diameter: Mm, setting: Setting, kind: Kind
) -> Number:
    """Least kappa at which a_ISO reaches a wanted value, e_C following kappa at the cleanliness there is.

    NaN where kappa 4 does not reach it; 0.1 where that already does. Without the rule for additives.

    wanted_factor [1]: wanted a_ISO, any shape
    fatigue_load_limit [N]: fatigue load limit C_u, broadcasts
    load [N]: dynamic equivalent load P, broadcasts
    pitch_diameter [mm]: pitch diameter Dpw, broadcasts
    setting: one of `fatigue.SETTINGS`, broadcasts
    kind: one of `fatigue.KINDS`, broadcasts
    returns [1]

    >>> needed_viscosity_ratio(
    ...     2, fatigue_load_limit="1 kN", load="4 kN", pitch_diameter="72.5 mm", setting="normal", kind="radial ball"
    ... ).round(2)
    <Quantity(1.02, 'dimensionless')>
    """

    def surplus(kappa: Array) -> Array:
        e_c = fatigue.contamination_factor.plain(kappa, pitch_diameter, setting)
        factor = fatigue.life_modification_factor.plain(
            kappa, e_c, fatigue_load_limit=fatigue_load_limit, load=load, kind=kind
        )
        return np.asarray(factor - wanted_factor)

    return bracketed_root(
        surplus, np.asarray(fatigue.LEAST_VISCOSITY_RATIO), np.asarray(fatigue.GREATEST_VISCOSITY_RATIO)
    )


@method(
    source="iso-281:9.3.3",
    valid={
        "wanted_factor": (0.1, fatigue.GREATEST_FACTOR),
        "viscosity_ratio": (fatigue.LEAST_VISCOSITY_RATIO, 1e9),
        "fatigue_load_limit": (0.0, 1e9),
        "load": (1e-3, 1e9),
    },
)
def needed_contamination_factor(
    wanted_factor: Number, viscosity_ratio: Number, *, fatigue_load_limit: Newton, load: Newton, kind: Kind
) -> Share:
    """Least e_C, the dirtiest oil, at which a_ISO reaches a wanted value; NaN where even clean oil does not.

    wanted_factor [1]: wanted a_ISO, any shape
    viscosity_ratio [1]: kappa, broadcasts
    fatigue_load_limit [N]: fatigue load limit C_u, broadcasts
    load [N]: dynamic equivalent load P, broadcasts
    kind: one of `fatigue.KINDS`, broadcasts
    returns [1]

    >>> needed_contamination_factor(8.38, 2.0, fatigue_load_limit="1 kN", load="4 kN", kind="radial ball").round(2)
    <Quantity(0.6, 'dimensionless')>
    """

    def surplus(e_c: Array) -> Array:
        factor = fatigue.life_modification_factor.plain(
            viscosity_ratio, e_c, fatigue_load_limit=fatigue_load_limit, load=load, kind=kind
        )
        return np.asarray(factor - wanted_factor)

    return bracketed_root(surplus, np.asarray(1e-12), np.asarray(1.0))


@method(
    source="iso-281:9.3",
    valid={"wanted_revolutions": (1e-9, 1e30), "dynamic_rating": (1e-3, 1e9), "exponent": (3.0, 3.34)},
)
def allowed_load(
    wanted_revolutions: Number,
    viscosity_ratio: Number,
    contamination_factor: Share,
    reliability_factor: Number,
    exponent: Number,
    *,
    dynamic_rating: Newton,
    fatigue_load_limit: Newton,
    kind: Kind,
) -> Newton:
    """Greatest load P that a bearing carries for the wanted modified life, at most 0.5 C.

    NaN where not even a ten-thousandth of C does.

    wanted_revolutions [1]: wanted modified life, in millions of revolutions, any shape
    viscosity_ratio [1]: kappa, broadcasts
    contamination_factor [1]: e_C, broadcasts
    reliability_factor [1]: a1, broadcasts
    exponent [1]: 3 for ball, 10/3 for roller bearings, broadcasts
    dynamic_rating [N]: basic dynamic load rating C, broadcasts
    fatigue_load_limit [N]: fatigue load limit C_u, broadcasts
    kind: one of `fatigue.KINDS`, broadcasts
    returns [N]

    >>> allowed_load(
    ...     1000, 1.0, 0.5, 1.0, 3, dynamic_rating="53 kN", fatigue_load_limit="1.34 kN", kind="radial ball"
    ... ).to("kN").round(2)
    <Quantity(7.0, 'kilonewton')>
    """

    def shortfall(rating_over_load: Array) -> Array:
        load = dynamic_rating / rating_over_load
        factor = fatigue.life_modification_factor.plain(
            viscosity_ratio, contamination_factor, fatigue_load_limit=fatigue_load_limit, load=load, kind=kind
        )
        basic = fatigue.rating_life.plain(dynamic_rating=dynamic_rating, load=load, exponent=exponent)
        return np.asarray(reliability_factor * factor * basic - wanted_revolutions)

    ratio = bracketed_root(shortfall, np.asarray(1 / fatigue.GREATEST_LOAD_RATIO), np.asarray(1 / _LIGHTEST))
    load: Array = dynamic_rating / ratio
    return load


@method(
    source="iso-281:9.3",
    valid={"wanted_revolutions": (1e-9, 1e30), "load": (1e-3, 1e9), "exponent": (3.0, 3.34)},
)
def needed_rating(
    wanted_revolutions: Number,
    viscosity_ratio: Number,
    contamination_factor: Share,
    reliability_factor: Number,
    exponent: Number,
    limit_share: Share,
    *,
    load: Newton,
    kind: Kind,
) -> Newton:
    """Least dynamic rating C that carries a load for the wanted modified life, at least 2 P; C_u grows with C.

    NaN where not even ten thousand times the load does.

    wanted_revolutions [1]: wanted modified life, in millions of revolutions, any shape
    viscosity_ratio [1]: kappa, broadcasts
    contamination_factor [1]: e_C, broadcasts
    reliability_factor [1]: a1, broadcasts
    exponent [1]: 3 for ball, 10/3 for roller bearings, broadcasts
    limit_share [1]: C_u / C of the bearings that are looked at, broadcasts
    load [N]: dynamic equivalent load P, broadcasts
    kind: one of `fatigue.KINDS`, broadcasts
    returns [N]

    >>> needed_rating(1000, 1.0, 0.5, 1.0, 3, 1.34 / 53, load="5.14 kN", kind="radial ball").to("kN").round(0)
    <Quantity(39.0, 'kilonewton')>
    """

    def surplus(rating: Array) -> Array:
        factor = fatigue.life_modification_factor.plain(
            viscosity_ratio, contamination_factor, fatigue_load_limit=limit_share * rating, load=load, kind=kind
        )
        basic = fatigue.rating_life.plain(dynamic_rating=rating, load=load, exponent=exponent)
        return np.asarray(reliability_factor * factor * basic - wanted_revolutions)

    return bracketed_root(surplus, load / fatigue.GREATEST_LOAD_RATIO, load / _LIGHTEST)
