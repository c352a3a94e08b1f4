"""The sheet of a lubricant over temperature."""

from __future__ import annotations

import dataclasses

import pytest
from chemicals import viscosity_index

from lubecheck.data import lubricant_sheet as sheet
from lubecheck.data import lubricants
from lubecheck.errors import InputError

OIL = lubricants.find("mineral-vg-68")
GREASE = lubricants.find("polyurea-110-2")


def test_the_stated_viscosities_and_density_come_back() -> None:
    assert sheet.state(OIL, 40.0).nu == pytest.approx(68.0)
    assert sheet.state(OIL, 100.0).nu == pytest.approx(8.53)
    at_15 = sheet.state(OIL, 15.0)
    assert at_15.density == pytest.approx(880.0)
    assert at_15.dynamic == pytest.approx(at_15.nu * 0.88)


def test_a_grease_gives_its_base_oil_and_no_dynamic_viscosity() -> None:
    state = sheet.state(GREASE, 40.0)
    assert state.nu == pytest.approx(110.0)
    assert state.density is None
    assert state.dynamic is None


def test_a_temperature_is_placed_against_the_range_of_use() -> None:
    assert [sheet.place(OIL, t) for t in (-3.0, -2.0, 100.0, 101.0)] == ["below", "within", "within", "above"]
    unsaid = dataclasses.replace(OIL, highest=None, lowest=None, ranges={})
    assert sheet.place(unsaid, 20.0) == "unknown"


def test_the_usual_temperatures_lie_in_the_range_of_use_and_hold_40_and_100() -> None:
    for one in lubricants.table().values():
        found = sheet.temperatures([one])
        assert {40.0, 100.0} <= set(found)
        assert all(one.lowest <= t <= one.highest for t in found if t not in (40.0, 100.0))
    assert len(sheet.temperatures([dataclasses.replace(OIL, highest=None, lowest=None, ranges={})])) == 8


def test_a_sheet_goes_no_further_than_the_method() -> None:
    arctic = dataclasses.replace(OIL, lowest=-100.0, highest=350.0, pour_point=None, ranges={})
    assert sheet.span([arctic]) == (-70.0, 350.0)
    assert all(sheet.state(arctic, t).nu > 0 for t in sheet.temperatures([arctic]))


def test_the_temperature_of_a_viscosity_has_that_viscosity() -> None:
    for nu in (5.0, 13.7, 365.0):
        found = sheet.temperature_of(OIL, nu)
        assert found is not None
        assert sheet.state(OIL, found).nu == pytest.approx(nu, rel=1e-6)
    assert sheet.temperature_of(OIL, 0.3) is None


def test_the_index_is_that_of_an_independent_library_and_none_where_it_is_not_defined() -> None:
    assert sheet.index_of(OIL) == pytest.approx(viscosity_index(68e-6, 8.53e-6), abs=1e-6)
    assert sheet.index_of(dataclasses.replace(OIL, nu_40=3.0, nu_100=1.2, iso_vg=None)) is None


def test_saybolt_seconds_are_given_where_the_scale_reaches() -> None:
    assert sheet.saybolt(100.0, 340 / 9) == pytest.approx(463.2, rel=2e-3)  # ASTM D2161: 4.632 at 100 degF
    assert sheet.saybolt(1.0, 40.0) is None
    assert sheet.saybolt(1e5, -40.0) is None


@pytest.mark.parametrize("temperature", [-80.0, 400.0])
def test_outside_astm_d341_there_is_no_state(temperature: float) -> None:
    with pytest.raises(InputError, match="ASTM D341"):
        sheet.state(OIL, temperature)
