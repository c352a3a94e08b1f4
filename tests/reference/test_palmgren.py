"""Palmgren's friction torque against the constant friction coefficients that handbooks print (numbers from memory).

M = mu P d/2 with mu 0.0010 to 0.0015 for deep groove ball and cylindrical roller bearings, 0.0017 to 0.0025 for tapered
and spherical roller bearings, at a load of about C/12 and ordinary speed. The two methods agree to a factor of 2.
"""

from __future__ import annotations

import pytest

from lubecheck.physics import friction

BALL_OR_CYLINDRICAL = (0.0010, 0.0015)
TAPERED_OR_SPHERICAL = (0.0017, 0.0025)


@pytest.mark.parametrize(
    ("bore", "outside", "load", "f0", "f1", "mus"),
    [
        (50, 90, 35.1e3 / 12, 2.0, 0.0002, BALL_OR_CYLINDRICAL),  # deep groove 6210, C 35.1 kN
        (50, 110, 61.8e3 / 12, 2.3, 0.0002, BALL_OR_CYLINDRICAL),  # deep groove 6310, C 61.8 kN
        (50, 110, 110e3 / 12, 2.0, 0.00035, BALL_OR_CYLINDRICAL),  # cylindrical NU 310, C 110 kN
        (50, 90, 76.5e3 / 12, 3.0, 0.0004, TAPERED_OR_SPHERICAL),  # tapered 30210, C 76.5 kN
        (90, 160, 325e3 / 12, 4.0, 0.00015, TAPERED_OR_SPHERICAL),  # spherical 22218, C 325 kN
    ],
)
def test_the_sum_agrees_with_the_constant_coefficient_of_friction_to_a_factor_of_two(bore, outside, load, f0, f1, mus):
    pitch_diameter = (bore + outside) / 2
    total = friction.no_load_torque.plain(f0, 20.0, 1500.0, pitch_diameter) + friction.load_torque.plain(
        f1, load, pitch_diameter
    )
    published = [mu * load * bore / 2 for mu in mus]
    assert published[0] / 2 < total < published[1] * 2
