"""ISO 4406 scale numbers, the classes of ISO 281 Annex A by them, and Cantley's law for water."""

from __future__ import annotations

import numpy as np
import pytest

from lubecheck.data.cleanliness import read_code
from lubecheck.physics import cleanliness
from lubecheck.physics.fatigue import SETTINGS


# Seen: 14 is 80 to 160 per ml, 17 is 640 to 1300, 20 is 5 to 10 thousand. The others from memory.
@pytest.mark.parametrize(
    ("number", "more_than", "up_to"),
    [(14, 80, 160), (17, 640, 1300), (20, 5000, 10_000), (10, 5, 10), (24, 80_000, 160_000), (0, 0, 0.01)],
)
def test_a_scale_number_covers_its_printed_counts(number, more_than, up_to):
    assert cleanliness.scale_number([more_than * 1.0001 + 1e-9, up_to]).magnitude.tolist() == [number, number]
    assert cleanliness.scale_number(up_to * 1.0001).magnitude == number + 1


# Annex A, figures A.1 to A.9, by their titles (memory)
@pytest.mark.parametrize(
    ("code", "supply", "setting"),
    [
        ("-/13/10", "circulating", "circulating -/13/10"),
        ("16/13/10", "circulating", "circulating -/13/10"),
        ("-/14/10", "circulating", "circulating -/15/12"),
        ("-/13/11", "circulating", "circulating -/15/12"),
        ("-/17/14", "circulating", "circulating -/17/14"),
        ("-/19/16", "circulating", "circulating -/19/16"),
        ("-/20/16", "circulating", "off scale"),
        ("10/8/5", "bath", "bath -/13/10"),
        ("18/15/12", "bath", "bath -/15/12"),
        ("-/16/12", "bath", "bath -/17/14"),
        ("-/19/16", "bath", "bath -/19/16"),
        ("-/20/17", "bath", "bath -/21/18"),
        ("-/21/18", "bath", "bath -/21/18"),
        ("23/22/18", "bath", "off scale"),
    ],
)
def test_a_code_falls_in_the_class_that_is_as_dirty_or_dirtier(code, supply, setting):
    read = read_code(code)
    six, fourteen = read.over_6, read.over_14
    found = cleanliness.setting_of_code(at_6=six, at_14=fourteen, supply=supply).magnitude
    assert SETTINGS[int(found)] == setting


# ISO 281 Annex A, table of filters (memory)
@pytest.mark.parametrize(
    ("size", "beta", "setting"),
    [(6, 200, "circulating -/13/10"), (12, 200, "circulating -/15/12"), (25, 75, "circulating -/17/14"),
     (40, 75, "circulating -/19/16"), (6, 100, "circulating -/17/14"), (41, 1000, "off scale"), (6, 2, "off scale")],
)  # fmt: skip
def test_a_filter_keeps_the_class_that_the_annex_gives_it(size, beta, setting):
    assert cleanliness.setting_of_filter(size, beta) == setting


# Cantley 1977 (memory): L = (100/ppm)^0.6; at 400 ppm less than half is left, at 200 ppm two thirds
@pytest.mark.parametrize(("ppm", "factor"), [(25, 1.0), (100, 1.0), (200, 0.660), (400, 0.435)])
def test_water_takes_what_cantleys_tests_say(ppm, factor):
    assert cleanliness.water_factor(f"{ppm} ppm").magnitude == pytest.approx(factor, abs=5e-4)


def test_more_water_than_was_tested_is_outside():
    assert cleanliness.water_factor.outside(content=np.array([3.9e-4, 4.1e-4])).tolist() == [False, True]
