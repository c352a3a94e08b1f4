"""Film: reference viscosity (ISO 281, Neale), and film thickness (Hamrock & Dowson, Dowson), evaluated apart in SI."""

from __future__ import annotations

import mpmath as mp
import pytest

from lubecheck.physics import film


def test_reference_viscosity_read_from_a_handbook_chart():
    """Neale, The Tribology Handbook, p. C8.4 (seen): bore 60 (6212, D 110) at 5000 rpm needs 6.8 mm^2/s; chart, 2 %."""
    assert film.reference_viscosity("5000 rpm", "85 mm").to("mm^2/s").magnitude == pytest.approx(6.8, rel=0.02)


@pytest.mark.parametrize(
    ("speed", "pitch_diameter", "expected"),
    [
        (100, 100, 98.45),  # 45000 / 100^.83 = 984.5; / 10
        (500, 64, 32.36),  # 500^.83 = 173.84; 258.86 / 8
        (3600, 64, 9.375),  # 4500 / 60 / 8
        (10000, 36, 7.5),
    ],
)
def test_reference_viscosity_by_hand(speed, pitch_diameter, expected):
    """ISO 281:2007, 9.3.3.1 (memory of the constants)."""
    ours = film.reference_viscosity(f"{speed} rpm", f"{pitch_diameter} mm").to("mm^2/s").magnitude
    assert ours == pytest.approx(expected, rel=5e-4)


# (u m/s, eta Pa s, alpha 1/Pa, R m, E' Pa, w N, k, L m)
CONTACTS = [
    (3.0, 0.020, 20e-9, 6e-3, 226e9, 500.0, 7.0, 12e-3),
    (0.5, 0.150, 25e-9, 12e-3, 228e9, 4000.0, 9.4, 30e-3),
    (15.0, 0.006, 15e-9, 3e-3, 226e9, 40.0, 3.0, 6e-3),
]


@pytest.mark.parametrize(("u", "eta", "alpha", "radius", "modulus", "load", "k", "length"), CONTACTS)
def test_film_thickness_by_the_published_regressions(u, eta, alpha, radius, modulus, load, k, length):
    """Hamrock & Dowson 1977 (point), Dowson 1968 (line); constants from memory, here in SI and to 15 digits."""
    speed = mp.mpf(eta) * u / (modulus * mp.mpf(radius))
    material = mp.mpf(alpha) * modulus
    w_point, w_line = load / (modulus * mp.mpf(radius) ** 2), load / (modulus * mp.mpf(radius) * length)
    least = 3.63 * speed**0.68 * material**0.49 * w_point**-0.073 * (1 - mp.exp(-0.68 * k)) * radius
    central = 2.69 * speed**0.67 * material**0.53 * w_point**-0.067 * (1 - 0.61 * mp.exp(-0.73 * k)) * radius
    line = 2.65 * speed**0.7 * material**0.54 * w_line**-0.13 * radius
    contact = {
        "entrainment": f"{u} m/s",
        "dynamic_viscosity": f"{eta} Pa*s",
        "pressure_coefficient": f"{alpha} 1/Pa",
        "radius": f"{radius} m",
        "reduced_modulus": f"{modulus} Pa",
        "load": f"{load} N",
    }
    ours_least, ours_central = film.film_thickness_point(**contact, ellipticity=k)
    assert ours_least.to("m").magnitude == pytest.approx(float(least), rel=1e-10)
    assert ours_central.to("m").magnitude == pytest.approx(float(central), rel=1e-10)
    ours_line = film.film_thickness_line(**contact, length=f"{length} m")
    assert ours_line.to("m").magnitude == pytest.approx(float(line), rel=1e-10)


def test_an_ordinary_ball_film_is_some_tenths_of_a_micrometre():
    """Handbooks: 0.1 to 1 um in rolling bearings (memory)."""
    least, _ = film.film_thickness_point(
        entrainment="3 m/s",
        dynamic_viscosity="20 mPa*s",
        pressure_coefficient="20 1/GPa",
        radius="6 mm",
        reduced_modulus="226 GPa",
        load="500 N",
        ellipticity=7,
    )
    assert 0.1 < least.to("um").magnitude < 1


def test_lambda_and_kappa_are_tied_as_the_technical_report_says():
    """ISO/TR 1281-2 (memory): kappa about Lambda^1.3: kappa 4 is Lambda 2.9, kappa 0.4 is 0.49."""
    assert film.film_parameter(4.0).magnitude == pytest.approx(2.905, abs=0.001)
    assert film.film_parameter(0.4).magnitude == pytest.approx(0.494, abs=0.001)
