"""Make air.csv and water.csv in this folder from CoolProp: run `python fluid_tables/make_air_water.py`.

The tables stand in for CoolProp, which takes seconds to import. tests/data/test_air.py makes the rows again and
compares them with the files, and holds what is read from them to CoolProp.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

HERE = Path(__file__).parent
KELVIN = 273.15


@dataclass(frozen=True, slots=True)
class Table:
    """A table to make: the fluid, its pressure in Pa, its temperatures in degC, its columns by CoolProp's keys."""

    name: str
    fluid: str
    pressure: float
    temperatures: range
    columns: dict[str, str]

    def rows(self) -> Iterator[list[float]]:
        """Yield the rows: the temperature in degC, then the columns, as CoolProp gives them (SI)."""
        from CoolProp.CoolProp import PropsSI

        for temperature in self.temperatures:
            state = ("T", temperature + KELVIN, "P", self.pressure, self.fluid)
            yield [float(temperature), *(float(PropsSI(key, *state)) for key in self.columns.values())]

    @property
    def header(self) -> str:
        """The line of column names, each with its unit."""
        return ",".join(("temperature [degC]", *self.columns))

    def text(self) -> str:
        """Return the file's text: its origin, its column names, its rows."""
        import CoolProp

        origin = (
            f"# {self.fluid.lower()} at {self.pressure / 1e6:g} MPa, from CoolProp {CoolProp.__version__}, "
            "made by make_air_water.py: do not edit\n"
        )
        lines = (",".join(f"{value:.7g}" for value in row) for row in self.rows())
        return origin + self.header + "\n" + "\n".join(lines) + "\n"


# Steps of 5 K keep linear interpolation of density, the most curved column, within 0.02 %.
AIR = Table(
    "air.csv",
    "Air",
    101325.0,  # standard atmosphere
    range(-60, 301, 5),
    {
        "density [kg/m^3]": "D",
        "dynamic viscosity [Pa*s]": "V",
        "conductivity [W/(m*K)]": "L",
        "prandtl [1]": "Prandtl",
        "thermal expansion [1/K]": "ISOBARIC_EXPANSION_COEFFICIENT",
    },
)
# A closed cooling circuit under 0.5 MPa stays liquid to 151 degC; liquid water hardly minds its pressure.
WATER = Table(
    "water.csv",
    "Water",
    500000.0,
    range(1, 151, 1),
    {
        "density [kg/m^3]": "D",
        "heat capacity [J/(kg*K)]": "C",
        "dynamic viscosity [Pa*s]": "V",
        "conductivity [W/(m*K)]": "L",
        "prandtl [1]": "Prandtl",
    },
)
TABLES = (AIR, WATER)


def main() -> None:
    """Write every table, whole."""
    for table in TABLES:
        made = HERE / (table.name + ".part")
        made.write_text(table.text(), encoding="utf-8", newline="\n")
        made.replace(HERE / table.name)


if __name__ == "__main__":
    main()
