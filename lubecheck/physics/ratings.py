"""Ratings: the basic dynamic (ISO 281) and static (ISO 76) load ratings that an internal geometry gives.

The geometry factors f_c are computed from the expressions behind the standard's tables (ISO/TR 1281-1), for the
groove radii that the standard assumes; the static factors f_0 of ball bearings are the standard's table. `count` is
the number of rolling elements of one row and need not be whole: an estimated geometry has an estimated count.
"""

from __future__ import annotations

import numpy as np

from lubecheck.method import method
from lubecheck.units import Array, Deg, Mm, Newton, Number

# Rating factor b_m for common good material and making, ISO 281:2007, tables 1, 4, 6 and 9 (memory).
BM_BALL = 1.3
BM_CYLINDRICAL = 1.1  # cylindrical, tapered, needle with machined rings
BM_SPHERICAL = 1.15
BM_THRUST_CYLINDRICAL = 1.0

_LARGE_BALL = 25.4  # mm, above it the standard counts the ball's diameter with a lower power
_LARGE_BALL_FACTOR = 3.647  # = 25.4^0.4

# ISO 76:2006, table 1, f_0 against D_w cos(alpha) / D_pw in steps of 0.01 (memory, nodes rounded as printed).
_F0_RADIAL = np.array(
    [
        14.7, 14.9, 15.1, 15.3, 15.5, 15.7, 15.9, 16.1, 16.3, 16.5,
        16.4, 16.1, 15.9, 15.6, 15.4, 15.2, 14.9, 14.7, 14.4, 14.2,
        14.0, 13.7, 13.5, 13.2, 13.0, 12.8, 12.5, 12.3, 12.1, 11.8,
        11.6, 11.4, 11.2, 10.9, 10.7, 10.5, 10.3, 10.0, 9.8, 9.6,
        9.4,
    ]
)  # fmt: skip
_F0_SELF_ALIGNING = np.array(  # a ball against a spherical outer raceway
    [
        1.9, 2.0, 2.0, 2.1, 2.1, 2.1, 2.2, 2.2, 2.3, 2.3,
        2.4, 2.4, 2.4, 2.5, 2.5, 2.6, 2.6, 2.7, 2.7, 2.8,
        2.8, 2.8, 2.9, 2.9, 3.0, 3.0, 3.1, 3.1, 3.2, 3.2,
        3.3, 3.3, 3.4, 3.4, 3.5, 3.5, 3.6, 3.6, 3.7, 3.8,
        3.8,
    ]
)  # fmt: skip
_F0_NODES = np.arange(len(_F0_RADIAL)) / 100
_F0_THRUST = 61.6  # ISO 76, table 1, contact angle 90 deg


def _power(base: Array, exponent: float) -> Array:
    """A power as exp of log, which costs a quarter of the power itself."""
    raised: Array = np.exp(exponent * np.log(base))
    return raised


def _gamma(diameter: Array, pitch_diameter: Array, contact_angle: Array) -> Array:
    ratio: Array = diameter * np.cos(np.radians(contact_angle)) / pitch_diameter
    return ratio


def _ball_size(ball_diameter: Array) -> Array:
    large = _LARGE_BALL_FACTOR * _power(ball_diameter, 1.4)
    size: Array = np.where(ball_diameter > _LARGE_BALL, large, _power(ball_diameter, 1.8))
    return size


def _ball_ring_sum(gamma: Array, radii_term: float | Array) -> Array:
    """{1 + [1.04 ((1-g)/(1+g))^1.72 radii]^(10/3)}^-0.3 g^0.3 (1-g)^1.39 (1+g)^(-1/3): both rings' share in f_c."""
    inner_to_outer = 1.04 * _power((1 - gamma) / (1 + gamma), 1.72) * radii_term
    both = _power(1 + _power(inner_to_outer, 10 / 3), -0.3)
    share: Array = both * _power(gamma, 0.3) * _power(1 - gamma, 1.39) * _power(1 + gamma, -1 / 3)
    return share


def _roller_ring_sum(gamma: Array, lead: float) -> Array:
    """{1 + [lead ((1-g)/(1+g))^(143/108)]^(9/2)}^(-2/9) g^(2/9) (1-g)^(29/27) (1+g)^(-1/4)."""
    both = _power(1 + _power(lead * _power((1 - gamma) / (1 + gamma), 143 / 108), 4.5), -2 / 9)
    share: Array = both * _power(gamma, 2 / 9) * _power(1 - gamma, 29 / 27) * _power(1 + gamma, -0.25)
    return share


