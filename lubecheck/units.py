"""Units at the edge: the house units, the reader of "45 mm", and the way to and from pint.

Inside the kernel every quantity of one kind is a plain float64 in one *house unit*, the unit that the standards
print, so that a constant can be read against its clause. `KINDS` is the one table of them. A text is read by our own
strict grammar (one finite number, one unit word of the right kind), because a general reader guesses where a
bearing must not be guessed at: "1,5 mm" is not 15 mm, and 25 Hz of a shaft is 25 turns a second, not 25 rad/s.

pint is imported on first use only; `lubecheck check` does not need it.
"""

from __future__ import annotations

import math
import re
from collections.abc import Mapping
from dataclasses import dataclass
from typing import TYPE_CHECKING, Annotated, Any

import numpy as np
from numpy.typing import NDArray

from lubecheck.errors import nearest, shown

if TYPE_CHECKING:
    import pint

Array = NDArray[np.float64]

INCH_MM = 25.4  # exact, international yard and pound agreement 1959
FOOT_MM = 12 * INCH_MM
POUND_G = 453.59237  # exact, the same
GRAVITY = 9.80665  # m/s^2, standard value, exact
LBF_N = POUND_G / 1000 * GRAVITY
US_GALLON_CM3 = 231 * INCH_MM**3 / 1000
HORSEPOWER_W = 550 * LBF_N * FOOT_MM / 1000  # mechanical
DAY_H = 24.0
HOUR_S = 3600.0
YEAR_H = 365.25 * DAY_H  # Julian year, as pint has it


@dataclass(frozen=True, slots=True)
class Kind:
    """A kind of quantity: its name, its house unit as pint writes it, and the unit words a user may write."""

    name: str
    unit: str
    words: Mapping[str, float]  # house = number * words[word] + offsets.get(word, 0)
    offsets: Mapping[str, float]

    @property
    def is_bare(self) -> bool:
        """A number without dimension may be given bare."""
        return self.unit == "1"


def _kind(name: str, unit: str, words: Mapping[str, float], offsets: Mapping[str, float] | None = None) -> Kind:
    return Kind(name, unit, {unit: 1.0, **words}, offsets or {})


