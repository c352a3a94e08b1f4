"""Interval and amount of positions of different families, through the whole program, against calculation by hand."""

from __future__ import annotations

import pytest
from conftest import BASE, with_key

import lubecheck
from lubecheck.model.reader import read_case

POSITIONS = [
    # designation, d mm, rpm, K (14e6/(n sqrt d) - 4 d) by hand in h, 0.005 D B by hand in g
    ("6205", 25, 2950, 8492, 3.9),  # 52 x 15
    ("6307", 35, 3550, 5266, 8.4),  # 80 x 21
    ("6309", 45, 1480, 12301, 12.5),  # 100 x 25; 12 301 h is also the printed example
    ("6316", 80, 980, 12772, 33.15),  # 170 x 39
    ("7208 B", 40, 1480, 13357, 7.2),  # 80 x 18
    ("1210", 50, 980, 18203, 9.0),  # 90 x 20
    ("NU 310", 50, 1480, 5689, 14.85),  # 110 x 27
    ("NU 224", 120, 735, 6294, 43.0),  # 215 x 40
    ("22218", 90, 500, 2591, 32.0),  # 160 x 40
    ("22240", 200, 150, 5800, 176.4),  # 360 x 98
    ("30212", 60, 990, 1586, 13.0625),  # 110 x 23.75
    ("51210", 50, 300, 6400, 8.58),  # 78 x 22
]


def position(designation: str, bore: int, speed: float, lubricant: str = "lithium-110-2", **surroundings: str):
    text = BASE.replace('"6309"', f'"{designation}"').replace('"1480 rpm"', f'"{speed} rpm"')
    for key in ("dynamic_rating", "static_rating", "mass"):
        text = with_key(text, "bearing", key, None)
    load = f'"{0.7 * bore**2} N"'  # a light load for any size
    is_thrust = designation.startswith("51")
    text = with_key(text, "duty", "radial_load", '"0 N"' if is_thrust else load)
    text = with_key(text, "duty", "axial_load", load if is_thrust else '"0 N"')
    text = with_key(with_key(text, "grease", "interval", None), "lubricant", "name", f'"{lubricant}"')
    text = with_key(with_key(text, "grease", "fill", None), "housing", "void", None)
    for key, value in surroundings.items():
        text = with_key(text, "surroundings", key, f'"{value}"')
    return lubecheck.check(read_case(text))


@pytest.mark.parametrize(("designation", "bore", "speed", "hours", "grams"), POSITIONS)
def test_interval_and_amount_are_what_a_hand_calculation_gives(designation, bore, speed, hours, grams):
    result = position(designation, bore, speed)
    line = result.interval_lines[0]
    assert float(line.note.split()[0]) == pytest.approx(hours, abs=0.51)
    # Lithium soap: halves each 15 K above 70 degC, doubles at most below; P/C is under 0.1, so load takes nothing.
    temperature = result.operating.temperature.m_as("degC")
    assert result.life.load_ratio.m < 0.1
    by_hand = hours * min(2.0, 2 ** ((70 - temperature) / 15))
    assert line.hours == pytest.approx(by_hand, rel=1e-3)
    assert result.limit("interval").allowed == pytest.approx(min(by_hand, 48 * 8766 / 12), rel=1e-3)
    assert result.amounts.regrease_quantity.m_as("g") == pytest.approx(grams, rel=1e-9)


def test_the_factors_of_the_surroundings_multiply():
    plain, harsh = (position("6309", 45, 1480, **answers) for answers in (
        {}, {"dust": "dusty", "water": "humid", "vibration": "7 mm/s", "orientation": "vertical"}))  # fmt: skip
    # 0.4 x 0.7 x 0.6 x 0.5 = 0.084, reliability handbooks
    assert harsh.interval_lines[0].hours == pytest.approx(0.084 * plain.interval_lines[0].hours, rel=0.02)


@pytest.mark.parametrize(("reference", "step"), [(60, 14), (65, 14), (70, 15), (75, 16), (80, 17), (120, 17)])
def test_the_step_of_a_grease_is_that_of_the_printed_pair_next_to_it(reference, step):
    # MIL-HDBK-1164: 14 K above 65 degC; makers: 15 K above 70, 17 K above 80 (seen); between and beyond: this program
    from lubecheck.physics import grease_corrections

    assert grease_corrections.halving_step.plain(float(reference)) == pytest.approx(step)
