"""ISO 355, tapered roller bearings: d, D, T in mm and the factor e of handbook tables, as remembered.

e = 1.5 tan(alpha) (ISO 281), printed to two figures, checks the contact angle: 0.006 for rounding.
"""

import math

import pytest

from lubecheck.data import bearings

ISO_355 = """
30203 17 40 13.25 0.35, 30205 25 52 16.25 0.37, 30208 40 80 19.75 0.37, 30210 50 90 21.75 0.42
30213 65 120 24.75 0.40, 30216 80 140 28.25 0.42, 30220 100 180 37 0.42, 30224 120 215 43.5 0.43
30230 150 270 49 0.43, 30240 200 360 64 0.43, 30302 15 42 14.25 0.28, 30304 20 52 16.25 0.30
30307 35 80 22.75 0.31, 30310 50 110 29.25 0.35, 30316 80 170 42.5 0.35, 30320 100 215 51.5 0.35
30324 120 260 59.5 0.35, 31306 30 72 20.75 0.83, 31310 50 110 29.25 0.83, 31318 90 190 46.5 0.83
32005 25 47 15 0.43, 32008 40 68 19 0.38, 32010 50 80 20 0.42, 32015 75 115 25 0.46
32020 100 150 32 0.46, 32028 140 210 45 0.46, 32040 200 310 70 0.43, 32206 30 62 21.25 0.37
32209 45 85 24.75 0.40, 32214 70 125 33.25 0.42, 32220 100 180 49 0.42, 32228 140 250 71.75 0.43
32304 20 52 22.25 0.30, 32308 40 90 35.25 0.35, 32312 60 130 48.5 0.35, 32318 90 190 67.5 0.35
32324 120 260 90.5 0.35, 33010 50 80 24 0.32, 33018 90 140 39 0.27, 33024 120 180 48 0.31
33110 50 85 26 0.41, 33116 80 130 37 0.42, 33207 35 72 28 0.35, 33210 50 90 32 0.41, 33216 80 140 46 0.43
"""
ENTRIES = [entry.strip() for entry in ISO_355.replace("\n", ",").split(",") if entry.strip()]


@pytest.mark.parametrize("entry", ENTRIES)
def test_dimensions_and_contact_angle_are_those_of_iso_355(entry):
    name, bore, outside, width, e = entry.split()
    found = bearings.find(name)
    assert (found.bore, found.outside, found.width) == (float(bore), float(outside), float(width))
    assert 1.5 * math.tan(math.radians(found.contact_angle)) == pytest.approx(float(e), abs=0.006)
    assert found.basis["width"] == found.basis["contact_angle"] == "iso-355"
    assert "contact_angle" not in found.estimated