_RANKINE = 5 / 9
KINDS: Mapping[str, Kind] = {
    kind.name: kind
    for kind in (
        _kind("length", "mm", {"um": 1e-3, "cm": 10, "m": 1000, "in": INCH_MM, "inch": INCH_MM, "ft": FOOT_MM}),
        _kind(
            "area",
            "mm^2",
            {"cm^2": 100, "dm^2": 1e4, "m^2": 1e6, "in^2": INCH_MM**2, "ft^2": FOOT_MM**2},
        ),
        _kind(
            "volume",
            "cm^3",
            {
                "mm^3": 1e-3,
                "ml": 1,
                "mL": 1,
                "l": 1000,
                "L": 1000,
                "dm^3": 1000,
                "m^3": 1e6,
                "in^3": INCH_MM**3 / 1000,
                "fl_oz": US_GALLON_CM3 / 128,
                "gal": US_GALLON_CM3,
            },
        ),
        _kind("mass", "g", {"mg": 1e-3, "kg": 1000, "t": 1e6, "oz": POUND_G / 16, "lb": POUND_G}),
        _kind(
            "speed",
            "rpm",
            {"1/min": 1, "r/min": 1, "rev/min": 1, "1/s": 60, "rev/s": 60, "Hz": 60, "rad/s": 30 / math.pi},
        ),
        _kind(
            "velocity",
            "m/s",
            {"mm/s": 1e-3, "km/h": 1 / 3.6, "in/s": INCH_MM / 1000, "ft/s": FOOT_MM / 1000, "ft/min": FOOT_MM / 60000},
        ),
        _kind("kinematic viscosity", "mm^2/s", {"cSt": 1, "St": 100, "m^2/s": 1e6, "in^2/s": INCH_MM**2}),
        _kind("dynamic viscosity", "mPa*s", {"cP": 1, "P": 100, "Pa*s": 1000}),
        _kind("force", "N", {"kN": 1000, "MN": 1e6, "kgf": GRAVITY, "lbf": LBF_N, "kip": 1000 * LBF_N}),
        _kind("torque", "N*mm", {"N*m": 1000, "kN*m": 1e6, "lbf*in": LBF_N * INCH_MM, "lbf*ft": LBF_N * FOOT_MM}),
        _kind(
            "temperature",
            "degC",
            {"K": 1, "degF": _RANKINE, "degR": _RANKINE},
            {"K": -273.15, "degF": -32 * _RANKINE, "degR": -273.15},
        ),
        _kind("temperature difference", "delta_degC", {"K": 1, "delta_degF": _RANKINE}),
        _kind("power", "W", {"mW": 1e-3, "kW": 1000, "MW": 1e6, "hp": HORSEPOWER_W}),
        _kind("conductance", "W/K", {"W/delta_degC": 1, "kW/K": 1000}),
        _kind("heat transfer coefficient", "W/(m^2*K)", {"W/m^2/K": 1}),
        _kind("conductivity", "W/(m*K)", {"W/m/K": 1}),
        _kind("irradiance", "W/m^2", {"kW/m^2": 1000}),
        _kind("thermal capacity", "J/K", {"J/delta_degC": 1, "kJ/K": 1000}),
        _kind("heat capacity", "J/(kg*K)", {"J/kg/K": 1, "kJ/(kg*K)": 1000, "kJ/kg/K": 1000}),
        _kind(
            "time",
            "h",
            {
                "s": 1 / 3600,
                "min": 1 / 60,
                "hour": 1,
                "hours": 1,
                "hr": 1,
                "d": DAY_H,
                "day": DAY_H,
                "days": DAY_H,
                "week": 7 * DAY_H,
                "weeks": 7 * DAY_H,
                "month": YEAR_H / 12,
                "months": YEAR_H / 12,
                "year": YEAR_H,
                "years": YEAR_H,
            },
        ),
        _kind(
            "density",
            "kg/m^3",
            {
                "g/cm^3": 1000,
                "g/ml": 1000,
                "kg/l": 1000,
                "lb/ft^3": POUND_G / FOOT_MM**3 * 1e6,
                "lb/gal": POUND_G / US_GALLON_CM3 * 1000,
            },
        ),
        _kind("thermal expansion", "1/K", {"1/delta_degC": 1, "1/delta_degF": 1 / _RANKINE}),
        _kind(
            "pressure",
            "MPa",
            {"Pa": 1e-6, "kPa": 1e-3, "hPa": 1e-4, "bar": 0.1, "N/mm^2": 1, "GPa": 1000, "psi": LBF_N / INCH_MM**2},
        ),
        _kind("pressure coefficient", "1/GPa", {"1/Pa": 1e9, "1/MPa": 1000, "mm^2/N": 1000}),
        _kind(
            "flow",
            "l/min",
            {
                "l/s": 60,
                "l/h": 1 / 60,
                "ml/min": 1e-3,
                "cm^3/min": 1e-3,
                "m^3/h": 1000 / 60,
                "gal/min": US_GALLON_CM3 / 1000,
            },
        ),
        _kind("shear rate", "1/s", {}),
        _kind("shear stress", "Pa", {"kPa": 1000, "N/m^2": 1}),
        _kind("feed", "g/h", {"g/d": 1 / DAY_H, "g/day": 1 / DAY_H, "g/week": 1 / (7 * DAY_H), "mg/h": 1e-3}),
        _kind("Saybolt viscosity", "s", {"SUS": 1, "SSU": 1}),  # Saybolt Universal seconds: a viscosity, not a time
        _kind("angular acceleration", "rad/s^2", {"rpm/s": math.pi / 30}),
        _kind("angle", "deg", {"rad": 180 / math.pi}),
        _kind("share", "1", {"%": 0.01, "percent": 0.01, "ppm": 1e-6}),
        _kind("number", "1", {}),
    )
}

# The same word written in other ways: typographic forms are folded before the table is asked.
_FOLD = str.maketrans({"²": "^2", "³": "^3", "·": "*", "×": "*", "µ": "u", "μ": "u", "−": "-"})
_WORDS = {"°C": "degC", "°F": "degF", "rev/minute": "rpm", "fl oz": "fl_oz", '"': "in", "SUS": "SUS"}
_SQUARES = re.compile(r"\b([a-z]+)(\^|\*\*)?([23])(?=$|[/*])")  # mm2/s and mm**2/s for mm^2/s
_NUMBER = r"[+-]?(?:[0-9]+(?:\.[0-9]*)?|\.[0-9]+)(?:[eE][+-]?[0-9]+)?"
_GRAMMAR = re.compile(rf"({_NUMBER})\s*((?:1/)?[^\s0-9+\-.,]\S*(?: oz)?)?")
_LONGEST = 60