_BALL_LEAD = 40.2  # ISO/TR 1281-1 in N and mm; textbooks that print 39.9 are 0.8 % below the standard's table
_RADIAL_ROLLER = 207.9 * 0.83  # lead and lambda nu, ISO/TR 1281-1
_THRUST_ROLLER = 551.13 * 0.73  # lead and lambda nu, times eta = 1 - 0.15 sin a, the same source
_ONE_ROW, _TWO_RADIAL_ROWS, _SELF_ALIGNING = 0.95, 0.90, 1.0  # reduction lambda for unequal sharing, the same source
_GROOVE = (2 * 0.52 / (2 * 0.52 - 1)) ** 0.41  # groove radii 0.52 D_w on both rings
_THRUST_BALL_FC = 146.2  # reproduces the printed table for 90 deg (36.7 at 0.01, 73.3 at 0.10, 90.2 at 0.20)
_SELF_ALIGNING_GROOVE = 2 * 0.53 / (2 * 0.53 - 1)  # inner groove radius 0.53 D_w


@method(
    source="iso-281:5.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)}
)
def radial_ball_dynamic(
    *, ball_diameter: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number, rows: Number
) -> Newton:
    """Dynamic rating of deep groove, angular contact and four-point contact ball bearings.

    C_r = b_m f_c (i cos a)^0.7 Z^(2/3) D_w^1.8, above 25.4 mm 3.647 D_w^1.4 for D_w^1.8. Two rows at contact angle 0
    share the load less evenly than one row or an angular contact pair: f_c is lower by 0.90/0.95.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: balls in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    returns [N]

    >>> geometry = {"ball_diameter": "17.462 mm", "pitch_diameter": "72.5 mm", "contact_angle": "0 deg"}
    >>> radial_ball_dynamic(**geometry, count=8, rows=1).to("kN").round(1)
    <Quantity(52.7, 'kilonewton')>
    """
    reduction = np.where((rows > 1) & (contact_angle == 0), _TWO_RADIAL_ROWS, _ONE_ROW)
    ring_sum = _ball_ring_sum(_gamma(ball_diameter, pitch_diameter, contact_angle), 1.0)
    f_c = _BALL_LEAD * reduction * _GROOVE * ring_sum
    rows_term = _power(rows * np.cos(np.radians(contact_angle)), 0.7)
    rating: Array = BM_BALL * f_c * rows_term * _power(count, 2 / 3) * _ball_size(ball_diameter)
    return rating


@method(
    source="iso-281:5.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)}
)
def self_aligning_ball_dynamic(
    *, ball_diameter: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number, rows: Number
) -> Newton:
    """Dynamic rating of self-aligning ball bearings: the outer raceway is a sphere.

    C_r = b_m f_c (i cos a)^0.7 Z^(2/3) D_w^1.8 with r_i = 0.53 D_w and r_e = 0.5 (1/gamma + 1) D_w in f_c.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: balls in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    returns [N]

    >>> geometry = {"ball_diameter": "9.525 mm", "pitch_diameter": "46 mm", "contact_angle": "12 deg"}
    >>> radial = self_aligning_ball_dynamic(**geometry, count=12, rows=2)
    >>> radial_ball_dynamic(**geometry, count=12, rows=2) > radial
    True
    """
    gamma = _gamma(ball_diameter, pitch_diameter, contact_angle)
    outer_radius = 0.5 * (1 / gamma + 1)  # over D_w
    radii = _power(_SELF_ALIGNING_GROOVE * (2 * outer_radius - 1) / (2 * outer_radius), 0.41)
    f_c = _BALL_LEAD * _SELF_ALIGNING * _SELF_ALIGNING_GROOVE**0.41 * _ball_ring_sum(gamma, radii)
    rows_term = _power(rows * np.cos(np.radians(contact_angle)), 0.7)
    rating: Array = BM_BALL * f_c * rows_term * _power(count, 2 / 3) * _ball_size(ball_diameter)
    return rating


