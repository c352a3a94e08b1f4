"""The viscosity chart: oils are straight, told apart by letters, and everything stands where its axis says."""

from __future__ import annotations

import math

import pytest

from lubecheck.faces.charts import Curve, viscosity_chart
from lubecheck.physics.viscosity import kinematic_viscosity

A = Curve("A", 68.0, 8.53, -2.0, 100.0)
B = Curve("B", 68.0, 10.4, -41.0, 130.0)
MARGIN = 8


def drawn(*curves: Curve, cold=-40.0, hot=130.0, width=100, is_plain=False, **options) -> list[str]:
    lines = viscosity_chart(curves, cold=cold, hot=hot, width=width, is_plain=is_plain, **options)
    return [line.plain for line in lines]


def cells(lines: list[str]) -> list[str]:
    """The rows of the plot without the margin, padded to one width."""
    rows = [line[MARGIN:] for line in lines[1:-2]]
    return [row.ljust(max(map(len, rows))) for row in rows]


def test_an_oil_is_a_straight_line() -> None:
    rows = cells(drawn(A))
    points = [(x, y) for y, row in enumerate(rows) for x, mark in enumerate(row) if mark in "Aa"]
    (x0, y0), (x1, y1) = min(points), max(points)
    assert len({x for x, _ in points}) == x1 - x0 + 1  # in every column
    for x, y in points:
        assert abs(y - (y0 + (y1 - y0) * (x - x0) / (x1 - x0))) <= 1.01  # half a cell of rounding at each end and here


@pytest.mark.parametrize("width", [60, 80, 120])
@pytest.mark.parametrize("is_plain", [True, False])
def test_no_line_is_wider_than_the_terminal(width: int, is_plain: bool) -> None:
    assert all(len(line) <= width for line in drawn(A, B, width=width, is_plain=is_plain, level=13.7))


def test_a_letter_stands_where_the_axes_say() -> None:
    # 40 degC is marked at the foot; the letter above it stands between the marks above and below 68 mm^2/s.
    lines = drawn(A, cold=0.0, hot=100.0, width=90)
    column = lines[-1].index(" 40 ") + 1 + 1
    marks = {float(line[: MARGIN - 1]): y for y, line in enumerate(lines[1:-2]) if line[: MARGIN - 1].strip()}
    (row,) = [y for y, line in enumerate(lines[1:-2]) if line[column : column + 1] == "A"]
    above = max(y for nu, y in marks.items() if nu > 68)
    below = min(y for nu, y in marks.items() if nu < 68)
    assert above <= row <= below


def test_a_small_letter_is_outside_the_range_of_use() -> None:
    rows = cells(drawn(A))
    by_column = sorted((x, mark) for row in rows for x, mark in enumerate(row) if mark in "Aa")
    word = "".join(mark for _, mark in by_column)
    assert word.strip("a") == "A" * word.count("A")  # small at both ends, capitals between
    share = math.log(371.15 / 269.15) / math.log(403.15 / 233.15)  # -2 to 100 degC of -40 to 130, in ln T
    assert word.count("A") / len(word) == pytest.approx((share * (len(word) - 1)) / len(word), abs=0.03)


def test_two_oils_are_told_apart_by_letters_alone_and_take_turns_where_they_meet() -> None:
    text = "".join(cells(drawn(A, B)))
    assert text.count("A") > 20
    assert text.count("B") > 20
    same = "".join(cells(drawn(A, Curve("B", 68.0, 8.53, -2.0, 100.0))))
    assert abs(same.count("A") - same.count("B")) <= 2


def test_the_needed_viscosity_is_ruled_across_and_named() -> None:
    lines = drawn(A, B, level=13.7)
    (ruled,) = [line for line in lines if line.startswith("kappa 1")]
    assert ruled.count("═") > 70
    assert {"A", "B"} <= set(ruled)  # each oil crosses it
    # The first crossing is within a cell or two of the temperature at which the oil has that viscosity.
    crossing = next(t for t in range(0, 130) if kinematic_viscosity.plain(float(t), nu_40=68.0, nu_100=8.53) < 13.7)
    columns = len(ruled) - MARGIN
    expected = math.log((crossing + 273.15) / 233.15) / math.log(403.15 / 233.15) * (columns - 1)
    found = [x for x, mark in enumerate(ruled[MARGIN:]) if mark == "A"]
    assert min(found) - 3 <= expected <= max(found) + 3


def test_a_needed_viscosity_beyond_the_oils_widens_the_chart() -> None:
    assert any(line.startswith("kappa 1") for line in drawn(A, cold=0.0, hot=40.0, level=3.0))
    assert any(line.startswith("kappa 1") for line in drawn(A, cold=60.0, hot=100.0, level=3000.0))


def test_a_plain_chart_is_ascii() -> None:
    assert "\n".join(drawn(A, B, is_plain=True, level=13.7)).isascii()
    assert not "\n".join(drawn(A, B, level=13.7)).isascii()


def test_the_foot_is_in_the_units_that_were_asked_for() -> None:
    assert drawn(A)[-1].startswith("degC")
    inch = drawn(A, system="inch")[-1]
    assert inch.startswith("degF")
    assert "200" in inch


def test_a_very_thin_and_a_very_thick_oil_are_cut_at_the_frame_and_no_fault() -> None:
    lines = drawn(Curve("A", 0.6, 0.35), Curve("B", 20000.0, 800.0), cold=-60.0, hot=200.0)
    assert "A" in "".join(cells(lines))
    assert "B" in "".join(cells(lines))
