"""Worked examples of Shigley, Mechanical Engineering Design, chapter on rolling bearings (numbers from memory)."""

from __future__ import annotations

import pytest

from lubecheck.physics import fatigue, loads, statics


def test_rating_needed_for_400_lbf_over_5000_h_at_1725_rpm():
    """Example 11-1: C10 = 3211 lbf (14.3 kN) for 5000 h at 1725 rpm under 400 lbf."""
    revolutions = fatigue.rating_life(dynamic_rating="3211 lbf", load="400 lbf", exponent=3)
    assert fatigue.life_hours(revolutions, "1725 rpm").to("h").magnitude == pytest.approx(5000, rel=1e-3)


def test_equivalent_load_and_life_under_combined_load():
    """Example 11-4: C0 4450 lbf, C10 7900 lbf, Fr 500 lbf, Fa 400 lbf, 720 rpm: Y 1.527, P 891 lbf, 16 150 h.

    The book's table has Fa/C0 where ISO 281 has f0 Fa/C0: its row 0.084 is 1.03, its 0.014 is 0.172, so f0 = 12.3.
    """
    load = loads.dynamic_equivalent_load(
        radial_load="500 lbf",
        axial_load="400 lbf",
        static_rating="4450 lbf",
        f0_load=12.3,
        contact_angle="0 deg",
        rule="deep groove",
    )
    assert load.to("lbf").magnitude == pytest.approx(891, abs=1)
    revolutions = fatigue.rating_life(dynamic_rating="7900 lbf", load=load, exponent=3)
    assert fatigue.life_hours(revolutions, "720 rpm").to("h").magnitude == pytest.approx(16150, rel=5e-3)


# Chapter on rolling contact bearings, shaft with a helical gear on two direct-mounted tapered bearings (from memory):
# gear 100 mm from A and 50 mm from B; 3980 N tangential, 1770 N radial, 1690 N axial at a radius of 100 mm.
# Printed: R_zA 1327 N, R_zB 2653 N, R_yA 1717 N, R_yB 53.3 N, F_rA 2170 N, F_rB 2654 N.
SPAN, GEAR_FROM_A, GEAR_FROM_B = 150.0, 100.0, 50.0


def reaction(gear, other_gear):
    """Reactions of one bearing in z and y; the axial force's couple stands as two forces 100 mm apart."""
    at = {"span": f"{SPAN} mm"}
    z = statics.bearing_load("3980 N", "0 deg", position=f"{gear} mm", **at)[0]
    y = statics.bearing_load("1770 N", "0 deg", position=f"{gear} mm", **at)[0]
    sign = 1 if gear > other_gear else -1
    for force, place in (("1690 N", 0.0), ("-1690 N", 100.0)):
        y += sign * statics.bearing_load(force, "0 deg", position=f"{place} mm", **at)[0]
    return z, y


def test_reactions_of_a_shaft_with_a_helical_gear():
    (z_a, y_a), (z_b, y_b) = reaction(GEAR_FROM_A, GEAR_FROM_B), reaction(GEAR_FROM_B, GEAR_FROM_A)
    printed = {"z_a": 1327, "z_b": 2653, "y_a": 1717, "y_b": 53.3}
    ours = {"z_a": z_a, "z_b": z_b, "y_a": y_a, "y_b": abs(y_b)}
    for name, value in ours.items():
        assert value.to("N").magnitude == pytest.approx(printed[name], abs=0.5), name
    assert statics.resultant(down=y_a, across=z_a).to("N").magnitude == pytest.approx(2170, abs=0.6)
    assert statics.resultant(down=y_b, across=z_b).to("N").magnitude == pytest.approx(2654, abs=0.6)


def test_axial_load_of_opposed_tapered_bearings():
    """The same shaft: 680 N set free in A and 832 N in B, 1690 N towards A: A carries 2522 N, B its own 832 N.

    Printed: F_eA = 0.4 2170 + 1.5 (832 + 1690) = 4651 N.
    """
    thrusts = ("680 N", "832 N")
    on_a = loads.opposed_axial_load(external="1690 N", own_thrust=thrusts[0], other_thrust=thrusts[1]).to("N").magnitude
    on_b = loads.opposed_axial_load(external="-1690 N", own_thrust=thrusts[1], other_thrust=thrusts[0])
    assert on_a == pytest.approx(2522)
    assert on_b.to("N").magnitude == pytest.approx(832)
    assert 0.4 * 2170 + 1.5 * on_a == pytest.approx(4651, abs=1)
