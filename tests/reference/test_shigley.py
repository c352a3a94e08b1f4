"""Worked examples of Shigley, Mechanical Engineering Design, chapter on rolling bearings (numbers from memory)."""

from __future__ import annotations

import pytest

from lubecheck.physics import fatigue, loads


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
