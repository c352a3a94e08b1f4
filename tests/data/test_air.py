"""The table of air: made by its generator, and what is read from it is what CoolProp says."""

import csv
import importlib.util
import io
import os
import subprocess
import sys

import numpy as np
import pytest
from CoolProp.CoolProp import PropsSI

from lubecheck import tables
from lubecheck.data import air
from lubecheck.errors import TableError
from lubecheck.physics import cooling

TEMPERATURES = np.arange(-40.0, 200.5, 1.3)
ALTITUDES_MM = np.array([-4e5, 0.0, 1e6, 2.5e6, 5e6])


def generator():
    script = tables.path("make_fluids.py")
    spec = importlib.util.spec_from_file_location("make_fluids", script)
    module = importlib.util.module_from_spec(spec)
    sys.modules["make_fluids"] = module
    spec.loader.exec_module(module)
    return module


def read(text):
    lines = list(csv.reader(io.StringIO(text)))
    assert lines[0][0].startswith("# ")
    return lines[1], np.array(lines[2:], dtype=float)


def test_the_table_is_what_its_generator_makes():
    table = generator().AIR
    header, values = read(tables.path(table.name).read_text(encoding="utf-8"))
    assert ",".join(header) == table.header
    # 0.1 %: another CoolProp may carry a newer equation for viscosity or conductivity
    assert values == pytest.approx(np.array(list(table.rows())), rel=1e-3)


@pytest.mark.parametrize("pressure", cooling.pressure_at.plain(ALTITUDES_MM))
@pytest.mark.parametrize(
    ("field", "key"),
    [
        ("density", "D"),
        ("dynamic_viscosity", "V"),
        ("conductivity", "L"),
        ("prandtl", "Prandtl"),
        ("expansion", "ISOBARIC_EXPANSION_COEFFICIENT"),
    ],
)
def test_air_from_the_table_is_within_half_a_percent_of_coolprop(pressure, field, key):
    expected = PropsSI(key, "T", TEMPERATURES + 273.15, "P", np.full_like(TEMPERATURES, pressure * 1e6), "Air")
    assert getattr(air.properties(TEMPERATURES, pressure), field) == pytest.approx(expected, rel=0.005)


def test_air_is_as_a_printed_table_has_it():
    # Incropera & DeWitt, table A.4, air at 300 K and 1 atm: 1.1614 kg/m^3, 184.6e-7 Pa*s, 15.89e-6 m^2/s,
    # 26.3e-3 W/(m*K), Pr 0.707 (memory); the books differ by 1 % in conductivity and Prandtl number
    found = air.properties(np.array([26.85]), 0.101325)
    assert found.density == pytest.approx(1.1614, rel=0.015)
    assert found.dynamic_viscosity == pytest.approx(184.6e-7, rel=0.01)
    assert found.kinematic_viscosity == pytest.approx(15.89e-6, rel=0.015)
    assert found.kinematic_viscosity_mm2 == pytest.approx(15.89, rel=0.015)
    assert found.conductivity == pytest.approx(26.3e-3, rel=0.01)
    assert found.prandtl == pytest.approx(0.707, rel=0.01)
    assert found.expansion == pytest.approx(1 / 300, rel=0.005)


def test_exact_asks_coolprop_and_broadcasts():
    found = air.exact(np.array([20.0, 60.0]), np.array([[0.1], [0.07]]))
    assert found.density.shape == (2, 2)
    assert found.density[1, 0] == pytest.approx(PropsSI("D", "T", 293.15, "P", 70000.0, "Air"), rel=1e-12)
    near = air.properties(np.array([20.0, 60.0]), np.array([[0.1], [0.07]]))
    assert near.kinematic_viscosity == pytest.approx(found.kinematic_viscosity, rel=0.005)


def test_a_row_depends_on_itself_only_and_a_nan_spoils_no_other_row():
    found = air.properties(np.array([20.0, np.nan, 60.0]), 0.1)
    assert np.isnan(found.density).tolist() == [False, True, False]
    assert found.density[2] == air.properties(60.0, 0.1).density


def test_beyond_the_ends_of_the_table_its_ends_stand():
    assert air.properties(-90.0, 0.1).density == air.properties(-60.0, 0.1).density
    assert air.properties(900.0, 0.1).conductivity == air.properties(300.0, 0.1).conductivity


BROKEN = {
    "a column renamed": lambda text: text.replace("prandtl [1]", "prandtl"),
    "uneven steps": lambda text: text.replace("\n-55,", "\n-56,"),
    "not finite": lambda text: text.replace("1.659187", "nan"),
}


@pytest.mark.parametrize("fault", BROKEN)
def test_a_broken_table_is_refused(fault, tmp_path, monkeypatch):
    broken = tmp_path / "air.csv"
    whole = tables.path("air.csv").read_text(encoding="utf-8")
    broken.write_text(BROKEN[fault](whole), encoding="utf-8")
    assert broken.read_text(encoding="utf-8") != whole
    monkeypatch.setattr(air, "path", lambda _: broken)
    air._table.cache_clear()
    try:
        with pytest.raises(TableError):
            air.properties(20.0, 0.1)
    finally:
        air._table.cache_clear()


def test_reading_the_table_imports_neither_coolprop_nor_pint():
    code = (
        "import sys; from lubecheck.data import air; air.properties(20.0, 0.1);"
        "print([name for name in ('CoolProp', 'pint', 'scipy') if name in sys.modules])"
    )
    environment = {**os.environ, "PYTHONPATH": os.pathsep.join(path for path in sys.path if path)}
    done = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, env=environment, check=True)
    assert done.stdout.strip() == "[]"
