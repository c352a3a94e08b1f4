"""The two viscosities from whatever a data sheet or a drum label states."""

from __future__ import annotations

import numpy as np
import pytest
from chemicals.viscosity import viscosity_converter
from hypothesis import given
from hypothesis import strategies as st

from lubecheck.data import lubricants
from lubecheck.data.lubricant_viscosity import nu_40_through
from lubecheck.errors import InputError
from lubecheck.physics.viscosity import kinematic_viscosity, viscosity_index


def faults(**stated: object) -> dict[str, str]:
    with pytest.raises(InputError) as refused:
        lubricants.from_figures(kind="oil", **stated)
    return {fault.key: fault.expected for fault in refused.value.faults}


@given(nu_40=st.floats(15.0, 2000.0), index=st.floats(0.0, 300.0), degc=st.sampled_from([340 / 9, 890 / 9, 50.0]))
def test_an_index_and_a_viscosity_at_another_temperature_give_back_the_oil(
    nu_40: float, index: float, degc: float
) -> None:
    nu_100 = lubricants.from_figures(kind="oil", nu_40=nu_40, index=index).nu_100
    nu = float(kinematic_viscosity.plain(degc, nu_40=nu_40, nu_100=nu_100))
    assert nu_40_through(nu, degc=degc, index=index) == pytest.approx(nu_40, rel=1e-6)


@pytest.mark.parametrize("seconds", [100.0, 150.0, 315.0, 700.0, 2000.0])
@pytest.mark.parametrize("index", [0.0, 95.0, 150.0])
def test_seconds_at_100_degf_and_an_index_are_enough(seconds: float, index: float) -> None:
    # chemicals, an independent library: seconds at 100 degF as mm^2/s, which is at 37.8 and not at 40 degC
    at_100_degf = viscosity_converter(seconds, "saybolt universal", "kinematic viscosity") * 1e6
    one = lubricants.from_figures(kind="oil", saybolt_100=seconds, index=index)
    line = kinematic_viscosity.plain(340 / 9, nu_40=one.nu_40, nu_100=one.nu_100)
    assert line == pytest.approx(at_100_degf, rel=1e-6)
    assert one.nu_40 < 0.93 * at_100_degf
    found = viscosity_index.plain(nu_40=np.float64(one.nu_40), nu_100=np.float64(one.nu_100))
    assert found == pytest.approx(index, abs=0.05)


def test_seconds_alone_take_the_usual_index_of_a_stated_base_oil_and_say_so() -> None:
    one = lubricants.from_figures(kind="oil", saybolt_100=150.0, base_oil="mineral")
    assert any("index 95" in words for words in one.assumed)
    assert 28 < one.nu_40 < 30
    assert set(faults(saybolt_100=150.0)) == {"saybolt_210"}
    assert set(faults(saybolt_210=50.0)) == {"saybolt_100"}


def test_a_drum_label_with_grade_and_seconds_is_held_to_the_grade() -> None:
    # Grade tables (ASTM D2422): VG 68 is 315 SUS at 100 degF, at VI 95 that is 60.8 mm^2/s at 40 degC, just below 61.2.
    one = lubricants.from_figures(designation="ISO VG 68", saybolt_100=315.0, index=95.0)
    assert one.nu_40 == 61.2
    assert any("limit of ISO VG 68" in words for words in one.assumed)
    assert "61.2 to 74.8" in faults(designation="ISO VG 68", saybolt_100=500.0, index=95.0)["nu_40"]


def test_seconds_that_contradict_the_viscosities_are_refused() -> None:
    assert "1057 s" in faults(nu_40=200.0, index=95.0, saybolt_100=700.0)["saybolt_100"]
    assert "saybolt_210" in faults(nu_40=68.0, nu_100=8.5, saybolt_210=90.0)
    agreeing = lubricants.from_figures(kind="oil", nu_40=68.0, nu_100=8.5, saybolt_210=54.4)
    assert (agreeing.nu_40, agreeing.nu_100) == (68.0, 8.5)


def test_seconds_cold_and_viscosity_of_the_same_end_do_not_make_a_slope() -> None:
    assert "saybolt_210" in faults(nu_40=68.0, saybolt_100=350.0)


@pytest.mark.parametrize("seconds", [36.0, 40.0, 50.0, 78.0, 200.0])
def test_seconds_at_210_degf_and_an_index_are_enough(seconds: float) -> None:
    one = lubricants.from_figures(kind="oil", saybolt_210=seconds, index=95.0)
    at_210_degf = viscosity_converter(seconds / 1.00671, "saybolt universal", "kinematic viscosity") * 1e6
    line = kinematic_viscosity.plain(890 / 9, nu_40=one.nu_40, nu_100=one.nu_100)
    assert line == pytest.approx(at_210_degf, rel=1e-4)


def test_seconds_of_too_thin_an_oil_have_no_index() -> None:
    assert "index is not defined" in faults(saybolt_100=34.0, index=95.0)["saybolt_100"]


@pytest.mark.parametrize("stated", [{"saybolt_100": 350.0}, {"nu_100": 9.0}, {"nu_40": 70.0}])
def test_one_viscosity_beside_a_name_keeps_the_index_and_drops_the_grade(stated: dict[str, float]) -> None:
    table = lubricants.find("mineral-vg-68")
    one = lubricants.with_given(table, **stated)
    pair = [{"nu_40": np.float64(oil.nu_40), "nu_100": np.float64(oil.nu_100)} for oil in (table, one)]
    assert viscosity_index.plain(**pair[1]) == pytest.approx(float(viscosity_index.plain(**pair[0])), abs=0.2)
    assert one.iso_vg is None
    assert any("kept for" in words for words in one.assumed)
