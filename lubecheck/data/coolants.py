"""Coolants: water and its mixtures from tables that CoolProp made, and any other fluid of CoolProp when asked.

`TABLES` names those that come without CoolProp. Another name is CoolProp's own, such as "INCOMP::MEG[0.4]".
"""

from __future__ import annotations

import csv
import functools
from dataclasses import dataclass

import numpy as np

from lubecheck.errors import Fault, InputError, TableError, nearest, shown
from lubecheck.tables import path
from lubecheck.units import Array

TABLES = {
    "water": "water.csv",
    "ethylene glycol 30 %": "ethylene_glycol_30.csv",
    "ethylene glycol 50 %": "ethylene_glycol_50.csv",
    "propylene glycol 30 %": "propylene_glycol_30.csv",
    "propylene glycol 50 %": "propylene_glycol_50.csv",
}
CIRCUIT_PRESSURE = 500000.0  # Pa: a closed circuit, liquid to 151 degC; the tables are made at it
_COLUMNS = ("density", "heat_capacity", "dynamic_viscosity", "conductivity", "prandtl")
_KEYS = ("D", "C", "V", "L", "Prandtl")  # CoolProp's names of them


@dataclass(frozen=True, slots=True)
class Coolant:
    """A coolant at one temperature."""

    density: float  # kg/m^3
    heat_capacity: float  # J/(kg*K)
    dynamic_viscosity: float  # Pa*s
    conductivity: float  # W/(m*K)
    prandtl: float

    @property
    def kinematic_viscosity(self) -> float:
        """The kinematic viscosity in mm^2/s."""
        return self.dynamic_viscosity / self.density * 1e6


def at(name: str, temperature: float) -> Coolant:
    """Return a coolant at a temperature in degC.

    Raises InputError where there is no such fluid, or where it is no liquid at that temperature.

    >>> round(at("water", 20.0).heat_capacity, -1)
    4180.0
    """
    if name not in TABLES:
        return _asked(name, temperature)
    columns = _table(name)
    least, most = float(columns[0, 0]), float(columns[0, -1])
    if not least <= temperature <= most:
        expected = f"{least:g} to {most:g} degC, where {name} is liquid and in the table"
        raise InputError([Fault("coolant_inlet", f"{temperature:g} degC", expected)])
    return Coolant(*(float(np.interp(temperature, columns[0], column)) for column in columns[1:]))


def _asked(name: str, temperature: float) -> Coolant:
    """Ask CoolProp, which is imported here because that takes seconds."""
    from CoolProp.CoolProp import PhaseSI, PropsSI

    kelvin = temperature + 273.15
    try:
        values = [float(PropsSI(key, "T", kelvin, "P", CIRCUIT_PRESSURE, name)) for key in _KEYS]
        phase = "liquid" if name.startswith("INCOMP::") else str(PhaseSI("T", kelvin, "P", CIRCUIT_PRESSURE, name))
    except ValueError as refused:
        expected = f"one of {', '.join(TABLES)}, or a fluid of CoolProp that is liquid at {temperature:g} degC"
        raise InputError([Fault("coolant", shown(name), expected, nearest=nearest(name, list(TABLES)))]) from refused
    if "liquid" not in phase or not np.all(np.isfinite(values)):
        expected = f"a fluid that is liquid at {temperature:g} degC and 5 bar"
        raise InputError([Fault("coolant", shown(name), expected)])
    return Coolant(*values)


@functools.cache
def _table(name: str) -> Array:
    with path(TABLES[name]).open(encoding="utf-8", newline="") as lines:
        rows = list(csv.reader(line for line in lines if not line.startswith("#")))
    values = np.array(rows[1:], dtype=np.float64).T
    if len(values) != len(_COLUMNS) + 1 or not np.all(np.isfinite(values)) or np.any(np.diff(values[0]) <= 0):
        raise TableError(f"{TABLES[name]}: expected rising temperatures and {len(_COLUMNS)} finite columns")
    return values
