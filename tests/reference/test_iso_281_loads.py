"""ISO 281:2007, tables of X, Y and e, at their nodes and between (all numbers from memory of the standard)."""

from __future__ import annotations

import math

import pytest

from lubecheck.physics import loads

# (f0 Fa/C0, e, Y), X = 0.56: single row deep groove ball bearings
DEEP_GROOVE = [
    (0.172, 0.19, 2.30),
    (0.345, 0.22, 1.99),
    (0.689, 0.26, 1.71),
    (1.03, 0.28, 1.55),
    (1.38, 0.30, 1.45),
    (2.07, 0.34, 1.31),
    (3.45, 0.38, 1.15),
    (5.17, 0.42, 1.04),
    (6.89, 0.44, 1.00),
]
# (f0 Fa/C0, e, Y), X = 0.44: single row angular contact ball bearings, 15 degrees
ANGULAR_15 = [
    (0.178, 0.38, 1.47),
    (0.357, 0.40, 1.40),
    (0.714, 0.43, 1.30),
    (1.07, 0.46, 1.23),
    (1.43, 0.47, 1.19),
    (2.14, 0.50, 1.12),
    (3.57, 0.55, 1.02),
    (5.35, 0.56, 1.00),
    (7.14, 0.56, 1.00),
]
# (rule, angle, e, Y1, X2, Y2)
FIXED = [
    ("angular contact 25", 25, 0.68, 0, 0.41, 0.87),
    ("angular contact 30", 30, 0.80, 0, 0.39, 0.76),
    ("angular contact 40", 40, 1.14, 0, 0.35, 0.57),
    ("double row angular contact", 20, 0.57, 1.09, 0.70, 1.63),
    ("double row angular contact", 25, 0.68, 0.92, 0.67, 1.41),
    ("double row angular contact", 30, 0.80, 0.78, 0.63, 1.24),
    ("double row angular contact", 35, 0.95, 0.66, 0.60, 1.07),
    ("double row angular contact", 40, 1.14, 0.55, 0.57, 0.93),
    ("double row angular contact", 45, 1.34, 0.47, 0.54, 0.81),
    ("four-point", 35, 0.95, 0.66, 0.60, 1.07),
]
# With the angle written out: e = 1.5 tan a, and cot a in the Y: (rule, angle, Y1 / cot, X2, Y2 / cot)
BY_ANGLE = [
    ("self-aligning ball", 10, 0.42, 0.65, 0.65),
    ("tapered", 14, 0.0, 0.40, 0.40),
    ("tapered", 28.81, 0.0, 0.40, 0.40),
    ("spherical roller", 9.5, 0.45, 0.67, 0.67),
]


def dynamic(rule, radial, axial, *, relative=1.0, angle=0.0):
    """P in N with the static rating chosen so that f0 Fa/C0 is `relative`."""
    return (
        loads.dynamic_equivalent_load(
            radial_load=f"{radial} N",
            axial_load=f"{axial} N",
            static_rating=f"{14 * axial / relative if axial else 1e4} N",
            f0_load=14,
            contact_angle=f"{angle} deg",
            rule=rule,
        )
        .to("N")
        .magnitude
    )


@pytest.mark.parametrize(
    ("rule", "x", "node"),
    [("deep groove", 0.56, node) for node in DEEP_GROOVE] + [("angular contact 15", 0.44, node) for node in ANGULAR_15],
)
def test_factors_at_the_nodes_of_the_relative_axial_load(rule, x, node):
    relative, e, y = node
    axial = 1000.0
    for ratio in (e * 1.1, 1.0, 3.0):  # above e
        assert dynamic(rule, axial / ratio, axial, relative=relative) == pytest.approx(x * axial / ratio + y * axial)
    radial = axial / (e * 0.9)  # below e
    assert dynamic(rule, radial, axial, relative=relative) == pytest.approx(radial)


@pytest.mark.parametrize(
    ("relative", "y"),
    [
        (0.517, 1.85),  # half way from 0.345 to 0.689: (1.99 + 1.71)/2
        (1.205, 1.50),  # half way from 1.03 to 1.38
        (2.415, 1.27),  # a quarter from 2.07 to 3.45: 1.31 - 0.04
        (0.05, 2.30),  # the end holds below the table
        (9.0, 1.00),  # and above it
    ],
)
def test_the_factor_is_linear_between_the_nodes_and_held_at_the_ends(relative, y):
    assert dynamic("deep groove", 1000, 1000, relative=relative) == pytest.approx(560 + 1000 * y, rel=1e-9)