class UnreadableText(ValueError):
    """A text is not one number and one unit of the right kind. `expected` says what would be, `hint` why it is not."""

    def __init__(self, expected: str, near: str | None = None, hint: str = "") -> None:
        self.expected = f"{expected} ({hint})" if hint else expected
        self.near = near
        self.hint = hint
        super().__init__(self.expected)


def unit_word(word: str) -> str:
    """Return a unit as the table spells it, from the ways people type it.

    >>> unit_word("mm²/s"), unit_word("mm2/s"), unit_word("°C")
    ('mm^2/s', 'mm^2/s', 'degC')
    """
    word = _WORDS.get(word, word).translate(_FOLD)
    return _SQUARES.sub(r"\1^\3", word)


def _hint(text: str) -> str:
    """Say what is wrong with a text that the grammar refused, where the mistake is a known one."""
    if re.search(r"[0-9],[0-9]", text):
        return "write a decimal point, and no thousands separator"
    if re.search(r"[0-9][ '_\u00a0\u202f][0-9]", text):
        return "write thousands without a separator"
    if re.search(r"[0-9A-Za-z]\s*[+*]\s*[0-9]|[0-9]\s*-\s*[0-9]", text):
        return "one value only, no arithmetic"
    if re.search(r"nan|inf", text, re.IGNORECASE):
        return "a finite number"
    return ""


def example(kind: Kind) -> str:
    """Return what a text of this kind looks like, for a message."""
    if kind.is_bare:
        return 'a number such as 0.35 or "35 %"' if kind.name == "share" else "a number"
    shown_words = [word for word in kind.words if word != "delta_degC"][:6]
    return f"a {kind.name} with its unit ({', '.join(shown_words)})"


def split_text(text: str, kind: Kind) -> tuple[float, str]:
    """Split "1480 rpm" into its number and the unit word of the table.

    Raises UnreadableText when the text is anything but one finite number and one unit of the kind.

    >>> split_text("104 degF", KINDS["temperature"])
    (104.0, 'degF')
    """
    wanted = example(kind)
    folded = text.strip().replace("\N{MINUS SIGN}", "-")
    match = _GRAMMAR.fullmatch(folded) if len(folded) <= _LONGEST else None
    if match is None:
        raise UnreadableText(wanted, hint=_hint(folded[: 2 * _LONGEST]))
    number, word = float(match[1]), match[2]
    if not math.isfinite(number):
        raise UnreadableText(wanted, hint="a finite number")
    if word is None:
        if kind.is_bare:
            return number, "1"
        raise UnreadableText(wanted)
    word = unit_word(word)
    if word not in kind.words or word == "1":
        raise UnreadableText(wanted, nearest(word, kind.words))
    return number, word


def to_house(number: float, word: str, kind: Kind) -> float:
    """Return a number in a unit of the table as a number in the house unit.

    >>> round(to_house(104.0, "degF", KINDS["temperature"]), 9)
    40.0
    """
    return number * kind.words[word] + kind.offsets.get(word, 0.0)


def from_house(value: float, word: str, kind: Kind) -> float:
    """Return a value in the house unit as a number in a unit of the table.

    >>> round(from_house(25.4, "in", KINDS["length"]), 9)
    1.0
    """
    return (value - kind.offsets.get(word, 0.0)) / kind.words[word]


def read_text(text: str, kind: Kind) -> float:
    """Read a text such as "3.5 in" into the house unit of its kind.

    >>> read_text("25 Hz", KINDS["speed"]), read_text("25 %", KINDS["share"])
    (1500.0, 0.25)
    """
    return to_house(*split_text(text, kind), kind)


@dataclass(frozen=True, slots=True)
class Unit:
    """Declares an argument or a return of a physics function: its kind, and the unit its plain face is in."""

    kind: str

    @property
    def name(self) -> str:
        """The house unit's name."""
        return KINDS[self.kind].unit


