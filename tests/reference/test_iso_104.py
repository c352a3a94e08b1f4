"""ISO 104, thrust bearings, and ISO 9628, insert bearings: d, D, T in mm of handbook tables, as remembered."""

import pytest

from lubecheck.data import bearings

ISO_104 = """
51100 10 24 9, 51104 20 35 10, 51105 25 42 11, 51108 40 60 13, 51110 50 70 14, 51116 80 105 19, 51120 100 135 25
51130 150 190 31, 51140 200 250 37, 51204 20 40 14, 51206 30 52 16, 51208 40 68 19, 51210 50 78 22, 51215 75 110 27
51220 100 150 38, 51240 200 280 62, 51305 25 52 18, 51308 40 78 26, 51310 50 95 31, 51316 80 140 44, 51320 100 170 55
51405 25 60 24, 51408 40 90 36, 51410 50 110 43, 51416 80 170 68, 51420 100 210 85, 81105 25 42 11, 81110 50 70 14
81210 50 78 22, 81220 100 150 38, 29240 200 280 48, 29320 100 170 42, 29330 150 250 60, 29340 200 340 85
29412 60 130 42, 29416 80 170 54, 29420 100 210 67, 29430 150 300 90, 29440 200 400 122
"""
ENTRIES = [entry.strip() for entry in ISO_104.replace("\n", ",").split(",") if entry.strip()]


@pytest.mark.parametrize("entry", ENTRIES)
def test_dimensions_are_those_of_iso_104(entry):
    name, bore, outside, height = entry.split()
    found = bearings.find(name)
    assert (found.bore, found.outside, found.width) == (float(bore), float(outside), float(height))
    assert found.basis["width"] == "iso-104"


@pytest.mark.parametrize(
    ("name", "bore", "outside"), [("UC 205", 25, 52), ("UC 208", 40, 80), ("UCP 210", 50, 90), ("UC 203", 17, 47)]
)
def test_insert_bearings_have_the_outside_of_iso_9628_and_count_as_deep_groove(name, bore, outside):
    found = bearings.find(name)
    assert (found.bore, found.outside) == (bore, outside)
    assert found.family == "deep groove ball"
    assert found.seal == "contact seals"
