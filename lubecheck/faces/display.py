"""How figures are written for people: in SI or inch units, with as many digits as they are good for."""

from __future__ import annotations

import math
import re
from typing import TYPE_CHECKING

from lubecheck.units import KINDS, Kind, from_house, to_house

if TYPE_CHECKING:
    from rich.console import Console

SYSTEMS = ("si", "inch")

# The unit in which a kind is shown in inch practice; kinds that are not here keep their house unit.
_INCH = {
    "length": "in",
    "area": "in^2",
    "volume": "in^3",
    "mass": "oz",
    "velocity": "ft/min",
    "force": "lbf",
    "torque": "lbf*in",
    "temperature": "degF",
    "temperature difference": "delta_degF",
    "flow": "gal/min",
}
_KIND_OF_UNIT: dict[str, Kind] = {kind.unit: kind for kind in reversed(tuple(KINDS.values()))}


def shown_unit(unit: str, system: str) -> str:
    """Return the unit in which a figure of a house unit is shown; empty for a bare number."""
    if unit == "1":
        return ""
    return _INCH.get(_KIND_OF_UNIT[unit].name, unit) if system == "inch" else unit


def converted(value: float, unit: str, system: str) -> float:
    """Return a value of a house unit in the unit it is shown in.

    >>> round(converted(40.0, "degC", "inch"), 6)
    104.0
    """
    word = shown_unit(unit, system)
    return from_house(value, word, _KIND_OF_UNIT[unit]) if word and word != unit else value


def number(value: float | None) -> str:
    """Return a number with three or four digits, large ones with a thin gap left out; a dash where there is none.

    >>> number(12345.6), number(0.71234), number(71.23), number(99.99999999), number(7e-4), number(None)
    ('12346', '0.712', '71.2', '100', '0.0007', '-')
    """
    if value is None or not math.isfinite(value):
        return "-"
    size = float(f"{abs(value):.6g}")  # so that a hair under 100 is written as 100 is
    if size >= 1e6:
        return f"{value:.3g}"
    if size >= 100 or value == 0:
        return f"{value:.0f}"
    if size < 0.01:
        return f"{value:.3g}"
    return f"{value:.1f}" if size >= 10 else f"{value:.2f}" if size >= 1 else f"{value:.3f}"


LONG_LIFE = 200_000.0  # h: a longer life says "not this" and no more, so it is not printed as if it were known


def amount(value: float | None, unit: str, system: str) -> str:
    """Return a value in the unit it is shown in, without the unit.

    >>> amount(1.2e7, "h", "si"), amount(45.0, "mm", "inch")
    ('over 200000', '1.77')
    """
    if unit == "h" and value is not None and value > LONG_LIFE:
        return f"over {LONG_LIFE:.0f}"
    return number(None if value is None else converted(value, unit, system))


def figure(value: float | None, unit: str, system: str) -> str:
    """Return a value with its unit as it is shown."""
    if value is None:
        return "-"
    return f"{amount(value, unit, system)} {shown_unit(unit, system)}".rstrip()


_NUMBER = r"-?[0-9]+(?:\.[0-9]+)?(?:e[+-]?[0-9]+)?"
# What has no form of its own in inch practice, or is a name: watts and what is made of them, hours, rpm, mm^2/s (which
# is cSt), n dm in mm/min, g/h of a feeder, kg/m^3, rad/s^2, MPa, and the um of filters and ISO 4406.
# As texts write units: each with its kind and the word it becomes. A kelvin of a text is always a difference.
_WORDS = {KINDS[name].unit: (name, word) for name, word in _INCH.items()} | {
    "K": ("temperature difference", "delta_degF"),
    "m": ("length", "ft"),
    "m^2": ("area", "ft^2"),
    "l": ("volume", "gal"),
    "kg": ("mass", "lb"),
    "kN": ("force", "lbf"),
    "mm/s": ("velocity", "in/s"),
}
# One number, several of a size ("45 x 100 x 25 mm") or a range ("14 to 17 K"), then a house unit that ends there.
_UNITS = "|".join(re.escape(unit) for unit in sorted(_WORDS, key=len, reverse=True))
_DESIGNATION = re.compile("[0-9]{4,}")  # "22218 K" has a tapered bore, and no bearing is that much hotter
_FIGURES = re.compile(rf"(?<![\w.,/-])({_NUMBER}(?: (?:x|to) {_NUMBER})*) ({_UNITS})(?![\w/^*]|\.[0-9])")


def in_system(text: str, system: str) -> str:
    """Return a finished text with the figures of house units in it as they are shown.

    Strict: only a number, or numbers joined by "x" or "to", right before a house unit that stands alone.

    >>> in_system("P is 1868 N, 45 x 100 x 25 mm, 110 mm^2/s at 40 degC, 14 to 17 K", "inch")
    'P is 420 lbf, 1.77 x 3.94 x 0.984 in, 110 mm^2/s at 104 degF, 25.2 to 30.6 delta_degF'
    """
    if system != "inch":
        return text

    def shown(found: re.Match[str]) -> str:
        name, word = _WORDS[found[2]]
        kind = KINDS[name]
        figures = found[1]
        if found[2] == "K" and _DESIGNATION.fullmatch(figures):
            return found[0]
        written = "delta_degC" if found[2] == "K" else found[2]
        figures = re.sub(
            _NUMBER, lambda one: number(from_house(to_house(float(one[0]), written, kind), word, kind)), figures
        )
        return f"{figures} {word}"

    return _FIGURES.sub(shown, text)


def named(line: str, system: str) -> str:
    """Return the line of a bearing or lubricant: its figures follow the name, which may end in what reads like a unit.

    >>> named("22218 K spherical roller, 90 x 160 x 40 mm", "inch")
    '22218 K spherical roller, 3.54 x 6.30 x 1.57 in'
    >>> named("oil N (46 mm^2/s at 40 degC)", "inch")
    'oil N (46 mm^2/s at 104 degF)'
    """
    mark = "(" if "(" in line else ", "
    name, middle, figures = line.rpartition(mark)
    return printable(name + middle + in_system(figures, system))


def printable(text: str) -> str:
    """Return a user's text without control characters, which could steer a terminal."""
    return "".join(c if c.isprintable() else " " for c in text)


def is_plain(console: Console) -> bool:
    """Tell a terminal that shows little more than ASCII."""
    return not console.encoding.lower().startswith("utf")
