"""Rubbing seals: the printed constants, the other published form, and what measured orders of size there are."""

from __future__ import annotations

import pytest
from conftest import BASE, edited

import lubecheck
from lubecheck.data.families import FAMILIES
from lubecheck.model.reader import read_case
from lubecheck.model.rows import seal_diameter
from lubecheck.physics import seal_friction


def torque(family: str, bore: float, outside: float, seals: float = 2.0) -> float:
    form = seal_friction.seal_form(family, outside)
    return float(
        seal_friction.seal_torque.plain(
            seal_diameter(bore, outside),
            seals=seals,
            exponent=form.exponent,
            coefficient=form.coefficient,
            constant=form.constant,
        )
    )


# Bearing handbooks, torque of both seals in N mm (from memory), worked here by hand:
# 0.023 30^2.25 + 2; 0.018 45^2.25 + 20; 0.018 60^2.25 + 15; 0.018 100^2.25; 0.014 50^2 + 10; 0.057 100^2 + 50
@pytest.mark.parametrize(
    ("family", "outside", "shoulder", "expected"),
    [
        ("deep groove ball", 62.0, 30.0, 50.4),
        ("deep groove ball", 80.0, 45.0, 114.4),
        ("deep groove ball", 100.0, 60.0, 195.3),
        ("deep groove ball", 160.0, 100.0, 569.2),
        ("double row angular contact ball", 80.0, 50.0, 45.0),
        ("spherical roller", 160.0, 100.0, 620.0),
    ],
)
def test_the_printed_form_is_worked_with_the_printed_constants(family, outside, shoulder, expected):
    form = seal_friction.seal_form(family, outside)
    found = seal_friction.seal_torque.plain(
        shoulder, seals=2.0, exponent=form.exponent, coefficient=form.coefficient, constant=form.constant
    )
    assert found == pytest.approx(expected, abs=0.06)


# Eschmann, Hasbargen & Weigand and handbooks after them: M = ((d + D) / f3)^2 + f4 N mm with f3 20 and f4 25 for a
# deep groove bearing with rubbing seals (from memory, less sure).
@pytest.mark.parametrize(
    ("bore", "outside"), [(25, 52), (25, 62), (35, 72), (35, 80), (45, 85), (45, 100), (60, 110), (60, 130)]
)
def test_the_other_published_form_lies_in_the_stated_range(bore, outside):
    other = ((bore + outside) / 20) ** 2 + 25
    share = other / torque("deep groove ball", bore, outside)
    assert seal_friction.SEAL_RANGE.low <= share <= seal_friction.SEAL_RANGE.high


@pytest.mark.parametrize("family", sorted(FAMILIES))
def test_every_family_has_a_form_and_one_seal_rubs_half_as_hard_as_two(family):
    assert torque(family, 50.0, 110.0) == pytest.approx(2 * torque(family, 50.0, 110.0, seals=1.0))
    assert torque(family, 50.0, 110.0) > 0


def test_shields_do_not_rub():
    def seals(designation):
        case = read_case(edited(BASE, [("bearing.designation", designation), ("grease.interval", None)]))
        return lubecheck.check(case).operating.seal_torque.m_as("N*mm")

    assert seals("6309") == seals("6309-2Z") == 0
    assert seals("6309-2RS") == pytest.approx(torque("deep groove ball", 45.0, 100.0))
    assert seals("6309-RS") == pytest.approx(seals("6309-2RS") / 2)
