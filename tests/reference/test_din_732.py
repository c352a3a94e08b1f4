"""DIN 732, thermally safe operating speed (formulas from memory)."""

from __future__ import annotations

import math

import pytest

from lubecheck.physics import speed


@pytest.mark.parametrize(
    ("nu", "load", "heat"), [(12.0, 1160.0, 140.7), (30.0, 3000.0, 100.0), (150.0, 6000.0, 250.0), (20.0, 0.0, 90.0)]
)
def test_the_speed_ratio_satisfies_the_printed_equation(nu, load, heat):
    """K_L f^(5/3) + K_P f = 1, with K_L and K_P taken at the reference speed of a 6210 (8246 rpm)."""
    f0, f1, mean, reference = 2.0, 0.0002, 70.0, 8246.0
    k_lubricant = math.pi / 30 * reference * 1e-7 * f0 * (nu * reference) ** (2 / 3) * mean**3 / (1000 * heat)
    k_load = math.pi / 30 * reference * f1 * load * mean / (1000 * heat)
    safe = speed.thermal_safe_speed(
        f0, f1, nu=f"{nu} mm^2/s", load=f"{load} N", pitch_diameter=f"{mean} mm", heat_flow=f"{heat} W"
    )
    ratio = safe.to("rpm").magnitude / reference
    assert k_lubricant * ratio ** (5 / 3) + k_load * ratio == pytest.approx(1.0, rel=1e-9)


def test_oil_carries_1_7_joules_a_cubic_centimetre_and_kelvin():
    """1 l/min by 1 K: 1.7 kJ/(l K) / 60 s = 28.3 W; DIN 732 prints 0.0286 kW."""
    assert speed.oil_heat_flow("1 l/min", "1 K").to("W").magnitude == pytest.approx(28.6)
    assert speed.oil_heat_flow("6 l/min", "20 K").to("kW").magnitude == pytest.approx(6 * 20 * 1.7 / 60, rel=0.02)


def test_the_seats_carry_320_watt_a_square_metre_and_kelvin():
    """0.016 W/mm^2 at 50 K."""
    assert speed.seat_heat_flow("1000 mm^2", "10 K", "radial").to("W").magnitude == pytest.approx(3.2)
