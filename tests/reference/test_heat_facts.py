"""Published facts of the trade about heat, and that the default parameters fall inside, through the whole model."""

from __future__ import annotations

import numpy as np
import pytest
from conftest import BASE, edited

from lubecheck.model import equilibrium
from lubecheck.model.assumptions import HOUSING_AREA
from lubecheck.model.check import readings
from lubecheck.model.points import Points, from_rows
from lubecheck.model.reader import read_case
from lubecheck.model.rows import rows_of

UNSAID = [(f"bearing.{key}", None) for key in ("dynamic_rating", "static_rating", "mass", "cage")]


def points_of(designation: str, *edits) -> Points:
    case = read_case(edited(BASE, [("bearing.designation", designation), *UNSAID, ("grease.interval", None), *edits]))
    return from_rows(rows_of(case, readings(case)[1][0]))


# Still air takes 10 to 12 W/(m^2*K) off a bearing housing, by convection and radiation together: bearing and motor
# handbooks, from memory; whole numbers. Motor sizes, an ordinary room of 20 degC, a housing 20 to 50 K above it.
@pytest.mark.parametrize("designation", ["6208", "6309", "6312", "6314", "6316"])
@pytest.mark.parametrize("kind", HOUSING_AREA)
def test_a_motor_size_housing_in_still_air_gives_off_what_handbooks_say(designation, kind):
    one = points_of(
        designation,
        ("surroundings.draught", "0 m/s"),
        ("surroundings.ambient", "20 degC"),
        ("surroundings.altitude", "0 m"),
        ("housing.kind", kind),
        ("housing.shaft_temperature", None),
        ("housing.machine_heat", "0 W"),
        ("duty[1].radial_load", "1 kN"),
        ("grease.fill", "35 %"),
    )
    watts = np.linspace(0.0, 200.0, 101)
    state = equilibrium.solve(one.take(np.zeros(len(watts), dtype=int)).changed(machine_heat=watts))
    rise = state.outer - 20.0
    usual = (rise >= 20.0) & (rise <= 50.0)
    assert usual.sum() > 5
    square = HOUSING_AREA[kind][1] * one.outside[0] ** 2 * 1e-6  # m^2
    coefficient = (state.paths["air"] + state.paths["radiation"])[usual] / square / rise[usual]
    assert ((np.round(coefficient) >= 10) & (np.round(coefficient) <= 12)).all(), coefficient


# The viscous torque of an overfilled bearing is 2 to 5 times its run-in value (Eschmann, Hasbargen & Weigand; Harris;
# from memory). Bores of 25 to 100 mm, 500 to 6000 rpm as far as the bearing may turn, 40 to 70 degC.
@pytest.mark.parametrize("lubricant", ["polyurea-110-2", "lithium-complex-150-2"])
@pytest.mark.parametrize(
    "designation", ["6205", "6210", "6309", "6312", "6316", "6320", "7312", "22210", "22220", "30213"]
)
def test_a_full_flood_multiplies_the_viscous_torque_by_two_to_five(designation, lubricant, report):
    one = points_of(designation, ("lubricant.name", lubricant), ("grease.fill", "100 %"), ("housing.void", "0 cm^3"))
    speeds, temperatures = np.meshgrid(np.geomspace(500.0, 6000.0, 12), [40.0, 55.0, 70.0])
    rows = np.flatnonzero(speeds.ravel() <= one.speed_limit[0])
    many = one.take(np.zeros(len(rows), dtype=int))
    state = equilibrium.solve(many.changed(speed=speeds.ravel()[rows], held_temperature=temperatures.ravel()[rows]))
    multiple = 1 + state.churning_torque / state.viscous_torque
    assert len(rows) >= 6
    assert (multiple >= 2 - 1e-9).all(), multiple
    assert (multiple <= 5 + 1e-9).all(), multiple
    # The model holds itself to that range: how often it has to is told here, and the line without it is tested in
    # tests/physics/test_churning.py.
    held = int((multiple < 2 + 1e-9).sum()), int((multiple > 5 - 1e-9).sum())
    report.append(f"full flood of {designation}, {lubricant}: of {len(rows)} states {held[0]} held up to twice the "
                  f"run-in torque, {held[1]} held down to five times")  # fmt: skip


def test_a_bearing_that_only_its_shaft_cools_runs_at_the_closed_form_of_a_fin():
    # Incropera 3.6, a round fin, its length grown by d/4 for the tip: q = sqrt(h P k A) tanh(m (L + d/4)) rise.
    # Steel of 48 W/(m*K), two bores of shaft, 15 W/(m^2*K): what the model takes of a shaft that nobody described.
    one = points_of("6309", ("housing.shaft_temperature", None), ("housing.machine_heat", "4 W"))
    state = equilibrium.solve(one.changed(housing_area=1e-24, speed=300.0, radial_load=500.0))
    assert state.is_found[0]
    d, h, k = 0.045, 15.0, 48.0
    perimeter, section, length = np.pi * d, np.pi * d**2 / 4, 2 * d + d / 4
    m = np.sqrt(h * perimeter / (k * section))
    conductance = np.sqrt(h * perimeter * k * section) * np.tanh(m * length)
    heat = state.friction_power[0] + 4.0
    assert state.inner[0] - one.ambient[0] == pytest.approx(heat / conductance, rel=1e-9)
    assert state.paths["free_shaft"][0] == pytest.approx(heat, rel=1e-9)


def test_without_a_surplus_nothing_is_churned():
    state = equilibrium.solve(points_of("6309", ("grease.fill", "30 %"), ("housing.void", "0 cm^3")))
    assert state.churning_torque[0] == 0
