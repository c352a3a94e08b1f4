"""Charts for the terminal: viscosity over temperature on the scale of ASTM D341, where oils are straight lines."""

from __future__ import annotations

import itertools
import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

import numpy as np
from rich.text import Text

from lubecheck.faces.display import converted, shown_unit
from lubecheck.physics import viscosity
from lubecheck.units import KINDS, Array, to_house

# Not the colours of the verdict; the letters tell the lines apart without them.
STYLES = ("cyan", "magenta", "blue", "bright_cyan", "bright_magenta", "bright_blue")
LETTERS = "ABCDEFGHJKLM"
_MARGIN = 8  # cells for the viscosities at the left
_LEAST_WIDTH, _MOST_WIDTH = 30, 110
_ROWS = 22
_KELVIN = 273.15
_STEPS = (10.0, 20.0, 25.0, 50.0, 100.0)  # between the temperatures at the foot
_CELLS_A_STEP = 8
_NU_LEAST, _NU_MOST = 0.3, 1e6  # mm^2/s; below and above no chart is read


@dataclass(frozen=True, slots=True)
class Curve:
    """An oil to draw: its letter, its two viscosities, and the temperatures between which it is used."""

    letter: str
    nu_40: float
    nu_100: float
    lowest: float = -math.inf
    highest: float = math.inf


@dataclass(frozen=True, slots=True)
class _Frame:
    """The scale: ln T across, ln ln Z up."""

    cold: float  # degC
    hot: float
    thin: float  # mm^2/s
    thick: float
    width: int
    rows: int

    @property
    def temperatures(self) -> Array:
        """The temperature in the middle of each column."""
        across: Array = np.linspace(math.log(self.cold + _KELVIN), math.log(self.hot + _KELVIN), self.width)
        return np.exp(across) - _KELVIN

    def column(self, temperature: float) -> int:
        """The column of a temperature."""
        low, high = math.log(self.cold + _KELVIN), math.log(self.hot + _KELVIN)
        return round((math.log(temperature + _KELVIN) - low) / (high - low) * (self.width - 1))

    def row(self, nu: float) -> int:
        """The row of a viscosity, 0 at the top; outside the frame it is beyond its rows."""
        low, high = _scale(self.thin), _scale(self.thick)
        return round((high - _scale(nu)) / (high - low) * (self.rows - 1))


def _scale(nu: float) -> float:
    return float(viscosity.walther_ordinate.plain(np.asarray(nu)))


def viscosity_chart(
    curves: Sequence[Curve],
    *,
    cold: float,
    hot: float,
    width: int,
    is_plain: bool,
    system: str = "si",
    level: float | None = None,
) -> list[Text]:
    """Return the lines of a chart of viscosity over temperature.

    curves: the oils, each drawn with its letter; a small letter outside its temperatures of use
    cold, hot [degC]: the temperatures at the sides
    width: cells of the terminal
    is_plain: ASCII only
    level [mm^2/s]: a viscosity to rule across, such as that of kappa 1
    """
    frame = _frame(curves, cold, hot, width, level)
    grid = [[(" ", "")] * frame.width for _ in range(frame.rows)]
    dot, rule, bar, corner, tick = (".", "=", "|", "+", "+") if is_plain else "·═│└┴"
    marks = _viscosity_marks(frame)
    for row in marks:
        grid[row] = [(dot if column % 2 else " ", "dim") for column in range(frame.width)]
    if level is not None:
        row = frame.row(level)
        grid[row] = [(rule, "bold")] * frame.width
    for row, column, cell in _drawn(curves, frame):
        grid[row][column] = cell
    lines = [Text("mm²/s" if not is_plain else "mm2/s")]
    for row, cells in enumerate(grid):
        label = "kappa 1" if level is not None and row == frame.row(level) else marks.get(row, "")
        line = Text(label.rjust(_MARGIN - 1) + bar)
        for style, group in itertools.groupby(cells, key=lambda cell: cell[1]):
            line.append("".join(mark for mark, _ in group), style=style or None)
        line.rstrip()
        lines.append(line)
    return [*lines, *_foot(frame, corner, "-" if is_plain else "─", tick, system)]


def _frame(curves: Sequence[Curve], cold: float, hot: float, width: int, level: float | None) -> _Frame:
    width = max(_LEAST_WIDTH, min(_MOST_WIDTH, width - _MARGIN - 1))
    ends = [
        float(viscosity.kinematic_viscosity.plain(np.asarray(at), nu_40=curve.nu_40, nu_100=curve.nu_100))
        for curve in curves
        for at in (cold, hot)
    ]
    ends += [] if level is None else [level]
    thin, thick = max(_NU_LEAST, min(ends) * 0.9), min(_NU_MOST, max(ends) * 1.1)
    return _Frame(cold, hot, thin, max(thick, 2 * thin), width, _ROWS)


def _drawn(curves: Sequence[Curve], frame: _Frame) -> Iterator[tuple[int, int, tuple[str, str]]]:
    """Yield row, column and cell of every letter; where oils meet, their letters take turns."""
    met: dict[tuple[int, int], list[tuple[str, str]]] = {}
    temperatures = frame.temperatures
    for i, curve in enumerate(curves):
        nu = viscosity.kinematic_viscosity.plain(temperatures, nu_40=curve.nu_40, nu_100=curve.nu_100)
        for column, (temperature, value) in enumerate(zip(temperatures, nu, strict=True)):
            row = frame.row(float(value))
            is_used = curve.lowest - 1e-6 <= temperature <= curve.highest + 1e-6
            letter = curve.letter if is_used else curve.letter.lower()
            if 0 <= row < frame.rows:
                met.setdefault((row, column), []).append((letter, STYLES[i % len(STYLES)]))
    for (row, column), cells in met.items():
        yield row, column, cells[column % len(cells)]


def _viscosity_marks(frame: _Frame) -> dict[int, str]:
    """Return the round viscosities at the left by their rows, not closer than two rows."""
    marks: dict[int, str] = {}
    for digits in ((1,), (2, 5), (3,)):  # the tens first, then what finds room between them
        for power in range(7):
            for digit in digits:
                nu = digit * 10.0**power
                if not frame.thin <= nu <= frame.thick:
                    continue
                row = frame.row(nu)
                if all(abs(row - other) > 1 for other in marks):
                    marks[row] = f"{nu:g}" if nu < 1e6 else "1000000"
    return marks


def _foot(frame: _Frame, corner: str, line: str, tick: str, system: str) -> list[Text]:
    """Return the axis at the bottom and its temperatures."""
    kind = KINDS["temperature"]
    word = shown_unit("degC", system)
    low, high = (converted(end, "degC", system) for end in (frame.cold, frame.hot))
    room = max(1, frame.width // _CELLS_A_STEP)
    step = next((step for step in _STEPS if (high - low) / step <= room), _STEPS[-1])
    axis = [line] * frame.width
    labels = [" "] * (frame.width + _MARGIN + 2)
    free = len(word) + 1
    for i in range(math.ceil(low / step - 1e-9), math.floor(high / step + 1e-9) + 1):
        column = frame.column(to_house(i * step, word, kind))
        text = f"{i * step:g}"
        start = column - len(text) // 2 + _MARGIN
        if start >= free and start + len(text) <= len(labels):
            axis[column] = tick
            labels[start : start + len(text)] = text
            free = start + len(text) + 1
    labels[: len(word)] = word
    return [Text(" " * (_MARGIN - 1) + corner + "".join(axis)), Text("".join(labels).rstrip())]
