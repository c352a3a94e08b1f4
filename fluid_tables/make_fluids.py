"""Make the tables of air and of coolants in this folder from CoolProp: run `python fluid_tables/make_fluids.py`.

The tables stand in for CoolProp, which takes seconds to import. tests/data/test_air.py and tests/data/test_coolants.py
make the rows again, compare them with the files, and hold what lies between the rows to CoolProp.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

HERE = Path(__file__).parent
KELVIN = 273.15


@dataclass(frozen=True, slots=True)
class Table:
    """A table to make: the fluid in words and by CoolProp's name, pressure in Pa, temperatures in degC, columns."""

    name: str
    words: str
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
            f"# {self.words} at {self.pressure / 1e6:g} MPa, from CoolProp {CoolProp.__version__}, "
            "made by make_fluids.py: do not edit\n"
        )
        lines = (",".join(f"{value:.7g}" for value in row) for row in self.rows())
        return origin + self.header + "\n" + "\n".join(lines) + "\n"


# Steps of 5 K keep linear interpolation of density, the most curved column, within 0.02 %.
AIR = Table(
    "air.csv",
    "air",
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
_COOLANT = {
    "density [kg/m^3]": "D",
    "heat capacity [J/(kg*K)]": "C",
    "dynamic viscosity [Pa*s]": "V",
    "conductivity [W/(m*K)]": "L",
    "prandtl [1]": "Prandtl",
}
# A closed cooling circuit under 0.5 MPa stays liquid to 151 degC; liquid water hardly minds its pressure.
_CIRCUIT = 500000.0
WATER = Table("water.csv", "water", "Water", _CIRCUIT, range(1, 151, 1), _COOLANT)


def _glycol(word: str, code: str, share: int, coldest: int) -> Table:
    """Water with a mass share of glycol in per cent, from a little above its freezing point to CoolProp's 100 degC."""
    words = f"water with {share} % {word} glycol by mass"
    fluid = f"INCOMP::{code}[{share / 100:g}]"
    # Steps of 1 K keep linear interpolation of viscosity within 0.1 % at the cold end, where it is steepest.
    return Table(f"{word}_glycol_{share}.csv", words, fluid, _CIRCUIT, range(coldest, 101, 1), _COOLANT)


# CoolProp 8: freezing at -14.6 and -36.0 degC (ethylene), -12.8 and -32.2 degC (propylene)
GLYCOLS = (
    _glycol("ethylene", "MEG", 30, -13),
    _glycol("ethylene", "MEG", 50, -34),
    _glycol("propylene", "MPG", 30, -11),
    _glycol("propylene", "MPG", 50, -30),
)
COOLANTS = (WATER, *GLYCOLS)
TABLES = (AIR, *COOLANTS)


def main() -> None:
    """Write every table, whole."""
    for table in TABLES:
        made = HERE / (table.name + ".part")
        made.write_text(table.text(), encoding="utf-8", newline="\n")
        made.replace(HERE / table.name)


if __name__ == "__main__":
    main()