@pytest.mark.parametrize(("rule", "angle", "e", "y1", "x2", "y2"), FIXED)
def test_factors_of_angular_contact_bearings(rule, angle, e, y1, x2, y2):
    for ratio in (e * 0.95, 0.5 * e, 0.0):
        assert dynamic(rule, 1000, 1000 * ratio, angle=angle) == pytest.approx(1000 * (1 + y1 * ratio))
    for ratio in (e * 1.05, 2 * e):
        assert dynamic(rule, 1000, 1000 * ratio, angle=angle) == pytest.approx(1000 * (x2 + y2 * ratio))


def test_factors_of_double_row_bearings_between_two_angles():
    """ISO 281 note: linear between angles; 32 degrees is 0.4 of the way from 30 to 35."""
    below, above = (1000 * (1 + (0.78 - 0.4 * 0.12) * 0.5), 1000 * ((0.63 - 0.4 * 0.03) + (1.24 - 0.4 * 0.17) * 3))
    assert dynamic("double row angular contact", 1000, 500, angle=32) == pytest.approx(below)
    assert dynamic("double row angular contact", 1000, 3000, angle=32) == pytest.approx(above)


@pytest.mark.parametrize(("rule", "angle", "y1", "x2", "y2"), BY_ANGLE)
def test_factors_that_are_written_with_the_contact_angle(rule, angle, y1, x2, y2):
    e, cot = 1.5 * math.tan(math.radians(angle)), 1 / math.tan(math.radians(angle))
    assert dynamic(rule, 1000, 900 * e, angle=angle) == pytest.approx(1000 * (1 + y1 * cot * 0.9 * e))
    assert dynamic(rule, 1000, 1200 * e, angle=angle) == pytest.approx(1000 * (x2 + y2 * cot * 1.2 * e))


@pytest.mark.parametrize(
    ("rule", "radial", "axial", "expected"),
    [
        ("cylindrical", 4000, 0, 4000),
        ("cylindrical", 4000, 300, 4000),
        ("thrust ball", 0, 4000, 4000),
        ("thrust cylindrical", 0, 4000, 4000),
        ("thrust spherical", 1000, 4000, 5200),  # Fa + 1.2 Fr
    ],
)
def test_families_with_one_line(rule, radial, axial, expected):
    assert dynamic(rule, radial, axial) == pytest.approx(expected)


@pytest.mark.parametrize(
    ("rule", "node"),
    [("deep groove", (r, e, 0.0, 0.56, y)) for r, e, y in DEEP_GROOVE]
    + [("angular contact 15", (r, e, 0.0, 0.44, y)) for r, e, y in ANGULAR_15],
)
def test_the_greater_of_the_two_lines_is_the_printed_branch_within_its_rounding(rule, node):
    """The factors are printed to two figures after the point: the two lines meet at the printed e within 0.7 %."""
    relative, e, y1, x2, y2 = node
    radial = 1000 / e
    assert dynamic(rule, radial, 1000, relative=relative) == pytest.approx(radial + y1 * 1000, rel=7e-3)
    assert dynamic(rule, radial, 1000, relative=relative) == pytest.approx(x2 * radial + y2 * 1000, rel=7e-3)


def test_a_tapered_bearing_as_handbooks_list_it():
    """30210: handbooks list e 0.42, Y 1.4 and a contact angle of 15 degrees 38 minutes (memory; two figures)."""
    angle = 15 + 38 / 60 + 32 / 3600
    assert dynamic("tapered", 1000, 2000, angle=angle) == pytest.approx(400 + 1.4 * 2000, rel=0.03)
    assert 1.5 * math.tan(math.radians(angle)) == pytest.approx(0.42, abs=0.005)


def test_a_spherical_roller_bearing_as_handbooks_list_it():
    """22218: handbooks list e 0.24, Y1 2.8, Y2 4.2, Y0 2.8 (memory; two figures): the angle is atan(0.24/1.5)."""
    angle = math.degrees(math.atan(0.24 / 1.5))
    assert dynamic("spherical roller", 10000, 2000, angle=angle) == pytest.approx(10000 + 2.8 * 2000, rel=0.01)
    assert dynamic("spherical roller", 10000, 9000, angle=angle) == pytest.approx(6700 + 4.2 * 9000, rel=0.01)
