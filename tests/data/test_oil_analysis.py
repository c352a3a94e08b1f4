"""An analysis of oil in use: read strictly, and by how much it has moved from the fresh oil."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import lubricants
from lubecheck.data.oil_analysis import MEASUREMENT_EXPECTED, OilAnalysis, analyse, read_measurement
from lubecheck.errors import InputError
from lubecheck.physics.viscosity import kinematic_viscosity, nu_100_from_index, viscosity_index, walther_constants
from lubecheck.units import UnreadableText

FRESH = lubricants.find("mineral-vg-68")


def analysis(**given_keys: object) -> OilAnalysis:
    found = analyse(FRESH, **given_keys)
    assert found is not None
    return found


@pytest.mark.parametrize(
    ("text", "nu", "temperature"),
    [
        ("98 mm^2/s at 40 degC", 98.0, 40.0),
        ("98 cSt at 104 degF", 98.0, 40.0),
        ("98mm²/s at 40degC", 98.0, 40.0),
        ("0.98 St AT 313.15 K", 98.0, 40.0),
        ("463.2 SUS at 100 degF", 100.0, 340 / 9),  # ASTM D2161: 4.632 mm^2/s a second
    ],
)
def test_a_value_at_a_temperature_is_read(text: str, nu: float, temperature: float) -> None:
    found = read_measurement(text)
    assert found[0] == pytest.approx(nu, rel=1e-3)
    assert found[1] == pytest.approx(temperature, abs=1e-6)


@pytest.mark.parametrize(
    "text",
    [
        "98 mm^2/s", "98 mm^2/s at 40", "98 at 40 degC", "98 mm^2/s @ 40 degC", "at 40 degC", "98 mm^2/s at", "",
        "98,5 mm^2/s at 40 degC", "98 mm^2/sat 40 degC",
        "nan mm^2/s at 40 degC", "-98 mm^2/s at 40 degC", "0 mm^2/s at 40 degC", "98 mm^2/s at 40 degC at 40 degC",
        "98 mm at 40 degC", "98 mm^2/s at 40 K", "98 mm^2/s at 400 degC", "10 SUS at 100 degF",
    ],
)  # fmt: skip
def test_anything_else_is_refused_with_the_form_that_is_expected(text: str) -> None:
    with pytest.raises(UnreadableText) as refused:
        read_measurement(text)
    assert MEASUREMENT_EXPECTED in refused.value.expected


@given(st.floats(0.4, 2.5), st.floats(0.0, 120.0))
def test_the_oil_in_use_has_the_measured_viscosity_and_the_slope_of_the_fresh_one(share: float, degc: float) -> None:
    was = float(kinematic_viscosity.plain(degc, nu_40=FRESH.nu_40, nu_100=FRESH.nu_100))
    found = analysis(measured_viscosity=f"{share * was:.12g} mm^2/s at {degc:.12g} degC")
    used = found.used
    assert kinematic_viscosity.plain(degc, nu_40=used.nu_40, nu_100=used.nu_100) == pytest.approx(share * was, rel=1e-8)
    slopes = [walther_constants.plain(nu_40=np.float64(o.nu_40), nu_100=np.float64(o.nu_100))[1] for o in (FRESH, used)]
    assert slopes[0] == pytest.approx(slopes[1], rel=1e-8)
    assert found.change == pytest.approx(share - 1, abs=1e-9)


@pytest.mark.parametrize("key", ["mineral-vg-32", "mineral-vg-460", "pao-vg-100", "pag-vg-220"])
@pytest.mark.parametrize(("share", "low", "high"), [(1.25, -0.035, 0.0), (0.75, 0.0, 0.042)])
def test_keeping_the_index_instead_would_move_the_hot_viscosity_by_4_percent_at_most(
    key: str, share: float, low: float, high: float
) -> None:
    fresh = lubricants.find(key)
    found = analyse(fresh, measured_viscosity=f"{fresh.nu_40 * share} mm^2/s at 40 degC")
    assert found is not None
    index = viscosity_index.plain(nu_40=np.float64(fresh.nu_40), nu_100=np.float64(fresh.nu_100))
    by_index = float(nu_100_from_index.plain(np.float64(found.used.nu_40), index))
    assert low < found.used.nu_100 / by_index - 1 < high


def test_what_is_measured_as_fresh_leaves_the_oil_as_it_was() -> None:
    found = analysis(measured_viscosity="68 mm^2/s at 40 degC")
    assert (found.used.nu_40, found.used.nu_100) == (pytest.approx(68, rel=1e-12), pytest.approx(8.53, rel=1e-12))
    assert found.change == pytest.approx(0.0, abs=1e-12)
    assert found.used.iso_vg is None  # the grade is the fresh oil's
    assert "nu_40" not in found.used.ranges


@pytest.mark.parametrize(
    ("nu", "grade"), [(68, "usual"), (74.7, "usual"), (61.3, "usual"), (75.5, "watch"), (60.5, "watch"),
                      (84.5, "watch"), (85.7, "act"), (50.5, "act")],
)  # fmt: skip
def test_a_tenth_is_watched_and_a_quarter_acted_on(nu: float, grade: str) -> None:
    assert analysis(measured_viscosity=f"{nu} mm^2/s at 40 degC").viscosity_grade == grade


@pytest.mark.parametrize(("water", "grade"), [(1e-4, "usual"), (2e-4, "usual"), (3e-4, "watch"), (6e-4, "act")])
def test_water_is_watched_from_200_ppm_and_acted_on_from_500(water: float, grade: str) -> None:
    assert analysis(water=water).water_grade == grade


def test_another_oil_is_refused_and_not_shifted_to() -> None:
    for text in ("300 mm^2/s at 40 degC", "68 mm^2/s at 100 degC", "20 mm^2/s at 40 degC"):
        with pytest.raises(InputError, match="another oil"):
            analysis(measured_viscosity=text)


def test_all_faults_come_at_once_and_grease_has_no_oil_analysis() -> None:
    with pytest.raises(InputError) as refused:
        analysis(measured_viscosity="98", iso_code="17/14")
    assert {fault.key for fault in refused.value.faults} == {"measured_viscosity", "iso_code"}
    with pytest.raises(InputError) as refused:
        analyse(lubricants.find("polyurea-110-2"), measured_viscosity="98 mm^2/s at 40 degC", water=1e-4)
    assert {fault.key for fault in refused.value.faults} == {"measured_viscosity", "water"}
    assert analyse(FRESH) is None
