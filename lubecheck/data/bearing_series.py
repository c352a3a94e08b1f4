"""Bearing series by DIN 623-1: which letters and digits name which family, and which standard holds their size.

Each series also carries the internal geometry it is estimated by: the rolling element's diameter as a share of the
section height (D - d)/2, for rollers the length as a share of the width, and how much of the pitch circle the
elements take up. The shares are least squares fits of C and C0 to published handbook ratings
(tests/reference/test_ratings.py says how far off each family is). Contact angles that no standard fixes are those that
published e factors give.
"""

from __future__ import annotations

import functools
from collections.abc import Mapping
from dataclasses import dataclass
from types import MappingProxyType

from lubecheck.data import dimensions
from lubecheck.data.dimensions import Boundary


@dataclass(frozen=True, slots=True)
class Shape:
    """Internal geometry of a series, as shares of its outside."""

    diameter: float  # of a rolling element over the section height, at a pitch diameter of 100 mm
    filling: float  # of the pitch circle by the elements of one row
    length: float = 0.0  # of a roller over the width of the bearing, one row, at the same pitch diameter
    growth: float = 0.0  # diameter and length go with (pitch diameter / 100 mm) to this power: flanges do not scale


@dataclass(frozen=True, slots=True, kw_only=True)
class Series:
    """One bearing series: "63", "NU 22", "302"."""

    digits: str
    family: str
    dimension_series: str  # ISO: width or height series, then diameter series
    shape: Shape
    letters: tuple[str, ...] = ("",)
    least: float = 10.0  # bores made in this series, mm
    most: float = 10_000.0
    rows: int = 1
    contact_angle: float | None = None
    standard: str = "iso-15"

    def boundaries(self) -> Mapping[float, Boundary]:
        """Return the sizes of this series by bore."""
        sizes = _boundaries(self.standard, self.table_key, self.least, self.most)
        has_odd = self.digits in _SERIES_WITH_ODD_BORES and self.family in _FAMILIES_WITH_ODD_BORES
        return sizes if has_odd else {bore: size for bore, size in sizes.items() if bore not in _ODD_BORES}

    @property
    def table_key(self) -> str:
        """The key of this series in its standard's table."""
        return {"iso-355": self.digits, "iso-9628": ""}.get(self.standard, self.dimension_series)

    def name(self, bore: float, letters: str | None = None) -> str:
        """Return the basic designation of a bore.

        >>> next(s for s in SERIES if s.digits == "63").name(45.0)
        '6309'
        """
        word = self.letters[0] if letters is None else letters
        return f"{word} {self.digits}{bore_code(bore, self)}".strip()


def bore_code(bore: float, series: Series) -> str:
    """Return what follows the series in a designation: two digits, or a stroke and the bore itself."""
    if bore in _ODD_CODES:
        return _ODD_CODES[bore]
    if bore < 10 and len(series.digits) == 2:
        return f"{bore:g}"
    if 20 <= bore < 500 and bore % 5 == 0:
        return f"{bore / 5:02.0f}"
    return f"/{bore:g}"


_ODD_BORES = frozenset((22.0, 28.0, 32.0))  # between the usual bores, written out after a stroke: "62/22"
_SERIES_WITH_ODD_BORES = frozenset(("60", "62", "63", "49", "69"))
_FAMILIES_WITH_ODD_BORES = frozenset(("deep groove ball", "needle roller"))
_ODD_CODES: Mapping[float, str] = MappingProxyType({10.0: "00", 12.0: "01", 15.0: "02", 17.0: "03"})


@functools.cache
def _boundaries(standard: str, key: str, least: float, most: float) -> Mapping[float, Boundary]:
    sizes = dimensions.table(standard)
    return {bore: size for (series, bore), size in sizes.items() if series == key and least <= bore <= most}


def _group(
    family: str,
    rows: tuple[tuple[str, str, float, float, float | None, Shape], ...],
    *,
    letters: tuple[str, ...] = ("",),
    row_count: int = 1,
    standard: str = "iso-15",
) -> tuple[Series, ...]:
    """Make series of a family from rows: digits, dimension series, least and greatest bore, contact angle, shape."""
    return tuple(
        Series(
            digits=digits,
            family=family,
            dimension_series=dimension_series,
            shape=shape,
            letters=letters,
            least=least,
            most=most,
            rows=row_count,
            contact_angle=angle,
            standard=standard,
        )
        for digits, dimension_series, least, most, angle, shape in rows
    )


