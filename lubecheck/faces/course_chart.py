"""Charts for the terminal: temperatures over time, from a start or a regreasing until nothing moves."""

from __future__ import annotations

import itertools
import math
from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass

import numpy as np
from rich.text import Text

from lubecheck.faces.charts import STYLES
from lubecheck.faces.display import converted, shown_unit

_MARGIN = 8  # cells for the temperatures at the left
_LEAST_WIDTH, _MOST_WIDTH = 30, 90
_ROWS = 13
_HOURS = (0.25, 0.5, 1, 2, 3, 4, 6, 8, 12, 24, 48, 96, 168, 336, 720, 1440)  # between the marks at the foot
_CELLS_A_MARK = 9


@dataclass(frozen=True, slots=True)
class Line:
    """A course to draw: its letter, its times and its temperatures."""

    letter: str
    hours: Sequence[float]
    temperatures: Sequence[float]  # degC


def course_chart(
    lines: Sequence[Line],
    *,
    until: float,
    width: int,
    is_plain: bool,
    system: str = "si",
    levels: Mapping[str, float] | None = None,
) -> list[Text]:
    """Return the lines of a chart of temperature over time.

    lines: the courses, each drawn with its letter; where they meet their letters take turns
    until [h]: time at the right
    width: cells of the terminal
    is_plain: ASCII only
    levels [degC]: temperatures to rule across by their name, such as an alarm; left out where they would flatten all
    """
    width = max(_LEAST_WIDTH, min(_MOST_WIDTH, width - _MARGIN - 2))
    values = [value for line in lines for value in line.temperatures]
    low, high = min(values), max(values)
    ruled = {name: level for name, level in (levels or {}).items() if level <= high + 2 * max(high - low, 5.0)}
    low, high = min([low, *ruled.values()]), max([high, *ruled.values()])
    room = max(high - low, 2.0) * 0.04
    low, high = low - room, high + room

    def row_of(temperature: float) -> int:
        return round((high - temperature) / (high - low) * (_ROWS - 1))

    grid = [[(" ", "")] * width for _ in range(_ROWS)]
    rule, bar, corner, dash, tick = ("=", "|", "+", "-", "+") if is_plain else ("═", "│", "└", "─", "┴")
    labels = {row: f"{converted(high - (high - low) * row / (_ROWS - 1), 'degC', system):.0f}"
              for row in range(0, _ROWS, 3)}  # fmt: skip
    for name, level in ruled.items():
        row = row_of(level)
        grid[row] = [(rule, "bold")] * width
        labels[row] = name[: _MARGIN - 2]
    for row, column, mark in _marks(lines, until, width, row_of):
        grid[row][column] = mark
    drawn = [Text(shown_unit("degC", system))]
    for row, cells in enumerate(grid):
        text = Text(labels.get(row, "").rjust(_MARGIN - 1) + bar)
        for style, group in itertools.groupby(cells, key=lambda cell: cell[1]):
            text.append("".join(mark for mark, _ in group), style=style or None)
        text.rstrip()
        drawn.append(text)
    return [*drawn, *_foot(until, width, corner, dash, tick)]


def _marks(
    lines: Sequence[Line], until: float, width: int, row_of: Callable[[float], int]
) -> list[tuple[int, int, tuple[str, str]]]:
    met: dict[tuple[int, int], list[tuple[str, str]]] = {}
    for i, line in enumerate(lines):
        at = np.interp(np.linspace(0.0, until, width), line.hours, line.temperatures)
        for column, value in enumerate(at.tolist()):
            met.setdefault((row_of(value), column), []).append((line.letter, STYLES[i % len(STYLES)]))
    return [(row, column, cells[column % len(cells)]) for (row, column), cells in met.items()]


def _foot(until: float, width: int, corner: str, dash: str, tick: str) -> list[Text]:
    room = max(1, width // _CELLS_A_MARK)
    step = next((step for step in _HOURS if until / step <= room), _HOURS[-1])
    axis, labels = [dash] * width, [" "] * (width + _MARGIN + 6)
    for i in range(math.floor(until / step + 1e-9) + 1):
        column = round(i * step / until * (width - 1))
        axis[column] = tick
        text = f"{i * step:g}"
        start = max(_MARGIN, column + _MARGIN - len(text) // 2)
        labels[start : start + len(text)] = text
    labels[: len("hours")] = "hours"
    return [Text(" " * (_MARGIN - 1) + corner + "".join(axis)), Text("".join(labels).rstrip())]
