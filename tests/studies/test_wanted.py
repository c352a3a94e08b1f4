"""What reaches a wanted life: each answer put into the case gives that life."""

from __future__ import annotations

import dataclasses
import json

import pytest
from conftest import EXAMPLES

import lubecheck
from lubecheck.faces.life import wanted_json
from lubecheck.studies.wanted import study

CASES = ("oil_bath_pump", "new_motor")
WANTED = {"oil_bath_pump": 60_000.0, "new_motor": 150_000.0}


@pytest.fixture(scope="module", params=CASES)
def asked(request):
    case = lubecheck.load_case(EXAMPLES / f"{request.param}.toml")
    return case, study(case, WANTED[request.param])


def life(case):
    return lubecheck.check(case).life.modified_life.m_as("h")


def answer(result, question):
    return next(one for one in result.answers if one.question == question)


def test_the_load_that_is_answered_gives_the_life(asked):
    case, result = asked
    factor = answer(result, "load").factor
    duty = tuple(
        dataclasses.replace(d, radial_load=d.radial_load * factor, axial_load=d.axial_load * factor) for d in case.duty
    )
    assert life(dataclasses.replace(case, duty=duty)) == pytest.approx(result.wanted_life_h, rel=1e-6)


def test_the_rating_that_is_answered_gives_the_life(asked):
    case, result = asked
    factor = answer(result, "rating").factor
    bearing = dataclasses.replace(
        case.bearing, dynamic_rating=case.bearing.dynamic_rating * factor,
        static_rating=case.bearing.static_rating * factor, fatigue_limit=case.bearing.fatigue_limit * factor,
    )  # fmt: skip
    assert life(dataclasses.replace(case, bearing=bearing)) == pytest.approx(result.wanted_life_h, rel=1e-6)


def test_the_oil_that_is_answered_gives_the_life_or_is_out_of_reach(asked):
    case, result = asked
    one = answer(result, "viscosity")
    if one.needed is None:
        thick = dataclasses.replace(
            case.lubricant, nu_40=case.lubricant.nu_40 * 1.05, nu_100=case.lubricant.nu_100 * 1.05
        )
        assert life(dataclasses.replace(case, lubricant=thick)) < result.wanted_life_h
        return
    oil = dataclasses.replace(
        case.lubricant, nu_40=case.lubricant.nu_40 * one.factor, nu_100=case.lubricant.nu_100 * one.factor
    )
    assert life(dataclasses.replace(case, lubricant=oil)) == pytest.approx(result.wanted_life_h, rel=1e-4)


def test_the_dirtiest_class_reaches_the_life_and_the_next_does_not(asked):
    case, result = asked
    from lubecheck.physics.fatigue import SETTINGS

    def at(setting):
        return life(dataclasses.replace(case, cleanliness=dataclasses.replace(case.cleanliness, setting=setting)))

    needed = answer(result, "cleanliness").needed
    assert at(needed) >= result.wanted_life_h > at(SETTINGS[SETTINGS.index(needed) + 1])


def test_a_life_that_nothing_reaches_is_out_of_reach_and_null():
    case = lubecheck.load_case(EXAMPLES / "oil_bath_pump.toml")
    record = json.loads(wanted_json(study(case, 9e5)), parse_constant=pytest.fail)
    needed = {one["question"]: one["needed"] for one in record["answers"]}
    assert needed["cleanliness"] is None or needed["cleanliness"] == "bath -/13/10"
    assert needed["viscosity"] is None
    assert needed["load"] is not None
