"""The life of a machine's bearings together."""

from __future__ import annotations

import math

import pytest
from conftest import EXAMPLES

import lubecheck
from lubecheck.studies.system import study


def case(name):
    return lubecheck.load_case(EXAMPLES / f"{name}.toml")


def test_two_equal_bearings_have_0_63_of_the_life_of_one():
    """2^(-1/1.5) = 0.630, the product of two equal reliabilities with slope 1.5 (ISO/TR 1281-2)."""
    one = lubecheck.check(case("new_motor")).life.modified_life.m_as("h")
    pair = study([case("new_motor"), case("new_motor")])
    assert pair.life_h == pytest.approx(0.63 * one, rel=1e-3)
    assert [part.share for part in pair.parts] == pytest.approx([0.5, 0.5])


def test_the_shortest_life_brings_most_of_the_risk_and_the_shares_are_the_whole():
    result = study([case(name) for name in ("new_motor", "oil_bath_pump", "overfilled_motor")])
    assert math.fsum(part.share for part in result.parts) == pytest.approx(1)
    shortest = min(result.parts, key=lambda part: part.life_h)
    assert shortest.share == max(part.share for part in result.parts)
    assert result.life_h < shortest.life_h


def test_one_life_that_is_not_known_leaves_the_machine_unknown():
    import dataclasses

    heavy = case("new_motor")
    duty = (dataclasses.replace(heavy.duty[0], radial_load=30_000.0),)
    result = study([case("oil_bath_pump"), dataclasses.replace(heavy, duty=duty)])
    assert result.life_h is None
    assert result.parts[0].life_h is not None
