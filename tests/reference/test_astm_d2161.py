"""Saybolt Universal seconds against ASTM D2161's straight line, a grade table, and the library chemicals."""

from __future__ import annotations

import numpy as np
import pytest
from chemicals.viscosity import viscosity_converter

from lubecheck.physics.viscosity import kinematic_from_saybolt, saybolt_from_kinematic

DEGF_100, DEGF_210 = (100 - 32) / 1.8, (210 - 32) / 1.8


def test_chemicals_gives_the_same_seconds_at_100_degf_over_the_whole_range() -> None:
    for nu in np.geomspace(1.82, 4300, 80):  # its own scale ends at 20,000 s
        expected = viscosity_converter(nu * 1e-6, "kinematic viscosity", "saybolt universal")
        assert saybolt_from_kinematic.plain(nu, DEGF_100) == pytest.approx(expected, rel=1e-9)
        back = viscosity_converter(expected, "saybolt universal", "kinematic viscosity") * 1e6
        assert kinematic_from_saybolt.plain(expected, DEGF_100) == pytest.approx(back, rel=1e-6)


@pytest.mark.parametrize(("temperature", "factor"), [(DEGF_100, 4.632), (DEGF_210, 4.664)])
def test_the_scale_is_straight_above_75_mm2_s(temperature: float, factor: float) -> None:
    # ASTM D2161: SUS = 4.632 nu at 100 degF and 4.664 nu at 210 degF above 75 mm^2/s; to 0.15 % at the joint.
    for nu in (76.0, 150.0, 1000.0):
        assert saybolt_from_kinematic.plain(nu, temperature) == pytest.approx(factor * nu, rel=1.5e-3)


@pytest.mark.parametrize(("seconds", "grade"), [(150, 32), (315, 68), (700, 150)])
def test_the_usual_seconds_of_a_grade_lie_in_its_limits(seconds: float, grade: float) -> None:
    # A maker's grade table: 150 SUS is VG 32 (135 to 164 SUS), 315 is 68, 700 is 150. It converts seconds at 100 degF
    # straight to mm^2/s, though a grade holds at 40 degC, where an oil is a tenth thinner.
    assert kinematic_from_saybolt.plain(seconds, DEGF_100) == pytest.approx(grade, rel=0.02)


def test_the_limits_of_vg_32_in_seconds_are_those_of_the_grade_table() -> None:
    # 135 to 164 SUS at 100 degF for 28.8 to 35.2 mm^2/s at 40 degC: the table converts without the 2.2 K between.
    assert saybolt_from_kinematic.plain(28.8, DEGF_100) == pytest.approx(135, rel=0.015)
    assert saybolt_from_kinematic.plain(35.2, DEGF_100) == pytest.approx(164, rel=0.015)


def test_the_temperature_term_is_0_67_percent_from_100_to_210_degf() -> None:
    # ASTM D2161: 1 + 0.000061 (t - 100 degF).
    ratio = saybolt_from_kinematic.plain(50.0, DEGF_210) / saybolt_from_kinematic.plain(50.0, DEGF_100)
    assert ratio == pytest.approx(1.00671, abs=1e-6)
