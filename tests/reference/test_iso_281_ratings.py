"""ISO 281:2007 tables of f_c, and ISO 76:2006 table of f_0, at their own nodes (memory of the printed tables).

f_c is printed to three figures: 0.3 % for the rounding. It is got back from C by leaving out the size terms.
"""

import numpy as np
import pytest

from lubecheck.physics import ratings

NODES = np.array([0.05, 0.06, 0.08, 0.10, 0.12, 0.14, 0.16, 0.20, 0.22, 0.24, 0.26, 0.28, 0.30, 0.32, 0.36, 0.40])
# single row radial contact and angular contact; double row radial contact at 0.05: 44.2; self-aligning
RADIAL = [46.7, 49.1, 52.8, 55.5, 57.5, 58.8, 59.6, 59.9, 59.6, 59.0, 58.2, 57.1, 56.0, 54.6, 51.7, 48.4]
SELF_ALIGNING = [17.3, 18.6, 21.1, 23.4, 25.6, 27.7, 29.7, 33.5, 35.2, 36.8, 38.2, 39.4, 40.3, 40.9, 41.3, 40.4]
BALL, ONE = 10.0, np.asarray(1.0)
BALL_TERM = 1.3 * BALL**1.8


def ball_factor(function, gamma, rows=1.0):
    rating = function.plain(
        ball_diameter=np.asarray(BALL), pitch_diameter=BALL / gamma, contact_angle=np.asarray(0.0), count=ONE,
        rows=np.asarray(rows),
    )  # fmt: skip
    return rating / (BALL_TERM * rows**0.7)


def test_f_c_of_radial_ball_bearings():
    assert ball_factor(ratings.radial_ball_dynamic, NODES) == pytest.approx(RADIAL, rel=0.003)


def test_f_c_of_self_aligning_ball_bearings():
    assert ball_factor(ratings.self_aligning_ball_dynamic, NODES) == pytest.approx(SELF_ALIGNING, rel=0.003)


def test_f_c_of_double_row_radial_contact():
    assert ball_factor(ratings.radial_ball_dynamic, np.array([0.05]), rows=2.0) == pytest.approx(44.2, rel=0.003)


@pytest.mark.parametrize(("ratio", "f_c"), [(0.01, 36.7), (0.02, 45.2), (0.05, 59.5), (0.10, 73.3), (0.20, 90.2)])
def test_f_c_of_thrust_ball_bearings(ratio, f_c):
    ball = np.asarray(BALL)
    rating = ratings.thrust_ball_dynamic.plain(ball_diameter=ball, pitch_diameter=ball / ratio, count=ONE)
    assert rating / BALL_TERM == pytest.approx(f_c, rel=0.003)


@pytest.mark.parametrize(
    ("gamma", "f_c"),
    [(0.01, 52.1), (0.02, 60.8), (0.05, 74.1), (0.10, 84.2), (0.14, 87.7), (0.20, 88.7), (0.24, 87.5), (0.30, 83.8)],
)
def test_f_c_of_radial_roller_bearings(gamma, f_c):
    rating = ratings.radial_roller_dynamic.plain(
        roller_diameter=ONE, roller_length=ONE, pitch_diameter=ONE / gamma, contact_angle=0 * ONE, count=ONE, rows=ONE,
        b_m=ONE,
    )  # fmt: skip
    assert rating == pytest.approx(f_c, rel=0.002)


@pytest.mark.parametrize(("ratio", "f_c"), [(0.01, 105.4), (0.02, 122.9), (0.05, 150.7), (0.10, 175.7), (0.20, 205.0)])
def test_f_c_of_thrust_roller_bearings(ratio, f_c):
    rating = ratings.thrust_roller_dynamic.plain(
        roller_diameter=ONE, roller_length=ONE, pitch_diameter=ONE / ratio, contact_angle=90 * ONE, count=ONE, b_m=ONE
    )
    assert rating == pytest.approx(f_c, rel=0.002)


@pytest.mark.parametrize(("gamma", "f_0"), [(0.0, 14.7), (0.05, 15.7), (0.09, 16.5), (0.20, 14.0), (0.30, 11.6)])
def test_f_0_of_deep_groove_bearings(gamma, f_0):
    assert ratings.static_factor.plain(np.asarray(gamma)) == pytest.approx(f_0)


# Worked by hand from the formulas of the standards, the tables' f_c and f_0 and a geometry that is open to measurement:
# 6309, eight balls of 17.462 mm on 72.5 mm; handbooks print 52.7 to 55.3 kN and 31.5 kN.
def test_the_ratings_of_a_measured_bearing():
    geometry = {
        "ball_diameter": np.asarray(17.462), "pitch_diameter": np.asarray(72.5), "contact_angle": np.asarray(0.0),
        "count": np.asarray(8.0), "rows": ONE,
    }  # fmt: skip
    dynamic = 1.3 * 58.96 * 8 ** (2 / 3) * 17.462**1.8
    assert ratings.radial_ball_dynamic.plain(**geometry) == pytest.approx(dynamic, rel=0.003)
    assert ratings.radial_ball_static.plain(**geometry) == pytest.approx(13.0 * 8 * 17.462**2, rel=0.005)
    assert ratings.radial_ball_static.plain(**geometry) == pytest.approx(31500, rel=0.02)