SERIES: tuple[Series, ...] = (
    *_group(
        "deep groove ball",
        (
            ("60", "10", 4, 500, None, Shape(0.625, 0.567)),
            ("62", "02", 3, 300, None, Shape(0.656, 0.539, 0.0, -0.08)),
            ("63", "03", 4, 300, None, Shape(0.655, 0.58, 0.0, -0.05)),
            ("64", "04", 17, 150, None, Shape(0.595, 0.631)),
            ("160", "00", 12, 500, None, Shape(0.52, 0.503)),
            ("618", "18", 10, 400, None, Shape(0.6, 0.503)),
            ("619", "19", 10, 340, None, Shape(0.587, 0.565)),
            # the same two in the shorter writing of the trade
            ("68", "18", 10, 400, None, Shape(0.6, 0.503)),
            ("69", "19", 10, 340, None, Shape(0.587, 0.565)),
            # the wide sealed series have the balls of the narrow ones
            ("622", "22", 10, 75, None, Shape(0.656, 0.539, 0.0, -0.08)),
            ("623", "23", 10, 75, None, Shape(0.655, 0.58, 0.0, -0.05)),
            ("630", "30", 10, 60, None, Shape(0.625, 0.567)),
        ),
    ),
    *_group(
        "deep groove ball",
        (("2", "02", 12, 90, None, Shape(0.656, 0.539, 0.0, -0.08)),),
        letters=("UC", "UCP", "UCF", "UCFL", "UCT"),
        standard="iso-9628",
    ),
    *_group(
        "double row deep groove ball",
        (
            ("42", "22", 10, 90, None, Shape(0.472, 0.596, 0.0, -0.117)),
            ("43", "23", 15, 75, None, Shape(0.547, 0.614)),
        ),
        row_count=2,
    ),
    *_group(
        "self-aligning ball",
        (
            ("12", "02", 10, 110, 9.0, Shape(0.47, 0.795, 0.0, -0.03)),
            ("13", "03", 10, 110, 9.5, Shape(0.455, 0.86)),
            ("22", "22", 10, 110, 11.5, Shape(0.56, 0.83, 0.0, -0.1)),
            ("23", "23", 10, 110, 16.0, Shape(0.578, 0.866)),
        ),
        row_count=2,
    ),
    *_group(
        "angular contact ball",
        (
            ("70", "10", 10, 240, 25.0, Shape(0.625, 0.9)),
            ("72", "02", 10, 240, 40.0, Shape(0.64, 0.914)),
            ("73", "03", 10, 240, 40.0, Shape(0.681, 0.922, 0.0, 0.065)),
            ("719", "19", 10, 340, 15.0, Shape(0.6, 0.9)),
        ),
    ),
    *_group(
        "double row angular contact ball",
        (
            ("32", "32", 10, 140, 30.0, Shape(0.614, 0.59, 0.0, 0.025)),
            ("33", "33", 10, 110, 30.0, Shape(0.645, 0.599, 0.0, 0.08)),
        ),
        row_count=2,
    ),
    *_group(
        "four-point contact ball",
        (
            ("10", "10", 20, 300, 35.0, Shape(0.63, 0.89)),
            ("2", "02", 15, 300, 35.0, Shape(0.636, 0.887, 0.0, 0.024)),
            ("3", "03", 15, 300, 35.0, Shape(0.642, 0.901, 0.0, 0.051)),
        ),
        letters=("QJ",),
    ),
    *_group(
        "cylindrical roller",
        (
            ("10", "10", 25, 500, None, Shape(0.474, 0.664, 0.455, 0.165)),
            ("2", "02", 15, 360, None, Shape(0.552, 0.843, 0.582, 0.154)),
            ("22", "22", 15, 360, None, Shape(0.549, 0.875, 0.602, 0.135)),
            ("3", "03", 15, 300, None, Shape(0.543, 0.865, 0.596, 0.117)),
            ("23", "23", 15, 300, None, Shape(0.548, 0.885, 0.612, 0.085)),
            ("4", "04", 25, 150, None, Shape(0.486, 0.777, 0.532, 0.117)),
        ),
        letters=("NU", "NJ", "NUP", "NF", "N"),
    ),
    *_group(
        "full complement cylindrical roller",
        (
            ("18", "18", 100, 500, None, Shape(0.538, 0.961, 0.589)),
            ("29", "29", 60, 340, None, Shape(0.538, 0.961, 0.589)),
            ("30", "30", 20, 500, None, Shape(0.579, 0.964, 0.592, 0.095)),
            ("22", "22", 20, 300, None, Shape(0.594, 0.99, 0.67, 0.072)),
            ("23", "23", 20, 300, None, Shape(0.594, 0.99, 0.67, 0.072)),
        ),
        letters=("NCF", "NJG", "SL18"),
    ),
    *_group(
        "needle roller",
        (
            ("48", "48", 110, 300, None, Shape(0.344, 0.741, 0.653)),
            ("49", "49", 10, 140, None, Shape(0.38, 0.738, 0.646, 0.02)),
            ("69", "69", 12, 100, None, Shape(0.385, 0.747, 0.662, 0.02)),
        ),
        letters=("NA",),
    ),
    *_group(
        "tapered roller",
        (
            ("302", "02", 15, 300, None, Shape(0.51, 0.845, 0.625, 0.088)),
            ("303", "03", 15, 300, None, Shape(0.507, 0.859, 0.636, 0.081)),
            ("313", "13", 15, 300, None, Shape(0.477, 0.829, 0.611, 0.053)),
            ("320", "20", 15, 300, None, Shape(0.473, 0.892, 0.658, 0.08)),
            ("322", "22", 15, 300, None, Shape(0.513, 0.863, 0.64, 0.07)),
            ("323", "23", 15, 300, None, Shape(0.498, 0.877, 0.649, 0.066)),
            ("330", "30", 15, 300, None, Shape(0.477, 0.916, 0.677, 0.158)),
            ("331", "31", 15, 300, None, Shape(0.485, 0.903, 0.668, 0.011)),
            ("332", "32", 15, 300, None, Shape(0.504, 0.923, 0.684, 0.046)),
        ),
        standard="iso-355",
    ),
    *_group(
        "spherical roller",
        (
            ("213", "03", 20, 110, 9.0, Shape(0.515, 0.888, 0.375, 0.05)),
            ("222", "22", 25, 360, 9.5, Shape(0.661, 0.877, 0.374, 0.02)),
            ("223", "23", 35, 300, 13.0, Shape(0.67, 0.914, 0.393, -0.025)),
            ("230", "30", 100, 500, 8.5, Shape(0.59, 0.83, 0.353, 0.07)),
            ("231", "31", 90, 500, 11.0, Shape(0.57, 0.836, 0.356, 0.127)),
            ("232", "32", 90, 360, 12.5, Shape(0.585, 0.849, 0.361, 0.093)),
            ("239", "39", 130, 340, 6.5, Shape(0.59, 0.83, 0.353, 0.07)),
            ("240", "40", 75, 500, 11.5, Shape(0.584, 0.841, 0.358, 0.078)),
            ("241", "41", 90, 500, 14.0, Shape(0.585, 0.856, 0.364, 0.088)),
        ),
        row_count=2,
    ),
    *_group(
        "thrust ball",
        (
            ("511", "11", 10, 300, 90.0, Shape(0.671, 0.982)),
            ("512", "12", 10, 280, 90.0, Shape(0.712, 0.992, 0.0, 0.036)),
            ("513", "13", 25, 200, 90.0, Shape(0.67, 0.863)),
            ("514", "14", 25, 180, 90.0, Shape(0.71, 0.99, 0.0, 0.035)),
        ),
        standard="iso-104",
    ),
    *_group(
        "thrust cylindrical roller",
        (
            ("811", "11", 15, 300, 90.0, Shape(0.53, 0.63, 0.459, -0.06)),
            ("812", "12", 30, 280, 90.0, Shape(0.58, 0.66, 0.48, -0.1)),
        ),
        standard="iso-104",
    ),
    *_group(
        "thrust spherical roller",
        (
            ("292", "92", 60, 300, 50.0, Shape(0.44, 0.82, 0.58)),
            ("293", "93", 60, 300, 50.0, Shape(0.587, 0.816, 0.586, 0.154)),
            ("294", "94", 60, 300, 50.0, Shape(0.648, 0.855, 0.618, 0.068)),
        ),
        standard="iso-104",
    ),
)


def of_family(family: str) -> tuple[Series, ...]:
    """Return the series of a family, in the order of the table."""
    return tuple(series for series in SERIES if series.family == family)
