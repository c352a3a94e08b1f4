"""Loads: what a radial and an axial load together are worth, by ISO 281 (dynamic) and ISO 76 (static).

Each family follows one of the `RULES`; their positions are the codes of the plain faces, so that mixed families run in
one call. A rule is two straight lines, P = X1 Fr + Y1 Fa up to Fa/Fr = e and P = X2 Fr + Y2 Fa above, which the
standard lets meet at e. Taken is the greater of the two: that is the same, except that the rounding of the printed
factors (up to 0.7 %) leaves no step at e, and P is never below Fr. Only the size of the axial load counts: whether a
bearing that holds it one way only (`HOLDS_BOTH_WAYS`) is loaded from the right side is for the caller to judge.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Annotated

import numpy as np
from numpy.typing import NDArray

from lubecheck.method import method
from lubecheck.units import Array, Choice, Deg, Newton, Number, Share


@dataclass(frozen=True, slots=True)
class Rule:
    """How one family adds its loads: the factors of ISO 281 and ISO 76, and which loads it can hold at all."""

    x1: float = 1.0
    y1: float = 0.0
    x2: float = 1.0
    y2: float = 0.0
    x0: float = 1.0
    y0: float = 0.0
    is_per_cot: bool = False  # the Y factors are multiples of cot(contact angle)
    is_thrust: bool = False  # P0 is axial, and need not be as great as the radial load
    takes_radial: bool = True
    takes_axial: bool = True
    both_ways: bool = False


# ISO 281:2007, tables of X and Y for radial and thrust ball and roller bearings; ISO 76:2006, table of X0 and Y0 (from
# memory). Where y2 depends on the relative axial load, or the Y on the angle, the tables below take its place (0 here).
_FACTORS = {
    "deep groove": Rule(x2=0.56, x0=0.6, y0=0.5, both_ways=True),
    "self-aligning ball": Rule(y1=0.42, x2=0.65, y2=0.65, x0=1.0, y0=0.44, is_per_cot=True, both_ways=True),
    "angular contact 15": Rule(x2=0.44, x0=0.5, y0=0.46),
    "angular contact 25": Rule(x2=0.41, y2=0.87, x0=0.5, y0=0.38),
    "angular contact 30": Rule(x2=0.39, y2=0.76, x0=0.5, y0=0.33),
    "angular contact 40": Rule(x2=0.35, y2=0.57, x0=0.5, y0=0.26),
    "double row angular contact": Rule(both_ways=True),
    "four-point": Rule(both_ways=True),
    # flanges that guide a small axial load are outside ISO 281: P from the radial load alone
    "cylindrical": Rule(takes_axial=False),
    "tapered": Rule(x2=0.4, y2=0.4, x0=0.5, y0=0.22, is_per_cot=True),
    "spherical roller": Rule(y1=0.45, x2=0.67, y2=0.67, x0=1.0, y0=0.44, is_per_cot=True, both_ways=True),
    "thrust ball": Rule(x1=0.0, y1=1.0, x2=0.0, y2=1.0, x0=0.0, y0=1.0, is_thrust=True, takes_radial=False),
    "thrust cylindrical": Rule(x1=0.0, y1=1.0, x2=0.0, y2=1.0, x0=0.0, y0=1.0, is_thrust=True, takes_radial=False),
    # handbooks: tan 50 degrees = 1.2 and 2.3 tan 50 degrees = 2.7; for Fr up to 0.55 Fa
    "thrust spherical": Rule(x1=1.2, y1=1.0, x2=1.2, y2=1.0, x0=2.7, y0=1.0, is_thrust=True),
}
RULES = tuple(_FACTORS)
GREATEST_THRUST_SPHERICAL_RADIAL = 0.55  # handbooks: radial over axial load, above it the rows part

RuleCode = Annotated[NDArray[np.intp], Choice(RULES)]

TAKES_RADIAL = np.array([rule.takes_radial for rule in _FACTORS.values()])
TAKES_AXIAL = np.array([rule.takes_axial for rule in _FACTORS.values()])
HOLDS_BOTH_WAYS = np.array([rule.both_ways for rule in _FACTORS.values()])
IS_THRUST = np.array([rule.is_thrust for rule in _FACTORS.values()])

_X1, _Y1, _X2, _Y2, _X0, _Y0 = (
    np.array([getattr(rule, name) for rule in _FACTORS.values()]) for name in ("x1", "y1", "x2", "y2", "x0", "y0")
)
_PER_COT = np.array([rule.is_per_cot for rule in _FACTORS.values()])
_BY_ANGLE = np.array([name in ("double row angular contact", "four-point") for name in RULES])
_DEEP_GROOVE = RULES.index("deep groove")
_ANGULAR_15 = RULES.index("angular contact 15")

# ISO 281:2007, Y against f0 Fa/C0, deep groove ball bearings, and 15 degrees angular contact, single row
_RELATIVE_AXIAL = np.array([0.172, 0.345, 0.689, 1.03, 1.38, 2.07, 3.45, 5.17, 6.89])
_DEEP_GROOVE_Y = np.array([2.30, 1.99, 1.71, 1.55, 1.45, 1.31, 1.15, 1.04, 1.00])
_RELATIVE_AXIAL_15 = np.array([0.178, 0.357, 0.714, 1.07, 1.43, 2.14, 3.57, 5.35, 7.14])
_ANGULAR_15_Y = np.array([1.47, 1.40, 1.30, 1.23, 1.19, 1.12, 1.02, 1.00, 1.00])
# ISO 281:2007 and ISO 76:2006, double row angular contact ball bearings, against the contact angle
_ANGLES = np.array([20.0, 25.0, 30.0, 35.0, 40.0, 45.0])
_DOUBLE_Y1 = np.array([1.09, 0.92, 0.78, 0.66, 0.55, 0.47])
_DOUBLE_X2 = np.array([0.70, 0.67, 0.63, 0.60, 0.57, 0.54])
_DOUBLE_Y2 = np.array([1.63, 1.41, 1.24, 1.07, 0.93, 0.81])
_DOUBLE_Y0 = np.array([0.84, 0.76, 0.66, 0.58, 0.52, 0.44])

# Half-loaded raceway, Fr/(2 Y); at 15 degrees with the Y of a small axial load. The others set no thrust free.
_THRUST_Y = {
    "angular contact 15": float(_ANGULAR_15_Y[0]),
    **{
        name: _FACTORS[name].y2
        for name in ("angular contact 25", "angular contact 30", "angular contact 40", "tapered")
    },
}
_INDUCED = np.array([0.5 / _THRUST_Y[name] if name in _THRUST_Y else 0.0 for name in RULES])


def _cot_where_used(contact_angle: Deg, rule: RuleCode) -> Array:
    """Return cot(contact angle) in rows whose rule uses it, and 1 elsewhere, whatever the angle there."""
    cot: Array = 1 / np.tan(np.deg2rad(np.where(_PER_COT[rule], contact_angle, 45.0)))
    return np.where(_PER_COT[rule], cot, 1.0)


@method(
    source="iso-281",
    valid={
        "radial_load": (0.0, 1e9),
        "axial_load": (-1e9, 1e9),
        "static_rating": (1e-3, 1e9),
        "f0_load": (1.0, 30.0),
        "contact_angle": (0.0, 90.0),
    },
)
def dynamic_equivalent_load(
    *,
    radial_load: Newton,
    axial_load: Newton,
    static_rating: Newton,
    f0_load: Number,
    contact_angle: Deg,
    rule: RuleCode,
) -> Newton:
    """Dynamic equivalent load P, from max(X1 Fr + Y1 Fa, X2 Fr + Y2 Fa).

    As the standard says, Y between the nodes of its tables is linear: in f0 Fa/C0 for deep groove and 15 degrees
    angular contact, in the contact angle for double row and four-point bearings (20 to 45 degrees). Beyond the ends of
    a table the end holds: cautious above, slightly low below f0 Fa/C0 0.17, where the load is too small to matter.
    Radial load on a thrust ball or cylindrical thrust bearing, and axial load on a cylindrical roller bearing, are left
    out: see `TAKES_RADIAL` and `TAKES_AXIAL`.

    radial_load [N]: radial load Fr, any shape
    axial_load [N]: axial load Fa, of either sign, broadcasts
    static_rating [N]: basic static load rating C0, broadcasts; used by deep groove and 15 degrees angular contact
    f0_load [1]: the factor f0 of ISO 76, about 12 to 16, broadcasts; used by the same
    contact_angle [deg]: nominal contact angle, broadcasts; used by self-aligning, double row, four-point, tapered and
        spherical roller bearings (must be above 0 there)
    rule: one of `RULES`, broadcasts
    returns [N]

    >>> both = {"radial_load": "4 kN", "axial_load": "2 kN", "contact_angle": "0 deg", "rule": "deep groove"}
    >>> dynamic_equivalent_load(**both, static_rating="20 kN", f0_load=13.8).round(6)
    <Quantity(5140.0, 'newton')>
    """
    thrust = np.abs(axial_load)
    relative = f0_load * thrust / static_rating
    cot = _cot_where_used(contact_angle, rule)
    is_by_angle = _BY_ANGLE[rule]
    y1 = np.where(is_by_angle, np.interp(contact_angle, _ANGLES, _DOUBLE_Y1), _Y1[rule] * cot)
    x2 = np.where(is_by_angle, np.interp(contact_angle, _ANGLES, _DOUBLE_X2), _X2[rule])
    y2 = np.where(is_by_angle, np.interp(contact_angle, _ANGLES, _DOUBLE_Y2), _Y2[rule] * cot)
    y2 = np.where(np.equal(rule, _DEEP_GROOVE), np.interp(relative, _RELATIVE_AXIAL, _DEEP_GROOVE_Y), y2)
    y2 = np.where(np.equal(rule, _ANGULAR_15), np.interp(relative, _RELATIVE_AXIAL_15, _ANGULAR_15_Y), y2)
    load: Array = np.maximum(_X1[rule] * radial_load + y1 * thrust, x2 * radial_load + y2 * thrust)
    return load


@method(
    source="iso-76",
    valid={"radial_load": (0.0, 1e9), "axial_load": (-1e9, 1e9), "contact_angle": (0.0, 90.0)},
)
def static_equivalent_load(*, radial_load: Newton, axial_load: Newton, contact_angle: Deg, rule: RuleCode) -> Newton:
    """Static equivalent load P0 = X0 Fr + Y0 Fa, and at least Fr for radial bearings.

    radial_load [N]: greatest radial load Fr, any shape
    axial_load [N]: greatest axial load Fa, of either sign, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts; used as in `dynamic_equivalent_load`
    rule: one of `RULES`, broadcasts
    returns [N]

    >>> both = {"radial_load": "4 kN", "axial_load": "5 kN", "contact_angle": "0 deg", "rule": "deep groove"}
    >>> static_equivalent_load(**both).round(6)
    <Quantity(4900.0, 'newton')>
    """
    cot = _cot_where_used(contact_angle, rule)
    y0 = np.where(_BY_ANGLE[rule], np.interp(contact_angle, _ANGLES, _DOUBLE_Y0), _Y0[rule] * cot)
    combined = _X0[rule] * radial_load + y0 * np.abs(axial_load)
    load: Array = np.maximum(combined, np.where(IS_THRUST[rule], 0.0, radial_load))
    return load


@method(source="bearing-handbooks", valid={"radial_load": (0.0, 1e9), "contact_angle": (0.0, 90.0)})
def induced_thrust(radial_load: Newton, contact_angle: Deg, rule: RuleCode) -> Newton:
    """Axial force that a radial load sets free inside a single row tapered or angular contact bearing, Fr/(2 Y).

    It must be held by the opposed bearing. For half of the rolling elements loaded; at 15 degrees with Y 1.47. Some
    handbooks print e Fr for angular contact ball bearings, up to 30 % more. Zero for every other rule.

    radial_load [N]: radial load Fr, any shape
    contact_angle [deg]: nominal contact angle, broadcasts; used by tapered bearings
    rule: one of `RULES`, broadcasts
    returns [N]

    >>> induced_thrust("8 kN", "45 deg", "tapered").round(6)
    <Quantity(10000.0, 'newton')>
    """
    force: Array = _INDUCED[rule] * radial_load / _cot_where_used(contact_angle, rule)
    return force


@method(
    source="bearing-handbooks",
    valid={"external": (-1e9, 1e9), "own_thrust": (0.0, 1e9), "other_thrust": (0.0, 1e9)},
)
def opposed_axial_load(*, external: Newton, own_thrust: Newton, other_thrust: Newton) -> Newton:
    """Axial load on one of two opposed single row bearings, adjusted without play or preload, max(S1, S2 + Ka).

    Of the two thrusts that the radial loads set free the shaft lets the greater sum act: this bearing carries its own
    thrust, or the other's and the external force where those are more. The other bearing carries max(S2, S1 - Ka).

    external [N]: axial force of the shaft Ka, positive towards this bearing, any shape
    own_thrust [N]: `induced_thrust` of this bearing, broadcasts
    other_thrust [N]: `induced_thrust` of the opposed bearing, broadcasts
    returns [N]

    >>> opposed_axial_load(external="1690 N", own_thrust="680 N", other_thrust="832 N").round(6)
    <Quantity(2522.0, 'newton')>
    """
    load: Array = np.maximum(own_thrust, other_thrust + external)
    return load


_BISECTIONS = 60  # each halves the bracket: the last digit of a load is reached whatever the rule


@method(
    source="iso-281",
    valid={
        "radial_load": (0.0, 1e9),
        "wanted": (0.0, 1e9),
        "static_rating": (1e-3, 1e9),
        "f0_load": (1.0, 30.0),
        "contact_angle": (0.0, 90.0),
    },
)
def axial_load_for(
    *,
    radial_load: Newton,
    wanted: Newton,
    static_rating: Newton,
    f0_load: Number,
    contact_angle: Deg,
    rule: RuleCode,
) -> Newton:
    """Axial load that brings the equivalent load P of a bearing to a wanted one: the preload that cures a light load.

    The inverse of `dynamic_equivalent_load`, which never falls as the axial load grows, by bisection with a fixed count
    of steps. Zero where the radial load alone is enough; not a number where the rule counts no axial load.

    radial_load [N]: radial load Fr, any shape
    wanted [N]: equivalent load that is wanted, broadcasts
    static_rating [N]: basic static load rating C0, broadcasts
    f0_load [1]: the factor f0 of ISO 76, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    rule: one of `RULES`, broadcasts
    returns [N]

    >>> light = {"radial_load": "100 N", "wanted": "530 N", "static_rating": "31.5 kN", "f0_load": 13.0}
    >>> axial_load_for(**light, contact_angle="0 deg", rule="deep groove").round(1)
    <Quantity(206.1, 'newton')>
    """
    takes = TAKES_AXIAL[rule]

    def equivalent(axial: Array) -> Array:
        return dynamic_equivalent_load.plain(
            radial_load=radial_load, axial_load=axial, static_rating=static_rating, f0_load=f0_load,
            contact_angle=contact_angle, rule=rule,
        )  # fmt: skip

    # No rule's steepest line is flatter than Y 0.4: five times the wanted load is above the root for all of them.
    low = np.zeros(np.broadcast(radial_load, wanted, rule).shape)
    high = low + 5.0 * wanted
    is_enough = equivalent(low) >= wanted
    for _ in range(_BISECTIONS):
        middle = (low + high) / 2
        is_above = equivalent(middle) >= wanted
        low, high = np.where(is_above, low, middle), np.where(is_above, middle, high)
    return np.where(is_enough, 0.0, np.where(takes, high, np.nan))


@method(source="common-practice", valid={"dynamic_rating": (1e-3, 1e9), "share": (0.0, 0.2)})
def minimum_load(*, dynamic_rating: Newton, share: Share) -> Newton:
    """Least load under which the rolling elements roll and do not slide.

    About 0.01 C for ball and 0.02 C for roller bearings, more where the bearing speeds up hard.

    dynamic_rating [N]: basic dynamic load rating C, any shape
    share [1]: share of C, broadcasts
    returns [N]

    >>> minimum_load(dynamic_rating="50 kN", share="2 %").round(6)
    <Quantity(1000.0, 'newton')>
    """
    return dynamic_rating * share


@method(source="iso-76", valid={"static_rating": (1e-3, 1e9), "static_load": (1e-3, 1e9)})
def static_safety(*, static_rating: Newton, static_load: Newton) -> Number:
    """Static safety factor S0 = C0/P0.

    Ball and roller bearings need at least 2 and 3 for quiet running, 1 and 1.5 in ordinary, 1.5 and 3 in shock service.

    static_rating [N]: basic static load rating C0, any shape
    static_load [N]: static equivalent load P0, broadcasts
    returns [1]

    >>> static_safety(static_rating="24 kN", static_load="8 kN").round(6)
    <Quantity(3.0, 'dimensionless')>
    """
    return static_rating / static_load