@method(source="iso-281:6.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0)})
def thrust_ball_dynamic(*, ball_diameter: Mm, pitch_diameter: Mm, count: Number) -> Newton:
    """Dynamic rating of thrust ball bearings with a contact angle of 90 deg, one row.

    C_a = b_m f_c Z^(2/3) D_w^1.8 (3.647 D_w^1.4 above 25.4 mm), f_c = 146.2 (D_w / D_pw)^0.3.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    count [1]: balls Z, broadcasts
    returns [N]

    >>> thrust_ball_dynamic(ball_diameter="10 mm", pitch_diameter="100 mm", count=20).to("kN").round(1)
    <Quantity(44.3, 'kilonewton')>
    """
    f_c = _THRUST_BALL_FC * _power(ball_diameter / pitch_diameter, 0.3)
    rating: Array = BM_BALL * f_c * _power(count, 2 / 3) * _ball_size(ball_diameter)
    return rating


@method(
    source="iso-281:7.1", valid={"roller_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)}
)
def radial_roller_dynamic(
    *,
    roller_diameter: Mm,
    roller_length: Mm,
    pitch_diameter: Mm,
    contact_angle: Deg,
    count: Number,
    rows: Number,
    b_m: Number,
) -> Newton:
    """Dynamic rating of radial roller bearings.

    C_r = b_m f_c (i L_we cos a)^(7/9) Z^(3/4) D_we^(29/27).

    roller_diameter [mm]: roller diameter D_we, any shape
    roller_length [mm]: effective roller length L_we, broadcasts
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: rollers in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    b_m [1]: rating factor, `BM_CYLINDRICAL` or `BM_SPHERICAL`, broadcasts
    returns [N]

    >>> rollers = {"roller_diameter": "10 mm", "roller_length": "12 mm", "pitch_diameter": "100 mm", "count": 20}
    >>> radial_roller_dynamic(**rollers, contact_angle="0 deg", rows=1, b_m=1.1).to("kN").round(1)
    <Quantity(71.8, 'kilonewton')>
    """
    f_c = _RADIAL_ROLLER * _roller_ring_sum(_gamma(roller_diameter, pitch_diameter, contact_angle), 1.04)
    length = _power(rows * roller_length * np.cos(np.radians(contact_angle)), 7 / 9)
    rating: Array = b_m * f_c * length * _power(count, 0.75) * _power(roller_diameter, 29 / 27)
    return rating


@method(
    source="iso-281:8.1", valid={"roller_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (45.0, 90.0)}
)
def thrust_roller_dynamic(
    *, roller_diameter: Mm, roller_length: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number, b_m: Number
) -> Newton:
    """Dynamic rating of thrust roller bearings, one row.

    C_a = b_m f_c L_we^(7/9) Z^(3/4) D_we^(29/27) at 90 deg, f_c = 293 (D_we / D_pw)^(2/9); below 90 deg with
    (L_we cos a)^(7/9) tan a and the ring sum of radial bearings. Both are one expression here, as (cos a)^(7/9) tan a
    times (cos a)^(2/9) of f_c is sin a.

    roller_diameter [mm]: roller diameter D_we, any shape
    roller_length [mm]: effective roller length L_we, broadcasts
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: rollers Z, broadcasts
    b_m [1]: rating factor, `BM_THRUST_CYLINDRICAL` or `BM_SPHERICAL`, broadcasts
    returns [N]

    >>> rollers = {"roller_diameter": "10 mm", "roller_length": "12 mm", "pitch_diameter": "100 mm", "count": 20}
    >>> thrust_roller_dynamic(**rollers, contact_angle="90 deg", b_m=1.0).to("kN").round(1)
    <Quantity(136.2, 'kilonewton')>
    """
    sine = np.sin(np.radians(contact_angle))
    gamma = _gamma(roller_diameter, pitch_diameter, contact_angle)
    inner_to_outer = _power((1 - gamma) / (1 + gamma), 143 / 108)
    both = _power(1 + _power(inner_to_outer, 4.5), -2 / 9) * _power(1 - gamma, 29 / 27) * _power(1 + gamma, -0.25)
    f_c = _THRUST_ROLLER * (1 - 0.15 * sine) * both * _power(roller_diameter / pitch_diameter, 2 / 9)
    size = _power(roller_length, 7 / 9) * _power(count, 0.75) * _power(roller_diameter, 29 / 27)
    rating: Array = b_m * f_c * sine * size
    return rating


@method(source="iso-76:5.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)})
def radial_ball_static(
    *, ball_diameter: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number, rows: Number
) -> Newton:
    """Static rating of deep groove, angular contact and four-point contact ball bearings.

    C_0r = f_0 i Z D_w^2 cos a.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: balls in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    returns [N]

    >>> geometry = {"ball_diameter": "17.462 mm", "pitch_diameter": "72.5 mm", "contact_angle": "0 deg"}
    >>> radial_ball_static(**geometry, count=8, rows=1).to("kN").round(1)
    <Quantity(31.7, 'kilonewton')>
    """
    gamma = _gamma(ball_diameter, pitch_diameter, contact_angle)
    rating: Array = static_factor.plain(gamma) * rows * count * ball_diameter**2 * np.cos(np.radians(contact_angle))
    return rating


@method(source="iso-76:5.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)})
def self_aligning_ball_static(
    *, ball_diameter: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number, rows: Number
) -> Newton:
    """Static rating of self-aligning ball bearings.

    C_0r = f_0 i Z D_w^2 cos a, with the low f_0 of a ball against a sphere.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: balls in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    returns [N]

    >>> geometry = {"ball_diameter": "10 mm", "pitch_diameter": "50 mm", "contact_angle": "0 deg"}
    >>> self_aligning_ball_static(**geometry, count=10, rows=2)
    <Quantity(5600.0, 'newton')>
    """
    f_0 = np.interp(_gamma(ball_diameter, pitch_diameter, contact_angle), _F0_NODES, _F0_SELF_ALIGNING)
    rating: Array = f_0 * rows * count * ball_diameter**2 * np.cos(np.radians(contact_angle))
    return rating


@method(source="iso-76:Table 1", valid={"gamma": (0.0, 0.4)})
def static_factor(gamma: Number) -> Number:
    """Factor f_0 of deep groove and angular contact ball bearings; ISO 281 counts Fa f_0 / C_0r with it too.

    gamma [1]: D_w cos(alpha) / D_pw, any shape
    returns [1]

    >>> static_factor(0.24)
    <Quantity(13.0, 'dimensionless')>
    """
    factor: Array = np.interp(gamma, _F0_NODES, _F0_RADIAL)
    return factor


@method(source="iso-76:6.1", valid={"ball_diameter": (0.5, 300.0), "count": (2.0, 500.0)})
def thrust_ball_static(*, ball_diameter: Mm, pitch_diameter: Mm, count: Number) -> Newton:
    """Static rating of thrust ball bearings with a contact angle of 90 deg, one row.

    C_0a = f_0 Z D_w^2 with f_0 = 61.6, whatever D_w / D_pw: the table counts D_w cos(alpha) / D_pw, which is 0.

    ball_diameter [mm]: ball diameter D_w, any shape
    pitch_diameter [mm]: pitch diameter D_pw, does not enter at 90 deg
    count [1]: balls Z, broadcasts
    returns [N]

    >>> thrust_ball_static(ball_diameter="10 mm", pitch_diameter="100 mm", count=20)
    <Quantity(123200.0, 'newton')>
    """
    rating: Array = _F0_THRUST * count * ball_diameter**2 + 0 * pitch_diameter
    return rating


@method(
    source="iso-76:7.1", valid={"roller_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (0.0, 45.0)}
)
def radial_roller_static(
    *,
    roller_diameter: Mm,
    roller_length: Mm,
    pitch_diameter: Mm,
    contact_angle: Deg,
    count: Number,
    rows: Number,
) -> Newton:
    """Static rating of radial roller bearings.

    C_0r = 44 (1 - D_we cos a / D_pw) i Z L_we D_we cos a.

    roller_diameter [mm]: roller diameter D_we, any shape
    roller_length [mm]: effective roller length L_we, broadcasts
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: rollers in one row Z, broadcasts
    rows [1]: rows i, broadcasts
    returns [N]

    >>> rollers = {"roller_diameter": "10 mm", "roller_length": "12 mm", "pitch_diameter": "100 mm", "count": 20}
    >>> radial_roller_static(**rollers, contact_angle="0 deg", rows=1)
    <Quantity(95040.0, 'newton')>
    """
    gamma = _gamma(roller_diameter, pitch_diameter, contact_angle)
    rating: Array = (
        44 * (1 - gamma) * rows * count * roller_length * roller_diameter * np.cos(np.radians(contact_angle))
    )
    return rating


@method(
    source="iso-76:8.1", valid={"roller_diameter": (0.5, 300.0), "count": (2.0, 500.0), "contact_angle": (45.0, 90.0)}
)
def thrust_roller_static(
    *, roller_diameter: Mm, roller_length: Mm, pitch_diameter: Mm, contact_angle: Deg, count: Number
) -> Newton:
    """Static rating of thrust roller bearings, one row.

    C_0a = 220 (1 - D_we cos a / D_pw) Z L_we D_we sin a.

    roller_diameter [mm]: roller diameter D_we, any shape
    roller_length [mm]: effective roller length L_we, broadcasts
    pitch_diameter [mm]: pitch diameter D_pw, broadcasts
    contact_angle [deg]: nominal contact angle, broadcasts
    count [1]: rollers Z, broadcasts
    returns [N]

    >>> rollers = {"roller_diameter": "10 mm", "roller_length": "12 mm", "pitch_diameter": "100 mm", "count": 20}
    >>> thrust_roller_static(**rollers, contact_angle="90 deg").round(6)
    <Quantity(528000.0, 'newton')>
    """
    gamma = _gamma(roller_diameter, pitch_diameter, contact_angle)
    rating: Array = 220 * (1 - gamma) * count * roller_length * roller_diameter * np.sin(np.radians(contact_angle))
    return rating
