"""Boundary dimensions: the tables of ISO 15, ISO 355, ISO 104 and ISO 9628, read when first asked for.

A dimension series has two digits: width (or height) series, then diameter series. ISO 15 and ISO 104 are asked by
it ("03"); ISO 355 by the series of the trade ("302"), as its table is typed that way; ISO 9628 has one series, "".
"""

from __future__ import annotations

import csv
import functools
import importlib.resources
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from lubecheck.errors import TableError

STANDARDS = ("iso-15", "iso-355", "iso-104", "iso-9628")
_WIDTH_SERIES = "012346"
_SERIES_COLUMN = {"iso-355": "series", "iso-104": "dimension_series"}

Row = Mapping[str, str]


@dataclass(frozen=True, slots=True)
class Boundary:
    """The outside of a bearing, mm; the contact angle where the standard's series fixes it, deg."""

    bore: float
    outside: float
    width: float
    contact_angle: float | None = None


@functools.cache
def table(standard: str) -> Mapping[tuple[str, float], Boundary]:
    """Return a standard's table by series and bore.

    >>> table("iso-15")["03", 45.0]
    Boundary(bore=45.0, outside=100.0, width=25.0, contact_angle=None)
    """
    name = f"{standard.replace('-', '_')}.csv"
    text = importlib.resources.files(__package__).joinpath(name).read_text(encoding="utf-8")
    return parse(text, standard, name)


def parse(text: str, standard: str, name: str) -> Mapping[tuple[str, float], Boundary]:
    """Read the text of a table; `name` is said where the table breaks its schema. Lines that begin with # are remarks.

    Raises TableError.
    """
    made: dict[tuple[str, float], Boundary] = {}
    for row in csv.DictReader(line for line in text.splitlines() if not line.startswith("#")):
        for series, boundary in _entries(row, standard, name):
            if (series, boundary.bore) in made:
                raise TableError(f"{name}: bore {boundary.bore:g} of series {series} stands twice")
            made[series, boundary.bore] = boundary
    return made


def _entries(row: Row, standard: str, name: str) -> Iterator[tuple[str, Boundary]]:
    """Yield the bearings of one row: of ISO 15 one for each width series that has a width."""
    if standard == "iso-15":
        for digit in _WIDTH_SERIES:
            if row.get(f"w{digit}"):
                yield digit + row["diameter_series"], _boundary(row, name, width=f"w{digit}")
    else:
        series = row[_SERIES_COLUMN[standard]] if standard in _SERIES_COLUMN else ""
        yield series, _boundary(row, name, angle="contact_angle" if standard == "iso-355" else None)


def _boundary(row: Row, name: str, *, width: str = "width", angle: str | None = None) -> Boundary:
    """Read the sizes of one bearing; refuse what cannot be one."""
    made = Boundary(
        _number(row, "bore", name),
        _number(row, "outside", name),
        _number(row, width, name),
        None if angle is None else _number(row, angle, name),
    )
    if made.outside <= made.bore:
        raise TableError(f"{name}: outside of row {dict(row)} is not above its bore")
    return made


def _number(row: Row, column: str, name: str) -> float:
    try:
        value = float(row[column])
    except (KeyError, TypeError, ValueError) as refused:
        raise TableError(f"{name}: {column} of row {dict(row)} is not a number") from refused
    if not 0 < value < float("inf"):
        raise TableError(f"{name}: {column} of row {dict(row)} is not a positive number")
    return value
