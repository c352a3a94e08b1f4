"""The tables of coolants: made by their generator, held to CoolProp between their rows, and near printed values."""

from __future__ import annotations

import csv
import importlib.util
import itertools
import sys

import numpy as np
import pytest
from CoolProp.CoolProp import PropsSI

from lubecheck import tables


def load_generator():
    spec = importlib.util.spec_from_file_location("make_fluids_for_coolants", tables.path("make_fluids.py"))
    module = importlib.util.module_from_spec(spec)
    sys.modules[spec.name] = module
    spec.loader.exec_module(module)
    return module


COOLANTS = {table.name: table for table in load_generator().COOLANTS}


def read(name: str) -> tuple[list[str], np.ndarray]:
    lines = list(csv.reader(tables.path(name).read_text(encoding="utf-8").splitlines()))
    assert lines[0][0].startswith("# ")
    return lines[1], np.array(lines[2:], dtype=float)


def test_water_and_the_common_glycols_are_there() -> None:
    assert set(COOLANTS) == {"water.csv", "ethylene_glycol_30.csv", "ethylene_glycol_50.csv",
                             "propylene_glycol_30.csv", "propylene_glycol_50.csv"}  # fmt: skip


@pytest.mark.parametrize("name", COOLANTS)
def test_a_table_is_what_its_generator_makes(name: str) -> None:
    header, values = read(name)
    assert ",".join(header) == COOLANTS[name].header
    # 0.1 %: another CoolProp may carry a newer equation
    assert values == pytest.approx(np.array(list(COOLANTS[name].rows())), rel=1e-3)


@pytest.mark.parametrize("name", COOLANTS)
@pytest.mark.parametrize(("column", "key"), [(1, "D"), (2, "C"), (3, "V"), (4, "L"), (5, "Prandtl")])
def test_between_the_rows_a_table_is_within_a_fifth_of_a_percent_of_coolprop(name: str, column: int, key: str) -> None:
    _, values = read(name)
    temperature = np.arange(values[0, 0] + 0.5, values[-1, 0], 1.0)
    found = np.interp(temperature, values[:, 0], values[:, column])
    expected = PropsSI(key, "T", temperature + 273.15, "P", COOLANTS[name].pressure, COOLANTS[name].fluid)
    assert found == pytest.approx(expected, rel=2e-3)


@pytest.mark.parametrize("name", COOLANTS)
def test_a_coolant_is_liquid_over_its_table_and_thins_with_heat(name: str) -> None:
    _, values = read(name)
    assert all(warm - cold == 1.0 for cold, warm in itertools.pairwise(values[:, 0]))
    assert np.all(np.diff(values[:, 3]) < 0)
    fluid = COOLANTS[name].fluid
    freezing = 273.15 if fluid == "Water" else PropsSI("T_FREEZE", "T", 300.0, "P", 5e5, fluid)
    assert 0.5 < values[0, 0] + 273.15 - freezing < 3.0


# At 20 degC: density kg/m^3, heat capacity J/(kg*K), viscosity mPa*s, conductivity W/(m*K).
# Water: IAPWS tables (memory). Glycols: ASHRAE Handbook, Fundamentals, chapter on secondary coolants, by mass (memory);
# tables of different makers differ by 1 % in density, 3 % in heat capacity and conductivity and 12 % in viscosity.
PRINTED = [
    ("water.csv", (998.2, 4184.0, 1.0016, 0.598), (5e-4, 1e-3, 2e-3, 5e-3)),
    ("ethylene_glycol_30.csv", (1038.0, 3690.0, 2.2, 0.46), (0.01, 0.03, 0.12, 0.04)),
    ("ethylene_glycol_50.csv", (1066.0, 3320.0, 3.9, 0.39), (0.01, 0.03, 0.12, 0.04)),
    ("propylene_glycol_30.csv", (1025.0, 3850.0, 2.8, 0.44), (0.01, 0.03, 0.12, 0.04)),
    ("propylene_glycol_50.csv", (1041.0, 3550.0, 6.1, 0.36), (0.01, 0.03, 0.12, 0.04)),
]


@pytest.mark.parametrize(("name", "printed", "accuracy"), PRINTED)
def test_a_coolant_is_as_a_printed_table_has_it(
    name: str, printed: tuple[float, ...], accuracy: tuple[float, ...]
) -> None:
    _, values = read(name)
    density, heat, viscosity, conductivity = values[values[:, 0] == 20.0][0, 1:5]
    for found, expected, rel in zip((density, heat, viscosity * 1e3, conductivity), printed, accuracy, strict=True):
        assert found == pytest.approx(expected, rel=rel)


def test_freezing_points_are_those_every_label_states() -> None:
    # Antifreeze labels: 50 % ethylene glycol -36 to -37 degC, 50 % propylene glycol -32 to -34 degC.
    for code, low, high in (("MEG", -37.5, -35.0), ("MPG", -34.0, -31.0)):
        freezing = PropsSI("T_FREEZE", "T", 300.0, "P", 5e5, f"INCOMP::{code}[0.5]") - 273.15
        assert low < freezing < high
        name = {"MEG": "ethylene_glycol_50.csv", "MPG": "propylene_glycol_50.csv"}[code]
        assert read(name)[1][0, 0] > freezing
