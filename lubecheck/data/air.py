"""Air: its properties at a temperature and a pressure, from a table that CoolProp made, or from CoolProp itself.

Dry air is meant: moisture, even saturated at 40 degC, changes its density by less than 3 %.
"""

from __future__ import annotations

import csv
import functools
from collections.abc import Iterable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from lubecheck.errors import TableError
from lubecheck.physics import cooling
from lubecheck.tables import path
from lubecheck.units import Array

TABLE = "air.csv"
TABLE_PRESSURE = 0.101325  # MPa, standard atmosphere; the table is made at it
_HEADER = (
    "temperature [degC]",
    "density [kg/m^3]",
    "dynamic viscosity [Pa*s]",
    "conductivity [W/(m*K)]",
    "prandtl [1]",
    "thermal expansion [1/K]",
)


@dataclass(frozen=True, slots=True)
class AirProperties:
    """What convection asks of air, in SI units: arrays of one shape.

    The viscosities are not in the house units; `cooling` takes the kinematic viscosity in mm^2/s, which is
    `kinematic_viscosity_mm2`.
    """

    density: Array  # kg/m^3
    dynamic_viscosity: Array  # Pa*s
    conductivity: Array  # W/(m*K)
    prandtl: Array  # 1
    expansion: Array  # 1/K

    @property
    def kinematic_viscosity(self) -> Array:
        """The kinematic viscosity in m^2/s."""
        return self.dynamic_viscosity / self.density

    @property
    def kinematic_viscosity_mm2(self) -> Array:
        """The kinematic viscosity in the house unit, mm^2/s."""
        return self.dynamic_viscosity * 1e6 / self.density


@dataclass(frozen=True, slots=True)
class AirFilm:
    """What the convection laws take of air, with all that depends on its Prandtl number in two groups."""

    kinematic_viscosity: Array  # mm^2/s
    conductivity: Array  # W/(m*K)
    rising: Array  # cooling.rising_group
    blown: Array  # cooling.blown_group


def properties(temperature: Array, pressure: Array) -> AirProperties:
    """Return the properties of air by linear interpolation in the table.

    temperature [degC]: film temperature, any shape; the table ends at -60 and 300 degC and its ends stand beyond
    pressure [MPa]: absolute pressure, broadcasts with temperature

    Density scales with pressure as an ideal gas; the other properties hardly depend on it. All are within 0.5 % of
    CoolProp from -40 to 200 degC and from sea level to 5000 m.
    """
    first, steps_a_kelvin, last, columns, _ = _table()
    row, fraction = _place(temperature, first, steps_a_kelvin, last)
    density, viscosity, conductivity, prandtl, expansion = (
        column[row] + slope[row] * fraction for column, slope in columns
    )
    return AirProperties(density * (pressure / TABLE_PRESSURE), viscosity, conductivity, prandtl, expansion)


def film(temperature: Array, pressure: Array) -> AirFilm:
    """Return what the convection laws take of air, interpolated like `properties`: a step of the solve needs no more.

    temperature [degC]: film temperature, any shape
    pressure [MPa]: absolute pressure, broadcasts with temperature
    """
    first, steps_a_kelvin, last, _, columns = _table()
    row, fraction = _place(temperature, first, steps_a_kelvin, last)
    viscosity, conductivity, rising, blown = (column[row] + slope[row] * fraction for column, slope in columns)
    return AirFilm(viscosity * (TABLE_PRESSURE / pressure), conductivity, rising, blown)


def film_of(air: AirProperties) -> AirFilm:
    """Return what the convection laws take of air whose properties are known."""
    return AirFilm(
        air.kinematic_viscosity_mm2,
        air.conductivity,
        cooling.rising_group(air.prandtl, air.expansion),
        cooling.blown_group(air.prandtl),
    )


def _place(temperature: Array, first: float, steps_a_kelvin: float, last: float) -> tuple[NDArray[np.intp], Array]:
    """Return the row of the table below a temperature and how far it is to the next.

    One place in the evenly stepped table serves all columns: half the time of np.interp for each. It is found with
    fmin and fmax so that a NaN cannot become an index; the fraction keeps it.
    """
    place = (np.asarray(temperature, dtype=np.float64) - first) * steps_a_kelvin
    row = np.fmax(np.fmin(place, last - 1.0), 0.0).astype(np.intp)
    return row, np.minimum(np.maximum(place, 0.0), last) - row


def exact(temperature: Array, pressure: Array) -> AirProperties:
    """Return the same properties from CoolProp itself, which is imported here because that takes seconds."""
    from CoolProp.CoolProp import PropsSI

    kelvin, pascal = np.broadcast_arrays(np.asarray(temperature) + 273.15, np.asarray(pressure) * 1e6)

    def ask(key: str) -> Array:
        found = PropsSI(key, "T", kelvin.ravel(), "P", pascal.ravel(), "Air")
        return np.asarray(found, dtype=np.float64).reshape(kelvin.shape)

    return AirProperties(ask("D"), ask("V"), ask("L"), ask("Prandtl"), ask("ISOBARIC_EXPANSION_COEFFICIENT"))


Columns = tuple[tuple[Array, Array], ...]


@functools.cache
def _table() -> tuple[float, float, float, Columns, Columns]:
    """Read the table: its first temperature, its rows a kelvin, its last row, and columns with their slopes a row.

    The columns are first those of `AirProperties`, then those of `AirFilm`.
    """
    with path(TABLE).open(encoding="utf-8", newline="") as lines:
        rows = list(csv.reader(line for line in lines if not line.startswith("#")))
    if tuple(rows[0]) != _HEADER:
        raise TableError(f"{TABLE}: the columns are {', '.join(rows[0])}; expected {', '.join(_HEADER)}")
    values = np.array(rows[1:], dtype=np.float64).T
    temperature = values[0]
    steps = np.diff(temperature)
    if not np.all(np.isfinite(values)) or np.any(steps <= 0) or np.any(steps != steps[0]):
        raise TableError(f"{TABLE}: the temperatures must rise in even steps, and every value be finite")
    whole = AirProperties(*values[1:])
    made = film_of(whole)
    laws = (made.kinematic_viscosity, made.conductivity, made.rising, made.blown)
    return float(temperature[0]), float(1 / steps[0]), float(len(steps)), _sloped(values[1:]), _sloped(laws)


def _sloped(columns: Iterable[Array]) -> Columns:
    return tuple((column[:-1], np.diff(column)) for column in columns)
