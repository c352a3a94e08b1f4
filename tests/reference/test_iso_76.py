"""ISO 76:2006, table of X0 and Y0, and the clause that P0r is not below Fr (numbers from memory of the standard)."""

from __future__ import annotations

import math

import pytest

from lubecheck.physics import loads

# (rule, angle, X0, Y0)
TABLE = [
    ("deep groove", 0, 0.6, 0.5),
    ("angular contact 15", 15, 0.5, 0.46),
    ("angular contact 25", 25, 0.5, 0.38),
    ("angular contact 30", 30, 0.5, 0.33),
    ("angular contact 40", 40, 0.5, 0.26),
    ("double row angular contact", 20, 1.0, 0.84),
    ("double row angular contact", 25, 1.0, 0.76),
    ("double row angular contact", 30, 1.0, 0.66),
    ("double row angular contact", 32, 1.0, 0.628),  # linear between 0.66 and 0.58
    ("double row angular contact", 40, 1.0, 0.52),
    ("double row angular contact", 45, 1.0, 0.44),
    ("four-point", 35, 1.0, 0.58),
    ("self-aligning ball", 12, 1.0, 0.44 / math.tan(math.radians(12))),
    ("tapered", 14, 0.5, 0.22 / math.tan(math.radians(14))),
    ("spherical roller", 10, 1.0, 0.44 / math.tan(math.radians(10))),
]


def static(rule, radial, axial, angle):
    load = loads.static_equivalent_load(
        radial_load=f"{radial} N", axial_load=f"{axial} N", contact_angle=f"{angle} deg", rule=rule
    )
    return load.to("N").magnitude


@pytest.mark.parametrize(("rule", "angle", "x0", "y0"), TABLE)
def test_static_factors(rule, angle, x0, y0):
    assert static(rule, 1000, 5000, angle) == pytest.approx(1000 * x0 + 5000 * y0)


@pytest.mark.parametrize(("rule", "angle"), [row[:2] for row in TABLE])
def test_the_static_load_of_a_radial_bearing_is_at_least_the_radial_load(rule, angle):
    assert static(rule, 1000, 10, angle) >= 1000


@pytest.mark.parametrize(
    ("rule", "radial", "axial", "expected"),
    [
        ("cylindrical", 7000, 0, 7000),
        ("thrust ball", 0, 7000, 7000),
        ("thrust cylindrical", 0, 7000, 7000),
        ("thrust spherical", 1000, 7000, 9700),  # handbooks: Fa + 2.7 Fr, which is 2.3 tan 50 degrees
    ],
)
def test_static_load_of_one_line_families(rule, radial, axial, expected):
    assert static(rule, radial, axial, 0) == pytest.approx(expected)


@pytest.mark.parametrize(
    ("rule", "angle", "listed"),
    [
        ("tapered", 15.642, 0.8),  # handbooks, 30210: Y0 0.8
        ("spherical roller", math.degrees(math.atan(0.24 / 1.5)), 2.8),  # handbooks, 22218: Y0 2.8
    ],
)
def test_static_axial_factors_as_handbooks_list_them(rule, angle, listed):
    """Handbooks print two figures (memory)."""
    assert static(rule, 0, 1000, angle) == pytest.approx(1000 * listed, rel=0.03)