@dataclass(frozen=True, slots=True)
class Choice:
    """Declares an argument that is one of a few words; the plain face takes their positions as integers."""

    words: tuple[str, ...]

    def code(self, word: str) -> int:
        """Return the position of a word."""
        return self.words.index(word)


Mm = Annotated[Array, Unit("length")]
Mm2 = Annotated[Array, Unit("area")]
Cm3 = Annotated[Array, Unit("volume")]
Gram = Annotated[Array, Unit("mass")]
Rpm = Annotated[Array, Unit("speed")]
MPerS = Annotated[Array, Unit("velocity")]
Mm2PerS = Annotated[Array, Unit("kinematic viscosity")]
MPaS = Annotated[Array, Unit("dynamic viscosity")]
SayboltS = Annotated[Array, Unit("Saybolt viscosity")]
Newton = Annotated[Array, Unit("force")]
NMm = Annotated[Array, Unit("torque")]
DegC = Annotated[Array, Unit("temperature")]
DeltaDegC = Annotated[Array, Unit("temperature difference")]
Watt = Annotated[Array, Unit("power")]
WPerK = Annotated[Array, Unit("conductance")]
WPerM2K = Annotated[Array, Unit("heat transfer coefficient")]
WPerM2 = Annotated[Array, Unit("irradiance")]
WPerMK = Annotated[Array, Unit("conductivity")]
JPerKgK = Annotated[Array, Unit("heat capacity")]
JPerK = Annotated[Array, Unit("thermal capacity")]
Hour = Annotated[Array, Unit("time")]
KgPerM3 = Annotated[Array, Unit("density")]
PerKelvin = Annotated[Array, Unit("thermal expansion")]
MPa = Annotated[Array, Unit("pressure")]
PerGPa = Annotated[Array, Unit("pressure coefficient")]
LPerMin = Annotated[Array, Unit("flow")]
GramPerHour = Annotated[Array, Unit("feed")]
Deg = Annotated[Array, Unit("angle")]
RadPerS2 = Annotated[Array, Unit("angular acceleration")]
PerSecond = Annotated[Array, Unit("shear rate")]
Pa = Annotated[Array, Unit("shear stress")]
Share = Annotated[Array, Unit("share")]
Number = Annotated[Array, Unit("number")]


def quantity(value: float | Array, unit: str) -> pint.Quantity[Any]:
    """Return a value as a quantity of pint's application registry, so that it mixes with the caller's own."""
    import pint

    registry: Any = pint.application_registry
    made: pint.Quantity[Any] = registry.Quantity(value, "" if unit == "1" else unit)
    return made


def is_quantity(value: object) -> bool:
    """Tell a pint quantity, of whatever registry, without importing pint."""
    return hasattr(value, "magnitude") and hasattr(value, "units") and hasattr(value, "to")


def quantity_to_house(value: Any, kind: Kind) -> Array:
    """Return the magnitude of a pint quantity in the house unit of a kind.

    Raises UnreadableText where the dimension is another one, and where a temperature is given for a difference or
    the other way round.
    """
    registry = value._REGISTRY
    name = str(value.units)
    bare = registry.Quantity(np.asarray(value.magnitude, dtype=np.float64), value.units)
    is_difference = "delta_" in name
    if kind.name == "temperature" and is_difference:
        raise UnreadableText(f"{example(kind)}, not a temperature difference")
    if kind.name == "temperature difference" and not is_difference and ("degree" in name or "°" in name):
        raise UnreadableText(f"{example(kind)}, not a temperature")
    try:
        if kind.name == "speed" and bare.check("1/[time]") and not _turns(name):
            return np.asarray(bare.to("1/s").magnitude * 60, dtype=np.float64)
        return np.asarray(bare.to("" if kind.is_bare else kind.unit).magnitude, dtype=np.float64)
    except Exception as refused:  # pint's errors have several roots; each means: not of this dimension
        raise UnreadableText(f"{example(kind)}, not {shown(name)}") from refused


def _turns(name: str) -> bool:
    """Tell whether a unit of 1/time names an angle; plain Hz or 1/s of a shaft means turns."""
    return any(word in name for word in ("rad", "rev", "rpm", "deg", "turn", "cycle"))
