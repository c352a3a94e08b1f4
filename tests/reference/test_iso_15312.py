"""ISO 15312:2003, thermal reference speed, calculated by hand for six bearings (formulas and factors from memory).

The balance that the standard prints: pi n/30000 [1e-7 f0r (12 n)^(2/3) dm^3 + f1r 0.05 C0r dm] = q_r pi B (d + D), with
q_r = 0.016 W/mm^2 up to 50 000 mm^2. Static ratings as handbooks list them. The hand calculation tries speeds on the
left side until both sides agree to five figures; the parts are noted so that it can be followed.
"""

from __future__ import annotations

import mpmath as mp
import pytest

from lubecheck.physics import speed

# (name, f0r, f1r, C0r N, d, D, B mm, heat W, M0 N mm, M1 N mm, n rpm)
RADIAL = [
    ("6210", 2.0, 0.00020, 23_200, 50, 90, 20, 140.743, 146.755, 16.240, 8245.63),
    ("6310", 2.3, 0.00020, 38_000, 50, 110, 27, 217.147, 240.018, 30.400, 7668.12),
    ("NU 310", 2.0, 0.00035, 113_000, 50, 110, 27, 217.147, 179.852, 158.200, 6133.97),
    ("22218", 4.0, 0.00015, 375_000, 90, 160, 40, 502.655, 968.364, 351.562, 3636.57),
    ("30210", 3.0, 0.00040, 91_500, 50, 90, 21.75, 153.058, 159.447, 128.100, 5083.00),  # B is T
    ("23040", 4.5, 0.00017, 1_600_000, 200, 310, 82, 1513.57, 5411.73, 3468.00, 1627.70),  # 131 381 mm^2: q .01152
]


@pytest.mark.parametrize(
    ("name", "f0", "f1", "static_rating", "bore", "outside", "width", "heat", "stirred", "loaded", "expected"), RADIAL
)
def test_reference_speed_of_radial_bearings(
    name, f0, f1, static_rating, bore, outside, width, heat, stirred, loaded, expected
):
    ours = speed.thermal_reference_speed(
        f0,
        f1,
        static_rating=f"{static_rating} N",
        bore=f"{bore} mm",
        outside=f"{outside} mm",
        width=f"{width} mm",
        position="radial",
    )
    assert ours.to("rpm").magnitude == pytest.approx(expected, rel=2e-6), name
    # the two sides of the hand calculation, at the speed it gives
    assert mp.pi * expected / 30000 * (stirred + loaded) == pytest.approx(heat, rel=1e-5)


@pytest.mark.parametrize("row", RADIAL, ids=[row[0] for row in RADIAL])
def test_the_balance_is_solved_to_the_last_digits(row):
    _, f0, f1, static_rating, bore, outside, width, *_ = row
    area = mp.pi * width * (bore + outside)
    heat = mp.mpf("0.016") * area * (1 if area <= 50_000 else (area / 50_000) ** mp.mpf("-0.34"))
    mean = mp.mpf(bore + outside) / 2

    def balance(n):
        torque = mp.mpf("1e-7") * f0 * mp.cbrt(12 * n) ** 2 * mean**3 + f1 * mp.mpf("0.05") * static_rating * mean
        return mp.pi * n / 30000 * torque - heat

    exact = mp.findroot(balance, (500, 20000), solver="anderson", tol=1e-25)
    ours = speed.thermal_reference_speed.plain(
        f0, f1, static_rating=static_rating, bore=bore, outside=outside, width=width, position=0
    )
    assert ours == pytest.approx(float(exact), rel=1e-12)


def test_reference_speed_of_a_cylindrical_thrust_bearing():
    """81112, d 60, D 85, C0a 300 kN: pi/2 (85^2 - 60^2) = 5694.1 mm^2, times 0.020 = 113.88 W; 24 mm^2/s, 0.02 C0a.

    With f0r 3, f1r 0.00015 and dm 72.5 mm: M1 = 65.25 N mm; at 3500 rpm M0 = 219.4 and 104.3 W, at 3800 rpm M0 = 231.8
    and 118.2 W, at 3700 rpm M0 = 227.7 and 113.5 W: so 3708 rpm.
    """
    ours = speed.thermal_reference_speed(
        3.0,
        0.00015,
        static_rating="300 kN",
        bore="60 mm",
        outside="85 mm",
        width="17 mm",
        position="thrust",
    )
    assert ours.to("rpm").magnitude == pytest.approx(3708, rel=1e-3)


@pytest.mark.parametrize(
    ("area", "position", "expected"),
    [
        (20_000, "radial", 320.0),
        (50_000, "radial", 800.0),
        (400_000, "radial", 0.016 * 400_000 * 0.49312),  # 8^-0.34
        (50_000, "thrust", 1000.0),
        (400_000, "thrust", 0.020 * 400_000 * 0.71698),  # 8^-0.16
    ],
)
def test_reference_heat_flow(area, position, expected):
    flow = speed.seat_heat_flow(f"{area} mm^2", "50 delta_degC", position)
    assert flow.to("W").magnitude == pytest.approx(expected, rel=1e-4)
