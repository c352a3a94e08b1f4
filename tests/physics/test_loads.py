"""Equivalent loads: properties that hold for every rule, mixed rules in one call, and refusals."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.errors import ArgumentError, OutOfRange
from lubecheck.physics import loads
from lubecheck.physics.loads import RULES

ANGLE = {"self-aligning ball": 11.0, "double row angular contact": 32.0, "four-point": 35.0, "tapered": 15.0} | {
    "spherical roller": 9.5
}
ANGLES = np.array([ANGLE.get(name, 0.0) for name in RULES])
RADIAL_RULES = [code for code, name in enumerate(RULES) if not name.startswith("thrust")]
forces = st.floats(0.0, 1e5)
ratings = st.floats(1e3, 1e6)
rules = st.integers(0, len(RULES) - 1)


def dynamic(radial, axial, rule, rating=1e4):
    return loads.dynamic_equivalent_load.plain(
        radial_load=radial,
        axial_load=axial,
        static_rating=rating,
        f0_load=14.0,
        contact_angle=ANGLES[rule],
        rule=rule,
    )


def static(radial, axial, rule):
    return loads.static_equivalent_load.plain(
        radial_load=radial, axial_load=axial, contact_angle=ANGLES[rule], rule=rule
    )


@given(forces, forces, ratings, st.sampled_from(RADIAL_RULES))
def test_the_equivalent_loads_of_a_radial_bearing_are_never_below_its_radial_load(radial, axial, rating, rule):
    assert dynamic(radial, axial, rule, rating) >= radial
    assert static(radial, axial, rule) >= radial


@given(forces, forces, ratings, rules)
def test_the_sign_of_the_axial_load_does_not_matter(radial, axial, rating, rule):
    assert dynamic(radial, axial, rule, rating) == dynamic(radial, -axial, rule, rating)
    assert static(radial, axial, rule) == static(radial, -axial, rule)


@given(forces, forces, st.floats(1.0, 2.0), ratings, rules)
def test_more_load_of_either_kind_never_lowers_the_equivalent_load(radial, axial, more, rating, rule):
    base = dynamic(radial, axial, rule, rating) * (1 - 1e-12)
    assert dynamic(radial * more, axial, rule, rating) >= base
    assert dynamic(radial, axial * more, rule, rating) >= base


@given(forces, forces, st.floats(0.1, 10.0), ratings, rules)
def test_the_equivalent_load_scales_with_loads_and_rating(radial, axial, scale, rating, rule):
    scaled = dynamic(radial * scale, axial * scale, rule, rating * scale)
    assert scaled == pytest.approx(dynamic(radial, axial, rule, rating) * scale, rel=1e-9)


@pytest.mark.parametrize("rule", range(len(RULES)), ids=RULES)
def test_the_equivalent_load_has_no_step_as_the_axial_load_grows(rule):
    axial = np.linspace(0, 20000, 40001)
    load = dynamic(5000.0, axial, rule, 2e4)
    # the steepest factor, of a spherical roller bearing, is 0.67 cot 9.5 degrees = 4.0; the step of axial load is 0.5 N
    assert np.max(np.abs(np.diff(load))) <= 0.5 * 4.01


def test_mixed_rules_in_one_call_give_what_each_gives_alone():
    codes = np.arange(len(RULES))
    together = dynamic(3000.0, 2000.0, codes)
    assert together == pytest.approx([dynamic(3000.0, 2000.0, code) for code in codes], rel=1e-14)
    together = static(3000.0, 2000.0, codes)
    assert together == pytest.approx([static(3000.0, 2000.0, code) for code in codes], rel=1e-14)


def test_the_angle_of_a_row_that_does_not_use_it_changes_nothing():
    given_angles = {"radial_load": 3e3, "axial_load": 2e3, "static_rating": 1e4, "f0_load": 14.0}
    codes = np.array([RULES.index(name) for name in ("deep groove", "angular contact 40", "thrust spherical")])
    low, high = (
        loads.dynamic_equivalent_load.plain(**given_angles, contact_angle=angle, rule=codes) for angle in (0.0, 40.0)
    )
    assert low.tolist() == high.tolist()


def test_which_rules_take_which_load():
    refused_axial = {name for name, takes in zip(RULES, loads.TAKES_AXIAL, strict=True) if not takes}
    refused_radial = {name for name, takes in zip(RULES, loads.TAKES_RADIAL, strict=True) if not takes}
    thrust = {name for name, is_thrust in zip(RULES, loads.IS_THRUST, strict=True) if is_thrust}
    one_way = {name for name, both in zip(RULES, loads.HOLDS_BOTH_WAYS, strict=True) if not both}
    assert refused_axial == {"cylindrical"}
    assert refused_radial == {"thrust ball", "thrust cylindrical"}
    assert thrust == {"thrust ball", "thrust cylindrical", "thrust spherical"}
    assert one_way == {"cylindrical", "tapered", *thrust, *(f"angular contact {a}" for a in (15, 25, 30, 40))}


@pytest.mark.parametrize(
    ("rule", "angle", "expected"),
    [
        ("tapered", 15.0, 1000 / (2 * 0.4 / np.tan(np.radians(15)))),
        ("angular contact 40", 40.0, 1000 / (2 * 0.57)),
        ("angular contact 30", 30.0, 1000 / (2 * 0.76)),
        ("angular contact 25", 25.0, 1000 / (2 * 0.87)),
        ("angular contact 15", 15.0, 1000 / (2 * 1.47)),
        ("deep groove", 0.0, 0.0),
        ("spherical roller", 9.5, 0.0),
    ],
)
def test_induced_thrust_is_half_the_radial_load_over_y(rule, angle, expected):
    assert loads.induced_thrust("1 kN", f"{angle} deg", rule).to("N").magnitude == pytest.approx(expected)


@pytest.mark.parametrize("angle", [15, 25, 30, 40])
def test_induced_thrust_of_balls_is_near_that_of_a_half_loaded_row(angle):
    """Harris (memory): with half the row loaded, balls set free 1.22 Fr tan a. Fr/(2 Y) stays within 15 % of it."""
    force = loads.induced_thrust("1 kN", f"{angle} deg", f"angular contact {angle}").to("N").magnitude
    assert force == pytest.approx(1220 * np.tan(np.radians(angle)), rel=0.15)


def test_least_load_and_static_safety():
    assert loads.minimum_load(dynamic_rating="35 kN", share=0.01).to("N").magnitude == pytest.approx(350)
    assert loads.static_safety(static_rating="35 kN", static_load="20 kN").magnitude == pytest.approx(1.75)


def test_a_tapered_bearing_without_contact_angle_is_refused():
    with pytest.raises(OutOfRange):
        loads.dynamic_equivalent_load(
            radial_load="1 kN",
            axial_load="1 kN",
            static_rating="20 kN",
            f0_load=14,
            contact_angle="0 deg",
            rule="tapered",
        )


def test_an_unknown_rule_is_refused_with_the_nearest():
    with pytest.raises(ArgumentError, match="nearest: spherical roller"):
        loads.induced_thrust("1 kN", "10 deg", "spherical rollers")


@given(forces, forces, ratings, st.integers(0, len(RULES) - 1))
def test_the_axial_load_that_is_asked_for_gives_the_wanted_equivalent_load(radial, wanted, rating, rule):
    axial = loads.axial_load_for.plain(
        radial_load=radial, wanted=wanted, static_rating=rating, f0_load=14.0, contact_angle=ANGLES[rule], rule=rule
    )
    if dynamic(radial, 0.0, rule, rating) >= wanted:
        assert axial == 0
    elif not loads.TAKES_AXIAL[rule]:
        assert np.isnan(axial)
    else:
        assert dynamic(radial, axial, rule, rating) == pytest.approx(wanted, rel=1e-9)


def test_the_axial_load_that_is_asked_for_does_not_depend_on_the_rows_beside():
    codes = np.arange(len(RULES))
    given = {"radial_load": 100.0, "wanted": 900.0, "static_rating": 3e4, "f0_load": 13.0}
    together = loads.axial_load_for.plain(**given, contact_angle=ANGLES, rule=codes)
    alone = [float(loads.axial_load_for.plain(**given, contact_angle=ANGLES[code], rule=code)) for code in codes]
    assert together == pytest.approx(alone, rel=1e-14, nan_ok=True)


@given(st.floats(-1e5, 1e5), forces, forces)
def test_opposed_bearings_carry_the_force_of_the_shaft_between_them(external, own, other):
    here = loads.opposed_axial_load.plain(external=external, own_thrust=own, other_thrust=other)
    there = loads.opposed_axial_load.plain(external=-external, own_thrust=other, other_thrust=own)
    assert here - there == pytest.approx(external, abs=1e-6)
    assert here >= own
    assert there >= other
    # no preload: one of the two carries no more than the thrust of its own radial load
    assert here == own or there == other


# Rows of the handbook table of opposed bearings: Ka towards this one, thrust of this and the other, Fa here and there.
@pytest.mark.parametrize(
    ("external", "own", "other", "here", "there"),
    [
        (0, 500, 800, 800, 800),
        (0, 800, 500, 800, 800),
        (1000, 500, 800, 1800, 800),
        (100, 800, 500, 800, 700),
        (-100, 500, 800, 700, 800),
        (-1000, 500, 800, 500, 1500),
    ],
)
def test_axial_loads_of_opposed_bearings_by_the_handbook_table(external, own, other, here, there):
    assert loads.opposed_axial_load.plain(external=external, own_thrust=own, other_thrust=other) == here
    assert loads.opposed_axial_load.plain(external=-external, own_thrust=other, other_thrust=own) == there
